// From mass fractions to mole and volume fractions and back: the same mixture counted in three ways.
// A mixing rule is only right on the basis it was fitted on, so the conversions stand in one place.
import { fraction, InputError } from "../door.js";
import { checkList, checkSameLength, type NumberList } from "../numerics/lists.js";
import { density, molarMass } from "./ranges.js";

/**
 * Mole fractions from mass fractions.
 *
 * - `massFractions`: 0 to 1 each, adding up to 1 within 1e-9.
 * - `molarMasses_gmol`: 1 to 1e7 g/mol, in the same order; for an oligomer its number average.
 *
 * x_i = (w_i / M_i) / sum_j (w_j / M_j).
 * @throws InputError when the fractions do not add up, the lists differ in length, or a molar mass is out of range.
 * @source Identity; amount of substance as IUPAC Green Book, 3rd ed. 2007, section 2.10 (from memory).
 * @example
 * ```ts
 * import { massToMoleFractions } from "resinwright";
 * massToMoleFractions({ massFractions: [0.7, 0.3], molarMasses_gmol: [470.563, 286.324] })[0]; // → 0.5867
 * ```
 */
export function massToMoleFractions({
  massFractions,
  molarMasses_gmol,
}: {
  readonly massFractions: NumberList;
  readonly molarMasses_gmol: NumberList;
}): number[] {
  checkMixture("massToMoleFractions", { massFractions }, { molarMasses_gmol });
  return normalised(Array.from(massFractions, (w, i) => w / molarMasses_gmol[i]!));
}

/**
 * Mass fractions from mole fractions.
 *
 * - `moleFractions`: 0 to 1 each, adding up to 1 within 1e-9.
 * - `molarMasses_gmol`: 1 to 1e7 g/mol, in the same order.
 *
 * w_i = x_i M_i / sum_j x_j M_j.
 * @throws InputError when the fractions do not add up, the lists differ in length, or a molar mass is out of range.
 * @source Identity, the inverse of `massToMoleFractions`.
 * @example
 * ```ts
 * import { moleToMassFractions } from "resinwright";
 * moleToMassFractions({ moleFractions: [0.5, 0.5], molarMasses_gmol: [300, 100] })[0]; // → 0.75
 * ```
 */
export function moleToMassFractions({
  moleFractions,
  molarMasses_gmol,
}: {
  readonly moleFractions: NumberList;
  readonly molarMasses_gmol: NumberList;
}): number[] {
  checkMixture("moleToMassFractions", { moleFractions }, { molarMasses_gmol });
  return normalised(Array.from(moleFractions, (x, i) => x * molarMasses_gmol[i]!));
}

/**
 * Volume fractions from mass fractions, with volumes taken to add up on mixing.
 *
 * - `massFractions`: 0 to 1 each, adding up to 1 within 1e-9.
 * - `densities_gcm3`: of each pure component, 0.1 to 25 g/cm3, in the same order and at the same temperature.
 *
 * phi_i = (w_i / rho_i) / sum_j (w_j / rho_j). Assumes no excess volume; (meth)acrylate blends contract by well under
 * one percent (from memory).
 * @throws InputError when the fractions do not add up, the lists differ in length, or a density is out of range.
 * @source Identity; volume fraction as IUPAC Green Book, 3rd ed. 2007, section 2.10 (from memory).
 * @example
 * ```ts
 * import { massToVolumeFractions } from "resinwright";
 * massToVolumeFractions({ massFractions: [0.5, 0.5], densities_gcm3: [1, 3] })[0]; // → 0.75
 * ```
 */
export function massToVolumeFractions({
  massFractions,
  densities_gcm3,
}: {
  readonly massFractions: NumberList;
  readonly densities_gcm3: NumberList;
}): number[] {
  checkMixture("massToVolumeFractions", { massFractions }, { densities_gcm3 });
  return normalised(Array.from(massFractions, (w, i) => w / densities_gcm3[i]!));
}

/**
 * Refuses a list of fractions that is not a whole mixture.
 * @throws InputError when one is outside 0 to 1 or they do not add up to 1 within 1e-9.
 */
export function checkFractions(where: string, field: string, fractions: NumberList): void {
  checkList(where, field, fractions, fraction);
  const sum = Array.from(fractions).reduce((total, f) => total + f, 0);
  if (Math.abs(sum - 1) <= 1e-9) return;
  throw new InputError(
    `${where}: ${field} add up to ${+sum.toPrecision(12)}; they must add up to 1 within 1e-9; divide each by the sum`,
  );
}

/** Each list comes under its own name, so that a message can say which one is wrong. */
function checkMixture(
  where: string,
  fractions: Readonly<Record<string, NumberList>>,
  property: Readonly<Partial<Record<keyof typeof ranges, NumberList>>>,
): void {
  for (const [field, values] of Object.entries(fractions)) checkFractions(where, field, values);
  for (const [field, values] of Object.entries(property)) {
    checkList(where, field, values, ranges[field as keyof typeof ranges]);
  }
  checkSameLength(where, { ...fractions, ...property });
}

const ranges = { molarMasses_gmol: molarMass, densities_gcm3: density } as const;

function normalised(amounts: readonly number[]): number[] {
  const total = amounts.reduce((sum, amount) => sum + amount, 0);
  return amounts.map((amount) => amount / total);
}
