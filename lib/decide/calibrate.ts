// What was measured corrects what was guessed: readings on the shelf become interactions and neat viscosities.

import { fitGrunbergNissan } from "../models/viscosity.js";
import type { Case } from "../assess/case.js";
import type { Interaction } from "../recipe/interaction.js";
import type { Ingredient } from "../recipe/ingredient.js";
import type { BlendReadings } from "../recipe/readings.js";
import { withInteraction } from "../recipe/shelf.js";
import type { AtTemperature } from "../recipe/sourced.js";

/**
 * The interaction of two liquids from readings of their blends, by least squares in ln viscosity on a mass basis, neat
 * viscosities held at their readings.
 * @throws InputError as {@link fitGrunbergNissan}.
 * @source Model: {@link fitGrunbergNissan}.
 */
export function interactionFrom({ id, pair, temperature_C, ...readings }: BlendReadings): Interaction {
  const { massFractions, viscosities_mPas, source, status } = readings;
  const fit = fitGrunbergNissan({
    fractions: massFractions,
    viscosities_mPas,
    pureViscosities_mPas: [neat(readings, 1), neat(readings, 0)],
    basis: "mass",
  });
  return {
    pair,
    basis: fit.basis,
    temperature_C,
    G: { value: fit.G, u: fit.u, source: `fit to ${fit.points} blends of ${id}: ${source}`, status },
  };
}

/**
 * The case with every measured pair of liquids corrected: interactions fitted to the readings on the shelf, and neat
 * viscosities as read, in place of the typical ones. A lot's own figure stands.
 * @throws InputError as {@link interactionFrom}.
 */
export function calibrate<C extends Case>(work: C): C {
  let { shelf } = work;
  const measured = new Map<string, AtTemperature>();
  for (const readings of shelf.readings) {
    shelf = withInteraction(shelf, interactionFrom(readings));
    readings.pair.forEach((id, index) => measured.set(id, neatFigure(readings, index === 0 ? 1 : 0)));
  }
  const correct = (ingredient: Ingredient): Ingredient => {
    const viscosity_mPas = measured.get(ingredient.id);
    const lotHasIt = ingredient.lot?.measured.includes("viscosity_mPas") ?? false;
    return viscosity_mPas === undefined || lotHasIt ? ingredient : { ...ingredient, viscosity_mPas };
  };
  const components = work.formulation.components.map((one) => ({
    ...one,
    ingredient: correct(one.ingredient),
  }));
  const ingredients = new Map([...shelf.ingredients].map(([id, ingredient]) => [id, correct(ingredient)]));
  return { ...work, shelf: { ...shelf, ingredients }, formulation: { ...work.formulation, components } };
}

type Readings = Pick<BlendReadings, "massFractions" | "viscosities_mPas">;

/** The geometric mean of the readings at one end: viscosities scatter as a factor. */
function neat({ massFractions, viscosities_mPas }: Readings, end: 0 | 1): number {
  const logs = viscosities_mPas.filter((_, i) => massFractions[i] === end).map(Math.log);
  return Math.exp(logs.reduce((sum, one) => sum + one, 0) / logs.length);
}

function neatFigure(readings: BlendReadings, end: 0 | 1): AtTemperature {
  const value = neat(readings, end);
  const { relativeU, source, status, temperature_C, id } = readings;
  return { value, u: relativeU * value, source: `${id}: ${source}`, status, temperature_C };
}
