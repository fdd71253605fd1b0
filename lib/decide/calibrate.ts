// What was measured corrects what was guessed: readings on the shelf become interactions, neat viscosities and working curves.

import { fitBlend, fitGrunbergNissan, grunbergNissan, type BlendFit } from "../models/viscosity.js";
import type { Case } from "../assess/case.js";
import { figureContradictions, viscosityContradictions } from "../assess/contradiction.js";
import { workingCurveOf } from "../assess/cure.js";
import { measuredFor } from "../assess/measuredCurve.js";
import { InputError } from "../door.js";
import type { MeasuredWorkingCurve } from "../recipe/cureDepths.js";
import type { Interaction } from "../recipe/interaction.js";
import type { Ingredient } from "../recipe/ingredient.js";
import type { BlendReadings } from "../recipe/readings.js";
import { withInteraction } from "../recipe/shelf.js";
import type { AtTemperature } from "../recipe/sourced.js";
import type { Warning } from "../result.js";
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
    const warnings = readings.pair.flatMap((id, index) => {
      const neat = neatFigure(readings, index === 0 ? 1 : 0);
      measured.set(id, neat);
      return neatContradictions(work, readings, { id, neat });
    });
    shelf = withInteraction(shelf, { ...interactionFrom(readings), warnings });
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
  const formulation = { ...work.formulation, components };
  const workingCurves = shelf.cureDepths.map(workingCurveFrom);
  const corrected = { ...work, formulation, shelf: { ...shelf, ingredients, workingCurves } };
  return correctOxygen({
    ...corrected,
    shelf: { ...corrected.shelf, workingCurves: comparedWithEstimate(corrected) },
  });
}

/** A neat liquid of blend readings against the same liquid in the bottle, of its lot where one was measured. */
function neatContradictions(
  { formulation: { components } }: Case,
  { id: file }: BlendReadings,
  { id, neat }: { id: string; neat: AtTemperature },
): Warning[] {
  const inUse = components.map(({ ingredient }) => ingredient).filter((ingredient) => ingredient.id === id);
  const expected = inUse.find(({ lot }) => lot?.measured.includes("viscosity_mPas")) ?? inUse[0];
  if (expected === undefined) return [];
  return viscosityContradictions({
    reading: `neat ${id} in ${file}`,
    read: neat,
    expected,
    check: "the unit of viscosities_mPas, and that massFractions are of the first of the pair,",
  });
}

/** Draws enough to tell orders of magnitude. */
const FEW_DRAWS = 100;

/** The working curves, the one that stands behind the case with a warning where it is far from what its ingredients let expect. */
function comparedWithEstimate(work: Case): readonly MeasuredWorkingCurve[] {
  const { workingCurves } = work.shelf;
  const used = measuredFor(work);
  if (used === undefined) return workingCurves;
  const { curve, formulation } = used;
  const light = { ...work.brief.light, irradiance_mWcm2: curve.series.light.irradiance_mWcm2 };
  const unmeasured = {
    formulation,
    brief: { ...work.brief, light },
    shelf: { ...work.shelf, workingCurves: [] },
  };
  const expected = estimateOf(unmeasured);
  if (expected === undefined) return workingCurves;
  const { id } = curve.series;
  const warnings = [
    ...figureContradictions({
      reading: `penetration depth measured by ${id}`,
      value: curve.penetrationDepth_um.value,
      unit: "µm",
      expected: expected.penetrationDepth_um,
      check: "the unit of cureDepth_um",
    }),
    ...figureContradictions({
      reading: `critical exposure measured by ${id}`,
      value: curve.criticalExposure_mJcm2.value,
      unit: "mJ/cm²",
      expected: expected.criticalExposure_mJcm2,
      check: "the unit of exposure_mJcm2 and the irradiance",
    }),
  ];
  return workingCurves.map((one) =>
    one === curve ? { ...one, warnings: [...one.warnings, ...warnings] } : one,
  );
}

/** The working curve as the ingredients let expect it; undefined where they lack a figure for it. */
function estimateOf(work: Case) {
  try {
    return workingCurveOf({ ...work, draws: FEW_DRAWS });
  } catch (error) {
    if (error instanceof InputError) return undefined;
    throw error;
  }
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
