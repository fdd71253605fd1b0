import { writeFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { parseJson } from "../../lib/notebook/json.js";
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
    ["text", "no notebook", /n\.ipynb: line 1 is not JSON \(.+\); correct that line$/],
    [
      "a broken line",
      notebookJson(["1"]).replace(`"outputs":`, `\n\n"outputs"`),
      /n\.ipynb: line 3 is not JSON/,
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

describe("parseJson", () => {
  it.each([
    ["{", 1],
    ["[1,\n2", 2],
    ["[1,\n2\n}", 3],
    ["[1,\n  x]", 2],
    [`{\n"a": 1,\n"b": oops,\n"c": 1, "long": "more and more text"}`, 3],
    [`{"some": "long text before it",\n\n\n"b": oops}`, 4],
    [`{\n"a": 1\n"b": 2\n}`, 3],
    [`["a\nb"]`, 1],
    ["", 1],
  ])("names the line of what is wrong in %j", (text, line) => {
    expect(() => parseJson({ text, where: "brief x.json" })).toThrow(
      new RegExp(`^brief x\\.json: line ${line} is not JSON \\(.+\\); correct that line$`),
    );
  });

  it("gives what the text holds", () => {
    expect(parseJson({ text: ` {"a": [1, null]} `, where: "x" })).toEqual({ a: [1, null] });
  });
});
