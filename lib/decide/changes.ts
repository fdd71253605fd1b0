// What a change would do to the dead zone and to the time of a layer: each change against the present case, draw by draw, so
// that what both share drops out and the effect of the change is known better than either figure.

import { checkNumber, InputError } from "../door.js";
import { componentsIn, type Case } from "../assess/case.js";
import { intervalAmong, startDraws, type DrawOptions, type Draws } from "../assess/doubt.js";
import { drawGelTime } from "../assess/layers.js";
import { drawDeadZone, drawInductionTime } from "../assess/oxygen.js";
import { viscosityOf } from "../assess/viscosity.js";
import { drawsNeeded } from "../numerics/summary.js";
import { largestOf, mainPair, massFractionOf, withMassFraction, withRatio } from "../recipe/formulation.js";
import type { Interval } from "../result.js";

/** Something that could be done, and the case as it then would be. */
export interface Change {
  readonly change: string;
  readonly then: Case;
}

/** A quantity after a change, and the factor between then and now. */
export interface Effect {
  readonly then: Interval;
  readonly factor: Interval;
}

/** What one change does; a quantity is undefined where fewer than half of the draws have it (nothing cures, or no time is asked for). */
export interface ChangeEffect {
  readonly change: string;
  readonly deadZone_um: Effect | undefined;
  readonly inductionTime_s: Effect | undefined;
  /** Light until the first gel of a first layer, oxygen coming in through the window; only where `gelTimes` are asked for. */
  readonly gelTime_s: Effect | undefined;
  readonly neverCuresShare: number;
}

/** What changes do, the strongest effect on the dead zone first. */
export interface ChangeComparison {
  readonly effects: readonly ChangeEffect[];
  /** What no model here answers. */
  readonly notModelled: readonly string[];
}

/**
 * Compares changes with the present case: dead zone, induction time and, on request, the time to the first gel in a layer.
 *
 * Every draw stands for one possible truth, the same before and after a change. The factor's interval therefore holds only
 * what the change itself leaves in doubt: a film that is known no better than its table stays wide, twice the light is narrow.
 * @param input - The case; `changes`, {@link usualChanges} unless given; `gelTimes`, how many of the draws are followed in time
 * (40 to 10,000, and 2 / (1 - level) at least; none unless given: each is a transient run); draw options.
 * @throws InputError as `deadZoneOf`; when `changes` is empty.
 * @example
 * ```ts
 * import { compareChanges, usualChanges } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const changes = usualChanges(work).filter(({ change }) => change === "twice the light");
 * const { effects } = compareChanges({ ...work, changes, draws: 200 });
 * effects[0].inductionTime_s?.factor.high ?? NaN; // → 0.5
 * ```
 */
export function compareChanges({
  changes,
  gelTimes,
  ...input
}: Case &
  DrawOptions & { readonly changes?: readonly Change[]; readonly gelTimes?: number }): ChangeComparison {
  const considered = changes ?? usualChanges(input);
  if (considered.length === 0)
    throw new InputError("compareChanges: changes is empty; give at least one, or leave it out");
  if (gelTimes !== undefined) {
    const least = Math.max(40, drawsNeeded(input.level ?? 0.95));
    checkNumber(gelTimes, { where: "compareChanges", field: "gelTimes", min: least, max: 10000 });
  }
  const ask = (work: Case) => quantitiesOf(work, input, gelTimes);
  const now = ask(input);
  const effects = considered.map(({ change, then }): ChangeEffect => {
    const after = ask(then);
    return {
      change,
      deadZone_um: effectOf(now.zone, after.zone, now.level),
      inductionTime_s: effectOf(now.induction, after.induction, now.level),
      gelTime_s: effectOf(now.gel, after.gel, now.level),
      neverCuresShare: after.neverCuresShare,
    };
  });
  const strength = ({ deadZone_um }: ChangeEffect) =>
    deadZone_um === undefined ? Infinity : Math.abs(Math.log(Math.max(deadZone_um.factor.value, 1e-9)));
  return {
    effects: effects.sort((a, b) => strength(b) - strength(a)),
    notModelled: [
      "Inhibitors: counted as catchers of peroxyl radicals, which phenols are; without oxygen these hardly slow a cure. What phenothiazine and the like do to chain radicals is not modelled: measure it.",
      "Storage: the inhibitor keeps resin from setting in the bottle, and nothing here says how much that takes. Stay at the suppliers' levels.",
      "Gas flow: the gas under the film counts as mixed. Where it stands still, move it.",
    ],
  };
}

/**
 * Changes a chemist would think of: every other film on the shelf, film thickness, gas, temperature, light, initiator, inhibitor,
 * and the ratio of the main pair of liquids, which sets the viscosity.
 * @throws InputError when the formulation has no photoinitiator or fewer than two liquids.
 * @example
 * ```ts
 * import { usualChanges } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const changes = usualChanges(openBrief("data/briefs/flow-cell.json")).map(({ change }) => change);
 * changes.includes("oxygen under the film"); // → true
 * ```
 */
export function usualChanges(work: Case): Change[] {
  const { brief, formulation, shelf } = work;
  const { window, light, temperature_C } = brief;
  const withBrief = (change: string, part: Partial<Case["brief"]>): Change => ({
    change,
    then: { ...work, brief: { ...brief, ...part } },
  });
  const film = (change: string, part: Partial<typeof window>) =>
    withBrief(change, { window: { ...window, ...part } });
  const thick = (change: string, factor: number) =>
    film(change, { filmThickness_um: scaled(window.filmThickness_um, factor) });
  const bright = (change: string, factor: number) =>
    withBrief(change, { light: { ...light, irradiance_mWcm2: scaled(light.irradiance_mWcm2, factor) } });
  const gases = [
    ["nitrogen", 0],
    ["air", 0.2095],
    ["oxygen", 1],
  ] as const;
  return [
    ...[...shelf.films.keys()]
      .filter((id) => id !== window.film)
      .map((id) => film(`${id} film as thick`, { film: id })),
    thick("film half as thick", 0.5),
    thick("film twice as thick", 2),
    ...gases
      .filter(([, share]) => share !== window.gasOxygenFraction)
      .map(([gas, gasOxygenFraction]) => film(`${gas} under the film`, { gasOxygenFraction })),
    ...(temperature_C <= 110 ? [withBrief("10 K warmer", { temperature_C: temperature_C + 10 })] : []),
    ...(temperature_C >= 10 ? [withBrief("10 K cooler", { temperature_C: temperature_C - 10 })] : []),
    bright("twice the light", 2),
    bright("half the light", 0.5),
    ...amountChanges(work, largestOf(formulation, "photoinitiator").id),
    ...componentsIn(formulation, ["inhibitor"]).flatMap(({ ingredient }) =>
      amountChanges(work, ingredient.id),
    ),
    ...ratioChanges(work, formulation),
  ];
}

function amountChanges(work: Case, id: string): Change[] {
  const { formulation } = work;
  const massFraction = massFractionOf(formulation, id);
  return (
    [
      ["twice", 2],
      ["half", 0.5],
    ] as const
  ).flatMap(([word, factor]) =>
    massFraction > 0 && factor * massFraction < 0.2
      ? [
          {
            change: `${word} the ${id}`,
            then: {
              ...work,
              formulation: withMassFraction(formulation, { id, massFraction: factor * massFraction }),
            },
          },
        ]
      : [],
  );
}

/** A tenth of the pair moved either way; the wording gives the viscosity that comes of it. */
function ratioChanges(work: Case, formulation: Case["formulation"]): Change[] {
  const [thick, thin] = mainPair(formulation);
  const [a, b] = [massFractionOf(formulation, thick.id), massFractionOf(formulation, thin.id)];
  const viscosity = (one: Case) => viscosityOf({ ...one, draws: 40 }).value;
  const before = viscosity(work);
  return [0.1, -0.1].flatMap((moved) => {
    const share = a / (a + b) + moved;
    if (share < 0 || share > 1) return [];
    const then = { ...work, formulation: withRatio(formulation, { id: thick.id, against: thin.id, share }) };
    const factor = Number((viscosity(then) / before).toPrecision(2));
    return [{ change: `${moved > 0 ? "more" : "less"} ${thick.id}: ${factor} times the viscosity`, then }];
  });
}

interface Quantity {
  readonly stated: number;
  readonly values: readonly number[];
}

function quantitiesOf(work: Case, options: DrawOptions, gelTimes: number | undefined) {
  const draws: Draws = startDraws(options);
  const zone = drawDeadZone(work, draws);
  const induction = drawInductionTime(work, draws);
  const never = zone.property.outcome === "never-cures";
  return {
    level: draws.level,
    zone: { stated: never ? NaN : zone.property.value, values: zone.values },
    induction: { stated: induction.property.value, values: induction.values },
    gel:
      gelTimes === undefined
        ? undefined
        : drawGelTime(
            { ...work, exposure_s: longEnough(induction.property) },
            startDraws({ ...options, draws: gelTimes }),
          ),
    neverCuresShare: never ? zone.property.share : zone.property.neverCuresShare,
  };
}

/** Light in which all but the most stubborn draws gel. */
const longEnough = ({ high }: Interval): number => 10 * high;

/** The quantity after the change and its factor, from the draws that have it both before and after. */
function effectOf(
  before: Quantity | undefined,
  after: Quantity | undefined,
  level: number,
): Effect | undefined {
  if (before === undefined || after === undefined) return undefined;
  const both = after.values.flatMap((value, k) =>
    Number.isFinite(value / before.values[k]!) ? [[value, value / before.values[k]!] as const] : [],
  );
  const statedFactor = after.stated / before.stated;
  if (!Number.isFinite(statedFactor) || both.length < after.values.length / 2) return undefined;
  return {
    then: intervalAmong({ stated: after.stated, values: both.map(([value]) => value), level }),
    factor: intervalAmong({ stated: statedFactor, values: both.map(([, factor]) => factor), level }),
  };
}

function scaled<T extends { readonly value: number; readonly u: number }>(one: T, factor: number): T {
  return { ...one, value: factor * one.value, u: factor * one.u };
}
