// Batches that came back from the bench, from the folders of a shelf.

import { dirname, join, resolve } from "node:path";
import { InputError, unknownName } from "../../door.js";
import type { DrawOptions } from "../../assess/doubt.js";
import { placeOf } from "../../recipe/document.js";
import { documentsIn, type Workbench } from "../../recipe/files.js";
import { asMade, type AsMade } from "./asMade.js";
import { rescue, type Rescue } from "./rescue.js";
import { weighOut, type WeighOutSheet } from "./weighOut.js";
import { readWeighedBatch, weighingsOn, type WeighedBatch } from "./weighedBatch.js";

/** A batch that came back: its file, the sheet it was weighed by, what was made of it, and what would put it right. */
export interface ReturnedBatch {
  readonly weighed: WeighedBatch;
  readonly sheet: WeighOutSheet;
  readonly made: AsMade;
  readonly plan: Rescue;
}

/**
 * The newest weighed batch of a brief's formulation, assessed: from `measurements/batches/` of its shelf folders the last by file
 * name in the last folder that holds one; undefined where none does.
 * @param work - A brief with its formulation, shelf and file; draw options.
 * @throws InputError with file, line and field of whatever cannot be used; when two files share an id; when a batch is of a
 * formulation that is neither this one nor in `formulations/` of a shelf folder; as {@link weighingsOn},
 * {@link asMade} and {@link rescue}.
 * @example
 * ```ts
 * import { openBatch, openBrief } from "resinwright/files";
 * const batch = openBatch({ ...openBrief("data/briefs/flow-cell.json"), draws: 200 })!;
 * batch.weighed.id; // → "flow-cell-a-1"
 * batch.made.total_g; // → 508.06
 * batch.plan.outcome; // → "add"
 * ```
 */
export function openBatch({
  brief,
  formulation,
  shelf,
  file,
  ...options
}: Workbench & DrawOptions): ReturnedBatch | undefined {
  const folders = brief.shelf.map((folder) => resolve(dirname(file), folder));
  const newest = newestOf(folders, formulation.id);
  if (newest === undefined) return undefined;
  const { weighed, where } = newest;
  const { batch_g, balance, accuracy, weighingAccuracy } = weighed;
  try {
    const sheet = weighOut({ formulation, batch_g, balance, accuracy, weighingAccuracy });
    const weighings = weighingsOn({ sheet, weighed });
    return {
      weighed,
      sheet,
      made: asMade({ sheet, weighings, work: { brief, shelf }, ...options }),
      plan: rescue({ sheet, weighings }),
    };
  } catch (error) {
    throw error instanceof InputError
      ? new InputError(`${where}: ${error.message}`, { cause: error })
      : error;
  }
}

function newestOf(folders: readonly string[], formulation: string) {
  const found = new Map<string, { weighed: WeighedBatch; where: string }>();
  const documents = folders.flatMap((folder) => documentsIn(folder, join("measurements", "batches")));
  const known = new Set([formulation, ...folders.flatMap(formulationsIn)]);
  for (const document of documents) {
    const weighed = readWeighedBatch(document);
    const { where } = document;
    const twin = found.get(weighed.id);
    if (twin !== undefined) {
      throw new InputError(
        `${where}: batch "${weighed.id}" stands in ${twin.where} too; a bottle has one name, rename one of them`,
      );
    }
    if (!known.has(weighed.formulation)) {
      const place = placeOf(document, ["formulation"]);
      throw new InputError(
        `${unknownName(place, "formulation", weighed.formulation, [...known])} (the formulation's file belongs into formulations/ of a shelf folder)`,
      );
    }
    found.set(weighed.id, { weighed, where });
  }
  return [...found.values()].findLast((one) => one.weighed.formulation === formulation);
}

/** Ids of the formulations that lie beside the measurements of a shelf folder. */
function formulationsIn(folder: string): string[] {
  return documentsIn(folder, "formulations").flatMap(({ value }) => {
    const { id } = (value ?? {}) as { id?: unknown };
    return typeof id === "string" ? [id] : [];
  });
}
