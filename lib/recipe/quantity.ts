// Quantities at the door: people write "450 cP" or "77 °F", mathjs reads them once, and inside there are only numbers in the
// unit a field's name ends in.

import type { Unit } from "mathjs";
// The same package in one file: loading its thousand modules takes a second, and every program of this library waits for it.
import mathjs from "mathjs/lib/browser/math.js";
import { InputError, nearestName, show } from "../door.js";
import { fieldUnits, unitEndingOf, type FieldUnit } from "./units.js";

/**
 * Reads a quantity written by a person into the unit the field's name ends in.
 *
 * A number is taken to be in that unit already; text must carry a unit of the same kind.
 * @param input - `field` such as `viscosity_mPas`, `given` a number or text such as `"450 cP"`, `where` for the message.
 * @throws InputError when the text has no unit, an unknown one, or one of another kind; when the number is not finite.
 * @example
 * ```ts
 * import { readQuantity } from "resinwright";
 * readQuantity({ where: "brief", field: "viscosity_mPas", given: "450 cP" }); // → 450
 * readQuantity({ where: "brief", field: "temperature_C", given: "77 °F" }); // → 25
 * readQuantity({ where: "brief", field: "irradiance_mWcm2", given: "25 W/m^2" }); // → 2.5
 * ```
 */
export function readQuantity({
  where,
  field,
  given,
}: {
  where: string;
  field: string;
  given: unknown;
}): number {
  try {
    return toFieldUnit(field, given);
  } catch (error) {
    if (error instanceof InputError) throw new InputError(`${where}: ${field} ${error.message}`);
    throw error;
  }
}

/** As {@link readQuantity}, with a message that begins at "is ...": for callers that name the place themselves. */
export function toFieldUnit(field: string, given: unknown): number {
  const unit = fieldUnits[unitEndingOf(field) ?? ""];
  if (typeof given === "number" && Number.isFinite(given)) return given;
  if (typeof given !== "string" || unit === undefined) {
    const allowed =
      unit === undefined ? "a finite number" : `a finite number of ${unit.label} or text with a unit`;
    throw new InputError(`is ${show(given)}; it must be ${allowed}`);
  }
  const read = parseUnit(given, unit);
  const value = read.equalBase(units().unit(1, unit.mathjs)) ? read.toNumber(unit.mathjs) : NaN;
  if (!Number.isFinite(value)) {
    throw new InputError(`is ${show(given)}; it must be a quantity that converts to ${unit.label}`);
  }
  // Conversions such as °F to °C leave rounding noise of a few 1e-14; people write at most 12 digits.
  return Number(value.toPrecision(12));
}

let made: ReturnType<typeof mathjs.create> | undefined;

/** Made when the first text with a unit is read: files that hold numbers only never wait for it. */
function units() {
  if (made !== undefined) return made;
  made = mathjs.create();
  made.createUnit({
    cP: { definition: "1 mPa s", aliases: ["centipoise"] },
    poise: { definition: "100 mPa s" },
  });
  // Stern 1968 (from memory): 1 barrer = 1e-10 cm³(STP) cm cm⁻² s⁻¹ cmHg⁻¹, here as an amount of substance.
  made.createUnit("barrer", "3.346402e-16 mol m^-1 s^-1 Pa^-1");
  made.createUnit("percent");
  return made;
}

function parseUnit(given: string, wanted: FieldUnit): Unit {
  const text = given
    .trim()
    .replace(/[µμ]/g, "u")
    .replace(/°\s*(?=[CFK]\b)/g, "deg")
    .replace(/%/g, "percent")
    .replace(/[·⋅]/g, " ")
    .replace(/²/g, "^2")
    .replace(/³/g, "^3");
  if (/^[-+]?[\d.]+(e[-+]?\d+)?$/i.test(text)) {
    throw new InputError(`is ${show(given)} without a unit; write for instance "${text} ${wanted.label}"`);
  }
  const [comma, digits] = /^[-+]?\d+,(\d+)/.exec(text) ?? [];
  if (comma !== undefined) {
    const point = `"${given.trim().replace(",", ".")}"`;
    const or = digits!.length === 3 ? ` or "${given.trim().replace(",", "")}", whichever is meant` : "";
    throw new InputError(
      `is ${show(given)}, with a comma in the number; write ${point}${or}: the decimal mark is a point, and thousands have none`,
    );
  }
  try {
    return units().unit(text);
  } catch {
    const word = /[a-z]+/i.exec(text.replace(/^[-+\d.e\s]+/i, ""))?.[0] ?? "";
    const near = nearestName(word, unitWords);
    const hint =
      near === undefined || near === word
        ? `write for instance "1 ${wanted.label}"`
        : `did you mean "${near}"?`;
    throw new InputError(`is ${show(given)}, which cannot be read as a quantity; ${hint}`);
  }
}

const unitWords = [
  "mPa",
  "Pa",
  "cP",
  "poise",
  "mW",
  "mJ",
  "nm",
  "um",
  "mm",
  "cm",
  "degC",
  "degF",
  "barrer",
  "mol",
];
