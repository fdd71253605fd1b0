import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { absorberForCureDepth, absorberForOpticalDepth, broadCureDepth } from "../../../lib/models/cure.js";
import { absorptionCoefficient, lightEngine, opticalDepth } from "../../../lib/models/light.js";
import { finite } from "../light/litResins.js";

describe("absorberForOpticalDepth", () => {
  it("finds the level that gives the depth back", () => {
    fc.assert(
      fc.property(finite(5, 500), finite(100, 5e4), finite(0, 2000), (opticalDepth_um, eps, other) => {
        const level = absorberForOpticalDepth({
          opticalDepth_um,
          molarAbsorption_Lmolcm: eps,
          otherAbsorption_percm: other,
          solubility_molL: 1,
        });
        const depth = (concentration_molL: number): number =>
          opticalDepth({
            napierianAbsorption_percm: absorptionCoefficient({
              absorbers: [{ molarAbsorption_Lmolcm: eps, concentration_molL }],
              background_percm: other,
            }),
          });
        if (level.outcome === "found") {
          expect(depth(level.concentration_molL) / opticalDepth_um).toBeCloseTo(1, 9);
        } else if (level.outcome === "beyond-solubility") {
          expect(level.depthAtSolubility_um / depth(1)).toBeCloseTo(1, 12);
          expect(depth(1)).toBeGreaterThan(opticalDepth_um);
        } else {
          expect(level.depthWithoutAbsorber_um).toBeLessThanOrEqual(opticalDepth_um * (1 + 1e-12));
        }
      }),
    );
  });

  const question = {
    opticalDepth_um: 50,
    molarAbsorption_Lmolcm: 9092,
    otherAbsorption_percm: 30,
    solubility_molL: 0.02,
  };
  it("says why there is no level", () => {
    expect(absorberForOpticalDepth({ ...question, opticalDepth_um: 400 })).toEqual({
      outcome: "shallow-without-absorber",
      depthWithoutAbsorber_um: 1e4 / 30,
    });
    expect(absorberForOpticalDepth({ ...question, opticalDepth_um: 10 }).outcome).toBe("beyond-solubility");
  });

  it("says what is wrong", () => {
    expect(() => absorberForOpticalDepth({ ...question, molarAbsorption_Lmolcm: 0 })).toThrow(
      "absorberForOpticalDepth: molarAbsorption_Lmolcm is 0; it must be a finite number above 0",
    );
    expect(() => absorberForOpticalDepth({ ...question, solubility_molL: NaN })).toThrow(
      "absorberForOpticalDepth: solubility_molL is NaN; it must be a finite number above 0",
    );
  });
});

describe("absorberForCureDepth", () => {
  const wavelengths_nm = Array.from({ length: 41 }, (_, k) => 390 + k);
  const question = {
    cureDepth_um: 75,
    engine: lightEngine({
      wavelengths_nm,
      spectrum: wavelengths_nm.map((nm) => Math.exp(-(((nm - 408) / 9) ** 2))),
    }),
    absorberAbsorptions_Lmolcm: wavelengths_nm.map((nm) => 9000 + 30 * (nm - 400)),
    otherAbsorptions_percm: wavelengths_nm.map((nm) => 0.5 + 60 * Math.exp(-(nm - 390) / 12)),
    exposure_mJcm2: 20,
    criticalExposure_mJcm2: 5,
    solubility_molL: 0.02,
  };
  const depthWith = (c: number): number =>
    broadCureDepth({
      ...question,
      napierianAbsorptions_percm: question.otherAbsorptions_percm.map(
        (alpha, k) => alpha + Math.LN10 * question.absorberAbsorptions_Lmolcm[k]! * c,
      ),
    });

  it("finds the level that gives the depth back", () => {
    for (const cureDepth_um of [40, 75, 150]) {
      const level = absorberForCureDepth({ ...question, cureDepth_um });
      expect(level.outcome).toBe("found");
      if (level.outcome === "found")
        expect(depthWith(level.concentration_molL) / cureDepth_um).toBeCloseTo(1, 9);
    }
  });

  it("is the closed form for an engine of one line", () => {
    const engine = lightEngine({ wavelengths_nm: [404, 405, 406], spectrum: [0, 1, 0] });
    const level = absorberForCureDepth({
      ...question,
      engine,
      absorberAbsorptions_Lmolcm: [1, 9092, 1],
      otherAbsorptions_percm: [1, 30, 1],
    });
    const closed = absorberForOpticalDepth({
      opticalDepth_um: 75 / Math.log(4),
      molarAbsorption_Lmolcm: 9092,
      otherAbsorption_percm: 30,
      solubility_molL: 0.02,
    });
    expect(level.outcome).toBe("found");
    if (level.outcome === "found" && closed.outcome === "found")
      expect(level.concentration_molL / closed.concentration_molL).toBeCloseTo(1, 10);
  });

  it("says why there is no level", () => {
    const shallow = absorberForCureDepth({ ...question, cureDepth_um: 5000 });
    expect(shallow).toEqual({ outcome: "shallow-without-absorber", depthWithoutAbsorber_um: depthWith(0) });
    const strong = absorberForCureDepth({ ...question, cureDepth_um: 10 });
    expect(strong).toEqual({ outcome: "beyond-solubility", depthAtSolubility_um: depthWith(0.02) });
  });

  it.each([
    [
      { exposure_mJcm2: 5 },
      "absorberForCureDepth: exposure_mJcm2 is 5; it must be a finite number above 5; up to the critical exposure nothing cures, with or without absorber",
    ],
    [{ cureDepth_um: 0 }, "absorberForCureDepth: cureDepth_um is 0; it must be a finite number above 0"],
    [
      { absorberAbsorptions_Lmolcm: [1, 2] },
      "absorberForCureDepth: engine.shares holds 41, absorberAbsorptions_Lmolcm holds 2, otherAbsorptions_percm holds 41; the lists must be of the same length",
    ],
    [
      { solubility_molL: -1 },
      "absorberForCureDepth: solubility_molL is -1; it must be a finite number above 0",
    ],
    [
      { otherAbsorptions_percm: wavelengths_nm.map(() => 0) },
      "absorberForCureDepth: otherAbsorptions_percm[0] is 0; it must be a finite number above 0",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => absorberForCureDepth({ ...question, ...change })).toThrow(message);
  });
});
