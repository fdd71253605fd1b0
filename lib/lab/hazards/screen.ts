// The hazard screening of a formulation: what is known of each ingredient, what the mixture may be, and what nobody has checked.

import type { DrawOptions } from "../../assess/doubt.js";
import type { Component, Formulation } from "../../recipe/formulation.js";
import type { HazardStatement } from "../../recipe/ingredient.js";
import { bareCode, flagMixture, type HazardFlag } from "./flags.js";
import type { HandlingNote, RegulatoryNote, SafetyRules } from "./rules.js";
import { temperatureRiseOf, type TemperatureRise } from "./temperatureRise.js";

/** An ingredient with the statements found for it; `checked` false means that nobody has looked. */
export interface ScreenedIngredient {
  readonly ingredient: string;
  readonly name: string;
  readonly massFraction: number;
  readonly checked: boolean;
  readonly statements: readonly HazardStatement[];
}

/** What a screening found. It is a screening: `caution` says what it is not. */
export interface HazardScreening {
  readonly formulation: string;
  readonly caution: string;
  readonly ingredients: readonly ScreenedIngredient[];
  /** Ingredients whose hazards nobody has checked; nothing in this screening speaks for them. */
  readonly notChecked: readonly string[];
  readonly flags: readonly HazardFlag[];
  /** Statements of ingredients that no rule here judges in a mixture, such as flammability, which is measured. */
  readonly notJudged: readonly { readonly code: string; readonly ingredients: readonly string[] }[];
  readonly regulatory: readonly RegulatoryNote[];
  readonly temperatureRise_K: TemperatureRise;
  readonly storage: readonly HandlingNote[];
  readonly protection: readonly HandlingNote[];
  readonly law: readonly HandlingNote[];
}

/**
 * Screens a formulation for hazards: statements of its ingredients, generic limits the mixture reaches, dated regulatory notes,
 * the temperature rise of a runaway, notes on keeping and handling.
 *
 * It classifies nothing and clears nothing: ingredients are taken by the statements on the shelf, most of them from memory, and
 * mixtures by generic limits, without specific limits, M-factors, sub-categories or tests.
 * @param input - `formulation`; `rules`; draw options for the temperature rise.
 * @throws InputError as {@link temperatureRiseOf}.
 * @example
 * ```ts
 * import { screenHazards } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const screening = screenHazards({ formulation, rules: readSafetyRules("data/rules") });
 * screening.notChecked; // → ["BBOT"]
 * screening.caution.startsWith("A screening, not a classification"); // → true
 * ```
 */
export function screenHazards({
  formulation,
  rules,
  ...options
}: DrawOptions & { formulation: Formulation; rules: SafetyRules }): HazardScreening {
  const present = formulation.components.filter(({ massFraction }) => massFraction > 0);
  const fitting = rules.handling.filter((note) => applies(note, present));
  const ofKind = (kind: HandlingNote["kind"]) => fitting.filter((note) => note.kind === kind);
  return {
    formulation: formulation.id,
    caution,
    ingredients: present.map(({ ingredient, massFraction }) => ({
      ingredient: ingredient.id,
      name: ingredient.name,
      massFraction,
      checked: ingredient.hazards !== undefined,
      statements: ingredient.hazards ?? [],
    })),
    notChecked: present.flatMap(({ ingredient }) =>
      ingredient.hazards === undefined ? [ingredient.id] : [],
    ),
    flags: flagMixture({ formulation, limits: rules.limits }),
    notJudged: notJudged(present, rules),
    regulatory: rules.regulatory.filter(({ cas }) =>
      present.some(({ ingredient }) => ingredient.cas === cas),
    ),
    temperatureRise_K: temperatureRiseOf({ formulation, heats: rules.heats, ...options }),
    storage: ofKind("storage"),
    protection: ofKind("protection"),
    law: ofKind("law"),
  };
}

const caution =
  "A screening, not a classification: it shows what to look at and clears nothing. The suppliers' safety data sheets, the law of the place and a competent person decide. Regulatory notes age: check the current lists. Residual monomer and initiator stay in cured parts; nothing here says that a part is fit for skin, food or medical use.";

function notJudged(present: readonly Component[], { limits }: SafetyRules): HazardScreening["notJudged"] {
  const judged = new Set(limits.flatMap(({ weights }) => Object.keys(weights)));
  const found = new Map<string, Set<string>>();
  for (const { ingredient } of present) {
    for (const { code } of ingredient.hazards ?? []) {
      if (judged.has(bareCode(code))) continue;
      found.set(code, (found.get(code) ?? new Set()).add(ingredient.id));
    }
  }
  return [...found].map(([code, ids]) => ({ code, ingredients: [...ids] }));
}

function applies({ when }: HandlingNote, present: readonly Component[]): boolean {
  if (when === undefined) return true;
  return present.some(
    ({ ingredient }) =>
      when.roles?.includes(ingredient.role) ||
      ingredient.hazards?.some(({ code }) => when.codes?.includes(bareCode(code))) ||
      (when.functionality !== undefined && (ingredient.functionality ?? 0) >= when.functionality),
  );
}
