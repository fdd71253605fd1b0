// The resin that something was measured on, part by part, as measurement files state it.

import { z } from "zod";
import { InputError } from "../door.js";
import { placeOf, quantity, strict, type JsonDocument } from "./document.js";
import { idSchema } from "./sourced.js";

/** What was in the bottle, in mass percent. */
export type MeasuredParts = readonly { readonly ingredient: string; readonly mass_pct: number }[];

/** @internal */
export const measuredPartsSchema = z
  .array(strict({ ingredient: idSchema, mass_pct: quantity("mass_pct", { above: 0, max: 100 }) }))
  .min(2);

/** @throws InputError when the parts do not add up to 100 ± 0.05, or one ingredient stands in two of them. @internal */
export function checkMeasuredParts(document: JsonDocument, parts: MeasuredParts): void {
  parts.forEach(({ ingredient }, i) => {
    const twin = parts.findIndex((one) => one.ingredient === ingredient);
    if (twin === i) return;
    throw new InputError(
      `${placeOf(document, ["parts", i])}: ${ingredient} stands in parts[${twin}] and in parts[${i}]; add the two mass_pct up and keep one of them`,
    );
  });
  const total = parts.reduce((sum, { mass_pct }) => sum + mass_pct, 0);
  if (Math.abs(total - 100) <= 0.05) return;
  throw new InputError(
    `${placeOf(document, ["parts"])}: mass_pct adds up to ${Number(total.toPrecision(8))}; it must add up to 100 ± 0.05`,
  );
}
