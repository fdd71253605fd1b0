// The weigh-out sheet: what to put on the balance, in which order, within which limits, and what the balance cannot do.

import { checkNumber, InputError, positive } from "../../door.js";
import type { Formulation } from "../../recipe/formulation.js";
import type { Warning } from "../../result.js";
import { minimumWeight, readable, weighingUncertainty, type Balance } from "./balance.js";
import { percentText, solubilityOf, surelyDissolves } from "./dissolving.js";
import { planDoses, rounded, type Content } from "./doses.js";
import type { MasterBatch } from "./masterBatch.js";
import { inOrder, orderOfAddition, type Addition } from "./order.js";

/** What a kilogram of each ingredient costs, by its id. */
export interface Prices {
  readonly currency: string;
  readonly prices_perkg: Readonly<Record<string, number>>;
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
  /**
   * How far both limits are drawn in, twice the standard uncertainty of the mass, where it is below the minimum weight and goes in
   * by itself all the same; 0 elsewhere.
   */
  readonly drawnIn_g: number;
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
 * master batch in the diluent there is most of, no stronger than its solubility on the shelf less one standard uncertainty. Where
 * no diluent suffices for that, it goes in by itself if its limits leave room for twice the standard uncertainty of the mass and
 * are drawn in by it; otherwise a warning says how large a batch or how fine a balance it takes. A portion beyond the balance's
 * capacity is weighed in several loads. A solid near its solubility in the whole is warned of.
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
 * sheet.portions[3].drawnIn_g; // → 0.00179629
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
  const plan = planDoses({ steps, batch_g, minimumWeight_g, tolerance, balance });
  let runningTotal_g = 0;
  const portions = inOrder(plan.doses).map((dose, index): Portion => {
    const { label, contents, reason, remark, amberLight, exact_g, drawnIn_g, lot } = dose;
    const target_g = readable(exact_g, balance);
    const room_g = tolerance * exact_g - drawnIn_g;
    runningTotal_g = readable(runningTotal_g + target_g, balance);
    const loads = Math.ceil(target_g / balance.capacity_g) || 1;
    return {
      ...{ line: index + 1, label, contents, reason: reason + remark, amberLight, exact_g },
      target_g,
      low_g: Math.min(target_g, readable(exact_g - room_g, balance, "up")),
      high_g: Math.max(target_g, readable(exact_g + room_g, balance, "down")),
      drawnIn_g,
      runningTotal_g,
      loads,
      u_g: weighingUncertainty({ balance, loads }),
      cost: costOf(target_g, contents, prices),
      lot,
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
    masterBatches: plan.masterBatches,
    cost: totalCost(portions, prices),
    warnings: [
      ...plan.warnings,
      ...nearSolubility(steps),
      ...portions.flatMap((one) => tooCoarse(one, tolerance)),
    ],
  };
}

/** What may not stay dissolved in the whole, lots of one ingredient together. */
function nearSolubility(steps: readonly Addition[]): Warning[] {
  return [...new Set(steps.map(({ ingredient }) => ingredient.id))].flatMap((id): Warning[] => {
    const same = steps.filter(({ ingredient }) => ingredient.id === id);
    const share = same.reduce((sum, { massFraction }) => sum + massFraction, 0);
    const { ingredient } = same[0]!;
    if (surelyDissolves(ingredient, share)) return [];
    const { stated, text } = solubilityOf(ingredient)!;
    const judged = share > stated ? "does not dissolve by that figure" : "may not dissolve";
    const message = `${id}: ${percentText(share)} of the whole, and the shelf says that ${text} dissolves: it ${judged}, or falls out in the cold; try a little, keep it cold for a week and look for crystals, or take less`;
    return [{ code: "near-solubility", message }];
  });
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
