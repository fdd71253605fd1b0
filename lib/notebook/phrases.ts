// How notebooks say conditions and targets: one wording everywhere.

import type { Brief, Target } from "../recipe/brief.js";
import type { Band } from "./figure/marks.js";
import type { Region } from "./figure/contour.js";
import { numberText } from "./digits.js";

/** The light of a brief: "8 mW/cm² of led-412". */
export function lightText({ light }: Brief): string {
  const engine = light.spectrum ?? `${numberText(light.wavelength_nm!.value)} nm`;
  return `${numberText(light.irradiance_mWcm2.value)} mW/cm² of ${engine}`;
}

/** The window of a brief: "PDMS film of 200 µm over air". */
export function windowText(brief: Brief): string {
  const { film, filmThickness_um } = brief.window;
  return `${film} film of ${numberText(filmThickness_um.value)} µm over ${gasText(brief)}`;
}

/** The gas under the film, by name where it has one. */
export function gasText({ window: { gasOxygenFraction } }: Brief): string {
  const named = new Map([
    [0, "nitrogen"],
    [0.2095, "air"],
    [1, "oxygen"],
  ]);
  return named.get(gasOxygenFraction) ?? `gas with ${numberText(100 * gasOxygenFraction)} % oxygen`;
}

/** A target as text, without its unit: "100 to 600", "at most 6"; "no target" where there is none. */
export function targetText({ min, max }: Target): string {
  if (min === undefined) return max === undefined ? "no target" : `at most ${numberText(max)}`;
  return max === undefined ? `at least ${numberText(min)}` : `${numberText(min)} to ${numberText(max)}`;
}

/** A target as the band of a line figure; none where the brief has no such target. */
export function targetBand(axis: "x" | "y", target: Target | undefined): Band[] {
  const region = targetRegion(target);
  return region === undefined ? [] : [{ ...region, axis }];
}

/** A target as the region of a contour figure; undefined where the brief has no such target. */
export function targetRegion(target: Target | undefined): Region | undefined {
  return target === undefined ? undefined : { label: "target", from: target.min, to: target.max };
}
