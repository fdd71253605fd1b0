// From files to values: a shelf from its folders, a formulation with its blends, a brief with both.

import { existsSync, readdirSync, readFileSync } from "node:fs";
import { dirname, join, relative, resolve } from "node:path";
import { InputError, unknownName } from "../door.js";
import { readBrief, type Brief } from "./brief.js";
import { readConstants, type ResinConstants } from "./constants.js";
import { readCureDepths } from "./cureDepths.js";
import { parseJson, type JsonDocument } from "./document.js";
import { readFilm } from "./film.js";
import { formulate, type Formulation } from "./formulation.js";
import { readIngredient, readLot } from "./ingredient.js";
import { readInteraction, type Interaction } from "./interaction.js";
import { readRecipe } from "./recipe.js";
import type { Shelf } from "./shelf.js";
import { readBlendReadings } from "./readings.js";
import { readSpectrum } from "./spectrum.js";
import { readNumberTable } from "./table.js";
import { readWindowReadings } from "./windowReadings.js";

/** A brief with the formulation it starts from and the shelf both stand on. */
export interface Workbench {
  readonly brief: Brief;
  readonly formulation: Formulation;
  readonly shelf: Shelf;
  /** The brief's file. */
  readonly file: string;
}

/**
 * Opens a brief with its formulation and its shelf.
 * @param file - Path of the brief; the environment variable `RESINWRIGHT_BRIEF` comes before it.
 * @throws InputError naming file, line and field of whatever cannot be used.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * const { brief, formulation, shelf } = openBrief("data/briefs/flow-cell.json");
 * [brief.id, formulation.id]; // → ["flow-cell", "flow-cell-a"]
 * shelf.films.has(brief.window.film); // → true
 * ```
 */
export function openBrief(file: string): Workbench {
  return readWorkbench(process.env["RESINWRIGHT_BRIEF"] ?? file);
}

/** As {@link openBrief}, whatever the environment says. @internal */
export function readWorkbench(path: string): Workbench {
  const brief = readBrief(readJson(path));
  const beside = (name: string) => join(dirname(path), name);
  const shelf = readShelf(brief.shelf.map(beside));
  return { brief, shelf, formulation: readFormulation(beside(brief.formulation), shelf), file: path };
}

/**
 * Reads a shelf from folders laid out as `ingredients/`, `lots/`, `spectra/`, `films/`, `interactions/`, `measurements/` (one JSON file each)
 * and `constants/resin.json`; what a later folder holds comes before the same in an earlier one.
 * @throws InputError when a folder is missing, two files of one folder share an id, or no folder holds the constants.
 * @example
 * ```ts
 * import { readShelf } from "resinwright/files";
 * const shelf = readShelf(["data"]);
 * shelf.ingredients.get("IBOA")?.cas; // → "5888-33-5"
 * ```
 */
export function readShelf(folders: readonly string[]): Shelf {
  const parts = folders.map(readShelfFolder);
  const constants = parts.findLast((part) => part.constants !== undefined)?.constants;
  if (constants === undefined) {
    throw new InputError(
      `${folders.map(shown).join(", ")}: no constants/resin.json; name a shelf folder that holds one`,
    );
  }
  const merged = <K extends "ingredients" | "lots" | "spectra" | "films">(key: K) =>
    new Map(parts.flatMap((part) => [...part[key]] as [string, never][])) as Shelf[K];
  const interactions = new Map<string, Interaction>();
  for (const one of parts.flatMap((part) => part.interactions))
    interactions.set([...one.pair].sort().join(" ") + String(one.temperature_C), one);
  return {
    ingredients: merged("ingredients"),
    lots: merged("lots"),
    spectra: merged("spectra"),
    films: merged("films"),
    interactions: [...interactions.values()],
    readings: parts.flatMap((part) => part.readings),
    windowReadings: parts.flatMap((part) => part.windowReadings),
    cureDepths: parts.flatMap((part) => part.cureDepths),
    workingCurves: [],
    constants,
  };
}

/**
 * Reads a formulation file and the blends its parts name.
 * @throws InputError naming file, line and field; when blends contain each other in a ring.
 * @example
 * ```ts
 * import { readFormulation, readShelf } from "resinwright/files";
 * const formulation = readFormulation("data/formulations/flow-cell-a.json", readShelf(["data"]));
 * formulation.components[0].ingredient.id; // → "UDMA"
 * formulation.components[0].massFraction; // → 0.55
 * ```
 */
export function readFormulation(file: string, shelf: Shelf): Formulation {
  return readNested(resolve(file), shelf, []);
}

/**
 * Reads a CSV file of numbers whose columns are named by field and unit.
 * @throws InputError naming file, row and column; see {@link readNumberTable}.
 * @example
 * ```ts
 * import { mkdtempSync, writeFileSync } from "node:fs";
 * import { tmpdir } from "node:os";
 * import { join } from "node:path";
 * import { readNumberFile } from "resinwright/files";
 * const file = join(mkdtempSync(join(tmpdir(), "readings-")), "flow.csv");
 * writeFileSync(file, "# cone and plate\nmassFraction,viscosity_mPas\n0.5,224\n0.4,114\n");
 * readNumberFile({ file, columns: ["massFraction", "viscosity_mPas"] }).viscosity_mPas; // → [224, 114]
 * ```
 */
export function readNumberFile<C extends string>({
  file,
  columns,
}: {
  file: string;
  columns: readonly C[];
}): Record<C, number[]> {
  return readNumberTable({ text: readText(file), where: shown(file), columns });
}

function readNested(file: string, shelf: Shelf, outer: readonly string[]): Formulation {
  if (outer.includes(file)) {
    const ring = [...outer.slice(outer.indexOf(file)), file].map(shown).join(" → ");
    throw new InputError(`${ring}: these blends contain each other; a blend must end in ingredients`);
  }
  const recipe = readRecipe(readJson(file));
  const names = recipe.parts.flatMap(({ blend }) => (blend === undefined ? [] : [blend]));
  const blends = new Map(
    names.map((name) => [name, readNested(resolve(dirname(file), name), shelf, [...outer, file])]),
  );
  return formulate({ recipe, shelf, blends });
}

function readShelfFolder(folder: string) {
  if (!existsSync(folder))
    throw new InputError(`${shown(folder)}: this shelf folder does not exist; correct "shelf" in the brief`);
  const constantsFile = join(folder, "constants", "resin.json");
  return {
    ingredients: byId(folder, "ingredients", readIngredient),
    lots: byId(folder, "lots", readLot),
    spectra: byId(folder, "spectra", readSpectrum),
    films: byId(folder, "films", readFilm),
    interactions: documentsIn(folder, "interactions").map(readInteraction),
    readings: measurementsIn(folder, "blend viscosities").map(readBlendReadings),
    cureDepths: measurementsIn(folder, "cure depths").map(readCureDepths),
    windowReadings: measurementsIn(folder, "window").map(readWindowReadings),
    constants: existsSync(constantsFile)
      ? readConstants(readJson(constantsFile))
      : (undefined as ResinConstants | undefined),
  };
}

function byId<T extends { id: string }>(
  folder: string,
  kind: string,
  read: (document: JsonDocument) => T,
): Map<string, T> {
  const found = new Map<string, T>();
  for (const document of documentsIn(folder, kind)) {
    const one = read(document);
    if (found.has(one.id)) {
      throw new InputError(
        `${document.where}: id "${one.id}" is used by another file of this folder; rename one of them`,
      );
    }
    found.set(one.id, one);
  }
  return found;
}

const measurementKinds = ["blend viscosities", "cure depths", "window"] as const;

/** Measurements of one kind; a file that does not say its kind holds viscosities of blends. */
function measurementsIn(folder: string, kind: (typeof measurementKinds)[number]): JsonDocument[] {
  return documentsIn(folder, "measurements").filter(({ value, where }) => {
    const { kind: given = "blend viscosities" } = (value ?? {}) as { kind?: unknown };
    if ((measurementKinds as readonly unknown[]).includes(given)) return given === kind;
    throw new InputError(unknownName(where, "kind of measurement", String(given), measurementKinds));
  });
}

/** The JSON documents of one folder of a shelf, by file name; none where it does not exist. @internal */
export function documentsIn(folder: string, kind: string): JsonDocument[] {
  const place = join(folder, kind);
  if (!existsSync(place)) return [];
  const names = readdirSync(place).filter((name) => name.endsWith(".json"));
  return names.sort().map((name) => readJson(join(place, name)));
}

function readJson(file: string): JsonDocument {
  return parseJson(readText(file), shown(file));
}

function readText(file: string): string {
  try {
    return readFileSync(file, "utf8");
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    throw new InputError(`${shown(file)}: cannot be read (${code ?? "unknown reason"}); check the path`);
  }
}

function shown(file: string): string {
  const path = relative(process.cwd(), file);
  return path === "" ? "." : path;
}
