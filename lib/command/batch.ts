// `resinwright batch`: the weigh-out sheet of a formulation.

import { resolve } from "node:path";
import { fraction, InputError, positive } from "../door.js";
import { dataHashOf } from "../lab/dataHash.js";
import { weighOut, type MasterBatch, type Portion, type WeighOutSheet } from "../lab/batch.js";
import { libraryVersion } from "../lab/record/version.js";
import { dissolvingText, lightNotes } from "../notebook/batch.js";
import { massText } from "../notebook/batchMass.js";
import type { TableContent } from "../notebook/content.js";
import { numberText } from "../notebook/digits.js";
import { tableOf } from "../notebook/table.js";
import { warningTable } from "../notebook/views.js";
import { readFormulation, readShelf } from "../recipe/files.js";
import type { Formulation } from "../recipe/formulation.js";
import type { Shelf } from "../recipe/shelf.js";
import type { Given, Run } from "./act.js";
import { caution } from "./caution.js";
import { jsonText } from "./jsonText.js";
import { quantityOf } from "./quantity.js";
import { paragraph, tableText } from "./textTable.js";

export const run: Run = (given, { folder, width, print }) => {
  const sheet = weighOut(inputOf(given, folder));
  const text = given.isOn("json")
    ? jsonText("resinwright weigh-out 1", documentOf(sheet))
    : sheetText(sheet, width);
  print(text.trimEnd());
  return 0;
};

function inputOf({ operand, text, texts }: Given, folder: string): Parameters<typeof weighOut>[0] {
  const mass = (option: string, range = {}) =>
    quantityOf({ act: "batch", option, field: "mass_g", given: text[option]!, ...range });
  const batch_g = mass("size", positive);
  const balance = {
    readability_g: mass("readability", positive),
    repeatability_g: mass("repeatability"),
    capacity_g: mass("capacity"),
  };
  const accuracy =
    text["accuracy"] === undefined ? {} : { accuracy: percentOf("accuracy", text["accuracy"]) };
  const shelf = readShelf((texts["shelf"] ?? ["data"]).map((one) => resolve(folder, one)));
  const formulation = formulationOn(shelf, resolve(folder, operand!), texts["shelf"] !== undefined);
  return { formulation, batch_g, balance, ...accuracy };
}

/** The formulation; where its ingredients or lots are not found on the shipped shelf, says how to name another. */
function formulationOn(shelf: Shelf, file: string, shelfIsNamed: boolean): Formulation {
  try {
    return readFormulation(file, shelf);
  } catch (error) {
    const isUnknown = error instanceof InputError && /: unknown (ingredient|lot) "/.test(error.message);
    if (!isUnknown || shelfIsNamed) throw error;
    throw new InputError(
      `${error.message}\nThe shelf is data alone; name the folder of your own as well: --shelf data --shelf lab`,
      { cause: error },
    );
  }
}

function percentOf(option: string, given: string): number {
  const percent = quantityOf({
    act: "batch",
    option,
    field: "accuracy_pct",
    given,
    min: 0,
    max: 100 * fraction.max,
  });
  return percent / 100;
}

/** What `--json` prints beside `format`, "resinwright weigh-out 1": the sheet, ingredients by their ids. */
function documentOf(sheet: WeighOutSheet) {
  const { formulation, balance, batch_g, accuracy, tolerance, minimumWeight_g, warnings } = sheet;
  return {
    libraryVersion: libraryVersion(),
    dataHash: dataHashOf({ formulation }),
    formulation: { id: formulation.id, title: formulation.title },
    balance,
    batch_g,
    accuracy,
    tolerance,
    minimumWeight_g,
    portions: sheet.portions.map((portion) => ({
      line: portion.line,
      label: portion.label,
      contents: portion.contents.map(({ ingredient, massFraction, u }) => ({
        ingredient: ingredient.id,
        massFraction,
        u,
      })),
      lot: portion.lot,
      reason: portion.reason,
      amberLight: portion.amberLight,
      exact_g: portion.exact_g,
      target_g: portion.target_g,
      low_g: portion.low_g,
      high_g: portion.high_g,
      u_g: portion.u_g,
      loads: portion.loads,
      runningTotal_g: portion.runningTotal_g,
    })),
    masterBatches: sheet.masterBatches.map(({ solute, carrier, ...master }) => ({
      ...master,
      solute: solute.id,
      carrier: carrier.id,
    })),
    warnings,
  };
}

/** The sheet as it lies beside the balance. */
export function sheetText(sheet: WeighOutSheet, width: number): string {
  const { formulation, balance, batch_g, tolerance, minimumWeight_g, masterBatches, warnings } = sheet;
  const grams = (mass_g: number) => massText(mass_g, balance);
  const caption = `Weigh-out of ${formulation.id}, ${formulation.title}: ${numberText(batch_g, 7)} g, each mass within ${numberText(100 * tolerance, 2)} % of itself; the balance weighs honestly from ${numberText(minimumWeight_g)} g on`;
  const tables = [
    portionTable(caption, sheet.portions, grams),
    ...masterBatches.map((master) => masterTable(master, grams)),
    ...(warnings.length === 0 ? [] : [warningTable(sheet)]),
  ];
  const order = sheet.portions.map(({ line, reason }) => `${line}: ${reason}`).join("; ");
  const made = `Computed by resinwright ${libraryVersion()} from the data ${dataHashOf({ formulation }).slice(0, 12)}.`;
  return [
    ...tables.map((table) => tableText(table, width)),
    paragraph(`Why in this order: ${order}.`, width),
    paragraph(made, width),
    paragraph(caution, width),
  ].join("\n");
}

type Grams = (mass_g: number) => string;

function portionTable(caption: string, portions: readonly Portion[], grams: Grams): TableContent {
  const rows = portions.map((portion) => ({
    line: portion.line,
    portion: portion.label,
    target: grams(portion.target_g),
    from: grams(portion.low_g),
    to: grams(portion.high_g),
    total: grams(portion.runningTotal_g),
    loads: portion.loads,
    light: portion.amberLight ? "amber" : "any",
    lot: portion.lot === "" ? "________" : portion.lot,
    weighed: "________",
  }));
  const mass = { unit: "g", align: "right" } as const;
  return tableOf({
    caption,
    rows,
    columns: [
      { key: "line" },
      { key: "portion" },
      ...["target", "from", "to", "total"].map((key) => ({ key, ...mass })),
      { key: "loads" },
      { key: "light" },
      { key: "lot" },
      { key: "weighed", ...mass },
    ],
  });
}

function masterTable(master: MasterBatch, grams: Grams): TableContent {
  const { label, massFraction, stages, dose_g, enoughFor } = master;
  return tableOf({
    caption: `Make first: master batch of ${label}, ${numberText(100 * massFraction)} % by mass; ${grams(dose_g)} g go into a batch, enough for ${numberText(Math.floor(enoughFor))}. ${[dissolvingText(master), ...lightNotes(master)].join(". ")}`,
    rows: stages.map(({ of, mass_g, carrier_g }, i) => ({
      stage: i + 1,
      of,
      "mass of it": grams(mass_g),
      diluent: grams(carrier_g),
    })),
    columns: [
      { key: "stage" },
      { key: "of" },
      { key: "mass of it", unit: "g", align: "right" },
      { key: "diluent", unit: "g", align: "right" },
    ],
  });
}
