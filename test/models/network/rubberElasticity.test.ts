import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  affineModulus,
  cycleRankPerMonomer,
  phantomModulus,
  strandsFromModulus,
} from "../../../lib/models/network.js";

const loose = { strands_molm3: 1000, temperature_C: 100 };

describe("affineModulus and phantomModulus", () => {
  // 3 R at 298.15 K is 7436.871 J/mol, calculated outside this program.
  it("give 7.43687 MPa for a mole of strands in a litre at 25 °C", () => {
    expect(affineModulus({ strands_molm3: 1000, temperature_C: 25 }).modulus_MPa).toBeCloseTo(7.436871, 6);
  });

  it("give the moduli calculated outside this program at 373.15 K", () => {
    expect(affineModulus(loose).shearModulus_MPa).toBeCloseTo(3.10254, 5);
    expect(affineModulus(loose).modulus_MPa).toBeCloseTo(9.30763, 5);
    expect(phantomModulus({ ...loose, strandsPerJunction: 4 }).modulus_MPa).toBeCloseTo(4.65381, 5);
    expect(phantomModulus({ ...loose, strandsPerJunction: 3 }).modulus_MPa).toBeCloseTo(3.10254, 5);
  });

  it("stand as 1 - 2/F to each other and meet for junctions of many strands", () => {
    fc.assert(
      fc.property(fc.double({ min: 2.01, max: 100, noNaN: true }), (strandsPerJunction) => {
        const ratio =
          phantomModulus({ ...loose, strandsPerJunction }).modulus_MPa / affineModulus(loose).modulus_MPa;
        expect(ratio).toBeCloseTo(1 - 2 / strandsPerJunction, 12);
      }),
    );
  });

  it.each([
    [{ strands_molm3: 0 }, "strands_molm3 is 0; it must be a number above 0 and at most 1000000"],
    [{ temperature_C: -273.15 }, "temperature_C is -273.15; it must be a finite number above -273.15"],
    [
      { strandsPerJunction: 2 },
      "strandsPerJunction is 2; it must be a number above 2 and at most 100; two strands in a junction are one strand",
    ],
  ])("refuse %j", (change, message) => {
    const input = { ...loose, strandsPerJunction: 3, ...change };
    expect(() => phantomModulus(input)).toThrow(`phantomModulus: ${message}`);
    if (!("strandsPerJunction" in change))
      expect(() => affineModulus(input)).toThrow(`affineModulus: ${message}`);
  });
});

describe("strandsFromModulus", () => {
  it("is the inverse of the affine model", () => {
    const { modulus_MPa } = affineModulus(loose);
    const back = strandsFromModulus({ modulus_MPa, temperature_C: 100, density_gcm3: 1.1 });
    expect(back.strands_molm3).toBeCloseTo(1000, 9);
    expect(back.strandMass_gmol).toBeCloseTo(1100, 9);
  });

  // 10 MPa at 400 K and 1.1 g/cm3, calculated outside this program.
  it("gives 1002.27 mol/m3 and 1097.5 g/mol", () => {
    const given = strandsFromModulus({ modulus_MPa: 10, temperature_C: 126.85, density_gcm3: 1.1 });
    expect(Math.abs(given.strands_molm3 - 1002.27)).toBeLessThan(6e-3);
    expect(Math.abs(given.strandMass_gmol - 1097.5)).toBeLessThan(0.06);
  });

  it("refuses a modulus in Pa", () => {
    expect(() => strandsFromModulus({ modulus_MPa: 1e7, temperature_C: 25, density_gcm3: 1.1 })).toThrow(
      "strandsFromModulus: modulus_MPa is 10000000; it must be a number above 0 and at most 100000; give it in MPa",
    );
  });
});

describe("cycleRankPerMonomer", () => {
  // Calculated outside this program from the sum over reacted bonds; all exact decimals.
  it.each([
    [2, 0.5, 0.25],
    [2, 0.8, 0.64],
    [2, 1, 1],
    [3, 0.5, 0.625],
    [3, 0.8, 1.408],
    [3, 1, 2],
    [4, 0.5, 1.0625],
    [4, 0.8, 2.2016],
    [4, 1, 3],
  ])("f = %i, p = %f: %f", (functionality, conversion, expected) => {
    expect(cycleRankPerMonomer({ functionality, conversion })).toBeCloseTo(expected, 13);
  });

  it("does not depend on how the junctions are counted", () => {
    // A reacted divinyl monomer is one junction with two strands, or two junctions with three.
    const RT = { temperature_C: 25 };
    const once = phantomModulus({ ...RT, strands_molm3: 2, strandsPerJunction: 4 }).modulus_MPa;
    const twice = phantomModulus({ ...RT, strands_molm3: 3, strandsPerJunction: 3 }).modulus_MPa;
    expect(once).toBeCloseTo(twice, 14);
    const rank = cycleRankPerMonomer({ functionality: 2, conversion: 1 });
    expect(once).toBeCloseTo(affineModulus({ ...RT, strands_molm3: rank }).modulus_MPa, 14);
  });

  it("is the sum over the bonds that reacted", () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 12 }), fc.double({ min: 0, max: 1, noNaN: true }), (f, p) => {
        let sum = 0;
        for (let k = 2, choose = (f * (f - 1)) / 2; k <= f; choose *= (f - k) / (k + 1), k++)
          sum += choose * p ** k * (1 - p) ** (f - k) * (k - 1);
        expect(cycleRankPerMonomer({ functionality: f, conversion: p })).toBeCloseTo(sum, 12);
      }),
    );
  });

  it.each([
    [
      { functionality: 2.5 },
      "cycleRankPerMonomer: functionality is 2.5; it must be a whole number: it counts bonds",
    ],
    [{ functionality: 0 }, "cycleRankPerMonomer: functionality is 0; it must be a number from 1 to 12"],
    [{ conversion: -0.1 }, "cycleRankPerMonomer: conversion is -0.1; it must be a number from 0 to 1"],
  ])("refuses %j", (change, message) => {
    expect(() => cycleRankPerMonomer({ functionality: 2, conversion: 0.5, ...change })).toThrow(message);
  });
});
