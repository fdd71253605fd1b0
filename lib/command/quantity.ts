// The quantities that options give, with any unit that converts.

import { checkNumber, InputError, type NumberRule } from "../door.js";
import { toFieldUnit } from "../recipe/quantity.js";

/**
 * Reads the quantity of an option into the unit that `field` ends in.
 * @throws InputError naming the option.
 */
export function quantityOf({
  act,
  option,
  field,
  given,
  ...range
}: { act: string; option: string; field: string; given: string } & Omit<
  NumberRule,
  "where" | "field"
>): number {
  try {
    return checkNumber(toFieldUnit(field, given), { where: act, field: `--${option}`, ...range });
  } catch (error) {
    if (!(error instanceof InputError)) throw error;
    if (!error.message.startsWith("is ")) throw error;
    // "35 C" is a charge, as units are read.
    const hint = / converts to °C$/.test(error.message) ? '; write it as "35 °C" or "35 degC"' : "";
    throw new InputError(`${act}: --${option} ${error.message}${hint}`);
  }
}
