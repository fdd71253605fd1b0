// A formulation: what goes into the bottle as mass fractions, and the other ways of saying the same.

import { checkNumber, InputError, unknownName } from "../door.js";
import type { Ingredient, Role } from "./ingredient.js";
import { ingredientOn, type Shelf } from "./shelf.js";

/** One line of a formulation file: an ingredient (of a lot, if named) or a blend mixed before, and its share. */
export interface Part {
  readonly ingredient?: string;
  readonly lot?: string;
  /** Path of another formulation file, relative to this one. */
  readonly blend?: string;
  readonly mass_pct: number;
}

/** A formulation as its file states it. */
export interface Recipe {
  readonly id: string;
  readonly title: string;
  /** Parts by mass of any total are brought to 100 %. */
  readonly normalise: boolean;
  readonly parts: readonly Part[];
}

/** An ingredient with its share of the mass, 0 to 1. */
export interface Component {
  readonly ingredient: Ingredient;
  readonly massFraction: number;
}

/** What is in the bottle: each ingredient once, mass fractions adding up to 1. */
export interface Formulation {
  readonly id: string;
  readonly title: string;
  readonly components: readonly Component[];
}

/** A component seen every way: by mass, volume, amount, concentration, and per hundred parts of liquid. */
export interface CompositionRow extends Component {
  readonly volumeFraction: number;
  /** Undefined where an ingredient of the formulation has no molar mass. */
  readonly moleFraction?: number;
  readonly concentration_molL?: number;
  /** Grams for each hundred grams of diluents and oligomers; undefined where there are none. */
  readonly partsPerHundred?: number;
}

/** Gives the number to use for a figure of an ingredient: the stated value, or one drawn from its doubt. */
export type FigureReader = (
  ingredient: Ingredient,
  figure: "density_gcm3" | "molarMass_gmol",
) => number | undefined;

/**
 * Brings a recipe's parts to mass fractions; blends are taken apart into their ingredients.
 * @param input - `recipe`, the `shelf` its ingredients stand on, `blends` by the names its parts use.
 * @throws InputError when parts do not add up to 100 ± 0.05 and the recipe does not say `normalise`, when an ingredient or
 * blend is unknown, when a part names both or neither, when two parts are the same ingredient (of the same lot) or blend.
 * @example
 * ```ts
 * import { formulate } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const shelf = readShelf(["data"]);
 * const parts = [{ ingredient: "HDDA", mass_pct: 3 }, { ingredient: "IBOA", mass_pct: 1 }];
 * const blend = formulate({ recipe: { id: "two", title: "two diluents", normalise: true, parts }, shelf });
 * blend.components[0].massFraction; // → 0.75
 * ```
 */
export function formulate(input: FormulateInput): Formulation {
  return formulateAt(() => `formulation "${input.recipe.id}"`, input);
}

interface FormulateInput {
  readonly recipe: Recipe;
  readonly shelf: Shelf;
  readonly blends?: ReadonlyMap<string, Formulation>;
}

/** As {@link formulate}; `placeOf` names the place of a path in the recipe, for messages. @internal */
export function formulateAt(
  placeOf: (path: readonly PropertyKey[]) => string,
  { recipe, shelf, blends = new Map() }: FormulateInput,
): Formulation {
  const { parts } = recipe;
  const total = parts.reduce((sum, { mass_pct }) => sum + mass_pct, 0);
  if (!recipe.normalise && !(Math.abs(total - 100) <= 0.05)) {
    const shown = Number(total.toPrecision(8));
    throw new InputError(
      `${placeOf(["parts"])}: mass_pct adds up to ${shown}; parts must add up to 100 ± 0.05, or say "normalise": true`,
    );
  }
  if (!(total > 0)) {
    throw new InputError(
      `${placeOf(["parts"])}: mass_pct adds up to ${total}; at least one part must be above 0`,
    );
  }
  const components = parts.flatMap((part, i): Component[] => {
    const place = (field: keyof Part) => placeOf(["parts", i, field]);
    const share = part.mass_pct / total;
    if ((part.ingredient === undefined) === (part.blend === undefined)) {
      throw new InputError(
        `${placeOf(["parts", i])}: each part names either an ingredient or a blend, not both and not neither`,
      );
    }
    const twin = parts.slice(0, i).findIndex((one) => contentOf(one) === contentOf(part));
    if (twin >= 0) {
      throw new InputError(
        `${placeOf(["parts", i])}: ${contentOf(part)} stands in parts[${twin}] and in parts[${i}]; add the two mass_pct up and keep one of them`,
      );
    }
    if (part.ingredient !== undefined) {
      const ingredient = ingredientOn(shelf, place("ingredient"), part.ingredient);
      const { lot } = part;
      return [
        {
          ingredient: lot === undefined ? ingredient : ingredientOn(shelf, place("lot"), ingredient.id, lot),
          massFraction: share,
        },
      ];
    }
    const blend = blends.get(part.blend!);
    if (blend === undefined)
      throw new InputError(unknownName(place("blend"), "blend", part.blend!, [...blends.keys()]));
    return blend.components.map((one) => ({ ...one, massFraction: share * one.massFraction }));
  });
  return { id: recipe.id, title: recipe.title, components: merge(components) };
}

/**
 * Diluents and oligomers are the liquid; initiator, absorber and the like are dissolved or dispersed in it.
 * @example
 * ```ts
 * import { isLiquid } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * formulation.components.filter(isLiquid).map(({ ingredient }) => ingredient.id); // → ["UDMA", "IBOA", "TEGDMA"]
 * ```
 */
export function isLiquid({ ingredient }: Component): boolean {
  return ingredient.role === "diluent" || ingredient.role === "oligomer";
}

/**
 * Mass density, g/cm³, volumes taken as additive: 1 / sum(massFraction / density).
 * @param formulation - What is in the bottle.
 * @param read - Where the numbers come from; the stated values unless given.
 * @throws InputError when an ingredient has no density.
 * @example
 * ```ts
 * import { densityOf, formulate } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const shelf = readShelf(["data"]);
 * const parts = [{ ingredient: "IBOA", mass_pct: 100 }];
 * const neat = formulate({ recipe: { id: "neat", title: "one diluent", normalise: false, parts }, shelf });
 * densityOf(neat) === shelf.ingredients.get("IBOA")?.density_gcm3?.value; // → true
 * densityOf(neat, () => 1.2); // → 1.2
 * ```
 */
export function densityOf(formulation: Formulation, read: FigureReader = statedFigure): number {
  let volume_cm3g = 0;
  for (const one of formulation.components) volume_cm3g += specificVolume(formulation, one, read);
  return 1 / volume_cm3g;
}

/**
 * The composition every way: by mass, volume (taken as additive), amount and concentration.
 * @param formulation - What is in the bottle.
 * @param read - Where the numbers come from; the stated values unless given.
 * @throws InputError when an ingredient has no density.
 * @example
 * ```ts
 * import { composition } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const { rows } = composition(formulation);
 * rows.map(({ ingredient }) => ingredient.id); // → ["UDMA", "IBOA", "TEGDMA", "BAPO", "BBOT", "MEHQ"]
 * rows.reduce((sum, { volumeFraction }) => sum + volumeFraction, 0); // → 1.000000
 * ```
 */
export function composition(
  formulation: Formulation,
  read: FigureReader = statedFigure,
): { density_gcm3: number; rows: CompositionRow[] } {
  const { components } = formulation;
  const density_gcm3 = densityOf(formulation, read);
  const amounts_molg = components.map(({ ingredient, massFraction }) => {
    const molarMass = read(ingredient, "molarMass_gmol");
    return molarMass === undefined ? undefined : massFraction / molarMass;
  });
  const amount_molg = amounts_molg.includes(undefined) ? undefined : sum(amounts_molg as number[]);
  const liquid = sum(components.filter(isLiquid).map(({ massFraction }) => massFraction));
  const rows = components.map((component, i): CompositionRow => {
    const own_molg = amounts_molg[i];
    return {
      ...component,
      volumeFraction: specificVolume(formulation, component, read) * density_gcm3,
      moleFraction: amount_molg === undefined ? undefined : own_molg! / amount_molg,
      concentration_molL: own_molg === undefined ? undefined : own_molg * density_gcm3 * 1000,
      partsPerHundred: liquid > 0 ? (100 * component.massFraction) / liquid : undefined,
    };
  });
  return { density_gcm3, rows };
}

/**
 * The mass of each ingredient in a batch of `batch_g`.
 * @throws InputError when `batch_g` is not above 0.
 * @example
 * ```ts
 * import { batchMasses } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const [udma, iboa] = batchMasses(formulation, { batch_g: 500 });
 * udma.mass_g; // → 275.0
 * iboa.mass_g; // → 150.0
 * ```
 */
export function batchMasses(
  formulation: Formulation,
  { batch_g }: { batch_g: number },
): { ingredient: Ingredient; mass_g: number }[] {
  checkNumber(batch_g, { where: `formulation "${formulation.id}"`, field: "batch_g", min: 0, above: true });
  return formulation.components.map(({ ingredient, massFraction }) => ({
    ingredient,
    mass_g: massFraction * batch_g,
  }));
}

/**
 * The share of an ingredient, 0 to 1; 0 where it is not in the formulation.
 * @example
 * ```ts
 * import { massFractionOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * massFractionOf(formulation, "IBOA"); // → 0.3
 * massFractionOf(formulation, "HDDA"); // → 0
 * ```
 */
export function massFractionOf(formulation: Formulation, id: string): number {
  return sum(
    formulation.components.filter(({ ingredient }) => ingredient.id === id).map((one) => one.massFraction),
  );
}

/**
 * The ingredient of a role that there is most of.
 * @throws InputError when the formulation has none of that role.
 * @example
 * ```ts
 * import { largestOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * largestOf(formulation, "photoinitiator").id; // → "BAPO"
 * ```
 */
export function largestOf({ id, components }: Formulation, role: Role): Ingredient {
  const [largest] = byMass(components.filter(({ ingredient }) => ingredient.role === role));
  if (largest === undefined)
    throw new InputError(`formulation "${id}": no ${role} in it; add one (0 % will do)`);
  return largest.ingredient;
}

/**
 * The two liquids that there is most of, the thicker one first: the pair whose ratio sets the viscosity.
 * @throws InputError when there are fewer than two liquids or one of them has no viscosity.
 * @example
 * ```ts
 * import { mainPair } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const [thick, thin] = mainPair(formulation);
 * [thick.id, thin.id]; // → ["UDMA", "IBOA"]
 * ```
 */
export function mainPair({ id, components }: Formulation): [thick: Ingredient, thin: Ingredient] {
  const [first, second] = byMass(components.filter(isLiquid));
  if (first === undefined || second === undefined) {
    throw new InputError(
      `formulation "${id}": it has fewer than two liquids, so there is no ratio to vary; add a diluent or an oligomer`,
    );
  }
  const pair = [first.ingredient, second.ingredient] as const;
  const [a, b] = pair.map((ingredient) => {
    if (ingredient.viscosity_mPas !== undefined) return ingredient.viscosity_mPas.value;
    throw new InputError(
      `formulation "${id}": ${ingredient.id} has no viscosity_mPas; add it to the ingredient with its source and u`,
    );
  });
  return a! >= b! ? [pair[0], pair[1]] : [pair[1], pair[0]];
}

/**
 * The formulation with one ingredient at another share; the others keep their proportions.
 * @throws InputError when the ingredient is not in the formulation or `massFraction` is not from 0 to below 1.
 * @example
 * ```ts
 * import { massFractionOf, withMassFraction } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const darker = withMassFraction(formulation, { id: "BBOT", massFraction: 0.003 });
 * massFractionOf(darker, "BBOT"); // → 0.003
 * massFractionOf(darker, "UDMA") / massFractionOf(darker, "IBOA"); // → 1.8333
 * ```
 */
export function withMassFraction(
  formulation: Formulation,
  { id, massFraction }: { id: string; massFraction: number },
): Formulation {
  return withMassFractions(formulation, { [id]: massFraction });
}

/**
 * The formulation with several ingredients at other shares, each exactly the one given; the others keep their proportions.
 * @throws InputError when an ingredient is not in the formulation, a share is not from 0 to 1, or the shares add up to more
 * than 1; when nothing else is there to make up the rest.
 * @example
 * ```ts
 * import { massFractionOf, withMassFractions } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const changed = withMassFractions(formulation, { BAPO: 0.02, BBOT: 0.003 });
 * [massFractionOf(changed, "BAPO"), massFractionOf(changed, "BBOT")]; // → [0.02, 0.003]
 * massFractionOf(changed, "UDMA") / massFractionOf(changed, "IBOA"); // → 1.8333
 * ```
 */
export function withMassFractions(
  formulation: Formulation,
  massFractions: Readonly<Record<string, number>>,
): Formulation {
  const where = `formulation "${formulation.id}"`;
  const ids = Object.keys(massFractions);
  for (const id of ids) {
    checkNumber(massFractions[id], { where, field: `massFraction of ${id}`, min: 0, max: 1 });
    requirePresent(formulation, id);
  }
  const total = sum(Object.values(massFractions));
  if (total > 1) {
    throw new InputError(
      `${where}: the mass fractions of ${ids.join(", ")} add up to ${Number(total.toPrecision(8))}; together they must be at most 1`,
    );
  }
  const others = formulation.components.filter(({ ingredient }) => !ids.includes(ingredient.id));
  if (others.every(({ massFraction }) => massFraction === 0))
    throw new InputError(`${where}: ${ids.join(", ")} is alone in it; there is nothing to make up the rest`);
  const before = sum(ids.map((id) => massFractionOf(formulation, id)));
  return reweigh(formulation, new Map(Object.entries(massFractions)), (1 - total) / (1 - before));
}

/**
 * The formulation with two ingredients shared out anew between them: `share` of their common mass is `id`, the rest `against`.
 * @throws InputError when one of them is not in the formulation or `share` is not from 0 to 1.
 * @example
 * ```ts
 * import { massFractionOf, withRatio } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const thinner = withRatio(formulation, { id: "UDMA", against: "IBOA", share: 0.6 });
 * massFractionOf(thinner, "UDMA"); // → 0.5100
 * massFractionOf(thinner, "IBOA"); // → 0.3400
 * ```
 */
export function withRatio(
  formulation: Formulation,
  { id, against, share }: { id: string; against: string; share: number },
): Formulation {
  checkNumber(share, { where: `formulation "${formulation.id}"`, field: "share", min: 0, max: 1 });
  return withShares(formulation, { [id]: share, [against]: 1 - share });
}

/**
 * The formulation with several ingredients shared out anew between them: of their common mass each gets its share.
 * @throws InputError when one is not in the formulation, a share is not from 0 to 1, or they do not add up to 1 within 1e-9.
 * @example
 * ```ts
 * import { massFractionOf, withShares } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const changed = withShares(formulation, { UDMA: 0.5, IBOA: 0.25, TEGDMA: 0.25 });
 * massFractionOf(changed, "UDMA"); // → 0.493
 * ```
 */
export function withShares(formulation: Formulation, shares: Readonly<Record<string, number>>): Formulation {
  const where = `formulation "${formulation.id}"`;
  const ids = Object.keys(shares);
  for (const id of ids) {
    requirePresent(formulation, id);
    checkNumber(shares[id], { where, field: `share of ${id}`, min: 0, max: 1 });
  }
  const total = sum(Object.values(shares));
  if (Math.abs(total - 1) > 1e-9) {
    throw new InputError(`${where}: shares add up to ${Number(total.toPrecision(8))}; they must add up to 1`);
  }
  const common = sum(ids.map((id) => massFractionOf(formulation, id)));
  return reweigh(formulation, new Map(ids.map((id) => [id, shares[id]! * common])), 1);
}

/** Volume that a component takes up in a gram of the formulation, cm³. */
function specificVolume(
  { id }: Formulation,
  { ingredient, massFraction }: Component,
  read: FigureReader,
): number {
  const density = read(ingredient, "density_gcm3");
  if (density !== undefined) return massFraction / density;
  throw new InputError(
    `formulation "${id}": ${ingredient.id} has no density_gcm3; add it to the ingredient with its source and u`,
  );
}

const statedFigure: FigureReader = (ingredient, figure) => ingredient[figure]?.value;

function byMass(components: readonly Component[]): Component[] {
  return [...components].sort((a, b) => b.massFraction - a.massFraction);
}

function requirePresent(formulation: Formulation, id: string): void {
  const known = formulation.components.map(({ ingredient }) => ingredient.id);
  if (known.includes(id)) return;
  throw new InputError(unknownName(`formulation "${formulation.id}"`, "ingredient", id, known));
}

/** Gives the named ingredients their new masses (lots of one keep their proportions) and all others `rest` times theirs. */
function reweigh(formulation: Formulation, masses: ReadonlyMap<string, number>, rest: number): Formulation {
  const components = formulation.components.map((one, i) => {
    const wanted = masses.get(one.ingredient.id);
    if (wanted === undefined) return { ...one, massFraction: one.massFraction * rest };
    const before = massFractionOf(formulation, one.ingredient.id);
    const isFirst =
      formulation.components.findIndex(({ ingredient }) => ingredient.id === one.ingredient.id) === i;
    const share = before > 0 ? one.massFraction / before : Number(isFirst);
    return { ...one, massFraction: wanted * share };
  });
  return { ...formulation, components };
}

/** What a part is, in words. */
function contentOf({ ingredient, lot, blend }: Part): string {
  if (ingredient === undefined) return `the blend "${blend}"`;
  return lot === undefined ? ingredient : `${ingredient} of lot ${lot}`;
}

function merge(components: readonly Component[]): Component[] {
  const merged = new Map<string, Component>();
  for (const one of components) {
    const key = `${one.ingredient.id} ${one.ingredient.lot?.id ?? ""}`;
    merged.set(key, { ...one, massFraction: one.massFraction + (merged.get(key)?.massFraction ?? 0) });
  }
  return [...merged.values()];
}

function sum(values: readonly number[]): number {
  return values.reduce((total, value) => total + value, 0);
}
