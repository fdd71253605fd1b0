import { describe, expect, it } from "vitest";
import {
  oxygenPartialPressure,
  BARRER_molmm2sPa,
  deadZone,
  filmEquivalentThickness,
  filmPermeance,
  filmTransferCoefficient,
} from "../../../lib/models/oxygen.js";

const relative = (found: number, expected: number): number => Math.abs(found / expected - 1);

describe("units of permeation", () => {
  it("has the barrer in SI: 3.346402e-16 mol m/(m2 s Pa), 7.5e-14 cm3(STP) cm/(cm2 s Pa)", () => {
    // From the definition with CODATA constants, by an independent program, to 7 digits; the second form as commonly
    // printed, to its 2 digits (7.500616e-14).
    expect(relative(BARRER_molmm2sPa, 3.346402e-16)).toBeLessThan(2e-7);
    const molarVolume_cm3 = 22413.969545;
    expect(relative((BARRER_molmm2sPa * molarVolume_cm3) / 100, 7.500616e-14)).toBeLessThan(2e-7);
  });

  it("has 21227.59 Pa of oxygen in dry air at 101325 Pa", () => {
    expect(oxygenPartialPressure({ oxygenFraction: 0.2095, pressure_Pa: 101_325 })).toBeCloseTo(
      21227.5875,
      4,
    );
    expect(oxygenPartialPressure({ oxygenFraction: 0, pressure_Pa: 101_325 })).toBe(0);
  });
});

describe("a film below the resin", () => {
  const solubility_molm3Pa = 1 / 21228;
  const film = (permeability_barrer: number, thickness_um: number) => {
    const permeance_molm2sPa = filmPermeance({ permeability_barrer, thickness_um });
    const transferCoefficient_ms = filmTransferCoefficient({ permeance_molm2sPa, solubility_molm3Pa });
    return {
      kappa: transferCoefficient_ms,
      l: filmEquivalentThickness({ diffusivity_m2s: 1e-10, transferCoefficient_ms }),
    };
  };

  // Worked out by an independent program for a resin that holds 1 mol/m3 in air, D = 1e-10 m2/s and a dead zone of 20 um
  // without film; printed to 3 digits. The permeabilities are typical of PDMS, PDD/TFE copolymer, PMP and FEP.
  it.each([
    [600, 100, 4.26e-5, 2.35, 17.79],
    [600, 600, 7.1e-6, 14.1, 10.38],
    [600, 1000, 4.26e-6, 23.5, 7.37],
    [1000, 50, 1.42e-4, 0.7, 19.31],
    [1000, 100, 7.1e-5, 1.41, 18.64],
    [32, 50, 4.55e-6, 22, 7.73],
    [32, 125, 1.82e-6, 55, 3.52],
    [5, 50, 7.1e-7, 141, 1.41],
    [5, 127, 2.8e-7, 358, 0.56],
  ])("of %d barrer and %d um", (permeability, thickness, kappa, l, dead) => {
    const found = film(permeability, thickness);
    expect(relative(found.kappa, kappa)).toBeLessThan(5e-3);
    expect(relative(found.l, l)).toBeLessThan(6e-3);
    const zone = deadZone({
      diffusivity_m2s: 1e-10,
      saturation_molm3: 1,
      radicalGeneration_molm3s: 0.5,
      oxygenPerRadical: 1,
      napierianAbsorption_percm: 0,
      filmEquivalentThickness_um: found.l,
    });
    expect(zone).toMatchObject({ outcome: "dead-zone" });
    if (zone.outcome === "dead-zone") expect(Math.abs(zone.thickness_um - dead)).toBeLessThan(0.006);
  });

  it("resists twice as much at twice the thickness, half as much at twice the permeability", () => {
    expect(film(600, 200).l / film(600, 100).l).toBeCloseTo(2, 12);
    expect(film(1200, 100).l / film(600, 100).l).toBeCloseTo(0.5, 12);
  });

  it.each([
    [
      () => oxygenPartialPressure({ oxygenFraction: 20.95, pressure_Pa: 1e5 }),
      "oxygenPartialPressure: oxygenFraction is 20.95; it must be a number from 0 to 1",
    ],
    [
      () => filmPermeance({ permeability_barrer: 0, thickness_um: 50 }),
      "filmPermeance: permeability_barrer is 0; it must be a finite number above 0",
    ],
    [
      () => filmPermeance({ permeability_barrer: 1e300, thickness_um: 1e-300 }),
      "filmPermeance: the permeance is Infinity; it must be a finite number above 0; an input is beyond any real film or resin",
    ],
    [
      () => filmTransferCoefficient({ permeance_molm2sPa: 1e-9, solubility_molm3Pa: 0 }),
      "filmTransferCoefficient: solubility_molm3Pa is 0; it must be a finite number above 0",
    ],
    [
      () => filmEquivalentThickness({ diffusivity_m2s: NaN, transferCoefficient_ms: 1 }),
      "filmEquivalentThickness: diffusivity_m2s is NaN; it must be a finite number above 0",
    ],
  ])("%s", (call, message) => {
    expect(call).toThrow(message);
  });
});
