import { describe, expect, it } from "vitest";
import { adiabaticRise, polymerisationHeat } from "../../../lib/models/network.js";

const heatOf = (functionality: number, molarMass: number, heat_Jmol: number) =>
  polymerisationHeat({
    massFractions: [1],
    functionalities: [functionality],
    molarMasses_gmol: [molarMass],
    heatsOfPolymerisation_Jmol: [heat_Jmol],
  });

describe("polymerisationHeat", () => {
  it("of one double bond in a kilogram is its heat over 1000, and none comes from what does not react", () => {
    expect(heatOf(1, 1000, 80000)).toBeCloseTo(80, 12);
    const diluted = polymerisationHeat({
      massFractions: [0.5, 0.5],
      functionalities: [1, 0],
      molarMasses_gmol: [1000, 60],
      heatsOfPolymerisation_Jmol: [80000, 0],
    });
    expect(diluted).toBeCloseTo(40, 12);
  });

  it.each([
    [
      [80000, -1],
      "polymerisationHeat: heatsOfPolymerisation_Jmol[1] is -1; it must be a number from 0 to 200000; give it in J/mol of double bonds, as heat given off",
    ],
    [[80000], "polymerisationHeat: massFractions holds 2, heatsOfPolymerisation_Jmol holds 1; the lists"],
  ])("refuses heats %j", (heatsOfPolymerisation_Jmol, message) => {
    const rest = { massFractions: [0.5, 0.5], functionalities: [1, 1], molarMasses_gmol: [100, 100] };
    expect(() => polymerisationHeat({ ...rest, heatsOfPolymerisation_Jmol })).toThrow(message);
  });
});

describe("adiabaticRise", () => {
  it("is the heat over the heat capacity, in proportion to conversion", () => {
    expect(adiabaticRise({ heat_Jg: 360, conversion: 1, heatCapacity_JgK: 1.8 })).toBeCloseTo(200, 12);
    expect(adiabaticRise({ heat_Jg: 360, conversion: 0.5, heatCapacity_JgK: 1.8 })).toBeCloseTo(100, 12);
    expect(adiabaticRise({ heat_Jg: 360, conversion: 0, heatCapacity_JgK: 1.8 })).toBe(0);
  });

  // Heats (cal/mol) and heat capacities (cal/(kg K)) from the property base of the R package HomoPolymer, read there; the
  // rises follow by hand with 4.184 J/cal and are stated to 0.1 K.
  it.each([
    ["methyl acrylate", 86.09, 19190, 430, 518.4],
    ["butyl acrylate", 128.17, 18400, 430, 333.9],
    ["methyl methacrylate", 100.12, 13810, 411.1, 335.5],
  ])("of neat %s", (_, molarMass, heat_calmol, heatCapacity_calkgK, rise_K) => {
    const heat_Jg = heatOf(1, molarMass, heat_calmol * 4.184);
    const given = adiabaticRise({ heat_Jg, conversion: 1, heatCapacity_JgK: heatCapacity_calkgK * 4.184e-3 });
    expect(Math.abs(given - rise_K)).toBeLessThan(0.06);
  });

  // Calculated outside this program, rounded to 1 K: 80 kJ/mol of acrylate, 1.8 J/(g K).
  it.each([
    [2, 226.27, 393],
    [3, 296.32, 450],
  ])("of a monomer with %i acrylates and %f g/mol is %i K", (f, molarMass, rise_K) => {
    const heat_Jg = heatOf(f, molarMass, 80000);
    expect(Math.abs(adiabaticRise({ heat_Jg, conversion: 1, heatCapacity_JgK: 1.8 }) - rise_K)).toBeLessThan(
      0.51,
    );
  });

  it.each([
    [{ conversion: 1.1 }, "adiabaticRise: conversion is 1.1; it must be a number from 0 to 1"],
    [{ heatCapacity_JgK: 0 }, "adiabaticRise: heatCapacity_JgK is 0; it must be a finite number above 0"],
    [{ heat_Jg: NaN }, "adiabaticRise: heat_Jg is NaN; it must be a finite number of at least 0"],
    [
      { heat_Jg: 1e300, heatCapacity_JgK: 1e-300 },
      "adiabaticRise: the rise in K is Infinity; it must be a finite number; give heatCapacity_JgK in J/(g K)",
    ],
  ])("refuses %j", (change, message) => {
    const good = { heat_Jg: 360, conversion: 1, heatCapacity_JgK: 1.8 };
    expect(() => adiabaticRise({ ...good, ...change })).toThrow(message);
  });
});
