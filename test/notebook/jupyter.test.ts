import {
  chmodSync,
  existsSync,
  mkdirSync,
  readFileSync,
  readdirSync,
  symlinkSync,
  writeFileSync,
} from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { findJupyter } from "../../lib/notebook/jupyter/find.js";
import { openNotebooks } from "../../lib/notebook/jupyter/open.js";
import { writeProject } from "../../lib/notebook/jupyter/project.js";
import { scratchFolder, writeNotebook } from "./scratch.js";
import { told } from "./told.js";

/** A folder for the path, with programs that are lines of shell. */
const pathWith = (programs: Record<string, string>) => {
  const folder = scratchFolder();
  for (const [name, lines] of Object.entries(programs)) {
    writeFileSync(path.join(folder, name), `#!/bin/sh\n${lines}\n`);
    chmodSync(path.join(folder, name), 0o755);
  }
  return folder;
};

const answering = (...applications: string[]) =>
  `case "$1 $2" in ${applications.map((name) => `"${name} --version") echo 7.1 ;;`).join(" ")} *) exit 1 ;; esac`;

const workbench = () => {
  const folder = scratchFolder();
  mkdirSync(path.join(folder, "notebooks"));
  writeNotebook(["1"], path.join(folder, "notebooks"), "01-a.ipynb");
  symlinkSync(path.resolve("data"), path.join(folder, "data"));
  return folder;
};

const open = (folder: string, environment: NodeJS.ProcessEnv, ...words: string[]) =>
  told((telling) => openNotebooks({ words, folder, environment, ...telling }));

describe("findJupyter", () => {
  it.each([
    [["lab", "notebook"], ["jupyter", "lab"], "JupyterLab 7.1"],
    [["notebook", "nbclassic"], ["jupyter", "notebook"], "Jupyter Notebook 7.1"],
    [["nbclassic"], ["jupyter", "nbclassic"], "Jupyter's classic notebook 7.1"],
  ])("of %s takes the first", (applications, command, name) => {
    expect(findJupyter({ PATH: pathWith({ jupyter: answering(...applications) }) })).toEqual({
      command,
      name,
    });
  });

  it("asks Python where the program itself is missing or broken", () => {
    const python3 = `shift 2\n${answering("notebook")}`;
    const found = { command: ["python3", "-m", "jupyter", "notebook"], name: "Jupyter Notebook 7.1" };
    expect(findJupyter({ PATH: pathWith({ python3 }) })).toEqual(found);
    expect(findJupyter({ PATH: pathWith({ python3, jupyter: "exit 1" }) })).toEqual(found);
  });

  it("finds none on an empty path", () => {
    expect(findJupyter({ PATH: scratchFolder() })).toBeUndefined();
  });
});

describe("writeProject", () => {
  it("names this Node and the installed kernel, under the name the notebooks ask for", () => {
    const folder = scratchFolder();
    writeProject(folder, {});
    const file = path.join(folder, ".lab", "kernels", "tslab", "kernel.json");
    const { argv, ...rest } = JSON.parse(readFileSync(file, "utf8")) as { argv: string[] };
    expect(rest).toEqual({ display_name: "TypeScript", language: "typescript" });
    const [node, program, ...words] = argv;
    expect(node).toBe(process.execPath);
    expect(existsSync(program!)).toBe(true);
    expect(words).toEqual(["kernel", "--config-path", "{connection_file}"]);
    for (const name of readdirSync("notebooks").filter((name) => name.endsWith(".ipynb"))) {
      const { metadata } = JSON.parse(readFileSync(path.join("notebooks", name), "utf8")) as {
        metadata: { kernelspec: object };
      };
      expect(metadata.kernelspec).toEqual({
        name: "tslab",
        display_name: "TypeScript",
        language: "typescript",
      });
    }
  });

  it("comes before other folders of Jupyter, and keeps them", () => {
    const folder = scratchFolder();
    const home = path.join(folder, ".lab");
    expect(writeProject(folder, { LANG: "C" })).toEqual({
      LANG: "C",
      JUPYTER_PATH: home,
      JUPYTER_CONFIG_PATH: home,
    });
    expect(writeProject(folder, { JUPYTER_PATH: "/a", JUPYTER_CONFIG_PATH: "/b" })).toEqual({
      JUPYTER_PATH: home + path.delimiter + "/a",
      JUPYTER_CONFIG_PATH: home + path.delimiter + "/b",
    });
  });
});

describe("openNotebooks", () => {
  it("says how to get Jupyter where there is none", async () => {
    const folder = workbench();
    const { code, printed, errors } = await open(folder, { PATH: scratchFolder() });
    expect([code, printed]).toEqual([1, ""]);
    expect(errors).toMatch(
      /^npm run lab: no Jupyter answers on this machine; install one of these and run again:\n/,
    );
    for (const way of [
      "apt install jupyter-notebook",
      "pip install jupyterlab",
      "conda install",
      "Windows and macOS",
    ]) {
      expect(errors).toContain(way);
    }
    expect(existsSync(path.join(folder, ".lab"))).toBe(false);
  });

  // The stand-in writes down what it was started with.
  const noting = `${answering("lab").replace("*) exit 1", `*) printf '%s\\n' "$@" "brief $RESINWRIGHT_BRIEF" "$PWD" >started`)}`;

  it("starts it in the workbench, without questions, with the brief and the options it was given", async () => {
    const folder = workbench();
    const environment = { PATH: pathWith({ jupyter: noting }) };
    const brief = "data/briefs/screen-housing.json";
    const { code, printed, errors } = await open(folder, environment, brief, "--no-browser", "--port=8890");
    expect([code, errors]).toEqual([0, ""]);
    expect(printed).toBe(
      `JupyterLab 7.1 opens ${path.join(folder, "notebooks")}; Ctrl-C ends it and every kernel.`,
    );
    expect(readFileSync(path.join(folder, "started"), "utf8").trim().split("\n")).toEqual([
      ...["lab", "-y", `--notebook-dir=${folder}`, "--no-browser", "--port=8890"],
      ...[`brief ${path.join(folder, brief)}`, folder],
    ]);
  });

  it("leaves the brief to the cells if none is named", async () => {
    const folder = workbench();
    await open(folder, { PATH: pathWith({ jupyter: noting }) });
    expect(readFileSync(path.join(folder, "started"), "utf8")).toContain("\nbrief \n");
  });

  it("fails when Jupyter fails", async () => {
    const failing = answering("lab").replace("*) exit 1", "*) exit 3");
    expect((await open(workbench(), { PATH: pathWith({ jupyter: failing }) })).code).toBe(1);
  });

  it.each([
    [["none.json"], /none\.json: cannot be read \(ENOENT\); check the path$/],
    [
      ["a.json", "b.json"],
      /^npm run lab: "a\.json", "b\.json" given; it must be one brief, a \.json file; write options of Jupyter in one word, as in --port=8890$/,
    ],
    [["--port", "8890"], /^npm run lab: "8890" given; it must be one brief, a \.json file; write options/],
  ])("refuses %s before anything is started", async (words, message) => {
    const { code, errors } = await open(workbench(), { PATH: "" }, ...words);
    expect(code).toBe(2);
    expect(errors).toMatch(message);
  });

  it("refuses a folder without notebooks", async () => {
    const { code, errors } = await open(scratchFolder(), { PATH: "" });
    expect(code).toBe(2);
    expect(errors).toBe("notebooks: no .ipynb file in this folder; start in the folder of the workbench");
  });
});
