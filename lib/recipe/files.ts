// From files to values: a shelf from its folders, a formulation with its blends, a brief with both.

import { existsSync, readdirSync, readFileSync } from "node:fs";
import { dirname, join, relative, resolve } from "node:path";
import { InputError, unknownName } from "../door.js";
import { readBrief, type Brief } from "./brief.js";
import { readConstants, type ResinConstants } from "./constants.js";
import { readCureDepths } from "./cureDepths.js";
import { parseJson, placeOf, type JsonDocument } from "./document.js";
import { readFilm } from "./film.js";
import { formulateAt, type Formulation } from "./formulation.js";
import { readIngredient, readLot } from "./ingredient.js";
import { readInteraction, type Interaction } from "./interaction.js";
import { checkLightCovered } from "./lightCovered.js";
import {
  checkNames,
  namesInBrief,
  namesInCureDepths,
  namesInIngredient,
  namesInLot,
  namesInPair,
  namesInWindowReadings,
} from "./namesOnShelf.js";
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

/** As {@link openBrief}, whatever the environment says; with `formulationFile` in place of the formulation that the brief names. @internal */
export function readWorkbench(path: string, formulationFile?: string): Workbench {
  const document = readJson(path);
  const brief = readBrief(document);
  const beside = (name: string) => resolve(dirname(path), name);
  const shelf = readShelf(brief.shelf.map(beside));
  checkNames(document, namesInBrief(brief), shelf);
  const formulation = readFormulation(formulationFile ?? beside(brief.formulation), shelf);
  checkLightCovered(document, { brief, formulation, shelf });
  return { brief, shelf, formulation, file: path };
}

/**
 * Reads a shelf from folders laid out as `ingredients/`, `lots/`, `spectra/`, `films/`, `interactions/`, `measurements/` (one JSON file each)
 * and `constants/resin.json`; what a later folder holds comes before the same in an earlier one.
 * @throws InputError when a folder is missing, two files of one folder share an id, or no folder holds the constants; when a file
 * names an ingredient, film or spectrum that is not on the shelf; when a file in `measurements/` is not JSON.
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
  const files = {
    ingredients: latest(parts.map((part) => part.ingredients)),
    lots: latest(parts.map((part) => part.lots)),
    spectra: latest(parts.map((part) => part.spectra)),
    films: latest(parts.map((part) => part.films)),
    interactions: latest(parts.map((part) => part.interactions)),
    readings: latest(parts.map((part) => part.readings)),
    cureDepths: latest(parts.map((part) => part.cureDepths)),
    windowReadings: latest(parts.map((part) => part.windowReadings)),
  };
  const shelf = {
    ingredients: contents(files.ingredients),
    lots: contents(files.lots),
    spectra: contents(files.spectra),
    films: contents(files.films),
    interactions: [...contents(files.interactions).values()],
    readings: [...contents(files.readings).values()],
    windowReadings: [...contents(files.windowReadings).values()],
    cureDepths: [...contents(files.cureDepths).values()],
    workingCurves: [],
    constants,
  };
  const check = <T>(read: Files<T>, namesIn: (content: T) => Parameters<typeof checkNames>[1]) => {
    for (const { document, content } of read.values()) checkNames(document, namesIn(content), shelf);
  };
  check(files.ingredients, namesInIngredient);
  check(files.lots, namesInLot);
  check(files.interactions, namesInPair);
  check(files.readings, namesInPair);
  check(files.cureDepths, namesInCureDepths);
  check(files.windowReadings, namesInWindowReadings);
  return shelf;
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
  const document = readJson(file);
  const recipe = readRecipe(document);
  const names = recipe.parts.flatMap(({ blend }) => (blend === undefined ? [] : [blend]));
  const blends = new Map(
    names.map((name) => [name, readNested(resolve(dirname(file), name), shelf, [...outer, file])]),
  );
  return formulateAt((path) => placeOf(document, path), { recipe, shelf, blends });
}

/** What files hold, each with its document, by the id that tells them apart. */
type Files<T> = ReadonlyMap<string, { readonly document: JsonDocument; readonly content: T }>;

function readShelfFolder(folder: string) {
  if (!existsSync(folder))
    throw new InputError(`${shown(folder)}: this shelf folder does not exist; correct "shelf" in the brief`);
  const constantsFile = join(folder, "constants", "resin.json");
  const measurements = measurementsIn(folder);
  const of = (kind: MeasurementKind) => measurements.filter((one) => kindOf(one) === kind);
  return {
    ingredients: byId(documentsIn(folder, "ingredients"), readIngredient),
    lots: byId(documentsIn(folder, "lots"), readLot),
    spectra: byId(documentsIn(folder, "spectra"), readSpectrum),
    films: byId(documentsIn(folder, "films"), readFilm),
    interactions: keyed(documentsIn(folder, "interactions"), readInteraction, pairAndTemperature),
    readings: byId(of("blend viscosities"), readBlendReadings),
    cureDepths: byId(of("cure depths"), readCureDepths),
    windowReadings: byId(of("window"), readWindowReadings),
    constants: existsSync(constantsFile)
      ? readConstants(readJson(constantsFile))
      : (undefined as ResinConstants | undefined),
  };
}

/** What several folders hold: a later one's comes in place of an earlier one's of the same id, and stands behind it. */
function latest<T>(parts: readonly Files<T>[]): Files<T> {
  const files = new Map<string, { document: JsonDocument; content: T }>();
  for (const [id, one] of parts.flatMap((part) => [...part])) {
    files.delete(id);
    files.set(id, one);
  }
  return files;
}

function contents<T>(files: Files<T>): Map<string, T> {
  return new Map([...files].map(([id, { content }]) => [id, content]));
}

function keyed<T>(
  documents: readonly JsonDocument[],
  read: (document: JsonDocument) => T,
  keyOf: (content: T) => string,
): Files<T> {
  return new Map(
    documents.map((document) => {
      const content = read(document);
      return [keyOf(content), { document, content }];
    }),
  );
}

function byId<T extends { id: string }>(
  documents: readonly JsonDocument[],
  read: (document: JsonDocument) => T,
): Files<T> {
  const files = keyed(documents, read, ({ id }) => id);
  if (files.size < documents.length) refuseTwins(documents);
  return files;
}

/** @throws InputError when two documents of one folder share an id, naming both files. */
function refuseTwins(documents: readonly JsonDocument[]): void {
  const places = new Map<unknown, string>();
  for (const { where, value } of documents) {
    const { id } = (value ?? {}) as { id?: unknown };
    const other = places.get(id);
    if (other !== undefined && typeof id === "string")
      throw new InputError(
        `${where}: id "${id}" is that of ${other} too; give one of them another id, or take it out`,
      );
    places.set(id, where);
  }
}

const pairAndTemperature = ({ pair, temperature_C }: Interaction): string =>
  [...pair].sort().join(" ") + String(temperature_C);

const measurementKinds = ["blend viscosities", "cure depths", "window"] as const;
type MeasurementKind = (typeof measurementKinds)[number];

/** The measurements of a folder; two of one id are refused, whatever their kinds. */
function measurementsIn(folder: string): JsonDocument[] {
  const documents = documentsIn(folder, "measurements");
  refuseTwins(documents);
  return documents;
}

/** A file that does not say its kind holds viscosities of blends. */
function kindOf({ value, where }: JsonDocument): MeasurementKind {
  const { kind = "blend viscosities" } = (value ?? {}) as { kind?: unknown };
  const known = measurementKinds.find((one) => one === kind);
  if (known === undefined)
    throw new InputError(unknownName(where, "kind of measurement", String(kind), measurementKinds));
  return known;
}

/**
 * The JSON documents of one folder of a shelf, by file name; none where it does not exist. Among measurements every other file
 * is refused: nobody would notice that its readings are not used.
 * @internal
 */
export function documentsIn(folder: string, kind: string): JsonDocument[] {
  const place = join(folder, kind);
  if (!existsSync(place)) return [];
  const entries = readdirSync(place, { withFileTypes: true }).filter((entry) => !entry.isDirectory());
  const names = entries.map(({ name }) => name).sort();
  const other = names.find((name) => !name.endsWith(".json") && !name.startsWith("."));
  if (other !== undefined && kind.startsWith("measurements")) {
    throw new InputError(
      `${shown(join(place, other))}: only .json files are read here, and its readings would be left out; bring them into a .json file (data/README.md shows the shape), or keep this one in a folder of its own, such as ${shown(join(place, "raw"))}`,
    );
  }
  return names.filter((name) => name.endsWith(".json")).map((name) => readJson(join(place, name)));
}

function readJson(file: string): JsonDocument {
  return parseJson(readText(file), shown(file));
}

/** @throws InputError when the file cannot be read or is not in UTF-8. @internal */
export function readText(file: string, where = shown(file)): string {
  let bytes: Buffer;
  try {
    bytes = readFileSync(file);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    throw new InputError(`${where}: cannot be read (${code ?? "unknown reason"}); check the path`, {
      cause: error,
    });
  }
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch (error) {
    const [first, second] = bytes;
    const isUtf16 = (first === 0xff && second === 0xfe) || (first === 0xfe && second === 0xff);
    throw new InputError(
      `${where}: is not text in UTF-8${isUtf16 ? " but in UTF-16" : ""}; save it as UTF-8 (an editor offers it when saving)`,
      { cause: error },
    );
  }
}

function shown(file: string): string {
  const path = relative(process.cwd(), file);
  return path === "" ? "." : path;
}
