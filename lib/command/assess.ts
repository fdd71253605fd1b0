// `resinwright assess`: every property of a formulation under a brief, with a verdict for each target.

import { resolve } from "node:path";
import { assess, type Assessment } from "../assess/assess.js";
import type { Case } from "../assess/case.js";
import { measuredFor } from "../assess/measuredCurve.js";
import { calibrate } from "../decide/calibrate.js";
import { InputError, show } from "../door.js";
import { dataHashOf } from "../lab/dataHash.js";
import { libraryVersion } from "../lab/record/version.js";
import { tableOf } from "../notebook/table.js";
import { assessmentTable, sourceTable, warningTable } from "../notebook/views.js";
import { printTemperatures_C } from "../recipe/brief.js";
import { readWorkbench, type Workbench } from "../recipe/files.js";
import type { Given, Run } from "./act.js";
import { caution } from "./caution.js";
import { jsonText } from "./jsonText.js";
import { quantityOf } from "./quantity.js";
import { paragraph, tableText } from "./textTable.js";

/** What `--json` prints beside `format`, "resinwright assessment 1". */
export interface AssessDocument extends Assessment {
  readonly libraryVersion: string;
  /** {@link dataHashOf} the case as calibrated. */
  readonly dataHash: string;
  readonly temperature_C: number;
  /** Ids of the readings that stand behind it: blends of its liquids, cure depths, readings on the window. */
  readonly calibratedBy: readonly string[];
}

export const run: Run = (given, { folder, width, print }) => {
  const draws = drawsOf(given);
  const opened = caseOf(given, folder);
  const work = calibrate(opened);
  const document: AssessDocument = {
    libraryVersion: libraryVersion(),
    dataHash: dataHashOf(work),
    temperature_C: work.brief.temperature_C,
    calibratedBy: readingsBehind(work),
    ...assess({ ...work, ...(draws === undefined ? {} : { draws }) }),
  };
  const text = given.isOn("json")
    ? jsonText("resinwright assessment 1", document)
    : assessText(document, width);
  print(text.trimEnd());
  const fails = document.verdicts.some(({ outcome }) => outcome === "fails");
  return fails || document.avoided.length > 0 ? 1 : 0;
};

function readingsBehind(work: Case): string[] {
  const ids = new Set(work.formulation.components.map(({ ingredient }) => ingredient.id));
  const { readings } = work.shelf;
  return [
    ...readings.flatMap(({ id, pair }) => (pair.some((one) => ids.has(one)) ? [id] : [])),
    ...[measuredFor(work)?.curve.series.id, work.oxygenCorrection?.readings.id].filter(
      (id) => id !== undefined,
    ),
  ];
}

function caseOf({ operand, text }: Given, folder: string): Workbench {
  const { formulation: file, temperature } = text;
  const work = readWorkbench(
    resolve(folder, operand!),
    file === undefined ? undefined : resolve(folder, file),
  );
  if (temperature === undefined) return work;
  const temperature_C = quantityOf({
    act: "assess",
    option: "temperature",
    field: "temperature_C",
    given: temperature,
    ...printTemperatures_C,
  });
  return { ...work, brief: { ...work.brief, temperature_C } };
}

function drawsOf({ text: { draws } }: Given): number | undefined {
  if (draws === undefined || /^\d+$/.test(draws)) return draws === undefined ? undefined : Number(draws);
  throw new InputError(`assess: --draws is ${show(draws)}; it must be a whole number; 2000 is usual`);
}

/** The document as a chemist reads it. */
export function assessText(document: AssessDocument, width: number): string {
  const { avoided, calibratedBy, temperature_C, dataHash, seed } = document;
  const tables = [
    assessmentTable(document),
    ...(avoided.length === 0 ? [] : [tableOf({ caption: "The brief avoids what is in it", rows: avoided })]),
    warningTable(document),
    { ...sourceTable(document.sources), caption: "Sources of the figures used" },
  ];
  const corrected = calibratedBy.length === 0 ? "no readings" : `the readings ${calibratedBy.join(", ")}`;
  const made = `Resin at ${temperature_C} °C, corrected by ${corrected}. Computed by resinwright ${document.libraryVersion} from the data ${dataHash.slice(0, 12)}, seed ${seed}.`;
  return [
    ...tables.map((table) => tableText(table, width)),
    paragraph(made, width),
    paragraph(caution, width),
  ].join("\n");
}
