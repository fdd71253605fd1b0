import { describe, expect, it } from "vitest";
import {
  broadCureDepth,
  deepestBroadInitiatorLevel,
  deepestInitiatorLevel,
} from "../../../lib/models/cure.js";
import { lightEngine } from "../../../lib/models/light.js";

const wavelengths_nm = Array.from({ length: 41 }, (_, k) => 390 + k);
const question = {
  engine: lightEngine({
    wavelengths_nm,
    spectrum: wavelengths_nm.map((nm) => Math.exp(-(((nm - 405) / 9) ** 2))),
  }),
  initiatorAbsorptions_Lmolcm: wavelengths_nm.map((nm) => 900 * Math.exp(-(nm - 390) / 15)),
  otherAbsorptions_percm: wavelengths_nm.map(() => 60),
  exposure_mJcm2: 40,
  criticalExposure_mJcm2: 6,
  referenceConcentration_molL: 0.026,
  dependence: "inverse" as "inverse" | "inverse-root",
  solubility_molL: 0.5,
};
const depthAt = (q: typeof question, c: number): number =>
  broadCureDepth({
    engine: q.engine,
    napierianAbsorptions_percm: q.otherAbsorptions_percm.map(
      (alpha, k) => alpha + Math.LN10 * q.initiatorAbsorptions_Lmolcm[k]! * c,
    ),
    exposure_mJcm2: q.exposure_mJcm2,
    criticalExposure_mJcm2:
      q.criticalExposure_mJcm2 *
      (q.referenceConcentration_molL / c) ** (q.dependence === "inverse" ? 1 : 0.5),
  });

describe("deepestBroadInitiatorLevel", () => {
  it("is the closed form for an engine of one line, to 1e-9", () => {
    for (const dependence of ["inverse", "inverse-root"] as const) {
      const broad = deepestBroadInitiatorLevel({
        ...question,
        dependence,
        engine: lightEngine({ wavelengths_nm: [404, 405, 406], spectrum: [0, 1, 0] }),
        initiatorAbsorptions_Lmolcm: [9, 560, 9],
        otherAbsorptions_percm: [9, 100, 9],
      });
      const closed = deepestInitiatorLevel({
        ...question,
        dependence,
        molarAbsorption_Lmolcm: 560,
        otherAbsorption_percm: 100,
      });
      if (broad.outcome === "never-cures" || closed.outcome === "never-cures")
        throw new Error("it never cures");
      expect(broad.concentration_molL / closed.concentration_molL).toBeCloseTo(1, 9);
      expect(broad.cureDepth_um / closed.cureDepth_um).toBeCloseTo(1, 9);
      expect(broad.criticalExposure_mJcm2 / closed.criticalExposure_mJcm2).toBeCloseTo(1, 9);
    }
  });

  it("is deeper than any other level, by a search that knows nothing of the condition solved", () => {
    for (const dependence of ["inverse", "inverse-root"] as const) {
      const asked = { ...question, dependence };
      const level = deepestBroadInitiatorLevel(asked);
      if (level.outcome === "never-cures") throw new Error("it never cures");
      const depths = Array.from({ length: 600 }, (_, k) => depthAt(asked, 0.5 * 10 ** (-4 + (k * 4) / 599)));
      expect(Math.max(...depths)).toBeLessThanOrEqual(level.cureDepth_um * (1 + 1e-12));
      expect(Math.max(...depths) / level.cureDepth_um).toBeGreaterThan(0.9999);
    }
  });

  it("stops at the solubility, and says when nothing that dissolves cures", () => {
    expect(deepestBroadInitiatorLevel({ ...question, solubility_molL: 0.01 })).toMatchObject({
      outcome: "limited-by-solubility",
      concentration_molL: 0.01,
    });
    const never = deepestBroadInitiatorLevel({ ...question, solubility_molL: 0.0026 });
    expect(never.outcome === "never-cures" && never.neededExposure_mJcm2).toBeCloseTo(60, 10);
  });

  it.each([
    [
      { otherAbsorptions_percm: [1, 2] },
      "deepestBroadInitiatorLevel: engine.shares holds 41, initiatorAbsorptions_Lmolcm holds 41, otherAbsorptions_percm holds 2; the lists must be of the same length",
    ],
    [
      { exposure_mJcm2: 0 },
      "deepestBroadInitiatorLevel: exposure_mJcm2 is 0; it must be a finite number above 0",
    ],
    [
      { dependence: "root" as "inverse-root" },
      'deepestBroadInitiatorLevel: unknown dependence "root"; known: inverse, inverse-root',
    ],
  ])("refuses %j", (change, message) => {
    expect(() => deepestBroadInitiatorLevel({ ...question, ...change })).toThrow(message);
  });
});
