// Names that one file gives to what stands in another: looked up where the files meet, so that a slip of the pen loses nothing
// without a word.

import { InputError, unknownName } from "../door.js";
import type { Brief } from "./brief.js";
import type { CureDepthSeries } from "./cureDepths.js";
import { placeOf, type JsonDocument } from "./document.js";
import type { Ingredient, Lot } from "./ingredient.js";
import type { Interaction } from "./interaction.js";
import type { BlendReadings } from "./readings.js";
import type { Shelf } from "./shelf.js";
import type { Spectrum } from "./spectrum.js";
import type { WindowReadings } from "./windowReadings.js";

/** A name in a file: what it must be the name of, and where it stands. */
interface Name {
  readonly of: "ingredient" | "film" | "absorption" | "engine";
  readonly path: readonly PropertyKey[];
  readonly name: string | undefined;
}

/** What the names of a file are looked up on. */
type Known = Pick<Shelf, "ingredients" | "films" | "spectra">;

/** The names in the file of an ingredient. */
export const namesInIngredient = ({ spectrum }: Ingredient): Name[] => [
  { of: "absorption", path: ["spectrum"], name: spectrum },
];

/** The names in the file of a lot. */
export const namesInLot = ({ ingredient }: Lot): Name[] => [
  { of: "ingredient", path: ["ingredient"], name: ingredient },
];

/** The names in a file about two liquids. */
export const namesInPair = ({ pair }: Pick<Interaction | BlendReadings, "pair">): Name[] =>
  pair.map((name, i): Name => ({ of: "ingredient", path: ["pair", i], name }));

/** The names in a cure-depth series. */
export const namesInCureDepths = ({ parts, light }: CureDepthSeries): Name[] => [
  ...namesInParts(parts),
  { of: "engine", path: ["light", "spectrum"], name: light.spectrum },
];

/** The names in a file of window readings. */
export const namesInWindowReadings = ({ parts, spectrum, film }: WindowReadings): Name[] => [
  ...namesInParts(parts),
  { of: "engine", path: ["spectrum"], name: spectrum },
  { of: "film", path: ["film"], name: film },
];

/** The names in a brief. */
export const namesInBrief = ({ light, window, avoid }: Brief): Name[] => [
  { of: "engine", path: ["light", "spectrum"], name: light.spectrum },
  { of: "film", path: ["window", "film"], name: window.film },
  ...avoid.map(({ ingredient }, i): Name => ({
    of: "ingredient",
    path: ["avoid", i, "ingredient"],
    name: ingredient,
  })),
];

/**
 * Refuses names that are not on the shelf, and a spectrum of the wrong kind: what an ingredient absorbs and what an engine sends
 * out are told apart.
 * @throws InputError listing each with file, line and field, and the nearest known name.
 */
export function checkNames(document: JsonDocument, names: readonly Name[], known: Known): void {
  const problems = names.flatMap(({ of, path, name }) =>
    name === undefined ? [] : (problemOf(placeOf(document, path), of, name, known) ?? []),
  );
  if (problems.length > 0) throw new InputError(problems.join("\n"));
}

function problemOf(place: string, of: Name["of"], name: string, known: Known): string | undefined {
  if (of === "ingredient" || of === "film") {
    const shelf = of === "ingredient" ? known.ingredients : known.films;
    return shelf.has(name) ? undefined : unknownName(place, of, name, [...shelf.keys()]);
  }
  const { quantity, means } = spectrumKinds[of];
  const spectrum = known.spectra.get(name);
  const fitting = [...known.spectra.values()].filter((one) => one.quantity === quantity);
  const ids = fitting.map(({ id }) => id);
  if (spectrum === undefined) return unknownName(place, "spectrum", name, ids);
  if (spectrum.quantity === quantity) return undefined;
  return `${place} is "${name}", which is a spectrum of ${spectrum.quantity}; it must be ${means} (${quantity}): ${ids.join(", ")}`;
}

const spectrumKinds = {
  absorption: { quantity: "molarAbsorption_Lmolcm", means: "what the ingredient absorbs" },
  engine: { quantity: "relativePower", means: "what the light engine sends out" },
} as const satisfies Record<string, { quantity: Spectrum["quantity"]; means: string }>;

const namesInParts = (parts: WindowReadings["parts"]): Name[] =>
  parts.map(({ ingredient }, i): Name => ({
    of: "ingredient",
    path: ["parts", i, "ingredient"],
    name: ingredient,
  }));
