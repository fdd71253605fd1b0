// How notebooks say conditions and targets: one wording everywhere.

import type { Brief, Target } from "../recipe/brief.js";
import type { Band } from "./figure/marks.js";
import type { Region } from "./figure/contour.js";
import { numberText } from "./digits.js";

/**
 * The light of a brief: "8 mW/cm² of led-412".
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { lightText } from "resinwright/notebook";
 * const { brief } = openBrief("data/briefs/flow-cell.json");
 * lightText(brief); // → "8 mW/cm² of led-412"
 * ```
 */
export function lightText({ light }: Brief): string {
  const engine = light.spectrum ?? `${numberText(light.wavelength_nm!.value)} nm`;
  return `${numberText(light.irradiance_mWcm2.value)} mW/cm² of ${engine}`;
}

/**
 * The window of a brief: "PDMS film of 200 µm over air".
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { windowText } from "resinwright/notebook";
 * const { brief } = openBrief("data/briefs/flow-cell.json");
 * windowText(brief); // → "PDMS film of 200 µm over air"
 * ```
 */
export function windowText(brief: Brief): string {
  const { film, filmThickness_um } = brief.window;
  return `${film} film of ${numberText(filmThickness_um.value)} µm over ${gasText(brief)}`;
}

/**
 * The gas under the film, by name where it has one.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { gasText } from "resinwright/notebook";
 * const { brief } = openBrief("data/briefs/flow-cell.json");
 * gasText(brief); // → "air"
 * gasText({ ...brief, window: { ...brief.window, gasOxygenFraction: 0.05 } }); // → "gas with 5 % oxygen"
 * ```
 */
export function gasText({ window: { gasOxygenFraction } }: Brief): string {
  const named = new Map([
    [0, "nitrogen"],
    [0.2095, "air"],
    [1, "oxygen"],
  ]);
  return named.get(gasOxygenFraction) ?? `gas with ${numberText(100 * gasOxygenFraction)} % oxygen`;
}

/**
 * A target as text, without its unit: "100 to 600", "at most 6"; "no target" where there is none.
 * @example
 * ```ts
 * import { targetText } from "resinwright/notebook";
 * targetText({ min: 100, max: 600 }); // → "100 to 600"
 * targetText({ max: 6 }); // → "at most 6"
 * ```
 */
export function targetText({ min, max }: Target): string {
  if (min === undefined) return max === undefined ? "no target" : `at most ${numberText(max)}`;
  return max === undefined ? `at least ${numberText(min)}` : `${numberText(min)} to ${numberText(max)}`;
}

/**
 * How well a property keeps to its target, as the end of a sentence: "within its target (5 to 50) in 93 % of the draws".
 * @example
 * ```ts
 * import { withinText } from "resinwright/notebook";
 * withinText({ max: 6 }, 0.65); // → "within its target (at most 6) in 65 % of the draws"
 * withinText(undefined, 1); // → "with no target set for it"
 * ```
 */
export function withinText(target: Target | undefined, share: number): string {
  if (target === undefined) return "with no target set for it";
  return `within its target (${targetText(target)}) in ${sharePercent(share)} % of the draws`;
}

/**
 * A share in the nearest whole percent, but never rounded onto a limit that it does not reach: "95 %" is not said of what falls short
 * of it, nor "0 %" of what happens now and then. Halves go towards one half.
 * @example
 * ```ts
 * import { sharePercent } from "resinwright/notebook";
 * sharePercent(0.879); // → 88
 * sharePercent(0.9496); // → 94
 * sharePercent(0.001); // → 1
 * ```
 */
export function sharePercent(share: number): number {
  const percent = Number((100 * share).toPrecision(12));
  if (share < 0.5) {
    const nearest = Math.floor(percent + 0.5);
    return [0, 5].some((limit) => percent > limit && nearest === limit) ? nearest + 1 : nearest;
  }
  const nearest = Math.ceil(percent - 0.5);
  return [95, 100].some((limit) => percent < limit && nearest === limit) ? nearest - 1 : nearest;
}

/**
 * A target as the band of a line figure; none where the brief has no such target.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { targetBand } from "resinwright/notebook";
 * const { brief } = openBrief("data/briefs/flow-cell.json");
 * targetBand("y", brief.targets.viscosity_mPas); // → [{ label: "target", axis: "y", from: 100, to: 600 }]
 * targetBand("y", brief.targets.inductionTime_s); // → []
 * ```
 */
export function targetBand(axis: "x" | "y", target: Target | undefined): Band[] {
  const region = targetRegion(target);
  return region === undefined ? [] : [{ ...region, axis }];
}

/**
 * A target as the region of a contour figure; undefined where the brief has no such target.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { targetRegion } from "resinwright/notebook";
 * const { brief } = openBrief("data/briefs/flow-cell.json");
 * targetRegion(brief.targets.viscosity_mPas); // → { label: "target", from: 100, to: 600 }
 * targetRegion(brief.targets.inductionTime_s); // → undefined
 * ```
 */
export function targetRegion(target: Target | undefined): Region | undefined {
  return target === undefined ? undefined : { label: "target", from: target.min, to: target.max };
}
