// Saving a batch that was weighed wrong: nothing can be taken out, so everything else is added until the proportions are right.

import { checkNumber, InputError, notNegative, positive } from "../../door.js";
import { checkLines, type Weighing } from "./asMade.js";
import { isHonest, readable, weighingUncertainty } from "./balance.js";
import type { Portion, WeighOutSheet } from "./weighOut.js";

/** What to add of one line. */
export interface RescueAddition {
  readonly line: number;
  readonly label: string;
  /** What is in the vessel of it. */
  readonly present_g: number;
  /** What to add, as the balance can show it; 0 where it is within the tolerance of the new total. */
  readonly add_g: number;
  /** Standard uncertainty of both together. */
  readonly u_g: number;
}

/** What a batch would be if additions too small to weigh were left out that set its size. */
export interface SmallerRescue {
  readonly total_g: number;
  /** What then stays short, and by how much of itself, negative. */
  readonly short: readonly { readonly label: string; readonly relativeChange: number }[];
}

/** How a batch is saved, or that it need not or cannot be. */
export type Rescue =
  | { readonly outcome: "within"; readonly total_g: number }
  | {
      readonly outcome: "add";
      readonly total_g: number;
      /** New total over the batch as planned. */
      readonly growth: number;
      /** The line that asks for this size: the one there is too much of, or one whose addition could not be weighed at less. */
      readonly setBy: string;
      readonly additions: readonly RescueAddition[];
      /** Absent where no addition too small to weigh sets the size. */
      readonly smaller?: SmallerRescue;
    }
  | {
      readonly outcome: "impossible";
      readonly reason: string;
      /** What the batch would have to grow to, where that is what stands in the way. */
      readonly neededTotal_g?: number;
    };

/**
 * The additions that bring a mis-weighed batch back to its recipe.
 *
 * The new size is g = max over the lines of m / target; each line is then short of g × target by what is to be added. An addition
 * below the minimum weight is left out if the line is within its tolerance without it. Otherwise it is weighed if the line as a
 * whole is still known well enough, two standard uncertainties of both weighings and half a digit being within its tolerance; where
 * they are not, the batch grows until they are or the addition reaches the minimum weight, and `smaller` says what it would be
 * without.
 * @param input - `sheet`; `weighings` so far, lines not yet weighed left out; `wrong`, what was poured in beside the sheet;
 * `vessel_g`, the most the vessel holds.
 * @returns `within` when all lines are there and no mass fraction is off by more than the sheet's accuracy; `add` with what to add,
 * in the order of the sheet; `impossible` when something is in it that the recipe does not hold, or the vessel is too small.
 * @throws InputError when a line is unknown or given twice, a mass is out of range, or nothing is in the vessel.
 * @example
 * ```ts
 * import { rescue, weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.001, capacity_g: 2000 };
 * const sheet = weighOut({ formulation, batch_g: 1000, balance, weighingAccuracy: 0.1 });
 * const weighings = sheet.portions.map(({ line, target_g }) => ({ line, mass_g: line === 6 ? 605 : target_g }));
 * const plan = rescue({ sheet, weighings });
 * plan.outcome === "add" && plan.total_g; // → 1100
 * ```
 */
export function rescue({
  sheet,
  weighings,
  wrong = [],
  vessel_g = Number.MAX_VALUE,
}: {
  sheet: WeighOutSheet;
  weighings: readonly Weighing[];
  wrong?: readonly { readonly ingredient: string; readonly mass_g: number }[];
  vessel_g?: number;
}): Rescue {
  const where = `rescue of "${sheet.formulation.id}"`;
  checkLines(where, sheet.portions, weighings);
  checkNumber(vessel_g, { where, field: "vessel_g", ...positive });
  wrong.forEach(({ mass_g }, i) =>
    checkNumber(mass_g, { where, field: `wrong[${i}].mass_g`, ...notNegative }),
  );
  const foreign = wrong.find(
    ({ ingredient, mass_g }) => mass_g > 0 && ownLine(sheet, ingredient) === undefined,
  );
  if (foreign !== undefined) {
    const reason = `${foreign.ingredient} has no line of its own on the sheet, and nothing takes it out again; keep the batch apart under another name or discard it`;
    return { outcome: "impossible", reason };
  }
  const lines = sheet.portions.map((portion): Line => {
    const weighed = weighings.find(({ line }) => line === portion.line)?.mass_g ?? 0;
    const poured = wrong.filter(({ ingredient }) => ownLine(sheet, ingredient) === portion);
    return { portion, present_g: poured.reduce((sum, { mass_g }) => sum + mass_g, weighed) };
  });
  const inVessel_g = lines.reduce((sum, { present_g }) => sum + present_g, 0);
  if (inVessel_g === 0)
    throw new InputError(`${where}: nothing is in the vessel; weigh out the sheet instead`);
  if (isWithin(sheet, lines)) return { outcome: "within", total_g: inVessel_g };
  return plan(sheet, lines, vessel_g);
}

interface Line {
  readonly portion: Portion;
  readonly present_g: number;
}

/** The line that is this ingredient alone; of several lots the first. */
function ownLine({ portions }: WeighOutSheet, id: string): Portion | undefined {
  return portions.find(({ contents }) => contents.length === 1 && contents[0]!.ingredient.id === id);
}

/** Whether one size of batch has every line within its tolerance. */
function isWithin({ tolerance: t }: WeighOutSheet, lines: readonly Line[]): boolean {
  const sizes = lines.map(({ portion, present_g }) => present_g / portion.exact_g);
  return Math.max(...sizes) / (1 + t) <= Math.min(...sizes) / (1 - t);
}

function plan(sheet: WeighOutSheet, lines: readonly Line[], vessel_g: number): Rescue {
  const least = leastSize(lines);
  const { growth, setBy } = sizeOf(sheet, lines, least);
  const additions = additionsFor(sheet, lines, growth);
  const total_g = totalOf(additions);
  if (total_g <= vessel_g) {
    const smaller = growth > least.growth ? { smaller: smallerOf(sheet, lines, least.growth) } : {};
    return { outcome: "add", total_g, growth: total_g / sheet.batch_g, setBy, additions, ...smaller };
  }
  const reason = `the batch would have to grow to ${Number(total_g.toPrecision(6))} g, and the vessel holds ${vessel_g} g; take a larger vessel, or discard part of what is in it after stirring and plan again with what is left`;
  return { outcome: "impossible", reason, neededTotal_g: total_g };
}

interface Size {
  /** As a multiple of the sheet's. */
  readonly growth: number;
  readonly setBy: string;
}

/** The size that the line there is most too much of asks for. */
function leastSize(lines: readonly Line[]): Size {
  const sizes = lines.map(({ portion, present_g }) => present_g / portion.exact_g);
  const growth = Math.max(1, ...sizes);
  return { growth, setBy: growth > 1 ? lines[sizes.indexOf(growth)]!.portion.label : "the sheet" };
}

/** The smallest size from `least` on at which every line can be brought within its tolerance. */
function sizeOf(sheet: WeighOutSheet, lines: readonly Line[], least: Size): Size {
  let size = least;
  for (;;) {
    const stuck = lines.find((line) => isStuck(sheet, line, size.growth));
    if (stuck === undefined) return size;
    const { portion, present_g } = stuck;
    const wanted_g = [
      present_g + smallest(sheet, portion),
      doubtOf(sheet, stuck, size.growth) / sheet.tolerance,
    ];
    size = { growth: Math.min(...wanted_g) / portion.exact_g, setBy: portion.label };
  }
}

/** What is added of each line for that size. */
function additionsFor(sheet: WeighOutSheet, lines: readonly Line[], growth: number): RescueAddition[] {
  return lines.map((line): RescueAddition => {
    const { portion, present_g } = line;
    const short_g = growth * portion.exact_g - present_g;
    const weighed =
      isHonest(short_g, smallest(sheet, portion)) ||
      (isShort(sheet, line, growth) && isKnown(sheet, line, growth));
    const add_g = weighed ? readable(short_g, sheet.balance) : 0;
    return { line: portion.line, label: portion.label, present_g, add_g, u_g: uOf(sheet, present_g, add_g) };
  });
}

function smallerOf(sheet: WeighOutSheet, lines: readonly Line[], growth: number): SmallerRescue {
  return {
    total_g: totalOf(additionsFor(sheet, lines, growth)),
    short: lines
      .filter((line) => isStuck(sheet, line, growth))
      .map(({ portion, present_g }) => ({
        label: portion.label,
        relativeChange: present_g / (growth * portion.exact_g) - 1,
      })),
  };
}

/** Short of its tolerance, by too little to weigh. */
function isStuck(sheet: WeighOutSheet, line: Line, growth: number): boolean {
  const { portion, present_g } = line;
  const honest = isHonest(growth * portion.exact_g - present_g, smallest(sheet, portion));
  return isShort(sheet, line, growth) && !honest && !isKnown(sheet, line, growth);
}

function isShort({ tolerance }: WeighOutSheet, { portion, present_g }: Line, growth: number): boolean {
  return present_g < growth * portion.exact_g * (1 - tolerance);
}

/** Whether a line, filled up, is known to within its tolerance. */
function isKnown(sheet: WeighOutSheet, line: Line, growth: number): boolean {
  const room_g = sheet.tolerance * growth * line.portion.exact_g;
  return doubtOf(sheet, line, growth) <= room_g * (1 + 1e-9);
}

/** How far a line that is filled up may be off: two standard uncertainties, and the rounding of the addition. */
function doubtOf(sheet: WeighOutSheet, { portion, present_g }: Line, growth: number): number {
  const add_g = growth * portion.exact_g - present_g;
  return 2 * uOf(sheet, present_g, add_g) + sheet.balance.readability_g / 2;
}

/** Standard uncertainty of masses weighed one after the other, each in as many loads as the balance needs. */
function uOf({ balance }: WeighOutSheet, ...masses_g: readonly number[]): number {
  const loads = masses_g.map((mass_g) => Math.ceil(mass_g / balance.capacity_g));
  return Math.hypot(
    ...loads.filter((count) => count > 0).map((count) => weighingUncertainty({ balance, loads: count })),
  );
}

function totalOf(additions: readonly RescueAddition[]): number {
  return additions.reduce((sum, { present_g, add_g }) => sum + present_g + add_g, 0);
}

/** The least that is weighed of a line: the minimum weight, or the portion itself where the sheet had to go below that. */
function smallest({ minimumWeight_g }: WeighOutSheet, { exact_g }: Portion): number {
  return Math.min(minimumWeight_g, exact_g);
}
