// One formulation under every light engine on the shelf: which of them it would cure well under.

import { InputError } from "../door.js";
import type { Case } from "../assess/case.js";
import { workingCurveOf, type WorkingCurveEstimate } from "../assess/cure.js";
import type { DrawOptions } from "../assess/doubt.js";
import { lightModel, opticalDepthOf } from "../assess/light.js";
import type { Property } from "../assess/property.js";
import { densityOf } from "../recipe/formulation.js";

/** A formulation under one engine, or why it cannot be said. */
export type EngineComparison =
  | ({
      readonly engine: string;
      readonly title: string;
      readonly outcome: "compared";
      readonly opticalDepth_um: Property;
    } & WorkingCurveEstimate)
  | {
      readonly engine: string;
      readonly title: string;
      readonly outcome: "not covered";
      readonly reason: string;
    };

/**
 * Optical depth and working curve of the case under each engine spectrum on the shelf, at the brief's irradiance.
 *
 * An engine whose light an absorption spectrum does not cover is listed with the reason. A measured working curve counts for
 * its own engine only.
 * @param input - The case; draw options as for {@link workingCurveOf}.
 * @throws InputError when the formulation has no initiator or an ingredient lacks what light needs.
 * @source Models: {@link opticalDepthOf}, {@link workingCurveOf}.
 * @example
 * ```ts
 * import { compareEngines } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const engines = compareEngines({ ...openBrief("data/briefs/flow-cell.json"), draws: 50 });
 * engines.map(({ engine, outcome }) => `${engine} ${outcome}`).join(", "); // → "led-387 compared, led-412 compared"
 * ```
 */
export function compareEngines(input: Case & DrawOptions): EngineComparison[] {
  const { brief, shelf } = input;
  return [...shelf.spectra.values()]
    .filter(({ quantity }) => quantity === "relativePower")
    .map(({ id: engine, title }): EngineComparison => {
      const light = { spectrum: engine, irradiance_mWcm2: brief.light.irradiance_mWcm2 };
      const under = { ...input, brief: { ...brief, light } };
      const reason = notCovered(under);
      if (reason !== undefined) return { engine, title, outcome: "not covered", reason };
      return {
        engine,
        title,
        outcome: "compared",
        opticalDepth_um: opticalDepthOf(under),
        ...workingCurveOf(under),
      };
    });
}

/** The absorptions are read at every node of the engine; the first that ends short of it says so. */
function notCovered(input: Case): string | undefined {
  const light = lightModel(input);
  // What is missing for every engine alike is an error, not a property of this one.
  densityOf(input.formulation);
  try {
    light(({ value }) => value);
  } catch (error) {
    if (error instanceof InputError) return error.message;
    throw error;
  }
  return undefined;
}
