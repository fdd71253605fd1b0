// A master batch: an ingredient too little to weigh is weighed in plenty, thinned with the diluent, and dosed as that blend.

import type { Ingredient } from "../../recipe/ingredient.js";
import { solubilityOf } from "./dissolving.js";
import { isHonest, readable, weighingUncertainty, type Balance } from "./balance.js";
import { massFractionUncertainties } from "./uncertainty.js";

/** One thinning: so much of the ingredient, or of the stage before, and so much diluent. */
export interface MasterStage {
  readonly of: string;
  readonly mass_g: number;
  readonly carrier_g: number;
}

/** How to make and dose a master batch. Where the shelf has no solubility of a solid, try a little first. */
export interface MasterBatch {
  readonly label: string;
  readonly solute: Ingredient;
  readonly carrier: Ingredient;
  /** Made in this order; the last one is dosed. */
  readonly stages: readonly MasterStage[];
  /** Share of the ingredient in the last stage, 0 to 1, from the masses of the stages. */
  readonly massFraction: number;
  /** Standard uncertainty of that share as a fraction of it, from the weighings. */
  readonly relativeU: number;
  /** What goes into the batch, before rounding. */
  readonly dose_g: number;
  /** Batches of this size that the master batch is enough for. */
  readonly enoughFor: number;
}

/**
 * Plans a master batch of `mass_g` of `solute` in `carrier`, of which the batch takes `available_g`; undefined where the carrier is
 * not enough for two honest weighings, the dose and the rest.
 *
 * The dose holds one part in ten of the ingredient, which leaves room to dissolve it, or one in two where the diluent does not
 * reach further, and is no less than `minimum_g`. No stage holds more of a solid than its solubility on the shelf less one
 * standard uncertainty. No stage thins more than twentyfold, more stages make less to keep, unless the solubility asks for it.
 */
export function planMasterBatch(given: MasterBatchInput): MasterBatch | undefined {
  const { mass_g, available_g, minimum_g } = given;
  return [10 * mass_g, 2 * mass_g]
    .map((wanted_g) => Math.max(minimum_g, wanted_g, leastDose(given.solute, mass_g)))
    .filter((wanted_g) => wanted_g <= available_g + mass_g)
    .map((wanted_g) => planned(given, wanted_g))
    .find(({ dose_g }) => isHonest(available_g - (dose_g - mass_g), minimum_g));
}

/** The least dose in which that much of an ingredient is sure to dissolve. */
export function leastDose(solute: Ingredient, mass_g: number): number {
  return mass_g / mostOf(solute);
}

function mostOf(solute: Ingredient): number {
  return solubilityOf(solute)?.sure ?? 1;
}

interface MasterBatchInput {
  readonly solute: Ingredient;
  readonly carrier: Ingredient;
  readonly mass_g: number;
  readonly available_g: number;
  readonly minimum_g: number;
  readonly balance: Balance;
}

/** The dose comes out at `wanted_g` or a little more, as the diluent of each stage is rounded up to what the balance shows. */
function planned(
  { solute, carrier, mass_g, minimum_g, balance }: MasterBatchInput,
  wanted_g: number,
): MasterBatch {
  const shares = thinnings(mass_g / wanted_g, mostOf(solute));
  const label = `${solute.id} in ${carrier.id}`;
  const stages = stageMasses({ shares, dose_g: wanted_g, minimum_g, balance }).map(
    (stageMass_g, k): MasterStage => ({
      of: k === 0 ? solute.id : `stage ${k} of ${label}`,
      mass_g: stageMass_g,
      carrier_g: readable(stageMass_g * (1 / shares[k]! - 1), balance, "up"),
    }),
  );
  const massFraction = stages.reduce((product, stage) => product * (stage.mass_g / totalOf(stage)), 1);
  const dose_g = mass_g / massFraction;
  const relativeU = Math.hypot(...stages.map((stage) => relativeUOf(stage, balance)));
  const enoughFor = Math.floor(totalOf(stages.at(-1)!) / dose_g + 1e-9);
  return { label, solute, carrier, stages, massFraction, relativeU, dose_g, enoughFor };
}

/** The share that each stage holds of the stage before, first stage first, whose share is at most `most`; together `whole`. */
function thinnings(whole: number, most: number): number[] {
  const count = Math.max(1, Math.ceil(Math.log(1 / whole) / Math.log(20)));
  const even = whole ** (1 / count);
  if (even <= most) return Array<number>(count).fill(even);
  // A second stage that thins less than twofold is not worth its weighings.
  if (whole > most / 2) return [whole];
  return [most, ...thinnings(whole / most, 1)];
}

/** What to weigh of the ingredient or of the stage before, first stage first: enough for the balance and for the next stage. */
function stageMasses(input: {
  shares: readonly number[];
  dose_g: number;
  minimum_g: number;
  balance: Balance;
}): number[] {
  const { shares, dose_g, minimum_g, balance } = input;
  return shares.reduceRight<number[]>((masses, share) => {
    const needed_g = masses[0] ?? dose_g;
    // Both the ingredient and the diluent of a stage must be honest weighings.
    const smallest_g = Math.max(minimum_g, (minimum_g * share) / (1 - share), needed_g * share);
    return [readable(smallest_g, balance, "up"), ...masses];
  }, []);
}

function relativeUOf({ mass_g, carrier_g }: MasterStage, balance: Balance): number {
  const loads = (mass: number) => Math.ceil(mass / balance.capacity_g);
  const u = (mass: number) => weighingUncertainty({ balance, loads: loads(mass) });
  const [uShare] = massFractionUncertainties({
    masses_g: [mass_g, carrier_g],
    uncertainties_g: [u(mass_g), u(carrier_g)],
  });
  return (uShare! * (mass_g + carrier_g)) / mass_g;
}

function totalOf({ mass_g, carrier_g }: MasterStage): number {
  return mass_g + carrier_g;
}
