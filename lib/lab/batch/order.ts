// In which order a resin goes together, and why: what dissolves goes into thin liquid, and into enough of it; what starts the
// reaction waits for amber light, what is thick comes warm, what settles comes last.

import { isLiquid, type Component, type Formulation } from "../../recipe/formulation.js";
import type { Role } from "../../recipe/ingredient.js";
import { hasToDissolve, percentText, solubilityOf, surelyDissolves } from "./dissolving.js";

/** One step of putting a resin together. */
export interface Addition extends Component {
  readonly reason: string;
  /** Under amber light from this step on: an initiator is in the vessel. */
  readonly amberLight: boolean;
}

/**
 * The ingredients of a formulation in the order to add them, each with its reason.
 *
 * The thinnest liquid first; inhibitor, absorber and initiator into it; the other diluents, thinnest first; oligomers, warmed;
 * pigment and filler last. A solid whose share of what is in the vessel would be above its solubility on the shelf, less one
 * standard uncertainty, waits for the other diluents; where these are not enough, its reason says when it may clear. What has no
 * share is left out. Where the shelf has no solubility, see that the liquid is clear before going on.
 * @example
 * ```ts
 * import { orderOfAddition } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * orderOfAddition(formulation).map(({ ingredient }) => ingredient.id); // → ["IBOA", "MEHQ", "TEGDMA", "BBOT", "BAPO", "UDMA"]
 * ```
 */
export function orderOfAddition({ components }: Formulation): Addition[] {
  return inOrder(components);
}

/** What goes in at a step: an ingredient by itself, or a master batch of it, which is a solution already. */
export interface Entry extends Component {
  readonly dissolved?: boolean;
}

/** The entries in the order to add them. */
export function inOrder<T extends Entry>(entries: readonly T[]): (T & Addition)[] {
  const ordered = sorted(entries.filter(({ massFraction }) => massFraction > 0));
  let amberLight = false;
  return ordered.map((one, i) => {
    amberLight ||= one.ingredient.role === "photoinitiator";
    const reason = i === 0 && isLiquid(one) ? baseReason : reasons[one.ingredient.role];
    return { ...one, reason: reason + clearText(ordered, i), amberLight };
  });
}

function sorted<T extends Entry>(present: readonly T[]): T[] {
  const [base] = present.filter(isLiquid).sort(thinnestFirst);
  const waiting = present
    .filter((one) => one !== base)
    .sort((a, b) => stepOf(a) - stepOf(b) || thinnestFirst(a, b));
  const ordered = base === undefined ? [] : [base];
  while (waiting.length > 0) {
    const enough = clearsAt([...ordered, waiting[0]!], ordered.length);
    const diluent = waiting.findIndex(({ ingredient }) => ingredient.role === "diluent");
    ordered.push(...waiting.splice(enough ? 0 : Math.max(0, diluent), 1));
  }
  return ordered;
}

/** The share of an ingredient, all its lots together, in what is in the vessel after the last of `entries`. */
function shareOf({ ingredient }: Entry, entries: readonly Entry[]): number {
  const sum = (some: readonly Entry[]) => some.reduce((total, { massFraction }) => total + massFraction, 0);
  return sum(entries.filter((one) => one.ingredient.id === ingredient.id)) / sum(entries);
}

/** Whether step `i` is sure to be clear in what is in the vessel after the last of `entries`. */
function clearsAt(entries: readonly Entry[], i: number): boolean {
  const { dissolved, ingredient } = entries[i]!;
  return dissolved === true || surelyDissolves(ingredient, shareOf(entries[i]!, entries));
}

function clearText(ordered: readonly Entry[], i: number): string {
  const one = ordered[i]!;
  if (!hasToDissolve(one.ingredient)) return "";
  const clear = "stir until clear, no grain against the light";
  const after = (k: number) => ordered.slice(0, k + 1);
  if (clearsAt(after(i), i)) return `; ${clear}`;
  const here = `; it is ${percentText(shareOf(one, after(i)))} of what is in the vessel here, and the shelf says that ${solubilityOf(one.ingredient)!.text} dissolves`;
  const k = ordered.findIndex((_, j) => j > i && clearsAt(after(j), i));
  if (k === -1) return `${here}: it may never clear`;
  const then = `${ordered[k]!.ingredient.id} is in (${percentText(shareOf(one, after(k)))})`;
  return `${here}: clear, with no grain against the light, at the latest once ${then}`;
}

const baseReason = "the thinnest liquid first: solids dissolve fastest in it";

const steps: readonly (readonly Role[])[] = [
  ["inhibitor"],
  ["absorber"],
  ["photoinitiator", "synergist"],
  ["diluent"],
  ["oligomer"],
  ["pigment", "filler"],
];

function stepOf({ ingredient }: Component): number {
  return steps.findIndex((roles) => roles.includes(ingredient.role));
}

function thinnestFirst(a: Component, b: Component): number {
  const viscosity = ({ ingredient }: Component) => ingredient.viscosity_mPas?.value ?? Number.MAX_VALUE;
  return viscosity(a) - viscosity(b);
}

const reasons: Readonly<Record<Role, string>> = {
  inhibitor: "before anything that can start the reaction; it works only with air dissolved in the resin",
  absorber: "into the thin liquid, and before the initiator",
  photoinitiator: "into the thin liquid; from here on under amber light, vessel covered",
  synergist: "with the initiator; under amber light, vessel covered",
  diluent: "before the thick ones: it thins what follows",
  oligomer:
    "warmed until it pours, no warmer than its safety data sheet allows; stir until no streak is left",
  pigment: "last, little by little under shear; it settles, so stir again before every pour",
  filler: "last, little by little under shear; it settles, so stir again before every pour",
};
