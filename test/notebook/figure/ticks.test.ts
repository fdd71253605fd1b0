import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { logarithmicTicks, roundValues } from "../../../lib/notebook/figure/ticks.js";

describe("roundValues", () => {
  it.each([
    [0, 60, 6, [0, 10, 20, 30, 40, 50, 60]],
    [0.1, 0.3, 4, [0.1, 0.15, 0.2, 0.25, 0.3]],
    [-7, 7, 3, [-5, 0, 5]],
    [1000.12, 1000.37, 5, [1000.15, 1000.2, 1000.25, 1000.3, 1000.35]],
  ])("from %d to %d", (low, high, count, values) => {
    expect(roundValues({ low, high, count })).toEqual(values);
  });

  it("stays within the range and holds about as many as asked for", () => {
    const size = fc.double({ min: 1e-6, max: 1e6, noNaN: true });
    fc.assert(
      fc.property(size, fc.integer({ min: -50, max: 50 }), (width, place) => {
        const [low, high] = [place * width, (place + 1) * width];
        const values = roundValues({ low, high, count: 6 });
        // Steps are at least a sixth of the width and at most 2.5 times that.
        expect(values.length).toBeGreaterThanOrEqual(2);
        expect(values.length).toBeLessThanOrEqual(7);
        for (const value of values) {
          expect(value).toBeGreaterThanOrEqual(low - 1e-6 * width);
          expect(value).toBeLessThanOrEqual(high + 1e-6 * width);
        }
      }),
    );
  });
});

describe("logarithmicTicks", () => {
  it.each([
    ["two decades", 59, 2330, [100, 200, 500, 1000, 2000]],
    ["whole decades, ends included", 1, 100, [1, 2, 5, 10, 20, 50, 100]],
    ["three decades", 1, 1000, [1, 3, 10, 30, 100, 300, 1000]],
    ["six decades", 1e-3, 1e3, [0.001, 0.01, 0.1, 1, 10, 100, 1000]],
    ["twenty decades", 1e-10, 1e10, [1e-10, 1e-7, 1e-4, 0.1, 100, 1e5, 1e8]],
    ["less than a decade", 210, 420, [250, 300, 350, 400]],
  ])("for %s", (_name, low, high, ticks) => {
    expect(logarithmicTicks(low, high)).toEqual(ticks);
  });
});
