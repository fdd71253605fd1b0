// The program behind `npm start`: runs all notebooks with one brief and leaves their pages in rendered/.
// Pages are written only once every notebook has passed and been rendered, so that no half-made set is ever seen.

import { mkdirSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import path from "node:path";
import { InputError } from "../door.js";
import type { Brief } from "../recipe/brief.js";
import { readWorkbench } from "../recipe/files.js";
import { notebooksIn, type CodeCell, type MarkdownCell, type Notebook, type Output } from "./notebookFile.js";
import type { Origin } from "./page.js";
import { renderIndex, renderNotebook } from "./render.js";
import { runNotebooks, type NotebookRun, type Progress } from "./run.js";

const defaultBrief = path.join("data", "briefs", "flow-cell.json");

/**
 * Runs the notebooks of the workbench in `folder` with the brief named first in `words`, and writes their pages.
 * Returns the exit code: 0 done, 1 a notebook failed, 2 there was nothing to start with.
 */
export async function start(given: {
  readonly words: readonly string[];
  readonly folder: string;
  readonly print: (line: string) => void;
  readonly printError: (line: string) => void;
}): Promise<0 | 1 | 2> {
  const { words, folder, print, printError } = given;
  let task: { file: string; brief: Brief; files: string[] };
  try {
    task = { ...checkedBrief(folder, words), files: notebooksIn(folder) };
  } catch (error) {
    printError(messageOf(error));
    return 2;
  }
  const { file, brief, files } = task;
  const records = process.env["RESINWRIGHT_RECORDS"] ?? path.join(folder, "records");
  try {
    const runs = await runNotebooks({
      files,
      environment: { RESINWRIGHT_BRIEF: file, RESINWRIGHT_RECORDS: records },
      onProgress: (progress) => print(progressLine(progress)),
    });
    const failures = runs.flatMap((run) => (run.outcome === "failed" ? [run.failure.message] : []));
    if (failures.length > 0) throw new Error(failures.join("\n"));
    const written = writePages(folder, pagesOf(runs, brief, { file, records, folder }));
    print(["Pages:", ...written.map((file) => `  ${path.relative(folder, file)}`)].join("\n"));
    return 0;
  } catch (error) {
    printError(messageOf(error).replaceAll(folder + path.sep, ""));
    return 1;
  }
}

/** Reads the brief with its formulation and its shelf, so that a mistake in any of their files is told before a notebook runs. */
function checkedBrief(folder: string, words: readonly string[]): { file: string; brief: Brief } {
  const [named = defaultBrief, ...others] = words;
  if (others.length > 0) {
    throw new InputError(
      `npm start: ${words.length} arguments given; it must be one brief; name one file after --`,
    );
  }
  const file = path.resolve(folder, named);
  return { file, brief: readWorkbench(file).brief };
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

/** The pages by file name, with the index last. */
function pagesOf(runs: readonly NotebookRun[], brief: Brief, places: Places): Map<string, string> {
  const origin: Origin = {
    brief: path.basename(places.file),
    libraryVersion: libraryVersion(),
    nodeVersion: process.versions.node,
    date: new Date().toISOString().slice(0, 10),
  };
  const notebooks = runs.flatMap((run) => (run.outcome === "passed" ? [run.notebook] : []));
  const pages = notebooks.map((notebook) => ({
    file: `${path.basename(notebook.file, ".ipynb")}.html`,
    ...renderNotebook({ notebook: withoutPaths(notebook, places), origin }),
  }));
  return new Map([
    ...pages.map(({ file, html }) => [file, html] as const),
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

function libraryVersion(): string {
  return (createRequire(import.meta.url)("resinwright/package.json") as { version: string }).version;
}

// A page appears under its name only when whole; if one cannot be written, none is replaced.
function writePages(folder: string, pages: ReadonlyMap<string, string>): string[] {
  const home = path.join(folder, "rendered");
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
