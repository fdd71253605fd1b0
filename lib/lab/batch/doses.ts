// What goes on the balance by itself and what as a master batch: nothing is weighed worse than the shares allow, and no master
// batch is planned that does not dissolve.

import type { Ingredient } from "../../recipe/ingredient.js";
import type { Warning } from "../../result.js";
import { isHonest, readable, weighingUncertainty, type Balance } from "./balance.js";
import { leastDose, planMasterBatch, type MasterBatch } from "./masterBatch.js";
import type { Addition, Entry } from "./order.js";

/** An ingredient's share of a portion; a master batch has its doubt from how it was weighed. */
export interface Content {
  readonly ingredient: Ingredient;
  readonly massFraction: number;
  /** Standard uncertainty of the share. */
  readonly u: number;
}

/** A portion before it has its place: an entry of the order whose share is that of the portion in the whole. */
export interface Dose extends Entry {
  readonly label: string;
  readonly contents: readonly Content[];
  readonly exact_g: number;
  /** Twice the standard uncertainty of the mass, where it is below the minimum weight and goes in by itself; 0 elsewhere. */
  readonly drawnIn_g: number;
  readonly lot: string;
  /** What its reason has to add. */
  readonly remark: string;
}

interface PlanInput {
  readonly steps: readonly Addition[];
  readonly batch_g: number;
  readonly minimumWeight_g: number;
  readonly tolerance: number;
  readonly balance: Balance;
}

/** What goes in by itself and what as a master batch, whose diluent is taken off the diluent's own portion. */
export function planDoses(input: PlanInput): {
  doses: Dose[];
  masterBatches: MasterBatch[];
  warnings: Warning[];
} {
  const { steps, batch_g, minimumWeight_g: minimum_g, balance } = input;
  const left_g = new Map(steps.map((step) => [step, step.massFraction * batch_g]));
  const masters = new Map<Addition, MasterBatch>();
  for (const step of steps) {
    const mass_g = left_g.get(step)!;
    if (isHonest(mass_g, minimum_g)) continue;
    const carriers = steps
      .filter((one) => one !== step && one.ingredient.role === "diluent")
      .sort((a, b) => left_g.get(b)! - left_g.get(a)!);
    for (const carrier of carriers) {
      const rest = { carrier: carrier.ingredient, available_g: left_g.get(carrier)!, minimum_g, balance };
      const master = planMasterBatch({ solute: step.ingredient, mass_g, ...rest });
      if (master === undefined) continue;
      masters.set(step, master);
      left_g.set(carrier, left_g.get(carrier)! - (master.dose_g - mass_g));
      break;
    }
  }
  const small = (step: Addition) => !masters.has(step) && !isHonest(left_g.get(step)!, minimum_g);
  return {
    doses: steps.map((step): Dose => {
      const master = masters.get(step);
      if (master !== undefined) return masterDose(master, batch_g);
      return ownDose(step.ingredient, left_g.get(step)!, small(step), input);
    }),
    masterBatches: [...masters.values()],
    warnings: steps
      .filter((step) => small(step) && roomBeside(left_g.get(step)!, input) === undefined)
      .map((step) => tooLittle(step, left_g.get(step)!, input)),
  };
}

function ownDose(ingredient: Ingredient, mass_g: number, small: boolean, input: PlanInput): Dose {
  const drawnIn_g = small ? (roomBeside(mass_g, input) ?? 0) : 0;
  const remark = `; below the minimum weight of this balance, and ${whyNoMaster(ingredient, mass_g, input)}: weigh it by itself, within limits drawn in by ${rounded(drawnIn_g, 2)} g for the doubt of the balance`;
  return {
    ingredient,
    massFraction: mass_g / input.batch_g,
    label: labelOf(ingredient),
    contents: [{ ingredient, massFraction: 1, u: 0 }],
    exact_g: mass_g,
    lot: ingredient.lot?.id ?? "",
    drawnIn_g,
    remark: drawnIn_g === 0 ? "" : remark,
  };
}

function masterDose(master: MasterBatch, batch_g: number): Dose {
  const { massFraction, solute, carrier, dose_g, label } = master;
  const u = massFraction * master.relativeU;
  return {
    ingredient: solute,
    massFraction: dose_g / batch_g,
    dissolved: true,
    label: `master batch of ${label}`,
    contents: [
      { ingredient: solute, massFraction, u },
      { ingredient: carrier, massFraction: 1 - massFraction, u },
    ],
    exact_g: dose_g,
    lot: "",
    drawnIn_g: 0,
    remark: "",
  };
}

/**
 * Twice the standard uncertainty of a mass, where the limits drawn in by that still hold a mass that the balance can show: the
 * share is then within its accuracy although the mass is below the minimum weight. Undefined where they do not.
 */
function roomBeside(mass_g: number, { tolerance, balance }: PlanInput): number | undefined {
  const doubt_g = 2 * weighingUncertainty({ balance });
  const room_g = tolerance * mass_g - doubt_g;
  return Math.abs(readable(mass_g, balance) - mass_g) <= room_g ? doubt_g : undefined;
}

function whyNoMaster(ingredient: Ingredient, mass_g: number, { minimumWeight_g }: PlanInput): string {
  const dose_g = leastDose(ingredient, mass_g);
  if (dose_g <= Math.max(minimumWeight_g, 2 * mass_g)) return "no diluent is left for a master batch";
  if (dose_g === Infinity) return "no master batch of it is sure to dissolve";
  return `a master batch in which it is sure to dissolve would be ${rounded(dose_g, 2)} g, more than the diluents allow`;
}

function labelOf({ id, lot }: Ingredient): string {
  return lot === undefined ? id : `${id} (lot ${lot.id})`;
}

function tooLittle({ ingredient, massFraction }: Addition, mass_g: number, input: PlanInput): Warning {
  const { minimumWeight_g, tolerance, balance } = input;
  // From here on its limits leave room for the doubt of the balance, wherever it is rounded to.
  const least_g = (2 * weighingUncertainty({ balance }) + balance.readability_g / 2) / tolerance;
  const batch_g = readable(Math.min(minimumWeight_g, least_g) / massFraction, balance, "up");
  return {
    code: "below-minimum-weight",
    message: `${labelOf(ingredient)}: ${rounded(mass_g)} g is below the ${rounded(minimumWeight_g)} g that this balance weighs honestly, and ${whyNoMaster(ingredient, mass_g, input)}; make at least ${rounded(batch_g)} g or use a balance whose minimum weight is ${rounded(mass_g)} g`,
  };
}

/** A number with so many significant digits. */
export function rounded(value: number, digits = 4): string {
  return String(Number(value.toPrecision(digits)));
}
