// From a working curve to the seconds a printer asks for: base layers, the way down from them, and the layers of the part.
import { checkNumber, checkNumbers, checkWhole, InputError, positive } from "../../door.js";
import { normalQuantile } from "../../numerics/distributions.js";
import type { Warning } from "../../result.js";
import { exposureForDepth, type WorkingCurve } from "./workingCurve.js";

/** A part to be exposed. */
export interface ExposureQuestion extends WorkingCurve {
  /** L: above 0, um. */
  readonly layerThickness_um: number;
  /** Cure depth wanted over layer thickness, at least 1, at most 10. */
  readonly cureDepthPerLayer: number;
  /** Inside the resin at the window, above 0, with its standard uncertainty, mW/cm2. */
  readonly irradiance_mWcm2: { readonly value: number; readonly u: number };
  /** Of the whole part, 1 or more. */
  readonly layers: number;
  /** First layers, which hold the part to its plate, 0 or more. */
  readonly baseLayers: number;
  /** Exposure of a base layer over that of a normal one, 1 to 100. */
  readonly baseFactor: number;
  /** Layers on the way from base to normal exposure, in equal factors, 0 or more. */
  readonly transitionLayers: number;
  /** Coverage of the intervals, 0.5 to 0.999. */
  readonly level: number;
}

/** A run of layers with one exposure: a row of a table. */
export interface ExposureRow {
  readonly part: "base" | "transition" | "normal";
  /** The first layer printed is 1. */
  readonly fromLayer: number;
  readonly toLayer: number;
  /** Light energy per area and layer. */
  readonly exposure_mJcm2: number;
  readonly time_s: number;
  /** The time would have to lie in this interval for that exposure, as the irradiance is in doubt. */
  readonly timeLow_s: number;
  readonly timeHigh_s: number;
  /** Reached after `time_s`, and its interval by the doubt in the irradiance; 0 where nothing would cure. */
  readonly cureDepth_um: number;
  readonly cureDepthLow_um: number;
  readonly cureDepthHigh_um: number;
}

/** The plan: rows in the order of printing, and their sum. */
export interface ExposurePlan {
  readonly rows: readonly ExposureRow[];
  /** Time with the light on. */
  readonly totalTime_s: number;
  /** Codes: `layer-thick-for-depth`, `layer-thin-for-depth`, `layer-may-not-hold`. */
  readonly warnings: readonly Warning[];
}

/**
 * Exposure and time for every layer of a part.
 *
 * - the fields of `ExposureQuestion`.
 *
 * Normal layer: E = Ec exp(r L / Dp), r the cure depth per layer; base layer: `baseFactor` times that; transition layer k of T:
 * baseFactor^(1 - k / (T + 1)) times that. t = E / I; interval of t from I -+ z u(I), z the normal quantile.
 *
 * Assumes that the exposure alone counts. The doubt in Dp and Ec is not in the intervals: look at the fit for that.
 * @throws InputError when an argument is out of range, a count is not whole, base and transition are more than the layers, there
 * is a transition without base layers, or the interval of the irradiance reaches 0.
 * @source P. F. Jacobs, Rapid Prototyping and Manufacturing, SME 1992, chapter 4 (from memory). Layers of 0.3 to 1.0 depths:
 * H. Gong et al., RSC Adv. 5 (2015) 106621, doi 10.1039/C5RA23855B (abstract).
 * @example
 * ```ts
 * import { exposurePlan } from "resinwright";
 * const plan = exposurePlan({
 *   penetrationDepth_um: 100,
 *   criticalExposure_mJcm2: 5,
 *   layerThickness_um: 50,
 *   cureDepthPerLayer: 1.5,
 *   irradiance_mWcm2: { value: 4, u: 0.2 },
 *   layers: 200,
 *   baseLayers: 4,
 *   baseFactor: 8,
 *   transitionLayers: 2,
 *   level: 0.95,
 * });
 * plan.rows[3]?.time_s; // → 2.646
 * plan.rows[1]?.time_s; // → 10.585
 * ```
 */
export function exposurePlan(input: ExposureQuestion): ExposurePlan {
  checkQuestion(input);
  const { layers, baseLayers, baseFactor, transitionLayers: T } = input;
  const normal = exposureForDepth({
    ...input,
    cureDepth_um: input.cureDepthPerLayer * input.layerThickness_um,
  });
  const runs: Run[] = [{ part: "base", from: 1, to: baseLayers, exposure: baseFactor * normal }];
  for (let k = 1; k <= T; k++) {
    const layer = baseLayers + k;
    runs.push({
      part: "transition",
      from: layer,
      to: layer,
      exposure: baseFactor ** (1 - k / (T + 1)) * normal,
    });
  }
  runs.push({ part: "normal", from: baseLayers + T + 1, to: layers, exposure: normal });
  const rows = runs.filter(({ from, to }) => to >= from).map((run) => rowOf(run, input));
  const totalTime_s = rows.reduce((sum, row) => sum + (row.toLayer - row.fromLayer + 1) * row.time_s, 0);
  checkNumber(totalTime_s, { where, field: "totalTime_s" });
  return { rows, totalTime_s, warnings: warningsOf(input, rows) };
}

const where = "exposurePlan";

interface Run {
  readonly part: ExposureRow["part"];
  readonly from: number;
  readonly to: number;
  readonly exposure: number;
}

function checkQuestion(input: ExposureQuestion): void {
  checkNumbers(where, input, {
    penetrationDepth_um: positive,
    criticalExposure_mJcm2: positive,
    layerThickness_um: positive,
    cureDepthPerLayer: { min: 1, max: 10, advice: "below 1 a layer does not reach the one before it" },
    layers: { min: 1 },
    baseLayers: { min: 0 },
    baseFactor: { min: 1, max: 100 },
    transitionLayers: { min: 0 },
    level: { min: 0.5, max: 0.999 },
  });
  for (const field of ["layers", "baseLayers", "transitionLayers"] as const)
    checkWhole(input[field], { where, field });
  const { layers, baseLayers, transitionLayers } = input;
  if (baseLayers + transitionLayers > layers) {
    throw new InputError(
      `${where}: ${baseLayers} base and ${transitionLayers} transition layers are more than the ${layers} of the part; take fewer`,
    );
  }
  if (baseLayers === 0 && transitionLayers > 0) {
    throw new InputError(
      `${where}: transitionLayers is ${transitionLayers} without base layers; set it to 0`,
    );
  }
  const { value, u } = input.irradiance_mWcm2;
  checkNumber(value, { where, field: "irradiance_mWcm2.value", ...positive });
  checkNumber(u, { where, field: "irradiance_mWcm2.u", min: 0 });
  checkNumber(value - reach(input), {
    where,
    field: "the lower end of the irradiance",
    ...positive,
    advice: "an irradiance so uncertain sets no time; measure it",
  });
}

/** Half width of the interval of the irradiance. */
const reach = ({ irradiance_mWcm2: { u }, level }: ExposureQuestion): number =>
  u * normalQuantile({ probability: (1 + level) / 2 });

function rowOf({ part, from, to, exposure }: Run, input: ExposureQuestion): ExposureRow {
  const { irradiance_mWcm2, penetrationDepth_um: Dp, criticalExposure_mJcm2: Ec } = input;
  const I = irradiance_mWcm2.value;
  const half = reach(input);
  const depthAt = (E: number): number => Math.max(Dp * Math.log(E / Ec), 0);
  return {
    part,
    fromLayer: from,
    toLayer: to,
    exposure_mJcm2: exposure,
    time_s: exposure / I,
    timeLow_s: exposure / (I + half),
    timeHigh_s: exposure / (I - half),
    cureDepth_um: depthAt(exposure),
    cureDepthLow_um: depthAt((exposure * (I - half)) / I),
    cureDepthHigh_um: depthAt((exposure * (I + half)) / I),
  };
}

function warningsOf(
  { layerThickness_um: L, penetrationDepth_um: Dp }: ExposureQuestion,
  rows: readonly ExposureRow[],
): Warning[] {
  const warnings: Warning[] = [];
  const ratio = (L / Dp).toPrecision(2);
  if (L > Dp) {
    warnings.push({
      code: "layer-thick-for-depth",
      message: `the layer is ${ratio} penetration depths thick; above 1 its far side gets less than a third of the light at the window: use thinner layers or less absorber`,
    });
  }
  if (L < 0.3 * Dp) {
    warnings.push({
      code: "layer-thin-for-depth",
      message: `the layer is ${ratio} penetration depths thick; below 0.3 the light prints through many layers: add absorber if holes have to stay open`,
    });
  }
  if (rows.some(({ cureDepthLow_um }) => cureDepthLow_um < L)) {
    warnings.push({
      code: "layer-may-not-hold",
      message:
        "at the lower end of the irradiance a layer does not reach the one before it; measure the irradiance or cure deeper",
    });
  }
  return warnings;
}
