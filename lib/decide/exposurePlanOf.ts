// What to type into the printer for this resin under this brief, and what the part gets from it: depth, bond, print-through.

import { InputError } from "../door.js";
import {
  channelHeightRule,
  exposurePlan,
  interfaceConversion,
  printThrough,
  stackProfile,
} from "../models/cure.js";
import type { ExposureQuestion, ExposureRow, StackPoint } from "../models/cure.js";
import { opticalDepth } from "../models/light.js";
import { constantOf, layerCureDepth, type Case } from "../assess/case.js";
import { curveModel, inductionShareModel } from "../assess/cure.js";
import { cureDepthOn } from "../assess/curveDepth.js";
import {
  intervalOf,
  propagate,
  sourcesOf,
  startDraws,
  type DrawOptions,
  type Read,
} from "../assess/doubt.js";
import { lightModel } from "../assess/light.js";
import { curveWarnings } from "../assess/measuredCurve.js";
import { deadZoneModel } from "../assess/oxygen.js";
import type { Interval, UsedSource, Warning } from "../result.js";

/** The layers of a part: fields as in `ExposureQuestion`. */
export type PlannedLayers = Pick<
  ExposureQuestion,
  "layers" | "baseLayers" | "baseFactor" | "transitionLayers"
>;

/** A run of layers with one exposure. */
export interface PlannedExposure {
  readonly part: ExposureRow["part"];
  readonly fromLayer: number;
  readonly toLayer: number;
  /** To set: the value; the right time lies in the interval, as working curve and irradiance are in doubt. */
  readonly time_s: Interval;
  /** To set, as the stated irradiance times that time. */
  readonly exposure_mJcm2: number;
  /** Reached with the time that is set. */
  readonly cureDepth_um: Interval;
}

/** The plan of a part, and what its normal layers get from the times that are set. */
export interface ExposurePlanEstimate {
  readonly rows: readonly PlannedExposure[];
  /** With the light on, as set. */
  readonly totalTime_s: number;
  /** Cure depth of a normal layer over its thickness. */
  readonly cureDepthPerLayer: Interval;
  /** Left liquid on the window, which the light passes first; steady dead zone. */
  readonly liquid_um: Interval;
  /** How far a normal layer, the liquid below it and its own thickness taken off, cures into the one before; below 0 it falls short. */
  readonly reach_um: Interval;
  /** Conversion where a normal layer meets the one before: the new side is the weaker and sets the green strength. */
  readonly bond: {
    readonly newSide: { readonly conversion: Interval };
    readonly oldSide: { readonly conversion: Interval };
    /** Share of the draws in which the new side has gelled. */
    readonly gelsShare: number;
  };
  /** Cured into the void behind a roof of very many layers, and the part of it that the layers after the first add. */
  readonly roof: { readonly printThrough_um: Interval; readonly drift_um: Interval };
  /** Height that a drawn channel must exceed to stay open: the print-through; and what a study found, at this optical depth. */
  readonly channel: {
    readonly smallest_um: Interval;
    /** The two ends of the heights below which channels clogged, each with the doubt of the optical depth. */
    readonly foundToClog: { readonly low_um: Interval; readonly high_um: Interval };
  };
  /** Exposure and conversion through the last layers at the stated figures, from the face of the part on. */
  readonly stack: readonly StackPoint[];
  readonly warnings: readonly Warning[];
  readonly sources: readonly UsedSource[];
}

/**
 * Exposure times for every layer of a part under this brief, with what they do: cure depth, bond between layers, print-through
 * behind a roof, smallest open channel, conversion through the stack.
 *
 * Times follow from the working curve ({@link workingCurveOf}; measured where calibrated) by {@link exposurePlan}, once at the
 * stated figures, which is what to set, and once a draw, which is the interval of the right time. Depths and conversions are
 * those of the set times in each draw. Light in the stack is taken to fall off as the working curve shows, with the penetration
 * depth. The part hangs above the dead zone ({@link deadZoneOf}): light passes the liquid first, and what is left of it makes the bond.
 * Of the critical exposure oxygen takes the share that the estimate has; conversion rises from there. The print-through leaves the
 * dead zone out, so it is an upper bound. Holds for the resin at rest on this engine; a first print with a test piece comes before a part.
 * @param input - The case; `layers`, `baseLayers`, `baseFactor`, `transitionLayers`; draw options.
 * @throws InputError as {@link workingCurveOf} and {@link exposurePlan}; when no layer is a normal one.
 * @source Models: {@link exposurePlan}, {@link interfaceConversion}, {@link printThrough}, {@link stackProfile},
 * {@link channelHeightRule}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { calibrate, exposurePlanOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const plan = exposurePlanOf({ ...work, layers: 400, baseLayers: 4, baseFactor: 8, transitionLayers: 3 });
 * plan.rows.map(({ part }) => part).join(" "); // → "base transition transition transition normal"
 * plan.cureDepthPerLayer.value; // → 1.500
 * ```
 */
export function exposurePlanOf(input: Case & PlannedLayers & DrawOptions): ExposurePlanEstimate {
  const { layers, baseLayers, transitionLayers } = input;
  if (layers === baseLayers + transitionLayers) {
    throw new InputError(
      `exposurePlanOf: all ${layers} layers are base or transition layers; a part needs at least one normal layer`,
    );
  }
  const draws = startDraws(input);
  const model = planModel(input, draws.level);
  const { stated, outcomes, inputs } = propagate(model, draws);
  const { plan } = stated;
  const set = plan.rows.map(({ time_s }) => time_s);
  const runs = outcomes.map((one) => one.runWith(set));
  const statedRun = stated.runWith(set);
  type Run = typeof statedRun;
  const interval = (of: (run: Run) => number): Interval =>
    intervalOf({ stated: of(statedRun), values: runs.map(of), level: draws.level });

  const printThrough_um = interval(({ roof }) => roof.printThrough_um);
  const gelled = runs.filter(({ bond }) => bond.newSide.gelled).length / runs.length;
  return {
    rows: plan.rows.map(({ part, fromLayer, toLayer, time_s, exposure_mJcm2 }, i) => ({
      part,
      fromLayer,
      toLayer,
      time_s: intervalOf({
        stated: time_s,
        values: outcomes.map((one) => one.plan.rows[i]!.time_s),
        level: draws.level,
      }),
      exposure_mJcm2,
      cureDepth_um: interval(({ cureDepths_um }) => cureDepths_um[i]!),
    })),
    totalTime_s: plan.totalTime_s,
    cureDepthPerLayer: interval(({ cureDepths_um }) => cureDepths_um.at(-1)! / input.brief.layerThickness_um),
    liquid_um: interval(({ liquid_um }) => liquid_um),
    reach_um: interval(
      ({ cureDepths_um, liquid_um }) => cureDepths_um.at(-1)! - liquid_um - input.brief.layerThickness_um,
    ),
    bond: {
      newSide: { conversion: interval(({ bond }) => bond.newSide.conversion) },
      oldSide: { conversion: interval(({ bond }) => bond.oldSide.conversion) },
      gelsShare: gelled,
    },
    roof: { printThrough_um, drift_um: interval(({ roof }) => roof.drift_um) },
    channel: {
      smallest_um: printThrough_um,
      foundToClog: {
        low_um: interval(({ clogs }) => clogs.low_um),
        high_um: interval(({ clogs }) => clogs.high_um),
      },
    },
    stack: stackProfile({
      ...statedRun.onPart,
      layers: Math.min(input.layers, STACK_SHOWN),
      pointsPerLayer: 11,
    }),
    warnings: [
      ...curveWarnings(input),
      ...plan.warnings.filter(({ code }) => code !== MAY_NOT_HOLD),
      ...bondWarning(gelled),
    ],
    sources: [...sourcesOf(inputs), clogSource],
  };
}

const clogSource: UsedSource = {
  figure: "height below which channels clog",
  source:
    "3.5 to 5.5 optical depths, found with a diacrylate, a bisacylphosphine oxide and a dye: H. Gong, M. Beauchamp, S. Perry, A. T. Woolley, G. P. Nordin, RSC Adv. 5 (2015) 106621, doi 10.1039/C5RA23855B (abstract)",
  status: "published",
};

/** Deeper layers have what light reaches them. */
const STACK_SHOWN = 6;
const MAY_NOT_HOLD = "layer-may-not-hold";

function planModel(input: Case & PlannedLayers, level: number) {
  const { brief, layers, baseLayers, baseFactor, transitionLayers } = input;
  const { layerThickness_um, cureDepthPerLayer } = brief;
  const curve = curveModel(input);
  const light = lightModel(input);
  const gel = constantOf(input.shelf.constants, "gelConversion");
  const zone = deadZoneModel(input);
  const inductionShare = inductionShareModel(input);
  return (read: Read) => {
    const drawn = curve(read);
    const { criticalExposure_mJcm2, irradiance_mWcm2 } = drawn;
    const penetrationDepth_um = drawn.penetrationDepthAt(layerCureDepth(input));
    const workingCurve = { penetrationDepth_um, criticalExposure_mJcm2 };
    const gelConversion = read(gel);
    const deadZone = zone(read);
    // Beyond so many depths no light is left to speak of, and a resin that never cures has no end of liquid.
    const most_um = 20 * penetrationDepth_um;
    const liquid_um = deadZone.outcome === "dead-zone" ? Math.min(deadZone.thickness_um, most_um) : most_um;
    const inductionExposure_mJcm2 = inductionShare(read) * criticalExposure_mJcm2;
    const clogs = channelHeightRule({ opticalDepth_um: opticalDepth(light(read)) });
    const plan = exposurePlan({
      ...workingCurve,
      layerThickness_um,
      cureDepthPerLayer,
      irradiance_mWcm2: { value: irradiance_mWcm2, u: 0 },
      layers,
      baseLayers,
      baseFactor,
      transitionLayers,
      level,
    });
    /** What the part gets in this draw when these times are set. */
    const runWith = (times_s: readonly number[]) => {
      const exposures = times_s.map((time_s) => time_s * irradiance_mWcm2);
      const layerExposure_mJcm2 = exposures.at(-1)!;
      const onPart = {
        layerExposure_mJcm2: layerExposure_mJcm2 * Math.exp(-liquid_um / penetrationDepth_um),
        layerThickness_um,
        opticalDepth_um: penetrationDepth_um,
        criticalExposure_mJcm2,
        gelConversion,
        inductionExposure_mJcm2,
      };
      return {
        onPart,
        liquid_um,
        cureDepths_um: exposures.map((exposure) => Math.max(cureDepthOn(drawn, exposure), 0)),
        bond: interfaceConversion(onPart),
        roof: printThrough({ layerExposure_mJcm2, layerThickness_um, ...workingCurve }),
        clogs,
      };
    };
    return { plan, runWith };
  };
}

function bondWarning(gelsShare: number): Warning[] {
  if (gelsShare >= 0.95) return [];
  return [
    {
      code: MAY_NOT_HOLD,
      message: `In ${Math.ceil(100 * (1 - gelsShare))} % of the draws a normal layer does not reach the one before it with the time that is set. Measure a cure-depth series, or cure deeper.`,
    },
  ];
}
