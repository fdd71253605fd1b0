// Photons: what a mole of them carries, and how many an irradiance brings.
import { checkNumber, checkNumbers, notNegative } from "../../door.js";
import { wavelength } from "../ranges.js";

/**
 * Energy of one mole of photons in J/mol.
 *
 * - `wavelength_nm`: in vacuum (in air it is 0.03 % shorter, which is neglected), 100 to 2000 nm.
 *
 * E = N_A h c / lambda.
 * @throws InputError when the wavelength is out of range.
 * @source SI Brochure, 9th ed. 2019: exact h = 6.62607015e-34 J s, c = 299792458 m/s, N_A = 6.02214076e23 1/mol.
 * @example
 * ```ts
 * import { photonEnergy } from "resinwright";
 * photonEnergy({ wavelength_nm: 405 }); // → 295374.24
 * ```
 */
export function photonEnergy(input: { readonly wavelength_nm: number }): number {
  checkNumbers("photonEnergy", input, { wavelength_nm: wavelength });
  return molarEnergy(input.wavelength_nm);
}

/**
 * Photons that an irradiance brings, in mol/(m2 s).
 *
 * - `irradiance_mWcm2`: inside the resin at the window, at least 0, mW/cm2; take off the losses of window and film first.
 * - `wavelength_nm`: 100 to 2000 nm; of a broad source, its mean.
 *
 * Phi = E_e lambda / (N_A h c).
 * @throws InputError when an argument is out of range.
 * @source IUPAC Gold Book, entry P04631 (photon irradiance; from memory).
 * @example
 * ```ts
 * import { photonFlux } from "resinwright";
 * photonFlux({ irradiance_mWcm2: 5, wavelength_nm: 405 }); // → 1.6928e-4
 * ```
 */
export function photonFlux(input: {
  readonly irradiance_mWcm2: number;
  readonly wavelength_nm: number;
}): number {
  checkNumbers("photonFlux", input, { irradiance_mWcm2: notNegative, wavelength_nm: wavelength });
  const irradiance_Wm2 = 10 * input.irradiance_mWcm2;
  return checkNumber(irradiance_Wm2 / molarEnergy(input.wavelength_nm), {
    where: "photonFlux",
    field: "the photon flux",
  });
}

const N_A = 6.02214076e23;
const h = 6.62607015e-34;
const c = 299_792_458;

const molarEnergy = (wavelength_nm: number): number => (N_A * h * c) / (wavelength_nm * 1e-9);
