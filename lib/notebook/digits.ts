// How numbers are written where people read them: so many significant digits, and intervals rounded by their own width.

import { checkNumbers, InputError } from "../door.js";

/**
 * Writes a number with at most `digits` significant digits (1 to 15, default 4), without trailing zeros.
 *
 * Plain decimals from 0.001 up to one million, a power of ten outside; the minus is the true sign (−).
 * @throws InputError when the number is not finite.
 * @example
 * ```ts
 * import { numberText } from "resinwright/notebook";
 * numberText(447.3182); // → "447.3"
 * numberText(1.93e-9); // → "1.93 × 10⁻⁹"
 * numberText(-0.05, 2); // → "−0.05"
 * ```
 */
export function numberText(value: number, digits = 4): string {
  checkNumbers("numberText", { value, digits }, { value: {}, digits: { min: 1, max: 15 } });
  if (value === 0) return "0";
  const exponent = exponentOf(value, digits);
  const power = exponent >= 6 || exponent < -3 ? exponent : 0;
  const text = fixedText(value, power, digits - 1 - exponent + power);
  return withPower(text.includes(".") ? text.replace(/\.?0+$/, "") : text, power);
}

/**
 * Writes an interval as "value (low to high)", all three rounded to two significant digits of its half width.
 *
 * Where that would leave a value of 0 though it is none (100 in 3 to 63 000), each of the three has two digits of its own.
 * An interval of no width is written as its value with "(no spread)": no doubt was carried into it.
 * @param interval - `value`, `low` and `high` in one unit, `low` at most `high`; other fields are left alone.
 * @throws InputError when a number is not finite or `low` is above `high`.
 * @source JCGM, Evaluation of measurement data: Guide to the expression of uncertainty in measurement, JCGM 100:2008,
 *   section 7.2.6 (at most two significant digits of an uncertainty; from memory).
 * @example
 * ```ts
 * import { intervalText } from "resinwright/notebook";
 * intervalText({ value: 447.3, low: 301.2, high: 612.9 }); // → "450 (300 to 610)"
 * intervalText({ value: 1.934e-9, low: 1.71e-9, high: 2.22e-9 }); // → "1.93 (1.71 to 2.22) × 10⁻⁹"
 * ```
 */
export function intervalText(interval: { value: number; low: number; high: number }): string {
  const { value, low, high } = interval;
  checkNumbers("intervalText", { value, low, high }, { value: {}, low: {}, high: {} });
  if (low > high) {
    throw new InputError(`intervalText: low is ${low} and high is ${high}; low must be at most high`);
  }
  const halfWidth = high / 2 - low / 2;
  if (halfWidth === 0) return `${numberText(value)} (no spread)`;

  const largest = exponentOf(Math.max(Math.abs(value), Math.abs(low), Math.abs(high)), 15);
  const power = largest >= 6 || largest < -3 ? largest : 0;
  const decimals = power - (exponentOf(halfWidth, 2) - 1);
  const [v, l, h] = [value, low, high].map((x) => fixedText(x, power, decimals));
  const oneSided = low >= 0 || high <= 0;
  if (oneSided && value !== 0 && Number(v!.replace("−", "-")) === 0) {
    const [own, ...ends] = [value, low, high].map((x) => numberText(x, 2));
    return `${own} (${ends.join(" to ")})`;
  }
  return withPower(`${v} (${l} to ${h})`, power);
}

/**
 * Writes a value to be set on a machine with the two or three digits that its interval leaves it.
 * @example
 * ```ts
 * import { settingText } from "resinwright/notebook";
 * settingText({ value: 27.83, low: 7.4, high: 133 }); // → "28"
 * settingText({ value: 3.4621, low: 3.22, high: 3.71 }); // → "3.46"
 * settingText({ value: 0.4512, low: 0.05, high: 150 }); // → "0.45"
 * ```
 */
export function settingText({ value, low, high }: { value: number; low: number; high: number }): string {
  if (low === high) return numberText(value, 3);
  const digits = exponentOf(value, 15) - exponentOf(high / 2 - low / 2, 2) + 2;
  return numberText(value, Math.min(Math.max(digits, 2), 3));
}

/** A cell as people read it. Whole numbers are counts or years, and stay whole. */
export function cellText(cell: string | number | null): string {
  if (cell === null) return "–";
  if (typeof cell === "string") return cell;
  return Number.isInteger(cell) && Math.abs(cell) < 1e6 ? String(cell).replace("-", "−") : numberText(cell);
}

/** The power of ten of the first digit once `value` is rounded to `digits` digits: 2 for 99.9 at two digits. */
function exponentOf(value: number, digits: number): number {
  return Number(value.toExponential(digits - 1).split("e")[1]);
}

/** `value` over ten to the `power`, with `decimals` places; negative places round to tens, hundreds and so on. */
function fixedText(value: number, power: number, decimals: number): string {
  const scaled = shifted(value, -power);
  const rounded = decimals < 0 ? shifted(Math.round(shifted(scaled, decimals)), -decimals) : scaled;
  // Beyond 15 places a double has no digits left to show.
  return signed(rounded.toFixed(Math.min(Math.max(0, decimals), 15)));
}

/** `value` times ten to the `places`, by moving the decimal point: exact, and safe where the power itself would overflow. */
function shifted(value: number, places: number): number {
  const [mantissa, exponent] = value.toExponential().split("e");
  return Number(`${mantissa}e${Number(exponent) + places}`);
}

function signed(text: string): string {
  return Number(text) === 0 ? text.replace("-", "") : text.replace("-", "−");
}

function withPower(text: string, power: number): string {
  const raised = String(power).replace(/./g, (sign) => superscript[sign] ?? sign);
  return power === 0 ? text : `${text} × 10${raised}`;
}

const superscript: Readonly<Record<string, string>> = {
  "-": "⁻",
  0: "⁰",
  1: "¹",
  2: "²",
  3: "³",
  4: "⁴",
  5: "⁵",
  6: "⁶",
  7: "⁷",
  8: "⁸",
  9: "⁹",
};
