// The browser that prints: found on the path, or named; it runs unseen, with a profile of its own, and asks no network.

import { execFile } from "node:child_process";
import { existsSync, readFileSync, statSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { InputError } from "../../door.js";
import { beforeExit } from "../cleanup.js";

const programs = ["chromium", "chromium-browser", "chrome"];
const pageLimit_ms = 120_000;

/**
 * The program of a browser of the Chromium family: the one that RESINWRIGHT_BROWSER names, or the first on the path.
 * @throws InputError saying how to get or name one.
 */
export function findBrowser(environment: NodeJS.ProcessEnv): string {
  const named = environment["RESINWRIGHT_BROWSER"];
  if (named) {
    if (statSync(named, { throwIfNoEntry: false })?.isFile()) return named;
    throw new InputError(
      `npm run pdf: RESINWRIGHT_BROWSER is "${named}"; no such file; give the full path of the browser's program`,
    );
  }
  const folders = (environment["PATH"] ?? environment["Path"] ?? "").split(path.delimiter);
  const ending = process.platform === "win32" ? ".exe" : "";
  const found = programs
    .flatMap((program) => folders.map((folder) => path.join(folder, program + ending)))
    .find((file) => existsSync(file));
  if (found !== undefined) return found;
  throw new InputError(
    "npm run pdf: no browser of the Chromium family is on the path; install one (Debian: apt install chromium), or give the " +
      "full path of its program in the environment variable RESINWRIGHT_BROWSER. Any browser prints the pages of rendered/ by hand, too.",
  );
}

/**
 * Prints `page` to the PDF `file`, without a header or footer of the browser's, with tags and an outline.
 * @throws Error with the browser's own words if no whole PDF is there when it has ended.
 */
export async function printPage(given: {
  readonly browser: string;
  readonly profile: string;
  readonly page: string;
  readonly file: string;
}): Promise<void> {
  const { browser, profile, page, file } = given;
  const words = await run(browser, [
    "--headless",
    "--disable-gpu",
    "--disable-extensions",
    "--disable-background-networking",
    "--no-first-run",
    // As root, as in a container, it runs only without its sandbox; it is shown nothing but our own pages.
    ...(process.getuid?.() === 0 ? ["--no-sandbox"] : []),
    `--user-data-dir=${profile}`,
    "--no-pdf-header-footer",
    "--generate-pdf-document-outline",
    `--print-to-pdf=${file}`,
    pathToFileURL(page).href,
  ]);
  const pdf = existsSync(file) ? readFileSync(file, "latin1") : "";
  if (!pdf.startsWith("%PDF-") || !pdf.trimEnd().endsWith("%%EOF")) {
    throw new Error(`${path.basename(browser)} gave no PDF\n${words.trim().replace(/^/gm, "    ")}`.trim());
  }
}

/** What a program said, however it ended, or why it did not run; it is stopped with this process, or when it takes too long. */
function run(program: string, words: readonly string[]): Promise<string> {
  return new Promise((resolve) => {
    const child = execFile(program, words, { timeout: pageLimit_ms }, (error, stdout, stderr) => {
      forget();
      const notRun = typeof error?.code === "string" ? error.message : "";
      const late = error?.killed ? `it was stopped after ${pageLimit_ms / 1000} s` : "";
      resolve([notRun, late, stdout, stderr].join("\n"));
    });
    const forget = beforeExit(() => child.kill());
  });
}
