import { describe, expect, it } from "vitest";
import {
  checkNumber,
  checkNumbers,
  checkWhole,
  fraction,
  nearestName,
  positive,
  refuseUnknownKeys,
  show,
  unknownName,
} from "../lib/door.js";

describe("checkNumber", () => {
  it("gives back what is in range, ends included", () => {
    expect(checkNumber(0, { where: "w", field: "x", ...fraction })).toBe(0);
    expect(checkNumber(1, { where: "w", field: "x", ...fraction })).toBe(1);
  });

  it.each([
    [0, positive, "w: x is 0; it must be a finite number above 0"],
    [-1, { min: 0 }, "w: x is -1; it must be a finite number of at least 0"],
    [2, fraction, "w: x is 2; it must be a number from 0 to 1"],
    [6, { max: 5 }, "w: x is 6; it must be a finite number of at most 5"],
    [0, { ...positive, max: 5 }, "w: x is 0; it must be a number above 0 and at most 5"],
    [NaN, {}, "w: x is NaN; it must be a finite number"],
    [-Infinity, {}, "w: x is -Infinity; it must be a finite number"],
    ["5", {}, 'w: x is "5"; it must be a finite number'],
    [undefined, {}, "w: x is missing; it must be a finite number"],
    [
      2,
      { ...fraction, advice: "percent goes in mass_pct" },
      "it must be a number from 0 to 1; percent goes in mass_pct",
    ],
  ])("refuses %s within %j", (value, rule, message) => {
    expect(() => checkNumber(value, { where: "w", field: "x", ...rule })).toThrow(message);
  });

  it("checks every field named and no other", () => {
    expect(() => checkNumbers("w", { a: 1, b: -1, c: "text" }, { a: positive, b: positive })).toThrow(
      "w: b is -1",
    );
  });
});

describe("checkWhole", () => {
  it("gives back a whole number in range, and refuses what lies out of it or between", () => {
    const rule = { where: "w", field: "n", min: 1, max: 9 };
    expect(checkWhole(9, rule)).toBe(9);
    expect(() => checkWhole(2.5, rule)).toThrow("w: n is 2.5; it must be a whole number");
    expect(() => checkWhole(0.5, rule)).toThrow("w: n is 0.5; it must be a number from 1 to 9");
  });
});

describe("names", () => {
  it("finds the nearest within a third of the length, letter case and unit ending left aside", () => {
    expect(nearestName("iboa", ["IBOA", "HDDA"])).toBe("IBOA");
    expect(nearestName("viscosty", ["viscosity_mPas"])).toBe("viscosity_mPas");
    expect(nearestName("water", ["IBOA", "HDDA"])).toBeUndefined();
    expect(nearestName("x", [])).toBeUndefined();
  });

  it("lists what is known where nothing is near", () => {
    expect(unknownName("w", "film", "glass", ["FEP", "PDMS"])).toBe(
      'w: unknown film "glass"; known: FEP, PDMS',
    );
    expect(() => refuseUnknownKeys("w", { levl: 1 }, ["level"])).toThrow(
      'w: unknown field "levl"; did you mean "level"?',
    );
  });
});

describe("show", () => {
  it.each([
    ["text", '"text"'],
    [1.5, "1.5"],
    [null, "null"],
    [undefined, "missing"],
    [[1], "a list"],
    [{}, "an object"],
    [() => 1, "a function"],
    ["x".repeat(80), `"${"x".repeat(57)}..."`],
  ])("shows %s", (value, text) => {
    expect(show(value)).toBe(text);
  });
});
