// How a hazard screening is shown: what the mixture may be, what rules say of its substances, how to keep and handle it.

import type { HazardScreening } from "../lab/hazards.js";
import type { TableContent } from "./content.js";
import { intervalText, numberText } from "./digits.js";
import { tableOf } from "./table.js";

/**
 * The generic limits that the mixture reaches, the dated notes on its substances, and the temperature rise of a runaway.
 * @example
 * ```ts
 * import { screenHazards } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * import { screeningTable } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const table = screeningTable(screenHazards({ formulation, rules: readSafetyRules("data/rules") }));
 * table.rows[0][0]; // → "if all of it cures at once"
 * ```
 */
export function screeningTable({
  caution,
  flags,
  regulatory,
  temperatureRise_K,
  notChecked,
}: HazardScreening): TableContent {
  const rows = [
    {
      about: "if all of it cures at once",
      finding: `warms by ${intervalText(temperatureRise_K)} K without cooling: keep amounts small, out of the light, and never in a closed vessel`,
      source: "double bonds and heats of polymerisation",
    },
    ...flags.map((flag) => ({
      about: `${flag.statement} ${flag.title}`,
      finding: `${flag.outcome === "reached" ? "reaches" : "may reach"} the generic limit of ${numberText(flag.limit_pct, 2)} % with ${numberText(flag.content_pct, 2)} %${flag.condition === undefined ? "" : `, ${flag.condition}`}`,
      source: `${flag.source} (${flag.date}; ${flag.status})`,
    })),
    ...regulatory.map(({ substance, region, fact, date, source, status }) => ({
      about: `${substance}, ${region}`,
      finding: fact,
      source: `${source} (${date}; ${status})`,
    })),
    ...notChecked.map((id) => ({ about: id, finding: "nobody has checked its hazards", source: null })),
  ];
  return tableOf({ caption: `Screening of the mixture. ${caution}`, rows });
}

/**
 * Notes on protection, storage and law that fit what is in the bottle.
 * @example
 * ```ts
 * import { screenHazards } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * import { handlingTable } from "resinwright/notebook";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const table = handlingTable(screenHazards({ formulation, rules: readSafetyRules("data/rules") }));
 * table.rows[0][0]; // → "protection"
 * ```
 */
export function handlingTable({ protection, storage, law }: HazardScreening): TableContent {
  const kinds = { protection, storage, law };
  return tableOf({
    caption: "Protection, storage and law: notes to begin with",
    rows: Object.entries(kinds).flatMap(([about, notes]) =>
      notes.map(({ text, source, status }) => ({ about, note: text, source: `${source} (${status})` })),
    ),
  });
}
