// Reads a file of the NIST Statistical Reference Datasets for nonlinear regression (test/reference/strd/*.dat).
import { readFileSync } from "node:fs";

export interface StrdNonlinear {
  /** The responses, and the predictor of each. */
  readonly y: readonly number[];
  readonly x: readonly number[];
  readonly starts: readonly [readonly number[], readonly number[]];
  readonly parameters: readonly number[];
  readonly standardErrors: readonly number[];
  readonly residualStandardDeviation: number;
  readonly sumOfSquares: number;
}

export function readStrdNonlinear(name: string): StrdNonlinear {
  const text = readFileSync(new URL(`../reference/strd/${name}.dat`, import.meta.url), "utf8");
  const lines = text.split(/\r?\n/);
  const [, first, last] = /Data\s+\(lines\s+(\d+)\s+to\s+(\d+)\)/.exec(text)!.map(Number);
  const rows = lines.slice(first! - 1, last).map((line) => line.trim().split(/\s+/).map(Number));
  const table = lines
    .map((line) => /^\s+b\d+\s+=((?:\s+\S+){4})\s*$/.exec(line)?.[1])
    .filter((cells) => cells !== undefined)
    .map((cells) => cells.trim().split(/\s+/).map(Number));
  const column = (k: number): number[] => table.map((row) => row[k]!);
  const figure = (label: string): number => Number(new RegExp(`${label}:\\s+(\\S+)`).exec(text)![1]);
  return {
    y: rows.map(([y]) => y!),
    x: rows.map(([, x]) => x!),
    starts: [column(0), column(1)],
    parameters: column(2),
    standardErrors: column(3),
    residualStandardDeviation: figure("Residual Standard Deviation"),
    sumOfSquares: figure("Residual Sum of Squares"),
  };
}
