// Whether what is to dissolve in the resin does.

import type { Formulation } from "../recipe/formulation.js";
import type { Warning } from "../result.js";
import { shortText } from "./shortText.js";

/**
 * Solids of which there is more than the shelf says a liquid resin dissolves: surely, beyond two standard uncertainties, or maybe.
 * Lots of one ingredient are counted together.
 */
export function solubilityWarnings({ components }: Formulation): Warning[] {
  const ids = [...new Set(components.map(({ ingredient }) => ingredient.id))];
  return ids.flatMap((id) => {
    const same = components.filter(({ ingredient }) => ingredient.id === id);
    const { state, solubility_pct: most } = same[0]!.ingredient;
    if (most === undefined || state !== "solid") return [];
    const mass_pct = 100 * same.reduce((sum, { massFraction }) => sum + massFraction, 0);
    if (mass_pct <= most.value) return [];
    const amounts = `${shortText(mass_pct)} % of ${id}`;
    const known = `${shortText(most.value)} ± ${shortText(most.u)} %`;
    const unsure = mass_pct <= most.value + 2 * most.u;
    return [
      unsure
        ? {
            code: "may-not-dissolve",
            message: `${amounts} may be more than a liquid resin dissolves (${known}). Stir a sample, leave it cold for a night and look for crystals before you make a batch.`,
          }
        : {
            code: "does-not-dissolve",
            message: `${amounts} is more than a liquid resin dissolves (${known}). What stays solid settles, and takes no part in what is computed here: take less, or measure how much dissolves and put it on the shelf.`,
          },
    ];
  });
}
