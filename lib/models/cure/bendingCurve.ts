// The working curve of a broad light engine: it bends upward, because the light that is left deep down is absorbed less.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { absorbing, checkLitResin, decayAt, type LitResin } from "../light/broadband.js";

/** A resin under an engine, with the exposure that just begins to gel it at the window. */
export interface BroadCure extends LitResin {
  /** Ec: above 0, mJ/cm2 of this engine's light. */
  readonly criticalExposure_mJcm2: number;
}

/**
 * Depth in um to which an exposure by a broad engine cures; 0 up to the critical exposure.
 *
 * - `engine`: made by `lightEngine`; `napierianAbsorptions_percm`: of the whole resin at its nodes, above 0, 1/cm.
 * - `criticalExposure_mJcm2`: above 0; `exposure_mJcm2`: at least 0; both in light of this engine.
 *
 * The z with E T(z) = Ec, T(z) = integral(S exp(-alpha z)) / integral(S); by Newton steps from the window, which approach it
 * from one side because ln T is convex. For one wavelength it is Cd = ln(E / Ec) / alpha.
 *
 * Assumes that every wavelength of the engine starts the cure alike; if not, give `lightEngine` the power weighted with what
 * the initiator absorbs. Only the exposure counts, not the irradiance; no bleaching.
 * @throws InputError when an argument is out of range or the lists differ in length.
 * @source Beer-Lambert law at each wavelength; abstract of B. W. Caplins et al., "Influence of spectral bandwidth on the
 * working curve in vat photopolymerization"; equation derived for this library.
 * @example
 * ```ts
 * import { broadCureDepth, lightEngine } from "resinwright";
 * const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
 * const resin = { engine, napierianAbsorptions_percm: [200, 50], criticalExposure_mJcm2: 5 };
 * broadCureDepth({ ...resin, exposure_mJcm2: 20 }); // → 156.8
 * ```
 */
export function broadCureDepth(input: BroadCure & { readonly exposure_mJcm2: number }): number {
  const where = "broadCureDepth";
  const { exposure_mJcm2: E, criticalExposure_mJcm2: Ec } = input;
  checkLitResin(where, input, absorbing);
  checkNumber(E, { where, field: "exposure_mJcm2", ...notNegative });
  checkNumber(Ec, { where, field: "criticalExposure_mJcm2", ...positive });
  if (E <= Ec) return 0;
  const lnNeeded = Math.log(Ec) - Math.log(E);
  let z = 0;
  for (let step = 1; step > 1e-8 * z; z += step) {
    const { lnTransmitted, absorption_percm } = decayAt(input, z);
    step = (lnTransmitted - lnNeeded) / absorption_percm;
  }
  return checkNumber(z * um_per_cm, { where, field: "the cure depth in um" });
}

/**
 * Exposure in mJ/cm2 by a broad engine that cures to a depth.
 *
 * - the fields of `broadCureDepth`, and `cureDepth_um`: at least 0, um.
 *
 * E = Ec / T(Cd).
 *
 * Assumes what `broadCureDepth` does.
 * @throws InputError when an argument is out of range, or no light reaches the depth.
 * @source As `broadCureDepth`.
 * @example
 * ```ts
 * import { broadExposureForDepth, lightEngine } from "resinwright";
 * const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
 * const resin = { engine, napierianAbsorptions_percm: [200, 50], criticalExposure_mJcm2: 5 };
 * broadExposureForDepth({ ...resin, cureDepth_um: 100 }); // → 13.48
 * ```
 */
export function broadExposureForDepth(input: BroadCure & { readonly cureDepth_um: number }): number {
  const where = "broadExposureForDepth";
  const { cureDepth_um, criticalExposure_mJcm2 } = input;
  checkLitResin(where, input, absorbing);
  checkNumbers(
    where,
    { cureDepth_um, criticalExposure_mJcm2 },
    { cureDepth_um: notNegative, criticalExposure_mJcm2: positive },
  );
  const { lnTransmitted } = decayAt(input, cureDepth_um / um_per_cm);
  return checkNumber(criticalExposure_mJcm2 * Math.exp(-lnTransmitted), {
    where,
    field: "the exposure in mJ/cm2",
    advice: "no light reaches that far",
  });
}

const um_per_cm = 1e4;
