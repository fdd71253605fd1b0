// Irradiance by chemistry: a ferrioxalate solution counts the photons that a meter of unknown calibration only claims.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { wavelength } from "../ranges.js";
import { photonEnergy } from "./photons.js";

/**
 * Irradiance in mW/cm2 from the iron(II) that light forms in a ferrioxalate solution.
 *
 * - `ironFormation_molm2s`: iron(II) formed per lit area and time, at least 0, mol/(m2 s).
 * - `quantumYield`: iron(II) formed per photon absorbed, above 0, at most 2; 1.2230 at 365 nm, 1.1374 at 405 nm.
 * - `absorbed`: share of the light that the solution absorbs, above 0, at most 1.
 * - `wavelength_nm`: 100 to 2000 nm; of a broad engine, its mean.
 *
 * E_e = (N_A h c / lambda) n_Fe / (Phi f).
 *
 * Assumes a stirred solution that is far from used up.
 * @throws InputError when an argument is out of range.
 * @source C. G. Hatchard, C. A. Parker, Proc. R. Soc. Lond. A 235 (1956) 518-536 (method; from memory); yields: data file
 * behind B. Wriedt, D. Ziegenbalg, J. Flow Chem. 10 (2020) 295-306, doi 10.1007/s41981-019-00072-7.
 * @example
 * ```ts
 * import { irradianceFromActinometer } from "resinwright";
 * irradianceFromActinometer({
 *   ironFormation_molm2s: 1.9e-4,
 *   quantumYield: 1.1374,
 *   absorbed: 0.99,
 *   wavelength_nm: 405,
 * }); // → 4.984
 * ```
 */
export function irradianceFromActinometer(input: {
  readonly ironFormation_molm2s: number;
  readonly quantumYield: number;
  readonly absorbed: number;
  readonly wavelength_nm: number;
}): number {
  const where = "irradianceFromActinometer";
  checkNumbers(where, input, {
    ironFormation_molm2s: notNegative,
    quantumYield: { ...positive, max: 2 },
    absorbed: { ...positive, max: 1 },
    wavelength_nm: wavelength,
  });
  const { ironFormation_molm2s, quantumYield, absorbed } = input;
  const irradiance_Wm2 = (photonEnergy(input) * ironFormation_molm2s) / (quantumYield * absorbed);
  return checkNumber(irradiance_Wm2 / 10, { where, field: "the irradiance in mW/cm2" });
}
