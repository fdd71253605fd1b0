import { describe, expect, it } from "vitest";
import { checkList, checkSameLength } from "../../lib/numerics/lists.js";

describe("checkList", () => {
  it("takes plain and typed lists whose every element obeys the rule", () => {
    expect(() => checkList("here", "values", [0, 1], { min: 0, max: 1 })).not.toThrow();
    expect(() => checkList("here", "values", Float64Array.of(2, 3), { atLeast: 2 })).not.toThrow();
  });

  it.each([
    [[1, NaN], {}, "here: values[1] is NaN; it must be a finite number"],
    [[1, "2"], {}, 'here: values[1] is "2"; it must be a finite number'],
    [[], {}, "here: values holds 0 numbers; at least 1 must be given"],
    [[1], { atLeast: 3 }, "here: values holds 1 number; at least 3 must be given"],
    [
      [0.5, 2],
      { min: 0, max: 1, advice: "divide by the sum" },
      "here: values[1] is 2; it must be a number from 0 to 1; divide by the sum",
    ],
    ["1, 2", {}, 'here: values is "1, 2"; it must be a list of numbers'],
    [undefined, {}, "here: values is missing; it must be a list of numbers"],
    [null, {}, "here: values is null; it must be a list of numbers"],
  ])("refuses %j with the rule %j", (values, rule, message) => {
    expect(() => checkList("here", "values", values as number[], rule)).toThrow(message);
  });
});

describe("checkSameLength", () => {
  it("names every list with its length when they differ", () => {
    expect(() => checkSameLength("here", { a: [1, 2], b: Float64Array.of(1, 2) })).not.toThrow();
    expect(() => checkSameLength("here", { a: [1, 2], b: [1], c: [] })).toThrow(
      "here: a holds 2, b holds 1, c holds 0; the lists must be of the same length, one element each per row",
    );
  });
});
