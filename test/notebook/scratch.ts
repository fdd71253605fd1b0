// Notebooks written for one test, in a folder inside the repository so that a cell can import its packages.
// The folder is not tracked, and goes away after the test.

import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import path from "node:path";
import { onTestFinished } from "vitest";

/** A new empty folder that is removed when the running test ends. */
export function scratchFolder(): string {
  const parent = path.resolve(".vitest");
  mkdirSync(parent, { recursive: true });
  const folder = mkdtempSync(path.join(parent, "notebook-"));
  onTestFinished(() => rmSync(folder, { recursive: true, force: true }));
  return folder;
}

/** A stored notebook as JSON: text beginning with "md:" is prose, any other a code cell. */
export function notebookJson(cells: readonly string[], changes: object = {}): string {
  return JSON.stringify({
    nbformat: 4,
    nbformat_minor: 5,
    metadata: { kernelspec: { name: "tslab", display_name: "TypeScript", language: "typescript" } },
    cells: cells.map((text) =>
      text.startsWith("md:")
        ? { cell_type: "markdown", metadata: {}, source: text.slice(3).trimStart() }
        : { cell_type: "code", metadata: {}, execution_count: null, outputs: [], source: text },
    ),
    ...changes,
  });
}

/** Writes a notebook into a new folder and returns its path. */
export function writeNotebook(
  cells: readonly string[],
  folder = scratchFolder(),
  name = "trial.ipynb",
): string {
  const file = path.join(folder, name);
  writeFileSync(file, notebookJson(cells));
  return file;
}
