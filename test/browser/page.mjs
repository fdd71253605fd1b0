// Opens the pages of rendered folders in a browser, wide and narrow, light and dark, prints them, copies from them and moves
// what can be moved; weigh-out sheets are also read as printed. The first folder is seen in every view, others in the two that differ most.
// node test/browser/page.mjs [folder..., default rendered] [--shots <folder for pictures>]
/* global document, dispatchEvent, Event, innerWidth */

import { mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from "node:fs";
import { createRequire } from "node:module";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { check, tellCounts } from "./check.mjs";
import { launchBrowser } from "./launch.mjs";
import { checkCopying } from "./copying.mjs";
import { checkPanel } from "./panel.mjs";
import { checkSheet, isSheet } from "./sheet.mjs";

const words = process.argv.slice(2);
const shotsAt = words.indexOf("--shots");
const shots = shotsAt === -1 ? undefined : words.splice(shotsAt, 2)[1];
const folders = (words.length > 0 ? words : ["rendered"]).map((name) => path.resolve(name));
const axe = readFileSync(createRequire(import.meta.url).resolve("axe-core"), "utf8");
const views = [
  { width: 1280, colorScheme: "light" },
  { width: 1280, colorScheme: "dark" },
  { width: 360, colorScheme: "light" },
  { width: 360, colorScheme: "dark" },
];

// A4 less its margins, in CSS pixels, and less four lines of caption.
const printed_px = 986 - 80;

const browser = await launchBrowser();
if (shots !== undefined) mkdirSync(shots, { recursive: true });
try {
  for (const folder of folders) await checkFolder(folder);
} finally {
  await browser.close();
}
tellCounts();

async function checkFolder(folder) {
  const files = readdirSync(folder).filter((name) => name.endsWith(".html"));
  check(`${folder} has pages`, files.length > 0);
  for (const file of files) {
    const place = path.join(folder, file);
    const { size } = statSync(place);
    check(`${file}: at most 3 MB`, size <= 3e6, `${size} bytes`);
    for (const view of folder === folders[0] ? views : [views[0], views[3]]) await checkView(place, view);
    await checkWithoutScript(place);
    // A sheet is for paper: nothing on it is copied or moved.
    if (isSheet(place)) await checkSheet({ browser, place, check });
    else {
      if (folder === folders[0]) await checkCopying({ browser, place, check });
      await checkPanel({ browser, place, check, axe });
    }
  }
}

async function checkView(place, { width, colorScheme }) {
  const file = path.basename(place);
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
  const address = pathToFileURL(place).href;
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

  const cut = await page.evaluate(cutBoxes, width);
  check(`${name}: no table or formula is cut off`, cut.length === 0, cut.join(", "));
  const crossed = await page.evaluate(troubledTexts);
  check(`${name}: words of figures stand clear`, crossed.length === 0, crossed.join("\n  "));

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

  for (const slider of await page.locator(".moments input").all()) {
    const told = slider.locator("xpath=following-sibling::output");
    const before = await told.textContent();
    await slider.focus();
    await page.keyboard.press("Home");
    const after = await told.textContent();
    check(`${name}: the keyboard moves the slider`, before !== after, `${before} to ${after}`);
    check(
      `${name}: the slider says where it stands`,
      (await slider.getAttribute("aria-valuetext")) === after,
    );
    await page.keyboard.press("End");
  }

  const tall = await page.evaluate((page_px) => {
    dispatchEvent(new Event("beforeprint"));
    const plots = [...document.querySelectorAll("figure.drawn .plot")];
    const found = plots.map((plot) => plot.offsetHeight).filter((height) => height > page_px);
    dispatchEvent(new Event("afterprint"));
    return found;
  }, printed_px);
  check(`${name}: every figure prints on one page`, tall.length === 0, `${tall.join(", ")} px`);

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

/**
 * In the page: boxes whose content is wider than they are. On a narrow page numbers may run on under the finger; sentences and formulas
 * may not, and on a wide one nothing may.
 */
function cutBoxes(width) {
  const kinds = width >= 1280 ? "main .scroll" : "main .formula, main .scroll:has(> .sentences)";
  return [...document.querySelectorAll(kinds)]
    .filter((box) => box.closest("details") === null && box.scrollWidth > box.clientWidth)
    .map((box) => `${box.ariaLabel ?? box.className} by ${box.scrollWidth - box.clientWidth} px`);
}

/** In the page: words of figures that leave the drawing, lie on other words, are struck by an upright line, or stand askew. */
function troubledTexts() {
  const overlap = (a, b) => [
    Math.min(a.right, b.right) - Math.max(a.left, b.left),
    Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top),
  ];
  return [...document.querySelectorAll("figure.drawn")].flatMap((figure) => {
    const frame = figure.querySelector(".plot").getBoundingClientRect();
    const texts = [...figure.querySelectorAll(".main-svg text")].filter(
      ({ textContent }) => textContent !== "",
    );
    const placed = texts.map((text) => ({ words: text.textContent, box: text.getBoundingClientRect() }));
    const strokes = [...figure.querySelectorAll(".shapelayer path")]
      .map((path) => path.getBoundingClientRect())
      .filter((box) => box.width < 4);
    const askew = texts.filter((text) =>
      /rotate\((?!0[,)]|-90|90)/.test(text.getAttribute("transform") ?? ""),
    );
    return [
      ...askew.map((text) => `${text.textContent} stands askew`),
      ...placed
        .filter(({ box }) => box.left < frame.left - 2 || box.right > frame.right + 2)
        .map(({ words }) => `${words} leaves the drawing`),
      ...placed
        .filter(({ box }) =>
          strokes.some(
            (stroke) =>
              box.left + 1 < stroke.left && stroke.right < box.right - 1 && overlap(box, stroke)[1] > 2,
          ),
        )
        .map(({ words }) => `${words} is struck by a line`),
      ...placed.flatMap((one, i) =>
        placed
          .slice(i + 1)
          .filter(({ box }) => overlap(one.box, box).every((length) => length > 3))
          .map(({ words }) => `${one.words} lies on ${words}`),
      ),
    ].map((trouble) => `${figure.id}: ${trouble}`);
  });
}

async function checkWithoutScript(place) {
  const file = path.basename(place);
  const context = await browser.newContext({ javaScriptEnabled: false });
  const page = await context.newPage();
  await page.goto(pathToFileURL(place).href);
  const figures = await page.locator("figure.drawn").count();
  const seen = await page.locator("figure.drawn:has(noscript p) figcaption .name:visible").count();
  const tables = await page.locator("figure.drawn details.data table").count();
  check(`${file} without scripts: captions stand`, seen === figures, `${seen} of ${figures}`);
  check(`${file} without scripts: tables stand`, tables === figures, `${tables} of ${figures}`);
  const panels = await page.locator("section.panel").count();
  const told = await page.locator("section.panel:has(noscript p)").count();
  check(`${file} without scripts: a panel says what it needs`, told === panels, `${told} of ${panels}`);
  const dead = await page.locator("button").count();
  check(`${file} without scripts: no button that does nothing`, dead === 0, `${dead}`);
  await context.close();
}
