import { describe, expect, it } from "vitest";
import {
  correctByReadings,
  deadZone,
  figureNames,
  inductionTime,
  type PerWindowFigure,
  type WindowCorrectionInput,
  type WindowReading,
} from "../../../lib/models/oxygen.js";
import { steadyConversionTime } from "../../../lib/models/cure.js";

const air_Pa = 21227.59;
const figures = {
  radicalGeneration_molm3s: 0.5,
  oxygenPerRadical: 1,
  solubility_molm3Pa: 5e-5,
  diffusivity_m2s: 1e-10,
  permeance_molm2sPa: 5e-10,
  propagation_m3mols: 25,
};
const all = (value: number) =>
  Object.fromEntries(figureNames.map((name) => [name, value])) as unknown as PerWindowFigure;
const input: WindowCorrectionInput = {
  figures,
  relativeU: {
    ...all(0),
    radicalGeneration: 0.5,
    solubility: 0.3,
    diffusivity: 0.8,
    permeance: 0.2,
    propagation: 0.6,
  },
  readings: [],
  napierianAbsorption_percm: 100,
  freshOxygen_Pa: air_Pa,
  gelConversion: 0.1,
  termination_m3mols: 1250,
};
const time = (
  time_s: number,
  relativeU: number,
  until: "first gel" | "oxygen used" = "oxygen used",
): WindowReading => ({
  of: "induction time",
  until,
  relativeIrradiance: 1,
  time_s,
  relativeU,
});
const layer = (thickness_um: number, relativeU: number, gasOxygen_Pa = air_Pa): WindowReading => ({
  of: "uncured layer",
  relativeIrradiance: 1,
  gasOxygen_Pa,
  thickness_um,
  relativeU,
});

/** What the models say with figures multiplied by factors. */
function said(factors: PerWindowFigure, alpha = 100, relativeIrradiance = 1) {
  const Ri = relativeIrradiance * factors.radicalGeneration * figures.radicalGeneration_molm3s;
  const s = factors.oxygenPerRadical * figures.oxygenPerRadical;
  const S = factors.solubility * figures.solubility_molm3Pa;
  const D = factors.diffusivity * figures.diffusivity_m2s;
  const P = factors.permeance * figures.permeance_molm2sPa;
  const zone = deadZone({
    diffusivity_m2s: D,
    saturation_molm3: S * air_Pa,
    radicalGeneration_molm3s: Ri,
    oxygenPerRadical: s,
    napierianAbsorption_percm: alpha,
    filmEquivalentThickness_um: (1e6 * D * S) / P,
  });
  const oxygen_s = inductionTime({
    oxygen_molm3: S * air_Pa,
    radicalGeneration_molm3s: Ri,
    oxygenPerRadical: s,
  });
  const growth_s = steadyConversionTime({
    conversion: input.gelConversion,
    propagation_m3mols: factors.propagation * figures.propagation_m3mols,
    termination_m3mols: input.termination_m3mols,
    radicalGeneration_molm3s: Ri,
  });
  return {
    zone_um: zone.outcome === "dead-zone" ? zone.thickness_um : Infinity,
    oxygen_s,
    gel_s: oxygen_s + growth_s,
  };
}

describe("correctByReadings", () => {
  it("changes nothing without a reading", () => {
    expect(correctByReadings(input)).toEqual({ factors: all(1), surprises: [] });
  });

  it("changes nothing by readings in boundless doubt", () => {
    const { factors } = correctByReadings({ ...input, readings: [time(0.1, 1e200), layer(90, 1e200)] });
    for (const name of figureNames) expect(factors[name]).toBeCloseTo(1, 1);
    // The doubt enters as sqrt(ln(1 + u^2)), which grows so slowly that 1e200 is thirty e-folds.
    expect(Math.abs(Math.log(factors.radicalGeneration))).toBeLessThan(0.02);
  });

  // Whatever figures make the readings, in even light or not, with film or nearly without: sure readings are met.
  it.each([
    [100, 1],
    [0, 1],
    [300, 1000],
  ])("gives sure readings back, alpha %d per cm, film %d times as open", (alpha, open) => {
    const ask = {
      ...input,
      figures: { ...figures, permeance_molm2sPa: open * figures.permeance_molm2sPa },
      napierianAbsorption_percm: alpha,
      relativeU: { ...input.relativeU, permeance: 0 },
    };
    const truth = {
      ...all(1),
      radicalGeneration: 1.6,
      solubility: 0.8,
      diffusivity: 2.5,
      propagation: 0.7,
      permeance: open,
    };
    const { zone_um, gel_s, oxygen_s } = said(truth, alpha);
    for (const readings of [
      [time(oxygen_s, 1e-7), layer(zone_um, 1e-7)],
      [time(gel_s, 1e-7, "first gel"), layer(zone_um, 1e-7)],
    ]) {
      const { factors } = correctByReadings({ ...ask, readings });
      const now = said({ ...factors, permeance: open * factors.permeance }, alpha);
      expect(now.zone_um / zone_um).toBeCloseTo(1, 6);
      const [until] = readings as [{ until: string }, unknown];
      expect(until.until === "first gel" ? now.gel_s / gel_s : now.oxygen_s / oxygen_s).toBeCloseTo(1, 6);
    }
  });

  it("recovers the one figure in doubt exactly, whichever it is", () => {
    const only = (name: keyof PerWindowFigure) => ({ ...all(0), [name]: 2 });
    for (const name of [
      "radicalGeneration",
      "solubility",
      "diffusivity",
      "permeance",
      "oxygenPerRadical",
    ] as const) {
      const { zone_um } = said({ ...all(1), [name]: 1.3 });
      const { factors } = correctByReadings({
        ...input,
        relativeU: only(name),
        readings: [layer(zone_um, 1e-6)],
      });
      expect(factors[name], name).toBeCloseTo(1.3, 6);
      for (const other of figureNames) if (other !== name) expect(factors[other]).toBe(1);
    }
    const { gel_s } = said({ ...all(1), propagation: 1.3 });
    const { factors } = correctByReadings({
      ...input,
      relativeU: only("propagation"),
      readings: [time(gel_s, 1e-6, "first gel")],
    });
    expect(factors.propagation).toBeCloseTo(1.3, 5);
  });

  // One figure, one reading, straight in logarithms: the mean weighted by the inverse variances.
  it("weighs one reading against one figure by their variances", () => {
    const [u, uReading] = [0.5, 0.3];
    const { oxygen_s } = said(all(1));
    const { factors, surprises } = correctByReadings({
      ...input,
      relativeU: { ...all(0), oxygenPerRadical: u },
      readings: [time(oxygen_s / 1.5, uReading)],
    });
    const [prior, reading] = [Math.log1p(u * u), Math.log1p(uReading * uReading)];
    expect(Math.log(factors.oxygenPerRadical)).toBeCloseTo((Math.log(1.5) * prior) / (prior + reading), 10);
    expect(Math.abs(surprises[0]!)).toBeCloseTo(Math.log(1.5) / Math.sqrt(prior + reading), 10);
  });

  it("shares a change between figures that the reading cannot tell apart, by their variances", () => {
    const { oxygen_s } = said(all(1));
    const { factors } = correctByReadings({
      ...input,
      relativeU: { ...all(0), radicalGeneration: 0.5, oxygenPerRadical: 0.2 },
      readings: [time(oxygen_s / 1.4, 1e-5)],
    });
    expect(Math.log(factors.radicalGeneration) / Math.log(factors.oxygenPerRadical)).toBeCloseTo(
      Math.log1p(0.25) / Math.log1p(0.04),
      6,
    );
  });

  it("meets readings in another light, and a layer where the figures had said that nothing ever cures", () => {
    const brighter = said(all(1), 100, 4);
    const reading = { ...layer(brighter.zone_um, 0.01), relativeIrradiance: 4 };
    const { factors } = correctByReadings({ ...input, readings: [reading] });
    for (const name of figureNames) expect(factors[name]).toBeCloseTo(1, 9);
    const dim = { ...figures, radicalGeneration_molm3s: 1e-3 };
    const cured = correctByReadings({ ...input, figures: dim, readings: [layer(20, 1e-6)] }).factors;
    expect(cured.radicalGeneration).toBeGreaterThan(5);
  });

  it("counts the surprise of a reading in standard deviations: more than was expected is positive", () => {
    const { zone_um } = said(all(1));
    const surprise = (factor: number, u: number) =>
      correctByReadings({ ...input, readings: [layer(factor * zone_um, u)] }).surprises[0]!;
    expect(surprise(1, 0.1)).toBeCloseTo(0, 10);
    expect(surprise(8, 0.1)).toBeGreaterThan(3);
    expect(surprise(1 / 8, 0.1)).toBeLessThan(-3);
    expect(surprise(8, 5)).toBeLessThan(3);
    const { oxygen_s } = said(all(1));
    expect(correctByReadings({ ...input, readings: [time(9 * oxygen_s, 0.1)] }).surprises[0]).toBeGreaterThan(
      3,
    );
  });

  it.each([
    [
      { readings: [{ ...time(1, 0.1), of: "uncured layr" }] },
      'readings[0]: unknown of "uncured layr"; did you mean "uncured layer"?',
    ],
    [
      { readings: [layer(10, 0)] },
      "correctByReadings: readings[0]: relativeU is 0; it must be a finite number above 0",
    ],
    [{ readings: [layer(10, 0.1, 0)] }, "readings[0]: gasOxygen_Pa is 0; it must be a finite number above 0"],
    [{ readings: [time(-1, 0.1)] }, "readings[0]: time_s is -1; it must be a finite number above 0"],
    [{ figures: { ...figures, diffusivity_m2s: NaN } }, "figures: diffusivity_m2s is NaN"],
    [
      { relativeU: { ...all(0), solubility: -1 } },
      "relativeU: solubility is -1; it must be a finite number of at least 0",
    ],
    [{ gelConversion: 1 }, "gelConversion is 1"],
  ])("refuses %j", (change, message) => {
    expect(() => correctByReadings({ ...input, ...(change as object) })).toThrow(message);
  });
});
