// What a substance is: its CAS number and its formula, each with the check that catches a slip of the pen.

import { InputError } from "../door.js";

/**
 * Whether a CAS number carries the right check digit: the sum of position (from the right) times digit, modulo 10.
 *
 * A right digit does not prove that the number belongs to the substance; compare name, number and molar mass together.
 * @source CAS Registry, "Check Digit Verification of CAS Registry Numbers" (citation from memory).
 * @example
 * ```ts
 * import { hasCasCheckDigit } from "resinwright";
 * hasCasCheckDigit("7732-18-5"); // → true
 * hasCasCheckDigit("77332-18-5"); // → false
 * ```
 */
export function hasCasCheckDigit(cas: string): boolean {
  if (!/^\d{2,7}-\d{2}-\d$/.test(cas)) return false;
  const digits = cas.replaceAll("-", "").split("").map(Number).reverse();
  const [check, ...rest] = digits;
  return rest.reduce((sum, digit, index) => sum + (index + 1) * digit, 0) % 10 === check;
}

/**
 * Molar mass in g/mol of a formula such as `C13H20O2`, from standard atomic weights.
 * @throws InputError for text that is not a formula or an element that is not listed.
 * @source Prohaska et al., Standard atomic weights of the elements 2021, Pure Appl. Chem. 94 (2022) 573, doi
 * 10.1515/pac-2019-0603, abridged conventional values (weights and citation from memory).
 * @example
 * ```ts
 * import { molarMassOfFormula } from "resinwright";
 * molarMassOfFormula("C13H20O2"); // → 208.301
 * ```
 */
export function molarMassOfFormula(formula: string): number {
  if (!/^([A-Z][a-z]?\d*)+$/.test(formula)) {
    throw new InputError(
      `formula is "${formula}"; it must be element symbols and counts, such as "C13H20O2"`,
    );
  }
  let mass_gmol = 0;
  for (const [, element, count] of formula.matchAll(/([A-Z][a-z]?)(\d*)/g)) {
    const weight = atomicWeights[element!];
    if (weight === undefined) {
      throw new InputError(
        `formula "${formula}": no atomic weight for "${element}"; known: ${Object.keys(atomicWeights).join(", ")}`,
      );
    }
    mass_gmol += weight * (count === "" ? 1 : Number(count));
  }
  return mass_gmol;
}

const atomicWeights: Readonly<Record<string, number>> = {
  H: 1.008,
  B: 10.81,
  C: 12.011,
  N: 14.007,
  O: 15.999,
  F: 18.998,
  Na: 22.99,
  Al: 26.982,
  Si: 28.085,
  P: 30.974,
  S: 32.06,
  Cl: 35.45,
  K: 39.098,
  Ti: 47.867,
  Cr: 51.996,
  Fe: 55.845,
  Zn: 65.38,
  Br: 79.904,
  Zr: 91.224,
  I: 126.9,
};
