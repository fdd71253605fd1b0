// How much initiator cures deepest: too little starts too slowly, too much keeps the light to itself.

import { checkNumber, positive } from "../door.js";
import { layerCureDepth, type Case } from "../assess/case.js";
import { cureModel, curveModel } from "../assess/cure.js";
import { cureDepthOn } from "../assess/curveDepth.js";
import {
  intervalOf,
  propagate,
  sourcesOf,
  startDraws,
  type DrawOptions,
  type Read,
} from "../assess/doubt.js";
import { curveWarnings } from "../assess/measuredCurve.js";
import { shortText } from "../assess/shortText.js";
import { findMaximum } from "../numerics/maximum.js";
import { largestOf } from "../recipe/formulation.js";
import type { Interval } from "../result.js";
import {
  answersFor,
  candidateWarnings,
  identityOf,
  MOST_TRIED,
  percentText,
  refusal,
  SEARCH_DRAWS,
  solubilityModel,
  soughtIngredient,
  withOnly,
  type LevelFound,
  type LevelRefused,
} from "./level.js";

/** The level of initiator that cures deepest, with the depth it reaches. */
export type InitiatorAnswer = (LevelFound & { readonly cureDepth_um: Interval }) | LevelRefused;

/** What is asked of an initiator. */
export interface InitiatorSearch extends DrawOptions {
  /** At the window; what the brief's layer asks of the formulation as it stands unless given. */
  readonly exposure_mJcm2?: number;
  /** Name of the initiator; the formulation's largest unless given. */
  readonly ingredient?: string;
  /** Leave every absorber out. */
  readonly withoutAbsorber?: boolean;
}

/**
 * The level of one initiator that cures deepest at an exposure, in place of every initiator in the formulation, the other
 * ingredients in their proportions.
 *
 * The depth is that of the working curve of the whole spectrum ({@link workingCurveOf}; measured where calibrated). It has one
 * maximum: oxygen and gel point ask for less exposure the more initiator there is, and the light reaches less far. It is found
 * once at the stated figures and once a draw, among levels up to 10 % of the mass. `reached` means that the best level
 * dissolves and cures the brief's layer; `massFraction` is the best level, `cureDepth_um` the depth at that level, or at as
 * much of it as dissolves. 200 draws unless more are asked for.
 * @param input - The case and the fields of `InitiatorSearch`.
 * @throws InputError when the exposure is not above 0, the initiator is unknown or the case cannot be assessed.
 * @source Models: {@link broadExposureForDepth}, {@link inductionTime}, {@link steadyConversionTime}; that there is such an
 * optimum: abstract of J. H. Lee, R. K. Prud'homme, I. A. Aksay, J. Mater. Res. 16 (2001) 3536-3544. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { initiatorFor } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const best = initiatorFor({ ...work, exposure_mJcm2: 40, draws: 50 });
 * const clear = initiatorFor({ ...work, exposure_mJcm2: 40, draws: 50, withoutAbsorber: true });
 * [best.outcome, clear.outcome]; // → ["reached", "reached"]
 * best.outcome === "reached" && clear.outcome === "reached" && clear.massFraction.value < best.massFraction.value; // → true
 * ```
 */
export function initiatorFor(given: Case & InitiatorSearch): InitiatorAnswer {
  const exposure_mJcm2 = given.exposure_mJcm2 ?? cureModel(given)(({ value }) => value).layerExposure_mJcm2;
  checkNumber(exposure_mJcm2, { where: "initiatorFor", field: "exposure_mJcm2", ...positive });
  const id = given.ingredient ?? largestOf(given.formulation, "photoinitiator").id;
  const ingredient = soughtIngredient(given, "photoinitiator", id);
  const input = given.withoutAbsorber === true ? { ...given, formulation: clearOf(given) } : given;
  const refused = refusal(input, ingredient);
  if (refused !== undefined) return refused;

  const draws = startDraws({ ...input, draws: input.draws ?? SEARCH_DRAWS });
  const caseAt = (massFraction: number): Case => withOnly(input, ingredient, massFraction);
  const depthAt = (massFraction: number, read: Read): number =>
    cureDepthOn(curveModel(caseAt(massFraction))(read), exposure_mJcm2);
  const bestLevel = (read: Read): number => {
    const best = findMaximum({
      f: (lnLevel) => depthAt(Math.exp(lnLevel), read),
      low: Math.log(LEAST_TRIED),
      high: Math.log(MOST_TRIED),
      tolerance: NEAR_ENOUGH,
      where: "initiatorFor",
    });
    return best > Math.log(MOST_TRIED) - NEAR_ENOUGH ? MOST_TRIED : Math.exp(best);
  };
  const solubility = solubilityModel(ingredient);
  const best = bestLevel(({ value }) => value);
  const taken = Math.min(best, solubility?.(({ value }) => value) ?? MOST_TRIED);
  const { stated, outcomes, inputs } = propagate((read) => {
    const [level, dissolves] = [bestLevel(read), solubility?.(read) ?? MOST_TRIED];
    return { level, dissolves, depth: depthAt(taken, read) };
  }, draws);

  const layer = layerCureDepth(input);
  const common = {
    ...identityOf(ingredient),
    warnings: candidateWarnings(input, ingredient),
    sources: sourcesOf(inputs),
  };
  const at = `${shortText(exposure_mJcm2)} mJ/cm²`;
  const layerText = `the layer asks for ${shortText(layer)} µm`;
  if (stated.depth <= 0) {
    const most =
      best > taken
        ? `About ${percentText(taken)} ${id} dissolves, which does not cure at ${at}`
        : `No level of ${id} up to ${percentText(MOST_TRIED)} cures at ${at}`;
    return { ...common, outcome: "impossible", reason: `${most}: expose longer.` };
  }
  const depthText = `${shortText(stated.depth)} µm deep at ${at}`;
  if (stated.depth < layer * (1 - ROUNDING)) {
    const why =
      best > taken
        ? "and no more dissolves"
        : best === MOST_TRIED
          ? "and more is not tried"
          : "and no level cures deeper";
    const reason = `${percentText(taken)} ${id} cures ${depthText}, ${why}; ${layerText}.`;
    return { ...common, outcome: "impossible", reason };
  }
  const interval = (value: number, values: readonly number[]) =>
    intervalOf({ stated: value, values, level: draws.level });
  const works = outcomes.filter(({ level, dissolves, depth }) => level <= dissolves && depth >= layer);
  return {
    ...common,
    warnings: [...common.warnings, ...curveWarnings(caseAt(taken))],
    outcome: best <= taken ? "reached" : "above solubility",
    reason:
      best <= taken
        ? `${percentText(best)} ${id}${best === MOST_TRIED ? ", the most that is tried," : ""} cures deepest, ${depthText}; ${layerText}.`
        : `${percentText(best)} ${id} would cure deepest; about ${percentText(taken)} dissolves and cures ${depthText}; ${layerText}.`,
    massFraction: interval(
      best,
      outcomes.map(({ level }) => level),
    ),
    cureDepth_um: interval(
      stated.depth,
      outcomes.map(({ depth }) => Math.max(depth, 0)),
    ),
    reachedShare: works.length / outcomes.length,
  };
}

/**
 * Every initiator on the shelf as an answer to the same question: those that can do it first, of these the ones listed for
 * long-term harm (cancer, genetic defects, fertility) last, least needed first.
 * @param input - As {@link initiatorFor}, without `ingredient`.
 * @throws InputError as {@link initiatorFor}.
 * @source As {@link initiatorFor}.
 * @example
 * ```ts
 * import { initiatorCandidates } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const candidates = initiatorCandidates({ ...work, draws: 40 });
 * candidates.find(({ ingredient }) => ingredient === "TPO")?.outcome; // → "avoided"
 * ```
 */
export function initiatorCandidates(input: Case & Omit<InitiatorSearch, "ingredient">): InitiatorAnswer[] {
  return answersFor(input.shelf, "photoinitiator", (id) => initiatorFor({ ...input, ingredient: id }));
}

const LEAST_TRIED = 1e-5;
/** Two percent of the level: what a balance and the doubt leave of it. */
const NEAR_ENOUGH = 0.02;
const ROUNDING = 1e-9;

/** The formulation with every absorber at nothing, still among its ingredients. */
function clearOf({ formulation }: Case): Case["formulation"] {
  const rest = formulation.components
    .filter(({ ingredient }) => ingredient.role !== "absorber")
    .reduce((sum, { massFraction }) => sum + massFraction, 0);
  const components = formulation.components.map((one) => ({
    ...one,
    massFraction: one.ingredient.role === "absorber" ? 0 : one.massFraction / rest,
  }));
  return { ...formulation, components };
}
