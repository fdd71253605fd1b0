import { describe, expect, it } from "vitest";
import { viscosityOf } from "../../lib/assess/viscosity.js";
import { calibrate, interactionFrom } from "../../lib/decide/calibrate.js";
import { parseJson } from "../../lib/recipe/document.js";
import { readBlendReadings, type BlendReadings } from "../../lib/recipe/readings.js";
import { brief, exactReadings as readings, formulationOf, shelf } from "../fixtures.js";

const work = {
  formulation: formulationOf({ THIN: 50, THICK: 50 }),
  brief,
  shelf: { ...shelf, readings: [readings] },
};

describe("interactionFrom", () => {
  it("finds the interaction that made the readings, on a mass basis, and says where it is from", () => {
    const { G, basis, pair, temperature_C } = interactionFrom(readings);
    expect(G.value).toBeCloseTo(-1.5, 12);
    // No scatter, so the doubt is that of readings good to 2 %: 0.02 over the root of the sum of (w (1 - w))^2.
    expect(G.u).toBeCloseTo(0.02 / Math.sqrt(0.1875 ** 2 + 0.25 ** 2 + 0.1875 ** 2), 12);
    expect([basis, pair, temperature_C]).toEqual(["mass", ["THICK", "THIN"], 25]);
    expect(G.source).toBe("fit to 3 blends of r1: constructed for a test");
    expect(G.status).toBe("invented for the demo");
  });
});

describe("interactionFrom, doubt", () => {
  it("is that of the scatter where this is larger than what is stated of a reading", () => {
    const scattered = readings.viscosities_mPas.map((one, i) => one * (i === 2 ? 1.3 : 1));
    const [stated, unstated] = [0.02, 0].map((relativeU) =>
      interactionFrom({ ...readings, relativeU, viscosities_mPas: scattered }),
    );
    expect(stated!.G.u).toBe(unstated!.G.u);
    expect(stated!.G.u).toBeGreaterThan(0.1);
  });
});

describe("calibrate", () => {
  it("makes the model give the readings back", () => {
    const { value, warnings } = viscosityOf({ ...calibrate(work), draws: 100 });
    expect(value).toBeCloseTo(readings.viscosities_mPas[2]!, 8);
    expect(warnings).toEqual([]);
  });

  it("narrows the interval", () => {
    const width = ({ low, high }: { low: number; high: number }) => high / low;
    expect(width(viscosityOf({ ...calibrate(work), draws: 500 }))).toBeLessThan(1.2);
    expect(width(viscosityOf({ ...work, draws: 500 }))).toBeGreaterThan(5);
  });

  it("leaves the case it was given, and a lot's own figure, as they were", () => {
    const before = structuredClone(work.formulation);
    const [thin, thick] = work.formulation.components;
    const lot = { id: "T-7", measured: ["viscosity_mPas"] };
    const ofLot = {
      ...work,
      formulation: {
        ...work.formulation,
        components: [thin!, { ...thick!, ingredient: { ...thick!.ingredient, lot } }],
      },
    };
    const [newThin, newThick] = calibrate(ofLot).formulation.components;
    expect(newThin!.ingredient.viscosity_mPas!.value).toBeCloseTo(20, 12);
    expect(newThick!.ingredient.viscosity_mPas!.value).toBe(10000);
    expect(work.formulation).toEqual(before);
  });
});

describe("readings against what the shelf lets expect", () => {
  const warned = (change: Partial<BlendReadings>, what = work.formulation) =>
    viscosityOf({
      ...calibrate({
        ...work,
        formulation: what,
        shelf: { ...shelf, readings: [{ ...readings, ...change }] },
      }),
      draws: 40,
    }).warnings.flatMap(({ code, message }) => (code === "reading-contradicts" ? [message] : []));
  const inPascal = { viscosities_mPas: readings.viscosities_mPas.map((one) => one / 1000) };

  it("says which neat liquids were read in another unit, with both values", () => {
    expect(warned({})).toEqual([]);
    expect(warned(inPascal)).toEqual([
      "5 mPa s of neat THICK in r1 at 25 °C stands against 10000 mPa s of the shelf's THICK. Check the unit of viscosities_mPas, and that massFractions are of the first of the pair, before you trust what follows from it.",
      "0.02 mPa s of neat THIN in r1 at 25 °C stands against 10 mPa s of the shelf's THIN. Check the unit of viscosities_mPas, and that massFractions are of the first of the pair, before you trust what follows from it.",
    ]);
  });

  it("says so of liquids that were changed over, and where only one of them is in the bottle", () => {
    const reversed = { massFractions: readings.massFractions.map((one) => 1 - one) };
    expect(warned(reversed)).toHaveLength(2);
    expect(warned(reversed, formulationOf({ THIN: 60, MID: 40 }))).toHaveLength(1);
  });

  // By Andrade's law with an activation of 3000 K, 10 mPa s at 25 °C is 2.3 mPa s at 80 °C.
  it("brings the shelf's figure to the temperature of the reading", () => {
    const hot = (thin: number) => {
      const viscosities_mPas = readings.massFractions.map((w) => 2000 ** w * thin ** (1 - w));
      return warned({ temperature_C: 80, viscosities_mPas });
    };
    expect(hot(2.1)).toEqual([]);
    expect(hot(0.021)[0]).toMatch(/^0\.021 mPa s of neat THIN in r1 at 80 °C stands against 2\.\d+ mPa s/);
  });

  it("holds them against the lot that is in the bottle, and a lot against its ingredient", () => {
    const lot = { id: "T-7", measured: ["viscosity_mPas"] };
    const withLotAt = (value: number) => {
      const [thin, thick] = work.formulation.components;
      const viscosity_mPas = { ...thick!.ingredient.viscosity_mPas!, value, u: value / 100 };
      const ingredient = { ...thick!.ingredient, viscosity_mPas, lot };
      return { ...work.formulation, components: [thin!, { ...thick!, ingredient }] };
    };
    expect(warned({}, withLotAt(1500))).toEqual([
      expect.stringMatching(
        /^5000 mPa s of neat THICK in r1 at 25 °C stands against 1500 mPa s of lot T-7\./,
      ),
    ]);
    const alone = viscosityOf({ formulation: withLotAt(10), brief, shelf, draws: 40 }).warnings;
    expect(alone.map(({ message }) => message)).toContain(
      "10 mPa s of lot T-7 at 25 °C stands against 10000 mPa s of the shelf's THICK. Check the unit of viscosity_mPas in the file of lot T-7 before you trust what follows from it.",
    );
  });
});

describe("readBlendReadings", () => {
  const read = (change: object) =>
    readBlendReadings(parseJson(JSON.stringify({ ...readings, ...change }, null, 1), "m.json"));

  it("reads what it wrote", () => {
    expect(read({})).toEqual(readings);
  });

  it.each([
    [
      { viscosities_mPas: [1, 2, 3, 4] },
      "m.json: massFractions has 5 entries and viscosities_mPas has 4; each blend needs one reading",
    ],
    [
      { massFractions: [0.1, 0.25, 0.5, 0.75, 1] },
      "m.json: no reading of neat THIN (mass fraction 0); add it",
    ],
    [{ massFractions: [0, 0.25, 0.5, 0.75, 1.2] }, "massFractions[4] is 1.2; it must be at most 1"],
    [{ viscosities_mPas: [20, -1, 3, 4, 5] }, "viscosities_mPas[1] is -1; it must be above 0"],
  ])("refuses %j", (change, message) => {
    expect(() => read(change)).toThrow(message);
  });
});
