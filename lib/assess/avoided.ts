// What a brief keeps out of the bottle: an ingredient by name, or whatever carries a hazard statement.

import { InputError, unknownName } from "../door.js";
import type { Brief } from "../recipe/brief.js";
import type { Formulation } from "../recipe/formulation.js";
import { isStatement } from "../recipe/hazardCodes.js";
import type { Ingredient } from "../recipe/ingredient.js";
import type { Shelf } from "../recipe/shelf.js";
import type { Warning } from "../result.js";

/** The brief's reasons to avoid an ingredient; none where it may be used. */
export function avoidReasons({ avoid }: Pick<Brief, "avoid">, ingredient: Ingredient): string[] {
  return avoid
    .filter(
      ({ ingredient: id, hazard }) =>
        ingredient.id === id || (hazard !== undefined && carries(ingredient, hazard)),
    )
    .map(({ reason }) => reason);
}

/**
 * Refuses an ingredient to avoid that is not on the shelf: mistyped, it would be avoided nowhere.
 * @throws InputError with the nearest known name.
 */
export function checkAvoided({ id, avoid }: Pick<Brief, "id" | "avoid">, { ingredients }: Shelf): void {
  avoid.forEach(({ ingredient }, i) => {
    if (ingredient === undefined || ingredients.has(ingredient)) return;
    throw new InputError(
      unknownName(`brief "${id}": avoid[${i}].ingredient`, "ingredient", ingredient, [...ingredients.keys()]),
    );
  });
}

/** What is in the bottle without anyone having looked which statements it carries, where the brief avoids some. */
export function uncheckedWarnings({ avoid }: Pick<Brief, "avoid">, { components }: Formulation): Warning[] {
  const hazards = avoid.flatMap(({ hazard }) => hazard ?? []);
  const unchecked = components
    .filter(({ ingredient, massFraction }) => massFraction > 0 && ingredient.hazards === undefined)
    .map(({ ingredient }) => ingredient.id);
  if (hazards.length === 0 || unchecked.length === 0) return [];
  return [
    {
      code: "hazards-unchecked",
      message: `The brief avoids ${[...new Set(hazards)].join(", ")}, and nobody has checked which hazard statements ${[...new Set(unchecked)].join(", ")} carry: they may carry it. Take the statements from the safety data sheets into the ingredients' files.`,
    },
  ];
}

function carries({ hazards }: Ingredient, code: string): boolean {
  return (hazards ?? []).some((statement) => isStatement(statement.code, code));
}
