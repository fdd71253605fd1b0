import { existsSync, mkdirSync, readdirSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { describe, expect, it, onTestFinished, vi } from "vitest";
import { startKernel, type Kernel } from "../../lib/notebook/kernel.js";
import type { CodeCell } from "../../lib/notebook/notebookFile.js";
import { runNotebook, runNotebooks, type NotebookRun, type RunFailure } from "../../lib/notebook/run.js";
import { scratchFolder, writeNotebook } from "./scratch.js";

const outputsOf = (run: NotebookRun) => {
  if (run.outcome === "failed") throw new Error(run.failure.message);
  return run.notebook.cells
    .filter((cell): cell is CodeCell => cell.kind === "code")
    .map((cell) => cell.outputs);
};

const failureOf = async (cells: readonly string[], cellTimeout_s = 60): Promise<RunFailure> => {
  const run = await runNotebook({ file: writeNotebook(cells), cellTimeout_s });
  if (run.outcome === "passed") throw new Error("the run passed");
  return run.failure;
};

const kernelFolders = () => readdirSync(tmpdir()).filter((name) => name.startsWith("notebook-kernel-"));

describe("runNotebook, a run that passes", () => {
  it("collects what cells print and display, in order, in the notebook's folder", async () => {
    const file = writeNotebook([
      "md: # Title",
      `import * as tslab from "tslab";\nimport { basename } from "path";\nconsole.log("first"); console.log("second");`,
      `tslab.display.html("<b>x</b>"); tslab.display.markdown("*y*"); tslab.display.png(new Uint8Array([1, 2, 3]));`,
      `const later = await new Promise<number>((resolve) => setTimeout(() => resolve(7), 20));\nlater`,
      `basename(process.cwd()) + process.env.TRIAL`,
      `const shown = tslab.newDisplay(); shown.text("old"); shown.text("new");`,
    ]);
    const seen: number[][] = [];
    const run = await runNotebook({
      file,
      environment: { TRIAL: "-set" },
      onProgress: ({ cell, cells, elapsed_s }) => seen.push([cell, cells, Math.sign(elapsed_s)]),
    });
    expect(outputsOf(run)).toMatchObject([
      [{ kind: "text", text: "first\nsecond\n" }],
      [
        { data: { "text/html": "<b>x</b>" } },
        { data: { "text/markdown": "*y*" } },
        { data: { "image/png": "AQID" } },
      ],
      [{ kind: "text", text: "7\n" }],
      [{ kind: "text", text: `${path.basename(path.dirname(file))}-set\n` }],
      [{ data: { "text/plain": "new" } }],
    ]);
    expect(seen).toEqual([1, 2, 3, 4, 5, 6].map((cell) => [cell, 5, 1]));
  });

  it("runs several at a time and keeps the order of the files", async () => {
    const folder = scratchFolder();
    const files = [300, 0, 0].map((wait_ms, i) =>
      writeNotebook(
        [`await new Promise((resolve) => setTimeout(resolve, ${wait_ms})); console.log("notebook ${i}")`],
        folder,
        `${i}.ipynb`,
      ),
    );
    const runs = await runNotebooks({ files, parallel: 2 });
    expect(runs.map((run) => outputsOf(run)[0])).toEqual(
      [0, 1, 2].map((i) => [{ kind: "text", text: `notebook ${i}\n` }]),
    );
  });

  it("runs the others when one fails", async () => {
    const folder = scratchFolder();
    const files = [`throw new Error("no")`, `1`].map((code, i) =>
      writeNotebook([code], folder, `${i}.ipynb`),
    );
    const runs = await runNotebooks({ files });
    expect(runs.map(({ outcome }) => outcome)).toEqual(["failed", "passed"]);
  });
});

describe("runNotebook, what must not pass", () => {
  it("an exception, named by file, cell, first line and the kernel's words", async () => {
    const failure = await failureOf([
      `const a = 1`,
      `md: prose`,
      `\nconst b = 2;\nthrow new Error("no resin")`,
      `3`,
    ]);
    expect(failure).toMatchObject({
      cell: 2,
      firstLine: "const b = 2;",
      what: "the cell ended with an error",
    });
    expect(failure.kernelText).toMatch(/\n\nError: no resin\n {4}at evalmachine[^]*$/);
    expect(failure.kernelText).not.toMatch(/tslab|node:vm/);
    expect(failure.message).toMatch(
      /trial\.ipynb, code cell 2 \(const b = 2;\): the cell ended with an error\n {4}evalmachine[^]+\n {4}Error: no resin\n/,
    );
  });

  it("a refused input, by its message and without the places of its stack", async () => {
    const failure = await failureOf([
      `import { readQuantity } from "resinwright";`,
      `readQuantity({ where: "brief.json", field: "temperature_C", given: "18,4 °C" })`,
    ]);
    expect(failure.kernelText).toContain(
      'brief.json: temperature_C is "18,4 °C", with a comma in the number',
    );
    expect(failure.kernelText).not.toMatch(/^\s+at |lib\/dist|file:/m);
  });

  it("an awaited promise that rejects", async () => {
    const failure = await failureOf([`await Promise.reject(new Error("refused"))`]);
    expect(failure).toMatchObject({ cell: 1, what: "the cell ended with an error" });
    expect(failure.kernelText).toContain("refused");
  });

  it("code that does not compile", async () => {
    const failure = await failureOf([`const mass_g: string = 3`]);
    expect(failure).toMatchObject({ cell: 1, what: "the cell ended with an error" });
    expect(failure.kernelText).toBe("1:7 - Type 'number' is not assignable to type 'string'.");
  });

  it("words on the error stream, without their colours", async () => {
    const failure = await failureOf([`console.error("\\u001b[31mred\\u001b[39m words")`]);
    expect(failure.what).toBe(
      "the cell wrote to the error stream, during its run or from work it left behind",
    );
    expect(failure.kernelText).toBe("red words");
  });

  it("an assertion that does not hold", async () => {
    expect(await failureOf([`console.assert(1 > 2, "one above two")`])).toMatchObject({
      cell: 1,
      kernelText: "Assertion failed: one above two",
    });
  });

  it("a promise rejected without being awaited, in the cell that made it", async () => {
    const failure = await failureOf([`1`, `Promise.reject(new Error("unheard")); 2`, `3`]);
    expect(failure.cell).toBe(2);
    expect(failure.kernelText).toMatch(/UnhandledPromiseRejection: Error: unheard/);
  });

  it("a throw from a timer within the pause after the last cell", async () => {
    const failure = await failureOf([`setTimeout(() => { throw new Error("late") }, 100); 1`]);
    expect(failure.cell).toBe(1);
    expect(failure.kernelText).toMatch(/UncaughtException: Error: late/);
  });

  it.each([
    ["throw", `setTimeout(() => { throw new Error("later") }, 1200); 1`],
    ["rejected promise", `setTimeout(() => { Promise.reject(new Error("later")) }, 1200); 1`],
  ])("a %s after that pause, while the kernel ends", async (_, code) => {
    const failure = await failureOf([code]);
    expect(failure.cell).toBeUndefined();
    expect(failure.what).toBe(
      "after the last cell, work left behind wrote to the error stream; await it in its cell",
    );
    expect(failure.kernelText).toMatch(/Error: later/);
  });

  it("work that never ends", async () => {
    const failure = await failureOf([`setInterval(() => 1, 1000); 1`]);
    expect(failure.what).toBe(
      "after the last cell, work left behind kept the kernel running; await or stop it in its cell",
    );
    expect(failure.message).toMatch(/trial\.ipynb: after the last cell/);
  });

  it("words written past the kernel", async () => {
    const failure = await failureOf([`import { writeSync } from "fs";\nwriteSync(2, "raw words"); 1`]);
    expect(failure.kernelText).toBe("raw words");
  });

  it.each([
    ["that computes", `for (;;) {}`],
    ["that waits", `await new Promise(() => {})`],
  ])("a cell %s beyond its time limit", async (_, code) => {
    const start = performance.now();
    const failure = await failureOf([`1`, code], 1);
    expect(failure).toMatchObject({ cell: 2, what: "the cell was still running after 1 s" });
    // The kernel takes some seconds to start on a busy machine; a run that waited for the cell would never end.
    expect(performance.now() - start).toBeLessThan(30_000);
  });

  it("a kernel that ends in mid-cell, even with success", async () => {
    expect(await failureOf([`process.exit(0)`])).toMatchObject({
      cell: 1,
      what: "the kernel ended while the cell was running (exit code 0)",
    });
  });

  it("a kernel that ends unasked after the last cell", async () => {
    expect(await failureOf([`setTimeout(() => process.exit(0), 50); 1`])).toMatchObject({
      what: "after the last cell, the kernel ended unasked (exit code 0)",
    });
  });

  it("a kernel that does not start", async () => {
    const file = writeNotebook([`1`]);
    const run = await runNotebook({ file, environment: { NODE_OPTIONS: "--no-such-option" } });
    expect(run.outcome === "failed" && run.failure.what).toBe("the kernel did not start");
    expect(run.outcome === "failed" && run.failure.kernelText).toMatch(/--no-such-option is not allowed/);
  });

  it("a time limit that is none", async () => {
    await expect(runNotebook({ file: "any.ipynb", cellTimeout_s: NaN })).rejects.toThrow(
      "runNotebook: cellTimeout_s is NaN; it must be a number above 0 and at most 86400",
    );
    await expect(runNotebooks({ files: [], parallel: 0 })).rejects.toThrow(
      "runNotebooks: parallel is 0; it must be a finite number of at least 1",
    );
  });
});

describe("startKernel", () => {
  const start = async (transport?: "tcp"): Promise<Kernel> => {
    const choice = transport === undefined ? {} : { transport };
    const kernel = await startKernel({ folder: scratchFolder(), environment: {}, ...choice });
    onTestFinished(async () => void (await kernel.stop()));
    return kernel;
  };

  it("speaks over ports where there are no local sockets", async () => {
    const kernel = await start("tcp");
    expect(await kernel.execute({ code: "6 * 7", timeLimit_s: 30 })).toMatchObject({
      status: "ok",
      outputs: [{ kind: "text", text: "42\n" }],
      errorText: "",
    });
  });

  it("speaks over ports where the temporary folder has too long a name for local sockets", async () => {
    const long = path.join(scratchFolder(), "x".repeat(100));
    mkdirSync(long);
    vi.stubEnv("TMPDIR", long);
    onTestFinished(() => void vi.unstubAllEnvs());
    const kernel = await start();
    expect((await kernel.execute({ code: "1", timeLimit_s: 30 })).status).toBe("ok");
    expect(readdirSync(path.join(long, readdirSync(long)[0]!))).toEqual(["connection.json"]);
  });

  it("calls a cell aborted that the kernel drops after an error", async () => {
    const kernel = await start();
    const [first, second] = await Promise.all([
      kernel.execute({ code: `throw new Error("first")`, timeLimit_s: 30 }),
      kernel.execute({ code: `"second"`, timeLimit_s: 30 }),
    ]);
    expect([first.status, second.status]).toEqual(["error", "aborted"]);
    expect(second.outputs).toEqual([]);
  });

  it("leaves no process and no folder behind", async () => {
    const before = kernelFolders();
    const kernel = await start();
    // Other test files run kernels at the same time: theirs may come and go meanwhile.
    expect(kernelFolders().filter((name) => !before.includes(name)).length).toBeGreaterThan(0);
    const { outputs } = await kernel.execute({ code: "process.pid", timeLimit_s: 30 });
    const pid = Number(outputs[0]?.kind === "text" && outputs[0].text);
    expect(process.kill(pid, 0)).toBe(true);
    expect(await kernel.stop()).toEqual({ ended: "when asked", exitCode: 0, errorText: "" });
    expect(() => process.kill(pid, 0)).toThrow("ESRCH");
  });

  it("is cleared away when this process is interrupted", async () => {
    const before = new Set(kernelFolders());
    const kernel = await start();
    const [folder] = kernelFolders().filter((name) => !before.has(name));
    const stay = () => undefined;
    process.on("SIGINT", stay);
    onTestFinished(() => void process.off("SIGINT", stay));
    const running = kernel.execute({ code: "for (;;) {}", timeLimit_s: 30 });
    process.emit("SIGINT", "SIGINT");
    expect(existsSync(path.join(tmpdir(), folder!))).toBe(false);
    expect(await running).toMatchObject({ status: "kernel ended" });
  });
});
