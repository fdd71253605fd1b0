import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { deepestInitiatorLevel, type InitiatorQuestion } from "../../../lib/models/cure.js";

// Round numbers for checking: kappa = 1000 L/(mol cm) Napierian; Ec = K / c with K = 0.1, or K / sqrt(c) with K = 1.
const kappa = 1000;
const alone: InitiatorQuestion = {
  exposure_mJcm2: 40,
  molarAbsorption_Lmolcm: kappa / Math.LN10,
  otherAbsorption_percm: 0,
  criticalExposure_mJcm2: 10,
  referenceConcentration_molL: 0.01,
  dependence: "inverse",
  solubility_molL: 1,
};
const deepest = (change: Partial<InitiatorQuestion>) => {
  const level = deepestInitiatorLevel({ ...alone, ...change });
  if (level.outcome === "never-cures") throw new Error("it never cures");
  return level;
};
/** The cure depth at a level, written out from the two laws. */
const depthAt = (q: InitiatorQuestion, c: number): number => {
  const m = q.dependence === "inverse" ? 1 : 0.5;
  const Ec = q.criticalExposure_mJcm2 * (q.referenceConcentration_molL / c) ** m;
  return (
    (1e4 * Math.log(q.exposure_mJcm2 / Ec)) /
    (Math.LN10 * q.molarAbsorption_Lmolcm * c + q.otherAbsorption_percm)
  );
};

describe("deepestInitiatorLevel", () => {
  it("is e K / E with depth 1 / (kappa c) where Ec = K / c", () => {
    const level = deepest({});
    expect(level.outcome).toBe("deepest");
    expect(level.concentration_molL / ((Math.E * 0.1) / 40)).toBeCloseTo(1, 12);
    expect(level.cureDepth_um / (1e4 * (40 / (Math.E * kappa * 0.1)))).toBeCloseTo(1, 12);
    expect(level.cureDepth_um / level.opticalDepth_um).toBeCloseTo(1, 12);
  });

  it("is e K^2 / E^2 with depth 1 / (2 kappa c) where Ec = K / sqrt(c)", () => {
    const level = deepest({ dependence: "inverse-root" });
    expect(level.concentration_molL / ((Math.E * 1) / 40 ** 2)).toBeCloseTo(1, 12);
    expect(level.cureDepth_um / (1e4 / (2 * kappa * level.concentration_molL))).toBeCloseTo(1, 12);
  });

  it("with absorber is where kappa c (ln(E c / K) - 1) = alpha of the absorber", () => {
    for (const otherAbsorption_percm of [1, 100, 5000]) {
      const { concentration_molL: c } = deepest({ otherAbsorption_percm, solubility_molL: 100 });
      expect((kappa * c * (Math.log((40 * c) / 0.1) - 1)) / otherAbsorption_percm).toBeCloseTo(1, 9);
    }
  });

  it("is deeper than any other level, by a search that knows nothing of the closed form", () => {
    const questions = fc.record({
      exposure_mJcm2: fc.double({ min: 1, max: 500, noNaN: true }),
      otherAbsorption_percm: fc.double({ min: 0, max: 1000, noNaN: true }),
      dependence: fc.constantFrom("inverse" as const, "inverse-root" as const),
      solubility_molL: fc.double({ min: 0.001, max: 0.2, noNaN: true }),
    });
    fc.assert(
      fc.property(questions, (change) => {
        const question = { ...alone, ...change };
        const level = deepestInitiatorLevel(question);
        const depths = Array.from({ length: 400 }, (_, k) =>
          depthAt(question, question.solubility_molL * 10 ** (-4 + (k * 4) / 399)),
        );
        if (level.outcome === "never-cures") {
          expect(Math.max(...depths)).toBeLessThanOrEqual(1e-9);
          expect(level.neededExposure_mJcm2).toBeGreaterThanOrEqual(question.exposure_mJcm2);
          return;
        }
        expect(level.concentration_molL).toBeLessThanOrEqual(question.solubility_molL);
        expect(level.cureDepth_um / depthAt(question, level.concentration_molL)).toBeCloseTo(1, 9);
        expect(Math.max(...depths)).toBeLessThanOrEqual(level.cureDepth_um * (1 + 1e-9) + 1e-9);
      }),
    );
  });

  it("stops at the solubility, and says when nothing that dissolves cures", () => {
    const limited = deepest({ solubility_molL: 0.004 });
    expect(limited).toMatchObject({ outcome: "limited-by-solubility", concentration_molL: 0.004 });
    expect(limited.criticalExposure_mJcm2).toBeCloseTo(25, 12);
    expect(deepestInitiatorLevel({ ...alone, solubility_molL: 0.002 })).toEqual({
      outcome: "never-cures",
      neededExposure_mJcm2: 50,
    });
  });

  it("asks for more initiator the more absorber there is, and cures less deep", () => {
    const [none, some, much] = [0, 50, 500].map((otherAbsorption_percm) =>
      deepest({ otherAbsorption_percm }),
    );
    expect(none!.concentration_molL).toBeLessThan(some!.concentration_molL);
    expect(some!.concentration_molL).toBeLessThan(much!.concentration_molL);
    expect(none!.cureDepth_um).toBeGreaterThan(some!.cureDepth_um);
    expect(some!.cureDepth_um).toBeGreaterThan(much!.cureDepth_um);
  });

  it.each([
    [{ exposure_mJcm2: 0 }, "deepestInitiatorLevel: exposure_mJcm2 is 0; it must be a finite number above 0"],
    [
      { otherAbsorption_percm: -1 },
      "deepestInitiatorLevel: otherAbsorption_percm is -1; it must be a finite number of at least 0",
    ],
    [
      { dependence: "inverse-rot" as "inverse" },
      'deepestInitiatorLevel: unknown dependence "inverse-rot"; did you mean "inverse-root"?',
    ],
    [
      { solubility_molL: NaN },
      "deepestInitiatorLevel: solubility_molL is NaN; it must be a finite number above 0",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => deepestInitiatorLevel({ ...alone, ...change })).toThrow(message);
  });
});
