// Records of every kind for the tests; the figures are made up.

import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach } from "vitest";
import type { DecisionRecord, NewRecord } from "../../../lib/lab/record.js";

/** A new empty folder for each test; its path is in `folder.path`. */
export function freshFolder(): { path: string } {
  const folder = { path: "" };
  beforeEach(() => {
    folder.path = mkdtempSync(join(tmpdir(), "records-"));
  });
  afterEach(() => rmSync(folder.path, { recursive: true, force: true }));
  return folder;
}

export function decision(statement: string, figures = {}): DecisionRecord {
  return { kind: "decision", from: "02", brief: "b", formulation: "f", statement, figures };
}

const about = { from: "bench 2", statement: "As usual.", formulation: "f" };
const lines = [
  { ingredient: "THIN", lot: "T-7", target_g: 60, actual_g: 60.02 },
  { ingredient: "THICK", lot: "", target_g: 40, actual_g: 39.99 },
];

/** One record of each kind that amends nothing. */
export const oneOfEach: readonly NewRecord[] = [
  {
    ...about,
    kind: "recipe",
    parts: [
      { ingredient: "THIN", massFraction: 0.6 },
      { ingredient: "THICK", lot: "K-1", massFraction: 0.4 },
    ],
  },
  { ...about, kind: "batch", batch: "B-1", lines },
  {
    ...about,
    kind: "measurement",
    batch: "B-1",
    quantity: "viscosity_mPas",
    repeats: [301, 299, 300.5],
    instrument: "cone and plate",
    conditions: { temperature_C: 25 },
  },
  {
    ...about,
    kind: "print",
    outcome: "printed with faults",
    conditions: { layerThickness_um: 50, film: "PDMS" },
    figures: { adhesionFailures_pct: 10 },
  },
  decision("Sixty to forty.", { share: 0.6 }),
];
