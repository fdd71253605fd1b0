// How deep an exposure cures: the working curve of one draw read the other way round.

import { findRoot } from "../numerics/root.js";
import type { DrawnCurve } from "./cure.js";

/** Cure depth in µm after an exposure at the window; below 0, a measure of how far the exposure falls short. */
export function cureDepthOn(
  {
    penetrationDepthAt,
    criticalExposure_mJcm2,
  }: Pick<DrawnCurve, "penetrationDepthAt" | "criticalExposure_mJcm2">,
  exposure_mJcm2: number,
): number {
  const factors = Math.log(exposure_mJcm2 / criticalExposure_mJcm2);
  const first = penetrationDepthAt(SHALLOW_UM) * factors;
  if (first <= SHALLOW_UM) return first;
  const excess = (z: number) => z / penetrationDepthAt(z) - factors;
  let high = 1.5 * first;
  while (excess(high) < 0) high *= 2;
  return findRoot({ f: excess, low: SHALLOW_UM, high, where: "cureDepthOn" });
}

/** Here the slope is that at the window. */
const SHALLOW_UM = 0.1;
