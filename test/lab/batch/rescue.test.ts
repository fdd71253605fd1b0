import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { asMade, rescue, weighOut, type Rescue, type Weighing } from "../../../lib/lab/batch.js";
import { formulationOf } from "../../fixtures.js";

const balance = { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 };
const formulation = formulationOf({ THICK: 40, THIN: 58, PI: 2 });
const sheet = weighOut({ formulation, batch_g: 1000, balance });
const [thin, initiator, thick] = [1, 2, 3];
const weighed = (masses: Record<number, number> = {}): Weighing[] =>
  sheet.portions.map(({ line, target_g }) => ({ line, mass_g: masses[line] ?? target_g }));
const additions = (plan: Rescue) =>
  plan.outcome === "add" ? plan.additions.map(({ add_g }) => add_g) : plan;

describe("rescue", () => {
  it("asks for nothing where the batch is within its accuracy", () => {
    expect(rescue({ sheet, weighings: weighed() })).toEqual({ outcome: "within", total_g: 1000 });
    expect(rescue({ sheet, weighings: weighed({ [thick]: 401 }) })).toEqual({
      outcome: "within",
      total_g: 1001,
    });
    // A batch of another size in the right proportions is right.
    expect(rescue({ sheet, weighings: weighed({ 1: 290, 2: 10, 3: 200 }) }).outcome).toBe("within");
  });

  it("adds of everything else what an overdose of one asks for", () => {
    const plan = rescue({ sheet, weighings: weighed({ [thick]: 600 }) });
    expect(additions(plan)).toEqual([290, 10, 0]);
    expect(plan).toMatchObject({ outcome: "add", total_g: 1500, growth: 1.5, setBy: "THICK" });
    if (plan.outcome === "add")
      expect(plan.additions[0]).toMatchObject({ line: 1, label: "THIN", present_g: 580, add_g: 290 });
  });

  it("goes on from the middle of a sheet", () => {
    expect(additions(rescue({ sheet, weighings: [{ line: thin!, mass_g: 580 }] }))).toEqual([0, 20, 400]);
    expect(additions(rescue({ sheet, weighings: [{ line: thin!, mass_g: 870 }] }))).toEqual([0, 30, 600]);
    expect(rescue({ sheet, weighings: [{ line: thin!, mass_g: 580 }] })).toMatchObject({
      setBy: "the sheet",
    });
  });

  it("counts what was poured in beside the sheet", () => {
    const wrong = [{ ingredient: "THICK", mass_g: 200 }];
    expect(additions(rescue({ sheet, weighings: weighed(), wrong }))).toEqual([290, 10, 0]);
  });

  it("leaves out what is too little to weigh and not needed", () => {
    // An initiator already a little over needs none.
    const plan = rescue({ sheet, weighings: weighed({ [thick!]: 414, [initiator!]: 20.7 }) });
    expect(additions(plan)).toEqual([20.3, 0, 0]);
  });

  it("weighs less than the minimum weight where what is in and what is added are together known well enough", () => {
    // Of a batch grown by 3.5 %, 0.7 g of initiator lack. Both weighings together are known to 4.08248 sqrt(2) mg: twice that and
    // half a digit, 16.5 mg, are within 0.4975 % of 20.7 g, 103 mg.
    const plan = rescue({ sheet, weighings: weighed({ [thick!]: 414 }) });
    expect(additions(plan)).toEqual([20.3, 0.7, 0]);
    expect(plan).toMatchObject({ outcome: "add", setBy: "THICK", total_g: 1035 });
    expect(plan).not.toHaveProperty("smaller");
    if (plan.outcome === "add") expect(plan.additions[1]!.u_g).toBeCloseTo(4.08248e-3 * Math.SQRT2, 7);
  });

  it("grows the batch where they are not, and says what it would be without", () => {
    const of = (accuracy: number) => {
      const strict = weighOut({ formulation, batch_g: 1000, balance, accuracy });
      return rescue({ sheet: strict, weighings: weighed({ [thick!]: 414 }) });
    };
    // Within 0.1 %, 16.5 mg are too much of 20.7 g: the batch grows until 8.2 g lack, of 28.2 g.
    const plan = of(0.001);
    expect(plan).toMatchObject({ outcome: "add", setBy: "PI", growth: expect.closeTo(1.41, 3) as number });
    expect((additions(plan) as number[])[1]).toBe(8.2);
    expect(plan).toMatchObject({
      smaller: {
        total_g: expect.closeTo(1034.3, 6) as number,
        short: [{ label: "PI", relativeChange: expect.closeTo(20 / 20.7 - 1, 9) as number }],
      },
    });
    // Within 0.13 % they are well enough known from 16.5 mg / 0.065 % on, 25.5 g.
    const t = 0.0013 / 2.0013;
    const sooner = of(0.0013);
    const filled_g = (2 * 4.08248e-3 * Math.SQRT2 + 0.005) / t;
    expect(sooner).toMatchObject({ setBy: "PI", growth: expect.closeTo(filled_g / 20, 4) as number });
  });

  it("counts the loads of what is beyond the balance", () => {
    const small = { ...balance, capacity_g: 300 };
    const heavy = weighOut({ formulation, batch_g: 1000, balance: small });
    const plan = rescue({ sheet: heavy, weighings: weighed({ [initiator!]: 30 }) });
    // 580 g in two loads and 290 g in one; 400 g in two and 200 g in one.
    expect(plan).toMatchObject({ outcome: "add", total_g: 1500 });
    if (plan.outcome !== "add") return;
    const counts = plan.additions.map(({ u_g }) => (u_g / 4.08248e-3) ** 2);
    [3, 1, 3].forEach((count, i) => expect(counts[i]).toBeCloseTo(count, 4));
  });

  it("brings any batch back to its recipe, by additions that can be weighed", () => {
    const mass = fc.double({ min: 1, max: 900, noNaN: true });
    fc.assert(
      fc.property(mass, mass, fc.double({ min: 0.5, max: 60, noNaN: true }), (a, b, c) => {
        const weighings = weighed({ [thin!]: a, [thick!]: b, [initiator!]: c });
        const plan = rescue({ sheet, weighings });
        if (plan.outcome !== "add") {
          const { parts } = asMade({ sheet, weighings });
          expect(plan.outcome === "within" && parts.every(({ within }) => within)).toBe(true);
          return;
        }
        for (const { add_g, present_g, u_g } of plan.additions) {
          const known = 2 * u_g <= sheet.tolerance * (present_g + add_g);
          expect(add_g === 0 || add_g >= 8.2 || known).toBe(true);
        }
        const after = plan.additions.map(({ line, present_g, add_g }) => ({
          line,
          mass_g: present_g + add_g,
        }));
        // Rounding an addition to the balance's digit moves a fraction by less than a tenth of the accuracy.
        for (const { relativeChange } of asMade({ sheet, weighings: after }).parts)
          expect(Math.abs(relativeChange)).toBeLessThan(1.1 * sheet.accuracy);
      }),
    );
  });

  it("goes below the minimum weight only where the sheet itself had to", () => {
    const tiny = weighOut({ formulation, batch_g: 20, balance });
    expect(tiny.warnings.map(({ code }) => code)).toContain("below-minimum-weight");
    const plan = rescue({ sheet: tiny, weighings: [{ line: 1, mass_g: 11.6 }] });
    expect(additions(plan)).toEqual([0, 0.4, 8]);
  });

  it("is impossible where something is in it that the recipe does not hold", () => {
    expect(rescue({ sheet, weighings: weighed(), wrong: [{ ingredient: "AB", mass_g: 1 }] })).toEqual({
      outcome: "impossible",
      reason:
        "AB has no line of its own on the sheet, and nothing takes it out again; keep the batch apart under another name or discard it",
    });
    expect(rescue({ sheet, weighings: weighed(), wrong: [{ ingredient: "AB", mass_g: 0 }] }).outcome).toBe(
      "within",
    );
  });

  it("is impossible where the vessel is too small, and says how much it would have to hold", () => {
    const plan = rescue({ sheet, weighings: weighed({ [initiator!]: 40 }), vessel_g: 1500 });
    expect(plan).toEqual({
      outcome: "impossible",
      reason:
        "the batch would have to grow to 2000 g, and the vessel holds 1500 g; take a larger vessel, or discard part of what is in it after stirring and plan again with what is left",
      neededTotal_g: 2000,
    });
    expect(rescue({ sheet, weighings: weighed({ [initiator!]: 40 }), vessel_g: 2000 }).outcome).toBe("add");
  });

  it.each([
    [{ weighings: [] }, 'rescue of "test": nothing is in the vessel; weigh out the sheet instead'],
    [
      { weighings: [{ line: 9, mass_g: 1 }] },
      'rescue of "test": weighings[0].line is 9; the sheet has lines 1 to 3',
    ],
    [{ vessel_g: 0 }, 'rescue of "test": vessel_g is 0; it must be a finite number above 0'],
    [
      { wrong: [{ ingredient: "THIN", mass_g: -1 }] },
      'rescue of "test": wrong[0].mass_g is -1; it must be a finite number of at least 0',
    ],
  ])("refuses %j", (change, message) => {
    expect(() => rescue({ sheet, weighings: weighed(), ...change })).toThrow(message);
  });
});
