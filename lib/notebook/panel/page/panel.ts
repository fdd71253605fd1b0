// The panel of a page: runs in the reader's browser with the library itself, bundled, and asks nothing of any network.
// Stated values follow a control at once. Intervals take all draws, so they come when the controls have rested, a property at a
// time, and the page answers in between; a worker would need the page's security policy opened.

import { assess, assessing } from "../../../assess/assess.js";
import type { Case } from "../../../assess/case.js";
import { InputError } from "../../../door.js";
import { propertyNames } from "../../../recipe/propertyNames.js";
import { numberText } from "../../digits.js";
import type { AssessmentRow } from "../../verdicts.js";
import { caseOf } from "../plainCase.js";
import type { PanelContent } from "../panel.js";
import { readingOf, recipeText, type Reading } from "../reading.js";
import { controlsOf, withSettings, type Control, type Settings } from "../settings.js";
import { element, text } from "./element.js";

/** So long the controls must rest before intervals are computed. */
const REST_ms = 250;
/** As few as an interval of the usual level can be read from: only the stated values are shown of these. */
const FEW_DRAWS = 40;

function openPanel(section: HTMLElement): void {
  const content = JSON.parse(section.querySelector("script")!.textContent) as PanelContent;
  const work = caseOf(content.work);
  const controls = controlsOf(work);
  const start = Object.fromEntries(controls.map((one) => [one.field, one.start])) as Settings;
  let settings = start;

  const rows = controls.map((one) => controlRow(section.id, one, (value) => move(one.field, value)));
  const status = element("p", { role: "status", class: "panel-status" });
  const refusal = element("p", { role: "alert", class: "refusal" });
  const results = resultTable(content.start);
  const warnings = element("ul");
  const file = recipeFile(section.id);
  const back = element("button", { type: "button" }, text("Back to the brief"));
  back.addEventListener("click", () => {
    settings = start;
    for (const row of rows) row.show(start);
    compute();
  });

  section.append(
    element("div", { class: "controls" }, ...rows.map(({ node }) => node)),
    element("p", { class: "buttons" }, back, file.button, file.said),
    refusal,
    status,
    element("div", { class: "scroll", role: "region", "aria-label": "Panel table" }, results.node),
    element("p", { class: "caution" }, text(caution)),
    element(
      "details",
      { class: "panel-warnings", open: "" },
      element("summary", {}, text("What to know before using these numbers")),
      warnings,
    ),
    file.node,
  );
  for (const row of rows) row.mark(settings);
  file.show(work, []);
  show(content.start);

  function changed(): Control[] {
    return controls.filter(({ field, start }) => settings[field] !== start);
  }

  // An empty box is refused with the others that hold no number, where the settings are put in place.
  function move(field: keyof Settings, value: number | ""): void {
    settings = { ...settings, [field]: value };
    compute();
  }

  let frame = 0;
  let rest = 0;
  function compute(): void {
    cancelAnimationFrame(frame);
    clearTimeout(rest);
    section.setAttribute("aria-busy", "true");
    for (const row of rows) row.mark(settings);
    frame = requestAnimationFrame(() => {
      const tried = attempt(() => {
        const tried = withSettings(work, settings);
        results.showStated(statedValues(tried));
        file.show(tried, changed());
        return tried;
      });
      if (tried !== undefined) rest = setTimeout(() => settle(tried), REST_ms);
    });
  }

  function settle(tried: Case): void {
    const steps = assessing(tried);
    const step = (): void => {
      const next = attempt(() => steps.next());
      if (next === undefined) return;
      if (next.done) show(readingOf(next.value));
      else rest = setTimeout(step);
    };
    step();
  }

  /** Runs what an input may make impossible; says why it is, and leaves the numbers of the last possible settings. */
  function attempt<T>(act: () => T): T | undefined {
    try {
      const made = act();
      refusal.textContent = "";
      return made;
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      refusal.textContent = `${error.message}. Table and recipe stay as they were.`;
      results.showLast();
      section.removeAttribute("aria-busy");
      return undefined;
    }
  }

  function show(reading: Reading): void {
    results.show(reading);
    warnings.replaceChildren(...reading.warnings.map((message) => element("li", {}, text(message))));
    if (reading.warnings.length === 0) warnings.append(element("li", {}, text("No warning.")));
    section.removeAttribute("aria-busy");
    status.textContent = statusText(reading, changed());
  }
}

const caution =
  "These are estimates to plan with, not settings to print with. Warm resin no further than its safety data sheets allow, and wear gloves and eye protection: uncured resin sensitises skin, and the engine's light harms eyes.";

/** What follows a control at once, in the order of the properties. */
function statedValues(work: Case): string[] {
  const { properties } = assess({ ...work, draws: FEW_DRAWS });
  return propertyNames.map((name) => {
    const property = properties[name];
    return property.outcome === "value" ? numberText(property.value, 3) : "never cures";
  });
}

function statusText({ rows, draws, level }: Reading, changed: readonly Control[]): string {
  const verdicts = rows.flatMap(({ verdict }) => verdict ?? []);
  const counted = (outcome: string) => verdicts.filter((verdict) => verdict.startsWith(outcome)).length;
  const what =
    changed.length === 0
      ? "As in the brief"
      : `Changed from the brief: ${changed.map(({ label }) => label).join(", ")}`;
  const targets =
    verdicts.length === 0
      ? "The brief sets no target"
      : `${counted("meets")} of ${verdicts.length} targets met, ${counted("fails")} failed, ${counted("cannot tell")} cannot be told`;
  return `${what}. ${targets}. ${numberText(100 * level)} % intervals from ${draws} draws.`;
}

/** A slider and a number box for one setting, with where the brief has it. */
function controlRow(panel: string, control: Control, moved: (value: number | "") => void) {
  const { field, label, unit, min, max, step } = control;
  const id = `${panel}-${field}`;
  const range = { min: String(min), max: String(max), step: String(step) };
  const about = { "aria-describedby": `${id}-start` };
  const slider = element("input", {
    type: "range",
    id: `${id}-slider`,
    "aria-labelledby": `${id}-name`,
    ...range,
    ...about,
  });
  const box = element("input", { type: "number", id, ...range, ...about });
  const mark = element("span", { id: `${id}-start`, class: "at-start" });
  const show = (settings: Settings): void => {
    const shown = Number(settings[field]!.toPrecision(4));
    box.value = String(shown);
    slider.value = String(shown);
    sayValue();
  };
  const sayValue = (): void => slider.setAttribute("aria-valuetext", `${box.value} ${unit}`);
  slider.addEventListener("input", () => {
    box.value = slider.value;
    sayValue();
    moved(Number(slider.value));
  });
  box.addEventListener("input", () => {
    slider.value = box.value;
    sayValue();
    moved(box.value === "" ? "" : Number(box.value));
  });
  show({ [field]: control.start });
  const node = element(
    "div",
    { class: "control" },
    element("label", { for: id, id: `${id}-name` }, text(label)),
    slider,
    element("span", { class: "amount" }, box, element("span", { class: "unit" }, text(unit))),
    mark,
  );
  return {
    node,
    show,
    mark: (settings: Settings): void => {
      const same = settings[field] === control.start;
      mark.textContent = same
        ? "as in the brief"
        : `changed; the brief has ${numberText(control.start)} ${unit}`;
    },
  };
}

/** The table of results: the last reading, or stated values while intervals are on their way. */
function resultTable(start: Reading) {
  const titles = ["property", "value and interval", "verdict", "target", "in the brief"];
  const body = element("tbody");
  const heads = titles.map((title) => element("th", { scope: "col" }, text(title)));
  const node = element(
    "table",
    {},
    element("caption", {}, element("span", {}, text("What the models say at these settings"))),
    element("thead", {}, element("tr", {}, ...heads)),
    body,
  );
  let last = start;
  const fill = (words: (row: AssessmentRow, before: string, i: number) => readonly string[]): void => {
    const rows = last.rows.map((row, i) => {
      const unit = element("span", { class: "unit" }, text(`(${row.unit})`));
      const cells = words(row, start.rows[i]!.value, i);
      const set = cells.map((cell, i) => element("td", i === 0 ? { class: "value" } : {}, text(cell)));
      return element("tr", {}, element("th", { scope: "row" }, text(`${row.property} `), unit), ...set);
    });
    body.replaceChildren(...rows);
  };
  const showLast = (): void =>
    fill(({ value, verdict, target }, before) => [
      value,
      verdict ?? "–",
      target ?? "–",
      value === before ? "the same" : before,
    ]);
  return {
    node,
    showLast,
    show: (reading: Reading): void => {
      last = reading;
      showLast();
    },
    showStated: (stated: readonly string[]): void =>
      fill(({ target }, before, i) => [
        `${stated[i]} (interval follows)`,
        target === null ? "–" : "follows",
        target ?? "–",
        before,
      ]),
  };
}

/** The formulation as a file to copy, and what the brief would have to say beside it. */
function recipeFile(panel: string) {
  const id = `${panel}-recipe`;
  const area = element("textarea", { id, rows: "12", readonly: "", spellcheck: "false" });
  const beside = element("p");
  const node = element(
    "details",
    { class: "panel-recipe" },
    element("summary", {}, text("The formulation as a file")),
    element("label", { for: id }, text("Save it in formulations/ and name it in the brief.")),
    area,
    beside,
  );
  // The page's own script copies what a button names, and says so in the element after it.
  const button = element("button", { type: "button", "data-copies": id }, text("Copy as recipe"));
  button.addEventListener("click", () => (node.open = true));
  return {
    node,
    button,
    said: element("span", { role: "status", class: "said" }),
    show: ({ formulation }: Case, changed: readonly Control[]): void => {
      area.value = recipeText(formulation);
      const ofBrief = changed.filter(
        ({ field }) => field === "irradiance_mWcm2" || field === "temperature_C",
      );
      beside.textContent =
        ofBrief.length === 0
          ? "The brief stays as it is."
          : `The brief changes, too: ${ofBrief.map(({ field }) => field).join(" and ")} as set above.`;
    },
  };
}

for (const section of document.querySelectorAll<HTMLElement>("section.panel")) openPanel(section);
