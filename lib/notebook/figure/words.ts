// The words of figures: axis titles, quantities with their units, and text made safe for plotly's own markup.

import { InputError, show } from "../../door.js";
import { numberText } from "../digits.js";
import type { PlotAxis } from "./axis.js";

/** An axis title: `"viscosity (mPa s)"`, or the label alone for a quantity without unit. */
export function titleOf({ label, unit = "" }: { label: string; unit?: string }): string {
  return unit === "" ? label : `${label} (${unit})`;
}

/** A number to four significant digits with its unit: `"412.5 mPa s"`. */
export function quantityText(value: number, unit = ""): string {
  return unit === "" ? numberText(value) : `${numberText(value)} ${unit}`;
}

/** An axis in words: `"viscosity (mPa s, 200 to 1500, logarithmic)"`. */
export function axisText({ label, unit, logarithmic, range: [low, high] }: PlotAxis): string {
  const parts = [unit, `${numberText(low, 3)} to ${numberText(high, 3)}`, logarithmic ? "logarithmic" : ""];
  return `${label} (${parts.filter((part) => part !== "").join(", ")})`;
}

/** `"200 to 900 mPa s"`, or the one quantity where both ends are the same. */
export function spanText([low, high]: readonly [number, number], unit = ""): string {
  return low === high ? quantityText(low, unit) : `${numberText(low)} to ${quantityText(high, unit)}`;
}

/** A window in words: `"200 to 900 mPa s"`, `"at least 200 mPa s"`, `"at most 900 mPa s"`. */
export function windowText(
  { from, to }: { from?: number | undefined; to?: number | undefined },
  unit = "",
): string {
  if (from === undefined) return `at most ${quantityText(to!, unit)}`;
  if (to === undefined) return `at least ${quantityText(from, unit)}`;
  return spanText([from, to], unit);
}

/** `"95 % interval"` for 0.95. */
export function levelText(level: number): string {
  return `${numberText(100 * level)} % interval`;
}

/** The line under a figure: what it shows, then formulation and conditions. */
export function captionOf({ caption, conditions }: { caption: string; conditions: string }): string {
  return [caption, conditions].map(sentence).join(" ");
}

/** Refuses a figure without caption or conditions; returns the place its other messages begin with. */
export function checkCaption(maker: string, figure: { caption: string; conditions: string }): string {
  for (const field of ["caption", "conditions"] as const) {
    const text: unknown = figure[field];
    if (typeof text === "string" && text.trim() !== "") continue;
    const advice =
      field === "caption" ? "say what the figure shows" : "say the formulation and the conditions";
    throw new InputError(`${maker}: ${field} is ${show(text)}; ${advice}`);
  }
  return `${maker} "${figure.caption}"`;
}

/** `text` with a full stop, unless it ends in one already. */
export function sentence(text: string): string {
  return /[.!?]$/.test(text.trim()) ? text.trim() : `${text.trim()}.`;
}

/** `"1 point"`, `"3 points"`. */
export function counted(count: number, noun: string): string {
  return `${count} ${noun}${count === 1 ? "" : "s"}`;
}

/** Text as plotly shows it letter by letter: its tags, its formulas and its `%{...}` places are switched off. */
export function plainText(text: string): string {
  return text.replace(/[&<>%$]/g, (sign) => `&#${sign.codePointAt(0)};`);
}

/** `text` as plotly shows it, broken into lines of at most `width` characters where its words allow. */
export function wrapped(text: string, width: number): string {
  const lines: string[] = [];
  for (const word of text.split(" ")) {
    const line = lines.at(-1);
    if (line !== undefined && line.length + 1 + word.length <= width)
      lines[lines.length - 1] = `${line} ${word}`;
    else lines.push(word);
  }
  return lines.map(plainText).join("<br>");
}

/** What plotly shows beside a point: a bold heading and its lines. */
export function hoverBox(heading: string, lines: readonly string[]): string {
  return `${[`<b>${plainText(heading)}</b>`, ...lines].join("<br>")}<extra></extra>`;
}

/** One line of a hover box, "viscosity: 412.5 mPa s", with plotly's `variable` (such as `y`) to four digits. */
export function hoverLine(
  { label, unit = "" }: { label: string; unit?: string },
  variable: string,
  values: readonly number[],
): string {
  return `${plainText(label)}: %{${variable}:${hoverFormat(values)}} ${plainText(unit)}`.trimEnd();
}

/** How plotly writes numbers of this size to four significant digits, as a d3 format. */
export function hoverFormat(values: readonly number[]): string {
  const sizes = values.filter((value) => value !== 0).map(Math.abs);
  return sizes.every((size) => size >= 1e-3 && size < 1e6) ? ".4~r" : ".3~e";
}
