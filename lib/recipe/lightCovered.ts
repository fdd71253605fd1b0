// Whether the absorptions of a formulation are known wherever the engine of a brief sends light.

import { InputError } from "../door.js";
import type { Brief } from "./brief.js";
import { placeOf, type JsonDocument } from "./document.js";
import type { Formulation } from "./formulation.js";
import type { Shelf } from "./shelf.js";

/**
 * Refuses an engine that reaches beyond the absorption of an initiator or absorber: nothing is guessed there.
 * @throws InputError with file, line and field, naming the engine, the ingredient, its spectrum and both ranges.
 */
export function checkLightCovered(
  document: JsonDocument,
  { brief, formulation, shelf }: { brief: Brief; formulation: Formulation; shelf: Shelf },
): void {
  const { spectrum, wavelength_nm } = brief.light;
  const nodes = spectrum === undefined ? [wavelength_nm!.value] : shelf.spectra.get(spectrum)!.wavelengths_nm;
  const [first, last] = [nodes[0]!, nodes[nodes.length - 1]!];
  for (const { ingredient } of formulation.components) {
    const absorption = shelf.spectra.get(ingredient.spectrum ?? "");
    if (absorption === undefined || !["photoinitiator", "absorber"].includes(ingredient.role)) continue;
    const { id, wavelengths_nm: known } = absorption;
    const [from, to] = [known[0]!, known[known.length - 1]!];
    if (from <= first && last <= to) continue;
    const [field, light] =
      spectrum === undefined
        ? ["wavelength_nm", `${first} nm`]
        : ["spectrum", `"${spectrum}", which runs from ${first} to ${last} nm`];
    throw new InputError(
      `${placeOf(document, ["light", field])} is ${light}; the absorption "${id}" of ${ingredient.id} is known from ${from} to ${to} nm only, and nothing is guessed beyond; cut the engine to where it sends light, or measure the absorption there`,
    );
  }
}
