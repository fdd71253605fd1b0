import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fitGrunbergNissan, grunbergNissan, type PairInteraction } from "../../../lib/models/viscosity.js";
import { robustScores } from "../../../lib/numerics/runs.js";
import { readBlocks } from "../../reference/readTable.js";

const viscosity = fc.double({ min: 0.1, max: 1e5, noNaN: true });
const interaction = fc.double({ min: -8, max: 8, noNaN: true });
const share = fc.double({ min: 0, max: 1, noNaN: true });

const pair = (first: number, second: number, G: number): PairInteraction => ({
  first,
  second,
  G,
  basis: "mole",
});

function binary(x1: number, eta1: number, eta2: number, G: number): number {
  return grunbergNissan({
    fractions: [x1, 1 - x1],
    viscosities_mPas: [eta1, eta2],
    basis: "mole",
    interactions: [pair(0, 1, G)],
  });
}

// Rounding only: ln eta is of the order of 10, so its exponential is good to about 1e-14.
const same = (a: number, b: number): void => expect(Math.abs(a / b - 1)).toBeLessThan(1e-12);

describe("grunbergNissan, exact properties of the rule", () => {
  it("gives the pure viscosities at the ends, whatever G", () => {
    fc.assert(
      fc.property(viscosity, viscosity, interaction, (eta1, eta2, G) => {
        same(binary(1, eta1, eta2, G), eta1);
        same(binary(0, eta1, eta2, G), eta2);
      }),
    );
  });

  it("does not care which component is called the first", () => {
    fc.assert(
      fc.property(share, viscosity, viscosity, interaction, (x, eta1, eta2, G) => {
        same(binary(x, eta1, eta2, G), binary(1 - x, eta2, eta1, G));
      }),
    );
  });

  it("scales with the unit of viscosity", () => {
    fc.assert(
      fc.property(share, viscosity, viscosity, interaction, (x, eta1, eta2, G) => {
        same(binary(x, 1000 * eta1, 1000 * eta2, G), 1000 * binary(x, eta1, eta2, G));
      }),
    );
  });

  it("does not see that a component has been poured from two bottles", () => {
    fc.assert(
      fc.property(share, share, viscosity, viscosity, interaction, (x, split, eta1, eta2, G) => {
        const divided = grunbergNissan({
          fractions: [x * split, x * (1 - split), 1 - x],
          viscosities_mPas: [eta1, eta1, eta2],
          basis: "mole",
          interactions: [pair(0, 2, G), pair(2, 1, G)],
        });
        same(divided, binary(x, eta1, eta2, G));
      }),
    );
  });

  it("is sqrt(eta1 eta2) exp(G/4) half way: each pair counts once", () => {
    fc.assert(
      fc.property(viscosity, viscosity, interaction, (eta1, eta2, G) => {
        same(binary(0.5, eta1, eta2, G), Math.sqrt(eta1 * eta2) * Math.exp(G / 4));
      }),
    );
  });

  it("has its extremum at x1 = 1/2 + ln(eta1/eta2)/(2G), above the neighbours when G > 0 and below when G < 0", () => {
    fc.assert(
      fc.property(
        viscosity,
        fc.double({ min: -0.9, max: 0.9, noNaN: true }),
        interaction,
        (eta1, tilt, G) => {
          fc.pre(Math.abs(G) > 0.1);
          const eta2 = eta1 * Math.exp(-tilt * G);
          const x = 0.5 + tilt / 2;
          const [left, top, right] = [x - 0.02, x, x + 0.02].map((xi) => binary(xi, eta1, eta2, G));
          expect(Math.sign(top! - left!)).toBe(Math.sign(G));
          expect(Math.sign(top! - right!)).toBe(Math.sign(G));
        },
      ),
    );
    // eta 0.591 and 0.8432, G = 0.65303: x1* = 0.22789, eta* = 0.87229, worked out by hand to 5 digits.
    const extremum = 0.5 + Math.log(0.591 / 0.8432) / (2 * 0.65303);
    expect(extremum).toBeCloseTo(0.22789, 5);
    expect(binary(extremum, 0.591, 0.8432, 0.65303)).toBeCloseTo(0.87229, 5);
  });

  it("keeps its form when ln eta is averaged over temperatures", () => {
    fc.assert(
      fc.property(
        share,
        viscosity,
        viscosity,
        viscosity,
        interaction,
        interaction,
        (x, a1, b1, eta2, Ga, Gb) => {
          const mean = Math.sqrt(binary(x, a1, eta2, Ga) * binary(x, b1, eta2, Gb));
          same(binary(x, Math.sqrt(a1 * b1), eta2, (Ga + Gb) / 2), mean);
        },
      ),
    );
  });
});

describe("grunbergNissan, published tables", () => {
  const path = "viscosity/ternary__3-pentanone__2-butanol__ethyl-chloroacetate.csv";
  const [butanolPentanone, butanolAcetate, pentanoneAcetate, ternary] = readBlocks(path);
  const pure = { pentanone: 0.442, butanol: 2.998, acetate: 1.095 };

  const fitted = (rows: number[][], ends: readonly [number, number]): number =>
    fitGrunbergNissan({
      fractions: rows.map(([x]) => x!),
      viscosities_mPas: rows.map(([, eta]) => eta!),
      pureViscosities_mPas: ends,
      basis: "mole",
    }).G;

  const predicted = ([x1, x2]: number[], interactions: PairInteraction[]): number =>
    grunbergNissan({
      fractions: [x1!, x2!, 1 - x1! - x2!],
      viscosities_mPas: [pure.pentanone, pure.butanol, pure.acetate],
      basis: "mole",
      interactions,
    });

  const averageDeviation = (rows: number[][], interactions: PairInteraction[]): number => {
    const deviations = rows.map((row) => Math.abs(predicted(row, interactions) / row[2]! - 1));
    return deviations.reduce((sum, d) => sum + d, 0) / deviations.length;
  };

  it("predicts a ternary from its three binaries, and no better than it should", () => {
    // Iloukhani, Habibi, Khanlarzadeh, Thermochim. Acta 563 (2013) 67-71, doi 10.1016/j.tca.2013.03.008. The average
    // deviations of this rule on that table (6.19, 4.94 and 34.6 %) were worked out by an independent program.
    const interactions = [
      pair(1, 0, fitted(butanolPentanone!, [pure.butanol, pure.pentanone])),
      pair(1, 2, fitted(butanolAcetate!, [pure.butanol, pure.acetate])),
      pair(0, 2, fitted(pentanoneAcetate!, [pure.pentanone, pure.acetate])),
    ];
    expect(ternary).toHaveLength(39);
    expect(Math.abs(100 * averageDeviation(ternary!, interactions) - 6.19)).toBeLessThan(0.02);
    // One printed point (0.2007, 0.3501, 1.784) stands far off all its neighbours.
    const sound = ternary!.filter(([, , eta]) => eta !== 1.784);
    expect(sound).toHaveLength(38);
    expect(Math.abs(100 * averageDeviation(sound, interactions) - 4.94)).toBeLessThan(0.02);
    expect(Math.abs(100 * averageDeviation(ternary!, []) - 34.6)).toBeLessThan(0.05);
    // Its robust score is above 10, and the next is 5.2, by the same program.
    const residuals = ternary!.map((row) => Math.log(row[2]! / predicted(row, interactions)));
    const sizes = robustScores(residuals).map(Math.abs);
    expect(sizes.flatMap((size, i) => (size > 10 ? [ternary![i]![2]] : []))).toEqual([1.784]);
    expect([...sizes].sort((a, b) => b - a)[1]).toBeCloseTo(5.2, 1);
  });

  it("agrees with a worked example of the ideal rule, styrene and toluene 50/50 at 20 °C: 0.67 mPa s", () => {
    // Perry's Chemical Engineers' Handbook, 7th ed., p. 2-367 (second hand), printed to two decimals.
    expect(binary(0.5, 0.76, 0.59, 0)).toBeCloseTo(0.67, 2);
  });
});

describe("grunbergNissan, refusals", () => {
  const good = {
    fractions: [0.4, 0.6],
    viscosities_mPas: [900, 9],
    basis: "mass" as const,
    interactions: [],
  };
  const mass = (first: number, second: number, G = 1): PairInteraction => ({
    first,
    second,
    G,
    basis: "mass",
  });

  it.each([
    [
      { ...good, interactions: [pair(0, 1, -1)] },
      "grunbergNissan: interactions[0] was found on the mole basis and the fractions are on the mass basis; " +
        "convert the fractions or fit G again on the mass basis",
    ],
    [
      { ...good, fractions: [0.4, 0.5] },
      "grunbergNissan: fractions add up to 0.9; they must add up to 1 within 1e-9; divide each by the sum",
    ],
    [
      { ...good, fractions: [1.2, -0.2] },
      "grunbergNissan: fractions[0] is 1.2; it must be a number from 0 to 1",
    ],
    [
      { ...good, viscosities_mPas: [900] },
      "grunbergNissan: fractions holds 2, viscosities_mPas holds 1; the lists must be of the same length",
    ],
    [
      { ...good, viscosities_mPas: [900, 0] },
      "grunbergNissan: viscosities_mPas[1] is 0; it must be a finite number above 0",
    ],
    [
      { ...good, interactions: [mass(0, 1), mass(1, 0)] },
      "grunbergNissan: interactions[1] gives components 0 and 1 a second time; give each pair once",
    ],
    [
      { ...good, interactions: [mass(1, 1)] },
      "grunbergNissan: interactions[0] pairs component 1 with itself; a component has no interaction with itself",
    ],
    [
      { ...good, interactions: [mass(0, 2)] },
      "grunbergNissan: interactions[0].second is 2; it must be the place of a component, 0 to 1",
    ],
    [
      { ...good, interactions: [mass(0, 1, NaN)] },
      "grunbergNissan: interactions[0].G is NaN; it must be a finite number",
    ],
    [
      { ...good, interactions: [mass(0, 1, 1e4)] },
      "grunbergNissan: the viscosity of the mixture in mPas is Infinity; it must be a finite number above 0; " +
        "check the G of each pair",
    ],
    [{ ...good, basis: "mol" as "mole" }, 'grunbergNissan: unknown basis "mol"; did you mean "mole"?'],
  ])("refuses %j", (mixture, message) => {
    expect(() => grunbergNissan(mixture)).toThrow(message);
  });
});
