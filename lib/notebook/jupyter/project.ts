// What Jupyter is told about this workbench: a kernel and a few settings, in a folder of the workbench itself.
// Nothing is installed anywhere else. The folder names paths of this machine, so it is never committed.

import { mkdirSync, writeFileSync } from "node:fs";
import path from "node:path";
import { kernelPackage } from "../sockets.js";

/** The kernel as Jupyter starts it; the notebooks ask for it by the name of its folder, `tslab`. */
export function kernelSpec(): object {
  return {
    argv: [
      process.execPath,
      path.join(kernelPackage(), "bin", "tslab"),
      "kernel",
      "--config-path",
      "{connection_file}",
    ],
    display_name: "TypeScript",
    language: "typescript",
  };
}

// Read by Jupyter whatever its kind; settings of a kind that is not running do nothing.
const settings = `# Written by npm run lab each time it starts; changes made here are lost.

def without_outputs(model, **_):
    """Notebooks are stored without what they gave: it stays on the screen and is computed again after opening."""
    if model["type"] != "notebook" or model["content"]["nbformat"] != 4:
        return
    for cell in model["content"]["cells"]:
        if cell["cell_type"] == "code":
            cell["outputs"] = []
            cell["execution_count"] = None

c.ContentsManager.pre_save_hook = without_outputs
c.LabApp.default_url = "/lab/tree/notebooks"
c.JupyterNotebookApp.default_url = "/tree/notebooks"
c.NotebookApp.default_url = "/tree/notebooks"
`;

/**
 * Writes kernel and settings into `.lab` of the workbench in `folder`, and returns the environment in which Jupyter finds them
 * before any other of the same name.
 */
export function writeProject(folder: string, environment: NodeJS.ProcessEnv): NodeJS.ProcessEnv {
  const home = path.join(folder, ".lab");
  const kernel = path.join(home, "kernels", "tslab");
  mkdirSync(kernel, { recursive: true });
  writeFileSync(path.join(kernel, "kernel.json"), `${JSON.stringify(kernelSpec(), null, 2)}\n`);
  writeFileSync(path.join(home, "jupyter_config.py"), settings);
  const first = (others: string | undefined) => (others ? home + path.delimiter + others : home);
  return {
    ...environment,
    JUPYTER_PATH: first(environment["JUPYTER_PATH"]),
    JUPYTER_CONFIG_PATH: first(environment["JUPYTER_CONFIG_PATH"]),
  };
}
