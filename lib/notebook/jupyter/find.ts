// Which Jupyter this machine has. JupyterLab comes first, then the notebook application of any age.
// Asked by running it: a program on the path may belong to a Python that is no longer there.

import { spawnSync } from "node:child_process";

/** A Jupyter that answered: the command that starts it, and its name and version to be shown. */
export interface Jupyter {
  readonly command: readonly [string, ...string[]];
  readonly name: string;
}

// With pip on Windows the program `jupyter` is often off the path while Python's launcher is on it.
const launchers = [["jupyter"], ["python3", "-m", "jupyter"], ["py", "-m", "jupyter"]] as const;
const applications = [
  { word: "lab", title: "JupyterLab" },
  { word: "notebook", title: "Jupyter Notebook" },
  { word: "nbclassic", title: "Jupyter's classic notebook" },
] as const;
const answerLimit_ms = 60_000;

/** The first Jupyter that says its version under `environment`, or undefined if none does. */
export function findJupyter(environment: NodeJS.ProcessEnv): Jupyter | undefined {
  for (const [program, ...before] of launchers) {
    for (const { word, title } of applications) {
      const { error, status, stdout } = spawnSync(program, [...before, word, "--version"], {
        env: environment,
        encoding: "utf8",
        timeout: answerLimit_ms,
      });
      if (error !== undefined) break;
      if (status === 0) return { command: [program, ...before, word], name: `${title} ${stdout.trim()}` };
    }
  }
  return undefined;
}

/** What to do where no Jupyter is found. */
export const howToGetJupyter = `npm run lab: no Jupyter answers on this machine; install one of these and run again:
  Debian and its relatives   apt install jupyter-notebook
  with pip                   python3 -m pip install jupyterlab   (in a virtual environment, activated)
  with conda                 conda install -c conda-forge jupyterlab   (in an activated environment)
  Windows and macOS          install Python 3 first, then use the line for pip; open a new terminal afterwards
It must answer to: jupyter lab --version, or: jupyter notebook --version
Without Jupyter, npm start runs all notebooks and writes their pages to rendered/.`;
