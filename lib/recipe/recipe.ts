// The file of a formulation: what it may hold, and how it is read.

import { z } from "zod";
import { quantity, readDocument, strict, type JsonDocument } from "./document.js";
import type { Recipe } from "./formulation.js";
import { idSchema } from "./sourced.js";

/**
 * Reads a formulation file.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readRecipe } from "resinwright";
 * const parts = [{ ingredient: "UDMA", mass_pct: 65 }, { ingredient: "IBOA", mass_pct: 35 }];
 * const recipe = readRecipe(parseJson(JSON.stringify({ id: "two", title: "oligomer and diluent", parts }), "two.json"));
 * recipe.normalise; // → false
 * ```
 */
export function readRecipe(document: JsonDocument): Recipe {
  return readDocument(recipeSchema, document);
}

const recipeSchema: z.ZodType<Recipe> = strict({
  id: idSchema,
  title: z.string().min(3),
  normalise: z.boolean().default(false),
  parts: z
    .array(
      strict({
        ingredient: idSchema.optional(),
        lot: idSchema.optional(),
        blend: z.string().optional(),
        mass_pct: quantity("mass_pct", { min: 0 }),
      }),
    )
    .min(1),
}) as unknown as z.ZodType<Recipe>;
