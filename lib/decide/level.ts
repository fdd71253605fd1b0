// A level of initiator or absorber as an answer: found, more than dissolves, kept out by the brief, impossible, or unknown for
// want of data; each with its reason in words. And what both kinds of search share.

import { InputError, unknownName } from "../door.js";
import { avoidReasons } from "../assess/avoided.js";
import { figureOf, type Case } from "../assess/case.js";
import type { Read } from "../assess/doubt.js";
import { lightLack, lightModel } from "../assess/light.js";
import { shortText } from "../assess/shortText.js";
import type { Ingredient } from "../recipe/ingredient.js";
import { ingredientOn, type Shelf } from "../recipe/shelf.js";
import type { Interval, UsedSource, Warning } from "../result.js";
import { longTermHarm, weighedHazards } from "./longTermHarm.js";

/** What is told of every candidate. */
export interface Candidate {
  readonly ingredient: string;
  /** Codes of its hazard statements, long-term harm first, then sensitisers; absent means that nobody has looked. */
  readonly hazards?: readonly string[];
  readonly warnings: readonly Warning[];
  readonly sources: readonly UsedSource[];
}

/** A level that does what is wanted, or would if it dissolved. */
export interface LevelFound extends Candidate {
  readonly outcome: "reached" | "above solubility";
  readonly reason: string;
  /** Of the whole resin; an end at 0 or at 0.1, the most that is tried, means that some draws go beyond it. */
  readonly massFraction: Interval;
  /** Share of the draws, 0 to 1, in which such a level exists and dissolves, where it is known how much does. */
  readonly reachedShare: number;
}

/** Why there is no level to give: the brief avoids it, no level does it, or its data do not allow an answer. */
export interface LevelRefused extends Candidate {
  readonly outcome: "avoided" | "impossible" | "unknown";
  readonly reason: string;
}

/** A level of one initiator or absorber, or why there is none. */
export type LevelAnswer = LevelFound | LevelRefused;

/** Nobody puts more than a tenth of the mass of an initiator or absorber into a resin (common practice). @internal */
export const MOST_TRIED = 0.1;

/** What a level can be sought of. @internal */
export type SoughtRole = "absorber" | "photoinitiator";

/** A search for a level costs many runs of the model a draw. @internal */
export const SEARCH_DRAWS = 200;

/** The ingredient to search a level of: the one in the formulation (its lot counts), otherwise the one on the shelf. @internal */
export function soughtIngredient({ formulation, shelf }: Case, role: SoughtRole, id: string): Ingredient {
  const where = `formulation "${formulation.id}"`;
  const present = formulation.components.find(({ ingredient }) => ingredient.id === id)?.ingredient;
  const ingredient = present ?? ingredientOn(shelf, where, id);
  if (ingredient.role === role) return ingredient;
  throw new InputError(unknownName(where, role, id, idsOf(shelf, role)));
}

function idsOf({ ingredients }: Shelf, role: SoughtRole): string[] {
  return [...ingredients.values()].filter((one) => one.role === role).map(({ id }) => id);
}

/** The case with one ingredient at a level in place of all of its role; the others keep their proportions. @internal */
export function withOnly(input: Case, ingredient: Ingredient, massFraction: number): Case {
  const { formulation } = input;
  const others = formulation.components.filter((one) => one.ingredient.role !== ingredient.role);
  const rest = others.reduce((sum, one) => sum + one.massFraction, 0);
  if (rest === 0) {
    throw new InputError(
      `formulation "${formulation.id}": nothing but ${ingredient.role} in it; add the liquids`,
    );
  }
  const scaled = others.map((one) => ({
    ...one,
    massFraction: (one.massFraction * (1 - massFraction)) / rest,
  }));
  return {
    ...input,
    formulation: { ...formulation, components: [...scaled, { ingredient, massFraction }] },
  };
}

/** Why an ingredient cannot be searched at all; undefined where it can. @internal */
export function refusal(input: Case, ingredient: Ingredient): LevelRefused | undefined {
  const { id } = ingredient;
  const refused = (outcome: LevelRefused["outcome"], reason: string): LevelRefused => ({
    ...identityOf(ingredient),
    outcome,
    reason,
    warnings: outcome === "unknown" ? hazardWarnings(input, ingredient) : [],
    sources: [],
  });
  const [avoid] = avoidReasons(input.brief, ingredient);
  if (avoid !== undefined) return refused("avoided", `The brief avoids ${id}: ${avoid}.`);
  const trial = withOnly(input, ingredient, 0.001);
  const lack = lightLack(ingredient);
  if (lack !== undefined) return refused("unknown", `${id} ${lack}.`);
  try {
    lightModel(trial)(({ value }) => value);
  } catch (error) {
    if (error instanceof InputError) return refused("unknown", `${error.message}.`);
    throw error;
  }
  return undefined;
}

/** Solubility as a fraction of the mass in the present draw; undefined where nobody has stated one. @internal */
export function solubilityModel(ingredient: Ingredient): ((read: Read) => number) | undefined {
  const solubility = figureOf(ingredient, "solubility_pct");
  return solubility && ((read) => read(solubility) / 100);
}

/** Which substance an answer is about, and its hazards. @internal */
export function identityOf(ingredient: Ingredient): Pick<Candidate, "ingredient" | "hazards"> {
  const hazards = weighedHazards(ingredient);
  return { ingredient: ingredient.id, ...(hazards && { hazards }) };
}

/** What to know about a candidate before weighing it. @internal */
export function candidateWarnings(input: Case, ingredient: Ingredient): Warning[] {
  const hazards = hazardWarnings(input, ingredient);
  if (ingredient.solubility_pct !== undefined) return hazards;
  const signs = ingredient.state === "liquid" ? "haze or a second layer" : "crystals";
  return [
    ...hazards,
    {
      code: "solubility-unknown",
      message: `How much ${ingredient.id} dissolves is not on the shelf. Stir the level in, filter, leave it cold for a week and look for ${signs}; then add solubility_pct.`,
    },
  ];
}

function hazardWarnings({ brief }: Case, ingredient: Ingredient): Warning[] {
  const { id } = ingredient;
  const hazards = weighedHazards(ingredient);
  if (hazards === undefined) {
    const avoids = brief.avoid.some(({ hazard }) => hazard !== undefined);
    return [
      {
        code: "hazards-unchecked",
        message: `No hazard statement of ${id} is on the shelf because nobody has looked${avoids ? ", so whether the brief avoids it is not known" : ""}. Read its safety data sheet first.`,
      },
    ];
  }
  const harms = hazards.flatMap((code) => longTermHarm(code) ?? []);
  if (harms.length === 0) return [];
  return [
    {
      code: "long-term-harm",
      message: `${id}: ${harms.join(", ")}. The brief does not avoid it: take a candidate without such a statement if one will do.`,
    },
  ];
}

/** Percent of the mass, as a sentence says it. @internal */
export function percentText(massFraction: number): string {
  return `${shortText(100 * massFraction)} %`;
}

const outcomeOrder: readonly LevelAnswer["outcome"][] = [
  "reached",
  "above solubility",
  "unknown",
  "impossible",
  "avoided",
];

/**
 * The answers for every ingredient of a role on the shelf: what can be done first, of these what is listed for long-term harm last,
 * least needed first. @internal
 */
export function answersFor<A extends LevelAnswer>(
  shelf: Shelf,
  role: SoughtRole,
  answer: (id: string) => A,
): A[] {
  const harm = ({ hazards = [] }: LevelAnswer): number =>
    Number(hazards.some((code) => longTermHarm(code) !== undefined));
  const amount = (one: LevelAnswer): number => ("massFraction" in one ? one.massFraction.value : 0);
  return idsOf(shelf, role)
    .map(answer)
    .sort(
      (a, b) =>
        outcomeOrder.indexOf(a.outcome) - outcomeOrder.indexOf(b.outcome) ||
        harm(a) - harm(b) ||
        amount(a) - amount(b),
    );
}
