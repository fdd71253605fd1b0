// The working curve of a formulation under a brief, as a cure-depth series measured it or estimated from the ingredients, and
// the exposure a layer needs.

import { exposureForDepth, steadyConversionTime } from "../models/cure.js";
import { inductionTime } from "../models/oxygen.js";
import type { PropertyName } from "../recipe/brief.js";
import { constantOf, irradianceOf, layerCureDepth, type Case } from "./case.js";
import { depthModel, drawPenetrationDepth, type DepthAt } from "./depth.js";
import { startDraws, type DrawOptions, type Draws, type Read } from "./doubt.js";
import { curveWarnings, measuredFor, readCritical } from "./measuredCurve.js";
import { airSaturation, radicalModel } from "./oxygen.js";
import { drawProperty, type Drawn, type Property } from "./property.js";

/** The two figures of a working curve and the exposure that follows from them for this brief's layer. */
export interface WorkingCurveEstimate {
  readonly penetrationDepth_um: Property;
  readonly criticalExposure_mJcm2: Property;
  readonly layerExposure_mJcm2: Property;
  readonly layerTime_s: Property;
}

/**
 * The working curve: penetration depth, critical exposure at the window, exposure and time for one layer.
 *
 * Measured where a cure-depth series of this resin under this light is on the shelf ({@link calibrate}); otherwise estimated:
 * critical exposure = light that burns the dissolved oxygen + light that brings the resin to its gel conversion at steady
 * radicals. Cure depth = penetration depth × ln(exposure / critical exposure). The layer's exposure cures
 * `cureDepthPerLayer` layers deep. The estimate is there to plan the first cure-depth series with, not to print with.
 * @throws InputError as {@link penetrationDepthOf}; when no initiator absorbs the light.
 * @source Models: {@link inductionTime}, {@link steadyConversionTime}, {@link exposureForDepth}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { cureDepth, workingCurveOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const { penetrationDepth_um, criticalExposure_mJcm2, layerExposure_mJcm2 } = workingCurveOf(work);
 * // The exposure of a layer cures 1.5 layers of 50 µm deep, as the brief asks.
 * cureDepth({
 *   exposure_mJcm2: layerExposure_mJcm2.value,
 *   penetrationDepth_um: penetrationDepth_um.value,
 *   criticalExposure_mJcm2: criticalExposure_mJcm2.value,
 * }); // → 75.000
 * ```
 */
export function workingCurveOf(input: Case & DrawOptions): WorkingCurveEstimate {
  const draws = startDraws(input);
  return {
    penetrationDepth_um: drawPenetrationDepth(input, draws).property,
    criticalExposure_mJcm2: drawCure(input, "criticalExposure_mJcm2", draws).property,
    layerExposure_mJcm2: drawCure(input, "layerExposure_mJcm2", draws).property,
    layerTime_s: drawCure(input, "layerTime_s", draws).property,
  };
}

/** @internal */
export function drawCure(input: Case, property: PropertyName & keyof CureFigures, draws: Draws): Drawn {
  const model = cureModel(input);
  return drawProperty(property, (read) => model(read)[property], curveWarnings(input), draws);
}

interface CureFigures {
  readonly criticalExposure_mJcm2: number;
  readonly layerExposure_mJcm2: number;
  readonly layerTime_s: number;
}

/** The working curve's figures for this brief's layer as a function of what the draws read. @internal */
export function cureModel(input: Case): (read: Read) => CureFigures {
  const curve = curveModel(input);
  const cureDepth_um = layerCureDepth(input);
  return (read) => {
    const { penetrationDepthAt, criticalExposure_mJcm2, irradiance_mWcm2 } = curve(read);
    const layerExposure_mJcm2 = exposureForDepth({
      cureDepth_um,
      penetrationDepth_um: penetrationDepthAt(cureDepth_um),
      criticalExposure_mJcm2,
    });
    return {
      criticalExposure_mJcm2,
      layerExposure_mJcm2,
      layerTime_s: layerExposure_mJcm2 / irradiance_mWcm2,
    };
  };
}

/** The working curve of one draw, and the light it is for. @internal */
export interface DrawnCurve {
  readonly penetrationDepthAt: DepthAt;
  readonly criticalExposure_mJcm2: number;
  readonly irradiance_mWcm2: number;
}

/** The working curve as a function of what the draws read. @internal */
export function curveModel(input: Case): (read: Read) => DrawnCurve {
  const depth = depthModel(input);
  const critical = criticalModel(input);
  const irradiance = irradianceOf(input);
  return (read) => ({
    penetrationDepthAt: depth(read),
    criticalExposure_mJcm2: critical(read),
    irradiance_mWcm2: read(irradiance),
  });
}

/** Measured where a curve of this resin under this light stands on the shelf; carried over by the estimates' ratio or estimated. */
function criticalModel(input: Case): (read: Read) => number {
  const measured = measuredFor(input);
  if (measured === undefined) return estimatedCritical(input, 1);
  const { curve, differs, formulation, relativeIrradiance } = measured;
  if (differs.length === 0) return (read) => readCritical(curve, read, input);
  const here = estimatedCritical(input, 1);
  const there = estimatedCritical({ ...input, formulation }, relativeIrradiance);
  return (read) => (readCritical(curve, read, input) * here(read)) / there(read);
}

function estimatedCritical(input: Case, relativeIrradiance: number): (read: Read) => number {
  const parts = estimatedParts(input, relativeIrradiance);
  return (read) => {
    const { oxygen_mJcm2, gel_mJcm2 } = parts(read);
    return oxygen_mJcm2 + gel_mJcm2;
  };
}

/** The share of the critical exposure that the dissolved oxygen takes, as the estimate has it. @internal */
export function inductionShareModel(input: Case): (read: Read) => number {
  const parts = estimatedParts(input, 1);
  return (read) => {
    const { oxygen_mJcm2, gel_mJcm2 } = parts(read);
    return oxygen_mJcm2 / (oxygen_mJcm2 + gel_mJcm2);
  };
}

/** Light that burns the dissolved oxygen, and light that brings the resin to its gel conversion. */
function estimatedParts(input: Case, relativeIrradiance: number) {
  const { shelf } = input;
  const radicals = radicalModel(input);
  const constant = (name: "termination_m3mols" | "gelConversion") => constantOf(shelf.constants, name);
  return (read: Read) => {
    const drawn = radicals(read);
    const radicalGeneration_molm3s = relativeIrradiance * drawn.radicalGeneration_molm3s;
    const oxygenTime_s = inductionTime({
      oxygen_molm3: airSaturation(drawn.solubility_molm3Pa),
      radicalGeneration_molm3s,
      oxygenPerRadical: drawn.oxygenPerRadical,
    });
    const gelTime_s = steadyConversionTime({
      conversion: read(constant("gelConversion")),
      propagation_m3mols: drawn.propagation_m3mols,
      termination_m3mols: read(constant("termination_m3mols")),
      radicalGeneration_molm3s,
    });
    const irradiance_mWcm2 = relativeIrradiance * drawn.irradiance_mWcm2;
    return { oxygen_mJcm2: irradiance_mWcm2 * oxygenTime_s, gel_mJcm2: irradiance_mWcm2 * gelTime_s };
  };
}
