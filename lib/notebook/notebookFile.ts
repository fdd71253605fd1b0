// A notebook as it is stored: read, checked, and reduced to what running and rendering need.
// Stored notebooks have no outputs, so that a page only ever shows what this run computed.

import { readdirSync } from "node:fs";
import { readFile } from "node:fs/promises";
import path from "node:path";
import { z } from "zod";
import { InputError } from "../door.js";
import { parseJson } from "../recipe/document.js";

/** What a cell gave while it ran: text it printed, or something it displayed, by MIME type. */
export type Output =
  | { readonly kind: "text"; readonly text: string }
  | { readonly kind: "display"; readonly data: Readonly<Record<string, string>> };

/** A cell of prose, in Markdown. */
export interface MarkdownCell {
  readonly kind: "markdown";
  readonly source: string;
}

/** A cell of TypeScript, with what it gave; empty before it ran. */
export interface CodeCell {
  readonly kind: "code";
  readonly source: string;
  readonly outputs: readonly Output[];
}

/** A notebook: the file it was read from, and its cells in order. */
export interface Notebook {
  readonly file: string;
  readonly cells: readonly (MarkdownCell | CodeCell)[];
}

/**
 * The notebooks of the workbench in `folder`, in the order of their names.
 * @throws InputError if there are none.
 */
export function notebooksIn(folder: string): string[] {
  const home = path.join(folder, "notebooks");
  let names: string[] = [];
  try {
    names = readdirSync(home).filter((name) => name.endsWith(".ipynb"));
  } catch {
    // No folder is told like an empty one.
  }
  if (names.length === 0) {
    throw new InputError("notebooks: no .ipynb file in this folder; start in the folder of the workbench");
  }
  return names.sort().map((name) => path.join(home, name));
}

/**
 * Reads a stored notebook.
 * @throws InputError naming the file and the line or cell: not JSON, not a notebook, another kernel, stored outputs, a cell that would be skipped.
 */
export async function readNotebook(file: string): Promise<Notebook> {
  const stored = parseJson(await readText(file), file).value;
  const result = notebookSchema.safeParse(stored);
  if (!result.success) throw new InputError(`${file}: ${describe(result.error.issues[0]!)}`);
  const { cells, metadata } = result.data;
  if (metadata.kernelspec.name !== "tslab") {
    throw new InputError(
      `${file}: metadata.kernelspec.name is "${metadata.kernelspec.name}"; it must be "tslab"; choose that kernel and save`,
    );
  }
  if (cells.length === 0)
    throw new InputError(`${file}: the notebook has no cells; it must have at least one`);
  let number = 0;
  return {
    file,
    cells: cells.map((cell) => {
      const source = Array.isArray(cell.source) ? cell.source.join("") : cell.source;
      if (cell.cell_type === "markdown") return { kind: "markdown", source };
      number += 1;
      checkCodeCell(`${file}, code cell ${number}`, source, cell.outputs);
      return { kind: "code", source, outputs: [] };
    }),
  };
}

function checkCodeCell(where: string, source: string, outputs: readonly unknown[]): void {
  if (outputs.length > 0) {
    throw new InputError(
      `${where}: ${outputs.length} stored outputs; a notebook is stored without them; clear all outputs and save`,
    );
  }
  if (/\/\*\*(?:(?!\*\/)[^])*@browser\b/.test(source)) {
    throw new InputError(`${where}: @browser in a comment makes the kernel skip the cell; remove the tag`);
  }
}

async function readText(file: string): Promise<string> {
  try {
    return await readFile(file, "utf8");
  } catch (error) {
    throw new InputError(`${file}: the notebook cannot be read (${(error as NodeJS.ErrnoException).code})`);
  }
}

function describe({ path, message }: z.core.$ZodIssue): string {
  const [list, index, ...rest] = path;
  if (list !== "cells" || index === undefined) {
    return `${path.join(".") || "the file"}: ${message}; it must be a notebook of format 4`;
  }
  return `cell ${Number(index) + 1}: ${rest.join(".")}: ${message}`;
}

const sourceSchema = z.union([z.string(), z.array(z.string())]);

const notebookSchema = z.object({
  nbformat: z.literal(4),
  metadata: z.object({ kernelspec: z.object({ name: z.string() }) }),
  cells: z.array(
    z.discriminatedUnion("cell_type", [
      z.object({ cell_type: z.literal("markdown"), source: sourceSchema }),
      z.object({ cell_type: z.literal("code"), source: sourceSchema, outputs: z.array(z.unknown()) }),
    ]),
  ),
});
