import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { linearLeastSquares } from "../../lib/numerics/linear.js";
import { readStrd, type StrdLinear } from "../reference/readStrd.js";

/** Correct digits, as NIST counts them: -log10 of the relative error. */
function digits(found: number, certified: number): number {
  return -Math.log10(Math.max(Math.abs(found / certified - 1), 1e-15));
}

function fitStrd({ rows }: StrdLinear, intercept: boolean) {
  return linearLeastSquares({
    design: rows.map(([, ...x]) => (intercept ? [1, ...x] : x)),
    response: rows.map(([y]) => y!),
  });
}

describe("linearLeastSquares", () => {
  // NIST Statistical Reference Datasets, linear regression. Digits lost follow from the condition of each design:
  // Longley, the collinear one, is asked for 7; the others for 10.
  it.each([
    { name: "Norris", intercept: true, least: 10, observations: 36 },
    { name: "NoInt1", intercept: false, least: 10, observations: 11 },
    { name: "Longley", intercept: true, least: 7, observations: 16 },
  ])("agrees with NIST StRD $name to $least digits", ({ name, intercept, least, observations }) => {
    const certified = readStrd(name);
    const fit = fitStrd(certified, intercept);
    expect(certified.rows).toHaveLength(observations);
    expect(fit.coefficients).toHaveLength(certified.estimates.length);
    fit.coefficients.forEach((b, j) => expect(digits(b, certified.estimates[j]!)).toBeGreaterThan(least));
    fit.standardErrors.forEach((se, j) =>
      expect(digits(se, certified.standardErrors[j]!)).toBeGreaterThan(least),
    );
    expect(digits(fit.residualStandardDeviation, certified.residualStandardDeviation)).toBeGreaterThan(least);
    expect(fit.degreesOfFreedom).toBe(observations - certified.estimates.length);
  });

  const design = fc.array(
    fc.array(fc.double({ min: -5, max: 5, noNaN: true }), { minLength: 2, maxLength: 2 }),
    {
      minLength: 6,
      maxLength: 6,
    },
  );

  it("returns the coefficients a response was made from, and residuals at right angles to the design", () => {
    fc.assert(
      fc.property(
        design,
        fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 6, maxLength: 6 }),
        (x, e) => {
          const X = x.map((row, i) => [1, i + row[0]! / 20, i * i + row[1]! / 20]);
          const made = X.map((row) => 3 - 2 * row[1]! + 0.5 * row[2]!);
          const exact = linearLeastSquares({ design: X, response: made });
          [3, -2, 0.5].forEach((b, j) => expect(exact.coefficients[j]).toBeCloseTo(b, 9));
          const noisy = linearLeastSquares({ design: X, response: made.map((y, i) => y + e[i]!) });
          // Rounding only: sums of products up to 25 * 1.
          for (const j of [0, 1, 2]) {
            expect(noisy.residuals.reduce((sum, r, i) => sum + r * X[i]![j]!, 0)).toBeCloseTo(0, 9);
          }
          // The trace of the hat matrix is the number of coefficients.
          expect(noisy.leverage.reduce((sum, h) => sum + h, 0)).toBeCloseTo(3, 10);
        },
      ),
    );
  });

  it("gives the straight-line formulas: slope, its error, leverage 1/n + (x - mean)^2 / Sxx", () => {
    const x = [1, 2, 4, 7];
    const fit = linearLeastSquares({ design: x.map((xi) => [1, xi]), response: [2, 3, 3, 8] });
    const Sxx = x.reduce((sum, xi) => sum + (xi - 3.5) ** 2, 0);
    const Sxy = [2, 3, 3, 8].reduce((sum, y, i) => sum + y * (x[i]! - 3.5), 0);
    expect(fit.coefficients[1]).toBeCloseTo(Sxy / Sxx, 12);
    expect(fit.standardErrors[1]).toBeCloseTo(fit.residualStandardDeviation / Math.sqrt(Sxx), 12);
    expect(fit.covariance[0]![1]).toBeCloseTo((-3.5 * fit.residualStandardDeviation ** 2) / Sxx, 12);
    expect(fit.covariance[1]![0]).toBe(fit.covariance[0]![1]);
    x.forEach((xi, i) => expect(fit.leverage[i]).toBeCloseTo(1 / 4 + (xi - 3.5) ** 2 / Sxx, 12));
  });

  it("counts a reading of weight 2 as two readings in the coefficients, and takes weights as ratios", () => {
    const twice = linearLeastSquares({
      design: [
        [1, 0],
        [1, 1],
        [1, 2],
        [1, 2],
      ],
      response: [0, 2, 3, 3],
    });
    const weighted = linearLeastSquares({
      design: [
        [1, 0],
        [1, 1],
        [1, 2],
      ],
      response: [0, 2, 3],
      weights: [1, 1, 2],
    });
    const scaled = linearLeastSquares({
      design: [
        [1, 0],
        [1, 1],
        [1, 2],
      ],
      response: [0, 2, 3],
      weights: [5, 5, 10],
    });
    weighted.coefficients.forEach((b, j) => expect(b).toBeCloseTo(twice.coefficients[j]!, 12));
    weighted.standardErrors.forEach((se, j) => expect(scaled.standardErrors[j]).toBeCloseTo(se, 12));
  });

  it.each([
    [
      { design: [[1], [1]], response: [1, 2, 3] },
      "linearLeastSquares: design holds 2, response holds 3; the lists must be of the same length, one element each per row",
    ],
    [
      { design: [[1, 0], [1]], response: [1, 2] },
      "linearLeastSquares: design[1] holds 1 numbers; it must hold 2, as design[0] does",
    ],
    [
      {
        design: [
          [1, 0],
          [1, 1],
        ],
        response: [1, 2],
      },
      "linearLeastSquares: 2 readings for 2 coefficients; at least 3 readings must be given",
    ],
    [
      {
        design: [
          [1, 2],
          [1, 2],
          [1, 2],
        ],
        response: [1, 2, 3],
      },
      "linearLeastSquares: column 1 of the design is a combination of the columns before it; leave it out or vary it",
    ],
    [
      {
        design: [
          [1, 0],
          [1, 0],
          [1, 0],
        ],
        response: [1, 2, 3],
      },
      "linearLeastSquares: column 1 of the design is all zeros; leave it out",
    ],
    [
      { design: [[1], [NaN]], response: [1, 2] },
      "linearLeastSquares: design[1][0] is NaN; it must be a finite number",
    ],
    [
      { design: [[1], [1]], response: [1, Infinity] },
      "linearLeastSquares: response[1] is Infinity; it must be a finite number",
    ],
    [{ design: [], response: [] }, "linearLeastSquares: response holds 0 numbers; at least 1 must be given"],
    [
      { design: [[1], [1]], response: [1, 2], weights: [1, 0] },
      "linearLeastSquares: weights[1] is 0; it must be a finite number above 0",
    ],
    [
      { design: [[1], [1]], response: [1, 2], weights: [1] },
      "linearLeastSquares: response holds 2, weights holds 1; the lists must be of the same length, one element each per row",
    ],
    [
      { design: [[1], [1]], response: [1e300, -1e300] },
      "linearLeastSquares: covariance[0][0] is Infinity; it must be a finite number; scale the design and the response to ordinary sizes",
    ],
    [
      { design: [[1e-300], [1e-300]], response: [1e10, 1e10] },
      "linearLeastSquares: coefficients[0] is Infinity; it must be a finite number; scale the design and the response to ordinary sizes",
    ],
  ])("refuses %j", (problem, message) => {
    expect(() => linearLeastSquares(problem)).toThrow(message);
  });
});
