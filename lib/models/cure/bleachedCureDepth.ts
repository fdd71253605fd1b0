// The cure depth of a bleaching initiator: the light reaches further as it bleaches, and less is left to start the cure.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { bleachingExposure } from "../light/bleaching.js";
import { depthBetween } from "../light/bleachingBeside.js";
import { um_per_cm } from "../scales.js";

/** The depth, or the finding that the initiator is used up before the resin gels. */
export type BleachedCureDepth =
  | { readonly outcome: "cures"; readonly cureDepth_um: number }
  | { readonly outcome: "does-not-cure" }
  | { readonly outcome: "initiator-used-up" };

/**
 * Depth to which an exposure cures when the initiator bleaches beside an absorber that does not.
 *
 * - `concentration_molL`, `molarAbsorption_Lmolcm` (decadic), `quantumYield` (lost per photon absorbed), `wavelength_nm`: of
 *   the initiator and the light, as for `bleachingExposure`.
 * - `otherAbsorption_percm`: Napierian, of absorber and resin, at least 0, 1/cm.
 * - `exposure_mJcm2`: at least 0; `criticalExposure_mJcm2`: above 0, what gels the resin at the window if nothing bleached.
 *
 * Gel takes the radicals of Ec: s_gel = -ln(1 - Ec / Hb), Hb the exposure of `bleachingExposure`. The depth is that between
 * tau = E / Hb and s_gel in `bleachedBesideAbsorber`. For Hb far above E it is ln(E / Ec) / alpha, alpha of the whole resin.
 *
 * Assumes what `bleachedBesideAbsorber` does, and a gel that asks for a fixed number of started radicals. With Ec at or above Hb
 * no exposure gels it.
 * @throws InputError when an argument is out of range.
 * @source Derived for this library, as `bleachedBesideAbsorber`.
 * @example
 * ```ts
 * import { bleachedCureDepth } from "resinwright";
 * const depth = bleachedCureDepth({
 *   concentration_molL: 0.03,
 *   molarAbsorption_Lmolcm: 500,
 *   quantumYield: 0.6,
 *   wavelength_nm: 405,
 *   otherAbsorption_percm: 60,
 *   exposure_mJcm2: 200,
 *   criticalExposure_mJcm2: 10,
 * });
 * depth.outcome === "cures" && depth.cureDepth_um; // → 323.9
 * ```
 */
export function bleachedCureDepth(input: {
  readonly concentration_molL: number;
  readonly molarAbsorption_Lmolcm: number;
  readonly quantumYield: number;
  readonly wavelength_nm: number;
  readonly otherAbsorption_percm: number;
  readonly exposure_mJcm2: number;
  readonly criticalExposure_mJcm2: number;
}): BleachedCureDepth {
  const where = "bleachedCureDepth";
  const { exposure_mJcm2: E, criticalExposure_mJcm2: Ec, otherAbsorption_percm } = input;
  checkNumbers(where, input, {
    concentration_molL: positive,
    molarAbsorption_Lmolcm: positive,
    quantumYield: { ...positive, max: 4 },
    otherAbsorption_percm: notNegative,
    exposure_mJcm2: notNegative,
    criticalExposure_mJcm2: positive,
  });
  const Hb = bleachingExposure(input);
  if (Ec >= Hb) return { outcome: "initiator-used-up" };
  const gel = -Math.log1p(-Ec / Hb);
  const tau = E / Hb;
  if (tau <= gel) return { outcome: "does-not-cure" };
  const initiator_percm = Math.LN10 * input.molarAbsorption_Lmolcm * input.concentration_molL;
  const b = otherAbsorption_percm / initiator_percm;
  const Z = depthBetween({ lnS: Math.log(gel), lnTau: Math.log(tau), b, where });
  const cureDepth_um = checkNumber((um_per_cm * Z) / initiator_percm, {
    where,
    field: "the cure depth in um",
  });
  return { outcome: "cures", cureDepth_um };
}
