// How light in a resin is shown: who takes it, which initiators and absorbers could do it, how engines compare.

import type { LightTaken } from "../assess/lightTaken.js";
import type { EngineComparison } from "../decide/compareEngines.js";
import type { InitiatorAnswer } from "../decide/initiatorFor.js";
import type { LevelAnswer, LevelFound } from "../decide/level.js";
import type { Interval } from "../result.js";
import type { FigureContent, TableContent } from "./content.js";
import { lineFigure } from "./figure/line.js";
import { sharePercent } from "./phrases.js";
import { tableOf } from "./table.js";

/**
 * What each initiator and absorber takes at every wavelength of the engine, beside the engine's own light.
 * @example
 * ```ts
 * import { lightTakenOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { spectraFigure } from "resinwright/notebook";
 * const figure = spectraFigure(lightTakenOf(openBrief("data/briefs/flow-cell.json")), "Flow-cell resin")!;
 * figure.caption; // → "Absorption in the resin over the light of the engine. Flow-cell resin."
 * ```
 */
export function spectraFigure({ engine, takers }: LightTaken, conditions: string): FigureContent | undefined {
  // A nominal wavelength is one place, and no curve goes through it.
  if (engine.shares.length < 2) return undefined;
  const strongest = Math.max(...takers.flatMap(({ napierianAbsorptions_percm: all }) => all));
  const brightest = Math.max(...engine.shares);
  const x = [...engine.wavelengths_nm];
  return lineFigure({
    caption: "Absorption in the resin over the light of the engine",
    conditions,
    x: { label: "wavelength", unit: "nm" },
    y: { label: "Napierian absorption", unit: "1/cm" },
    // A figure takes six lines; the engine is one of them.
    series: [
      ...takers.slice(0, 5).map(({ name, napierianAbsorptions_percm }) => ({
        name,
        x,
        y: napierianAbsorptions_percm,
      })),
      { name: "engine, any scale", x, y: engine.shares.map((share) => (share / brightest) * strongest) },
    ],
  });
}

/**
 * Who takes the light between the window and the depth to which a layer has to cure.
 * @example
 * ```ts
 * import { lightTakenOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { takenTable } from "resinwright/notebook";
 * const table = takenTable(lightTakenOf(openBrief("data/briefs/flow-cell.json")));
 * table.rows.map(([taker]) => taker); // → ["BAPO", "BBOT", "the resin itself", "goes through"]
 * ```
 */
export function takenTable({ depth_um, takers, transmitted }: LightTaken): TableContent {
  const rows = [...takers, { name: "goes through", ...transmitted }];
  return tableOf({
    caption: `Who takes the light in the first ${depth_um} µm, with 95 % intervals`,
    rows: rows.map(({ name, share }) => ({ taker: name, share_pct: percent(share) })),
    columns: [{ key: "taker" }, { key: "share_pct", name: "share of the light" }],
  });
}

/**
 * Initiators or absorbers as answers to one question, in the order given: hazard statements, long-term harm first, level, share
 * of the draws in which it works, and why.
 * @example
 * ```ts
 * import { absorberCandidates } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { candidateTable } from "resinwright/notebook";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const candidates = absorberCandidates({ ...work, wanted: { penetrationDepth_um: 70 }, draws: 50 });
 * candidateTable("Absorbers for 70 µm", candidates).columns.map(({ name }) => name); // → ["candidate", "hazards", "level", "works", "what to know"]
 * ```
 */
export function candidateTable(
  caption: string,
  answers: readonly (LevelAnswer | InitiatorAnswer)[],
): TableContent {
  return tableOf({
    caption,
    rows: answers.map((answer) => {
      const found = "massFraction" in answer;
      return {
        candidate: answer.ingredient,
        hazards: hazardsText(answer),
        level_pct: found ? percent(answer.massFraction) : null,
        works: found ? worksText(answer) : answer.outcome,
        know: [answer.reason, ...answer.warnings.filter(ofCandidate).map(({ message }) => message)].join(" "),
      };
    }),
    columns: [
      { key: "candidate" },
      { key: "hazards", align: "left" },
      { key: "level_pct", name: "level", unit: "mass %" },
      { key: "works", align: "left" },
      { key: "know", name: "what to know", align: "left" },
    ],
  });
}

/** Warnings that are the candidate's own and not in a column; those of the working curve stand with the decision. */
const ofCandidate = ({ code }: { readonly code: string }): boolean =>
  ["long-term-harm", "solubility-unknown"].includes(code);

function worksText({ reachedShare, warnings }: LevelFound): string {
  const unknown = warnings.some(({ code }) => code === "solubility-unknown");
  return `in ${sharePercent(reachedShare)} % of draws${unknown ? ", if it dissolves" : ""}`;
}

function hazardsText({ hazards }: LevelAnswer): string {
  if (hazards === undefined) return "not checked";
  return hazards.length === 0 ? "none found" : hazards.join(", ");
}

/**
 * One formulation under every engine on the shelf.
 * @example
 * ```ts
 * import { compareEngines } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { engineTable } from "resinwright/notebook";
 * const table = engineTable(compareEngines({ ...openBrief("data/briefs/flow-cell.json"), draws: 50 }));
 * table.rows.map(([engine]) => engine); // → ["led-387", "led-412"]
 * ```
 */
export function engineTable(engines: readonly EngineComparison[]): TableContent {
  return tableOf({
    caption:
      "This resin under every engine on the shelf, at the irradiance of the brief, with 95 % intervals",
    rows: engines.map((one) =>
      one.outcome === "compared"
        ? {
            engine: one.engine,
            opticalDepth_um: one.opticalDepth_um,
            penetrationDepth_um: one.penetrationDepth_um,
            criticalExposure_mJcm2: one.criticalExposure_mJcm2,
            layerExposure_mJcm2: one.layerExposure_mJcm2,
            note: one.penetrationDepth_um.warnings.some(({ code }) => code === "working-curve-estimated")
              ? "estimated"
              : "measured working curve",
          }
        : {
            engine: one.engine,
            opticalDepth_um: null,
            penetrationDepth_um: null,
            criticalExposure_mJcm2: null,
            layerExposure_mJcm2: null,
            note: one.reason,
          },
    ),
    columns: [
      { key: "engine" },
      { key: "opticalDepth_um" },
      { key: "penetrationDepth_um" },
      { key: "criticalExposure_mJcm2" },
      { key: "layerExposure_mJcm2" },
      { key: "note", name: "stands on", align: "left" },
    ],
  });
}

const percent = ({ value, low, high, level }: Interval): Interval => ({
  value: 100 * value,
  low: 100 * low,
  high: 100 * high,
  level,
});
