// The lab record as a frame: one row a record, one column a figure, to be selected, sorted and grouped.

import { InputError } from "../door.js";
import type { LabRecord, RecordEntry } from "../lab/record.js";
import { frameOf, type Frame } from "./table.js";

/**
 * Makes a danfo.js frame of the records of one kind, in the order given.
 *
 * Every row begins with `id` (the first twelve digits), `amendedBy` (those of the records that correct it), `at`, `from` and
 * `statement`. Then come a column a field of the kind and a column a figure: of a decision its figures; of a print its
 * conditions and figures; of a measurement its conditions, the mean of the repeats under the name of the quantity and how many
 * there were; of a batch the grams weighed, `IBOA_g`; of a recipe mass percent, `IBOA_pct`; of an amendment its corrections.
 * Corrections are not applied: look at `amendedBy`. A figure whose name is taken already has its place before it,
 * `figures.from`. A column that holds numbers and text holds text.
 * @param entries - Records as {@link listRecords} gives them.
 * @param kind - The kind of the records to take.
 * @throws InputError when there is no record of that kind.
 * @example
 * ```ts
 * import { mkdtempSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { join } from "node:path";
 * import { appendRecord, listRecords } from "resinwright/files";
 * import { recordFrame } from "resinwright/notebook";
 * const folder = mkdtempSync(join(tmpdir(), "records-"));
 * const about = { kind: "decision", from: "bench", brief: "flow-cell", formulation: "flow-cell-a" } as const;
 * appendRecord({ folder, record: { ...about, statement: "Six in ten.", figures: { share: 0.6, viscosity_mPas: 412 } } });
 * appendRecord({ folder, record: { ...about, statement: "Half and half.", figures: { share: 0.5, viscosity_mPas: 220 } } });
 * const frame = recordFrame(listRecords(folder).entries, "decision");
 * frame.query(frame.column("viscosity_mPas").lt(300)).column("share").values; // → [0.5]
 * ```
 */
export function recordFrame(entries: readonly RecordEntry[], kind: LabRecord["kind"]): Frame {
  const rows = entries.filter(({ record }) => record.kind === kind).map(rowOf);
  if (rows.length === 0) {
    const kinds = [...new Set(entries.map(({ record }) => record.kind))];
    const there = kinds.length === 0 ? "there are none at all" : `there are ${kinds.join(", ")}`;
    throw new InputError(`recordFrame: no record of the kind "${kind}" among those given; ${there}`);
  }
  return frameOf(withOneKindAColumn(rows));
}

type Cell = string | number;
type Row = Record<string, Cell>;

function rowOf({ id, amendedBy, record }: RecordEntry): Row {
  const row: Row = { id: short(id), amendedBy: amendedBy.map(short).join(" ") };
  const { at, from, statement } = record;
  Object.assign(row, { at, from, statement });
  for (const [place, figures] of Object.entries(columnsOf(record))) {
    for (const [name, value] of Object.entries(figures))
      if (value !== undefined) row[name in row ? `${place}.${name}` : name] = value;
  }
  return row;
}

/** The figures of a record by the place they stand in; those of a later place give way where names meet. */
function columnsOf(record: LabRecord): Record<string, Readonly<Record<string, Cell | undefined>>> {
  const { brief, libraryVersion } = record;
  const head = { brief, libraryVersion };
  switch (record.kind) {
    case "recipe":
      return {
        recipe: { ...head, formulation: record.formulation },
        parts: summed(
          record.parts.map(({ ingredient, massFraction }) => [`${ingredient}_pct`, 100 * massFraction]),
        ),
      };
    case "batch": {
      const { formulation, batch, dataHash } = record;
      return {
        batch: { ...head, formulation, batch, dataHash },
        lines: summed(record.lines.map(({ ingredient, actual_g }) => [`${ingredient}_g`, actual_g])),
      };
    }
    case "measurement": {
      const { formulation, batch, instrument, quantity, repeats } = record;
      const mean = repeats.reduce((sum, one) => sum + one, 0) / repeats.length;
      return {
        measurement: { ...head, formulation, batch, instrument, repeats: repeats.length },
        readings: { [quantity]: mean },
        conditions: record.conditions,
      };
    }
    case "print": {
      const { formulation, batch, outcome, conditions, figures } = record;
      return { print: { ...head, formulation, batch, outcome }, conditions, figures };
    }
    case "decision": {
      const { formulation, dataHash, figures } = record;
      return { decision: { ...head, formulation, dataHash }, figures };
    }
    case "amendment": {
      const { amends, corrections } = record;
      return { amendment: { ...head, amends: short(amends) }, corrections };
    }
  }
}

function summed(pairs: readonly [string, number][]): Record<string, number> {
  const sums: Record<string, number> = {};
  for (const [name, value] of pairs) sums[name] = (sums[name] ?? 0) + value;
  return sums;
}

/** A record stands for good, so a figure once written as text and once as a number must not keep the others out of a frame. */
function withOneKindAColumn(rows: readonly Row[]): Row[] {
  const hasText = new Set(
    rows.flatMap((row) =>
      Object.entries(row).flatMap(([name, cell]) => (typeof cell === "string" ? [name] : [])),
    ),
  );
  return rows.map((row) =>
    Object.fromEntries(
      Object.entries(row).map(([name, cell]) => [name, hasText.has(name) ? String(cell) : cell]),
    ),
  );
}

function short(id: string): string {
  return id.slice(0, 12);
}
