// What a page says of its making.

import { createRequire } from "node:module";
import path from "node:path";
import type { Origin } from "./page.js";

/** The origin of what is made now from the brief in `file`. */
export function originOf(file: string): Origin {
  return {
    brief: path.basename(file),
    libraryVersion: (createRequire(import.meta.url)("resinwright/package.json") as { version: string })
      .version,
    nodeVersion: process.versions.node,
    date: new Date().toISOString().slice(0, 10),
  };
}
