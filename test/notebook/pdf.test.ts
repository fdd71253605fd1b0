import { chmodSync, existsSync, mkdirSync, readFileSync, readdirSync, writeFileSync } from "node:fs";
import path from "node:path";
import { describe, expect, it } from "vitest";
import { printPages } from "../../lib/notebook/pdf/print.js";
import { pageHtml } from "../../lib/notebook/page.js";
import { scratchFolder } from "./scratch.js";
import { told } from "./told.js";

const origin = { brief: "a.json", libraryVersion: "0.1.0", nodeVersion: "20.20.2", date: "2026-01-05" };
const links = `<a href="index.html">All</a> <a href="#main">here</a> <a href="https://example.org/">there</a>`;

const workbench = (...names: string[]) => {
  const folder = scratchFolder();
  mkdirSync(path.join(folder, "rendered"));
  for (const name of names) {
    const html = pageHtml({ title: name, main: links, origin, scripts: ["'<a href=\"x.html\">'"] });
    writeFileSync(path.join(folder, "rendered", name), html);
  }
  return folder;
};

// Stands in for a browser: the PDF it prints is the page it was shown, between a PDF's first and last words.
const standIn = `
  import { readFileSync, writeFileSync } from "node:fs";
  const file = process.argv.find((word) => word.startsWith("--print-to-pdf=")).slice(15);
  const page = readFileSync(new URL(process.argv.at(-1)), "utf8");`;
const printing = `${standIn} writeFileSync(file, "%PDF-1.4\\n" + page + "\\n%%EOF\\n");`;
const breakingOff = `${standIn} writeFileSync(file, "%PDF-1.4\\n" + page); console.error("no more ink");`;

const browserThat = (program: string, name = "browser") => {
  const folder = scratchFolder();
  writeFileSync(path.join(folder, name), `#!${process.execPath}\n${program}\n`);
  chmodSync(path.join(folder, name), 0o755);
  return path.join(folder, name);
};

const run = (folder: string, environment: NodeJS.ProcessEnv, ...words: string[]) =>
  told((telling) => printPages({ words, folder, environment, ...telling }));

describe("printPages", () => {
  it("leaves a PDF a page, and nothing else", async () => {
    const folder = workbench("01-a.html", "index.html");
    const { code, printed, errors } = await run(folder, { RESINWRIGHT_BROWSER: browserThat(printing) });
    expect([code, errors]).toEqual([0, ""]);
    expect(printed).toBe("rendered/pdf/01-a.pdf\nrendered/pdf/index.pdf");
    expect(readdirSync(path.join(folder, "rendered"))).toEqual(["01-a.html", "index.html", "pdf"]);
    expect(readdirSync(path.join(folder, "rendered", "pdf"))).toEqual(["01-a.pdf", "index.pdf"]);
  });

  const printedPage = async (...words: string[]) => {
    const folder = workbench("a.html");
    expect((await run(folder, { RESINWRIGHT_BROWSER: browserThat(printing) }, ...words)).code).toBe(0);
    return readFileSync(path.join(folder, "rendered", "pdf", "a.pdf"), "utf8");
  };

  it.each([
    [[], "A4"],
    [["--paper", "Letter"], "Letter"],
    [["--paper=letter"], "Letter"],
  ])("with %s prints on the paper of %s", async (words, size) => {
    const page = await printedPage(...words);
    expect(page.match(/@page { size: \w+;/g)).toEqual([`@page { size: ${size};`]);
  });

  it("keeps links within the page and to the web, and no path of this machine; scripts stay as they are", async () => {
    const page = await printedPage();
    expect(page).toContain(`<a>All</a> <a href="#main">here</a> <a href="https://example.org/">there</a>`);
    expect(page).toContain(`<script>'<a href="x.html">'</script>`);
  });

  it("takes the browser on the path", async () => {
    const folder = workbench("a.html");
    const PATH = path.dirname(browserThat(printing, "chromium"));
    expect((await run(folder, { PATH: `/nowhere${path.delimiter}${PATH}` })).code).toBe(0);
    expect(existsSync(path.join(folder, "rendered", "pdf", "a.pdf"))).toBe(true);
  });

  it("leaves the old PDF where the browser breaks off, and tells its words", async () => {
    const folder = workbench("a.html");
    mkdirSync(path.join(folder, "rendered", "pdf"));
    writeFileSync(path.join(folder, "rendered", "pdf", "a.pdf"), "old");
    const { code, errors } = await run(folder, { RESINWRIGHT_BROWSER: browserThat(breakingOff) });
    expect(code).toBe(1);
    expect(errors).toBe("rendered/a.html: not printed: browser gave no PDF\n    no more ink");
    expect(readFileSync(path.join(folder, "rendered", "pdf", "a.pdf"), "utf8")).toBe("old");
    expect(readdirSync(path.join(folder, "rendered"))).toEqual(["a.html", "pdf"]);
  });

  it.each<[string, NodeJS.ProcessEnv, string[], 1 | 2, RegExp]>([
    [
      "no browser",
      { PATH: "/nowhere" },
      [],
      1,
      /^npm run pdf: no browser of the Chromium family is on the path; install one \(Debian: apt install chromium\), or give the full path of its program in the environment variable RESINWRIGHT_BROWSER\./,
    ],
    [
      "a browser that is not there",
      { RESINWRIGHT_BROWSER: "/no/such" },
      [],
      1,
      /^npm run pdf: RESINWRIGHT_BROWSER is "\/no\/such"; no such file; give the full path of the browser's program$/,
    ],
    [
      "another paper",
      {},
      ["--paper", "A5"],
      2,
      /^npm run pdf: paper is "A5"; it must be A4 or Letter, as in --paper Letter$/,
    ],
    ["a paper without a name", {}, ["--paper"], 2, /^npm run pdf: paper is true; it must be A4 or Letter/],
    [
      "an unknown option",
      {},
      ["--papr=A4"],
      2,
      /^npm run pdf: unknown option "papr"; did you mean "paper"\?$/,
    ],
    ["a file", {}, ["a.html"], 2, /^npm run pdf: "a\.html" given; it takes no file and prints all pages$/],
  ])("refuses %s", async (_, environment, words, code, message) => {
    const result = await run(workbench("a.html"), environment, ...words);
    expect(result.code).toBe(code);
    expect(result.errors).toMatch(message);
  });

  it("sends to npm start where there are no pages", async () => {
    for (const folder of [workbench(), scratchFolder()]) {
      const { code, errors } = await run(folder, {});
      expect([code, errors]).toEqual([1, "rendered: no page in this folder; run npm start first"]);
    }
  });
});
