import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { grunbergNissan, redlichKisterViscosity } from "../../../lib/models/viscosity.js";

const viscosity = fc.double({ min: 0.1, max: 1e5, noNaN: true });
const term = fc.double({ min: -5, max: 5, noNaN: true });
const share = fc.double({ min: 0, max: 1, noNaN: true });

const blend = (fraction: number, eta: readonly [number, number], terms: readonly number[]): number =>
  redlichKisterViscosity({
    fraction,
    viscosities_mPas: eta,
    basis: "mole",
    interaction: { terms, basis: "mole" },
  });

// Rounding only: ln eta is of the order of 10, so its exponential is good to about 1e-14.
const same = (a: number, b: number): void => expect(Math.abs(a / b - 1)).toBeLessThan(1e-12);

describe("redlichKisterViscosity", () => {
  it("is the rule of Grunberg and Nissan with one term, and with further terms of zero", () => {
    fc.assert(
      fc.property(share, viscosity, viscosity, term, (x, eta1, eta2, G) => {
        const plain = grunbergNissan({
          fractions: [x, 1 - x],
          viscosities_mPas: [eta1, eta2],
          basis: "mole",
          interactions: [{ first: 0, second: 1, G, basis: "mole" }],
        });
        same(blend(x, [eta1, eta2], [G]), plain);
        same(blend(x, [eta1, eta2], [G, 0, 0]), plain);
      }),
    );
  });

  it("gives the pure viscosities at the ends, and changes the sign of G1 when the liquids are exchanged", () => {
    fc.assert(
      fc.property(share, viscosity, viscosity, term, term, term, (x, eta1, eta2, G0, G1, G2) => {
        same(blend(1, [eta1, eta2], [G0, G1, G2]), eta1);
        same(blend(0, [eta1, eta2], [G0, G1, G2]), eta2);
        same(blend(x, [eta1, eta2], [G0, G1, G2]), blend(1 - x, [eta2, eta1], [G0, -G1, G2]));
      }),
    );
  });

  it("is sqrt(eta1 eta2) exp(G0/4) half way, whatever the other terms", () => {
    fc.assert(
      fc.property(viscosity, viscosity, term, term, term, (eta1, eta2, G0, G1, G2) => {
        same(blend(0.5, [eta1, eta2], [G0, G1, G2]), Math.sqrt(eta1 * eta2) * Math.exp(G0 / 4));
      }),
    );
  });

  const good = {
    fraction: 0.4,
    viscosities_mPas: [900, 9],
    basis: "mass",
    interaction: { terms: [-1], basis: "mass" },
  } as const;
  it.each([
    [{ ...good, fraction: 1.1 }, "redlichKisterViscosity: fraction is 1.1; it must be a number from 0 to 1"],
    [
      { ...good, viscosities_mPas: [900, 0] as const },
      "redlichKisterViscosity: viscosities_mPas[1] is 0; it must be a finite number above 0",
    ],
    [
      { ...good, interaction: { terms: [], basis: "mass" as const } },
      "redlichKisterViscosity: the number of interaction terms is 0; it must be 1, 2 or 3",
    ],
    [
      { ...good, interaction: { terms: [1, 2, 3, 4], basis: "mass" as const } },
      "redlichKisterViscosity: the number of interaction terms is 4; it must be 1, 2 or 3",
    ],
    [
      { ...good, interaction: { terms: [NaN], basis: "mass" as const } },
      "redlichKisterViscosity: interaction.terms[0] is NaN; it must be a finite number",
    ],
    [
      { ...good, interaction: { terms: [-1], basis: "mole" as const } },
      "redlichKisterViscosity: the interaction was found on the mole basis and the fraction is on the mass basis; " +
        "convert the fraction or fit the interaction again on the mass basis",
    ],
    [
      { ...good, interaction: { terms: [1e5], basis: "mass" as const } },
      "redlichKisterViscosity: the viscosity of the mixture in mPas is Infinity; it must be a finite number above 0; " +
        "check the terms of the interaction",
    ],
    [
      { ...good, basis: "moles" as "mole" },
      'redlichKisterViscosity: unknown basis "moles"; did you mean "mole"?',
    ],
  ])("refuses %j", (input, message) => {
    expect(() => redlichKisterViscosity(input)).toThrow(message);
  });
});
