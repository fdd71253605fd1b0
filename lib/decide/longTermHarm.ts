// Which hazard statements weigh in the choice between candidates: first those of harm that comes late and stays.

import type { Ingredient } from "../recipe/ingredient.js";

/** Statements of harm that comes late and stays, by their codes without letters (GHS; wording shortened, from memory). */
const harms: Readonly<Record<string, string>> = {
  H340: "may cause genetic defects",
  H341: "suspected of causing genetic defects",
  H350: "may cause cancer",
  H351: "suspected of causing cancer",
  H360: "may damage fertility or the unborn child",
  H361: "suspected of damaging fertility or the unborn child",
  H362: "may harm breast-fed children",
};

/** Skin and airways, for life. */
const sensitisers = ["H317", "H334"];

const bare = (code: string): string => code.slice(0, 4);

/** The harm of a statement in words; undefined where it is none of these. @internal */
export function longTermHarm(code: string): string | undefined {
  return harms[bare(code)];
}

/** Codes of the statements on the shelf, long-term harm first, then sensitisers; undefined where nobody has looked. @internal */
export function weighedHazards({ hazards }: Ingredient): string[] | undefined {
  const rank = (code: string): number =>
    longTermHarm(code) !== undefined ? 0 : sensitisers.includes(bare(code)) ? 1 : 2;
  return hazards?.map(({ code }) => code).sort((a, b) => rank(a) - rank(b));
}
