// How hot a volume of the resin can get when it cures at once, from its double bonds, with the doubt of every figure in it.

import { InputError } from "../../door.js";
import { figureOf, uncertain } from "../../assess/case.js";
import {
  doubtShares,
  intervalOf,
  propagate,
  sourcesOf,
  startDraws,
  type DoubtShare,
  type DrawOptions,
  type Read,
  type Uncertain,
} from "../../assess/doubt.js";
import { adiabaticRise, polymerisationHeat } from "../../models/network.js";
import type { Formulation } from "../../recipe/formulation.js";
import type { Ingredient } from "../../recipe/ingredient.js";
import type { Interval, UsedSource, Warning } from "../../result.js";
import type { PolymerisationHeats } from "./rules.js";

/** A temperature rise in kelvin with its interval. */
export interface TemperatureRise extends Interval {
  readonly unit: "K";
  readonly warnings: readonly Warning[];
  readonly doubt: readonly DoubtShare[];
  readonly sources: readonly UsedSource[];
}

/**
 * The temperature rise of a resin that cures to the end without losing heat, K: the upper limit of a runaway.
 *
 * dT = sum_i (w_i f_i dH_i / M_i) / cp, at full conversion. Heats by kind of double bond from `heats`; an ingredient that stands in
 * no class there takes the other one, with a warning.
 * @param input - `formulation`; `heats`; draw options.
 * @throws InputError when an ingredient with double bonds has no molar mass.
 * @source Models: {@link polymerisationHeat}, {@link adiabaticRise}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { temperatureRiseOf } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const { heats } = readSafetyRules("data/rules");
 * temperatureRiseOf({ formulation, heats }).value; // → 168.5
 * ```
 */
export function temperatureRiseOf({
  formulation,
  heats,
  ...options
}: DrawOptions & { formulation: Formulation; heats: PolymerisationHeats }): TemperatureRise {
  const draws = startDraws(options);
  const { model, unlisted } = riseModel(formulation, heats);
  const { stated, outcomes: values, inputs } = propagate(model, draws);
  return {
    unit: "K",
    ...intervalOf({ stated, values, level: draws.level }),
    warnings: [upperLimit, ...(unlisted.length === 0 ? [] : [kindUnknown(unlisted)])],
    doubt: doubtShares(values, inputs, draws),
    sources: sourcesOf(inputs),
  };
}

function riseModel(
  formulation: Formulation,
  heats: PolymerisationHeats,
): { model: (read: Read) => number; unlisted: string[] } {
  const reactive = formulation.components.filter(
    ({ ingredient, massFraction }) => massFraction > 0 && (ingredient.functionality ?? 0) > 0,
  );
  const rest = 1 - reactive.reduce((sum, { massFraction }) => sum + massFraction, 0);
  const classes = heats.classes.map(({ title, heatOfPolymerisation_Jmol, ingredients }) => ({
    ingredients,
    heat: uncertain(`heat of polymerisation of ${title}`, heatOfPolymerisation_Jmol),
  }));
  const other = uncertain(
    "heat of polymerisation of other double bonds",
    heats.otherHeatOfPolymerisation_Jmol,
  );
  const heatCapacity = uncertain("heat capacity of the liquid", heats.heatCapacity_JgK);
  const classOf = ({ id }: Ingredient) => classes.find(({ ingredients }) => ingredients.includes(id));
  const figures = reactive.map(({ ingredient }) => ({
    molarMass: molarMassOf(formulation, ingredient),
    heat: classOf(ingredient)?.heat ?? other,
  }));
  const model = (read: Read): number => {
    const heat_Jg = polymerisationHeat({
      massFractions: [...reactive.map(({ massFraction }) => massFraction), Math.max(0, rest)],
      functionalities: [...reactive.map(({ ingredient }) => ingredient.functionality!), 0],
      molarMasses_gmol: [...figures.map(({ molarMass }) => read(molarMass)), 1],
      heatsOfPolymerisation_Jmol: [...figures.map(({ heat }) => read(heat)), 0],
    });
    return adiabaticRise({ heat_Jg, conversion: 1, heatCapacity_JgK: read(heatCapacity) });
  };
  const unlisted = reactive.flatMap(({ ingredient }) => (classOf(ingredient) ? [] : [ingredient.id]));
  return { model, unlisted };
}

function molarMassOf({ id: formulation }: Formulation, ingredient: Ingredient): Uncertain {
  const molarMass = figureOf(ingredient, "molarMass_gmol");
  if (molarMass !== undefined) return molarMass;
  throw new InputError(
    `formulation "${formulation}": ${ingredient.id} has double bonds but no molarMass_gmol; add it to the ingredient with its source and u`,
  );
}

const upperLimit: Warning = {
  code: "adiabatic-upper-limit",
  message:
    "Every double bond reacts and no heat leaves: the upper limit for a large volume that cures at once. Fumes or fire come before such a temperature is read. A printed layer stays near the vat's temperature.",
};

function kindUnknown(ids: readonly string[]): Warning {
  return {
    code: "heat-of-unlisted-double-bond",
    message: `${ids.join(", ")}: no heat of polymerisation is known here for this kind of double bond; the usual range of vinyl monomers is taken.`,
  };
}
