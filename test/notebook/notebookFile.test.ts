import { writeFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { readNotebook } from "../../lib/notebook/notebookFile.js";
import { notebookJson, scratchFolder } from "./scratch.js";

const read = async (text: string) => {
  const file = path.join(scratchFolder(), "n.ipynb");
  writeFileSync(file, text);
  return await readNotebook(file);
};

describe("readNotebook", () => {
  it("keeps the cells in order, with sources as one text", async () => {
    const cells = [
      { cell_type: "markdown", source: ["# A\n", "b"] },
      { cell_type: "code", source: "1", outputs: [], execution_count: 3 },
    ];
    expect((await read(notebookJson([], { cells }))).cells).toEqual([
      { kind: "markdown", source: "# A\nb" },
      { kind: "code", source: "1", outputs: [] },
    ]);
  });

  const cell = (changes: object) => ({
    cells: [{ cell_type: "code", source: "1", outputs: [], ...changes }],
  });
  it.each([
    ["text", "no notebook", /n\.ipynb, line 1, column \d+: this is not valid JSON: /],
    [
      "a broken line",
      notebookJson(["1"]).replace(`"outputs":`, `\n\n"outputs"`),
      /n\.ipynb, line 3, column \d+: this is not valid JSON: /,
    ],
    ["a list", "[]", /n\.ipynb: the file: .+; it must be a notebook of format 4$/],
    ["an old format", notebookJson(["1"], { nbformat: 3 }), /n\.ipynb: nbformat: .+ a notebook of format 4$/],
    ["no cells field", notebookJson([], { cells: undefined }), /n\.ipynb: cells: .+ a notebook of format 4$/],
    ["no cells", notebookJson([]), /n\.ipynb: the notebook has no cells; it must have at least one$/],
    ["no kernel", notebookJson(["1"], { metadata: {} }), /n\.ipynb: metadata\.kernelspec: /],
    [
      "another kernel",
      notebookJson(["1"], { metadata: { kernelspec: { name: "python3" } } }),
      /n\.ipynb: metadata\.kernelspec\.name is "python3"; it must be "tslab"; choose that kernel and save$/,
    ],
    [
      "stored outputs",
      notebookJson([], cell({ outputs: [{ output_type: "stream" }] })),
      /n\.ipynb, code cell 1: 1 stored outputs; a notebook is stored without them; clear all outputs and save$/,
    ],
    ["a raw cell", notebookJson([], cell({ cell_type: "raw" })), /n\.ipynb: cell 1: cell_type: /],
    [
      "a cell without source",
      notebookJson(["1", "2"]).replace(`,"source":"2"`, ""),
      /n\.ipynb: cell 2: source: /,
    ],
    [
      "a cell the kernel would skip",
      notebookJson(["1", "/**\n * @browser\n */\nassert(false)"]),
      /n\.ipynb, code cell 2: @browser in a comment makes the kernel skip the cell; remove the tag$/,
    ],
  ])("refuses %s", async (_, text, message) => {
    await expect(read(text)).rejects.toThrow(message);
  });

  it("refuses a file that is not there", async () => {
    await expect(readNotebook("nowhere/n.ipynb")).rejects.toThrow(
      "nowhere/n.ipynb: the notebook cannot be read (ENOENT)",
    );
  });
});
