// The shape of an assessed property, and how a run of draws becomes one.

import type { PropertyName, Target } from "../recipe/brief.js";
import { unitLabel } from "../recipe/units.js";
import type { Interval, UsedSource, Warning } from "../result.js";
import {
  doubtShares,
  intervalOf,
  propagate,
  sourcesOf,
  type DoubtShare,
  type Draws,
  type Read,
} from "./doubt.js";

/** What every answer for a property says, whatever the outcome. */
interface Answer {
  readonly property: PropertyName;
  readonly title: string;
  readonly unit: string;
  /** What to know before using it. */
  readonly warnings: readonly Warning[];
  /** Which inputs carry the doubt. */
  readonly doubt: readonly DoubtShare[];
  /** Where the figures come from that this answer used. */
  readonly sources: readonly UsedSource[];
}

/** A property of a formulation under a brief: an interval, with its warnings, the inputs behind its doubt and its sources. */
export interface Property extends Interval, Answer {
  readonly outcome: "value";
}

/** The resin never cures in steady light: the window brings oxygen faster than the light can burn it. */
export interface NeverCures extends Answer {
  readonly outcome: "never-cures";
  /** Share of the draws in which it does not cure, 0 to 1. */
  readonly share: number;
}

/** Whether a target is met: by at least `level` of the draws, by at most 1 - `level` of them, or in between. */
export interface Verdict {
  readonly property: PropertyName;
  readonly title: string;
  readonly unit: string;
  readonly target: Target;
  readonly outcome: "meets" | "fails" | "cannot tell";
  /** Share of the draws within the target, 0 to 1 (the conformance probability of JCGM 106:2012, from memory). */
  readonly share: number;
}

/** A property with the values of its draws; a draw without a value (it never cures) is NaN. */
export interface Drawn<P extends Property | NeverCures = Property> {
  readonly property: P;
  readonly values: readonly number[];
}

export const propertyTitles: Readonly<Record<PropertyName, string>> = {
  viscosity_mPas: "viscosity at print temperature",
  opticalDepth_um: "optical depth",
  penetrationDepth_um: "penetration depth",
  criticalExposure_mJcm2: "critical exposure",
  layerExposure_mJcm2: "exposure of a layer",
  layerTime_s: "exposure time of a layer",
  deadZone_um: "dead-zone thickness",
  inductionTime_s: "induction time",
};

/** Runs a model that always has a value, and sums it up. */
export function drawProperty(
  property: PropertyName,
  model: (read: Read) => number,
  warnings: readonly Warning[],
  draws: Draws,
): Drawn {
  const { stated, outcomes: values, inputs } = propagate(model, draws);
  return {
    values,
    property: {
      property,
      title: propertyTitles[property],
      unit: unitLabel(property),
      outcome: "value",
      ...intervalOf({ stated, values, level: draws.level }),
      warnings,
      doubt: doubtShares(values, inputs, draws),
      sources: sourcesOf(inputs),
    },
  };
}

/** Judges drawn values against a target. */
export function judge(
  { property, values }: Drawn<Property | NeverCures>,
  target: Target,
  level: number,
): Verdict {
  const { min = -Infinity, max = Infinity } = target;
  const share = values.filter((value) => value >= min && value <= max).length / values.length;
  const outcome = share >= level ? "meets" : share <= 1 - level ? "fails" : "cannot tell";
  return { property: property.property, title: property.title, unit: property.unit, target, outcome, share };
}
