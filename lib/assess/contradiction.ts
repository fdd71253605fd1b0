// Readings that lie so far from what the shelf lets expect that a slip is likelier than a discovery: a wrong unit, two liquids
// changed over.

import { andradeFromReference, andradeViscosity } from "../models/viscosity.js";
import { kelvin } from "../models/scales.js";
import type { Ingredient } from "../recipe/ingredient.js";
import type { AtTemperature } from "../recipe/sourced.js";
import type { Interval, Warning } from "../result.js";
import { logarithmicSpread } from "./doubt.js";
import { shortText } from "./shortText.js";

/** Lots of an oligomer differ by a factor of two and more (common practice); this is beyond it. */
const FACTOR = 3;
/** One reading in 370 lies beyond three standard deviations by chance. */
const DEVIATIONS = 3;

/**
 * A viscosity of a neat liquid against that of the ingredient on the shelf, brought to the temperature of the reading by its
 * activation; none where they agree or the shelf knows too little.
 */
export function viscosityContradictions({
  reading,
  read,
  expected,
  check,
}: {
  /** What was read, as the message begins: `neat HDDA in hdda-25C`. */
  readonly reading: string;
  readonly read: AtTemperature;
  readonly expected: Pick<Ingredient, "id" | "viscosity_mPas" | "viscosityActivation_K" | "lot">;
  /** What to look at, as a clause after "Check ". */
  readonly check: string;
}): Warning[] {
  const { viscosity_mPas: stated, viscosityActivation_K: activation, lot } = expected;
  if (stated === undefined || activation === undefined) return [];
  const perKelvin = (temperature_C: number) => 1 / kelvin(temperature_C);
  const way = perKelvin(read.temperature_C) - perKelvin(stated.temperature_C);
  const expected_mPas = andradeViscosity({
    ...andradeFromReference({
      viscosity_mPas: stated.value,
      referenceTemperature_C: stated.temperature_C,
      activation_K: activation.value,
    }),
    temperature_C: read.temperature_C,
  });
  const spread = Math.hypot(logarithmicSpread(read), logarithmicSpread(stated), Math.abs(way) * activation.u);
  const distance = Math.abs(Math.log(read.value / expected_mPas));
  if (distance <= Math.max(Math.log(FACTOR), DEVIATIONS * spread)) return [];
  const from = lot?.measured.includes("viscosity_mPas") ? `lot ${lot.id}` : `the shelf's ${expected.id}`;
  return [
    {
      code: "reading-contradicts",
      message: `${shortText(read.value)} mPa s of ${reading} at ${shortText(read.temperature_C)} °C stands against ${shortText(expected_mPas)} mPa s of ${from}. Check ${check} before you trust what follows from it.`,
    },
  ];
}

/** A figure that was measured against the interval that the ingredients let expect. */
export function figureContradictions({
  reading,
  value,
  unit,
  expected: { value: center, low, high },
  check,
}: {
  readonly reading: string;
  readonly value: number;
  readonly unit: string;
  readonly expected: Interval;
  readonly check: string;
}): Warning[] {
  if (value >= low / FACTOR && value <= high * FACTOR) return [];
  const [at, from, to] = [center, low, high].map(shortText);
  return [
    {
      code: "reading-contradicts",
      message: `${shortText(value)} ${unit} of ${reading} stands against ${at} (${from} to ${to}) ${unit}, which its ingredients let expect. Check ${check} before you trust what follows from it.`,
    },
  ];
}
