// Prints the pages of rendered/ with `npm run pdf` and looks into the PDFs; poppler's tools, where they are, read the words.
// node test/browser/pdf.mjs

import { spawnSync } from "node:child_process";
import { readFileSync, readdirSync, rmSync } from "node:fs";
import path from "node:path";
import { check, tellCounts } from "./check.mjs";
import { isSheet } from "./sheet.mjs";

const pages = readdirSync("rendered").filter((name) => name.endsWith(".html"));
const canReadWords = spawnSync("pdftotext", ["-v"]).status === 0;
check("there are pages", pages.length > 0);

// The last is A4, as it is left to lie about.
for (const [paper, width_pt] of Object.entries({ Letter: 612, A4: 595 })) {
  rmSync(path.join("rendered", "pdf"), { recursive: true, force: true });
  const { status, stderr } = spawnSync("npm", ["run", "--silent", "pdf", "--", "--paper", paper], {
    encoding: "utf8",
  });
  check(`npm run pdf on ${paper}`, status === 0, stderr);
  for (const page of pages) checkPdf(page, paper, width_pt);
}
const left = readdirSync("rendered").filter((name) => !name.endsWith(".html") && name !== "pdf");
check("nothing is left over", left.length === 0, left.join(" "));
tellCounts();

function checkPdf(page, paper, width_pt) {
  const name = `${page} on ${paper}`;
  const file = path.join("rendered", "pdf", page.replace(/html$/, "pdf"));
  let pdf;
  try {
    pdf = readFileSync(file, "latin1");
  } catch {
    return check(`${name} is printed`, false);
  }
  check(`${name} is a PDF`, pdf.startsWith("%PDF-"));
  check(`${name} has pages`, /\/Type ?\/Page\b/.test(pdf));
  const width = Number(/\/MediaBox ?\[0 0 ([\d.]+)/.exec(pdf)?.[1]);
  const place = path.join("rendered", page);
  // A sheet is drawn up for one paper, across, whatever the pages are printed on.
  const wanted_pt = !isSheet(place) ? width_pt : page.includes("letter") ? 792 : 842;
  check(`${name} has its width`, Math.abs(width - wanted_pt) < 1, `${width} pt`);
  check(`${name} is tagged`, /\/Marked true/.test(pdf));
  check(`${name} tells no path of this machine`, !pdf.includes("file:"));
  if (!canReadWords) return;
  const title = /<h1>([^<]*)</.exec(readFileSync(place, "utf8"))[1];
  const words = spawnSync("pdftotext", [file, "-"], { encoding: "utf8" }).stdout;
  // Lines break at blanks and after hyphens.
  const letters = (text) => text.replaceAll("&amp;", "&").replace(/[\s-]/g, "");
  check(`${name} can be searched for its title`, letters(words).includes(letters(title)), title);
}
