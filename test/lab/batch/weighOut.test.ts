import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { orderOfAddition, weighOut } from "../../../lib/lab/batch.js";
import { withLot } from "../../../lib/recipe/lot.js";
import type { Formulation } from "../../../lib/recipe/formulation.js";
import { formulationOf, shelf, sure } from "../../fixtures.js";

const balance = { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 };
const plain = formulationOf({ THICK: 55, THIN: 30, MID: 12, PI: 2, AB: 1 });
/** The same parts with another solubility of the absorber and the initiator, in percent. */
const soluble = (
  parts: Record<string, number>,
  solubilities: Record<string, { value: number; u: number }>,
): Formulation => {
  const formulation = formulationOf(parts);
  const components = formulation.components.map((one) => {
    const known = solubilities[one.ingredient.id];
    if (known === undefined) return one;
    return { ...one, ingredient: { ...one.ingredient, solubility_pct: sure(known.value, known.u) } };
  });
  return { ...formulation, components };
};
const sheetOf = (change: Partial<Parameters<typeof weighOut>[0]> = {}) =>
  weighOut({ formulation: plain, batch_g: 1000, balance, ...change });

describe("orderOfAddition", () => {
  it("is thin liquid, absorber, initiator, other diluents, oligomer, each with its reason", () => {
    const order = orderOfAddition(plain);
    expect(order.map(({ ingredient }) => ingredient.id)).toEqual(["THIN", "AB", "PI", "MID", "THICK"]);
    expect(order.map(({ amberLight }) => amberLight)).toEqual([false, false, true, true, true]);
    expect(order.map(({ reason }) => reason)).toEqual([
      "the thinnest liquid first: solids dissolve fastest in it",
      "into the thin liquid, and before the initiator; stir until clear, no grain against the light",
      "into the thin liquid; from here on under amber light, vessel covered; stir until clear, no grain against the light",
      "before the thick ones: it thins what follows",
      "warmed until it pours, no warmer than its safety data sheet allows; stir until no streak is left",
    ]);
  });

  it("puts the inhibitor before the absorber, and what settles last", () => {
    const role = (id: string, to: "inhibitor" | "filler" | "pigment" | "synergist") => ({
      ingredient: { ...shelf.ingredients.get("PI")!, id, role: to },
      massFraction: 0.1,
    });
    const components = [
      role("F", "filler"),
      role("W", "pigment"),
      role("S", "synergist"),
      role("H", "inhibitor"),
      ...formulationOf({ THICK: 50, THIN: 30, PI: 10, AB: 10 }).components,
    ];
    const order = orderOfAddition({ ...plain, components });
    expect(order.map(({ ingredient }) => ingredient.id)).toEqual([
      "THIN",
      "H",
      "AB",
      "S",
      "PI",
      "THICK",
      "F",
      "W",
    ]);
    expect(order[1]!.reason).toContain("it works only with air dissolved in the resin");
    expect(order[6]!.reason).toBe(
      "last, little by little under shear; it settles, so stir again before every pour",
    );
  });

  it("begins with the thinnest there is where there is no diluent, and leaves out what has no share", () => {
    expect(
      orderOfAddition(formulationOf({ THICK: 98, PI: 2, AB: 0 })).map(({ ingredient }) => ingredient.id),
    ).toEqual(["THICK", "PI"]);
  });
});

describe("a solid whose solubility is on the shelf", () => {
  const parts = { THICK: 55, THIN: 30, MID: 12, PI: 2, AB: 1 };
  const stepsOf = (solubility: { value: number; u: number }) =>
    orderOfAddition(soluble(parts, { AB: solubility })).map(({ ingredient }) => ingredient.id);
  const reasonOf = (solubility: { value: number; u: number }) =>
    orderOfAddition(soluble(parts, { AB: solubility })).find(({ ingredient }) => ingredient.id === "AB")!
      .reason;

  it("waits for liquid until its share is below that less one standard uncertainty, and no longer", () => {
    // 1 in 31 is 3.2 %, with MID 1 in 43, 2.3 %; in the whole 1 %.
    expect(stepsOf({ value: 4, u: 0.7 })).toEqual(["THIN", "AB", "PI", "MID", "THICK"]);
    expect(stepsOf({ value: 4, u: 0.8 })).toEqual(["THIN", "MID", "AB", "PI", "THICK"]);
    expect(reasonOf({ value: 4, u: 0.8 })).toBe(
      "into the thin liquid, and before the initiator; stir until clear, no grain against the light",
    );
  });

  it("says when it may clear only with the thick liquids, or never", () => {
    expect(stepsOf({ value: 2, u: 0 })).toEqual(["THIN", "MID", "AB", "PI", "THICK"]);
    expect(reasonOf({ value: 2, u: 0 })).toBe(
      "into the thin liquid, and before the initiator; it is 2.3 % of what is in the vessel here, and the shelf says that 2 % dissolves: clear, with no grain against the light, at the latest once THICK is in (1 %)",
    );
    expect(reasonOf({ value: 1.2, u: 0.4 })).toBe(
      "into the thin liquid, and before the initiator; it is 2.3 % of what is in the vessel here, and the shelf says that 1.2 ± 0.4 % dissolves: it may never clear",
    );
  });

  it("counts all its lots, and is not asked of what is dispersed", () => {
    const { components, ...rest } = soluble(
      { THICK: 40, THIN: 50, SAND: 9, AB: 1 },
      { SAND: { value: 1, u: 0 } },
    );
    expect(orderOfAddition({ components, ...rest }).at(-1)!.reason).not.toContain("dissolves");
    const known = soluble({ THIN: 97, MID: 1, AB: 2 }, { AB: { value: 1.5, u: 0 } });
    const [thin, mid, absorber] = known.components;
    const halves = [1, 2].map(() => ({ ...absorber!, massFraction: 0.01 }));
    const { warnings } = weighOut({
      formulation: { ...known, components: [thin!, mid!, ...halves] },
      batch_g: 10000,
      balance,
    });
    expect(warnings).toEqual([
      {
        code: "near-solubility",
        message:
          "AB: 2 % of the whole, and the shelf says that 1.5 % dissolves: it does not dissolve by that figure, or falls out in the cold; try a little, keep it cold for a week and look for crystals, or take less",
      },
    ]);
  });

  it("is warned of where only the doubt of the figure is against it", () => {
    const { warnings } = sheetOf({ formulation: soluble(parts, { AB: { value: 1.2, u: 0.4 } }) });
    expect(warnings.map(({ message }) => message)).toEqual([
      "AB: 1 % of the whole, and the shelf says that 1.2 ± 0.4 % dissolves: it may not dissolve, or falls out in the cold; try a little, keep it cold for a week and look for crystals, or take less",
    ]);
    expect(sheetOf({ formulation: soluble(parts, { AB: { value: 1.2, u: 0.2 } }) }).warnings).toEqual([]);
  });

  it("makes its master batch no stronger than that", () => {
    const thin = { THICK: 49.9, THIN: 50, AB: 0.1 };
    const of = (value: number, u: number, batch_g: number) =>
      sheetOf({ formulation: soluble(thin, { AB: { value, u } }), batch_g }).masterBatches[0];
    // 1 g at most 4 % is a dose of 25 g; 8.2 g, the least that is weighed, go into 205 g.
    expect(of(5, 1, 1000)!.stages).toEqual([{ of: "AB", mass_g: 8.2, carrier_g: 196.8 }]);
    expect(of(5, 1, 1000)!.dose_g).toBeCloseTo(25, 9);
    // One in ten dissolves: the solubility changes nothing.
    expect(of(20, 5, 1000)!.massFraction).toBeCloseTo(0.1, 9);
    // 0.01 g in the least dose, 8.2 g, takes two stages: the first is as strong as dissolves.
    const staged = sheetOf({
      formulation: soluble({ THICK: 49.999, THIN: 50, AB: 0.001 }, { AB: { value: 1, u: 0 } }),
    }).masterBatches[0]!;
    expect(staged.stages).toHaveLength(2);
    expect(staged.stages[0]!.mass_g / (staged.stages[0]!.mass_g + staged.stages[0]!.carrier_g)).toBeCloseTo(
      0.01,
      9,
    );
  });

  it("goes in by itself, within narrower limits, where the diluents do not reach for that", () => {
    const fine = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
    const formulation = soluble({ THICK: 69.85, THIN: 30, AB: 0.15 }, { AB: { value: 0.8, u: 0.5 } });
    const { portions, masterBatches, warnings } = sheetOf({ formulation, batch_g: 500, balance: fine });
    expect([masterBatches, warnings]).toEqual([[], []]);
    const portion = portions.find(({ label }) => label === "AB")!;
    // 2 sqrt(0.8² + 2/12) mg = 1.796 mg off 0.4975 % of 0.75 g, 3.731 mg, leaves 1.935 mg.
    expect(portion.drawnIn_g).toBeCloseTo(1.79629e-3, 8);
    expect(portion).toMatchObject({ target_g: 0.75, low_g: 0.749, high_g: 0.751 });
    const tenth = sheetOf({ formulation, batch_g: 50, balance: fine });
    expect(tenth.warnings).toEqual([
      {
        code: "below-minimum-weight",
        message:
          "AB: 0.075 g is below the 1.6 g that this balance weighs honestly, and a master batch in which it is sure to dissolve would be 25 g, more than the diluents allow; make at least 307.7 g or use a balance whose minimum weight is 0.075 g",
      },
    ]);
    expect(tenth.portions.find(({ label }) => label === "AB")!.drawnIn_g).toBe(0);
    const never = soluble({ THICK: 69.85, THIN: 30, AB: 0.15 }, { AB: { value: 0.5, u: 0.5 } });
    expect(sheetOf({ formulation: never, batch_g: 50, balance: fine }).warnings[0]!.message).toContain(
      "and no master batch of it is sure to dissolve; make",
    );
  });
});

describe("weighOut", () => {
  it("gives each portion its target, limits, running total, doubt, and empty fields", () => {
    const { portions, warnings, masterBatches, minimumWeight_g, tolerance } = sheetOf();
    expect(minimumWeight_g).toBe(8.2);
    expect(tolerance).toBeCloseTo(0.01 / 2.01, 15);
    expect(portions.map(({ line, label, target_g }) => [line, label, target_g])).toEqual([
      [1, "THIN", 300],
      [2, "AB", 10],
      [3, "PI", 20],
      [4, "MID", 120],
      [5, "THICK", 550],
    ]);
    expect(portions.map(({ runningTotal_g }) => runningTotal_g)).toEqual([300, 310, 330, 450, 1000]);
    // 300 g within 0.4975 %: 298.5075 to 301.4925, and inward to the digit.
    expect(portions[0]).toMatchObject({
      low_g: 298.51,
      high_g: 301.49,
      lot: "",
      actual_g: null,
      cost: null,
      loads: 1,
    });
    expect(portions[0]!.u_g).toBeCloseTo(4.08248e-3, 8);
    expect([warnings, masterBatches]).toEqual([[], []]);
  });

  it("rounds targets to what the balance can show", () => {
    const { portions } = sheetOf({ batch_g: 2000 / 3, weighingAccuracy: 0.01 });
    expect(portions.map(({ target_g }) => target_g)).toEqual([200, 6.67, 13.33, 80, 366.67]);
    expect(portions.at(-1)!.runningTotal_g).toBe(666.67);
  });

  it("keeps every mass fraction within the accuracy, wherever within their limits the masses fall", () => {
    const unit = fc.double({ min: 0, max: 1, noNaN: true });
    const corner = fc.oneof(unit, fc.constantFrom(0, 1));
    fc.assert(
      fc.property(
        fc.tuple(corner, corner, corner, corner, corner),
        fc.double({ min: 0.002, max: 0.3, noNaN: true }),
        (places, accuracy) => {
          const { portions, batch_g } = sheetOf({ accuracy, batch_g: 1234.567 });
          const masses = portions.map(({ low_g, high_g }, i) => low_g + places[i]! * (high_g - low_g));
          const total = masses.reduce((sum, mass) => sum + mass, 0);
          portions.forEach(({ exact_g }, i) =>
            expect(Math.abs(masses[i]! / total / (exact_g / batch_g) - 1)).toBeLessThanOrEqual(
              accuracy * (1 + 1e-9),
            ),
          );
        },
      ),
    );
  });

  it("weighs in loads what is beyond the balance, with the doubt of each load", () => {
    const [first, , , , last] = sheetOf({ batch_g: 10000 }).portions;
    expect([first!.loads, last!.loads]).toEqual([2, 3]);
    expect(last!.u_g / first!.u_g).toBeCloseTo(Math.sqrt(3 / 2), 12);
  });

  it("says when no mass that can be shown will do", () => {
    const coarse = { readability_g: 1, repeatability_g: 0, capacity_g: 5000 };
    const { warnings, portions } = sheetOf({ balance: coarse, batch_g: 1040, weighingAccuracy: 0.5 });
    expect(portions[1]).toMatchObject({ exact_g: 10.4, target_g: 10, low_g: 10, high_g: 10 });
    expect(warnings).toContainEqual({
      code: "balance-too-coarse",
      message: "AB: no mass that the balance can show lies within 0.4975 % of 10.4 g; 10 g is the nearest",
    });
  });

  it("fills in the lot that the formulation names, and tells lots apart", () => {
    const [thick, ...rest] = plain.components;
    const ofLot = withLot(thick!.ingredient, shelf.lots.get("T-7")!);
    const half = thick!.massFraction / 2;
    const components = [
      { ...thick!, massFraction: half },
      { ingredient: ofLot, massFraction: half },
      ...rest,
    ];
    const { portions } = sheetOf({ formulation: { ...plain, components } });
    expect(portions.slice(-2).map(({ label, lot, target_g }) => [label, lot, target_g])).toEqual([
      ["THICK", "", 275],
      ["THICK (lot T-7)", "T-7", 275],
    ]);
  });

  it("adds up what it costs, and names what has no price", () => {
    const prices_perkg = { THIN: 10, THICK: 20, MID: 30, PI: 400 };
    const { cost, portions } = sheetOf({ prices: { currency: "EUR", prices_perkg } });
    expect(portions.map((one) => one.cost)).toEqual([3, null, 8, 3.6, 11]);
    expect(cost!.total).toBeCloseTo(25.6, 12);
    expect(cost).toMatchObject({ currency: "EUR", unpriced: ["AB"] });
    expect(sheetOf().cost).toBeNull();
  });

  it.each([
    [{ batch_g: 0 }, 'weigh-out of "test": batch_g is 0; it must be a finite number above 0'],
    [{ accuracy: 0 }, 'weigh-out of "test": accuracy is 0; it must be a number above 0 and at most 0.5'],
    [
      { formulation: { ...plain, components: [] } },
      'weigh-out of "test": nothing is in it; give at least one ingredient a share',
    ],
    [
      { prices: { currency: "EUR", prices_perkg: { THIN: -1 } } },
      'weigh-out of "test": prices_perkg.THIN is -1; it must be a finite number of at least 0',
    ],
  ])("refuses %j", (change, message) => {
    expect(() => sheetOf(change)).toThrow(message);
  });
});

describe("a portion too little to weigh", () => {
  it("goes in as a master batch in the diluent there is most of, and the diluent is less by that", () => {
    const { portions, masterBatches, warnings } = sheetOf({ batch_g: 400 });
    expect(warnings).toEqual([]);
    expect(masterBatches).toHaveLength(2);
    const [absorber] = masterBatches;
    // 4 g are wanted: 40 g of a blend of one in ten, made from the least that can be weighed.
    expect(absorber).toMatchObject({
      label: "AB in THIN",
      stages: [{ of: "AB", mass_g: 8.2, carrier_g: 73.8 }],
      enoughFor: 2,
    });
    expect(absorber!.massFraction).toBeCloseTo(0.1, 12);
    expect(absorber!.dose_g).toBeCloseTo(40, 9);
    expect(portions.map(({ label, target_g }) => [label, target_g])).toEqual([
      ["THIN", 12],
      ["master batch of AB in THIN", 40],
      ["master batch of PI in THIN", 80],
      ["MID", 48],
      ["THICK", 220],
    ]);
  });

  it("holds the doubt of the weighings it was made by", () => {
    const [absorber] = sheetOf({ batch_g: 400 }).masterBatches;
    const u = 4.08248e-3;
    // w = 8.2 / 82: both masses to u, so u(w)/w = sqrt((0.9 u)² + (0.1 u)²) / 8.2.
    expect(absorber!.relativeU).toBeCloseTo((Math.hypot(0.9, 0.1) * u) / 8.2, 8);
    // Weighed directly, 4 g would be known to u / 4 g: worse than by the master batch.
    expect(absorber!.relativeU).toBeLessThan(u / 4);
  });

  it("is half of the master batch where the diluent does not reach further", () => {
    const formulation = formulationOf({ THICK: 78, THIN: 20, PI: 2 });
    const [initiator] = sheetOf({ formulation, batch_g: 100 }).masterBatches;
    // One in ten would leave 2 g of the 20 g of diluent, too little to weigh: the least dose it is, and of 7 g one in two.
    expect(initiator!.dose_g).toBeCloseTo(8.2, 9);
    const [more] = sheetOf({ formulation, batch_g: 350 }).masterBatches;
    expect(more!.massFraction).toBeCloseTo(0.5, 2);
  });

  it("is thinned in stages where one would make far too much", () => {
    const { masterBatches } = sheetOf({ formulation: formulationOf({ THICK: 49.99, THIN: 50, AB: 0.01 }) });
    const [absorber] = masterBatches;
    // 0.1 g in a dose of 8.2 g: 82-fold, so two stages of about nine.
    expect(absorber!.stages).toHaveLength(2);
    expect(absorber!.stages[1]!.of).toBe("stage 1 of AB in THIN");
    for (const { mass_g, carrier_g } of absorber!.stages) {
      expect(mass_g).toBeGreaterThanOrEqual(8.2);
      expect((mass_g + carrier_g) / mass_g).toBeCloseTo(Math.sqrt(82), 2);
    }
  });

  it("is planned so that every weighing is honest and the recipe is met, whatever the batch", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 20, max: 3000, noNaN: true }),
        fc.constantFrom(0.001, 0.01, 0.1),
        fc.constantFrom(0.0001, 0.001, 0.01),
        (batch_g, weighingAccuracy, readability_g) => {
          const sheet = sheetOf({ batch_g, weighingAccuracy, balance: { ...balance, readability_g } });
          const least = sheet.minimumWeight_g * (1 - 1e-9);
          for (const { stages, enoughFor } of sheet.masterBatches) {
            expect(enoughFor).toBeGreaterThanOrEqual(1);
            for (const { mass_g, carrier_g } of stages) {
              expect(mass_g).toBeGreaterThanOrEqual(least);
              expect(carrier_g).toBeGreaterThanOrEqual(least);
            }
          }
          const flagged = sheet.warnings.filter(({ code }) => code === "below-minimum-weight");
          const small = sheet.portions.filter(({ exact_g }) => exact_g < least);
          const drawnIn = small.filter(({ drawnIn_g }) => drawnIn_g > 0);
          expect(flagged).toHaveLength(small.length - drawnIn.length);
          // Whatever shows within drawn-in limits, the mass itself is within the tolerance by twice its doubt.
          for (const { exact_g, low_g, high_g, u_g } of drawnIn) {
            expect(low_g - 2 * u_g).toBeGreaterThanOrEqual(exact_g * (1 - sheet.tolerance) * (1 - 1e-9));
            expect(high_g + 2 * u_g).toBeLessThanOrEqual(exact_g * (1 + sheet.tolerance) * (1 + 1e-9));
          }
          for (const { ingredient, massFraction } of plain.components) {
            const mass_g = sheet.portions
              .flatMap(({ contents, exact_g }) => contents.map((one) => ({ ...one, exact_g })))
              .filter((one) => one.ingredient === ingredient)
              .reduce((sum, one) => sum + one.massFraction * one.exact_g, 0);
            expect(mass_g).toBeCloseTo(massFraction * batch_g, 9);
          }
        },
      ),
    );
  });

  it("is flagged with the batch and the balance it takes where no diluent suffices", () => {
    const { warnings, masterBatches } = sheetOf({ batch_g: 20 });
    expect(masterBatches).toEqual([]);
    expect(warnings).toContainEqual({
      code: "below-minimum-weight",
      message:
        "AB: 0.2 g is below the 8.2 g that this balance weighs honestly, and no diluent is left for a master batch; make at least 264.6 g or use a balance whose minimum weight is 0.2 g",
    });
  });
});
