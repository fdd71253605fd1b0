// The penetration depth: how much deeper the resin cures each time the exposure grows by a factor e. Measured where a
// cure-depth series stands behind it, otherwise estimated from what the engine's light meets in the resin.

import { broadExposureForDepth } from "../models/cure.js";
import type { Warning } from "../result.js";
import { constantOf, type Case } from "./case.js";
import { startDraws, type DrawOptions, type Draws, type Read } from "./doubt.js";
import { lightModel, lightWarnings } from "./light.js";
import { drawProperty, type Drawn, type Property } from "./property.js";

/** The penetration depth over cure depths from the window to the one given. */
export type DepthAt = (cureDepth_um: number) => number;

/**
 * Penetration depth, µm: the slope of the working curve between the window and the cure depth of this brief's layer.
 *
 * Estimated as f z / ln(E / Ec) with E T(z / f) = Ec, where T is what is left, at a depth, of the light that starts radicals,
 * and f the doubt in any such slope (the constant `slopeFactor`). Light that is absorbed less goes deeper, so the slope grows
 * with depth; for one wavelength it is the optical depth, {@link opticalDepthOf}.
 * @throws InputError as {@link opticalDepthOf}.
 * @source Models: {@link broadExposureForDepth}, {@link absorptionSpectrum}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { opticalDepthOf, penetrationDepthOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const depth = penetrationDepthOf(work);
 * depth.title; // → "penetration depth"
 * depth.doubt.some(({ label }) => label === "working-curve slope against optical depth"); // → true
 * ```
 */
export function penetrationDepthOf(input: Case & DrawOptions): Property {
  return drawPenetrationDepth(input, startDraws(input)).property;
}

/** @internal */
export function drawPenetrationDepth(input: Case, draws: Draws): Drawn {
  const depth = depthModel(input);
  const cureDepth_um = layerCureDepth(input);
  return drawProperty(
    "penetrationDepth_um",
    (read) => depth(read)(cureDepth_um),
    [...lightWarnings(input), ...curveEstimated],
    draws,
  );
}

/** What to know before using an estimated working curve. @internal */
export const curveEstimated: readonly Warning[] = [
  {
    code: "working-curve-estimated",
    message:
      "Estimated from absorption, rate constants and dissolved oxygen, not measured. Cure six spots or more on a glass slide over a factor of ten in exposure before trusting an exposure time.",
  },
];

/** How deep the brief wants a layer to cure, µm. @internal */
export function layerCureDepth({ brief }: Case): number {
  return brief.cureDepthPerLayer * brief.layerThickness_um;
}

/** The penetration depth as a function of what the draws read; the working curve builds on it. @internal */
export function depthModel(input: Case): (read: Read) => DepthAt {
  const light = lightModel(input);
  const slope = constantOf(input.shelf.constants, "slopeFactor");
  return (read) => {
    const { starting, napierianAbsorptions_percm } = light(read);
    const factor = read(slope);
    return (cureDepth_um) => {
      const relativeExposure = broadExposureForDepth({
        engine: starting,
        napierianAbsorptions_percm,
        criticalExposure_mJcm2: 1,
        cureDepth_um: cureDepth_um / factor,
      });
      return cureDepth_um / Math.log(relativeExposure);
    };
  };
}
