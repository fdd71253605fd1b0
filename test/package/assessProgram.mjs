// A module for a user's page: reads a brief, its formulation and its shelf from texts, as a page has them, and assesses.

import { readFileSync, readdirSync } from "node:fs";
import { join } from "node:path";

/** The module's source; `numbers()` gives value, low and high of every property as JSON, to twelve digits. */
export function assessProgram(data) {
  const text = (...path) => readFileSync(join(data, ...path), "utf8");
  const texts = (kind) =>
    Object.fromEntries(
      readdirSync(join(data, kind))
        .filter((name) => name.endsWith(".json"))
        .map((name) => [name, text(kind, name)]),
    );
  const given = {
    brief: text("briefs", "flow-cell.json"),
    recipe: text("formulations", "flow-cell-a.json"),
    constants: text("constants", "resin.json"),
    ingredients: texts("ingredients"),
    spectra: texts("spectra"),
    films: texts("films"),
  };
  return `import {
  assess, formulate, parseJson, propertyNames, readBrief, readConstants, readFilm, readIngredient, readRecipe, readSpectrum,
} from "resinwright";

const given = ${JSON.stringify(given)};
const byId = (texts, read) =>
  new Map(Object.entries(texts).map(([name, text]) => read(parseJson(text, name))).map((one) => [one.id, one]));

export function numbers() {
  const shelf = {
    ingredients: byId(given.ingredients, readIngredient),
    lots: new Map(),
    spectra: byId(given.spectra, readSpectrum),
    films: byId(given.films, readFilm),
    interactions: [],
    readings: [],
    windowReadings: [],
    cureDepths: [],
    workingCurves: [],
    constants: readConstants(parseJson(given.constants, "resin.json")),
  };
  const formulation = formulate({ recipe: readRecipe(parseJson(given.recipe, "flow-cell-a.json")), shelf });
  const { properties } = assess({ brief: readBrief(parseJson(given.brief, "flow-cell.json")), formulation, shelf });
  // Two engines may differ in the last place of an exponential; a resin does not.
  const digits = (value) => Number(value.toPrecision(12));
  return JSON.stringify(
    propertyNames.map((name) => ["value", "low", "high"].map((end) => digits(properties[name][end]))),
  );
}
`;
}
