import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { grunbergNissan, prepareBlend, type PairInteraction } from "../../../lib/models/viscosity.js";

const G = fc.double({ min: -6, max: 6, noNaN: true });

describe("prepareBlend", () => {
  it("gives what grunbergNissan gives, for any number of liquids and in any order of the pairs", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: 0.1, max: 1e5, noNaN: true }), { minLength: 1, maxLength: 7 }),
        fc.array(fc.double({ min: 0.01, max: 1, noNaN: true }), { minLength: 7, maxLength: 7 }),
        fc.array(G, { minLength: 21, maxLength: 21 }),
        fc.boolean(),
        (viscosities_mPas, parts, Gs, turned) => {
          const n = viscosities_mPas.length;
          const total = parts.slice(0, n).reduce((sum, part) => sum + part, 0);
          const fractions = parts.slice(0, n).map((part) => part / total);
          const interactions: PairInteraction[] = [];
          for (let i = 0; i < n; i++) {
            for (let j = i + 1; j < n; j++) {
              const [first, second] = turned ? [j, i] : [i, j];
              interactions.push({ first, second, G: Gs[interactions.length]!, basis: "mass" });
            }
          }
          const mixture = { viscosities_mPas, basis: "mass", interactions } as const;
          const ratio = prepareBlend(mixture)(fractions) / grunbergNissan({ ...mixture, fractions });
          // Rounding only, of ln eta of the order of 10.
          expect(Math.abs(ratio - 1)).toBeLessThan(1e-12);
        },
      ),
    );
  });

  it("reads an array changed in place, typed or plain", () => {
    const viscosity = prepareBlend({ viscosities_mPas: [900, 9], basis: "mole", interactions: [] });
    const x = new Float64Array([1, 0]);
    expect(viscosity(x)).toBeCloseTo(900, 10);
    x.set([0.5, 0.5]);
    expect(viscosity(x)).toBeCloseTo(90, 10);
  });

  const pair = { first: 0, second: 1, G: -1, basis: "mass" } as const;
  const liquids = { viscosities_mPas: [900, 9], basis: "mass", interactions: [pair] } as const;
  it.each([
    [
      [0.4, 0.5],
      "prepareBlend: fractions add up to 0.9; they must add up to 1 within 1e-9; divide each by the sum",
    ],
    [[1.2, -0.2], "prepareBlend: fractions[0] is 1.2; it must be a number from 0 to 1"],
    [[NaN, 1], "prepareBlend: fractions[0] is NaN; it must be a number from 0 to 1"],
    [
      [0.2, 0.3, 0.5],
      "prepareBlend: fractions holds 3, viscosities_mPas holds 2; the lists must be of the same length, one element each per row",
    ],
    [[1], "prepareBlend: fractions holds 1, viscosities_mPas holds 2; the lists must be of the same length"],
  ])("refuses the fractions %j", (fractions, message) => {
    expect(() => prepareBlend(liquids)(fractions)).toThrow(message);
  });

  it.each([
    [
      { ...liquids, viscosities_mPas: [900, 0] },
      "prepareBlend: viscosities_mPas[1] is 0; it must be a finite number above 0",
    ],
    [
      { ...liquids, interactions: [{ ...pair, basis: "mole" as const }] },
      "prepareBlend: interactions[0] was found on the mole basis and the fractions are on the mass basis; " +
        "convert the fractions or fit G again on the mass basis",
    ],
    [
      { ...liquids, interactions: [{ ...pair, second: 2 }] },
      "prepareBlend: interactions[0].second is 2; it must be the place of a component, 0 to 1",
    ],
  ])("refuses the liquids %j", (given, message) => {
    expect(() => prepareBlend(given)).toThrow(message);
  });

  it("does not let an endless viscosity out", () => {
    const wild = prepareBlend({ ...liquids, interactions: [{ ...pair, G: 1e5 }] });
    expect(() => wild([0.5, 0.5])).toThrow(
      "prepareBlend: the viscosity of the mixture in mPas is Infinity; it must be a finite number above 0; check the G of each pair",
    );
  });
});
