// A lot of an ingredient in use: what was measured on it comes before what is typical.

import type { Ingredient, Lot } from "./ingredient.js";

/**
 * The ingredient as this lot of it was measured: measured figures in place of typical ones, and says which.
 * @example
 * ```ts
 * import { withLot, type Lot } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const measured: Lot["measured"] = {
 *   viscosity_mPas: { value: 8.6, u: 0.2, temperature_C: 25, source: "mean of three readings", status: "measured here" },
 * };
 * const iboa = withLot(readShelf(["data"]).ingredients.get("IBOA")!, { id: "L-3", ingredient: "IBOA", measured });
 * iboa.viscosity_mPas?.value; // → 8.6
 * iboa.lot; // → { id: "L-3", measured: ["viscosity_mPas"] }
 * ```
 */
export function withLot(ingredient: Ingredient, lot: Lot): Ingredient {
  return { ...ingredient, ...lot.measured, lot: { id: lot.id, measured: Object.keys(lot.measured) } };
}
