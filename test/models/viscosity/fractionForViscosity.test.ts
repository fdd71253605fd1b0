import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fractionForViscosity, grunbergNissan } from "../../../lib/models/viscosity.js";

const viscosity = fc.double({ min: 0.1, max: 1e5, noNaN: true });
const interaction = fc.double({ min: -8, max: 8, noNaN: true });

const blend = (x: number, eta: readonly [number, number], G: number): number =>
  grunbergNissan({
    fractions: [x, 1 - x],
    viscosities_mPas: eta,
    basis: "mass",
    interactions: [{ first: 0, second: 1, G, basis: "mass" }],
  });

const solve = (viscosity_mPas: number, eta: readonly [number, number], G: number) =>
  fractionForViscosity({
    viscosity_mPas,
    viscosities_mPas: eta,
    basis: "mass",
    interaction: { G, basis: "mass" },
  });

describe("fractionForViscosity", () => {
  it("gives fractions that blend to the viscosity wanted, rising, with the slope there, the right one called rich", () => {
    fc.assert(
      fc.property(
        viscosity,
        viscosity,
        interaction,
        fc.double({ min: 0, max: 1, noNaN: true }),
        (a, b, G, x) => {
          fc.pre(Math.abs(Math.log(a / b)) > 1e-3 || Math.abs(G) > 1e-3);
          const wanted = blend(x, [a, b], G);
          const answer = solve(wanted, [a, b], G);
          expect(answer.outcome).toBe("reached");
          if (answer.outcome !== "reached") return;
          const { roots } = answer;
          expect(roots.length === 1 || roots[0]!.fraction < roots[1]!.fraction).toBe(true);
          for (const { fraction, slope } of roots) {
            // A root near the extremum is good to the square root of rounding only; the viscosity there is flat.
            expect(blend(fraction, [a, b], G) / wanted).toBeCloseTo(1, 9);
            expect(slope).toBeCloseTo(Math.log(a / b) + G * (1 - 2 * fraction), 10);
          }
          expect(roots.filter(({ oligomerRich }) => oligomerRich)).toHaveLength(1);
          const rich = roots.findIndex(({ oligomerRich }) => oligomerRich);
          expect(rich).toBe(a >= b ? roots.length - 1 : 0);
        },
      ),
    );
  });

  it("finds two fractions on a line with a minimum, both blends thinner than either liquid", () => {
    const answer = solve(7, [20, 10], -3);
    expect(answer.outcome).toBe("reached");
    if (answer.outcome !== "reached") return;
    expect(answer.roots).toHaveLength(2);
    // x = [L + G -+ sqrt((L + G)^2 + 4 G ln(0.7)... ] / 2G with L = ln 2 and G = -3.
    const [L, G, c] = [Math.LN2, -3, -Math.log(0.7)];
    const root = Math.sqrt((L + G) ** 2 + 4 * G * c);
    expect(answer.roots[0]!.fraction).toBeCloseTo((L + G + root) / (2 * G), 12);
    expect(answer.roots[1]!.fraction).toBeCloseTo((L + G - root) / (2 * G), 12);
    expect(answer.roots.map(({ oligomerRich }) => oligomerRich)).toEqual([false, true]);
    expect(answer.roots[0]!.slope).toBeLessThan(0);
    expect(answer.roots[1]!.slope).toBeGreaterThan(0);
  });

  it("gives the neat liquids exactly, and one root at the extremum", () => {
    for (const G of [-1.2, 0, 0.4]) {
      const ends = [10, 12000].map((eta) => solve(eta, [12000, 10], G));
      expect(ends.map((answer) => answer.outcome === "reached" && answer.roots[0]!.fraction)).toEqual([0, 1]);
    }
    const x = 0.5 + Math.LN2 / (2 * -3);
    const bottom = solve(blend(x, [20, 10], -3), [20, 10], -3);
    expect(bottom.outcome === "reached" && bottom.roots).toHaveLength(1);
    expect(bottom.outcome === "reached" && bottom.roots[0]!.fraction).toBeCloseTo(x, 6);
  });

  it("says what can be reached when the wanted cannot", () => {
    const thin = solve(5, [12000, 10], -1.2);
    expect(thin).toEqual({
      outcome: "out-of-reach",
      lowest_mPas: expect.closeTo(10, 10) as number,
      highest_mPas: expect.closeTo(12000, 6) as number,
    });
    const x = 0.5 + Math.LN2 / (2 * -3);
    const below = solve(1, [20, 10], -3);
    expect(below.outcome === "out-of-reach" && below.lowest_mPas).toBeCloseTo(blend(x, [20, 10], -3), 10);
    expect(below.outcome === "out-of-reach" && below.highest_mPas).toBeCloseTo(20, 10);
    const above = solve(60, [20, 10], 3);
    expect(above.outcome === "out-of-reach" && above.highest_mPas).toBeCloseTo(
      blend(0.5 + Math.LN2 / 6, [20, 10], 3),
      9,
    );
  });

  const good = {
    viscosity_mPas: 800,
    viscosities_mPas: [12000, 10],
    basis: "mass",
    interaction: { G: -1.2, basis: "mass" },
  } as const;
  it.each([
    [
      { ...good, viscosity_mPas: 0 },
      "fractionForViscosity: viscosity_mPas is 0; it must be a finite number above 0",
    ],
    [
      { ...good, viscosities_mPas: [12000, -10] as const },
      "fractionForViscosity: viscosities_mPas[1] is -10; it must be a finite number above 0",
    ],
    [
      { ...good, basis: "volume" as const },
      "fractionForViscosity: the interaction was found on the mass basis and the fraction is on the volume basis; " +
        "convert the fraction or fit the interaction again on the volume basis",
    ],
    [
      { ...good, interaction: { G: NaN, basis: "mass" as const } },
      "fractionForViscosity: interaction.G is NaN; it must be a finite number",
    ],
    [
      {
        ...good,
        viscosity_mPas: 10,
        viscosities_mPas: [10, 10] as const,
        interaction: { G: 0, basis: "mass" as const },
      },
      "fractionForViscosity: both liquids have 10 mPas and mix ideally, so every fraction gives it; choose the fraction by another property",
    ],
  ])("refuses %j", (question, message) => {
    expect(() => fractionForViscosity(question)).toThrow(message);
  });
});
