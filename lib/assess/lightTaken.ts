// Who takes the light: what each initiator and absorber absorbs at every wavelength of the engine, and its share of the light
// between the window and the depth a layer has to cure.

import { absorbedShares, absorptionSpectrum, type LightEngine } from "../models/light.js";
import type { Interval, UsedSource, Warning } from "../result.js";
import { layerCureDepth, type Case } from "./case.js";
import { intervalOf, propagate, sourcesOf, startDraws, type DrawOptions, type Read } from "./doubt.js";
import { lightModel, lightWarnings } from "./light.js";

/** One that takes light: an initiator, an absorber, or the resin itself. */
export interface LightTaker {
  readonly name: string;
  /** At the nodes of the engine, at the stated figures. */
  readonly napierianAbsorptions_percm: readonly number[];
  /** Of the light's power, 0 to 1. */
  readonly share: Interval;
}

/** Where the light of the engine goes in this resin. */
export interface LightTaken {
  /** From the window to here: the depth to which the brief's layer has to cure. */
  readonly depth_um: number;
  /** Nodes of the engine and its power at them; the powers add up to 1. */
  readonly engine: LightEngine;
  /** Initiators and absorbers in the order of the formulation, then the resin itself. */
  readonly takers: readonly LightTaker[];
  readonly transmitted: { readonly share: Interval };
  readonly warnings: readonly Warning[];
  readonly sources: readonly UsedSource[];
}

/**
 * Who takes the light between the window and the cure depth of the brief's layer, on the whole spectrum of the engine.
 *
 * Only what an initiator takes starts radicals; what an absorber takes is the price of its depth control, and what goes through
 * reaches the layers before. Shares of all takers and of what goes through add up to 1 in each draw.
 * @throws InputError as {@link opticalDepthOf}.
 * @source Model: {@link absorbedShares}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { lightTakenOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { takers } = lightTakenOf(openBrief("data/briefs/flow-cell.json"));
 * takers.map(({ name }) => name); // → ["BAPO", "BBOT", "the resin itself"]
 * takers[0].share.value > takers[2].share.value; // → true
 * ```
 */
export function lightTakenOf(input: Case & DrawOptions): LightTaken {
  const depth_um = layerCureDepth(input);
  const draws = startDraws(input);
  const { stated, outcomes, inputs } = propagate(takenModel(input, depth_um), draws);
  const interval = (of: (one: typeof stated) => number): Interval =>
    intervalOf({ stated: of(stated), values: outcomes.map(of), level: draws.level });
  return {
    depth_um,
    engine: stated.engine,
    takers: stated.takers.map(({ name, napierianAbsorptions_percm }, i) => ({
      name,
      napierianAbsorptions_percm,
      share: interval(({ components }) => components[i]!.share),
    })),
    transmitted: { share: interval(({ transmitted }) => transmitted.share) },
    warnings: lightWarnings(input),
    sources: sourcesOf(inputs),
  };
}

function takenModel(input: Case, depth_um: number) {
  const light = lightModel(input);
  return (read: Read) => {
    const { engine, substances, background_percm } = light(read);
    const none = engine.shares.map(() => 0);
    const takers = [
      ...substances.map((one) => ({
        name: one.id,
        napierianAbsorptions_percm: [...absorptionSpectrum({ absorbers: [one], backgrounds_percm: none })],
      })),
      { name: "the resin itself", napierianAbsorptions_percm: none.map(() => background_percm) },
    ];
    return { engine, takers, ...absorbedShares({ engine, components: takers, depth_um }) };
  };
}
