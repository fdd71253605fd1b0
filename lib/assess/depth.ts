// The penetration depth: how much deeper the resin cures each time the exposure grows by a factor e. Measured where a
// cure-depth series stands behind it, otherwise estimated from what the engine's light meets in the resin.

import { broadExposureForDepth } from "../models/cure.js";
import { constantOf, layerCureDepth, type Case } from "./case.js";
import { startDraws, type DrawOptions, type Draws, type Read } from "./doubt.js";
import { lightModel } from "./light.js";
import { curveWarnings, measuredFor, readDepth } from "./measuredCurve.js";
import { drawProperty, type Drawn, type Property } from "./property.js";

/** The penetration depth over cure depths from the window to the one given. */
export type DepthAt = (cureDepth_um: number) => number;

/**
 * Penetration depth, µm: the slope of the working curve between the window and the cure depth of this brief's layer.
 *
 * Estimated as f z / ln(E / Ec) with E T(z / f) = Ec, where T is what is left, at a depth, of the light that starts radicals,
 * and f the doubt in any such slope (the constant `slopeFactor`). Light that is absorbed less goes deeper, so the slope grows
 * with depth; for one wavelength it is the optical depth, {@link opticalDepthOf}.
 *
 * With a measured working curve on the shelf ({@link calibrate}) it is the measured slope; for other amounts of the same
 * ingredients that slope times the ratio of the estimates.
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
    curveWarnings(input),
    draws,
  );
}

/** The penetration depth as a function of what the draws read; the working curve builds on it. @internal */
export function depthModel(input: Case): (read: Read) => DepthAt {
  const measured = measuredFor(input);
  if (measured === undefined) return estimatedDepth(input);
  const { curve, differs, formulation } = measured;
  if (differs.length === 0) {
    return (read) => {
      const penetrationDepth_um = readDepth(curve, read);
      return () => penetrationDepth_um;
    };
  }
  const [here, there] = [estimatedDepth(input), estimatedDepth({ ...input, formulation })];
  const slope = constantOf(input.shelf.constants, "slopeFactor");
  return (read) => {
    const [depthHere, depthThere] = [here(read), there(read)];
    const penetrationDepth_um = readDepth(curve, read);
    return (cureDepth_um) => {
      const change = depthHere(cureDepth_um) / depthThere(cureDepth_um);
      // What the series says of the slope holds less the further the resin has moved from it: none of it at a factor e.
      const unknown = read(slope) ** Math.min(1, Math.abs(Math.log(change)));
      return penetrationDepth_um * change * unknown;
    };
  };
}

function estimatedDepth(input: Case): (read: Read) => DepthAt {
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
