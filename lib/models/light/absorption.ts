// Absorption of light in a resin (Beer-Lambert), and the ways a handbook states an absorption coefficient.
// Inside the library a linear coefficient is always Napierian, a molar one always decadic; the factor ln 10 is here.
import { checkNumber, checkNumbers, fraction, notNegative, positive } from "../../door.js";
import { density, molarMass } from "../ranges.js";
import { um_per_cm } from "../scales.js";

/** One absorbing substance dissolved in the resin. */
export interface Absorber {
  /** Molar absorption coefficient, always decadic, L/(mol cm), at least 0. */
  readonly molarAbsorption_Lmolcm: number;
  /** Amount concentration, mol/L, at least 0. */
  readonly concentration_molL: number;
}

/**
 * Napierian absorption coefficient of a resin in 1/cm.
 *
 * - `absorbers`: each with its decadic `molarAbsorption_Lmolcm` and `concentration_molL`, both at least 0.
 * - `background_percm`: Napierian absorption of everything else, 1/cm, at least 0; say 0 where there is none.
 *
 * alpha = ln 10 * sum_i eps_i c_i + alpha_background.
 *
 * Assumes that substances absorb independently of each other, no scattering, and a source narrow compared with the
 * absorption band; for a broad one weight alpha with `spectrumMean`.
 * @throws InputError when a figure is negative or not finite; the message names the absorber by its place.
 * @source IUPAC Gold Book, entries B00626 and A00037; Pure Appl. Chem. 68 (1996) 2223-2284, doi 10.1351/pac199668122223.
 * @example
 * ```ts
 * import { absorptionCoefficient } from "resinwright";
 * absorptionCoefficient({
 *   absorbers: [{ molarAbsorption_Lmolcm: 500, concentration_molL: 0.03 }],
 *   background_percm: 0.5,
 * }); // → 35.04
 * ```
 */
export function absorptionCoefficient(input: {
  readonly absorbers: readonly Absorber[];
  readonly background_percm: number;
}): number {
  const where = "absorptionCoefficient";
  const { absorbers, background_percm } = input;
  checkNumber(background_percm, { where, field: "background_percm", ...notNegative });
  let decadic = 0;
  absorbers.forEach(({ molarAbsorption_Lmolcm: eps, concentration_molL: c }, i) => {
    checkNumber(eps, { where, field: `absorbers[${i}].molarAbsorption_Lmolcm`, ...notNegative });
    checkNumber(c, { where, field: `absorbers[${i}].concentration_molL`, ...notNegative });
    decadic += eps * c;
  });
  return finite(where, "the absorption coefficient in 1/cm", Math.LN10 * decadic + background_percm);
}

/**
 * Depth in um at which light has fallen to 1/e, about 37 %.
 *
 * - `napierianAbsorption_percm`: above 0, 1/cm.
 *
 * 1 / alpha. The slope of a working curve is a measurement of its own and may differ.
 * @throws InputError when the absorption is not above 0.
 * @source IUPAC Gold Book, entry A00037 (definition of alpha).
 * @example
 * ```ts
 * import { opticalDepth } from "resinwright";
 * opticalDepth({ napierianAbsorption_percm: 100 }); // → 100
 * ```
 */
export function opticalDepth(input: { readonly napierianAbsorption_percm: number }): number {
  const where = "opticalDepth";
  checkNumbers(where, input, {
    napierianAbsorption_percm: {
      ...positive,
      advice: "without absorption light has no depth; include the background of the resin",
    },
  });
  return finite(where, "the optical depth in um", um_per_cm / input.napierianAbsorption_percm);
}

/**
 * Share of the light that is left at a depth, 0 to 1.
 *
 * - `napierianAbsorption_percm`: at least 0, 1/cm.
 * - `depth_um`: at least 0, um.
 *
 * T = exp(-alpha z). Assumes light at right angles to the window and no reflection from behind.
 * @throws InputError when an argument is negative or not finite.
 * @source IUPAC Gold Book, entry B00626 (Beer-Lambert law).
 * @example
 * ```ts
 * import { transmittedFraction } from "resinwright";
 * transmittedFraction({ napierianAbsorption_percm: 100, depth_um: 50 }); // → 0.60653
 * ```
 */
export function transmittedFraction(input: {
  readonly napierianAbsorption_percm: number;
  readonly depth_um: number;
}): number {
  checkNumbers("transmittedFraction", input, {
    napierianAbsorption_percm: notNegative,
    depth_um: notNegative,
  });
  return Math.exp(-input.napierianAbsorption_percm * (input.depth_um / um_per_cm));
}

/**
 * Decadic molar absorption in L/(mol cm) from a mass absorption, as suppliers print it.
 *
 * - `massAbsorption_mLgcm`: decadic, mL/(g cm), at least 0.
 * - `molarMass_gmol`: 1 to 1e7 g/mol.
 *
 * eps = a M / 1000. Such tables are often copied with the label L/(mol cm): a value far above what the chromophore can
 * have is a mass absorption.
 * @throws InputError when an argument is out of range.
 * @source Definition; IUPAC Gold Book, entry A00037.
 * @example
 * ```ts
 * import { molarAbsorptionFromMassAbsorption } from "resinwright";
 * molarAbsorptionFromMassAbsorption({ massAbsorption_mLgcm: 33170, molarMass_gmol: 204.26 }); // → 6775
 * ```
 */
export function molarAbsorptionFromMassAbsorption(input: {
  readonly massAbsorption_mLgcm: number;
  readonly molarMass_gmol: number;
}): number {
  const where = "molarAbsorptionFromMassAbsorption";
  checkNumbers(where, input, { massAbsorption_mLgcm: notNegative, molarMass_gmol: molarMass });
  return finite(where, "the molar absorption", (input.massAbsorption_mLgcm * input.molarMass_gmol) / 1000);
}

/**
 * Decadic molar absorption in L/(mol cm) from a specific absorbance A(1 %, 1 cm), as pharmacopoeias print it.
 *
 * - `specificAbsorbance_dLgcm`: decadic absorbance of 1 g in 100 mL over 1 cm, at least 0.
 * - `molarMass_gmol`: 1 to 1e7 g/mol.
 *
 * eps = A(1 %, 1 cm) M / 10.
 * @throws InputError when an argument is out of range.
 * @source European Pharmacopoeia, chapter 2.2.25 (definition; from memory).
 * @example
 * ```ts
 * import { molarAbsorptionFromSpecificAbsorbance } from "resinwright";
 * molarAbsorptionFromSpecificAbsorbance({ specificAbsorbance_dLgcm: 107.2, molarMass_gmol: 294.185 }); // → 3154
 * ```
 */
export function molarAbsorptionFromSpecificAbsorbance(input: {
  readonly specificAbsorbance_dLgcm: number;
  readonly molarMass_gmol: number;
}): number {
  const where = "molarAbsorptionFromSpecificAbsorbance";
  checkNumbers(where, input, { specificAbsorbance_dLgcm: notNegative, molarMass_gmol: molarMass });
  return finite(where, "the molar absorption", (input.specificAbsorbance_dLgcm * input.molarMass_gmol) / 10);
}

/**
 * Amount concentration in mol/L of a solute from its mass fraction.
 *
 * - `massFraction`: 0 to 1.
 * - `density_gcm3`: of the finished blend, not of the solute; 0.1 to 25 g/cm3.
 * - `molarMass_gmol`: of the solute, 1 to 1e7 g/mol.
 *
 * c = w rho / M.
 * @throws InputError when an argument is out of range.
 * @source Definition; IUPAC Gold Book, entry A00295 (amount concentration; from memory).
 * @example
 * ```ts
 * import { absorberConcentration } from "resinwright";
 * absorberConcentration({ massFraction: 0.01, density_gcm3: 1.1, molarMass_gmol: 418.5 }); // → 0.02628
 * ```
 */
export function absorberConcentration(input: {
  readonly massFraction: number;
  readonly density_gcm3: number;
  readonly molarMass_gmol: number;
}): number {
  const { massFraction: w, density_gcm3: rho, molarMass_gmol: M } = input;
  checkNumbers("absorberConcentration", input, {
    massFraction: fraction,
    density_gcm3: density,
    molarMass_gmol: molarMass,
  });
  return (1000 * w * rho) / M;
}

const finite = (where: string, field: string, value: number): number =>
  checkNumber(value, { where, field, advice: "an input is beyond any real substance" });
