// Whether a solid dissolves where the plan puts it: its share of what is there, held against the shelf's solubility.

import type { Ingredient } from "../../recipe/ingredient.js";

/** What the shelf says dissolves of a solid, as mass fractions of the solution. */
export interface Solubility {
  /** As it stands there. */
  readonly stated: number;
  /** Less one standard uncertainty: what a plan may count on. */
  readonly sure: number;
  /** As people read it. */
  readonly text: string;
}

/** Whether an ingredient has to dissolve; pigments and fillers are dispersed. */
export function hasToDissolve({ state, role }: Ingredient): boolean {
  return state === "solid" && role !== "pigment" && role !== "filler";
}

/** The solubility of an ingredient that has to dissolve; undefined where the shelf has none. */
export function solubilityOf(ingredient: Ingredient): Solubility | undefined {
  const figure = ingredient.solubility_pct;
  if (figure === undefined || !hasToDissolve(ingredient)) return undefined;
  const { value, u } = figure;
  return {
    stated: value / 100,
    sure: Math.max(0, value - u) / 100,
    text: u === 0 ? `${value} %` : `${value} ± ${u} %`,
  };
}

/** Whether that share of it dissolves for sure, rounding noise apart; also where nothing is known against it. */
export function surelyDissolves(ingredient: Ingredient, massFraction: number): boolean {
  const solubility = solubilityOf(ingredient);
  return solubility === undefined || massFraction <= solubility.sure * (1 + 1e-9);
}

/** A share in percent, to the two digits that a solubility is worth. */
export function percentText(massFraction: number): string {
  return `${Number((100 * massFraction).toPrecision(2))} %`;
}
