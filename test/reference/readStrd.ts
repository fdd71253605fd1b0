// Reads a file of the NIST Statistical Reference Datasets for linear regression (test/reference/strd/*.dat).
import { readFileSync } from "node:fs";

export interface StrdLinear {
  /** Rows of numbers as listed: the response first, then the predictors. */
  readonly rows: readonly (readonly number[])[];
  readonly estimates: readonly number[];
  readonly standardErrors: readonly number[];
  readonly residualStandardDeviation: number;
}

export function readStrd(name: string): StrdLinear {
  const text = readFileSync(new URL(`strd/${name}.dat`, import.meta.url), "utf8");
  const lines = text.split(/\r?\n/);
  const [, first, last] = /Data\s+\(lines\s+(\d+)\s+to\s+(\d+)\)/.exec(text)!.map(Number);
  const numbers = (line: string): number[] => line.trim().split(/\s+/).map(Number);
  const parameters = lines
    .filter((line) => /^\s+B\d+\s+\S+\s+\S+\s*$/.test(line))
    .map((line) => numbers(line).slice(1));
  const deviation = /Residual\s+Standard Deviation\s+(\S+)/.exec(text)!;
  return {
    rows: lines.slice(first! - 1, last).map(numbers),
    estimates: parameters.map(([estimate]) => estimate!),
    standardErrors: parameters.map(([, error]) => error!),
    residualStandardDeviation: Number(deviation[1]),
  };
}
