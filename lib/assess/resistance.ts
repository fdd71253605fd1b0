// What holds oxygen back on its way into the dead zone: the film or the resin, and by how much.

import { oxygenResistance } from "../models/oxygen.js";
import type { Interval, Warning } from "../result.js";
import type { Case } from "./case.js";
import { intervalOf, propagate, startDraws, type DrawOptions } from "./doubt.js";
import { oxygenModel } from "./oxygen.js";

/** Where the fall in oxygen between gas and dead zone happens; `undefined` shares where nothing cures at the stated figures. */
export interface ResistanceEstimate {
  /** At the stated figures. */
  readonly rules: "film" | "resin" | "nothing cures";
  /** Share of the fall that happens across the film, 0 to 1; the rest happens in the resin. */
  readonly filmShare: Interval | undefined;
  /** Share of the draws in which the film takes more than half. */
  readonly filmRulesShare: number;
  readonly neverCuresShare: number;
  readonly warnings: readonly Warning[];
}

/**
 * Says which resistance rules the dead zone of a formulation on a window, with the doubt in it.
 *
 * Where the film rules, a thinner or more open film thickens the dead zone, and thickness goes one to one with the oxygen below
 * and against the light. Where the resin rules, it goes with square roots, and viscosity and temperature count. The gas under
 * the film counts as mixed: its own resistance is not in the model, so move it.
 * @throws InputError as `deadZoneOf`.
 * @source Model: {@link oxygenResistance}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { resistanceOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const onFep = { ...work, brief: { ...work.brief, window: { ...work.brief.window, film: "FEP" } } };
 * resistanceOf(onFep).rules; // → "film"
 * ```
 */
export function resistanceOf(input: Case & DrawOptions): ResistanceEstimate {
  const draws = startDraws(input);
  const oxygen = oxygenModel(input);
  const { stated, outcomes } = propagate((read) => oxygenResistance(oxygen(read)), draws);
  const shares = outcomes.flatMap((one) => (one.outcome === "dead-zone" ? [one.filmShare] : []));
  const ruled = outcomes.filter((one) => one.outcome === "dead-zone" && one.rules === "film");
  const cures = stated.outcome === "dead-zone" && shares.length >= outcomes.length / 2;
  return {
    rules: stated.outcome === "dead-zone" ? stated.rules : "nothing cures",
    filmShare: cures
      ? intervalOf({ stated: stated.filmShare, values: shares, level: draws.level })
      : undefined,
    filmRulesShare: ruled.length / outcomes.length,
    neverCuresShare: 1 - shares.length / outcomes.length,
    warnings: input.oxygenCorrection?.warnings ?? [],
  };
}
