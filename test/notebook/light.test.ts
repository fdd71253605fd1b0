import { describe, expect, it } from "vitest";
import { lightTakenOf } from "../../lib/assess/lightTaken.js";
import { compareEngines } from "../../lib/decide/compareEngines.js";
import type { LevelAnswer } from "../../lib/decide/level.js";
import { candidateTable, engineTable, spectraFigure, takenTable } from "../../lib/notebook/light.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const work = { brief, shelf, formulation: formulationOf({ THIN: 57, THICK: 40, PI: 2, AB: 1 }), draws: 40 };

describe("spectraFigure", () => {
  it("draws a line for each taker and one for the engine, brought to the height of the strongest", () => {
    const taken = lightTakenOf(work);
    const figure = spectraFigure(taken, "Round numbers")!;
    const columns = figure.table.columns.map(({ name }) => name);
    expect(columns).toEqual([
      "wavelength",
      ...["PI", "AB", "the resin itself", "engine, any scale"].map((name) => `Napierian absorption: ${name}`),
    ]);
    const highest = (name: string) =>
      Math.max(
        ...figure.table.rows.map((row) => Number(row[columns.indexOf(`Napierian absorption: ${name}`)])),
      );
    expect(highest("engine, any scale")).toBeCloseTo(Math.max(highest("PI"), highest("AB")), 6);
  });

  it("draws nothing for a nominal wavelength: there is no curve through one place", () => {
    const light = { wavelength_nm: sure(405, 4), irradiance_mWcm2: brief.light.irradiance_mWcm2 };
    expect(spectraFigure(lightTakenOf({ ...work, brief: { ...brief, light } }), "One")).toBeUndefined();
  });
});

describe("takenTable", () => {
  it("ends with what goes through, in percent, and says how deep it looked", () => {
    const taken = lightTakenOf(work);
    const table = takenTable(taken);
    expect(table.caption).toContain("first 75 µm");
    expect(table.rows.at(-1)![0]).toBe("goes through");
    expect(String(table.rows.at(-1)![1])).toMatch(
      new RegExp(`^${Math.floor(100 * taken.transmitted.share.value)}`),
    );
    expect(table.columns[1]).toMatchObject({ name: "share of the light", unit: "%" });
  });
});

describe("candidateTable", () => {
  const common = { warnings: [], sources: [] };
  const reached: LevelAnswer = {
    ...common,
    ingredient: "AB",
    hazards: ["H351", "H317"],
    outcome: "reached",
    reason: "0.2 % AB does it.",
    massFraction: { value: 0.002, low: 0.001, high: 0.004, level: 0.95 },
    reachedShare: 0.996,
    warnings: [
      { code: "long-term-harm", message: "Take another." },
      { code: "hazards-unchecked", message: "Nobody has looked." },
      { code: "solubility-unknown", message: "Stir it in." },
      { code: "working-curve-estimated", message: "Estimated." },
    ],
  };
  const avoided: LevelAnswer = {
    ...common,
    ingredient: "XX",
    outcome: "avoided",
    reason: "The brief avoids XX.",
  };

  it("tells none found from not looked, and makes no condition where it is known what dissolves", () => {
    const [row] = candidateTable("Absorbers", [{ ...reached, hazards: [], warnings: [] }]).rows;
    expect([row![1], row![3]]).toEqual(["none found", "in 99 % of draws"]);
  });

  it("gives level, share of draws and reason, with the candidate's own warnings only", () => {
    const { rows } = candidateTable("Absorbers", [reached, avoided]);
    expect(rows).toEqual([
      [
        "AB",
        "H351, H317",
        "0.20 (0.10 to 0.40)",
        "in 99 % of draws, if it dissolves",
        "0.2 % AB does it. Take another. Stir it in.",
      ],
      ["XX", "not checked", null, "avoided", "The brief avoids XX."],
    ]);
  });
});

describe("engineTable", () => {
  it("says of each engine what its figures stand on, and why one cannot be compared", () => {
    const short = { ...shelf.spectra.get("lamp")!, id: "far", wavelengths_nm: [100, 150], values: [1, 1] };
    const on = { ...shelf, spectra: new Map([...shelf.spectra, ["far", short]]) };
    const { rows } = engineTable(compareEngines({ ...work, shelf: on }));
    expect(rows.map(([engine, depth]) => [engine, depth === null])).toEqual([
      ["lamp", false],
      ["far", true],
    ]);
    expect(rows[0]!.at(-1)).toBe("estimated");
    expect(rows[1]!.at(-1)).toContain("100");
  });
});
