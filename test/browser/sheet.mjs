// A weigh-out sheet read as printed: nothing cut, nothing too small, no row split, a head and a number on every page.
/* global document, getComputedStyle, innerWidth */

import { spawnSync } from "node:child_process";
import { readFileSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";

/** Whether a page is a weigh-out sheet. */
export const isSheet = (place) => /<main [^>]*class="page sheet"/.test(readFileSync(place, "utf8"));

/** The sheet as it prints, and again with forty portions, so that it runs over pages. */
export async function checkSheet({ browser, place, check }) {
  const file = path.basename(place);
  const paper_mm = file.includes("letter") ? [279.4, 215.9] : [297, 210];
  // The side margins of a sheet are 12 mm.
  const width = Math.floor(((paper_mm[0] - 24) / 25.4) * 96);
  const context = await browser.newContext({ viewport: { width, height: 700 } });
  const page = await context.newPage();
  await page.goto(pathToFileURL(place).href);
  await page.emulateMedia({ media: "print" });
  const cut = await page.evaluate(() => [
    ...[document.documentElement].filter((root) => root.scrollWidth > innerWidth).map(() => "the page"),
    ...[...document.querySelectorAll("main th, main td, main dd, main li")]
      .filter((cell) => cell.scrollWidth > cell.clientWidth + 1 && cell.clientWidth > 0)
      .map((cell) => cell.textContent),
    ...[...document.querySelectorAll("main table")]
      .filter((table) => table.getBoundingClientRect().right > innerWidth)
      .map((table) => table.caption.textContent),
  ]);
  check(`${file}, printed: nothing is cut`, cut.length === 0, cut.join(" | "));
  const small = await page.evaluate(() =>
    [...document.querySelectorAll("body *")]
      .filter((part) => part.checkVisibility() && [...part.childNodes].some((node) => node.data?.trim()))
      .map((part) => ({ size: parseFloat(getComputedStyle(part).fontSize), text: part.textContent }))
      .filter(({ size }) => size < (10 / 72) * 96 - 0.01)
      .map(({ size, text }) => `${size} px: ${text.slice(0, 40)}`),
  );
  check(`${file}, printed: nothing is smaller than ten points`, small.length === 0, small.join(" | "));

  const rows = await page.evaluate(() => {
    const body = document.querySelector(".weigh tbody");
    const models = [...body.rows];
    for (let i = models.length; i < 40; i++) body.append(models[i % models.length].cloneNode(true));
    [...body.rows].forEach((row, i) => {
      row.cells[0].textContent = `first${i}x`;
      row.cells[1].append(` last${i}x`);
    });
    return body.rows.length;
  });
  const pdf = await page.pdf({ preferCSSPageSize: true });
  const [wide, high] = /\/MediaBox \[0 0 ([\d.]+) ([\d.]+)\]/
    .exec(pdf.toString("latin1"))
    .slice(1)
    .map(Number);
  const off_mm = [wide, high].map((points, i) => Math.abs((points / 72) * 25.4 - paper_mm[i]));
  check(`${file}, printed: across its paper`, Math.max(...off_mm) < 0.5, `${wide} by ${high} points`);
  const read = spawnSync("pdftotext", ["-layout", "-", "-"], { input: pdf, encoding: "utf8" });
  if (read.error !== undefined) {
    console.log(`${file}: pdftotext is not here, so the printed pages were not read`);
  } else {
    const pages = read.stdout.split("\f");
    const pageOf = (word) => pages.findIndex((text) => text.includes(word));
    const numbers = Array.from({ length: rows }, (_, i) => i);
    const split = numbers.filter((i) => pageOf(`first${i}x`) !== pageOf(`last${i}x`));
    const lost = numbers.filter((i) => pageOf(`first${i}x`) === -1);
    check(`${file}, printed: no row is split or lost`, [...split, ...lost].length === 0, `${split} ${lost}`);
    const bare = pages.filter((text) => /first\d+x/.test(text) && !text.includes("Low to high"));
    check(
      `${file}, printed: every page of the table has its head`,
      bare.length === 0,
      `${bare.length} have not`,
    );
    const weighing = pages.filter((text) => /first\d+x/.test(text)).length;
    check(`${file}, printed: forty portions take several pages`, weighing > 2, `${weighing}`);
    const unnumbered = pages
      .slice(0, -1)
      .filter((text, i) => !text.includes(`page ${i + 1} of ${pages.length - 1}`));
    check(`${file}, printed: pages are numbered`, unnumbered.length === 0, `${unnumbered.length} are not`);
  }
  await context.close();
}
