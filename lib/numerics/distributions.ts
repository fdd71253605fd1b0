// Quantiles of the two distributions an interval needs: the normal and Student's t.
// The numbers come from jstat; this file gives them types, ranges and errors.
import jStat from "jstat";
import { checkNumbers } from "../door.js";

/**
 * The standard normal quantile: the z with P(Z <= z) = probability.
 *
 * - `probability`: above 0 and below 1.
 *
 * Good to 12 digits for probabilities from 1e-6 to 1 - 1e-6 and to 6 digits at 1e-12; finite, but rough, further out.
 * @throws InputError when the probability is not strictly between 0 and 1.
 * @source jstat 1.9.6, `normal.inv` (inverse complementary error function refined by Halley steps).
 * @example
 * ```ts
 * import { normalQuantile } from "resinwright";
 * normalQuantile({ probability: 0.975 }); // → 1.959964
 * ```
 */
export function normalQuantile({ probability }: { readonly probability: number }): number {
  checkNumbers("normalQuantile", { probability }, { probability: openUnit });
  return jStat.normal.inv(probability, 0, 1);
}

/**
 * The quantile of Student's t: the t with P(T <= t) = probability at the given degrees of freedom.
 *
 * - `probability`: from 1e-9 to 1 - 1e-9.
 * - `degreesOfFreedom`: from 1 to 100 000; need not be whole. Beyond, `normalQuantile` differs by less than 1e-4.
 *
 * Good to 7 digits or better over that range, except within 1e-3 of the median at large degrees of freedom,
 * where the quantile itself is almost 0.
 * @throws InputError when an argument is outside its range.
 * @source jstat 1.9.6, `studentt.inv` (inverse incomplete beta function).
 * @example
 * ```ts
 * import { studentQuantile } from "resinwright";
 * studentQuantile({ probability: 0.975, degreesOfFreedom: 10 }); // → 2.22814
 * ```
 */
export function studentQuantile(input: {
  readonly probability: number;
  readonly degreesOfFreedom: number;
}): number {
  checkNumbers("studentQuantile", input, {
    probability: { min: 1e-9, max: 1 - 1e-9 },
    degreesOfFreedom: { min: 1, max: 100_000, advice: "above 100000, use normalQuantile" },
  });
  return jStat.studentt.inv(input.probability, input.degreesOfFreedom);
}

const openUnit = {
  min: 0,
  above: true,
  max: 1 - Number.EPSILON / 2,
  advice: "0 and 1 themselves have no quantile",
};
