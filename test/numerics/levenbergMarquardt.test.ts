import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { levenbergMarquardt } from "../../lib/numerics/levenbergMarquardt.js";
import { linearLeastSquares } from "../../lib/numerics/linear.js";
import { readStrdNonlinear } from "./readStrdNonlinear.js";

/** Correct digits, as NIST counts them: -log10 of the relative error. */
function digits(found: number, certified: number): number {
  return -Math.log10(Math.max(Math.abs(found / certified - 1), 1e-15));
}

type Model = (b: readonly number[], x: number) => number;

const cubics: Model = ([b1, b2, b3, b4, b5, b6, b7], x) =>
  (b1! + x * (b2! + x * (b3! + x * b4!))) / (1 + x * (b5! + x * (b6! + x * b7!)));

const models: Record<string, { readonly model: Model; readonly observations: number }> = {
  Misra1a: { observations: 14, model: ([b1, b2], x) => b1! * -Math.expm1(-b2! * x) },
  Misra1c: { observations: 14, model: ([b1, b2], x) => b1! * (1 - 1 / Math.sqrt(1 + 2 * b2! * x)) },
  Thurber: { observations: 37, model: cubics },
  MGH09: {
    observations: 11,
    model: ([b1, b2, b3, b4], x) => (b1! * (x * x + x * b2!)) / (x * x + x * b3! + b4!),
  },
  DanWood: { observations: 6, model: ([b1, b2], x) => b1! * x ** b2! },
  Chwirut2: { observations: 54, model: ([b1, b2, b3], x) => Math.exp(-b1! * x) / (b2! + b3! * x) },
  Eckerle4: {
    observations: 35,
    model: ([b1, b2, b3], x) => (b1! / b2!) * Math.exp(-0.5 * ((x - b3!) / b2!) ** 2),
  },
  Hahn1: { observations: 236, model: cubics },
  Kirby2: {
    observations: 151,
    model: ([b1, b2, b3, b4, b5], x) => (b1! + x * (b2! + x * b3!)) / (1 + x * (b4! + x * b5!)),
  },
  Gauss1: {
    observations: 250,
    model: ([b1, b2, b3, b4, b5, b6, b7, b8], x) =>
      b1! * Math.exp(-b2! * x) +
      b3! * Math.exp(-(((x - b4!) / b5!) ** 2)) +
      b6! * Math.exp(-(((x - b7!) / b8!) ** 2)),
  },
};

// NIST Statistical Reference Datasets, nonlinear regression; certified to 11 digits. NIST asks for 6 digits of the
// parameters as a mark of a sound program; standard errors pass through differences of 6e-6, hence 4.
describe.each(Object.keys(models))("levenbergMarquardt on NIST StRD %s", (name) => {
  const { model, observations } = models[name]!;
  const certified = readStrdNonlinear(name);
  it.each([1, 2] as const)("agrees from start %d", (which) => {
    expect(certified.y).toHaveLength(observations);
    const fit = levenbergMarquardt({
      where: name,
      model: (b) => certified.x.map((x) => model(b, x)),
      response: certified.y,
      start: certified.starts[which - 1]!,
    });
    expect(fit.converged).toBe(true);
    fit.parameters.forEach((b, j) => expect(digits(b, certified.parameters[j]!)).toBeGreaterThan(6));
    fit.standardErrors.forEach((u, j) => expect(digits(u, certified.standardErrors[j]!)).toBeGreaterThan(4));
    expect(digits(fit.residualStandardDeviation, certified.residualStandardDeviation)).toBeGreaterThan(8);
    const sum = fit.residuals.reduce((total, r) => total + r * r, 0);
    expect(digits(sum, certified.sumOfSquares)).toBeGreaterThan(8);
  });
});

describe("levenbergMarquardt", () => {
  const x = [0, 1, 2, 3, 5, 8];
  const line = (b: readonly number[]): number[] => x.map((xi) => b[0]! + b[1]! * xi);
  const where = "test";

  it("solves a linear problem as the linear solver does, with its errors and leverages, weights included", () => {
    const response = [1, 2.2, 2.9, 4.3, 5.8, 9.1];
    const weights = [1, 2, 1, 4, 1, 0.5];
    const linear = linearLeastSquares({ design: x.map((xi) => [1, xi]), response, weights });
    const fit = levenbergMarquardt({ where, model: line, response, weights, start: [0, 0] });
    // Differences of a straight line are good to the rounding of y over the step: 1e-16 / 6e-6.
    fit.parameters.forEach((b, j) => expect(b).toBeCloseTo(linear.coefficients[j]!, 9));
    fit.standardErrors.forEach((u, j) => expect(u).toBeCloseTo(linear.standardErrors[j]!, 9));
    fit.leverage.forEach((h, i) => expect(h).toBeCloseTo(linear.leverage[i]!, 9));
    fit.residuals.forEach((r, i) => expect(r).toBeCloseTo(linear.residuals[i]!, 9));
    expect(fit.covariance[0]![1]).toBeCloseTo(linear.covariance[0]![1]!, 9);
    expect(fit.degreesOfFreedom).toBe(4);
  });

  it("recovers the parameters of exact readings", () => {
    const parameter = fc.double({ min: 0.1, max: 3, noNaN: true });
    fc.assert(
      fc.property(parameter, parameter, (a, k) => {
        const decay = (b: readonly number[]): number[] => x.map((xi) => b[0]! * Math.exp(-b[1]! * xi));
        const fit = levenbergMarquardt({ where, model: decay, response: decay([a, k]), start: [1, 1] });
        expect(fit.converged).toBe(true);
        expect(fit.parameters[0]! / a).toBeCloseTo(1, 9);
        expect(fit.parameters[1]! / k).toBeCloseTo(1, 9);
      }),
    );
  });

  it("takes derivatives if they are given, in fewer calls of the model", () => {
    const count = (jacobian?: (b: readonly number[]) => number[][]) => {
      let calls = 0;
      const model = (b: readonly number[]): number[] => {
        calls++;
        return x.map((xi) => b[0]! * Math.exp(-b[1]! * xi));
      };
      const response = [10, 6.2, 3.5, 2.4, 0.8, 0.2];
      const fit = levenbergMarquardt({
        where,
        model,
        response,
        start: [5, 1],
        ...(jacobian && { jacobian }),
      });
      return { calls, fit };
    };
    const differences = count();
    const given = count(([a, k]) => x.map((xi) => [Math.exp(-k! * xi), -a! * xi * Math.exp(-k! * xi)]));
    given.fit.parameters.forEach((b, j) => expect(b).toBeCloseTo(differences.fit.parameters[j]!, 8));
    expect(given.calls).toBeLessThan(differences.calls / 2);
  });

  it("does not step where the model has no value", () => {
    const model = ([b]: readonly number[]): number[] => x.map((xi) => xi + Math.log(b!));
    const response = x.map((xi) => xi + Math.log(0.01));
    expect(levenbergMarquardt({ where, model, response, start: [5] }).parameters[0]).toBeCloseTo(0.01, 10);
  });

  it("says that it did not arrive when the minimum lies at infinity", () => {
    // A saturating curve through readings that bend upwards: the limit runs away for ever.
    const model = ([b1, b2]: readonly number[]): number[] => x.map((xi) => b1! * -Math.expm1(-b2! * xi));
    const fit = levenbergMarquardt({ where, model, response: [0, 1, 2.1, 3.2, 5.4, 9], start: [10, 0.1] });
    expect(fit.converged).toBe(false);
    expect(fit.remainingStep).toBeGreaterThan(1e-4);
  });

  const good = { where, model: line, response: [1, 2, 3, 4, 5, 6], start: [0, 0] };
  it.each([
    [{ ...good, start: [] }, "test: start holds 0 numbers; at least 1 must be given"],
    [{ ...good, start: [0, NaN] }, "test: start[1] is NaN; it must be a finite number"],
    [
      { ...good, response: [1, 2, 3, 4, 5, Infinity] },
      "test: response[5] is Infinity; it must be a finite number",
    ],
    [{ ...good, response: [1, 2] }, "test: 2 readings for 2 parameters; at least 3 readings must be given"],
    [
      { ...good, response: [1, 2, 3] },
      "test: response holds 3, model holds 6; the lists must be of the same length, one element each per row",
    ],
    [{ ...good, weights: [1, 1, 0, 1, 1, 1] }, "test: weights[2] is 0; it must be a finite number above 0"],
    [
      { ...good, weights: [1] },
      "test: response holds 6, weights holds 1; the lists must be of the same length, one element each per row",
    ],
    [
      { ...good, model: ([b]: readonly number[]) => x.map((xi) => xi * Math.log(b!)), start: [-1] },
      "test: the model is not a finite number at the start (-1); start elsewhere",
    ],
    [
      { ...good, model: ([b]: readonly number[]) => x.map((xi) => xi * Math.sqrt(b!)), start: [0] },
      "test: the slope of fitted value 0 with parameter 0 is NaN; it must be a finite number; " +
        "keep the parameters away from where the model ends",
    ],
    [
      { ...good, model: ([a, b]: readonly number[]) => x.map((xi) => xi * (a! + b!)) },
      "test: the readings do not tell the parameters apart (linearLeastSquares: column 1 of the design is a combination " +
        "of the columns before it; leave it out or vary it); fit fewer parameters or add readings",
    ],
  ])("refuses %j", (problem, message) => {
    expect(() => levenbergMarquardt(problem)).toThrow(message);
  });
});
