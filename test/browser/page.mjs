// Opens the pages of a rendered folder in a browser, wide and narrow, light and dark, and prints them.
// Weigh-out sheets are also read as printed: nothing cut, no row split. node test/browser/page.mjs [folder, default rendered]
// [--shots <folder for pictures>]
/* global document, getComputedStyle, innerWidth */

import { mkdirSync, readFileSync, readdirSync, writeFileSync } from "node:fs";
import { spawnSync } from "node:child_process";
import { createRequire } from "node:module";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { chromium } from "playwright-core";

const words = process.argv.slice(2);
const shotsAt = words.indexOf("--shots");
const shots = shotsAt === -1 ? undefined : words.splice(shotsAt, 2)[1];
const folder = path.resolve(words[0] ?? "rendered");
const axe = readFileSync(createRequire(import.meta.url).resolve("axe-core"), "utf8");
const views = [
  { width: 1280, colorScheme: "light" },
  { width: 1280, colorScheme: "dark" },
  { width: 360, colorScheme: "light" },
  { width: 360, colorScheme: "dark" },
];

let passed = 0;
let failed = 0;
const check = (what, met, found = "") => {
  if (met) return void passed++;
  failed++;
  console.log(`FAILED ${what} ${found}`.trim());
};

const browser = await chromium.launch({
  executablePath: process.env.CHROMIUM ?? "/usr/bin/chromium",
  args: [
    "--no-sandbox",
    "--disable-gpu",
    "--disable-quic",
    "--no-first-run",
    "--disable-background-networking",
    "--disable-component-update",
    "--disable-sync",
  ],
});
const files = readdirSync(folder).filter((name) => name.endsWith(".html"));
check(`${folder} has pages`, files.length > 0);
if (shots !== undefined) mkdirSync(shots, { recursive: true });
try {
  for (const file of files) {
    for (const view of views) await checkView(file, view);
    await checkWithoutScript(file);
    if (/<main [^>]*class="page sheet"/.test(readFileSync(path.join(folder, file), "utf8")))
      await checkSheet(file);
  }
} finally {
  await browser.close();
}
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed === 0 ? 0 : 1;

async function checkView(file, { width, colorScheme }) {
  const name = `${file} at ${width} px, ${colorScheme}`;
  const context = await browser.newContext({ viewport: { width, height: 800 }, colorScheme });
  const page = await context.newPage();
  const troubles = [];
  const requests = [];
  page.on("console", (message) => {
    if (["error", "warning"].includes(message.type())) troubles.push(message.text());
  });
  page.on("pageerror", (error) => troubles.push(error.message));
  page.on("dialog", (dialog) => {
    troubles.push(`dialog ${dialog.message()}`);
    void dialog.dismiss();
  });
  const address = pathToFileURL(path.join(folder, file)).href;
  page.on("request", (request) => {
    if (request.url() !== address && !request.url().startsWith("data:")) requests.push(request.url());
  });
  await page.goto(address);

  const figures = await page.locator("figure.drawn").count();
  const drawn = await page.locator("figure.drawn .plot:has(svg.main-svg)").count();
  check(`${name}: every figure is drawn`, figures === drawn, `${drawn} of ${figures}`);
  const wide = await page.evaluate(() => document.documentElement.scrollWidth - innerWidth);
  check(`${name}: nothing is wider than the page`, wide <= 0, `${wide} px`);
  const tooWide = await page.evaluate(
    () =>
      [...document.querySelectorAll("figure.drawn svg.main-svg")].filter(
        (svg) => svg.getBoundingClientRect().right > innerWidth,
      ).length,
  );
  check(`${name}: figures fit`, tooWide === 0, `${tooWide} do not`);

  await page.evaluate(() => document.querySelectorAll("details").forEach((details) => (details.open = true)));
  await page.waitForTimeout(100);
  await page.evaluate(axe);
  const violations = await page.evaluate(async () => {
    const result = await globalThis.axe.run();
    return result.violations
      .filter(({ impact }) => ["serious", "critical"].includes(impact))
      .map(({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(" | ")}`);
  });
  check(`${name}: accessible`, violations.length === 0, violations.join("\n  "));
  await page.evaluate(() =>
    document.querySelectorAll("details").forEach((details) => (details.open = false)),
  );

  await page.keyboard.press("Tab");
  const first = await page.evaluate(() => document.activeElement?.className);
  check(`${name}: the first stop of the keyboard skips to the text`, first === "skip", first);
  if (shots !== undefined) {
    await page.evaluate(() => document.activeElement?.blur());
    await page.screenshot({
      path: path.join(shots, `${path.basename(file, ".html")}-${width}-${colorScheme}.png`),
      fullPage: true,
    });
  }

  const pdf = await page.pdf({ preferCSSPageSize: true, printBackground: true });
  check(
    `${name}: prints`,
    pdf.subarray(0, 5).toString() === "%PDF-" && pdf.length > 2000,
    `${pdf.length} bytes`,
  );
  check(`${name}: no error in the console`, troubles.length === 0, troubles.join("\n  "));
  check(`${name}: no request leaves the page`, requests.length === 0, requests.join("\n  "));
  if (shots !== undefined && width === 1280) {
    writeFileSync(path.join(shots, `${path.basename(file, ".html")}-${colorScheme}.pdf`), pdf);
  }
  await context.close();
}

async function checkWithoutScript(file) {
  const context = await browser.newContext({ javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(pathToFileURL(path.join(folder, file)).href);
  const figures = await page.locator("figure.drawn").count();
  const seen = await page.locator("figure.drawn:has(noscript p) figcaption .name:visible").count();
  const tables = await page.locator("figure.drawn details.data table").count();
  check(`${file} without scripts: captions stand`, seen === figures, `${seen} of ${figures}`);
  check(`${file} without scripts: tables stand`, tables === figures, `${tables} of ${figures}`);
  await context.close();
}

/** The sheet as it prints, and again with forty portions, so that it runs over pages. */
async function checkSheet(file) {
  const paper_mm = file.includes("letter") ? [279.4, 215.9] : [297, 210];
  // The side margins of a sheet are 12 mm.
  const width = Math.floor(((paper_mm[0] - 24) / 25.4) * 96);
  const context = await browser.newContext({ viewport: { width, height: 700 } });
  const page = await context.newPage();
  await page.goto(pathToFileURL(path.join(folder, file)).href);
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
