// What was measured corrects what was guessed: readings on the shelf become interactions, neat viscosities and working curves.

import { fitBlend, fitGrunbergNissan, grunbergNissan, type BlendFit } from "../models/viscosity.js";
import type { Case } from "../assess/case.js";
import type { Interaction } from "../recipe/interaction.js";
import type { Ingredient } from "../recipe/ingredient.js";
import type { BlendReadings } from "../recipe/readings.js";
import { withInteraction } from "../recipe/shelf.js";
import type { AtTemperature } from "../recipe/sourced.js";
import { correctOxygen } from "./calibrateOxygen.js";
import { workingCurveFrom } from "./workingCurveFrom.js";

/**
 * The interaction of two liquids from readings of their blends, by least squares in ln viscosity on a mass basis, neat
 * viscosities held at their readings. Its uncertainty is that of the scatter, or that of the stated uncertainty of a reading
 * where this is larger: few readings can lie close to a line by chance.
 * @throws InputError as {@link fitGrunbergNissan}.
 * @source Model: {@link fitGrunbergNissan}.
 * @example
 * ```ts
 * import { interactionFrom } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const readings = readShelf(["data"]).readings.find(({ id }) => id === "udma-iboa-25C")!;
 * const { G, basis } = interactionFrom(readings);
 * G.value; // → -0.90
 * basis; // → "mass"
 * ```
 */
export function interactionFrom({ id, pair, temperature_C, ...readings }: BlendReadings): Interaction {
  const { massFractions, viscosities_mPas, source, status } = readings;
  const fit = fitGrunbergNissan({
    fractions: massFractions,
    viscosities_mPas,
    pureViscosities_mPas: [neatViscosity(readings, 1), neatViscosity(readings, 0)],
    basis: "mass",
  });
  const u = Math.max(fit.u, readings.relativeU / Math.hypot(...massFractions.map((w) => w * (1 - w))));
  return {
    pair,
    basis: fit.basis,
    temperature_C,
    G: { value: fit.G, u, source: `fit to ${fit.points} blends of ${id}: ${source}`, status },
  };
}

/**
 * What the readings of two liquids say about themselves: the fit with neat liquids as readings like the others, its scatter,
 * readings that stand out, and whether one interaction is enough.
 * @throws InputError as {@link fitBlend}.
 * @source Model: {@link fitBlend}.
 * @example
 * ```ts
 * import { fitReadings } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const readings = readShelf(["data"]).readings.find(({ id }) => id === "udma-iboa-25C")!;
 * fitReadings(readings).adequacy.verdict; // → "adequate"
 * ```
 */
export function fitReadings({
  massFractions,
  viscosities_mPas,
  temperature_C,
  relativeU,
}: BlendReadings): BlendFit {
  const readings = massFractions.map((share, i) => ({
    fractions: [share, 1 - share],
    temperature_C,
    viscosity_mPas: viscosities_mPas[i]!,
    ...(relativeU > 0 ? { relativeU } : {}),
  }));
  return fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
}

/**
 * The case with what the shelf's measurements say in place of what was guessed: interactions fitted to the readings of blends,
 * neat viscosities as read (a lot's own figure stands), and a working curve for each cure-depth series. A curve is used for its
 * own resin and engine, carried over to other amounts of the same ingredients with a warning, and left aside for any other.
 * Readings on the window correct what is said of oxygen ({@link correctOxygen}).
 * @throws InputError as {@link interactionFrom}, {@link workingCurveFrom} and {@link correctOxygen}.
 * @example
 * ```ts
 * import { calibrate, interactionOn } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const [udma, iboa] = work.formulation.components;
 * [udma.ingredient.viscosity_mPas?.value.toFixed(0), iboa.ingredient.viscosity_mPas?.value.toFixed(2)]; // → ["9640", "8.52"]
 * interactionOn(work.shelf, "UDMA", "IBOA")?.basis; // → "mass"
 * ```
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
  const workingCurves = shelf.cureDepths.map(workingCurveFrom);
  return correctOxygen({
    ...work,
    shelf: { ...shelf, ingredients, workingCurves },
    formulation: { ...work.formulation, components },
  });
}

type Readings = Pick<BlendReadings, "massFractions" | "viscosities_mPas">;

/**
 * The mixing rule through the neat viscosities as read, for mass fractions of the first liquid; with `interactionFrom`'s G it is
 * the rule that `calibrate` puts in place of the guess. @internal
 */
export function blendRule(readings: Readings, G: number): (massFraction: number) => number {
  const viscosities_mPas = [neatViscosity(readings, 1), neatViscosity(readings, 0)];
  return (massFraction) =>
    grunbergNissan({
      fractions: [massFraction, 1 - massFraction],
      viscosities_mPas,
      basis: "mass",
      interactions: [{ first: 0, second: 1, G, basis: "mass" }],
    });
}

/** The neat liquid at one end, mPa s: the geometric mean of its readings, since viscosities scatter as a factor. @internal */
export function neatViscosity({ massFractions, viscosities_mPas }: Readings, end: 0 | 1): number {
  const logs = viscosities_mPas.filter((_, i) => massFractions[i] === end).map(Math.log);
  return Math.exp(logs.reduce((sum, one) => sum + one, 0) / logs.length);
}

function neatFigure(readings: BlendReadings, end: 0 | 1): AtTemperature {
  const value = neatViscosity(readings, end);
  const { relativeU, source, status, temperature_C, id } = readings;
  return { value, u: relativeU * value, source: `${id}: ${source}`, status, temperature_C };
}
