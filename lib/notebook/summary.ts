// The card at the head of a page: what was asked, of which formulation, what was decided, how it stands, what to beware of.

import { assess, type Assessment } from "../assess/assess.js";
import type { Case } from "../assess/case.js";
import { composition, type Formulation } from "../recipe/formulation.js";
import type { Brief } from "../recipe/brief.js";
import { numberText } from "./digits.js";
import { lightText, windowText } from "./phrases.js";
import { assessmentRows, type AssessmentRow } from "./verdicts.js";

/** A card as data; each text stands on a line of its own. */
export interface SummaryContent {
  readonly kind: "summary";
  readonly asked: readonly string[];
  readonly formulation: readonly string[];
  readonly decided: string;
  /** The properties the brief sets a target on. */
  readonly rows: readonly AssessmentRow[];
  readonly cautions: readonly string[];
}

/**
 * The card of a decision on a case, which is assessed for it.
 * @throws InputError as {@link assess}.
 */
export function summaryOf({ work, decided }: { work: Case; decided: string }): SummaryContent {
  const assessment = assess(work);
  return {
    kind: "summary",
    asked: [work.brief.title, conditionsText(work.brief)],
    formulation: [work.formulation.title, compositionText(work.formulation)],
    decided,
    rows: assessmentRows(assessment).filter(({ target }) => target !== null),
    cautions: cautionsFor(work.formulation, assessment),
  };
}

function conditionsText(brief: Brief): string {
  const layer = `layers of ${numberText(brief.layerThickness_um)} µm at ${numberText(brief.temperature_C)} °C`;
  return `${lightText(brief)}; ${windowText(brief)}; ${layer}`;
}

function compositionText(formulation: Formulation): string {
  return composition(formulation)
    .rows.map(({ ingredient, massFraction }) => `${ingredient.id} ${numberText(100 * massFraction, 3)} %`)
    .join(", ");
}

function cautionsFor({ components }: Formulation, { avoided, warnings }: Assessment): string[] {
  const holders = new Map<string, string[]>();
  for (const { ingredient } of components) {
    for (const code of ingredient.hazards?.map(({ code }) => code) ?? ["not checked"]) {
      holders.set(code, [...(holders.get(code) ?? []), ingredient.id]);
    }
  }
  const statements = [...holders].sort(([a], [b]) => (a < b ? -1 : 1));
  const known = [...new Set(warnings.map(({ code }) => code.replaceAll("-", " ")))];
  return [
    ...avoided.map(({ ingredient, reason }) => `The brief says to avoid ${ingredient}: ${reason}.`),
    ...(known.length > 0 ? [`Before using the numbers, know: ${known.join("; ")}.`] : []),
    `Hazard statements: ${statements.map(([code, ids]) => `${code} (${ids.join(", ")})`).join(", ")}.`,
    "Uncured resin sensitises skin, for life; the engine's light harms eyes; resin that cures in bulk runs hot. Safety data sheets, local rules and a competent person decide.",
  ];
}
