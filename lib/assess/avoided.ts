// What a brief keeps out of the bottle: an ingredient by name, or whatever carries a hazard statement.

import type { Brief } from "../recipe/brief.js";
import type { Ingredient } from "../recipe/ingredient.js";

/** The brief's reasons to avoid an ingredient; none where it may be used. */
export function avoidReasons({ avoid }: Pick<Brief, "avoid">, ingredient: Ingredient): string[] {
  return avoid
    .filter(
      ({ ingredient: id, hazard }) =>
        ingredient.id === id || (hazard !== undefined && carries(ingredient, hazard)),
    )
    .map(({ reason }) => reason);
}

function carries({ hazards }: Ingredient, code: string): boolean {
  return (hazards ?? []).some((statement) => statement.code.startsWith(code));
}
