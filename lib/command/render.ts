// `resinwright render`: runs notebooks under a brief and writes their pages. What it needs beyond the library comes with the
// workbench: kernel, tables, figures, type setting.

import { createRequire } from "node:module";
import { InputError } from "../door.js";
import type { Run } from "./act.js";

export const run: Run = async ({ operand, text, texts }, { folder, print, printError }) => {
  const missing = missingPackages();
  if (missing.length > 0) {
    throw new InputError(
      `render: notebooks need ${missing.join(", ")}, which this installation lacks; run it in the workbench, whose npm ci brings them`,
    );
  }
  const { renderAll } = await import("../notebook/program.js");
  return renderAll({
    folder,
    brief: operand!,
    print,
    printError,
    ...(texts["notebook"] === undefined ? {} : { notebooks: texts["notebook"] }),
    ...(text["to"] === undefined ? {} : { to: text["to"] }),
  });
};

/** The optional packages that are not there, as the library's own package names them. */
function missingPackages(): string[] {
  const require = createRequire(import.meta.url);
  const { peerDependencies } = require("resinwright/package.json") as { peerDependencies: object };
  return Object.keys(peerDependencies).filter((name) => {
    try {
      require.resolve(name);
      return false;
    } catch (error) {
      // Some packages let nothing be required; those are there.
      return (error as NodeJS.ErrnoException).code === "MODULE_NOT_FOUND";
    }
  });
}
