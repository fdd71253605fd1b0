import { describe, expect, it } from "vitest";
import { asMade, rescue, weighOut, type PropertyChange, type Weighing } from "../../lib/lab/batch.js";
import type { ReturnedBatch } from "../../lib/lab/batch/files.js";
import {
  batchDecision,
  batchChangeTable,
  costText,
  madeTable,
  dissolvingText,
  lightNotes,
  masterBatchTable,
  weighedTable,
  weighOutTable,
} from "../../lib/notebook/batch.js";
import { massText } from "../../lib/notebook/batchMass.js";
import { rescueTable, rescueText } from "../../lib/notebook/batchRescue.js";
import type { Ingredient } from "../../lib/recipe/ingredient.js";
import { balance, formulationOf, sure, weighedBatch } from "../fixtures.js";

const formulation = formulationOf({ THICK: 55, THIN: 30, MID: 12, PI: 2, AB: 1 });
const prices = { currency: "EUR", prices_perkg: { THIN: 10, THICK: 20, MID: 30, PI: 400 } };
const sheetOf = (change: Partial<Parameters<typeof weighOut>[0]> = {}) =>
  weighOut({ formulation, batch_g: 1000, balance, ...change });
const sheet = sheetOf();

/** The batch of the sheet with the masses of some lines changed. */
const back = (masses: Record<number, number> = {}): ReturnedBatch => {
  const weighings = sheet.portions.map(({ line, target_g }): Weighing => ({
    line,
    mass_g: masses[line] ?? target_g,
    lot: `L-${line}`,
  }));
  return {
    weighed: weighedBatch,
    sheet,
    made: asMade({ sheet, weighings }),
    plan: rescue({ sheet, weighings }),
  };
};

describe("massText", () => {
  it.each([
    [141, 0.001, "141.000"],
    [141, 0.01, "141.00"],
    [2.5, 0.25, "2.50"],
    [12.005, 0.005, "12.005"],
    [300, 1, "300"],
    [300, 5, "300"],
    [0.1, 0.00001, "0.10000"],
  ])("%f g on a balance that reads %f g is %s", (mass_g, readability_g, text) => {
    expect(massText(mass_g, { ...balance, readability_g })).toBe(text);
  });
});

describe("weighOutTable", () => {
  it("holds each portion with target, limits and running total as the balance shows them, and why", () => {
    const { columns, rows, caption } = weighOutTable(sheet);
    expect(columns.map(({ name, unit }) => (unit === undefined ? name : `${name}, ${unit}`))).toEqual([
      "step",
      "portion",
      "target, g",
      "limits, g",
      "in the vessel, g",
      "why now, and how",
    ]);
    expect(rows[0]).toEqual([
      1,
      "THIN",
      "300.00",
      "298.51 to 301.49",
      "300.00",
      "the thinnest liquid first: solids dissolve fastest in it",
    ]);
    expect(caption).toContain("no ingredient's share is off by more than 1 % of itself");
    expect(caption).toContain("Cost: no prices given");
  });

  it("has a column of costs where prices were given, empty for what has none", () => {
    const { columns, rows, caption } = weighOutTable(sheetOf({ prices }));
    const at = columns.findIndex(({ name }) => name === "cost");
    expect(columns[at]!.unit).toBe("EUR");
    expect(rows.map((row) => row[at])).toEqual(["3.00", null, "8.00", "3.60", "11.00"]);
    expect(caption).toContain("Cost: EUR 25.60, without AB (no price given)");
  });
});

describe("costText", () => {
  it("says that no price was given rather than that it costs nothing", () => {
    expect(costText(sheetOf({ prices: { currency: "EUR", prices_perkg: { OTHER: 5 } } }))).toBe(
      "no prices given",
    );
  });
});

describe("lightNotes", () => {
  it("keeps the light off a master batch that holds the initiator, and says nothing of others", () => {
    const small = sheetOf({ batch_g: 400 });
    const notes = small.masterBatches.map((master) => [master.solute.id, lightNotes(master).length]);
    expect(notes).toContainEqual(["PI", 1]);
    expect(notes).toContainEqual(["AB", 0]);
    const cells = masterBatchTable(small)!.rows.map(([label]) => String(label));
    expect(cells.filter((cell) => cell.includes("amber light"))).toHaveLength(
      small.masterBatches.filter(({ solute }) => solute.id === "PI").flatMap(({ stages }) => stages).length,
    );
  });
});

describe("dissolvingText", () => {
  const of = (change: Partial<Ingredient>, parts = { THICK: 49.5, THIN: 50, AB: 0.5 }) => {
    const components = formulationOf(parts).components.map((one) =>
      one.ingredient.id === "AB" ? { ...one, ingredient: { ...one.ingredient, ...change } } : one,
    );
    return sheetOf({ formulation: { ...formulation, components } }).masterBatches.map(dissolvingText);
  };

  it("says what the shelf knows, of the strongest stage", () => {
    expect(of({ solubility_pct: sure(5, 1) })).toEqual([
      "it holds 4 %, and the shelf says that 5 ± 1 % dissolves; stir until clear",
    ]);
    expect(of({ solubility_pct: sure(8) }, { THICK: 49.99, THIN: 50, AB: 0.01 })).toEqual([
      "it holds 8 %, and the shelf says that 8 % dissolves; stir until clear",
    ]);
  });

  it("says where nothing is known, and asks it of no liquid", () => {
    expect(of({})).toEqual(["whether it dissolves is not known here, try a little first; stir until clear"]);
    expect(of({ state: "liquid" })).toEqual(["stir until no streak is left"]);
  });
});

describe("masterBatchTable", () => {
  it("is none where the balance weighs everything", () => {
    expect(masterBatchTable(sheet)).toBeUndefined();
  });

  it("works each one out, stage by stage", () => {
    const thin = formulationOf({ THICK: 49.99, THIN: 50, AB: 0.01 });
    const { rows, caption } = masterBatchTable(sheetOf({ formulation: thin }))!;
    expect(rows).toHaveLength(2);
    expect(rows[0]!.slice(0, 3)).toEqual(["AB in THIN", "0.10", "8.20 of AB"]);
    expect(rows[1]![2]).toMatch(/^\d+\.\d\d of stage 1 of AB in THIN$/);
    expect(caption).toContain("below the 8.20 g that the balance weighs honestly. AB in THIN: whether it");
  });
});

describe("weighedTable", () => {
  it("says of each portion whether it is within its limits, and otherwise by how much it is off", () => {
    const { rows } = weighedTable(back({ 1: 310, 4: 119.2, 5: 552 }));
    expect(rows.map((row) => row.at(-1))).toEqual([
      "10.00 too much",
      "within",
      "within",
      "0.80 too little",
      "within",
    ]);
    expect(rows[0]).toEqual(["THIN", "L-1", "298.51 to 301.49", "310.00", "10.00 too much"]);
  });
});

describe("madeTable", () => {
  it("gives each share with the interval of its weighings", () => {
    const { rows } = madeTable(back().made);
    expect(rows[0]!.slice(0, 2)).toEqual(["THICK", "55"]);
    // Five masses to u = 4.08248 mg: u(w) = u sqrt(0.45² + 4 × 0.55²) / 1 kg = 4.852e-6, times 1.96 is 0.00095 %.
    expect(rows[0]![2]).toBe("55.00000 (54.99905 to 55.00095)");
    expect(rows.map((row) => row.at(-1))).toEqual(Array(5).fill("within"));
  });

  it("names what is off by more than was asked", () => {
    const { rows } = madeTable(back({ 4: 150 }).made);
    const mid = rows.find(([ingredient]) => ingredient === "MID")!;
    expect(mid.slice(3)).toEqual(["21", "too far off"]);
  });
});

const property = (value: number) => ({
  property: "viscosity_mPas" as const,
  title: "viscosity at print temperature",
  unit: "mPa s",
  outcome: "value" as const,
  value,
  low: 0.8 * value,
  high: 1.2 * value,
  level: 0.9,
  warnings: [],
  doubt: [],
  sources: [],
});
const change = (from: PropertyChange["verdictBefore"], to: PropertyChange["verdictAfter"]) => ({
  property: "viscosity_mPas" as const,
  title: "viscosity at print temperature",
  unit: "mPa s",
  before: property(300),
  after: property(330),
  relativeChange: 0.1,
  verdictBefore: from,
  verdictAfter: to,
  changed: true,
});

describe("batchChangeTable", () => {
  const rowOf = (changes: PropertyChange[]) =>
    batchChangeTable({ made: { changes }, brief: { targets: { viscosity_mPas: { max: 320 } } } });

  it("sets planned and made side by side, with the change, the target and what became of it", () => {
    const { rows, caption } = rowOf([change("meets", "cannot tell")]);
    expect(rows).toEqual([
      [
        "viscosity at print temperature",
        "mPa s",
        "300 (240 to 360)",
        "330 (264 to 396)",
        "10",
        "at most 320",
        "meets → cannot tell",
      ],
    ]);
    expect(caption).toContain("with 90 % intervals from the same draws");
  });

  it("says so where nothing changed, where it never cures, and where there is no target", () => {
    const never = { ...property(1), outcome: "never-cures" as const, share: 0.9 };
    const dead = { ...change("fails", "fails"), after: never, relativeChange: null };
    expect(rowOf([dead]).rows[0]!.slice(3)).toEqual([
      "never cures",
      null,
      "at most 320",
      "fails, as planned",
    ]);
    const free = { ...change(null, null), property: "deadZone_um" as const };
    expect(rowOf([free]).rows[0]!.slice(5)).toEqual([null, null]);
  });
});

describe("a rescue", () => {
  it("is a table of additions only where something is to be added", () => {
    expect(rescueTable(back())).toBeUndefined();
    // 330 g of THIN where 300 were wanted: everything grows by a tenth.
    expect(rescueTable(back({ 1: 330, 2: 10 }))!.rows.slice(0, 2)).toEqual([
      ["THIN", "330.00", expect.any(String)],
      ["AB", "10.00", expect.any(String)],
    ]);
    expect(rescueTable(back({ 5: 605 }))!.rows.at(-1)).toEqual(["THICK", "605.00", expect.any(String)]);
  });

  it("is told in a sentence", () => {
    expect(rescueText(back())).toBe(
      "Every share is within the accuracy that was asked for: nothing is to be added.",
    );
    expect(rescueText(back({ 5: 605 }))).toMatch(
      /^To be brought back to its recipe the batch has to grow to \d+\.\d\d g, [\d.]+ times what was planned; .* asks for that much\.$/,
    );
    const missing = { outcome: "add", total_g: 1000, growth: 1, setBy: "the sheet", additions: [] } as const;
    expect(rescueText({ sheet, plan: missing })).toBe(
      "It is brought back to its recipe by adding what is missing, up to the planned 1000.00 g.",
    );
    const reason = "the vessel is too small";
    expect(rescueText({ sheet, plan: { outcome: "impossible", reason } })).toBe(
      "It cannot be put right: the vessel is too small.",
    );
  });
});

describe("a rescue with additions below the minimum weight", () => {
  const strict = sheetOf({ accuracy: 0.001 });
  const weighings = strict.portions.map(({ line, target_g }) => ({
    line,
    mass_g: line === 5 ? 555 : target_g,
  }));
  const plan = rescue({ sheet: strict, weighings });

  it("says how well they are known", () => {
    // 0.1 and 0.2 g to u = 4.08248 sqrt(2) mg, of 10.1 and 20.2 g; 6 g of 306 g likewise.
    const { caption, rows } = rescueTable(back({ 1: 305, 5: 560 }))!;
    expect(caption).toBe(
      "What to add, in the order of the sheet, under amber light, as an initiator is in the vessel. The balance carries 2000 g, vessel included: where the batch and its vessel are more, each in a vessel of its own. Less than 8.20 g of one portion is weighed where what is in and what is added are together known well enough; two standard uncertainties are, of the whole portion: AB 0.11 %, PI 0.057 %, MID 0.0095 %",
    );
    expect(rows.map((row) => row.at(-1))).toEqual(["nothing", "0.18", "0.36", "2.18", "nothing"]);
  });

  it("offers the smaller way where one of them sets the size", () => {
    expect(rescueText({ sheet: strict, plan })).toMatch(
      /^To be brought back to its recipe the batch has to grow to \d+\.\d\d g, 1\.82 times what was planned; AB asks for that much\. What sets this size is an addition too small for the balance\. Without such additions the batch is 10\d\d\.\d\d g and lacks .*AB 0\.9 % of itself.*: see whether the targets bear that, or add what lacks from a thinner master batch or on a finer balance\.$/,
    );
  });

  it("says what is more than the balance carries, and in how many loads", () => {
    const small = { ...balance, capacity_g: 300 };
    const heavy = sheetOf({ balance: small });
    const masses = heavy.portions.map(({ line, target_g }) => ({
      line,
      mass_g: line === 4 ? 240 : target_g,
    }));
    const doubled = rescue({ sheet: heavy, weighings: masses });
    expect(rescueText({ sheet: heavy, plan: doubled })).toBe(
      "To be brought back to its recipe the batch has to grow to 2000.00 g, 2 times what was planned; MID asks for that much. That is more than the 300 g the balance carries: weigh each addition in a vessel of its own.",
    );
    expect(rescueTable({ sheet: heavy, plan: doubled })!.rows.at(-1)).toEqual([
      "THICK",
      "550.00",
      "550.00 in 2 loads",
    ]);
  });
});

describe("batchDecision", () => {
  const decided = (
    masses: Record<number, number>,
    changes: PropertyChange[],
    more: Partial<ReturnedBatch> = {},
  ) => {
    const batch = back(masses);
    return batchDecision({ ...batch, made: { ...batch.made, changes }, ...more });
  };

  it("uses a batch whose shares are right", () => {
    const { statement, figures } = decided({}, [change("meets", "meets")]);
    expect(statement).toBe(
      "Use batch T-1 as it was made: every share is within 1 % of itself; no target is worse met than planned.",
    );
    expect(figures).toMatchObject({ batch: "T-1", planned_g: 1000, made_g: 1000, putRight: "within" });
    expect(figures["THICK_pct"]).toBeCloseTo(55, 9);
  });

  it("puts right a batch that is off although no target suffers: what was left out may be the inhibitor", () => {
    const { statement } = decided({ 4: 150 }, [change("cannot tell", "meets")]);
    expect(statement).toMatch(
      /^Put batch T-1 right before it is used: the share of MID is off by 21 % of itself; no target is worse met than planned\. To be brought back/,
    );
    const plan = { outcome: "impossible", reason: "the vessel is too small" } as const;
    expect(decided({ 4: 0 }, [change("fails", "fails")], { plan }).statement).toMatch(
      /^Keep batch T-1 apart: /,
    );
  });

  it("puts right what does worse, and keeps apart what cannot be put right", () => {
    expect(decided({ 4: 150 }, [change("meets", "cannot tell")]).statement).toMatch(
      /^Put batch T-1 right before it is used: the share of MID is off by 21 % of itself; worse than planned: viscosity at print temperature\. To be/,
    );
    const plan = { outcome: "impossible", reason: "the vessel is too small" } as const;
    expect(decided({ 4: 150 }, [change("cannot tell", "fails")], { plan }).statement).toMatch(
      /^Keep batch T-1 apart: .* It cannot be put right: the vessel is too small\.$/,
    );
  });
});
