// Penetration depth and critical exposure in doubt together: the region that holds both, which their two intervals hide.
import { checkNumber, checkWhole } from "../../door.js";
import type { WorkingCurveFit } from "./fitWorkingCurve.js";
import type { WorkingCurve } from "./workingCurve.js";

/**
 * Points around the joint confidence region of penetration depth and critical exposure, for a figure.
 *
 * - `fit`: from `fitWorkingCurve`.
 * - `level`: chance that the region holds both, 0.5 to 0.999.
 * - `count`: of points around it, whole, 8 to 1000; the first one is not repeated at the end.
 *
 * The ellipse (d - d0)' V^-1 (d - d0) = 2 F in d = (Dp, ln Ec), F the quantile of Fisher's distribution with 2 and n - 2 degrees
 * of freedom, which is ((1 - level)^(-2/(n-2)) - 1) (n - 2)/2. It is wider than the two intervals at its ends and narrow across:
 * a larger Dp goes with a larger Ec.
 *
 * Assumes what the fit does, and that Ec is near enough to linear in the coefficients of the line.
 * @throws InputError when an argument is out of range, or the region reaches a depth that is not above 0.
 * @source N. R. Draper, H. Smith, Applied Regression Analysis, 3rd ed. 1998, chapter 5 (from memory); delta method.
 * @example
 * ```ts
 * import { fitWorkingCurve, workingCurveRegion } from "resinwright";
 * const fit = fitWorkingCurve({
 *   exposures_mJcm2: [8, 12, 20, 35, 60, 100],
 *   cureDepths_um: [45, 90, 137, 196, 248, 299],
 *   level: 0.95,
 * });
 * workingCurveRegion({ fit, level: 0.95, count: 72 })[0]?.penetrationDepth_um; // → 103.4
 * ```
 */
export function workingCurveRegion(input: {
  readonly fit: WorkingCurveFit;
  readonly level: number;
  readonly count: number;
}): WorkingCurve[] {
  const where = "workingCurveRegion";
  const { fit, level, count } = input;
  checkNumber(level, { where, field: "level", min: 0.5, max: 0.999 });
  checkWhole(count, { where, field: "count", min: 8, max: 1000 });
  const f = fit.degreesOfFreedom;
  const F = (Math.expm1((-2 / f) * Math.log1p(-level)) * f) / 2;
  const [[varD, cov], [, varE]] = fit.covariance;
  // The Cholesky factor of V turns a circle into the ellipse.
  const sD = Math.sqrt(varD);
  const along = sD === 0 ? 0 : cov / sD;
  const across = Math.sqrt(Math.max(varE - along ** 2, 0));
  return Array.from({ length: count }, (_, i) => {
    const angle = (2 * Math.PI * i) / count;
    const [u, v] = [Math.sqrt(2 * F) * Math.cos(angle), Math.sqrt(2 * F) * Math.sin(angle)];
    const penetrationDepth_um = checkNumber(fit.penetrationDepth_um.value + sD * u, {
      where,
      field: "the penetration depth on the region",
      min: 0,
      above: true,
      advice: "these readings hardly show a slope; measure more, or ask for a lower level",
    });
    const criticalExposure_mJcm2 = checkNumber(
      fit.criticalExposure_mJcm2.value * Math.exp(along * u + across * v),
      { where, field: "the critical exposure on the region" },
    );
    return { penetrationDepth_um, criticalExposure_mJcm2 };
  });
}
