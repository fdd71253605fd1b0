import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  absorptionCoefficient,
  absorptionSpectrum,
  broadTransmittedFraction,
  lightEngine,
  localOpticalDepth,
  opticalDepth,
  transmittedFraction,
} from "../../../lib/models/light.js";
import { finite, litBy, nodes } from "./litResins.js";
import { filmThickness_um, filmUnder } from "./measuredFilms.js";

describe("absorptionSpectrum", () => {
  it("is absorptionCoefficient at every node", () => {
    const molarAbsorptions_Lmolcm = [500, 300, 0];
    const dye = { molarAbsorptions_Lmolcm: [9000, 9500, 9800], concentration_molL: 0.004 };
    const backgrounds_percm = [0.5, 0.4, 0];
    const found = absorptionSpectrum({
      absorbers: [{ molarAbsorptions_Lmolcm, concentration_molL: 0.03 }, dye],
      backgrounds_percm,
    });
    found.forEach((alpha, k) => {
      const absorbers = [
        { molarAbsorption_Lmolcm: molarAbsorptions_Lmolcm[k]!, concentration_molL: 0.03 },
        { molarAbsorption_Lmolcm: dye.molarAbsorptions_Lmolcm[k]!, concentration_molL: 0.004 },
      ];
      const alone = absorptionCoefficient({ absorbers, background_percm: backgrounds_percm[k]! });
      expect(alpha / alone).toBeCloseTo(1, 14);
    });
  });

  it("says what is wrong", () => {
    const good = { molarAbsorptions_Lmolcm: [1, 2], concentration_molL: 0.1 };
    const refuse = (change: object, backgrounds_percm: number[], message: string): void =>
      expect(() =>
        absorptionSpectrum({ absorbers: [good, { ...good, ...change }], backgrounds_percm }),
      ).toThrow(message);
    refuse(
      { concentration_molL: -1 },
      [0, 0],
      "absorptionSpectrum: absorbers[1].concentration_molL is -1; it must be",
    );
    refuse(
      { molarAbsorptions_Lmolcm: [1, NaN] },
      [0, 0],
      "absorptionSpectrum: absorbers[1].molarAbsorptions_Lmolcm[1] is NaN",
    );
    refuse(
      { molarAbsorptions_Lmolcm: [1] },
      [0, 0],
      "absorptionSpectrum: backgrounds_percm holds 2, absorbers[1].molarAbsorptions_Lmolcm holds 1",
    );
    refuse(
      {},
      [0, -2],
      "absorptionSpectrum: backgrounds_percm[1] is -2; it must be a finite number of at least 0",
    );
    refuse(
      { molarAbsorptions_Lmolcm: [1e300, 1], concentration_molL: 1e300 },
      [0, 0],
      "absorptionSpectrum: the absorption[0] is Infinity; it must be a finite number; an input is beyond any real substance",
    );
  });
});

describe("light of a broad engine", () => {
  it("is the monochromatic answer for an engine of one line, to 1e-9", () => {
    const wavelengths_nm = Array.from({ length: 51 }, (_, k) => 380 + k);
    const engine = lightEngine({
      wavelengths_nm,
      spectrum: wavelengths_nm.map((nm) => (nm === 405 ? 1 : 0)),
    });
    const napierianAbsorptions_percm = wavelengths_nm.map((nm) => 3e4 * Math.exp(-nm / 60));
    const alone = napierianAbsorptions_percm[25]!;
    for (const depth_um of [0, 30, 400]) {
      const light = { engine, napierianAbsorptions_percm, depth_um };
      const one = transmittedFraction({ napierianAbsorption_percm: alone, depth_um });
      expect(broadTransmittedFraction(light) / one).toBeCloseTo(1, 9);
      expect(localOpticalDepth(light) / opticalDepth({ napierianAbsorption_percm: alone })).toBeCloseTo(1, 9);
    }
  });

  it("is all there at the window, never grows with depth, and reaches further the deeper it is", () => {
    fc.assert(
      fc.property(nodes, finite(0, 500), finite(0, 500), (list, z, more) => {
        const resin = litBy(list);
        const T = (depth_um: number): number => broadTransmittedFraction({ ...resin, depth_um });
        const local = (depth_um: number): number => localOpticalDepth({ ...resin, depth_um });
        expect(T(0)).toBeCloseTo(1, 12);
        expect(T(z + more)).toBeLessThanOrEqual(T(z) * (1 + 1e-12));
        expect(local(z + more)).toBeGreaterThanOrEqual(local(z) * (1 - 1e-12));
        const mean = resin.engine.shares.reduce(
          (sum, s, k) => sum + s * resin.napierianAbsorptions_percm[k]!,
          0,
        );
        expect((local(0) * mean) / 1e4).toBeCloseTo(1, 12);
      }),
    );
  });

  it("falls off with depth as the local depth says", () => {
    const resin = litBy([
      { S: 1, alpha: 400 },
      { S: 2, alpha: 150 },
      { S: 1, alpha: 60 },
    ]);
    const lnT = (depth_um: number): number => Math.log(broadTransmittedFraction({ ...resin, depth_um }));
    for (const z of [5, 50, 300]) {
      const slope = (lnT(z - 0.01) - lnT(z + 0.01)) / 0.02;
      expect(slope * localOpticalDepth({ ...resin, depth_um: z })).toBeCloseTo(1, 6);
    }
  });

  it("tends to the least absorbed line far down, where the rest has vanished", () => {
    const resin = litBy([
      { S: 5, alpha: 900 },
      { S: 0.001, alpha: 50 },
    ]);
    // At 10 cm the light itself is e^-500: far below what a sum of plain exponentials could still tell apart from 0.
    expect(localOpticalDepth({ ...resin, depth_um: 1e5 })).toBeCloseTo(200, 9);
  });

  it("goes through a resin that does not absorb", () => {
    const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
    const resin = { engine, napierianAbsorptions_percm: [0, 0], depth_um: 1000 };
    expect(broadTransmittedFraction(resin)).toBe(1);
    expect(() => localOpticalDepth(resin)).toThrow(
      "localOpticalDepth: napierianAbsorptions_percm[0] is 0; it must be a finite number above 0; " +
        "without absorption light has no depth; include the background of the resin",
    );
  });

  it("says what is wrong", () => {
    const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
    expect(() => broadTransmittedFraction({ engine, napierianAbsorptions_percm: [1], depth_um: 1 })).toThrow(
      "broadTransmittedFraction: engine.shares holds 2, napierianAbsorptions_percm holds 1; the lists must be of the same length",
    );
    expect(() =>
      broadTransmittedFraction({ engine, napierianAbsorptions_percm: [1, 2], depth_um: -1 }),
    ).toThrow("broadTransmittedFraction: depth_um is -1; it must be a finite number of at least 0");
    expect(() => localOpticalDepth({ engine, napierianAbsorptions_percm: [1, 2], depth_um: NaN })).toThrow(
      "localOpticalDepth: depth_um is NaN; it must be a finite number of at least 0",
    );
  });
});

describe("measured engines and films", () => {
  // Worked out from the same open data by an independent program, printed to 4 decimals: 0.2 %, or half a unit of the last
  // decimal where that is more. Columns: through one film weighted, monochromatic at the peak, through two films, local depth
  // behind one film over that at its surface.
  it.each([
    ["TPO and BBOT", "L387", 0.1822, 0.1312, 0.055, 1.3181],
    ["TPO and BBOT", "L412", 0.5923, 0.6098, 0.4097, 1.4751],
    ["BAPO 1 %", "L387", 0.7381, 0.7306, 0.5467, 1.0108],
    ["BAPO 1 %", "L412", 0.842, 0.8406, 0.7124, 1.0284],
    ["BAPO 1 %, Sudan I 0.2 %", "L387", 0.2063, 0.2052, 0.0434, 1.0126],
    ["BAPO 1 %, Sudan I 0.2 %", "L412", 0.1652, 0.1604, 0.0275, 1.0032],
  ] as const)("%s under %s", (film, name, one, atPeak, two, bend) => {
    const { peak, absorbances, ...resin } = filmUnder(film, name);
    const near = (value: number, printed: number): void =>
      expect(Math.abs(value - printed)).toBeLessThan(Math.max(2e-3 * printed, 6e-5));
    const through = (films: number): number =>
      broadTransmittedFraction({ ...resin, depth_um: films * filmThickness_um });
    near(through(1), one);
    near(10 ** -absorbances[peak]!, atPeak);
    near(through(2), two);
    const local = (depth_um: number): number => localOpticalDepth({ ...resin, depth_um });
    near(local(filmThickness_um) / local(0), bend);
  });
});
