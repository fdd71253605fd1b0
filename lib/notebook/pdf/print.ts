// The program behind `npm run pdf`: prints every page of rendered/ to rendered/pdf/.
// A PDF appears under its name only when whole; what is needed on the way lies beside the pages, where a confined browser may read it.

import {
  mkdirSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  renameSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import path from "node:path";
import { parseArgs } from "node:util";
import { InputError, show, unknownName } from "../../door.js";
import type { Call } from "../call.js";
import { beforeExit } from "../cleanup.js";
import { onPaper, papers, type Paper } from "../pageStyle.js";
import { findBrowser, printPage } from "./browser.js";

/**
 * Prints the pages of the workbench in `folder`, on A4 or on the paper that `words` names: `--paper Letter`.
 * Returns the exit code: 0 done, 1 there are no pages, no browser, or one was not printed, 2 the words are wrong.
 */
export async function printPages(call: Call): Promise<0 | 1 | 2> {
  const { words, folder, environment, print, printError } = call;
  let paper: Paper;
  try {
    paper = paperOf(words);
  } catch (error) {
    printError((error as Error).message);
    return 2;
  }
  const home = path.join(folder, "rendered");
  try {
    const names = pagesIn(home);
    const browser = findBrowser(environment);
    await inWorkFolder(home, async (work) => {
      for (const name of names) {
        const page = path.join(work, name);
        writeFileSync(page, printable(readFileSync(path.join(home, name), "utf8"), paper));
        const printed = path.join(work, "printed.pdf");
        await printPage({ browser, profile: path.join(work, "profile"), page, file: printed }).catch(
          (error: unknown) => {
            throw new Error(`rendered/${name}: not printed: ${(error as Error).message}`);
          },
        );
        const file = path.join(home, "pdf", name.replace(/html$/, "pdf"));
        mkdirSync(path.dirname(file), { recursive: true });
        renameSync(printed, file);
        print(path.relative(folder, file));
      }
    });
    return 0;
  } catch (error) {
    printError((error as Error).message);
    return 1;
  }
}

function paperOf(words: readonly string[]): Paper {
  const { values, positionals } = parseArgs({
    args: [...words],
    options: { paper: { type: "string" } },
    strict: false,
  });
  const unknown = Object.keys(values).find((name) => name !== "paper");
  if (unknown !== undefined) throw new InputError(unknownName("npm run pdf", "option", unknown, ["paper"]));
  if (positionals.length > 0) {
    throw new InputError(`npm run pdf: ${show(positionals[0])} given; it takes no file and prints all pages`);
  }
  const { paper = "A4" } = values;
  const found = papers.find((name) => name.toLowerCase() === String(paper).toLowerCase());
  if (found !== undefined) return found;
  throw new InputError(`npm run pdf: paper is ${show(paper)}; it must be A4 or Letter, as in --paper Letter`);
}

function pagesIn(home: string): string[] {
  let names: string[] = [];
  try {
    names = readdirSync(home).filter((name) => name.endsWith(".html"));
  } catch {
    // No folder is told like an empty one.
  }
  if (names.length === 0) throw new InputError("rendered: no page in this folder; run npm start first");
  return names.sort();
}

// In a PDF a link to the page beside it would hold a path of this machine, which leads nowhere on another.
function printable(html: string, paper: Paper): string {
  const end = html.indexOf("</footer>");
  const body = html.slice(0, end).replace(/<a href="(?!#|[a-z]+:)[^"]*"/g, "<a");
  return onPaper(body + html.slice(end), paper);
}

async function inWorkFolder(home: string, work: (folder: string) => Promise<void>): Promise<void> {
  const folder = mkdtempSync(path.join(home, "printing-"));
  const clear = () => rmSync(folder, { recursive: true, force: true, maxRetries: 5 });
  const forget = beforeExit(clear);
  try {
    await work(folder);
  } finally {
    forget();
    clear();
  }
}
