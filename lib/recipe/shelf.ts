// The shelf: every ingredient, lot, spectrum, film and interaction that a formulation or a brief may name.

import { InputError, unknownName } from "../door.js";
import type { ResinConstants } from "./constants.js";
import type { CureDepthSeries, MeasuredWorkingCurve } from "./cureDepths.js";
import type { Film } from "./film.js";
import type { Ingredient, Lot } from "./ingredient.js";
import type { Interaction } from "./interaction.js";
import { withLot } from "./lot.js";
import type { BlendReadings } from "./readings.js";
import type { Spectrum } from "./spectrum.js";
import type { WindowReadings } from "./windowReadings.js";

/** All that is known about what can go into a bottle and what the light passes through. */
export interface Shelf {
  readonly ingredients: ReadonlyMap<string, Ingredient>;
  readonly lots: ReadonlyMap<string, Lot>;
  readonly spectra: ReadonlyMap<string, Spectrum>;
  readonly films: ReadonlyMap<string, Film>;
  readonly interactions: readonly Interaction[];
  readonly readings: readonly BlendReadings[];
  readonly windowReadings: readonly WindowReadings[];
  readonly cureDepths: readonly CureDepthSeries[];
  /** What cure-depth series say once they are fitted; empty until then. */
  readonly workingCurves: readonly MeasuredWorkingCurve[];
  readonly constants: ResinConstants;
}

/**
 * The ingredient of that name, as measured on a lot of it where one is named.
 * @throws InputError with the nearest known name; when the lot belongs to another ingredient.
 * @example
 * ```ts
 * import { ingredientOn } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * ingredientOn(readShelf(["data"]), "my script", "IBOA").role; // → "diluent"
 * ```
 */
export function ingredientOn(shelf: Shelf, where: string, id: string, lotId?: string): Ingredient {
  const ingredient = lookUp(shelf.ingredients, where, "ingredient", id);
  if (lotId === undefined) return ingredient;
  const lot = lookUp(shelf.lots, where, "lot", lotId);
  if (lot.ingredient !== id) {
    throw new InputError(
      `${where}: lot "${lotId}" is a lot of ${lot.ingredient}, not of ${id}; name one of its own lots or none`,
    );
  }
  return withLot(ingredient, lot);
}

/**
 * The spectrum of that name.
 * @throws InputError with the nearest known name.
 * @example
 * ```ts
 * import { spectrumOn } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * spectrumOn(readShelf(["data"]), "my script", "led-412").quantity; // → "relativePower"
 * ```
 */
export function spectrumOn(shelf: Shelf, where: string, id: string): Spectrum {
  return lookUp(shelf.spectra, where, "spectrum", id);
}

/**
 * The film of that name.
 * @throws InputError with the nearest known name.
 * @example
 * ```ts
 * import { filmOn } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * filmOn(readShelf(["data"]), "my script", "PDMS").name; // → "poly(dimethylsiloxane)"
 * ```
 */
export function filmOn(shelf: Shelf, where: string, id: string): Film {
  return lookUp(shelf.films, where, "film", id);
}

/**
 * The measured interaction of two liquids, in whichever order they are named, or undefined.
 * @example
 * ```ts
 * import { interactionFrom, interactionOn, withInteraction } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const shelf = readShelf(["data"]);
 * const readings = shelf.readings.find(({ id }) => id === "udma-iboa-25C")!;
 * const measured = withInteraction(shelf, interactionFrom(readings));
 * interactionOn(measured, "IBOA", "UDMA")?.pair; // → ["UDMA", "IBOA"]
 * interactionOn(measured, "IBOA", "TEGDMA"); // → undefined
 * ```
 */
export function interactionOn(shelf: Shelf, first: string, second: string): Interaction | undefined {
  return interactionsOn(shelf, first, second)[0];
}

/**
 * All measured interactions of two liquids, one a temperature, in whichever order the liquids are named.
 * @example
 * ```ts
 * import { interactionsOn } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * interactionsOn(readShelf(["data"]), "UDMA", "IBOA").length; // → 0
 * ```
 */
export function interactionsOn(shelf: Shelf, first: string, second: string): Interaction[] {
  return shelf.interactions.filter(
    ({ pair: [a, b] }) => (a === first && b === second) || (a === second && b === first),
  );
}

/**
 * The shelf with one more interaction, in place of an older one of the same pair at the same temperature.
 * @example
 * ```ts
 * import { interactionOn, withInteraction } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const G = { value: -0.9, u: 0.05, source: "fit to seven blends", status: "measured here" as const };
 * const shelf = withInteraction(readShelf(["data"]), { pair: ["UDMA", "IBOA"], basis: "mass", G });
 * interactionOn(shelf, "UDMA", "IBOA")?.G.value; // → -0.9
 * ```
 */
export function withInteraction(shelf: Shelf, interaction: Interaction): Shelf {
  const older = interactionsOn(shelf, ...interaction.pair).find(
    ({ temperature_C }) => temperature_C === interaction.temperature_C,
  );
  return { ...shelf, interactions: [...shelf.interactions.filter((one) => one !== older), interaction] };
}

function lookUp<T>(known: ReadonlyMap<string, T>, where: string, kind: string, id: string): T {
  const found = known.get(id);
  if (found === undefined) throw new InputError(unknownName(where, kind, id, [...known.keys()]));
  return found;
}
