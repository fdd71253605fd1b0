// How much absorber brings the light, or a layer's exposure, to where it is wanted.

import { checkNumber, InputError, positive, refuseUnknownKeys } from "../door.js";
import { layerCureDepth, type Case } from "../assess/case.js";
import { cureModel } from "../assess/cure.js";
import { depthModel } from "../assess/depth.js";
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
import { propertyTitles } from "../assess/property.js";
import { largestOf } from "../recipe/formulation.js";
import { unitLabel } from "../recipe/units.js";
import { findRoot } from "../numerics/root.js";
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
  type LevelAnswer,
} from "./level.js";

/** What the absorber is to do: one of these, for the brief's layer under its light. More absorber lowers the first and raises the others. */
export interface WantedOfAbsorber {
  readonly penetrationDepth_um?: number;
  readonly layerExposure_mJcm2?: number;
  readonly layerTime_s?: number;
}

/**
 * The level of one absorber that gives the wanted penetration depth, or makes the brief's layer ask for the wanted exposure or
 * time; in place of every absorber in the formulation, the other ingredients in their proportions.
 *
 * The working curve of the whole spectrum ({@link penetrationDepthOf}, {@link workingCurveOf}; measured where calibrated) is
 * solved for the level, once at the stated figures and once a draw. Levels up to 10 % of the mass are tried; 200 draws unless
 * more are asked for.
 * @param input - The case; `wanted`; `ingredient`, the absorber's name, the formulation's largest unless given; draw options.
 * @throws InputError when `wanted` does not hold exactly one figure above 0, the absorber is unknown or the case cannot be
 * assessed.
 * @source Models: {@link broadExposureForDepth}, {@link findRoot}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { absorberFor, calibrate } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const level = absorberFor({ ...work, wanted: { penetrationDepth_um: 80 } });
 * level.outcome; // → "reached"
 * level.outcome === "reached" && level.massFraction.value > 0.0015; // → true
 * ```
 */
export function absorberFor(
  input: Case & DrawOptions & { readonly wanted: WantedOfAbsorber; readonly ingredient?: string },
): LevelAnswer {
  const wanted = wantedOf(input.wanted);
  const id = input.ingredient ?? largestOf(input.formulation, "absorber").id;
  const ingredient = soughtIngredient(input, "absorber", id);
  const refused = refusal(input, ingredient);
  if (refused !== undefined) return refused;

  const draws = startDraws({ ...input, draws: input.draws ?? SEARCH_DRAWS });
  const caseAt = (massFraction: number): Case => withOnly(input, ingredient, massFraction);
  const solubility = solubilityModel(ingredient);
  const model = (read: Read) => {
    const level = levelFor(caseAt, wanted, read);
    return { level, dissolves: solubility?.(read) ?? MOST_TRIED };
  };
  const { stated, outcomes, inputs } = propagate(model, draws);
  const common = {
    ...identityOf(ingredient),
    warnings: candidateWarnings(input, ingredient),
    sources: sourcesOf(inputs),
  };
  const { level, dissolves } = stated;
  if (level.kind !== "found") return { ...common, outcome: "impossible", reason: whyNot(level, id, wanted) };

  const found = percentText(level.massFraction);
  const dissolved = level.massFraction <= dissolves;
  return {
    ...common,
    warnings: [...common.warnings, ...curveWarnings(caseAt(level.massFraction))],
    outcome: dissolved ? "reached" : "above solubility",
    reason: dissolved
      ? `${found} ${id} brings the ${wanted.text}.`
      : `It takes ${found} ${id} to bring the ${wanted.text}; about ${percentText(dissolves)} dissolves.`,
    massFraction: intervalOf({
      stated: level.massFraction,
      values: outcomes.map((one) => one.level.massFraction),
      level: draws.level,
    }),
    reachedShare:
      outcomes.filter((one) => one.level.kind === "found" && one.level.massFraction <= one.dissolves).length /
      outcomes.length,
  };
}

/**
 * Every absorber on the shelf as an answer to the same question: those that can do it first, of these the ones listed for
 * long-term harm (cancer, genetic defects, fertility) last, least needed first.
 * @param input - As {@link absorberFor}, without `ingredient`.
 * @throws InputError as {@link absorberFor}.
 * @source As {@link absorberFor}.
 * @example
 * ```ts
 * import { absorberCandidates } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const candidates = absorberCandidates({ ...work, wanted: { penetrationDepth_um: 70 }, draws: 50 });
 * candidates.find(({ ingredient }) => ingredient === "UV-P")?.outcome; // → "unknown"
 * ```
 */
export function absorberCandidates(
  input: Case & DrawOptions & { readonly wanted: WantedOfAbsorber },
): LevelAnswer[] {
  return answersFor(input.shelf, "absorber", (id) => absorberFor({ ...input, ingredient: id }));
}

interface Wanted {
  readonly field: keyof WantedOfAbsorber;
  readonly value: number;
  readonly text: string;
}

const fields = ["penetrationDepth_um", "layerExposure_mJcm2", "layerTime_s"] as const;

function wantedOf(given: WantedOfAbsorber): Wanted {
  const where = "absorberFor: wanted";
  refuseUnknownKeys(where, given, fields);
  const [field, ...more] = fields.filter((name) => given[name] !== undefined);
  if (field === undefined || more.length > 0) {
    const held = field === undefined ? "nothing" : [field, ...more].join(" and ");
    throw new InputError(`${where} holds ${held}; give one of ${fields.join(", ")}`);
  }
  const value = checkNumber(given[field], { where, field, ...positive });
  return { field, value, text: `${propertyTitles[field]} to ${shortText(value)} ${unitLabel(field)}` };
}

/** The level in one draw; `massFraction` is 0 or the most that is tried where there is none. */
type Level =
  | { readonly kind: "found"; readonly massFraction: number }
  | {
      readonly kind: "none needed" | "never enough";
      readonly massFraction: number;
      readonly reached: number;
    };

function levelFor(caseAt: (massFraction: number) => Case, { field, value }: Wanted, read: Read): Level {
  const at = (massFraction: number): number => {
    const input = caseAt(massFraction);
    return field === "penetrationDepth_um"
      ? depthModel(input)(read)(layerCureDepth(input))
      : cureModel(input)(read)[field];
  };
  // Rises with the level whatever is asked for.
  const sign = field === "penetrationDepth_um" ? -1 : 1;
  const excess = (massFraction: number): number => sign * Math.log(at(massFraction) / value);
  if (excess(0) >= 0) return { kind: "none needed", massFraction: 0, reached: at(0) };
  if (excess(MOST_TRIED) < 0)
    return { kind: "never enough", massFraction: MOST_TRIED, reached: at(MOST_TRIED) };
  return {
    kind: "found",
    massFraction: findRoot({ f: excess, low: 0, high: MOST_TRIED, where: "absorberFor" }),
  };
}

function whyNot(level: Exclude<Level, { kind: "found" }>, id: string, { field, text }: Wanted): string {
  const got = `${shortText(level.reached)} ${unitLabel(field)}`;
  return level.kind === "none needed"
    ? `Without ${id} it is ${got} already, and absorber only takes it further: to bring the ${text}, change the initiator.`
    : `Even ${percentText(MOST_TRIED)} ${id}, the most that is tried, brings it only to ${got}, not the ${text}: take a stronger absorber.`;
}
