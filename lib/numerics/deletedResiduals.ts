// How far each reading of a least-squares fit lies from the fit of all the others.
// One bad reading among ten pulls the fit and hides in its scatter; taken out, it shows.
import { checkNumbers, fraction } from "../door.js";
import { studentQuantile } from "./distributions.js";
import { checkSameLength } from "./lists.js";

/**
 * Externally Studentized residuals: each residual over the standard deviation that the other readings leave for it.
 *
 * - `residuals`: of all readings, each times the square root of its weight.
 * - `leverage`: of each reading, 0 to below 1.
 * - `degreesOfFreedom`: of the fit, at least 2.
 *
 * t_i = r_i / (s_(i) sqrt(1 - h_i)), s_(i)^2 = (sum r^2 - r_i^2 / (1 - h_i)) / (degreesOfFreedom - 1). With fewer than 2
 * degrees of freedom nothing can be said and all are 0.
 * @throws InputError when the lists differ in length.
 * @source R. D. Cook, S. Weisberg, Residuals and Influence in Regression, 1982, section 2.2 (from memory).
 * @example
 * ```ts
 * import { deletedResiduals, linearLeastSquares } from "resinwright";
 * const x = [1, 2, 3, 4, 5, 6];
 * const fit = linearLeastSquares({ design: x.map((one) => [1, one]), response: [1.1, 1.9, 3.1, 6, 5.1, 5.9] });
 * deletedResiduals(fit).map((t) => Math.abs(t) > 5); // → [false, false, false, true, false, false]
 * ```
 */
export function deletedResiduals(fit: {
  readonly residuals: readonly number[];
  readonly leverage: readonly number[];
  readonly degreesOfFreedom: number;
}): number[] {
  const { residuals, leverage, degreesOfFreedom } = fit;
  checkSameLength("deletedResiduals", { residuals, leverage });
  if (degreesOfFreedom < 2) return residuals.map(() => 0);
  const sum = residuals.reduce((total, r) => total + r * r, 0);
  return residuals.map((r, i) => {
    const room = Math.max(1 - leverage[i]!, 1e-9);
    // Where all the rest lies on the fit, rounding alone is left.
    const others = Math.max(sum - (r * r) / room, 1e-12 * sum) / (degreesOfFreedom - 1);
    return sum === 0 ? 0 : r / Math.sqrt(room * others);
  });
}

/**
 * The size of a deleted residual that chance would exceed in one table out of 1 / `chance`, whichever reading it is.
 *
 * - `points`: readings in the table, at least 1.
 * - `degreesOfFreedom`: of the fit, at least 2.
 * - `chance`: 0 to 1, both ends left out.
 *
 * Student's t at 1 - chance / (2 points) with degreesOfFreedom - 1 degrees (Bonferroni). Infinity below 2 degrees.
 * @throws InputError when a field is out of range.
 * @source As {@link deletedResiduals}, section 2.2.2.
 * @example
 * ```ts
 * import { deletedResidualLimit } from "resinwright";
 * deletedResidualLimit({ points: 10, degreesOfFreedom: 8, chance: 0.05 }); // → 4.03
 * ```
 */
export function deletedResidualLimit(input: {
  readonly points: number;
  readonly degreesOfFreedom: number;
  readonly chance: number;
}): number {
  const { points, degreesOfFreedom, chance } = input;
  checkNumbers("deletedResidualLimit", input, {
    points: { min: 1 },
    degreesOfFreedom: { min: 0 },
    chance: fraction,
  });
  if (degreesOfFreedom < 2) return Infinity;
  return studentQuantile({ probability: 1 - chance / (2 * points), degreesOfFreedom: degreesOfFreedom - 1 });
}
