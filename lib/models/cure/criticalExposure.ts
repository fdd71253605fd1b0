// The critical exposure from first principles: what the dissolved oxygen costs, and what the way to the gel costs.
import { checkNumber, checkNumbers, fraction, positive } from "../../door.js";
import { photonFlux } from "../light/photons.js";
import { oxygenCriticalExposure } from "../oxygen/induction.js";
import { radicalGeneration } from "../oxygen/radicals.js";
import { steadyConversionTime } from "./conversionTime.js";

/** A resin and its light at the window. */
export interface CriticalExposureInput {
  /** Above 0, mW/cm2. */
  readonly irradiance_mWcm2: number;
  readonly wavelength_nm: number;
  /** Napierian, of the initiator alone, above 0, 1/cm. */
  readonly initiatorAbsorption_percm: number;
  readonly radicalsPerPhoton: number;
  /** Dissolved, at least 0, mol/m3. */
  readonly oxygen_molm3: number;
  readonly oxygenPerRadical: number;
  /** Conversion at which the resin holds as a solid, above 0, below 1. */
  readonly gelConversion: number;
  /** kp, above 0, m3/(mol s). */
  readonly propagation_m3mols: number;
  /** kt with d[R]/dt = Ri - 2 kt [R]^2, above 0, m3/(mol s). */
  readonly termination_m3mols: number;
}

/** The critical exposure and its two parts. */
export interface CriticalExposureParts {
  readonly criticalExposure_mJcm2: number;
  /** Spent on the dissolved oxygen; does not depend on the irradiance. */
  readonly oxygenExposure_mJcm2: number;
  /** Spent on the way to the gel; grows with the root of the irradiance. */
  readonly gelExposure_mJcm2: number;
  /** Share of the oxygen part. */
  readonly oxygen: { readonly share: number };
}

/**
 * Critical exposure at the window as the sum of an oxygen part and a gel part.
 *
 * - the fields of `CriticalExposureInput`; ranges as in `oxygenCriticalExposure`, `radicalGeneration` and
 *   `steadyConversionTime`.
 *
 * Ec = C0 N_A h c / (lambda s phi alpha_PI) + I t_gel, with Ri = phi alpha_PI I lambda / (N_A h c) and
 * t_gel = -ln(1 - X_gel) / (kp sqrt(Ri / (2 kt))).
 *
 * Assumes that oxygen takes every radical until it is gone and none comes in, then steady radicals at constant kp and kt. The
 * gel part is not reciprocal: four times the irradiance needs twice the exposure. Above a permeable window use `deadZone` too.
 * @throws InputError when an argument is out of range.
 * @source Oxygen balance and classical steady state, as `oxygenCriticalExposure` and `steadyConversionTime`.
 * @example
 * ```ts
 * import { criticalExposureParts } from "resinwright";
 * const parts = criticalExposureParts({
 *   irradiance_mWcm2: 5,
 *   wavelength_nm: 405,
 *   initiatorAbsorption_percm: 20,
 *   radicalsPerPhoton: 1,
 *   oxygen_molm3: 1,
 *   oxygenPerRadical: 1,
 *   gelConversion: 0.05,
 *   propagation_m3mols: 25,
 *   termination_m3mols: 2500,
 * });
 * parts.oxygenExposure_mJcm2; // → 14.77
 * parts.gelExposure_mJcm2; // → 1.247
 * ```
 */
export function criticalExposureParts(input: CriticalExposureInput): CriticalExposureParts {
  const where = "criticalExposureParts";
  const { irradiance_mWcm2, gelConversion, ...rest } = input;
  checkNumbers(
    where,
    { irradiance_mWcm2, gelConversion },
    { irradiance_mWcm2: positive, gelConversion: { ...fraction, above: true } },
  );
  const oxygenExposure_mJcm2 = oxygenCriticalExposure(rest);
  const radicalGeneration_molm3s = radicalGeneration({ ...rest, photonFlux_molm2s: photonFlux(input) });
  const gelTime_s = steadyConversionTime({ ...rest, conversion: gelConversion, radicalGeneration_molm3s });
  const gelExposure_mJcm2 = irradiance_mWcm2 * gelTime_s;
  const criticalExposure_mJcm2 = checkNumber(oxygenExposure_mJcm2 + gelExposure_mJcm2, {
    where,
    field: "criticalExposure_mJcm2",
  });
  return {
    criticalExposure_mJcm2,
    oxygenExposure_mJcm2,
    gelExposure_mJcm2,
    oxygen: { share: oxygenExposure_mJcm2 / criticalExposure_mJcm2 },
  };
}
