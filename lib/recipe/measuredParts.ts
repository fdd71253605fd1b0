// The resin that something was measured on, part by part, as measurement files state it.

import { z } from "zod";
import { InputError } from "../door.js";
import { quantity, strict } from "./document.js";
import { idSchema } from "./sourced.js";

/** What was in the bottle, in mass percent. */
export type MeasuredParts = readonly { readonly ingredient: string; readonly mass_pct: number }[];

/** @internal */
export const measuredPartsSchema = z
  .array(strict({ ingredient: idSchema, mass_pct: quantity("mass_pct", { above: 0, max: 100 }) }))
  .min(2);

/** @throws InputError when the parts do not add up to 100 ± 0.05. @internal */
export function checkMeasuredParts(where: string, parts: MeasuredParts): void {
  const total = parts.reduce((sum, { mass_pct }) => sum + mass_pct, 0);
  if (Math.abs(total - 100) <= 0.05) return;
  throw new InputError(
    `${where}: mass_pct of parts adds up to ${Number(total.toPrecision(8))}; it must add up to 100 ± 0.05`,
  );
}
