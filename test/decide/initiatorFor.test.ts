import { describe, expect, it } from "vitest";
import type { Case } from "../../lib/assess/case.js";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { calibrate } from "../../lib/decide/calibrate.js";
import { initiatorCandidates, initiatorFor, type InitiatorSearch } from "../../lib/decide/initiatorFor.js";
import { withOnly } from "../../lib/decide/level.js";
import { deepestInitiatorLevel } from "../../lib/models/cure.js";
import { openBrief } from "../../lib/recipe/files.js";
import type { Shelf } from "../../lib/recipe/shelf.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const PI = shelf.ingredients.get("PI")!;
// So fast that the way to the gel costs nothing: the critical exposure is what oxygen takes, and goes with one over the level.
const oxygenOnly: Shelf = { ...shelf, constants: { ...shelf.constants, propagation_m3mols: sure(1e9) } };
const work: Case = { formulation: formulationOf({ THIN: 98.9, PI: 1, AB: 0.1 }), brief, shelf: oxygenOnly };
const best = (options: InitiatorSearch, change: Partial<Case> = {}) => {
  const answer = initiatorFor({ ...work, ...change, draws: 40, ...options });
  if (!("massFraction" in answer)) throw new Error(answer.reason);
  return answer;
};

describe("initiatorFor", () => {
  // The closed form for one wavelength and a critical exposure that goes with one over the level. 2.5 mol/L at a mass fraction
  // of 1. The search stops within 2 % of the level; the absorber gives way by the initiator's own share, below 2 % here.
  it.each([
    [false, Math.LN10 * 10000 * 2.5 * 0.001 + 1],
    [true, 1],
  ])("is the closed form where light and cure are simple; without absorber: %s", (withoutAbsorber, other) => {
    const Ec = workingCurveOf({ ...work, draws: 40 }).criticalExposure_mJcm2.value;
    const exact = deepestInitiatorLevel({
      exposure_mJcm2: 5 * Ec,
      molarAbsorption_Lmolcm: 500,
      otherAbsorption_percm: other,
      criticalExposure_mJcm2: Ec,
      referenceConcentration_molL: 0.025,
      dependence: "inverse",
      solubility_molL: 2.5,
    });
    if (exact.outcome === "never-cures") throw new Error("the closed form has no level");
    const { massFraction, cureDepth_um } = best({ exposure_mJcm2: 5 * Ec, withoutAbsorber });
    expect(Math.abs(massFraction.value / (exact.concentration_molL / 2.5) - 1)).toBeLessThan(0.04);
    // At the top of the hump an error of the level counts by its square.
    expect(Math.abs(cureDepth_um.value / exact.cureDepth_um - 1)).toBeLessThan(0.01);
  });

  it("cures no deeper a little to either side", () => {
    const { massFraction, cureDepth_um } = best({ exposure_mJcm2: 200 }, { shelf });
    for (const factor of [0.8, 1.25]) {
      const { penetrationDepth_um, criticalExposure_mJcm2 } = workingCurveOf({
        ...withOnly({ ...work, shelf }, PI, massFraction.value * factor),
        draws: 40,
      });
      const depth = penetrationDepth_um.value * Math.log(200 / criticalExposure_mJcm2.value);
      expect(depth).toBeLessThan(cureDepth_um.value);
    }
  });

  it("takes the exposure of the brief's layer unless another is given", () => {
    const { layerExposure_mJcm2 } = workingCurveOf({ ...work, draws: 40 });
    expect(best({})).toEqual(best({ exposure_mJcm2: layerExposure_mJcm2.value }));
    expect(best({}).cureDepth_um.value).toBeGreaterThanOrEqual(75);
  });

  it("stops at what dissolves, with the depth that this much cures", () => {
    const dissolves = { ...PI, solubility_pct: sure(0.3, 0.03) };
    const free = best({ exposure_mJcm2: 200 });
    const bound = best({ exposure_mJcm2: 200 }, withOnly(work, dissolves, 0.01));
    expect(bound.outcome).toBe("above solubility");
    expect(bound.massFraction.value).toBe(free.massFraction.value);
    expect(bound.cureDepth_um.value).toBeLessThan(free.cureDepth_um.value);
    expect(bound.reason).toMatch(
      /^\d\.\d+ % PI would cure deepest; about 0\.3 % dissolves and cures \d+ µm deep at 200 mJ\/cm²; the layer asks for 75 µm\.$/,
    );
    expect(bound.reachedShare).toBeLessThan(0.2);
    expect(bound.warnings.map(({ code }) => code)).toEqual(["long-term-harm", "working-curve-estimated"]);
    expect(bound.warnings[0]!.message).toBe(
      "PI: may damage fertility or the unborn child. The brief does not avoid it: take a candidate without such a statement if one will do.",
    );
  });

  it("says when no level cures, or none cures the layer", () => {
    expect(initiatorFor({ ...work, exposure_mJcm2: 0.01, draws: 40 })).toMatchObject({
      outcome: "impossible",
      reason: "No level of PI up to 10 % cures at 0.01 mJ/cm²: expose longer.",
    });
    const thick = { ...work, brief: { ...brief, layerThickness_um: 400 } };
    const { outcome, reason } = initiatorFor({ ...thick, exposure_mJcm2: 50, draws: 40 });
    expect(outcome).toBe("impossible");
    expect(reason).toMatch(/, and no level cures deeper; the layer asks for 600 µm\.$/);
    const dissolving = (solubility_pct: number) => {
      const only = withOnly(thick, { ...PI, solubility_pct: sure(solubility_pct) }, 0.001);
      return initiatorFor({ ...only, exposure_mJcm2: 50, draws: 40 }).reason;
    };
    expect(dissolving(1)).toMatch(
      /^1 % PI cures \d+ µm deep at 50 mJ\/cm², and no more dissolves; the layer asks for 600 µm\.$/,
    );
    expect(dissolving(0.1)).toBe(
      "About 0.1 % PI dissolves, which does not cure at 50 mJ/cm²: expose longer.",
    );
  });

  it("refuses an exposure that is none", () => {
    expect(() => initiatorFor({ ...work, exposure_mJcm2: 0 })).toThrow(
      "initiatorFor: exposure_mJcm2 is 0; it must be a finite number above 0",
    );
  });

  it("builds on the measured curve once the case is calibrated", () => {
    const raw = openBrief("data/briefs/flow-cell.json");
    const { warnings } = initiatorFor({ ...calibrate(raw), draws: 40 });
    expect(warnings.map(({ code }) => code)).toContain("working-curve-carried-over");
    const widthOf = (one: Case) => {
      const answer = initiatorFor({ ...one, exposure_mJcm2: 40, draws: 60 });
      return "massFraction" in answer ? answer.cureDepth_um.high - answer.cureDepth_um.low : Infinity;
    };
    expect(widthOf(calibrate(raw))).toBeLessThan(0.6 * widthOf(raw));
  });
});

describe("initiatorCandidates", () => {
  it("lists every initiator of the shelf and keeps to the brief's avoid list, by name and by hazard", () => {
    const raw = openBrief("data/briefs/flow-cell.json");
    const avoid = [{ hazard: "H360", reason: "fertility" }];
    const answers = initiatorCandidates({ ...raw, brief: { ...raw.brief, avoid }, draws: 40 });
    const outcomes = new Map(answers.map(({ ingredient, outcome }) => [ingredient, outcome]));
    expect([...outcomes.keys()].sort()).toEqual(
      ["BAPO", "BP", "CQ", "HCPK", "HMPP", "ITX", "TPO", "TPO-L"].sort(),
    );
    expect(outcomes.get("TPO")).toBe("avoided");
    expect(outcomes.get("CQ")).toBe("unknown");
    expect(answers[0]!.ingredient).toBe("BAPO");
  });
});
