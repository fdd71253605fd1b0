// Tables as text: columns aligned, long cells wrapped, no wider than the terminal unless a single word is.

import type { TableContent } from "../notebook/content.js";
import { cellText } from "../notebook/digits.js";

const gap = 2;
/** A cell no longer than this is not broken while there is room. */
const shortCell = 20;
/** A word longer than this is broken. */
const longWord = 30;

/** A table under its caption, with a line between heading and rows. */
export function tableText({ caption, columns, rows }: TableContent, width: number): string {
  const head = columns.map(({ name, unit }) => (unit === undefined ? name : `${name} (${unit})`));
  const cells = [head, ...rows.map((row) => row.map(cellText))];
  const [first, ...others] = rowTexts({ cells, aligns: columns.map(({ align }) => align), width });
  const rule = "─".repeat(longest([first!, ...others].flat()));
  return lines([wrapped(caption, width), first!, [rule], ...others]);
}

/** Names with what they mean, indented. */
export function listText(pairs: readonly (readonly [string, string])[], width: number): string {
  const cells = pairs.map(([name, meaning]) => [name, meaning]);
  const rows = rowTexts({ cells, aligns: ["left", "left"], width: width - gap });
  return lines(rows.map((row) => row.map((line) => " ".repeat(gap) + line)));
}

/** A paragraph broken at `width`. */
export function paragraph(text: string, width: number): string {
  return lines([wrapped(text, width)]);
}

function lines(blocks: readonly (readonly string[])[]): string {
  return blocks
    .flat()
    .map((line) => `${line}\n`)
    .join("");
}

interface Cells {
  readonly cells: readonly (readonly string[])[];
  readonly aligns: readonly ("left" | "right")[];
  readonly width: number;
}

/** The lines of each row. */
function rowTexts({ cells, aligns, width }: Cells): string[][] {
  const clean = cells.map((row) => row.map(oneLine));
  const widths = columnWidths(clean, width);
  return clean.map((row) => {
    const broken = row.map((cell, i) => wrapped(cell, widths[i]!));
    const height = broken.reduce((most, cell) => Math.max(most, cell.length), 0);
    return Array.from({ length: height }, (_, k) =>
      broken
        .map((cell, i) => {
          const text = cell[k] ?? "";
          return aligns[i] === "right" ? text.padStart(widths[i]!) : text.padEnd(widths[i]!);
        })
        .join(" ".repeat(gap))
        .trimEnd(),
    );
  });
}

/**
 * As wide as the longest cell; where that is too much, each column keeps its short cells or its longest word whole, and what room
 * is left goes to those that have more to say.
 */
function columnWidths(cells: readonly (readonly string[])[], width: number): number[] {
  const columns = cells[0]!.map((_, i) => cells.map((row) => row[i]!));
  const natural = columns.map(longest);
  const room = width - gap * (columns.length - 1);
  if (sum(natural) <= room) return natural;
  const words = columns.map((column) =>
    Math.min(longWord, longest(column.flatMap((cell) => cell.split(" ")))),
  );
  const kept = natural.map((one, i) => (one <= shortCell ? one : words[i]!));
  const least = sum(kept) <= room ? kept : words;
  const wanted = natural.map((one, i) => Math.min(one, room) - least[i]!);
  const given = Math.max(0, room - sum(least)) / Math.max(1, sum(wanted));
  return least.map((one, i) => one + Math.floor(wanted[i]! * Math.min(1, given)));
}

function longest(texts: readonly string[]): number {
  return texts.reduce((length, text) => Math.max(length, text.length), 0);
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}

/** Breaks at spaces, and inside a word only where it does not fit at all. */
function wrapped(text: string, room: number): string[] {
  const width = Math.max(1, room);
  const done: string[] = [];
  let line = "";
  for (let word of oneLine(text).split(" ")) {
    if (line !== "" && line.length + 1 + word.length <= width) {
      line += ` ${word}`;
      continue;
    }
    if (line !== "") done.push(line);
    for (; word.length > width; word = word.slice(width)) done.push(word.slice(0, width));
    line = word;
  }
  return [...done, line];
}

/** What a file says must not move the cursor. */
function oneLine(text: string): string {
  return text.replace(/[\s\p{Cc}]+/gu, " ").trim();
}
