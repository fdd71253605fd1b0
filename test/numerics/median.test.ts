import { expect, it } from "vitest";
import { median } from "../../lib/numerics/median.js";

it("is the middle one, or the mean of the two in the middle, whatever the order, and leaves the list alone", () => {
  const list = [9, 1, 4];
  expect([median(list), median([10, 9, 1, 4]), median([7])]).toEqual([4, 6.5, 7]);
  expect(list).toEqual([9, 1, 4]);
});
