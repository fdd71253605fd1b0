// Moves every control of a page's panel and holds what it shows to what the library computes here, to the last digit.
/* global document, innerWidth, navigator */

import { readFileSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { assess, calibrate, formulate, parseJson, readRecipe } from "../../lib/dist/index.js";
import { openBrief } from "../../lib/dist/files.js";
import { readingOf } from "../../lib/dist/notebook/panel/reading.js";
import { controlsOf, withSettings } from "../../lib/dist/notebook/panel/settings.js";

/** Checks the panel of the page at `place`, if it has one, on a narrow screen and by keyboard. */
export async function checkPanel({ browser, place, check, axe }) {
  const html = readFileSync(place, "utf8");
  if (!html.includes(`<section class="panel"`)) return;
  const name = `${path.basename(place)}, panel`;
  const work = calibrate(openBrief(path.join("data", "briefs", /<p>Brief (\S+\.json) ·/.exec(html)[1])));
  const controls = controlsOf(work);
  const start = Object.fromEntries(controls.map(({ field, start }) => [field, start]));

  const context = await browser.newContext({
    viewport: { width: 360, height: 800 },
    permissions: ["clipboard-read", "clipboard-write"],
  });
  const page = await context.newPage();
  const requests = [];
  const troubles = [];
  const address = pathToFileURL(place).href;
  page.on("request", (request) => {
    if (request.url() !== address && !request.url().startsWith("data:")) requests.push(request.url());
  });
  page.on("pageerror", (error) => troubles.push(error.message));
  await page.goto(address);
  const panel = page.locator("section.panel");
  const box = (field) => panel.locator(`#resinwright-panel-1-${field}`);
  const slider = (field) => panel.locator(`#resinwright-panel-1-${field}-slider`);

  const atRest = async () => {
    await page.waitForTimeout(50);
    await page.waitForSelector("section.panel:not([aria-busy])", { timeout: 60_000 });
    return panel
      .locator("tbody tr")
      .evaluateAll((rows) => rows.map((row) => [...row.cells].map((cell) => cell.textContent)));
  };
  const before = readingOf(assess(work)).rows;
  const expected = (settings) =>
    readingOf(assess(withSettings(work, settings))).rows.map((row, i) => [
      `${row.property} (${row.unit})`,
      row.value,
      row.verdict ?? "–",
      row.target ?? "–",
      row.value === before[i].value ? "the same" : before[i].value,
    ]);
  const compare = async (what, settings) => {
    const [shown, computed] = [await atRest(), expected(settings)].map((rows) => JSON.stringify(rows));
    check(`${name}: ${what}: shows what Node computes`, shown === computed, `\n  ${shown}\n  ${computed}`);
  };
  const back = async () => {
    await panel.getByRole("button", { name: "Back to the brief" }).press("Enter");
    await atRest();
  };

  await compare("before anything is moved", start);
  for (const { field, min, max, label } of controls) {
    await slider(field).press("ArrowRight");
    const value = Number(await box(field).inputValue());
    check(`${name}: ${label}: an arrow key moves it`, value !== start[field], `${value}`);
    await compare(`${label} at ${value}`, { ...start, [field]: value });
    check(
      `${name}: ${label}: says what the brief has`,
      (await panel.locator(`#resinwright-panel-1-${field}-start`).textContent()).startsWith(
        "changed; the brief has",
      ),
    );
    const typed = Number((min + (max - min) / 3).toPrecision(3));
    await box(field).fill(String(typed));
    await compare(`${label} typed as ${typed}`, { ...start, [field]: typed });
    await box(field).fill("100000");
    const refusal = panel.locator(".refusal");
    await refusal
      .filter({ hasText: `panel: ${label} is 100000; it must be a number from` })
      .waitFor({ timeout: 5000 });
    await back();
    check(`${name}: ${label}: the refusal goes`, (await refusal.textContent()) === "");
  }
  await compare("back in the brief", start);

  // The least light and initiator there can be: where the window lets oxygen through, it never cures.
  const dim = Object.fromEntries(
    controls.map(({ field, start, min }) => [field, /irradiance|initiator/.test(field) ? min : start]),
  );
  for (const field of ["irradiance_mWcm2", "initiator_pct"]) await slider(field).press("Home");
  await compare("hardly any light", dim);

  await slider("share_pct").press("End");
  await atRest();
  await panel.getByRole("button", { name: "Copy as recipe" }).press("Enter");
  await panel.locator(".buttons [role=status]").filter({ hasText: "Copied." }).waitFor({ timeout: 5000 });
  const copied = await page.evaluate(() => navigator.clipboard.readText());
  const recipe = readRecipe(parseJson(copied, "copied.json"));
  const tried = withSettings(work, { ...dim, share_pct: 100 }).formulation;
  check(
    `${name}: the copied recipe is the formulation`,
    formulate({ recipe, shelf: work.shelf }).components.every(
      ({ massFraction }, i) => Math.abs(massFraction - tried.components[i].massFraction) < 1e-7,
    ),
    copied,
  );
  check(`${name}: it can be selected`, (await panel.getByRole("textbox").inputValue()) === copied);

  const wide = await page.evaluate(() => document.documentElement.scrollWidth - innerWidth);
  check(`${name}: nothing is wider than the page`, wide <= 0, `${wide} px`);
  await page.evaluate(axe);
  const violations = await page.evaluate(async () =>
    (await globalThis.axe.run("section.panel")).violations.map(({ id, nodes }) => `${id}: ${nodes[0].html}`),
  );
  check(`${name}: accessible after use`, violations.length === 0, violations.join("\n  "));
  check(`${name}: no request leaves the page`, requests.length === 0, requests.join("\n  "));
  check(`${name}: no error`, troubles.length === 0, troubles.join("\n  "));
  await context.close();
}
