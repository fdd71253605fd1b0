// Which spots to cure on a glass slide for this resin under this light: as few as do, none so long that the initiator is mostly
// gone, and two of them twice.

import { checkNumber, positive } from "../door.js";
import { bleachingOf } from "../assess/bleaching.js";
import { irradianceOf, layerCureDepth, type Case } from "../assess/case.js";
import { curveModel } from "../assess/cure.js";
import type { DrawOptions, Read } from "../assess/doubt.js";
import { shortText } from "../assess/shortText.js";
import { cureDepth, exposureForDepth, planCureDepths } from "../models/cure.js";
import type { CureDepthPlan, CureDepthQuestion, WorkingCurve } from "../models/cure.js";
import type { Interval, Warning } from "../result.js";

/** What can be lifted and measured, and what is wanted: fields as in `CureDepthQuestion`. */
export interface SpotQuestion extends Omit<CureDepthQuestion, keyof WorkingCurve> {
  /** Longest time that a spot may take, above 0, s. */
  readonly longestTime_s: number;
}

/** A spot to cure on the slide, with the film that is expected of it. */
export interface PlannedSpot {
  readonly exposure_mJcm2: number;
  readonly time_s: number;
  /** Expected, if the guess holds. */
  readonly cureDepth_um: number;
  /** Cured again at an exposure that stands among the spots before it. */
  readonly repeat: boolean;
}

/** The spots, in the order to cure them, and what they promise if the guess is right; or why there are none to plan. */
export type SpotPlan =
  | {
      readonly outcome: "planned";
      /** In rising order, equal factors apart; then the repeats. */
      readonly spots: readonly PlannedSpot[];
      /** Expected relative standard uncertainties, repeats counted. */
      readonly penetrationDepth: CureDepthPlan["penetrationDepth"];
      readonly criticalExposure: CureDepthPlan["criticalExposure"];
      /** Part of the initiator that is gone at the window after the longest spot. */
      readonly bleachedShare: Interval;
      /** Codes: those of `planCureDepths`, `held-by-bleaching`, `held-by-time`, `short-of-layer`. */
      readonly warnings: readonly Warning[];
    }
  | { readonly outcome: "impossible"; readonly reason: string; readonly warnings: readonly Warning[] };

/**
 * Plans the cure-depth series of this resin under the brief's light: {@link planCureDepths} on the working curve as it is known
 * now, held to exposures that a straight working curve can describe, with the thinnest and the thickest film cured twice.
 *
 * No spot takes more than `longestTime_s`, nor more than the exposure after which half of the initiator is gone at the window
 * ({@link bleachingOf}, stated figures): ln 2 times the exposure that leaves 1/e of it. Half is our choice: there the window side
 * starts radicals at half the rate it began with, and depths beyond bend away from the line. The repeats are last, so that a
 * lamp that drifts shows, and at the ends, where they say most about the slope; they count in the expected uncertainties, by the
 * variances of a least-squares line.
 * @param input - The case; the fields of `SpotQuestion`; draw options, for the interval of the bleached share.
 * @throws InputError as {@link planCureDepths} and {@link bleachingOf}; when `longestTime_s` is not above 0.
 * @source Models: {@link planCureDepths}, {@link bleachingExposure}.
 * @example
 * ```ts
 * import { spotPlanOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const films = { thinnestFilm_um: 40, thickestFilm_um: 300, scatter_um: 6, relativeU: 0.1, longestTime_s: 300 };
 * const plan = spotPlanOf({ ...openBrief("data/briefs/flow-cell.json"), ...films, draws: 100 });
 * plan.outcome === "planned" && plan.spots.filter(({ repeat }) => repeat).length; // → 2
 * plan.warnings.map(({ code }) => code).includes("held-by-bleaching"); // → true
 * ```
 */
export function spotPlanOf(input: Case & SpotQuestion & DrawOptions): SpotPlan {
  const { longestTime_s, thinnestFilm_um, thickestFilm_um, scatter_um, relativeU } = input;
  checkNumber(longestTime_s, { where: "spotPlanOf", field: "longestTime_s", ...positive });
  const curve = presentCurve(input);
  const irradiance_mWcm2 = irradianceOf(input).value;
  const question = { ...curve, thinnestFilm_um, thickestFilm_um, scatter_um, relativeU };
  // Refuses what cannot be asked before any of it is held back.
  planCureDepths(question);

  const wanted = exposureForDepth({ ...curve, cureDepth_um: thickestFilm_um });
  const held = heldBack(input, { wanted, irradiance_mWcm2 });
  const thickest = held === undefined ? thickestFilm_um : cureDepth({ ...curve, exposure_mJcm2: held.most });
  const holding = held === undefined ? [] : [held.warning(`${shortText(thickest)} µm`)];
  if (thickest <= thinnestFilm_um) {
    const reason = `No film of ${shortText(thinnestFilm_um)} µm is expected before that: take more light or initiator, or less absorber.`;
    return { outcome: "impossible", reason, warnings: holding };
  }
  const plan = planCureDepths({ ...question, thickestFilm_um: thickest });
  const { exposures_mJcm2, cureDepths_um } = plan;
  const spotAt = (i: number, repeat: boolean): PlannedSpot => ({
    exposure_mJcm2: exposures_mJcm2[i]!,
    time_s: exposures_mJcm2[i]! / irradiance_mWcm2,
    cureDepth_um: cureDepths_um[i]!,
    repeat,
  });
  const last = exposures_mJcm2.length - 1;
  const spots = [
    ...exposures_mJcm2.map((_, i) => spotAt(i, false)),
    ...[0, last].map((i) => spotAt(i, true)),
  ];
  const { bleachedShare } = bleachingOf({ ...input, exposure_mJcm2: exposures_mJcm2[last]! });
  const expected = expectedU(spots, curve.penetrationDepth_um, scatter_um);
  const reached = Math.max(expected.penetrationDepth.relativeU, expected.criticalExposure.relativeU);
  return {
    outcome: "planned",
    spots,
    ...expected,
    bleachedShare,
    warnings: [
      ...holding,
      ...shortOfLayer(input, thickest),
      ...plan.warnings.filter(({ code }) => code !== "wanted-not-reached" || reached > relativeU),
    ],
  };
}

const stated: Read = ({ value }) => value;

function presentCurve(input: Case): WorkingCurve {
  const { penetrationDepthAt, criticalExposure_mJcm2 } = curveModel(input)(stated);
  return { penetrationDepth_um: penetrationDepthAt(layerCureDepth(input)), criticalExposure_mJcm2 };
}

/** The exposure at which the spots stop short of the wanted one, and why; undefined where they need not. */
function heldBack(
  input: Case & SpotQuestion,
  { wanted, irradiance_mWcm2 }: { readonly wanted: number; readonly irradiance_mWcm2: number },
) {
  const bleaching_mJcm2 = bleachingExposureOf(input, wanted);
  const gone = -Math.expm1(-wanted / bleaching_mJcm2);
  const half = Math.LN2 * bleaching_mJcm2;
  const inTime = input.longestTime_s * irradiance_mWcm2;
  const most = Math.min(half, inTime);
  if (most >= wanted) return undefined;
  const film = `${shortText(input.thickestFilm_um)} µm`;
  const stop = (depth: string) => `The spots stop at ${shortText(most)} mJ/cm², ${depth}`;
  const warning = (depth: string): Warning =>
    half <= inTime
      ? {
          code: "held-by-bleaching",
          message: `A film of ${film} would take ${shortText(wanted)} mJ/cm², after which ${Math.round(100 * gone)} % of the initiator at the window is gone. ${stop(depth)}, where half of it is: beyond, depths bend away from a straight working curve.`,
        }
      : {
          code: "held-by-time",
          message: `A film of ${film} would take ${shortText(wanted / irradiance_mWcm2)} s. ${stop(depth)}, after ${shortText(input.longestTime_s)} s, the longest time allowed.`,
        };
  return { most, warning };
}

/** The exposure that leaves 1/e of the initiator at the window, at the stated figures, which need no draws. */
function bleachingExposureOf(input: Case, wanted: number): number {
  const small = wanted / 1000;
  const { bleachedShare } = bleachingOf({ ...input, exposure_mJcm2: small, draws: 40, level: 0.95 });
  return small / -Math.log1p(-bleachedShare.value);
}

function shortOfLayer(input: Case, thickest_um: number): Warning[] {
  const wanted = layerCureDepth(input);
  if (thickest_um >= wanted) return [];
  return [
    {
      code: "short-of-layer",
      message: `A layer is to cure ${shortText(wanted)} µm deep, and the thickest film is ${shortText(thickest_um)} µm: the curve is extended beyond its readings.`,
    },
  ];
}

/** Variances of a least-squares line through these depths, repeats counted, as `planCureDepths` has them without. */
function expectedU(
  spots: readonly PlannedSpot[],
  penetrationDepth_um: number,
  scatter_um: number,
): Pick<CureDepthPlan, "penetrationDepth" | "criticalExposure"> {
  const x = spots.map(({ cureDepth_um }) => cureDepth_um / penetrationDepth_um);
  const mean = x.reduce((sum, one) => sum + one, 0) / x.length;
  const S = x.reduce((sum, one) => sum + (one - mean) ** 2, 0);
  const s = scatter_um / penetrationDepth_um;
  return {
    penetrationDepth: { relativeU: s / Math.sqrt(S) },
    criticalExposure: { relativeU: s * Math.sqrt(1 / x.length + mean ** 2 / S) },
  };
}
