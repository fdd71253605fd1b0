// Running notebooks without a browser: every code cell in order, and nothing passes that went wrong on the way.
// A run passes only if every cell ended well, nothing was written to an error stream, and nothing was left running.

import path from "node:path";
import { checkNumber, positive } from "../door.js";
import { startKernel, type CellRun, type Ending, type Kernel } from "./kernel.js";
import { readNotebook, type Notebook } from "./notebookFile.js";

/** Where a run stands: code cell `cell` of `cells` is about to start; `cell` is `cells` + 1 once all have ended. */
export interface Progress {
  readonly file: string;
  readonly cell: number;
  readonly cells: number;
  readonly elapsed_s: number;
}

/** How to run notebooks. */
export interface RunOptions {
  /** Longest time for one cell, in s; above 0, default 120. */
  readonly cellTimeout_s?: number;
  /** Environment variables for the notebook, added to those of this process. */
  readonly environment?: Readonly<Record<string, string>>;
  readonly onProgress?: (progress: Progress) => void;
}

/** What went wrong in a run: `cell` counts code cells from 1 and is missing if no cell can be named. */
export interface RunFailure {
  readonly file: string;
  readonly cell?: number;
  /** First line of that cell. */
  readonly firstLine?: string;
  readonly what: string;
  /** The kernel's own words, without colour codes; may be empty. */
  readonly kernelText: string;
  /** All of the above, to be printed. */
  readonly message: string;
}

/** A run that passed brings the notebook with its outputs; one that failed says where and why. */
export type NotebookRun =
  | {
      readonly outcome: "passed";
      readonly notebook: Notebook;
      readonly cells: number;
      readonly elapsed_s: number;
    }
  | {
      readonly outcome: "failed";
      readonly failure: RunFailure;
      readonly cells: number;
      readonly elapsed_s: number;
    };

// After the last cell: an error from a timer or a promise still reaches the run if it comes within this pause.
// A later one shows because the kernel does not end when asked, or says so while it ends.
const finishPause_ms = 300;

/**
 * Runs one notebook in a kernel of its own, with the notebook's folder as working directory.
 *
 * Assumes that what a cell starts it also awaits: work that outlives the last cell fails the run.
 * @throws InputError if the file is not a notebook that can be run, or the time limit is not above 0: the message names
 *   the file and the line or cell (not JSON, another kernel, stored outputs, a cell the kernel would skip).
 * @example
 * ```ts
 * import { mkdtempSync, writeFileSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { runNotebook } from "resinwright/notebook";
 * const file = `${mkdtempSync(`${tmpdir()}/example-`)}/trial.ipynb`;
 * const cell = { cell_type: "code", source: "1 + 1", outputs: [] };
 * writeFileSync(file, JSON.stringify({ nbformat: 4, metadata: { kernelspec: { name: "tslab" } }, cells: [cell] }));
 * const run = await runNotebook({ file, cellTimeout_s: 30 });
 * run.outcome; // → "passed"
 * ```
 */
export async function runNotebook(given: { readonly file: string } & RunOptions): Promise<NotebookRun> {
  checkTimeout(given);
  return await runCells(await readNotebook(given.file), given);
}

/**
 * Runs several notebooks, `parallel` at a time (1 or more, default 2); results stand in the order of `files`.
 *
 * All files are read before the first is run; one that fails does not stop the others.
 * @throws InputError if a file is not a notebook that can be run, before any is run.
 * @example
 * ```ts
 * import { runNotebooks } from "resinwright/notebook";
 * await runNotebooks({ files: [], parallel: 2 }); // → []
 * ```
 */
export async function runNotebooks(
  given: { readonly files: readonly string[]; readonly parallel?: number } & RunOptions,
): Promise<NotebookRun[]> {
  const { files, parallel = 2 } = given;
  checkTimeout(given);
  checkNumber(parallel, { where: "runNotebooks", field: "parallel", min: 1 });
  const notebooks = await Promise.all(files.map((file) => readNotebook(file)));
  const results: NotebookRun[] = [];
  const waiting = notebooks.entries();
  const worker = async () => {
    for (const [i, notebook] of waiting) results[i] = await runCells(notebook, given);
  };
  await Promise.all(Array.from({ length: Math.min(Math.floor(parallel), files.length) }, worker));
  return results;
}

function checkTimeout({ cellTimeout_s = 120 }: RunOptions): void {
  checkNumber(cellTimeout_s, { where: "runNotebook", field: "cellTimeout_s", ...positive, max: 86_400 });
}

async function runCells(notebook: Notebook, options: RunOptions): Promise<NotebookRun> {
  const { cellTimeout_s = 120, environment = {}, onProgress = () => undefined } = options;
  const { file } = notebook;
  const sources = notebook.cells.filter((cell) => cell.kind === "code").map((cell) => cell.source);
  const start = performance.now();
  const elapsed_s = () => (performance.now() - start) / 1000;
  const failed = (trouble: Trouble): NotebookRun => ({
    outcome: "failed",
    failure: describe(file, sources, trouble),
    cells: sources.length,
    elapsed_s: elapsed_s(),
  });

  let kernel: Kernel;
  try {
    kernel = await startKernel({ folder: path.dirname(path.resolve(file)), environment });
  } catch (error) {
    return failed({ what: "the kernel did not start", kernelText: (error as Error).message });
  }
  const runs: CellRun[] = [];
  let ending: Ending;
  try {
    for (const [i, code] of sources.entries()) {
      onProgress({ file, cell: i + 1, cells: sources.length, elapsed_s: elapsed_s() });
      runs.push(await kernel.execute({ code, timeLimit_s: cellTimeout_s }));
      if (runs.some(wentWrong)) break;
    }
    await kernel.quiet({ pause_ms: finishPause_ms });
  } finally {
    ending = await kernel.stop();
  }
  const trouble = troubleOfCells(runs, cellTimeout_s, ending) ?? troubleAtTheEnd(ending);
  if (trouble !== undefined) return failed(trouble);
  onProgress({ file, cell: sources.length + 1, cells: sources.length, elapsed_s: elapsed_s() });
  return {
    outcome: "passed",
    notebook: withOutputs(notebook, runs),
    cells: runs.length,
    elapsed_s: elapsed_s(),
  };
}

function withOutputs(notebook: Notebook, runs: readonly CellRun[]): Notebook {
  const remaining = runs.values();
  const cells = notebook.cells.map((cell) =>
    cell.kind === "code" ? { ...cell, outputs: remaining.next().value?.outputs ?? [] } : cell,
  );
  return { ...notebook, cells };
}

interface Trouble {
  readonly cell?: number;
  readonly what: string;
  readonly kernelText: string;
}

function wentWrong({ status, errorText }: CellRun): boolean {
  return status !== "ok" || errorText.trim() !== "";
}

function troubleOfCells(
  runs: readonly CellRun[],
  cellTimeout_s: number,
  ending: Ending,
): Trouble | undefined {
  const at = runs.findIndex(wentWrong);
  const run = runs[at];
  if (run === undefined) return undefined;
  const what: Record<CellRun["status"], string> = {
    ok: "the cell wrote to the error stream, during its run or from work it left behind",
    error: "the cell ended with an error",
    aborted: "the kernel did not run the cell",
    "too long": `the cell was still running after ${cellTimeout_s} s`,
    "kernel ended": `the kernel ended while the cell was running (exit code ${ending.exitCode ?? "none"})`,
  };
  const kernelText = run.errorText.trim() === "" ? ending.errorText : run.errorText;
  return { cell: at + 1, what: what[run.status], kernelText };
}

function troubleAtTheEnd({ ended, exitCode, errorText }: Ending): Trouble | undefined {
  const left = "after the last cell, work left behind";
  if (errorText.trim() !== "")
    return { what: `${left} wrote to the error stream; await it in its cell`, kernelText: errorText };
  if (ended === "killed")
    return { what: `${left} kept the kernel running; await or stop it in its cell`, kernelText: "" };
  if (ended === "before" || exitCode !== 0) {
    return {
      what: `after the last cell, the kernel ended unasked (exit code ${exitCode ?? "none"})`,
      kernelText: "",
    };
  }
  return undefined;
}

function describe(file: string, sources: readonly string[], trouble: Trouble): RunFailure {
  const { cell, what } = trouble;
  const kernelText = withoutKernelFrames(trouble.kernelText).trim();
  const firstLine = cell === undefined ? undefined : sources[cell - 1]!.trim().split("\n")[0]!;
  const where = cell === undefined ? file : `${file}, code cell ${cell} (${firstLine})`;
  const words = kernelText === "" ? "" : `\n${kernelText.replace(/^/gm, "    ")}`;
  return {
    file,
    ...(cell === undefined ? {} : { cell, firstLine: firstLine! }),
    what,
    kernelText,
    message: `${where}: ${what}${words}`,
  };
}

// Lines of a stack that lie inside the kernel say nothing about the cell; of a refused input its message says all.
function withoutKernelFrames(text: string): string {
  const refused = /^InputError: [^]*/m.exec(text)?.[0];
  const lines = (refused ?? text).split("\n");
  const frame = refused === undefined ? /^\s+at .*([\\/]node_modules[\\/]tslab[\\/]|\(node:vm:)/ : /^\s+at /;
  return lines.filter((line) => !frame.test(line)).join("\n");
}
