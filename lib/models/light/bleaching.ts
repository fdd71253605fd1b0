// An initiator that loses its colour as it reacts: the light eats its way into the resin as a travelling front.
// Exact for one bleaching absorber whose products do not absorb, in steady light of one wavelength, without diffusion.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { wavelength } from "../ranges.js";
import { m_per_um, um_per_m } from "../scales.js";
import { photonEnergy } from "./photons.js";

/** A bleaching initiator in steady light. */
export interface BleachingInput {
  /** C0: at the start, above 0, mol/L. */
  readonly concentration_molL: number;
  /** Decadic, above 0, L/(mol cm). */
  readonly molarAbsorption_Lmolcm: number;
  /** Initiator molecules lost per photon absorbed, above 0, at most 4. */
  readonly quantumYield: number;
  /** I0: entering the resin, at least 0, mol/(m2 s). */
  readonly photonFlux_molm2s: number;
}

/** What is left at one place and time, each 0 to 1. */
export interface Bleached {
  /** C / C0. */
  readonly initiator: { readonly share: number };
  /** I / I0. */
  readonly light: { readonly share: number };
}

/**
 * What is left of a bleaching initiator and of the light at a depth after a time.
 *
 * - `concentration_molL` C0, `molarAbsorption_Lmolcm` (decadic), `quantumYield` phi, `photonFlux_molm2s` I0.
 * - `depth_um`: at least 0, um; `time_s`: at least 0, s.
 *
 * With kappa the Napierian molar absorption, Z = kappa C0 z, tau = phi kappa I0 t and D = e^Z + e^tau - 1:
 * C/C0 = e^Z / D and I/I0 = e^tau / D.
 *
 * Assumes products that do not absorb, no other absorber, no diffusion, one wavelength.
 * @throws InputError when an argument is out of range.
 * @source Exact solution of dI/dz = -kappa C I, dC/dt = -phi kappa C I, derived for this library; the travelling front:
 * abstract of G. Terrones, A. J. Pearlstein, Macromolecules 34 (2001) 3195-3204.
 * @example
 * ```ts
 * import { bleachedFractions } from "resinwright";
 * const left = bleachedFractions({
 *   concentration_molL: 0.03,
 *   molarAbsorption_Lmolcm: 500,
 *   quantumYield: 0.5,
 *   photonFlux_molm2s: 1.7e-4,
 *   depth_um: 200,
 *   time_s: 100,
 * });
 * left.initiator.share; // → 0.5458
 * left.light.share; // → 0.7278
 * ```
 */
export function bleachedFractions(
  input: BleachingInput & { readonly depth_um: number; readonly time_s: number },
): Bleached {
  const where = "bleachedFractions";
  checkInput(where, input);
  const { depth_um, time_s } = input;
  checkNumbers(where, { depth_um, time_s }, { depth_um: notNegative, time_s: notNegative });
  const kappa = napierianMolar_m2mol(input);
  const Z = kappa * 1e3 * input.concentration_molL * m_per_um * depth_um;
  const tau = input.quantumYield * kappa * input.photonFlux_molm2s * time_s;
  checkNumbers(where, { Z, tau }, { Z: {}, tau: {} });
  // Divided by e^Z and by e^tau, so that neither overflows nor cancels.
  return {
    initiator: { share: 1 / (1 - Math.expm1(-tau) * Math.exp(tau - Z)) },
    light: { share: 1 / (1 - Math.expm1(-Z) * Math.exp(Z - tau)) },
  };
}

/**
 * Speed in um/s at which the front of bleached resin travels away from the window.
 *
 * - the fields of `bleachedFractions` but the absorption, on which it does not depend.
 *
 * v = phi I0 / C0. Behind the front the fastest initiation anywhere tends to one quarter of that at the window at first.
 *
 * Assumes what `bleachedFractions` does, and a front already several optical depths away.
 * @throws InputError when an argument is out of range.
 * @source G. Terrones, A. J. Pearlstein, Macromolecules 34 (2001) 3195-3204 (abstract).
 * @example
 * ```ts
 * import { bleachingFrontSpeed } from "resinwright";
 * bleachingFrontSpeed({ concentration_molL: 0.03, quantumYield: 1, photonFlux_molm2s: 1.7e-4 }); // → 5.667
 * ```
 */
export function bleachingFrontSpeed(input: Omit<BleachingInput, "molarAbsorption_Lmolcm">): number {
  const where = "bleachingFrontSpeed";
  checkNumbers(where, input, { concentration_molL, quantumYield, photonFlux_molm2s: notNegative });
  const v_ms = (input.quantumYield * input.photonFlux_molm2s) / (1e3 * input.concentration_molL);
  return checkNumber(um_per_m * v_ms, { where, field: "the speed in um/s" });
}

/**
 * Exposure in mJ/cm2 that leaves 1/e of a bleaching initiator at the window.
 *
 * - `molarAbsorption_Lmolcm`: decadic, above 0; `quantumYield` phi: above 0, at most 4; `wavelength_nm`: 100 to 2000 nm.
 *
 * H = N_A h c / (lambda phi kappa), kappa = ln 10 * eps.
 *
 * Assumes what `bleachedFractions` does; only the exposure counts, not the irradiance.
 * @throws InputError when an argument is out of range.
 * @source tau = 1 in the solution of `bleachedFractions`.
 * @example
 * ```ts
 * import { bleachingExposure } from "resinwright";
 * bleachingExposure({ molarAbsorption_Lmolcm: 46, quantumYield: 0.07, wavelength_nm: 469 }); // → 34402
 * ```
 */
export function bleachingExposure(
  input: Pick<BleachingInput, "molarAbsorption_Lmolcm" | "quantumYield"> & { readonly wavelength_nm: number },
): number {
  const where = "bleachingExposure";
  checkNumbers(where, input, { molarAbsorption_Lmolcm, quantumYield, wavelength_nm: wavelength });
  const exposure_Jm2 = photonEnergy(input) / (input.quantumYield * napierianMolar_m2mol(input));
  return checkNumber(exposure_Jm2 / 10, { where, field: "the exposure in mJ/cm2" });
}

/**
 * Share of a bleaching initiator that is lost per second at the window, 1/s.
 *
 * - `molarAbsorption_Lmolcm`: decadic, above 0; `quantumYield` phi: above 0, at most 4; `photonFlux_molm2s` I0: at least 0.
 *
 * b = phi kappa I0, kappa = ln 10 * eps: what `exposeLayer` takes as the rate of its bleaching.
 *
 * Assumes what `bleachedFractions` does.
 * @throws InputError when an argument is out of range.
 * @source d(tau)/dt in the solution of `bleachedFractions`.
 * @example
 * ```ts
 * import { bleachingRate } from "resinwright";
 * bleachingRate({ molarAbsorption_Lmolcm: 500, quantumYield: 0.5, photonFlux_molm2s: 1.7e-4 }); // → 0.009786
 * ```
 */
export function bleachingRate(
  input: Pick<BleachingInput, "molarAbsorption_Lmolcm" | "quantumYield" | "photonFlux_molm2s">,
): number {
  const where = "bleachingRate";
  checkNumbers(where, input, { molarAbsorption_Lmolcm, quantumYield, photonFlux_molm2s: notNegative });
  return checkNumber(input.quantumYield * napierianMolar_m2mol(input) * input.photonFlux_molm2s, {
    where,
    field: "the rate in 1/s",
  });
}

const molarAbsorption_Lmolcm = positive;
const concentration_molL = positive;
const quantumYield = { ...positive, max: 4 };

function checkInput(where: string, input: BleachingInput): void {
  checkNumbers(where, input, {
    concentration_molL,
    molarAbsorption_Lmolcm,
    quantumYield,
    photonFlux_molm2s: notNegative,
  });
}

/** 1 L/(mol cm) is 0.1 m2/mol. */
const napierianMolar_m2mol = ({
  molarAbsorption_Lmolcm: eps,
}: {
  readonly molarAbsorption_Lmolcm: number;
}): number => Math.LN10 * 0.1 * eps;
