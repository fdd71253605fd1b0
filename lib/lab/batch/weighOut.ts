// The weigh-out sheet: what to put on the balance, in which order, within which limits, and what the balance cannot do.

import { checkNumber, InputError, positive } from "../../door.js";
import type { Formulation } from "../../recipe/formulation.js";
import type { Ingredient } from "../../recipe/ingredient.js";
import type { Warning } from "../../result.js";
import { isHonest, minimumWeight, readable, weighingUncertainty, type Balance } from "./balance.js";
import { planMasterBatch, type MasterBatch } from "./masterBatch.js";
import { orderOfAddition, type Addition } from "./order.js";

/** What a kilogram of each ingredient costs, by its id. */
export interface Prices {
  readonly currency: string;
  readonly prices_perkg: Readonly<Record<string, number>>;
}

/** An ingredient's share of a portion; a master batch has its doubt from how it was weighed. */
export interface Content {
  readonly ingredient: Ingredient;
  readonly massFraction: number;
  /** Standard uncertainty of the share. */
  readonly u: number;
}

/** One line of the sheet. */
export interface Portion {
  readonly line: number;
  readonly label: string;
  readonly contents: readonly Content[];
  readonly reason: string;
  /** Under amber light from this line on. */
  readonly amberLight: boolean;
  /** The mass by calculation. */
  readonly exact_g: number;
  /** The mass as the balance can show it, and the first and last mass that will do. */
  readonly target_g: number;
  readonly low_g: number;
  readonly high_g: number;
  /** In the vessel after this line, by the targets. */
  readonly runningTotal_g: number;
  /** How many times the balance is loaded. */
  readonly loads: number;
  /** Standard uncertainty of the mass. */
  readonly u_g: number;
  /** In the currency of the prices; null where an ingredient has none or none were given. */
  readonly cost: number | null;
  /** To be filled in; stands already where the formulation names a lot. */
  readonly lot: string;
  /** To be filled in. */
  readonly actual_g: number | null;
}

/** A batch to be weighed out. */
export interface WeighOutSheet {
  readonly formulation: Formulation;
  readonly balance: Balance;
  readonly batch_g: number;
  /** How far a mass fraction may be off, as a fraction of it. */
  readonly accuracy: number;
  /** How far each mass may be off for that, as a fraction of it. */
  readonly tolerance: number;
  readonly minimumWeight_g: number;
  readonly portions: readonly Portion[];
  /** To be made before, one for each ingredient too little to weigh. */
  readonly masterBatches: readonly MasterBatch[];
  /** What the batch costs, without what is left of the master batches; null without prices. */
  readonly cost: {
    readonly total: number;
    readonly currency: string;
    readonly unpriced: readonly string[];
  } | null;
  readonly warnings: readonly Warning[];
}

/**
 * The weigh-out sheet of a batch of any size.
 *
 * Each mass may be off by a / (2 + a) of itself, a being `accuracy`: however the errors fall together, no mass fraction is then
 * off by more than a of itself, as (1 + t) / (1 - t) = 1 + a. An ingredient below the minimum weight of the balance goes in as a
 * master batch in the diluent there is most of; where no diluent suffices, a warning says how large a batch or how fine a
 * balance it takes. A portion beyond the balance's capacity is weighed in several loads.
 * @param input - `formulation`; `batch_g`, above 0; `balance`; `accuracy`, above 0 to 0.5, 0.01 unless given; `weighingAccuracy` as
 * for {@link minimumWeight}; `prices`.
 * @throws InputError when a number is out of range or the formulation is empty.
 * @source Minimum weight: {@link minimumWeight}. Tolerance: derived above.
 * @example
 * ```ts
 * import { weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.001, repeatability_g: 0.0008, capacity_g: 600 };
 * const sheet = weighOut({ formulation, batch_g: 500, balance });
 * sheet.minimumWeight_g; // → 1.6
 * sheet.portions.map(({ label, target_g }) => `${target_g} g ${label}`)[1]; // → "2.5 g master batch of MEHQ in IBOA"
 * sheet.portions[5].target_g; // → 275
 * ```
 */
export function weighOut({
  formulation,
  batch_g,
  balance,
  accuracy = 0.01,
  weighingAccuracy,
  prices,
}: {
  formulation: Formulation;
  batch_g: number;
  balance: Balance;
  accuracy?: number;
  weighingAccuracy?: number;
  prices?: Prices;
}): WeighOutSheet {
  const where = `weigh-out of "${formulation.id}"`;
  checkNumber(batch_g, { where, field: "batch_g", ...positive });
  checkNumber(accuracy, { where, field: "accuracy", min: 0, above: true, max: 0.5 });
  const minimumWeight_g = minimumWeight({ balance, weighingAccuracy });
  const steps = orderOfAddition(formulation);
  if (steps.length === 0)
    throw new InputError(`${where}: nothing is in it; give at least one ingredient a share`);
  checkPrices(where, prices);
  const tolerance = accuracy / (2 + accuracy);
  const { doses, masterBatches, warnings } = planDoses({ steps, batch_g, minimumWeight_g, balance });
  let runningTotal_g = 0;
  const portions = doses.map((dose, index): Portion => {
    const target_g = readable(dose.exact_g, balance);
    runningTotal_g = readable(runningTotal_g + target_g, balance);
    const loads = Math.ceil(target_g / balance.capacity_g) || 1;
    return {
      ...dose,
      line: index + 1,
      target_g,
      low_g: Math.min(target_g, readable(dose.exact_g * (1 - tolerance), balance, "up")),
      high_g: Math.max(target_g, readable(dose.exact_g * (1 + tolerance), balance, "down")),
      runningTotal_g,
      loads,
      u_g: weighingUncertainty({ balance, loads }),
      cost: costOf(target_g, dose.contents, prices),
      actual_g: null,
    };
  });
  return {
    formulation,
    balance,
    batch_g,
    accuracy,
    tolerance,
    minimumWeight_g,
    portions,
    masterBatches,
    cost: totalCost(portions, prices),
    warnings: [...warnings, ...portions.flatMap((one) => tooCoarse(one, tolerance))],
  };
}

type Dose = Pick<Portion, "label" | "contents" | "reason" | "amberLight" | "exact_g" | "lot">;

/** What goes in by itself and what as a master batch, whose diluent is taken off the diluent's own portion. */
function planDoses(input: {
  steps: readonly Addition[];
  batch_g: number;
  minimumWeight_g: number;
  balance: Balance;
}): { doses: Dose[]; masterBatches: MasterBatch[]; warnings: Warning[] } {
  const { steps, batch_g, minimumWeight_g: minimum_g, balance } = input;
  const left_g = new Map(steps.map((step) => [step, step.massFraction * batch_g]));
  const masters = new Map<Addition, MasterBatch>();
  const warnings: Warning[] = [];
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
    if (!masters.has(step)) warnings.push(tooLittle(step, mass_g, input));
  }
  const doses = steps.map((step): Dose => {
    const { ingredient, reason, amberLight } = step;
    const master = masters.get(step);
    const lot = master === undefined ? (ingredient.lot?.id ?? "") : "";
    return { ...doseOf(ingredient, left_g.get(step)!, master), reason, amberLight, lot };
  });
  return { doses, masterBatches: [...masters.values()], warnings };
}

function doseOf(
  ingredient: Ingredient,
  mass_g: number,
  master: MasterBatch | undefined,
): Pick<Dose, "label" | "contents" | "exact_g"> {
  if (master === undefined)
    return { label: labelOf(ingredient), contents: [{ ingredient, massFraction: 1, u: 0 }], exact_g: mass_g };
  const { massFraction, carrier, dose_g, label } = master;
  const u = massFraction * master.relativeU;
  return {
    label: `master batch of ${label}`,
    contents: [
      { ingredient, massFraction, u },
      { ingredient: carrier, massFraction: 1 - massFraction, u },
    ],
    exact_g: dose_g,
  };
}

function labelOf({ id, lot }: Ingredient): string {
  return lot === undefined ? id : `${id} (lot ${lot.id})`;
}

function tooLittle(
  { ingredient, massFraction }: Addition,
  mass_g: number,
  { minimumWeight_g, balance }: { minimumWeight_g: number; balance: Balance },
): Warning {
  const batch_g = readable(minimumWeight_g / massFraction, balance, "up");
  return {
    code: "below-minimum-weight",
    message: `${labelOf(ingredient)}: ${rounded(mass_g)} g is below the ${rounded(minimumWeight_g)} g that this balance weighs honestly, and no diluent is left for a master batch; make at least ${rounded(batch_g)} g or use a balance whose minimum weight is ${rounded(mass_g)} g`,
  };
}

function tooCoarse({ label, exact_g, low_g, high_g, target_g }: Portion, tolerance: number): Warning[] {
  const outside = [low_g, high_g].some((mass_g) => Math.abs(mass_g / exact_g - 1) > tolerance * (1 + 1e-9));
  if (!outside) return [];
  const message = `${label}: no mass that the balance can show lies within ${rounded(100 * tolerance)} % of ${rounded(exact_g)} g; ${target_g} g is the nearest`;
  return [{ code: "balance-too-coarse", message }];
}

function checkPrices(where: string, prices: Prices | undefined): void {
  for (const [id, price] of Object.entries(prices?.prices_perkg ?? {}))
    checkNumber(price, { where, field: `prices_perkg.${id}`, min: 0 });
}

function costOf(target_g: number, contents: readonly Content[], prices: Prices | undefined): number | null {
  const costs = contents.map(({ ingredient, massFraction }) => {
    const price = prices?.prices_perkg[ingredient.id];
    return price === undefined ? NaN : (price * massFraction * target_g) / 1000;
  });
  const total = costs.reduce((sum, cost) => sum + cost, 0);
  return Number.isNaN(total) ? null : total;
}

function totalCost(portions: readonly Portion[], prices: Prices | undefined): WeighOutSheet["cost"] {
  if (prices === undefined) return null;
  const ids = portions.flatMap(({ contents }) => contents.map(({ ingredient }) => ingredient.id));
  return {
    total: portions.reduce((sum, { cost }) => sum + (cost ?? 0), 0),
    currency: prices.currency,
    unpriced: [...new Set(ids)].filter((id) => prices.prices_perkg[id] === undefined),
  };
}

function rounded(value: number): string {
  return String(Number(value.toPrecision(4)));
}
