// How a hazard screening is shown: what the mixture may be, what rules say of its substances, how to keep and handle it.

import type { HazardFlag, HazardScreening } from "../lab/hazards.js";
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
export function screeningTable(screening: HazardScreening): TableContent {
  const { caution, flags, regulatory, notChecked } = screening;
  const rows = [
    {
      about: "if all of it cures at once",
      finding: riseText(screening),
      source: "double bonds and heats of polymerisation",
    },
    ...flags.map((flag) => ({
      about: `${flag.statement} ${flag.title}`,
      finding: flagText(flag),
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

/** How hot the resin gets if all of it cures at once, and what to do about it. */
export function riseText({ temperatureRise_K }: HazardScreening): string {
  return `warms by ${intervalText(temperatureRise_K)} K without cooling: keep amounts small, out of the light, and never in a closed vessel`;
}

/** Which limit a mixture reaches, and with how much. */
export function flagText({ outcome, limit_pct, content_pct, condition }: HazardFlag): string {
  const reaches = outcome === "reached" ? "reaches" : "may reach";
  const given = condition === undefined ? "" : `, ${condition}`;
  return `${reaches} the generic limit of ${numberText(limit_pct, 2)} % with ${numberText(content_pct, 2)} %${given}`;
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
