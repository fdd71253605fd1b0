// The working curve: how deep an exposure cures, and which exposure cures to a depth.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";

/** The two parameters of a working curve. */
export interface WorkingCurve {
  /** Dp: depth gained each time the exposure grows by a factor e, above 0, um. Not the optical depth, `opticalDepth_um`. */
  readonly penetrationDepth_um: number;
  /** Ec: the exposure that just begins to gel the resin at the window, above 0, mJ/cm2. */
  readonly criticalExposure_mJcm2: number;
}

/**
 * Depth in um to which an exposure cures the resin; 0 up to the critical exposure.
 *
 * - `exposure_mJcm2`: at least 0, mJ/cm2.
 * - `penetrationDepth_um`: above 0, um.
 * - `criticalExposure_mJcm2`: above 0, mJ/cm2.
 *
 * Cd = Dp ln(E / Ec) for E above Ec.
 *
 * Assumes that only the exposure counts, not the irradiance; one wavelength; absorption that does not bleach.
 * @throws InputError when an argument is out of range.
 * @source P. F. Jacobs, Rapid Prototyping and Manufacturing, SME 1992, chapter 4 (from memory); as I. Gibson, D. Rosen,
 * B. Stucker, Additive Manufacturing Technologies, chapter 4, equation 4.16.
 * @example
 * ```ts
 * import { cureDepth } from "resinwright";
 * cureDepth({ exposure_mJcm2: 20, penetrationDepth_um: 100, criticalExposure_mJcm2: 5 }); // → 138.63
 * cureDepth({ exposure_mJcm2: 4, penetrationDepth_um: 100, criticalExposure_mJcm2: 5 }); // → 0
 * ```
 */
export function cureDepth(input: WorkingCurve & { readonly exposure_mJcm2: number }): number {
  const { exposure_mJcm2: E, penetrationDepth_um: Dp, criticalExposure_mJcm2: Ec } = input;
  const where = "cureDepth";
  checkNumbers(where, input, {
    exposure_mJcm2: notNegative,
    penetrationDepth_um: positive,
    criticalExposure_mJcm2: positive,
  });
  return E <= Ec
    ? 0
    : checkNumber(Dp * (Math.log(E) - Math.log(Ec)), { where, field: "the cure depth in um" });
}

/**
 * Exposure in mJ/cm2 that cures the resin to a depth.
 *
 * - `cureDepth_um`: at least 0, um; 0 asks for the critical exposure itself.
 * - `penetrationDepth_um`: above 0, um.
 * - `criticalExposure_mJcm2`: above 0, mJ/cm2.
 *
 * E = Ec exp(Cd / Dp).
 * @throws InputError when an argument is out of range, or the depth is so many penetration depths that no exposure
 * could be stated.
 * @source P. F. Jacobs, Rapid Prototyping and Manufacturing, SME 1992, chapter 4 (from memory), solved for E.
 * @example
 * ```ts
 * import { exposureForDepth } from "resinwright";
 * exposureForDepth({ cureDepth_um: 150, penetrationDepth_um: 100, criticalExposure_mJcm2: 5 }); // → 22.4084
 * ```
 */
export function exposureForDepth(input: WorkingCurve & { readonly cureDepth_um: number }): number {
  const { cureDepth_um: Cd, penetrationDepth_um: Dp, criticalExposure_mJcm2: Ec } = input;
  const where = "exposureForDepth";
  checkNumbers(where, input, {
    cureDepth_um: notNegative,
    penetrationDepth_um: positive,
    criticalExposure_mJcm2: positive,
  });
  return checkNumber(Ec * Math.exp(Cd / Dp), {
    where,
    field: "the exposure in mJ/cm2",
    advice: `the depth is ${(Cd / Dp).toPrecision(3)} penetration depths; no light reaches that far`,
  });
}
