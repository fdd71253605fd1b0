// The version of this library, which every record names.

import { createRequire } from "node:module";

/**
 * The version of the library that runs, as its package states it.
 * @example
 * ```ts
 * import { libraryVersion } from "resinwright/files";
 * /^\d+\.\d+\.\d+/.test(libraryVersion()); // → true
 * ```
 */
export function libraryVersion(): string {
  return (createRequire(import.meta.url)("resinwright/package.json") as { version: string }).version;
}
