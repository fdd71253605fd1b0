import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { propertyTitles } from "../../lib/assess/property.js";
import { interactionFrom } from "../../lib/decide/calibrate.js";
import { numberText } from "../../lib/notebook/digits.js";
import type { TableContent } from "../../lib/notebook/content.js";
import {
  assessmentTable,
  briefTable,
  figureRows,
  formulationTable,
  hazardTable,
  propertyTable,
  readingTable,
  sourceTable,
  warningTable,
} from "../../lib/notebook/views.js";
import type { Brief, PropertyName } from "../../lib/recipe/brief.js";
import { propertyNames } from "../../lib/recipe/propertyNames.js";
import { openBrief } from "../../lib/recipe/files.js";
import { composition, formulate } from "../../lib/recipe/formulation.js";
import { valueText, verdictText } from "../../lib/notebook/verdicts.js";
import { unitLabel } from "../../lib/recipe/units.js";
import { sourceStatuses } from "../../lib/result.js";
import { blendLaw, brief, exactReadings, formulationOf, shelf, sure } from "../fixtures.js";
import type { BlendReadings } from "../../lib/recipe/readings.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const run = (change: Partial<Brief> = {}) =>
  assess({ formulation, brief: { ...brief, ...change }, shelf, draws: 100 });
const dark = { ...brief.light, irradiance_mWcm2: sure(0.001) };

const column = ({ columns, rows }: TableContent, name: string) => {
  const place = columns.findIndex((one) => one.name === name);
  return rows.map((row) => row[place]);
};

describe("briefTable", () => {
  const rowsOf = (change: Partial<Brief> = {}) =>
    new Map(briefTable({ ...brief, ...change }).rows as [string, string][]);

  it("says every condition with its unit and its doubt", () => {
    expect([...rowsOf()]).toEqual([
      ["light", 'spectrum "lamp"'],
      ["irradiance at the window", "8 ± 0.8 mW/cm²"],
      ["layer", "50 µm, cured 1.5 layers deep"],
      ["window", "OPEN film, 200 ± 20 µm"],
      ["gas under the film", "air at 101.3 kPa"],
      ["resin temperature", "25 °C"],
      ["largest cross-section", "100 mm², lifted at 1 mm/s"],
    ]);
    expect(briefTable(brief).caption).toBe("The brief: a brief for tests");
  });

  it("says that a nominal wavelength is one wavelength", () => {
    const light = { wavelength_nm: sure(405, 3), irradiance_mWcm2: sure(8) };
    expect(rowsOf({ light }).get("light")).toBe("405 ± 3 nm, one wavelength");
  });

  it.each([
    [8.123, 0.006, "8.123 ± 0.006 mW/cm²"],
    [8.123456, 0.5, "8.123 ± 0.5 mW/cm²"],
    [8, 0, "8 ± 0 mW/cm²"],
    [8, 30, "8 ± 30 mW/cm²"],
  ])("writes %s ± %s with the digits its doubt allows", (value, u, words) => {
    const light = { ...brief.light, irradiance_mWcm2: sure(value, u) };
    expect(rowsOf({ light }).get("irradiance at the window")).toBe(words);
  });

  it.each(propertyNames)("shows a target for %s with its unit, in words", (name) => {
    const title = `target: ${propertyTitles[name]}`;
    expect(rowsOf({ targets: { [name]: { min: 5, max: 50 } } }).get(title)).toBe(
      `5 to 50 ${unitLabel(name)}`,
    );
    expect(rowsOf({ targets: { [name]: { max: 6 } } }).get(title)).toBe(`at most 6 ${unitLabel(name)}`);
    expect(rowsOf().has(title)).toBe(false);
  });

  it("lists what to avoid by its name or its hazard, with the reason", () => {
    const avoid = [
      { ingredient: "TPO", reason: "reprotoxic" },
      { hazard: "H360", reason: "fertility" },
    ];
    expect([...rowsOf({ avoid })].slice(-2)).toEqual([
      ["avoid: TPO", "reprotoxic"],
      ["avoid: H360", "fertility"],
    ]);
  });
});

describe("formulationTable", () => {
  const table = formulationTable(formulation);

  it("holds the shares of the formulation, in percent, with the units in the headings", () => {
    const { rows } = composition(formulation);
    expect(column(table, "ingredient")).toEqual(["THIN", "THICK", "PI", "AB"]);
    expect(column(table, "name")).toEqual(rows.map(({ ingredient }) => ingredient.name));
    expect(column(table, "role")).toEqual(["diluent", "oligomer", "photoinitiator", "absorber"]);
    expect(column(table, "mass")).toEqual(rows.map(({ massFraction }) => 100 * massFraction));
    expect(column(table, "volume")).toEqual(rows.map(({ volumeFraction }) => 100 * volumeFraction));
    expect(table.columns.slice(3).map(({ name, unit }) => [name, unit])).toEqual([
      ["mass", "%"],
      ["per 100 of liquid", undefined],
      ["volume", "%"],
      ["concentration", "mol/L"],
    ]);
  });

  it("counts hundred parts of liquid, initiator and absorber on top", () => {
    const [thin, thick, initiator] = column(table, "per 100 of liquid").map(Number);
    // Three digits are shown of each, so sums hold to half a unit of the third.
    expect(thin! + thick!).toBeCloseTo(100, 0);
    expect(initiator! / (100 / 98.9)).toBeCloseTo(1, 2);
  });

  it("says the density, and that volumes are taken as additive", () => {
    // 60 g at 1 g/cm³ and 40 g at 1.25 g/cm³ fill 92 cm³.
    expect(formulationTable(formulationOf({ THIN: 60, THICK: 40 })).caption).toBe(
      "The formulation: test. Density 1.087 g/cm³ with volumes taken as additive",
    );
  });

  it("leaves a concentration open where a molar mass is not known", () => {
    const [thin, ...rest] = formulation.components;
    const unknown = { ...thin!, ingredient: { ...thin!.ingredient, molarMass_gmol: undefined } };
    const without = formulationTable({ ...formulation, components: [unknown, ...rest] });
    expect(column(without, "concentration")[0]).toBeNull();
    // 60 g in 92 cm³, 200 g/mol.
    const known = formulationTable(formulationOf({ THIN: 60, THICK: 40 }));
    expect(column(known, "concentration")[0]).toBe("3.26");
  });
});

describe("figureRows", () => {
  it("gives one row for each figure the shelf has: value, doubt and unit, ground and source", () => {
    const rows = figureRows(formulationOf({ THIN: 100 }));
    const { source, status } = sure(0);
    expect(rows).toEqual(
      [
        ["molar mass", "200 ± 0 g/mol"],
        ["density", "1 ± 0 g/cm³ at 25 °C"],
        ["viscosity", "10 ± 1 mPa s at 25 °C"],
        ["viscosity activation", "3000 ± 300 K"],
      ].map(([figure, value]) => ({ ingredient: "THIN", figure, value, status, source })),
    );
  });

  it("shows a figure without a unit as a number alone", () => {
    const rows = figureRows(formulationOf({ PI: 100 }));
    expect(rows.find(({ figure }) => figure === "radicals per photon")?.value).toBe("1 ± 0.2");
  });

  it("names the lot beside the figures measured on it, and not beside the others", () => {
    const parts = [{ ingredient: "THICK", lot: "T-7", mass_pct: 100 }];
    const rows = figureRows(
      formulate({ recipe: { id: "lot", title: "lot", normalise: false, parts }, shelf }),
    );
    const viscosity = rows.filter(({ ingredient }) => ingredient === "THICK (lot T-7)");
    expect(viscosity).toEqual([
      {
        ingredient: "THICK (lot T-7)",
        figure: "viscosity",
        value: "12000 ± 100 mPa s at 25 °C",
        status: "measured here",
        source: "round number chosen for a test",
      },
    ]);
    expect(rows.filter(({ ingredient }) => ingredient === "THICK")).toHaveLength(rows.length - 1);
  });
});

describe("assessmentTable", () => {
  const targets = { viscosity_mPas: { min: 1, max: 1e6 }, layerTime_s: { max: 1e-9 } };
  const assessment = run({ targets });
  const table = assessmentTable(assessment);

  it("shows every property with unit and interval", () => {
    const properties = propertyNames.map((name) => assessment.properties[name]);
    expect(column(table, "property")).toEqual(properties.map(({ title }) => title));
    expect(column(table, "unit")).toEqual(propertyNames.map(unitLabel));
    expect(column(table, "value")).toEqual(properties.map(valueText));
    expect(column(table, "value")[0]).toMatch(/^\d+ \(\d+ to \d+\)$/);
  });

  it("shows target and verdict in words, with the share of draws, where there is a target", () => {
    const told: Partial<Record<PropertyName, string[]>> = {
      viscosity_mPas: ["1 to 1 × 10⁶", "meets (100 % of draws)"],
      layerTime_s: ["at most 1 × 10⁻⁹", "fails (0 % of draws)"],
    };
    expect(table.rows.map((row) => row.slice(3))).toEqual(
      propertyNames.map((name) => told[name] ?? [null, null]),
    );
  });

  it("says whose assessment it is, the level of the intervals and the number of draws", () => {
    expect(table.caption).toBe("Assessment of test under test: value and 95 % interval from 100 draws");
    const other = assess({ formulation, brief, shelf, draws: 50, level: 0.9 });
    expect(assessmentTable(other).caption).toContain("90 % interval from 50 draws");
  });

  it("says in words that a resin never cures", () => {
    const never = assessmentTable(run({ light: dark, targets: { deadZone_um: { max: 50 } } }));
    const row = never.rows[propertyNames.indexOf("deadZone_um")]!;
    expect(row.slice(2)).toEqual(["never cures", "at most 50", "fails (0 % of draws)"]);
  });
});

describe("propertyTable", () => {
  it("shows the properties given, each with unit and level", () => {
    const { viscosity_mPas, penetrationDepth_um } = run().properties;
    const { deadZone_um } = run({ light: dark }).properties;
    const table = propertyTable("Three of them", [viscosity_mPas, penetrationDepth_um, deadZone_um]);
    expect(table.caption).toBe("Three of them");
    expect(table.rows).toEqual([
      ["viscosity at print temperature", "mPa s", valueText(viscosity_mPas), "95 %"],
      ["penetration depth", "µm", valueText(penetrationDepth_um), "95 %"],
      ["dead-zone thickness", "µm", "never cures", null],
    ]);
  });
});

describe("warningTable", () => {
  it("shows each warning whole, what it is about in plain words", () => {
    const warnings = [
      { code: "interaction-unmeasured", message: "No measured interaction for A–B." },
      { code: "no-initiator", message: "Nothing cures." },
    ];
    expect(warningTable({ warnings }).rows).toEqual([
      ["interaction unmeasured", "No measured interaction for A–B."],
      ["no initiator", "Nothing cures."],
    ]);
    const [, last] = warnings;
    expect(warningTable({ warnings: [last!] }).rows).toEqual([["no initiator", "Nothing cures."]]);
  });

  it("says that there is none, rather than showing an empty table", () => {
    const { columns, rows } = warningTable({ warnings: [] });
    expect(rows).toEqual([["nothing", "No warning for these numbers."]]);
    expect(columns.map(({ name }) => name)).toEqual(["about", "what to know"]);
  });
});

describe("hazardTable", () => {
  const [thin, thick] = formulation.components.map(({ ingredient }) => ingredient);
  const hazards = ["H317", "H411"].map((code) => ({
    code,
    source: "a test",
    status: "from memory" as const,
  }));
  const table = hazardTable({
    ...formulation,
    components: [
      { ingredient: { ...thin!, cas: "7732-18-5", hazards, note: "Wear gloves." }, massFraction: 0.5 },
      { ingredient: { ...thick!, hazards: undefined }, massFraction: 0.5 },
    ],
  });

  it("shows the statements found, and where nobody has looked says so", () => {
    expect(table.rows).toEqual([
      ["THIN", "7732-18-5", "H317, H411", "Wear gloves."],
      ["THICK", "none given", "not checked", null],
    ]);
  });

  it("sends the reader to the supplier's sheet", () => {
    expect(table.caption).toContain("the suppliers' safety data sheets decide");
    expect(table.columns.map(({ name }) => name)).toEqual(["ingredient", "CAS number", "statements", "note"]);
  });
});

describe("sourceTable", () => {
  const read = { source: "film (63.5 µm): doi 10.1039/x", status: "published" } as const;

  it("puts figures that share a source into one row, and keeps grounds apart", () => {
    const rows = [
      { figure: "density of A", ...read },
      { figure: "density of B", ...read },
      { figure: "film thickness", ...read },
      { figure: "density of B", ...read },
      { figure: "density of C", ...read, status: "from memory" as const },
    ];
    expect(sourceTable(rows).rows).toEqual([
      ["density of A, B; film thickness", "published", read.source],
      ["density of C", "from memory", read.source],
    ]);
  });

  it("loses no source of a real assessment", () => {
    const { sources } = assess({ ...openBrief("data/briefs/flow-cell.json"), draws: 50 });
    const { rows } = sourceTable(sources);
    expect(new Set(rows.map(([, status, source]) => `${source} ${status}`))).toEqual(
      new Set(sources.map(({ source, status }) => `${source} ${status}`)),
    );
    for (const { figure } of sources) {
      const subject = figure.split(" of ").at(-1)!;
      expect(
        rows.some(([figures]) => String(figures).includes(subject)),
        figure,
      ).toBe(true);
    }
    for (const [, status] of rows) expect(sourceStatuses).toContain(status);
  });
});

describe("valueText and verdictText", () => {
  it("write a property as its interval, or that it never cures", () => {
    const interval = { value: 447.3, low: 301.2, high: 612.9 };
    expect(valueText({ ...run().properties.viscosity_mPas, ...interval })).toBe("450 (300 to 610)");
    expect(valueText(run({ light: dark }).properties.deadZone_um)).toBe("never cures");
  });

  it("write a verdict with its share of draws", () => {
    const [verdict] = run({ targets: { viscosity_mPas: { min: 1 } } }).verdicts;
    expect(verdictText({ ...verdict!, outcome: "cannot tell", share: 0.645 })).toBe(
      "cannot tell (64 % of draws)",
    );
    expect(verdictText({ ...verdict!, outcome: "meets", share: 1 })).toBe("meets (100 % of draws)");
  });
});

describe("readingTable", () => {
  // One reading a third too high, the others with little scatter.
  const massFractions = [0, 0.1, 0.25, 0.4, 0.5, 0.6, 0.75, 0.9, 1];
  const scatter = [0.01, -0.012, 0.008, -0.009, 0.011, -0.01, 0.012, -0.008, 0.009];
  const readings: BlendReadings = {
    ...exactReadings,
    relativeU: 0,
    massFractions,
    viscosities_mPas: massFractions.map(
      (w, i) => blendLaw(w, -1.5) * (i === 4 ? 1.33 : Math.exp(scatter[i]!)),
    ),
  };

  it("shows the rule of the figure beside it: the same G, and neat liquids that are off by nothing", () => {
    const { rows, caption } = readingTable(readings);
    const { G } = interactionFrom(readings);
    expect(caption).toContain(`G = ${numberText(G.value, 3)} `);
    expect([rows[0]![3], rows[8]![3]].map(Number)).toEqual([0, 0]);
    // At equal masses the rule is the geometric mean of the neat readings times e^(G / 4).
    const [thin, thick] = [readings.viscosities_mPas[0]!, readings.viscosities_mPas[8]!];
    const middle = Math.sqrt(thin * thick) * Math.exp(G.value / 4);
    expect(Math.abs(Number(rows[4]![2]) / middle - 1)).toBeLessThan(0.005);
  });

  it("has a row a reading, read over fitted as a deviation, and names the one that stands out", () => {
    const { rows, columns, caption } = readingTable(readings);
    expect(columns.map(({ name, unit }) => `${name} ${unit}`).slice(0, 4)).toEqual([
      "THICK mass %",
      "read mPa s",
      "fitted mPa s",
      "off by %",
    ]);
    expect(rows.map(([mass]) => mass)).toEqual(massFractions.map((w) => 100 * w));
    expect(rows.map(([, , , , note]) => note !== null)).toEqual(massFractions.map((w) => w === 0.5));
    expect(caption).toMatch(
      /^Readings of THICK with THIN at 25 °C against the rule with G = −1\.\d+ and the neat liquids as read\. One interaction for all of them: /,
    );
  });
});
