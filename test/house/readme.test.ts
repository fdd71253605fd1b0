import { mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join, resolve } from "node:path";
import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { runCommand } from "../../lib/command/run.js";
import { appendRecord, type NewRecord } from "../../lib/lab/record.js";
import { readWorkbench } from "../../lib/recipe/files.js";
import { oneOfEach } from "../lab/record/fixtures.js";

const readme = readFileSync("README.md", "utf8");

describe("the README", () => {
  it("gives a formulation and a brief that work as they stand there", () => {
    const [formulation, brief] = [...readme.matchAll(/```json\n([^]*?)```/g)].map(([, text]) => text!);
    mkdirSync(".vitest", { recursive: true });
    const folder = mkdtempSync(resolve(".vitest/readme-"));
    try {
      // The README says "../../data" from lab/briefs; here the lab lies one folder deeper.
      const files = {
        "formulations/first.json": formulation!,
        "briefs/first.json": brief!.replace("../../data", "../../../data"),
      };
      for (const [name, text] of Object.entries(files)) {
        mkdirSync(dirname(join(folder, name)), { recursive: true });
        writeFileSync(join(folder, name), text);
      }
      const assessment = assess({ ...readWorkbench(join(folder, "briefs/first.json")), draws: 100 });
      expect(assessment.verdicts).toHaveLength(3);
      expect(assessment.avoided).toEqual([]);
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  it("gives calls of the command that work as they stand there", async () => {
    const folder = mkdtempSync(join(tmpdir(), "readme-"));
    try {
      for (const record of oneOfEach) appendRecord({ folder, record });
      const calls = [...readme.matchAll(/^npx resinwright (.*)$/gm)].map(([, words]) => words!);
      expect(calls.length).toBeGreaterThan(3);
      for (const call of calls) {
        const words = [...call.matchAll(/"([^"]*)"|(\S+)/g)].map(([, quoted, bare]) => quoted ?? bare!);
        const errors: string[] = [];
        const code = await runCommand(words, {
          folder: resolve("."),
          width: 100,
          environment: { RESINWRIGHT_RECORDS: folder },
          readStdin: () => Promise.resolve(""),
          print: () => undefined,
          printError: (line) => errors.push(line),
        });
        expect({ call, code, errors }).toEqual({ call, code: 0, errors: [] });
      }
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  it("gives a record that can be appended as it stands there", () => {
    const [, , record] = [...readme.matchAll(/```json\n([^]*?)```/g)].map(([, text]) => text!);
    const folder = mkdtempSync(join(tmpdir(), "readme-"));
    try {
      appendRecord({ folder, record: JSON.parse(record!) as NewRecord });
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  it("names files that are there", () => {
    const links = [...readme.matchAll(/\]\(([^)#]+)\)/g)].map(([, path]) => path!);
    expect(links.length).toBeGreaterThan(5);
    for (const path of links) expect(() => readFileSync(path), path).not.toThrow();
  });

  it("counts the shipped ingredients", () => {
    const [, count] = /holds (\d+) substances/.exec(readme)!;
    const { shelf } = readWorkbench("data/briefs/flow-cell.json");
    expect(shelf.ingredients.size).toBe(Number(count));
  });
});
