import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  grunbergNissan,
  isdaleInteraction,
  isdaleTemperatureLaw,
  type IsdaleMolecule,
} from "../../../lib/models/viscosity.js";

const alkane = (n: number): IsdaleMolecule => ({
  carbons: n,
  hydrogens: 2 * n + 2,
  groups: { methyl: 2, methylene: n - 2 },
});
const aceticAcid: IsdaleMolecule = { carbons: 2, hydrogens: 4, groups: { methyl: 1, carboxyl: 1 } };
const acetone: IsdaleMolecule = { carbons: 3, hydrogens: 6, groups: { methyl: 2, ketone: 1 } };
const benzene: IsdaleMolecule = { carbons: 6, hydrogens: 6, groups: { benzeneRing: 1 } };
const alcohol = (n: number): IsdaleMolecule => ({
  carbons: n,
  hydrogens: 2 * n + 2,
  groups: { methyl: 1, methylene: n - 1, hydroxyl: 1 },
});

const estimate = (a: IsdaleMolecule, b: IsdaleMolecule): number => isdaleInteraction({ molecules: [a, b] }).G;

describe("isdaleInteraction", () => {
  it("does not care which molecule is named first, and is 0 for a liquid with itself", () => {
    const molecule = fc.constantFrom(alkane(6), alkane(16), aceticAcid, acetone, benzene, alcohol(4));
    fc.assert(
      fc.property(molecule, molecule, (a, b) => {
        fc.pre(!(a === aceticAcid && b.groups.hydroxyl) && !(b === aceticAcid && a.groups.hydroxyl));
        fc.pre(!(a === aceticAcid && b === aceticAcid));
        expect(estimate(a, b)).toBe(estimate(b, a));
        if (a === b) expect(estimate(a, b)).toBe(0);
      }),
    );
  });

  it("follows a worked example: acetic acid and acetone, 70 mol-% at 323 K", () => {
    // The example of Poling, Prausnitz, O'Connell, The Properties of Gases and Liquids, 5th ed. 2001, chapter 9: inputs and
    // measured value, 0.587 mPa s, from memory, so this checks the arithmetic, to be read again in the book. Sums 1.030
    // and 0.846, no W because of the oxygen; the book's error, from memory 0.2 %, is asked for as below 0.5 %.
    const at298 = isdaleInteraction({ molecules: [aceticAcid, acetone] });
    expect(at298.G).toBeCloseTo(1.03 - 0.846, 12);
    expect(at298).toMatchObject({ basis: "mole", temperature_C: 24.85, status: "from memory" });
    const at323 = isdaleTemperatureLaw({
      G: at298.G,
      basis: at298.basis,
      referenceTemperature_C: at298.temperature_C,
      temperature_C: 49.85,
    });
    expect(at323.G).toBeCloseTo(1 - ((1 - 0.184) * 250) / 275, 12);
    const eta = grunbergNissan({
      fractions: [0.7, 0.3],
      viscosities_mPas: [0.798, 0.241],
      basis: "mole",
      interactions: [{ first: 0, second: 1, G: at323.G, basis: "mole" }],
    });
    expect(Math.abs(eta / 0.587 - 1)).toBeLessThan(5e-3);
  });

  it("counts the difference in size between hydrocarbons", () => {
    // Ethane and propane differ by one methylene and by W(3, 2) = 0.3161 / 5 - 0.1188.
    expect(estimate(alkane(2), alkane(3))).toBeCloseTo(0.096 + 0.3161 / 5 - 0.1188, 12);
    // Acetic acid is not one of them: W(2, 3) = 0.18202 stays out of the example above.
    expect(estimate(benzene, alkane(6))).toBeCloseTo(2 * -0.1 + 4 * 0.096 - 0.766, 12);
  });

  it("counts a hydroxyl by its alcohol and a carboxyl by its partner", () => {
    const formicAcid: IsdaleMolecule = { carbons: 1, hydrogens: 2, groups: { carboxyl: 1 } };
    const hexane = -0.2 + 4 * 0.096;
    expect(estimate(alcohol(1), alkane(6))).toBeCloseTo(-0.1 + 0.887 - hexane, 12);
    expect(estimate(alcohol(2), alkane(6))).toBeCloseTo(-0.1 + 0.096 - 0.023 - hexane, 12);
    expect(estimate(alcohol(5), alkane(6))).toBeCloseTo(-0.1 + 4 * 0.096 - 0.443 - hexane, 12);
    expect(estimate(aceticAcid, alkane(6))).toBeCloseTo(-0.1 - 0.411 + 2 * 0.06074 - hexane, 12);
    expect(estimate(formicAcid, acetone)).toBeCloseTo(0.167 - 0.846, 12);
  });

  const with_ = (groups: object): IsdaleMolecule => ({
    ...acetone,
    groups: groups as IsdaleMolecule["groups"],
  });
  it.each([
    [
      [acetone, with_({ methyl: 1, ester: 1 })],
      'isdaleInteraction: molecules[1]: unknown group "ester"; esters, ethers, urethanes and double bonds are not in the table, ' +
        "so no acrylate is; measure five blends and fit G",
    ],
    [
      [with_({ methil: 1 }), acetone],
      'isdaleInteraction: molecules[0]: unknown group "methil"; did you mean "methyl"?',
    ],
    [
      [with_({ methyl: 1.5 }), acetone],
      "isdaleInteraction: molecules[0]: methyl is 1.5; it must be a whole number, 0 or more",
    ],
    [
      [with_({ chlorine: 2 }), acetone],
      "isdaleInteraction: molecules[0]: more than one chlorine is not in the table as it is known here; measure five blends and fit G",
    ],
    [
      [{ ...acetone, carbons: 0 }, acetone],
      "isdaleInteraction: molecules[0]: carbons is 0; it must be a number from 1 to 200",
    ],
    [
      [aceticAcid, alcohol(3)],
      "isdaleInteraction: an acid with an alcohol or another acid is not in the table; measure five blends and fit G",
    ],
  ])("refuses %j", (molecules, message) => {
    expect(() => isdaleInteraction({ molecules: molecules as [IsdaleMolecule, IsdaleMolecule] })).toThrow(
      message,
    );
  });
});
