// From a cure-depth series to the working curve it measured, with the doubt of both figures and of their going together.

import { InputError } from "../door.js";
import { fitWorkingCurve, type WorkingCurveFit } from "../models/cure.js";
import type { CureDepthSeries, MeasuredWorkingCurve } from "../recipe/cureDepths.js";

/** Coverage of the intervals a fit shows. */
const LEVEL = 0.95;

/**
 * The fit to a cure-depth series: intervals, residuals, outliers, bend. Floated films take no part.
 * @throws InputError as {@link fitWorkingCurve}, naming the series.
 * @source Model: {@link fitWorkingCurve}.
 * @example
 * ```ts
 * import { fitCureDepths } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const series = readShelf(["data"]).cureDepths.find(({ id }) => id === "flow-cell-a-412")!;
 * fitCureDepths(series).outliers; // → []
 * ```
 */
export function fitCureDepths({ id, spots }: CureDepthSeries): WorkingCurveFit {
  const used = spots.filter(({ reading }) => reading !== "floated");
  try {
    return fitWorkingCurve({
      exposures_mJcm2: used.map(({ exposure_mJcm2 }) => exposure_mJcm2),
      cureDepths_um: used.map(({ cureDepth_um }) => cureDepth_um!),
      kinds: used.map(({ reading }) => reading as Exclude<typeof reading, "floated">),
      level: LEVEL,
    });
  } catch (error) {
    throw error instanceof InputError ? new InputError(`${id}: ${error.message}`) : error;
  }
}

/**
 * The working curve that a cure-depth series measured.
 *
 * Standard uncertainties are those of the fit, times the root of n / (n - 2), n its degrees of freedom, for the few readings;
 * depths that scatter less than `depthU_um` count as scattering that much.
 * @throws InputError as {@link fitWorkingCurve}.
 * @source Model: {@link fitWorkingCurve}; standard deviation of Student's distribution as JCGM 101:2008, clause 6.4.9 (from
 * memory).
 * @example
 * ```ts
 * import { workingCurveFrom } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const series = readShelf(["data"]).cureDepths.find(({ id }) => id === "flow-cell-a-412")!;
 * const { penetrationDepth_um, correlation } = workingCurveFrom(series);
 * penetrationDepth_um.status; // → "invented for the demo"
 * correlation > 0.5; // → true
 * ```
 */
export function workingCurveFrom(series: CureDepthSeries): MeasuredWorkingCurve {
  const { id, depthU_um, source, status } = series;
  const fit = fitCureDepths(series);
  const n = fit.degreesOfFreedom;
  if (n < 3) {
    throw new InputError(
      `${id}: ${fit.points} depths leave ${n} degrees of freedom; a working curve with its doubt needs 3: measure at least 5 depths`,
    );
  }
  if (fit.residualStandardDeviation_um === 0) {
    throw new InputError(
      `${id}: the depths lie on a line to the last digit, which no gauge reads; give them as they were read`,
    );
  }
  const gauge = Math.max(1, depthU_um / fit.residualStandardDeviation_um);
  const enlarged = Math.sqrt(n / (n - 2)) * gauge;
  const [[varD, cov], [, varE]] = fit.covariance;
  const Ec = fit.criticalExposure_mJcm2.value;
  // The u of a log-normal quantity whose logarithm has the fit's standard deviation.
  const uOfEc = Ec * Math.sqrt(Math.expm1(enlarged ** 2 * varE));
  if (!Number.isFinite(uOfEc)) {
    throw new InputError(
      `${id}: with depthU_um ${depthU_um} its depths leave the critical exposure open without bound; check the unit of depthU_um and cureDepth_um, or measure deeper spots`,
    );
  }
  const ground = { source: `working curve through ${fit.points} spots of ${id}: ${source}`, status };
  return {
    series,
    penetrationDepth_um: {
      value: fit.penetrationDepth_um.value,
      u: enlarged * Math.sqrt(varD),
      ...ground,
    },
    criticalExposure_mJcm2: { value: Ec, u: uOfEc, ...ground },
    correlation: varD > 0 && varE > 0 ? cov / Math.sqrt(varD * varE) : 0,
    warnings: fit.warnings.map(({ code, message }) => ({ code, message: `${id}: ${message}` })),
  };
}
