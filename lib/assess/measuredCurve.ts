// The measured working curve that stands behind a case, if there is one: of this resin, of the same ingredients in other
// amounts, or none. A curve of another resin or another engine is never used, and the reason is told.

import type { MeasuredWorkingCurve } from "../recipe/cureDepths.js";
import type { Formulation } from "../recipe/formulation.js";
import type { SourcedValue, Warning } from "../result.js";
import { irradianceOf, layerCureDepth, uncertain, type Case } from "./case.js";
import { logarithmicSpread, type Read } from "./doubt.js";
import { lightWarnings } from "./light.js";
import { asMeasured, otherAmounts, sameIngredients } from "./measuredParts.js";
import { shortText } from "./shortText.js";

/** A measured curve for a case. */
export interface MeasuredFor {
  readonly curve: MeasuredWorkingCurve;
  /** The formulation it was measured on, in the ingredients of the case. */
  readonly formulation: Formulation;
  /** Irradiance it was measured at over that of the brief. */
  readonly relativeIrradiance: number;
  /** What differs from the case, in words; empty where nothing does. */
  readonly differs: readonly string[];
}

const SAME_IRRADIANCE = 0.02;

/** The nearest measured curve of these ingredients under this light, or undefined. */
export function measuredFor(input: Case): MeasuredFor | undefined {
  const { brief, shelf } = input;
  return shelf.workingCurves
    .filter((curve) => misfit(curve, input) === undefined)
    .map((curve): MeasuredFor => {
      const relativeIrradiance =
        curve.series.light.irradiance_mWcm2.value / brief.light.irradiance_mWcm2.value;
      return {
        curve,
        formulation: asMeasured(curve.series.parts, input.formulation),
        relativeIrradiance,
        differs: [...amountsInWords(curve, input), ...otherIrradiance(relativeIrradiance, curve, input)],
      };
    })
    .reduce<MeasuredFor | undefined>(
      // The latest of those that differ least.
      (best, one) => (best !== undefined && best.differs.length < one.differs.length ? best : one),
      undefined,
    );
}

/** The measured penetration depth in one draw. */
export function readDepth(curve: MeasuredWorkingCurve, read: Read): number {
  return read(jointInputs(curve).penetrationDepth_um);
}

/**
 * The measured critical exposure in one draw, going together with the penetration depth as the fit found. Exposures were set
 * with the meter that reads the engine's irradiance, so an error of that meter moves it too.
 */
export function readCritical(curve: MeasuredWorkingCurve, read: Read, input: Case): number {
  const { penetrationDepth_um, slope, critical } = jointInputs(curve);
  const alongside = Math.exp(slope * (read(penetrationDepth_um) - penetrationDepth_um.value));
  const irradiance = irradianceOf(input);
  return (read(critical) * alongside * read(irradiance)) / irradiance.value;
}

/** What to know before using the working curve of this case, measured or estimated. */
export function curveWarnings(input: Case): Warning[] {
  const measured = measuredFor(input);
  if (measured === undefined) return [...lightWarnings(input), estimated, ...elsewhere(input)];
  const { curve, differs } = measured;
  const warnings = [...curve.warnings];
  if (differs.length > 0) {
    warnings.push(...lightWarnings(input));
    warnings.push({
      code: "working-curve-carried-over",
      message: `The working curve was measured with ${differs.join(", ")} (${curve.series.id}) and is carried over by the models. Measure again before printing.`,
    });
  }
  const depths = curve.series.spots.flatMap(({ reading, cureDepth_um }) =>
    reading === "measured" ? [cureDepth_um!] : [],
  );
  const [least, most] = [Math.min(...depths), Math.max(...depths)];
  const wanted = layerCureDepth(input);
  if (wanted < least || wanted > most) {
    warnings.push({
      code: "beyond-measured-depths",
      message: `A layer is to cure ${shortText(wanted)} µm deep; ${curve.series.id} measured ${shortText(least)} to ${shortText(most)} µm. The curve is extended beyond its readings: add spots there.`,
    });
  }
  return warnings;
}

const estimated: Warning = {
  code: "working-curve-estimated",
  message:
    "Estimated from absorption, rate constants and dissolved oxygen, not measured. Cure six spots or more on a glass slide over a factor of ten in exposure before trusting an exposure time.",
};

/** A penetration depth, and what is left of the critical exposure's doubt once the depth is known. */
function jointInputs(curve: MeasuredWorkingCurve) {
  const { series, penetrationDepth_um: Dp, criticalExposure_mJcm2: Ec, correlation } = curve;
  const spreadE = logarithmicSpread(Ec);
  const left = remainders.get(curve) ?? {
    ...Ec,
    u: Ec.value * Math.sqrt(Math.expm1(spreadE ** 2 * (1 - correlation ** 2))),
  };
  remainders.set(curve, left);
  return {
    penetrationDepth_um: uncertain(`penetration depth of ${series.id}`, Dp),
    slope: Dp.u > 0 ? (correlation * spreadE) / Dp.u : 0,
    critical: uncertain(`critical exposure of ${series.id}`, left),
  };
}

const remainders = new WeakMap<MeasuredWorkingCurve, SourcedValue>();

/** Why a curve cannot stand behind a case, in words; undefined where it can. */
function misfit({ series }: MeasuredWorkingCurve, { brief, formulation }: Case): string | undefined {
  const { spectrum, wavelength_nm } = series.light;
  const sameLight =
    spectrum === undefined
      ? wavelength_nm!.value === brief.light.wavelength_nm?.value
      : spectrum === brief.light.spectrum;
  const other = [
    ...(sameIngredients(series.parts, formulation) ? [] : ["another resin"]),
    ...(sameLight ? [] : [`another light, ${spectrum ?? `${wavelength_nm!.value} nm`}`]),
  ];
  return other.length === 0 ? undefined : other.join(" and ");
}

function elsewhere(input: Case): Warning[] {
  const reasons = input.shelf.workingCurves.map((curve) => `${curve.series.id} (${misfit(curve, input)})`);
  if (reasons.length === 0) return [];
  const more = reasons.length > 3 ? ` and ${reasons.length - 3} more` : "";
  return [
    {
      code: "cure-depths-of-another",
      message: `Cure depths on the shelf are not of this resin under this light and are not used: ${reasons.slice(0, 3).join(", ")}${more}.`,
    },
  ];
}

function amountsInWords({ series }: MeasuredWorkingCurve, { formulation }: Case): string[] {
  return otherAmounts(series.parts, formulation).map(
    ({ id, massFraction }) => `${shortText(100 * massFraction)} % ${id}`,
  );
}

function otherIrradiance(relative: number, { series }: MeasuredWorkingCurve, { brief }: Case): string[] {
  if (Math.abs(relative - 1) <= SAME_IRRADIANCE) return [];
  return [
    `${shortText(series.light.irradiance_mWcm2.value)} in place of ${shortText(brief.light.irradiance_mWcm2.value)} mW/cm²`,
  ];
}
