import { describe, expect, it } from "vitest";
import { normalQuantile, studentQuantile } from "../../lib/numerics/distributions.js";

describe("normalQuantile", () => {
  // Any table of the normal distribution, e.g. Abramowitz and Stegun 1964, table 26.5 (digits from memory, and the
  // same from SciPy 1.17.1): half a unit of the last digit shown.
  it.each([
    [0.5, 0],
    [0.9, 1.2815515655],
    [0.95, 1.644853627],
    [0.975, 1.9599639845],
    [0.995, 2.5758293035],
    [0.999, 3.0902323062],
  ])("has the tabulated value at %d", (probability, z) => {
    expect(Math.abs(normalQuantile({ probability }) - z)).toBeLessThan(5e-10);
  });

  it("is odd about one half and rises", () => {
    let before = -Infinity;
    for (const probability of [1e-15, 1e-9, 1e-4, 0.2, 0.4, 0.5, 0.7, 0.99, 1 - 1e-9, 1 - 1e-15]) {
      const z = normalQuantile({ probability });
      expect(Number.isFinite(z)).toBe(true);
      expect(z).toBeGreaterThan(before);
      before = z;
    }
    for (const probability of [0.3, 0.01, 1e-4]) {
      expect(normalQuantile({ probability })).toBeCloseTo(
        -normalQuantile({ probability: 1 - probability }),
        11,
      );
    }
  });

  it("refuses a certainty", () => {
    for (const probability of [0, 1, -0.1, NaN]) {
      expect(() => normalQuantile({ probability })).toThrow(
        `normalQuantile: probability is ${probability}; it must be a number above 0 and at most 0.9999999999999999; ` +
          "0 and 1 themselves have no quantile",
      );
    }
  });
});

describe("studentQuantile", () => {
  const probabilities = [1e-6, 0.001, 0.025, 0.1, 0.3, 0.45, 0.6, 0.8, 0.95, 0.975, 0.995, 0.9999];

  // Exact: t = tan(pi (p - 1/2)) at 1 degree, t = (2p - 1) / sqrt(2 p (1 - p)) at 2; 7 digits as the wrapper promises.
  it.each(probabilities)("has the closed forms of 1 and 2 degrees at %d", (p) => {
    const one = Math.tan(Math.PI * (p - 0.5));
    const two = (2 * p - 1) / Math.sqrt(2 * p * (1 - p));
    expect(studentQuantile({ probability: p, degreesOfFreedom: 1 }) / one).toBeCloseTo(1, 7);
    expect(studentQuantile({ probability: p, degreesOfFreedom: 2 }) / two).toBeCloseTo(1, 7);
  });

  // NIST/SEMATECH e-Handbook of Statistical Methods, 1.3.6.7.2 (from memory; GUM table G.2 agrees to its 2 decimals,
  // SciPy 1.17.1 to all): half a unit of the 3 decimals printed.
  it.each([
    [0.975, 3, 3.182],
    [0.975, 5, 2.571],
    [0.975, 10, 2.228],
    [0.995, 10, 3.169],
    [0.95, 30, 1.697],
    [0.975, 100, 1.984],
  ])("has the tabulated value at p = %d with %d degrees", (probability, degreesOfFreedom, t) => {
    expect(Math.abs(studentQuantile({ probability, degreesOfFreedom }) - t)).toBeLessThan(5e-4);
  });

  it("tends to the normal quantile: t - z = (z^3 + z) / (4 df) to first order", () => {
    const z = normalQuantile({ probability: 0.975 });
    const t = studentQuantile({ probability: 0.975, degreesOfFreedom: 10_000 });
    // The next term is of order 1/df^2, 1e-8 here times a factor of about 5.
    expect(Math.abs(t - z - (z ** 3 + z) / 40_000)).toBeLessThan(1.5e-7);
  });

  it("says where it stops", () => {
    expect(() => studentQuantile({ probability: 1, degreesOfFreedom: 3 })).toThrow(
      "studentQuantile: probability is 1; it must be a number from 1e-9 to 0.999999999",
    );
    expect(() => studentQuantile({ probability: 0.9, degreesOfFreedom: 0 })).toThrow(
      "studentQuantile: degreesOfFreedom is 0; it must be a number from 1 to 100000; above 100000, use normalQuantile",
    );
  });
});
