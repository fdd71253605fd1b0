// Reads a published table of this folder: lines that start with # say where it comes from, then a header, then numbers.
import { readFileSync } from "node:fs";

export type Table = Readonly<Record<string, readonly number[]>>;

/** The columns of a table by name, for example `readTable("viscosity/benzene__methyl-acrylate.csv")`. */
export function readTable(path: string): Table {
  const text = readFileSync(new URL(path, import.meta.url), "utf8");
  const [header, ...rows] = text.split(/\r?\n/).filter((line) => line !== "" && !line.startsWith("#"));
  const cells = rows.map((row) => row.split(",").map(Number));
  return Object.fromEntries(header!.split(",").map((name, j) => [name, cells.map((row) => row[j]!)]));
}

/** The blocks of rows of a file without headers, each block under its own # line. */
export function readBlocks(path: string): number[][][] {
  const text = readFileSync(new URL(path, import.meta.url), "utf8");
  const blocks = text.split(/^#.*\r?\n/m).filter((block) => block.trim() !== "");
  return blocks.map((block) =>
    block
      .trim()
      .split(/\r?\n/)
      .map((row) => row.split(",").map(Number)),
  );
}
