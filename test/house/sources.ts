// The library's own source files.

import { readdirSync } from "node:fs";

/** Paths of all sources of the library from the top of the repository, sorted. */
export function librarySources(): string[] {
  return readdirSync("lib", { recursive: true, encoding: "utf8" })
    .filter((path) => path.endsWith(".ts") && !path.endsWith(".d.ts") && !/^(dist|node_modules)\//.test(path))
    .map((path) => `lib/${path}`)
    .sort();
}
