// Batches that came back from the bench, from the folders of a shelf.

import { dirname, join } from "node:path";
import { InputError } from "../../door.js";
import type { DrawOptions } from "../../assess/doubt.js";
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
 * @throws InputError with file, line and field of whatever cannot be used; when two files share an id; as {@link weighingsOn},
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
  const weighed = newestOf(
    brief.shelf.map((folder) => join(dirname(file), folder)),
    formulation.id,
  );
  if (weighed === undefined) return undefined;
  const { batch_g, balance, accuracy, weighingAccuracy } = weighed;
  const sheet = weighOut({ formulation, batch_g, balance, accuracy, weighingAccuracy });
  const weighings = weighingsOn({ sheet, weighed });
  return {
    weighed,
    sheet,
    made: asMade({ sheet, weighings, work: { brief, shelf }, ...options }),
    plan: rescue({ sheet, weighings }),
  };
}

function newestOf(folders: readonly string[], formulation: string): WeighedBatch | undefined {
  const found = new Map<string, WeighedBatch>();
  for (const document of folders.flatMap((folder) => documentsIn(folder, join("measurements", "batches")))) {
    const one = readWeighedBatch(document);
    if (found.has(one.id)) {
      throw new InputError(
        `${document.where}: batch "${one.id}" stands in another file too; a bottle has one name, rename one of them`,
      );
    }
    found.set(one.id, one);
  }
  return [...found.values()].findLast((one) => one.formulation === formulation);
}
