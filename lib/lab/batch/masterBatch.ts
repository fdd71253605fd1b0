// A master batch: an ingredient too little to weigh is weighed in plenty, thinned with the diluent, and dosed as that blend.

import type { Ingredient } from "../../recipe/ingredient.js";
import { isHonest, readable, weighingUncertainty, type Balance } from "./balance.js";
import { massFractionUncertainties } from "./uncertainty.js";

/** One thinning: so much of the ingredient, or of the stage before, and so much diluent. */
export interface MasterStage {
  readonly of: string;
  readonly mass_g: number;
  readonly carrier_g: number;
}

/** How to make and dose a master batch. Whether the ingredient dissolves at such a share is not known here: try a little first. */
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
 * reach further, and is no less than `minimum_g`. No stage thins more than twentyfold: more stages make less to keep.
 */
export function planMasterBatch(given: MasterBatchInput): MasterBatch | undefined {
  const { mass_g, available_g, minimum_g } = given;
  return [10 * mass_g, 2 * mass_g]
    .map((wanted_g) => Math.max(minimum_g, wanted_g))
    .map((wanted_g) => planned(given, wanted_g))
    .find(({ dose_g }) => isHonest(available_g - (dose_g - mass_g), minimum_g));
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
  const count = Math.max(1, Math.ceil(Math.log(wanted_g / mass_g) / Math.log(20)));
  const share = (mass_g / wanted_g) ** (1 / count);
  const label = `${solute.id} in ${carrier.id}`;
  const stages = stageMasses({ count, share, dose_g: wanted_g, minimum_g, balance }).map(
    (stageMass_g, k): MasterStage => ({
      of: k === 0 ? solute.id : `stage ${k} of ${label}`,
      mass_g: stageMass_g,
      carrier_g: readable(stageMass_g * (1 / share - 1), balance, "up"),
    }),
  );
  const massFraction = stages.reduce((product, stage) => product * (stage.mass_g / totalOf(stage)), 1);
  const dose_g = mass_g / massFraction;
  const relativeU = Math.hypot(...stages.map((stage) => relativeUOf(stage, balance)));
  const enoughFor = Math.floor(totalOf(stages.at(-1)!) / dose_g + 1e-9);
  return { label, solute, carrier, stages, massFraction, relativeU, dose_g, enoughFor };
}

/** What to weigh of the ingredient or of the stage before, first stage first: enough for the balance and for the next stage. */
function stageMasses(input: {
  count: number;
  share: number;
  dose_g: number;
  minimum_g: number;
  balance: Balance;
}): number[] {
  const { count, share, dose_g, minimum_g, balance } = input;
  const masses: number[] = [];
  for (let needed_g = dose_g; masses.length < count; needed_g = masses[0]!) {
    // Both the ingredient and the diluent of a stage must be honest weighings.
    const smallest_g = Math.max(minimum_g, (minimum_g * share) / (1 - share), needed_g * share);
    masses.unshift(readable(smallest_g, balance, "up"));
  }
  return masses;
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
