// What a page says of its making.

import path from "node:path";
import { libraryVersion } from "../lab/record/version.js";
import type { Origin } from "./page.js";

/** The origin of what is made now from the brief in `file`. */
export function originOf(file: string): Origin {
  return {
    brief: path.basename(file),
    libraryVersion: libraryVersion(),
    nodeVersion: process.versions.node,
    date: new Date().toISOString().slice(0, 10),
  };
}
