// Stiffness of a network above its glass transition from the strands between its crosslinks, and back.
// Meant for loose networks: for dense acrylates the numbers rank, they do not predict.
import { checkNumbers, fraction, InputError, positive } from "../../door.js";
import { celsius, density } from "../ranges.js";
import { gasConstant_JmolK as R, kelvin } from "../scales.js";

/** Moduli of an incompressible rubber, E = 3 G. */
export interface RubberModuli {
  /** G, MPa. */
  readonly shearModulus_MPa: number;
  /** E, MPa. */
  readonly modulus_MPa: number;
}

/**
 * Moduli of a rubber whose crosslinks move as the body does (affine network).
 *
 * - `strands_molm3` nu: amount of strands in a volume, above 0; `temperature_C` T: above -273.15.
 *
 * G = nu R T, E = 3 G. Assumes Gaussian strands, no entanglements, no volume change; the upper limit of the two network models.
 * @throws InputError when a field is out of range.
 * @source P. J. Flory, Principles of Polymer Chemistry, Cornell 1953, chapter XI (from memory).
 * @example
 * ```ts
 * import { affineModulus } from "resinwright";
 * affineModulus({ strands_molm3: 1000, temperature_C: 100 }).modulus_MPa; // → 9.30763
 * ```
 */
export function affineModulus(input: {
  readonly strands_molm3: number;
  readonly temperature_C: number;
}): RubberModuli {
  checkNumbers("affineModulus", input, { strands_molm3: { ...positive, max: 1e6 }, temperature_C: celsius });
  return moduli(input.strands_molm3, input.temperature_C);
}

/**
 * Moduli of a rubber whose crosslinks fluctuate freely (phantom network).
 *
 * - `strands_molm3` nu: above 0; `strandsPerJunction` F: strands that meet in a crosslink, above 2; `temperature_C` T.
 *
 * G = (1 - 2/F) nu R T, E = 3 G: the cycle rank nu - mu in place of nu, mu = 2 nu / F being the junctions.
 * @throws InputError when a field is out of range.
 * @source P. J. Flory, Proceedings of the Royal Society A 351 (1976) 351-380, doi 10.1098/rspa.1976.0146 (from memory).
 * @example
 * ```ts
 * import { phantomModulus } from "resinwright";
 * phantomModulus({ strands_molm3: 1000, strandsPerJunction: 3, temperature_C: 100 }).modulus_MPa; // → 3.10254
 * ```
 */
export function phantomModulus(input: {
  readonly strands_molm3: number;
  readonly strandsPerJunction: number;
  readonly temperature_C: number;
}): RubberModuli {
  checkNumbers("phantomModulus", input, {
    strands_molm3: { ...positive, max: 1e6 },
    strandsPerJunction: { min: 2, above: true, max: 100, advice: "two strands in a junction are one strand" },
    temperature_C: celsius,
  });
  return moduli((1 - 2 / input.strandsPerJunction) * input.strands_molm3, input.temperature_C);
}

/**
 * Strands of a network from its modulus on the rubbery plateau, and the molar mass of one, by the affine model.
 *
 * - `modulus_MPa` E: tensile, read well above the glass transition, above 0; `temperature_C` T of that reading;
 *   `density_gcm3` rho: 0.1 to 25.
 *
 * nu = E / (3 R T), Mc = rho / nu.
 * @throws InputError when a field is out of range.
 * @source P. J. Flory, Principles of Polymer Chemistry, Cornell 1953, chapter XI (from memory).
 * @example
 * ```ts
 * import { strandsFromModulus } from "resinwright";
 * strandsFromModulus({ modulus_MPa: 10, temperature_C: 126.85, density_gcm3: 1.1 }).strandMass_gmol; // → 1097.5
 * ```
 */
export function strandsFromModulus(input: {
  readonly modulus_MPa: number;
  readonly temperature_C: number;
  readonly density_gcm3: number;
}): { strands_molm3: number; strandMass_gmol: number } {
  checkNumbers("strandsFromModulus", input, {
    modulus_MPa: { ...positive, max: 1e5, advice: "give it in MPa" },
    temperature_C: celsius,
    density_gcm3: density,
  });
  const strands_molm3 = (input.modulus_MPa * 1e6) / (3 * R * kelvin(input.temperature_C));
  return { strands_molm3, strandMass_gmol: (input.density_gcm3 * 1e6) / strands_molm3 };
}

/**
 * Independent loops that a monomer adds to a network: strands less junctions, which does not depend on how they are counted.
 *
 * - `functionality` f: double bonds in a molecule, a whole number from 1 to 12; `conversion` p: 0 to 1, the chance of each bond
 *   to have reacted, independent of the others.
 *
 * xi = sum over k = 2 to f of C(f, k) p^k (1 - p)^(f - k) (k - 1) = f p - 1 + (1 - p)^f. Each chain's end takes one away (not counted here).
 * @throws InputError when a field is out of range.
 * @source P. J. Flory, Macromolecules 15 (1982) 99-100, doi 10.1021/ma00229a019 (from memory), for the cycle rank; the sum is
 * closed here.
 * @example
 * ```ts
 * import { cycleRankPerMonomer } from "resinwright";
 * cycleRankPerMonomer({ functionality: 3, conversion: 0.8 }); // → 1.408
 * ```
 */
export function cycleRankPerMonomer(input: {
  readonly functionality: number;
  readonly conversion: number;
}): number {
  const where = "cycleRankPerMonomer";
  const { functionality: f, conversion: p } = input;
  checkNumbers(where, input, { functionality: { min: 1, max: 12 }, conversion: fraction });
  if (!Number.isInteger(f))
    throw new InputError(`${where}: functionality is ${f}; it must be a whole number: it counts bonds`);
  return f * p - 1 + (1 - p) ** f;
}

function moduli(strands_molm3: number, temperature_C: number): RubberModuli {
  const shearModulus_MPa = strands_molm3 * R * kelvin(temperature_C) * 1e-6;
  return { shearModulus_MPa, modulus_MPa: 3 * shearModulus_MPa };
}
