// The program behind `npm start`: runs all notebooks with one brief and leaves their pages in rendered/.
// Pages are written only once every notebook has passed and been rendered, so that no half-made set is ever seen.

import { existsSync, mkdirSync, renameSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { assess } from "../assess/assess.js";
import { calibrate } from "../decide/calibrate.js";
import { InputError } from "../door.js";
import { openBatch } from "../lab/batch/files.js";
import type { Brief } from "../recipe/brief.js";
import { readWorkbench } from "../recipe/files.js";
import type { Call, Telling } from "./call.js";
import { notebooksIn, type CodeCell, type MarkdownCell, type Notebook, type Output } from "./notebookFile.js";
import { originOf } from "./origin.js";
import { renderIndex, renderNotebook, renderSheet } from "./render.js";
import { runNotebooks, type NotebookRun, type Progress } from "./run.js";

/** Enough for every interval: here only what is refused counts. */
const FEWEST_DRAWS = 40;

const defaultBrief = path.join("data", "briefs", "flow-cell.json");

/**
 * Runs the notebooks of the workbench in `folder` with the brief named first in `words`, and writes their pages.
 * Returns the exit code: 0 done, 1 a notebook failed, 2 there was nothing to start with.
 */
export async function start(given: Omit<Call, "environment">): Promise<0 | 1 | 2> {
  const [brief = defaultBrief, ...others] = given.words;
  if (others.length > 0) {
    given.printError(
      `npm start: ${given.words.length} arguments given; it must be one brief; name one file after --`,
    );
    return 2;
  }
  return renderAll({ ...given, brief });
}

/**
 * Runs `notebooks`, or else all in `folder`, with a brief, and writes their pages into the folder `to`; paths are taken from `folder`.
 * Returns the exit code as {@link start}.
 */
export async function renderAll(
  given: Telling & {
    readonly folder: string;
    readonly brief: string;
    readonly notebooks?: readonly string[];
    readonly to?: string;
  },
): Promise<0 | 1 | 2> {
  const { folder, print, printError } = given;
  const file = path.resolve(folder, given.brief);
  let task: { brief: Brief; files: string[] };
  try {
    // Read with its formulation and its shelf, so that a mistake in any of their files is told before a notebook runs: the batch and what follows from the readings, too, since a notebook that fails leaves what others have recorded.
    const work = readWorkbench(file);
    const { brief } = work;
    const calibrated = calibrate(work);
    assess({ ...calibrated, draws: FEWEST_DRAWS });
    openBatch({ ...calibrated, draws: FEWEST_DRAWS });
    task = {
      brief,
      files: given.notebooks === undefined ? notebooksIn(folder) : named(given.notebooks, folder),
    };
  } catch (error) {
    printError(messageOf(error));
    return 2;
  }
  const { brief, files } = task;
  const records = path.resolve(folder, process.env["RESINWRIGHT_RECORDS"] || "records");
  try {
    const runs = await runNotebooks({
      files,
      environment: { RESINWRIGHT_BRIEF: file, RESINWRIGHT_RECORDS: records },
      onProgress: (progress) => print(progressLine(progress)),
    });
    const failures = runs.flatMap((run) => (run.outcome === "failed" ? [run.failure.message] : []));
    if (failures.length > 0) throw new Error(failures.join("\n"));
    const home = path.resolve(folder, given.to ?? "rendered");
    const written = writePages(home, pagesOf(runs, brief, { file, records, folder }));
    print(["Pages:", ...written.map((file) => `  ${path.relative(folder, file)}`)].join("\n"));
    return 0;
  } catch (error) {
    printError(messageOf(error).replaceAll(folder + path.sep, ""));
    return 1;
  }
}

/** The files of notebooks named one by one; each leaves a page of its own. */
function named(notebooks: readonly string[], folder: string): string[] {
  const pages = new Set(["index"]);
  return notebooks.map((name) => {
    const file = path.resolve(folder, name);
    if (!name.endsWith(".ipynb") || !existsSync(file))
      throw new InputError(`${name}: is no notebook that can be read; name an .ipynb file`);
    const page = path.basename(name, ".ipynb");
    if (pages.has(page))
      throw new InputError(
        `${name}: there would be two pages ${page}.html; rename the notebook or leave it out`,
      );
    pages.add(page);
    return file;
  });
}

function progressLine({ file, cell, cells, elapsed_s }: Progress): string {
  const where = cell > cells ? "done" : `cell ${cell} of ${cells}`;
  return `${path.basename(file, ".ipynb")}  ${where}  ${elapsed_s.toFixed(1)} s`;
}

/** Paths of this machine: the brief's file, the records, the workbench. */
interface Places {
  readonly file: string;
  readonly records: string;
  readonly folder: string;
}

/**
 * The pages by file name, sheets after the notebooks, with the index last.
 * @throws InputError when two sheets would have one name.
 */
function pagesOf(runs: readonly NotebookRun[], brief: Brief, places: Places): Map<string, string> {
  const origin = originOf(places.file);
  const notebooks = runs.flatMap((run) => (run.outcome === "passed" ? [run.notebook] : []));
  const pages = notebooks.map((notebook) => ({
    file: `${path.basename(notebook.file, ".ipynb")}.html`,
    ...renderNotebook({ notebook: withoutPaths(notebook, places), origin }),
  }));
  const sheets = pages.flatMap((page) => page.sheets);
  const names = sheets.map(({ name }) => name);
  const twice = names.find((name, i) => names.indexOf(name) !== i);
  if (twice !== undefined)
    throw new InputError(`two sheets are named "${twice}"; give one of them another name in showSheet`);
  return new Map([
    ...pages.map(({ file, html }) => [file, html] as const),
    ...sheets.flatMap((content) => [...renderSheet({ content, origin })]),
    ["index.html", renderIndex({ pages, origin, title: brief.title, introduction: brief.scenario })],
  ]);
}

// Where this machine keeps its files is nothing a colleague needs to know.
function withoutPaths(notebook: Notebook, { file, records, folder }: Places): Notebook {
  const clean = (text: string): string =>
    text
      .replaceAll(file, path.basename(file))
      .replaceAll(records, path.basename(records))
      .replaceAll(folder + path.sep, "")
      .replaceAll(folder, ".");
  const cleanOutput = (output: Output): Output =>
    output.kind === "text"
      ? { kind: "text", text: clean(output.text) }
      : {
          kind: "display",
          data: Object.fromEntries(Object.entries(output.data).map(([type, text]) => [type, clean(text)])),
        };
  const cleanCell = (cell: CodeCell | MarkdownCell) =>
    cell.kind === "code" ? { ...cell, outputs: cell.outputs.map(cleanOutput) } : cell;
  return { file: path.relative(folder, notebook.file), cells: notebook.cells.map(cleanCell) };
}

// A page appears under its name only when whole; if one cannot be written, none is replaced.
function writePages(home: string, pages: ReadonlyMap<string, string>): string[] {
  mkdirSync(home, { recursive: true });
  const written = [...pages].map(([name, html]) => ({ file: path.join(home, name), html }));
  const unfinished = (file: string) => `${file}.${process.pid}.part`;
  try {
    for (const { file, html } of written) writeFileSync(unfinished(file), html);
    for (const { file } of written) renameSync(unfinished(file), file);
  } finally {
    for (const { file } of written) rmSync(unfinished(file), { force: true });
  }
  return written.map(({ file }) => file);
}

function messageOf(error: unknown): string {
  return error instanceof Error ? error.message : String(error);
}
