// The sourced value as a data file states it: value and standard uncertainty with a unit, source, status.

import { z } from "zod";
import { sourceStatuses, type SourcedValue } from "../result.js";
import { quantity, strict } from "./document.js";
import { hazardCodeProblem } from "./hazardCodes.js";

/** A sourced value that holds at one temperature. */
export interface AtTemperature extends SourcedValue {
  readonly temperature_C: number;
}

interface Range {
  readonly above?: number;
  readonly min?: number;
  readonly max?: number;
}

/** Schema of `{ value, u, source, status }` for a field whose name ends in a unit; value and `u` may be text with a unit. */
export function sourced(field: string, range: Range = {}) {
  return strict(sourcedShape(field, range));
}

/** Schema of a sourced value with the temperature it holds at. */
export function sourcedAtTemperature(field: string, range: Range = {}) {
  return strict({
    ...sourcedShape(field, range),
    temperature_C: quantity("temperature_C", { above: -273.15 }),
  });
}

export const statusSchema = z.enum(sourceStatuses as [SourcedValue["status"], ...SourcedValue["status"][]]);
export const sourceText = z.string().min(3);

/** A name that files and parts refer to: letters, digits, dot, hyphen. */
export const idSchema = z
  .string()
  .regex(/^[A-Za-z0-9][A-Za-z0-9.-]*$/, { error: "must be a name of letters, digits, dots and hyphens" });

/** The code of a hazard statement, such as `H317`. */
export const hazardCodeSchema = z.string().superRefine((given, context) => {
  const problem = hazardCodeProblem(given);
  if (problem !== undefined) context.addIssue({ code: "custom", message: problem });
});

function sourcedShape(field: string, range: Range) {
  const difference = field.endsWith("_C") ? field.replace(/_C$/, "_K") : field;
  return {
    value: quantity(field, range),
    u: quantity(difference, { min: 0 }),
    source: sourceText,
    status: statusSchema,
  };
}
