// What the panel of a page shows of an assessment, and the formulation it hands out as a file.

import type { Assessment } from "../../assess/assess.js";
import type { Formulation, Recipe } from "../../recipe/formulation.js";
import { assessmentRows, type AssessmentRow } from "../verdicts.js";

/** An assessment in words. */
export interface Reading {
  readonly rows: readonly AssessmentRow[];
  readonly warnings: readonly string[];
  readonly draws: number;
  readonly level: number;
}

/** An assessment as the panel shows it; what the brief says to avoid stands first among the warnings. */
export function readingOf(assessment: Assessment): Reading {
  return {
    rows: assessmentRows(assessment),
    warnings: [
      ...assessment.avoided.map(
        ({ ingredient, reason }) => `It holds ${ingredient}, which the brief says to avoid: ${reason}.`,
      ),
      ...assessment.warnings.map(({ message }) => message),
    ],
    draws: assessment.draws,
    level: assessment.level,
  };
}

/** The formulation as the text of a file in `formulations/`, to eight significant digits. */
export function recipeText({ id, title, components }: Formulation): string {
  const recipe: Omit<Recipe, "normalise"> = {
    id: `${id}-tried`,
    title: `${title}, as tried on the page`,
    parts: components.map(({ ingredient, massFraction }) => ({
      ingredient: ingredient.id,
      ...(ingredient.lot !== undefined && { lot: ingredient.lot.id }),
      mass_pct: Number((100 * massFraction).toPrecision(8)),
    })),
  };
  const parts = recipe.parts.map((part) => `    ${JSON.stringify(part)}`).join(",\n");
  const head = JSON.stringify({ id: recipe.id, title: recipe.title }, undefined, 2).slice(0, -2);
  return `${head},\n  "parts": [\n${parts}\n  ]\n}\n`;
}
