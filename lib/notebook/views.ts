// The tables every notebook needs: a brief, a formulation, the figures behind it, an assessment, cautions, sources.

import type { Assessment } from "../assess/assess.js";
import { propertyTitles, type NeverCures, type Property } from "../assess/property.js";
import type { Brief } from "../recipe/brief.js";
import { composition, type Formulation } from "../recipe/formulation.js";
import type { Ingredient, IngredientFigures } from "../recipe/ingredient.js";
import { propertyNames } from "../recipe/propertyNames.js";
import type { AtTemperature } from "../recipe/sourced.js";
import { unitEndingOf, unitLabel } from "../recipe/units.js";
import type { BlendReadings } from "../recipe/readings.js";
import type { SourcedValue, UsedSource } from "../result.js";
import { blendRule, fitReadings, interactionFrom } from "../decide/calibrate.js";
import type { TableContent } from "./content.js";
import { numberText } from "./digits.js";
import { gasText, targetText } from "./phrases.js";
import { tableOf } from "./table.js";
import { assessmentRows, valueText } from "./verdicts.js";

/**
 * A brief as a table: the printer, the conditions, the targets, what to avoid.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { briefTable } from "resinwright/notebook";
 * const { brief } = openBrief("data/briefs/flow-cell.json");
 * const table = briefTable(brief);
 * table.rows[2]; // → ["layer", "50 µm, cured 1.5 layers deep"]
 * table.rows[7]; // → ["target: viscosity at print temperature", "100 to 600 mPa s"]
 * ```
 */
export function briefTable(brief: Brief): TableContent {
  const { light, window, targets } = brief;
  const engine =
    light.spectrum === undefined
      ? `${sourcedText("wavelength_nm", light.wavelength_nm!)}, one wavelength`
      : `spectrum "${light.spectrum}"`;
  const rows = [
    ["light", engine],
    ["irradiance at the window", sourcedText("irradiance_mWcm2", light.irradiance_mWcm2)],
    [
      "layer",
      `${numberText(brief.layerThickness_um)} µm, cured ${numberText(brief.cureDepthPerLayer)} layers deep`,
    ],
    ["window", `${window.film} film, ${sourcedText("filmThickness_um", window.filmThickness_um)}`],
    ["gas under the film", `${gasText(brief)} at ${numberText(window.gasPressure_Pa / 1000)} kPa`],
    ["resin temperature", `${numberText(brief.temperature_C)} °C`],
    [
      "largest cross-section",
      `${numberText(brief.crossSection_mm2)} mm², lifted at ${numberText(brief.liftSpeed_mms)} mm/s`,
    ],
    ...propertyNames.flatMap((name) => {
      const target = targets[name];
      return target === undefined
        ? []
        : [[`target: ${propertyTitles[name]}`, `${targetText(target)} ${unitLabel(name)}`]];
    }),
    ...brief.avoid.map(({ ingredient, hazard, reason }) => [`avoid: ${ingredient ?? hazard}`, reason]),
  ];
  return tableOf({ caption: `The brief: ${brief.title}`, rows: rows.map(([what, is]) => ({ what, is })) });
}

/**
 * A formulation as a table: by mass, per hundred parts of liquid, by volume, as a concentration.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { formulationTable } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const table = formulationTable(formulation);
 * table.columns[3]; // → { name: "mass", unit: "%", align: "right" }
 * table.rows[1].slice(0, 4); // → ["IBOA", "isobornyl acrylate", "diluent", 30]
 * ```
 */
export function formulationTable(formulation: Formulation): TableContent {
  const { density_gcm3, rows } = composition(formulation);
  return tableOf({
    caption: `The formulation: ${formulation.title}. Density ${numberText(density_gcm3)} g/cm³ with volumes taken as additive`,
    rows: rows.map(({ ingredient, massFraction, partsPerHundred, volumeFraction, concentration_molL }) => ({
      ingredient: ingredient.id,
      name: ingredient.name,
      role: ingredient.role,
      mass_pct: 100 * massFraction,
      partsPerHundred,
      volume_pct: 100 * volumeFraction,
      concentration_molL,
    })),
    columns: [
      { key: "ingredient" },
      { key: "name" },
      { key: "role" },
      { key: "mass_pct", name: "mass" },
      { key: "partsPerHundred", name: "per 100 of liquid", digits: 3 },
      { key: "volume_pct", name: "volume" },
      { key: "concentration_molL", digits: 3 },
    ],
  });
}

/**
 * One row for each sourced figure of the ingredients of a formulation: for tables, frames and counts.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { figureRows, frameOf } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const frame = frameOf(figureRows(formulation));
 * frame.columns; // → ["ingredient", "figure", "value", "status", "source"]
 * // What to look up first: every figure that stands on memory alone.
 * const remembered = frame.query(frame.column("status").eq("from memory"));
 * remembered.shape[1]; // → 5
 * ```
 */
export function figureRows(formulation: Formulation): FigureRow[] {
  return formulation.components.flatMap(({ ingredient }) =>
    figureFields.flatMap((field) => {
      const figure = ingredient[field];
      if (figure === undefined) return [];
      const lot = ingredient.lot?.measured.includes(field) ? ` (lot ${ingredient.lot.id})` : "";
      return [
        {
          ingredient: ingredient.id + lot,
          figure: nameOf(field),
          value: sourcedText(field, figure) + temperatureText(figure),
          status: figure.status,
          source: figure.source,
        },
      ];
    }),
  );
}

/** A figure of an ingredient as text: value with its standard uncertainty and unit, the ground it stands on, its source. */
export interface FigureRow {
  readonly ingredient: string;
  readonly figure: string;
  readonly value: string;
  readonly status: string;
  readonly source: string;
}

/**
 * An assessment as a table: each property with its interval, its target and the verdict.
 * @example
 * ```ts
 * import { assess } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { assessmentTable } from "resinwright/notebook";
 * const table = assessmentTable(assess(openBrief("data/briefs/flow-cell.json")));
 * table.columns.map(({ name }) => name); // → ["property", "unit", "value", "target", "verdict"]
 * table.rows[0][3]; // → "100 to 600"
 * ```
 */
export function assessmentTable(assessment: Assessment): TableContent {
  return tableOf({
    caption: `Assessment of ${assessment.formulation} under ${assessment.brief}: value and ${numberText(100 * assessment.level)} % interval from ${assessment.draws} draws`,
    rows: assessmentRows(assessment),
  });
}

/**
 * Properties as a table: each with its interval, unit and level.
 * @example
 * ```ts
 * import { penetrationDepthOf, viscosityOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { propertyTable } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const table = propertyTable("Before mixing", [viscosityOf(work), penetrationDepthOf(work)]);
 * table.rows.map(([property]) => property); // → ["viscosity at print temperature", "penetration depth"]
 * ```
 */
export function propertyTable(caption: string, properties: readonly (Property | NeverCures)[]): TableContent {
  return tableOf({
    caption,
    rows: properties.map((property) => ({
      property: property.title,
      unit: property.unit,
      value: valueText(property),
      interval: property.outcome === "value" ? `${numberText(100 * property.level)} %` : null,
    })),
  });
}

/**
 * Readings of two liquids' blends against the rule that is used, neat liquids as read, one a row; a reading that stands out is
 * named. Whether one interaction is enough is judged with the neat liquids as readings like the others.
 * @example
 * ```ts
 * import { readShelf } from "resinwright/files";
 * import { readingTable } from "resinwright/notebook";
 * const readings = readShelf(["data"]).readings.find(({ id }) => id === "udma-iboa-25C")!;
 * readingTable(readings).rows.length; // → 9
 * ```
 */
export function readingTable(readings: BlendReadings): TableContent {
  const { outliers, adequacy } = fitReadings(readings);
  const { G } = interactionFrom(readings);
  const fitted_mPas = readings.massFractions.map(blendRule(readings, G.value));
  return tableOf({
    caption: `Readings of ${readings.pair.join(" with ")} at ${numberText(readings.temperature_C)} °C against the rule with G = ${numberText(G.value, 3)} and the neat liquids as read. One interaction for all of them: ${adequacy.verdict}; ${adequacy.reason}`,
    rows: readings.viscosities_mPas.map((viscosity_mPas, i) => ({
      mass_pct: 100 * readings.massFractions[i]!,
      viscosity_mPas,
      fitted_mPas: fitted_mPas[i],
      deviation_pct: numberText(Number((100 * (viscosity_mPas / fitted_mPas[i]! - 1)).toFixed(1)), 3),
      note: outliers.includes(i) ? "stands out: measure it again" : null,
    })),
    columns: [
      { key: "mass_pct", name: readings.pair[0], unit: "mass %" },
      { key: "viscosity_mPas", name: "read" },
      { key: "fitted_mPas", name: "fitted", digits: 3 },
      { key: "deviation_pct", name: "off by", align: "right" },
      { key: "note", align: "left" },
    ],
  });
}

/**
 * What to know before using the numbers, one warning a row.
 * @example
 * ```ts
 * import { viscosityOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { warningTable } from "resinwright/notebook";
 * const viscosity = viscosityOf(openBrief("data/briefs/flow-cell.json"));
 * warningTable(viscosity).rows[0][0]; // → "interaction unmeasured"
 * warningTable({ warnings: [] }).rows; // → [["nothing", "No warning for these numbers."]]
 * ```
 */
export function warningTable({ warnings }: { warnings: Assessment["warnings"] }): TableContent {
  const said =
    warnings.length > 0 ? warnings : [{ code: "nothing", message: "No warning for these numbers." }];
  const rows = said.map(({ code, message }) => ({
    about: code.replaceAll("-", " "),
    "what to know": message,
  }));
  const columns = [{ key: "about" }, { key: "what to know", name: "what to know" }];
  return tableOf({
    caption: "What to know before using these numbers",
    rows,
    columns,
  });
}

/**
 * The hazard statements of what is in the bottle; where nobody has looked, it says so.
 * @example
 * ```ts
 * import { openBrief } from "resinwright/files";
 * import { hazardTable } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const table = hazardTable(formulation);
 * table.rows[1].slice(0, 3); // → ["IBOA", "5888-33-5", "H317, H319, H335, H410"]
 * table.rows[4].slice(0, 3); // → ["BBOT", "7128-64-5", "not checked"]
 * ```
 */
export function hazardTable(formulation: Formulation): TableContent {
  return tableOf({
    caption:
      "Hazard statements known for the ingredients. A screening: the suppliers' safety data sheets decide",
    rows: formulation.components.map(({ ingredient }) => ({
      ingredient: ingredient.id,
      "CAS number": ingredient.cas ?? "none given",
      statements: hazardText(ingredient),
      note: ingredient.note ?? null,
    })),
    columns: [
      { key: "ingredient" },
      { key: "CAS number", name: "CAS number" },
      { key: "statements" },
      { key: "note", align: "left" },
    ],
  });
}

/**
 * The sources that results rest on; figures that share one stand together.
 * @example
 * ```ts
 * import { sourceTable } from "resinwright/notebook";
 * const read = { source: "pycnometer (25 mL) at 25 °C", status: "measured here" } as const;
 * const table = sourceTable([{ figure: "density of IBOA", ...read }, { figure: "density of HDDA", ...read }]);
 * table.rows; // → [["density of IBOA, HDDA", "measured here", "pycnometer (25 mL) at 25 °C"]]
 * ```
 */
export function sourceTable(sources: readonly UsedSource[]): TableContent {
  const figuresOf = new Map<string, UsedSource & { figures: Set<string> }>();
  for (const one of sources) {
    const key = `${one.status}: ${one.source}`;
    const known = figuresOf.get(key) ?? { ...one, figures: new Set<string>() };
    figuresOf.set(key, { ...known, figures: known.figures.add(one.figure) });
  }
  return tableOf({
    caption: "Sources of the figures this page used",
    rows: [...figuresOf.values()].map(({ figures, status, source }) => ({
      figure: listed([...figures]),
      status,
      source,
    })),
  });
}

/** "density of IBOA", "density of HDDA" as "density of IBOA, HDDA". */
function listed(figures: readonly string[]): string {
  const byQuantity = new Map<string, string[]>();
  for (const figure of figures) {
    const [, quantity, whose] = /^(.* of )(\S+)$/.exec(figure) ?? [figure, figure, ""];
    byQuantity.set(quantity!, [...(byQuantity.get(quantity!) ?? []), whose!]);
  }
  return [...byQuantity].map(([quantity, whose]) => quantity + whose.join(", ")).join("; ");
}

function sourcedText(field: string, { value, u }: SourcedValue): string {
  const unit = unitLabel(field);
  const digits = u > 0 ? Math.max(2, Math.ceil(Math.log10(Math.abs(value) / u)) + 2) : 4;
  return `${numberText(value, Math.min(digits, 7))} ± ${numberText(u, 2)}${unit === "" ? "" : ` ${unit}`}`;
}

/** What holds at one temperature says at which. */
function temperatureText(figure: SourcedValue | AtTemperature): string {
  return "temperature_C" in figure ? ` at ${numberText(figure.temperature_C)} °C` : "";
}

function nameOf(field: keyof IngredientFigures): string {
  const ending = unitEndingOf(field);
  const bare = ending === undefined ? field : field.slice(0, -ending.length - 1);
  return bare.replace(/([A-Z])/g, " $1").toLowerCase();
}

function hazardText({ hazards }: Ingredient): string {
  return hazards === undefined ? "not checked" : hazards.map(({ code }) => code).join(", ");
}

const figureFields: readonly (keyof IngredientFigures)[] = [
  "molarMass_gmol",
  "density_gcm3",
  "viscosity_mPas",
  "viscosityActivation_K",
  "homopolymerGlassTransition_C",
  "radicalsPerPhoton",
  "solubility_pct",
];
