import { expect, it } from "vitest";
import { percent } from "../../lib/models/percent.js";

it("writes two digits, and no zeros behind them", () => {
  expect([0.04567, 0.5, 1, 0.00001234].map(percent)).toEqual(["4.6 %", "50 %", "100 %", "0.0012 %"]);
});
