// Every property of one formulation under one brief, from the same draws, with a verdict for each target.

import type { Brief, PropertyName, Target } from "../recipe/brief.js";
import type { Formulation } from "../recipe/formulation.js";
import { propertyNames } from "../recipe/propertyNames.js";
import type { UsedSource, Warning } from "../result.js";
import { avoidReasons, checkAvoided, uncheckedWarnings } from "./avoided.js";
import type { Case } from "./case.js";
import { drawCure } from "./cure.js";
import { drawPenetrationDepth } from "./depth.js";
import { distinctSources, startDraws, type DrawOptions, type Draws } from "./doubt.js";
import { drawOpticalDepth } from "./light.js";
import { drawDeadZone, drawInductionTime, type DeadZoneEstimate } from "./oxygen.js";
import { judge, type Drawn, type Property, type Verdict } from "./property.js";
import { solubilityWarnings } from "./solubility.js";
import { drawViscosity } from "./viscosity.js";

/** All that the models say of a formulation under a brief. */
export interface Assessment {
  readonly brief: string;
  readonly formulation: string;
  readonly properties: Readonly<Record<Exclude<PropertyName, "deadZone_um">, Property>> & {
    readonly deadZone_um: DeadZoneEstimate;
  };
  readonly verdicts: readonly Verdict[];
  /** Ingredients the brief says to avoid, with its reason. */
  readonly avoided: readonly { readonly ingredient: string; readonly reason: string }[];
  /** Every warning once. */
  readonly warnings: readonly Warning[];
  /** Every source this run used, once. */
  readonly sources: readonly UsedSource[];
  readonly draws: number;
  readonly seed: number;
  readonly level: number;
}

/**
 * Assesses a formulation under a brief: every property as an interval, a verdict for each target, what is to be avoided, all
 * warnings and sources. The same seed gives the same answer.
 * @param input - The case; `draws` (20 to 1e6, 2000 unless given), `seed`, `level` (0.5 to 0.999, 0.95 unless given).
 * @throws InputError naming formulation, ingredient and figure of whatever is missing; when the brief avoids an ingredient that is
 * not on the shelf.
 * @example
 * ```ts
 * import { assess, calibrate } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { verdicts, properties } = assess(calibrate(openBrief("data/briefs/flow-cell.json")));
 * properties.viscosity_mPas.unit; // → "mPa s"
 * `${verdicts[0].title}: ${verdicts[0].outcome}`; // → "viscosity at print temperature: meets"
 * ```
 */
export function assess(input: Case & DrawOptions): Assessment {
  const steps = assessing(input);
  for (;;) {
    const { done, value } = steps.next();
    if (done) return value;
  }
}

/** As {@link assess}, with a pause after each property, in which a page can answer its reader. @internal */
export function* assessing(input: Case & DrawOptions): Generator<PropertyName, Assessment> {
  const { brief, formulation } = input;
  checkAvoided(brief, input.shelf);
  const draws = startDraws(input);
  const drawn: Drawn<Property | DeadZoneEstimate>[] = [];
  for (const name of propertyNames) {
    drawn.push(drawers[name](input, draws));
    yield name;
  }
  const verdicts = drawn.flatMap((one) => {
    const target = brief.targets[one.property.property];
    return target === undefined ? [] : [judge(one, target, draws.level)];
  });
  const all = drawn.map(({ property }) => property);
  return {
    brief: brief.id,
    formulation: formulation.id,
    properties: Object.fromEntries(
      all.map((one) => [one.property, one]),
    ) as unknown as Assessment["properties"],
    verdicts,
    avoided: avoidedIn(input),
    warnings: distinctWarnings([
      ...uncheckedWarnings(brief, formulation),
      ...solubilityWarnings(formulation),
      ...all.flatMap(({ warnings }) => warnings),
    ]),
    sources: distinctSources(all.flatMap(({ sources }) => sources)),
    draws: draws.count,
    seed: draws.seed,
    level: draws.level,
  };
}

/**
 * The verdict on one property alone: for sweeps and maps, where a whole assessment of every point would be waste.
 * @param input - The case, the `property` and its `target`; draw options as for {@link assess}.
 * @throws InputError as {@link assess}.
 * @example
 * ```ts
 * import { calibrate, verdictOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * verdictOf({ ...work, property: "viscosity_mPas", target: { min: 100, max: 600 } }).outcome; // → "meets"
 * verdictOf({ ...work, property: "viscosity_mPas", target: { max: 50 } }).outcome; // → "fails"
 * ```
 */
export function verdictOf(input: Case & DrawOptions & { property: PropertyName; target: Target }): Verdict {
  const draws = startDraws(input);
  return judge(drawers[input.property](input, draws), input.target, draws.level);
}

const drawers: Readonly<
  Record<PropertyName, (input: Case, draws: Draws) => Drawn<Property | DeadZoneEstimate>>
> = {
  viscosity_mPas: drawViscosity,
  opticalDepth_um: drawOpticalDepth,
  penetrationDepth_um: drawPenetrationDepth,
  criticalExposure_mJcm2: (input, draws) => drawCure(input, "criticalExposure_mJcm2", draws),
  layerExposure_mJcm2: (input, draws) => drawCure(input, "layerExposure_mJcm2", draws),
  layerTime_s: (input, draws) => drawCure(input, "layerTime_s", draws),
  deadZone_um: drawDeadZone,
  inductionTime_s: drawInductionTime,
};

/**
 * What a formulation holds that its brief says to avoid, by name or by a hazard statement it carries, each with the reason.
 * @example
 * ```ts
 * import { avoidedIn, formulate } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { brief, shelf } = openBrief("data/briefs/flow-cell.json");
 * const parts = [{ ingredient: "IBOA", mass_pct: 99 }, { ingredient: "TPO", mass_pct: 1 }];
 * const formulation = formulate({ recipe: { id: "two", title: "two parts", normalise: false, parts }, shelf });
 * avoidedIn({ brief, formulation })[0]; // → { ingredient: "TPO", reason: "reprotoxic category 1B in the EU since 2025-09-01" }
 * ```
 */
export function avoidedIn({
  brief,
  formulation,
}: {
  brief: Pick<Brief, "avoid">;
  formulation: Formulation;
}): { ingredient: string; reason: string }[] {
  return formulation.components
    .filter(({ massFraction }) => massFraction > 0)
    .flatMap(({ ingredient }) =>
      avoidReasons(brief, ingredient).map((reason) => ({ ingredient: ingredient.id, reason })),
    );
}

function distinctWarnings(warnings: readonly Warning[]): Warning[] {
  return [...new Map(warnings.map((warning) => [warning.code + warning.message, warning])).values()];
}
