// The program behind `npm run lab`: opens the notebooks in the Jupyter of this machine, with the kernel of this workbench.
// Cells run as under `npm start`: in the folder of the notebooks, with the brief that was named, and deciding appends to records/.

import { spawn } from "node:child_process";
import path from "node:path";
import { InputError } from "../../door.js";
import { readWorkbench } from "../../recipe/files.js";
import type { Call } from "../call.js";
import { notebooksIn } from "../notebookFile.js";
import { findJupyter, howToGetJupyter } from "./find.js";
import { writeProject } from "./project.js";

/**
 * Opens the workbench in `folder` and waits until Jupyter has ended.
 *
 * Of `words`, one may name the brief; those that begin with a dash are handed to Jupyter.
 * Returns the exit code: 0 Jupyter was ended, 1 there is none or it failed, 2 there was nothing to start with.
 */
export async function openNotebooks(call: Call): Promise<0 | 1 | 2> {
  const { words, folder, environment, print, printError } = call;
  let brief: string | undefined;
  try {
    brief = checkedBrief(folder, words);
    notebooksIn(folder);
  } catch (error) {
    printError((error as Error).message);
    return 2;
  }
  const jupyter = findJupyter(environment);
  if (jupyter === undefined) {
    printError(howToGetJupyter);
    return 1;
  }
  print(`${jupyter.name} opens ${path.join(folder, "notebooks")}; Ctrl-C ends it and every kernel.`);
  return await run({
    command: [...jupyter.command, "-y", `--notebook-dir=${folder}`, ...words.filter(isOption)],
    folder,
    environment: {
      ...writeProject(folder, environment),
      ...(brief === undefined ? {} : { RESINWRIGHT_BRIEF: brief }),
    },
  });
}

function isOption(word: string): boolean {
  return word.startsWith("-");
}

/** The brief that was named, if one was: read with all its files, so that a mistake in them is told here and not in a cell. */
function checkedBrief(folder: string, words: readonly string[]): string | undefined {
  const [named, ...others] = words.filter((word) => !isOption(word));
  if (named === undefined) return undefined;
  if (others.length > 0 || !named.endsWith(".json")) {
    const given = [named, ...others].map((word) => `"${word}"`).join(", ");
    throw new InputError(
      `npm run lab: ${given} given; it must be one brief, a .json file; write options of Jupyter in one word, as in --port=8890`,
    );
  }
  const file = path.resolve(folder, named);
  readWorkbench(file);
  return file;
}

/**
 * Runs Jupyter until it ends. It is asked to end, once, when this program is: asked twice it would leave kernels behind.
 * So it gets a process group of its own, which an interrupt at the terminal does not reach. Windows has no such request:
 * there an interrupt reaches Jupyter by itself.
 */
function run(given: {
  readonly command: readonly string[];
  readonly folder: string;
  readonly environment: NodeJS.ProcessEnv;
}): Promise<0 | 1> {
  const [program, ...rest] = given.command;
  const canAsk = process.platform !== "win32";
  return new Promise((resolve) => {
    const child = spawn(program!, rest, {
      cwd: given.folder,
      env: given.environment,
      stdio: ["ignore", "inherit", "inherit"],
      detached: canAsk,
    });
    let asked = false;
    const end = () => {
      if (canAsk && !asked) child.kill("SIGTERM");
      asked = true;
    };
    const signals = ["SIGINT", "SIGTERM", "SIGHUP"] as const;
    for (const signal of signals) process.on(signal, end);
    child.on("close", (code) => {
      for (const signal of signals) process.off(signal, end);
      resolve(asked || code === 0 ? 0 : 1);
    });
  });
}
