import { describe, expect, it } from "vitest";
import { weighOut } from "../../lib/lab/batch.js";
import { screenHazards, type HazardScreening } from "../../lib/lab/hazards.js";
import { readSafetyRules } from "../../lib/lab/hazards/files.js";
import { embed, extract } from "../../lib/notebook/content.js";
import { sheetOf, weighOutPage } from "../../lib/notebook/sheet.js";
import type { SheetContent } from "../../lib/notebook/sheet/content.js";
import { sheetHtml } from "../../lib/notebook/sheet/page.js";
import { openBrief } from "../../lib/recipe/files.js";
import { formulationOf, sure } from "../fixtures.js";

const { brief, formulation } = openBrief("data/briefs/flow-cell.json");
const rules = readSafetyRules("data/rules");
const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
const prices = { currency: "EUR", prices_perkg: { UDMA: 24 } };
const sheet = weighOut({ formulation, batch_g: 500, balance, prices });
const screening = screenHazards({ formulation, rules, draws: 100 });
const content = sheetOf({ sheet, screening, brief });
const origin = { brief: "flow-cell.json", libraryVersion: "1.2.3", nodeVersion: "20", date: "2026-01-05" };
const page = weighOutPage({ sheet, screening, brief, paper: "A4", origin });

const screened = (of: typeof formulation): HazardScreening => ({
  ...screening,
  formulation: of.id,
  ingredients: [],
});
const textOf = (html: string) =>
  html
    .replace(/<style>[^]*?<\/style>/, "")
    .replace(/<[^>]*>/g, " ")
    .replace(/\s+/g, " ");

describe("sheetOf", () => {
  it("holds each portion in its order, masses as the balance shows them", () => {
    expect(content.portions.map(({ line, portion, target }) => [line, portion, target])).toEqual([
      [1, "IBOA", "147.750"],
      [2, "master batch of MEHQ in IBOA", "2.500"],
      [3, "TEGDMA", "68.000"],
      [4, "BBOT", "0.750"],
      [5, "BAPO", "6.000"],
      [6, "UDMA", "275.000"],
    ]);
    expect(content.portions[0]).toMatchObject({
      identity: "5888-33-5",
      reason: "The thinnest liquid first: solids dissolve fastest in it",
      notes: [],
      limits: "147.015 to 148.485",
      total: "147.750",
      lot: "",
    });
    expect(content.portions.at(-1)!.total).toBe("500.000");
  });

  it("says where amber light begins, once, and which portions are made before", () => {
    expect(content.portions.map(({ notes }) => notes)).toEqual([
      [],
      ["Made before, as above"],
      [],
      [],
      ["Amber light from here on"],
      [],
    ]);
  });

  it("works each master batch out", () => {
    expect(content.masterBatches[0]).toEqual({
      title: "Master batch of MEHQ in IBOA, for step 2",
      weighings: [
        { what: "MEHQ", target: "1.600" },
        { what: "IBOA", target: "14.400" },
      ],
      notes: [
        "The batch needs 0.250 g of MEHQ, too little to weigh by itself.",
        "Weigh to the last digit: it is taken to hold 10 % MEHQ, to 0.051 % of that (one standard uncertainty).",
        "Makes 16.000 g, enough for 6 of this batch.",
        "Whether it dissolves is not known here, try a little first; stir until clear.",
      ],
    });
  });

  it("says of a master batch what the shelf knows of its solubility, and that it is large", () => {
    const components = formulationOf({ THICK: 49.9, THIN: 50, AB: 0.1 }).components.map((one) =>
      one.ingredient.id === "AB"
        ? { ...one, ingredient: { ...one.ingredient, solubility_pct: sure(0.8, 0.5) } }
        : one,
    );
    const hard = { ...formulation, id: "test", components };
    const { masterBatches } = sheetOf({
      sheet: weighOut({ formulation: hard, batch_g: 300, balance }),
      screening: screened(hard),
      brief,
    });
    expect(masterBatches[0]!.notes.slice(-2)).toEqual([
      "Makes 533.334 g, enough for 5 of this batch. That is more than the batch itself: a balance with a smaller minimum weight needs less.",
      "It holds 0.3 %, and the shelf says that 0.8 ± 0.5 % dissolves; stir until clear.",
    ]);
  });

  it("says of a portion below the minimum weight that is weighed by itself how far its limits are drawn in", () => {
    const { reason, limits } = content.portions[3]!;
    expect(limits).toBe("0.749 to 0.751");
    expect(reason).toMatch(
      /; below the minimum weight of this balance, and a master batch in which it is sure to dissolve would be 250 g, more than the diluents allow: weigh it by itself, within limits drawn in by 0\.0018 g for the doubt of the balance$/,
    );
  });

  it("numbers the stages of a master batch that needs several", () => {
    const thin = formulationOf({ THICK: 49.99, THIN: 50, AB: 0.01 });
    const coarse = { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 };
    const staged = weighOut({ formulation: thin, batch_g: 1000, balance: coarse });
    const [master] = sheetOf({ sheet: staged, screening: screened(thin), brief }).masterBatches;
    expect(master!.weighings.map(({ what }) => what)).toEqual([
      "for stage 1: AB",
      "for stage 1: THIN",
      "for stage 2: stage 1 of AB in THIN",
      "for stage 2: THIN",
    ]);
  });

  it("says what is too little where no master batch helps, and how many loads a portion takes", () => {
    const plain = formulationOf({ THICK: 98, PI: 2 });
    const of = (batch_g: number) =>
      sheetOf({
        sheet: weighOut({ formulation: plain, batch_g, balance }),
        screening: screened(plain),
        brief: { ...brief, avoid: [] },
      });
    const small = of(10);
    expect(small.portions.find(({ portion }) => portion === "PI")!.notes).toContain(
      "Too little for this balance: see the warning",
    );
    expect(small.warnings).toEqual([
      "PI: 0.2 g is below the 1.6 g that this balance weighs honestly, and no diluent is left for a master batch; make at least 23.08 g or use a balance whose minimum weight is 0.2 g.",
    ]);
    expect(of(1500).portions[0]!.notes).toContain("In 3 loads");
  });

  it("warns of what the brief says to avoid", () => {
    const avoid = [{ ingredient: "BAPO", reason: "for a test" }];
    expect(sheetOf({ sheet, screening, brief: { ...brief, avoid } }).warnings).toEqual([
      "Do not mix this: the brief says to avoid BAPO (for a test).",
    ]);
    expect(content.warnings).toEqual([]);
  });

  it("gives size, volume, balance, limits and cost as facts", () => {
    const facts = new Map(content.facts.map(({ name, text }) => [name, text]));
    expect(facts.get("Formulation")).toBe("flow-cell-a");
    expect(facts.get("Brief")).toBe(brief.title);
    expect(facts.get("Size")).toMatch(/^500 g, about 4\d\d mL at 1\.\d\d g\/cm³ \(additive volumes\)$/);
    expect(facts.get("Balance")).toBe("reads 0.001 g, up to 600 g; honest from 1.600 g");
    expect(facts.get("Limits")).toBe("keep every share within 1 % of itself");
    // 275 g at 24 EUR/kg; nothing else has a price.
    expect(facts.get("Cost")).toBe("EUR 6.60, without IBOA, MEHQ, TEGDMA, BBOT, BAPO (no price given)");
  });

  it("leaves the volume out where a density is not known", () => {
    const [first, ...rest] = formulation.components;
    const unknown = {
      ...formulation,
      components: [{ ...first!, ingredient: { ...first!.ingredient, density_gcm3: undefined } }, ...rest],
    };
    const { facts } = sheetOf({
      sheet: weighOut({ formulation: unknown, batch_g: 500, balance }),
      screening,
      brief,
    });
    expect(facts.find(({ name }) => name === "Size")!.text).toBe("500 g");
  });

  it("holds the hazards of exactly these ingredients, and who has not been looked at", () => {
    expect(content.hazards.map(({ ingredient }) => ingredient)).toEqual(
      formulation.components.map(({ ingredient }) => ingredient.id),
    );
    expect(content.hazards[1]).toEqual({
      ingredient: "IBOA",
      name: "isobornyl acrylate",
      cas: "5888-33-5",
      statements: "H317, H319, H335, H410",
    });
    expect(content.hazards[4]!.statements).toBe("nobody has checked");
    expect(content.findings[0]).toMatch(/^If all of it cures at once it warms by \d+ \(\d+ to \d+\) K/);
    expect(content.findings[1]).toMatch(/^H317 .*: the mixture reaches the generic limit of 1 % with/);
    expect(content.protection).toEqual(screening.protection.map(({ text }) => text));
    expect(content.storage).toEqual(screening.storage.map(({ text }) => text));
  });

  it("refuses the screening of another formulation", () => {
    expect(() => sheetOf({ sheet, screening: { ...screening, formulation: "other" }, brief })).toThrow(
      'sheet of "flow-cell-a": the screening is of "other"; screen the formulation that is weighed out',
    );
  });

  it("survives the way from a cell to the renderer, and cannot name a file outside the folder", () => {
    expect(extract(embed(content))).toEqual(content);
    expect(() => extract(embed({ ...content, name: "../../index" }))).toThrow(
      "output sheet: name: must be small letters, digits and hyphens",
    );
  });
});

describe("weighOutPage", () => {
  it("holds everything a person at the balance needs", () => {
    const text = textOf(page);
    for (const words of [
      "Weigh out 500 g: Flow-cell resin, first proposal",
      "Batch (name on the bottle)",
      "Computed 2026-01-05, by resinwright 1.2.3",
      "Screening only: the suppliers' safety data sheets, local rules and a competent person decide.",
      "Make first: master batches",
      "Low to high (g)",
      "In the vessel (g)",
      "Initials",
      "UDMA CAS 72869-86-4",
      "Warmed until it pours, no warmer than its safety data sheet allows",
      "If a portion is weighed wrong",
      "“Putting it right”",
      "Keeping it",
      "Used resin does not go back into the bottle.",
    ])
      expect(text).toContain(words);
  });

  it("has room to write lot, mass and initials, and a box to tick, for every weighing", () => {
    const weighings = content.portions.length + content.masterBatches.flatMap((one) => one.weighings).length;
    expect(page.match(/<td class="pen">/g)).toHaveLength(4 * weighings);
    expect(page.match(/<span class="tick">/g)).toHaveLength(weighings);
  });

  it("is set for its paper, across, with the batch and the page on every page", () => {
    const letter = weighOutPage({ sheet, screening, brief, paper: "Letter", origin });
    expect(page).toContain("size: A4 landscape;");
    expect(letter).toContain("size: letter landscape;");
    expect(page).toContain('content: "page " counter(page) " of " counter(pages);');
    expect(page).toContain('content: "flow\\2d cell\\2d a\\2c  500 g\\2c  computed 2026\\2d 01\\2d 05";');
    expect(letter).toContain(
      "<title>Weigh out 500 g: Flow-cell resin, first proposal (invented for the demo) (US Letter)</title>",
    );
  });

  it("never splits a row, and repeats its head", () => {
    expect(page).toMatch(/table, tr, [^{]*\{ break-inside: avoid; \}/);
    expect(page).toContain("thead { display: table-header-group; }");
  });

  it("prints nothing smaller than ten points", () => {
    const style = /@media print \{\n {2}:root[^]*?<\/style>/.exec(page)![0];
    const sizes = [...style.matchAll(/font-size: ([\d.]+)pt/g)].map(([, size]) => Number(size));
    expect(sizes.length).toBeGreaterThan(5);
    expect(Math.min(...sizes)).toBeGreaterThanOrEqual(10);
  });

  it("asks nothing of any network and runs no script", () => {
    expect(page).toContain("default-src 'none'; script-src 'none'");
    expect(page).not.toMatch(/<script|<link|<img|<iframe|@import|url\(|https?:/);
  });

  it("leaves out what there is none of", () => {
    const plain = formulationOf({ THICK: 60, THIN: 40 });
    const bare = weighOutPage({
      sheet: weighOut({ formulation: plain, batch_g: 500, balance }),
      screening: screened(plain),
      brief,
      paper: "A4",
      origin,
    });
    expect(bare).not.toContain("Make first");
    expect(bare).not.toContain("Stop: read this first");
    expect(page).not.toContain("Stop: read this first");
  });

  it("shows warnings before anything else is weighed", () => {
    const text = sheetHtml({ content: { ...content, warnings: ["PI: too little"] }, paper: "A4", origin });
    expect(text.indexOf("PI: too little")).toBeGreaterThan(text.indexOf("Stop: read this first"));
    expect(text.indexOf("PI: too little")).toBeLessThan(text.indexOf("Make first"));
  });

  it("lets no text of a file become markup or style, whatever it holds", () => {
    const hostile = `</style><script>alert(1)</script>"'&\\`;
    const evil = <T>(value: T): T =>
      (typeof value === "string"
        ? hostile
        : Array.isArray(value)
          ? value.map(evil)
          : typeof value === "object" && value !== null
            ? Object.fromEntries(Object.entries(value).map(([key, one]) => [key, evil(one)]))
            : value) as T;
    const all: SheetContent = {
      ...evil({ ...content, warnings: ["one"] }),
      kind: "sheet",
      name: "weigh-out",
    };
    const html = sheetHtml({ content: all, paper: "Letter", origin: evil(origin) });
    expect(html).not.toContain("<script");
    expect(html.match(/<\/style>/g)).toHaveLength(1);
    expect(html).toContain('content: "\\3c \\2f style\\3e \\3c script\\3e alert\\28 1\\29 ');
    expect(
      html.split("&lt;/style&gt;&lt;script&gt;alert(1)&lt;/script&gt;&quot;&#39;&amp;\\").length,
    ).toBeGreaterThan(60);
  });

  it("refuses another paper", () => {
    expect(() => weighOutPage({ sheet, screening, brief, paper: "letter" as "Letter", origin })).toThrow(
      'sheet: unknown paper "letter"; did you mean "Letter"?',
    );
  });
});
