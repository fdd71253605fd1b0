// What was in the bottle when something was measured, against what is in it now.

import type { Formulation } from "../recipe/formulation.js";
import type { MeasuredParts } from "../recipe/measuredParts.js";

/** Amounts weighed to the same target differ by less, as a fraction of the amount. */
const SAME_AMOUNT = 0.005;

/** Whether it was measured on these ingredients, in whatever amounts. */
export function sameIngredients(parts: MeasuredParts, { components }: Formulation): boolean {
  const present = namesOf(components.map(({ ingredient }) => ingredient.id));
  return present === namesOf(parts.map(({ ingredient }) => ingredient));
}

/** The formulation with the amounts that were measured on; lots of one ingredient keep their proportions. */
export function asMeasured(parts: MeasuredParts, formulation: Formulation): Formulation {
  const now = massFractionsOf(formulation);
  const then = measuredFractions(parts);
  const components = formulation.components.map((one) => {
    const { id } = one.ingredient;
    const lots = formulation.components.filter(({ ingredient }) => ingredient.id === id).length;
    const share = now.get(id)! > 0 ? one.massFraction / now.get(id)! : 1 / lots;
    return { ...one, massFraction: share * then.get(id)! };
  });
  return { ...formulation, components };
}

/** Ingredients whose amount was another, with the mass fraction that was measured on. */
export function otherAmounts(
  parts: MeasuredParts,
  formulation: Formulation,
): { readonly id: string; readonly massFraction: number }[] {
  const now = massFractionsOf(formulation);
  return [...measuredFractions(parts)].flatMap(([id, massFraction]) =>
    Math.abs(now.get(id)! - massFraction) > SAME_AMOUNT * massFraction ? [{ id, massFraction }] : [],
  );
}

function massFractionsOf({ components }: Formulation): Map<string, number> {
  const fractions = new Map<string, number>();
  for (const { ingredient, massFraction } of components)
    fractions.set(ingredient.id, (fractions.get(ingredient.id) ?? 0) + massFraction);
  return fractions;
}

function measuredFractions(parts: MeasuredParts): Map<string, number> {
  const total = parts.reduce((sum, { mass_pct }) => sum + mass_pct, 0);
  const fractions = new Map<string, number>();
  for (const { ingredient, mass_pct } of parts)
    fractions.set(ingredient, (fractions.get(ingredient) ?? 0) + mass_pct / total);
  return fractions;
}

const namesOf = (ids: readonly string[]): string => [...new Set(ids)].sort().join(" ");
