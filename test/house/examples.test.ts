import { mkdirSync, rmSync, writeFileSync } from "node:fs";
import { join, resolve } from "node:path";
import { pathToFileURL } from "node:url";
import ts from "typescript";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { examples, programOf } from "./examples.js";
import { expectStated } from "./expectStated.js";

// Inside the project, so that "resinwright" resolves to the built package as a user's script would see it.
const folder = resolve(".vitest/examples");
const all = examples().map((example, index) => ({ ...example, file: join(folder, `example-${index}.ts`) }));

beforeAll(() => {
  rmSync(folder, { recursive: true, force: true });
  mkdirSync(folder, { recursive: true });
  for (const example of all) writeFileSync(example.file, programOf(example));
  writeFileSync(
    join(folder, "expectStated.d.ts"),
    "export declare function expectStated(...given: unknown[]): void;\n",
  );
});
afterAll(() => rmSync(folder, { recursive: true }));

describe("examples", () => {
  it("are many", () => {
    expect(all.length).toBeGreaterThan(60);
  });

  it("pass the strict compiler against the built package", () => {
    const { options } = ts.getParsedCommandLineOfConfigFile(
      "tsconfig.json",
      { noUnusedLocals: false },
      { ...ts.sys, onUnRecoverableConfigFileDiagnostic: () => undefined },
    )!;
    const program = ts.createProgram(
      all.map(({ file }) => file),
      { ...options, noEmit: true },
    );
    const complaints = ts.getPreEmitDiagnostics(program).map(({ file, messageText }) => {
      const place = all.find((one) => one.file === file?.fileName)?.place ?? file?.fileName;
      return `${place}: ${ts.flattenDiagnosticMessageText(messageText, "\n")}`;
    });
    expect(complaints).toEqual([]);
  });

  it.each(all.map((one) => [one.place, one] as const))("%s gives what it states", async (_, example) => {
    const compiled = ts.transpileModule(programOf(example), {
      compilerOptions: { target: ts.ScriptTarget.ES2022, module: ts.ModuleKind.ESNext },
    });
    const file = example.file.replace(/\.ts$/, ".mjs");
    const helper = `const { expectStated } = globalThis.exampleCheck;\n`;
    writeFileSync(file, helper + compiled.outputText.replace(/import \{ expectStated \} .*\n/, ""));
    Object.assign(globalThis, { exampleCheck: { expectStated } });
    await import(/* @vite-ignore */ pathToFileURL(file).href);
  });
});

describe("expectStated", () => {
  it("holds a number to the digits shown", () => {
    expect(() => expectStated("x", 0.5867, 0.587, "0.587")).not.toThrow();
    expect(() => expectStated("x", 0.5876, 0.587, "0.587")).toThrow("x is 0.5876, stated as 0.587");
    expect(() => expectStated("x", 15, 15, "15")).not.toThrow();
    expect(() => expectStated("x", 15.6, 15, "15")).toThrow();
    expect(() => expectStated("x", "a", "b", '"b"')).toThrow('x is "a"');
  });
});
