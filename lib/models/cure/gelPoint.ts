// The gel point from the number of arms: at which conversion the network first spans the vessel. Ideal theory, no loops.
import { checkNumber, checkNumbers, positive } from "../../door.js";

/** The gel point, or the finding that so few arms never make a network. */
export type GelPoint =
  { readonly outcome: "gels"; readonly conversion: number } | { readonly outcome: "never-gels" };

/**
 * Gel point of a step-growth network of A and B groups, such as thiol and ene: conversion of the A groups, 0 to 1.
 *
 * - `functionalityA`, `functionalityB`: groups per molecule, 1 or more; of a mixture the weighted mean sum(n f^2) / sum(n f).
 * - `groupRatio`: r, A groups over B groups, above 0; 1 when balanced.
 *
 * r p^2 = 1 / ((fA - 1)(fB - 1)), p the conversion of A; of B it is r p. It gels only if neither has to exceed 1.
 *
 * Assumes equal reactivity, no loops, A reacting with B only. Real systems gel later because of loops.
 * @throws InputError when an argument is out of range.
 * @source P. J. Flory, Principles of Polymer Chemistry, Cornell 1953, chapter 9; W. H. Stockmayer, J. Polym. Sci. 9 (1952) 69;
 * C. W. Macosko, D. R. Miller, Macromolecules 9 (1976) 199-206, doi 10.1021/ma60050a003 (all from memory).
 * @example
 * ```ts
 * import { stepGelPoint } from "resinwright";
 * const gel = stepGelPoint({ functionalityA: 4, functionalityB: 2, groupRatio: 1 });
 * gel.outcome === "gels" && gel.conversion; // → 0.57735
 * ```
 */
export function stepGelPoint(input: {
  readonly functionalityA: number;
  readonly functionalityB: number;
  readonly groupRatio: number;
}): GelPoint {
  checkNumbers("stepGelPoint", input, {
    functionalityA: functionality,
    functionalityB: functionality,
    groupRatio: positive,
  });
  const { functionalityA: fA, functionalityB: fB, groupRatio: r } = input;
  return atMost(Math.sqrt(1 / (r * (fA - 1) * (fB - 1))), Math.min(1, 1 / r));
}

/**
 * Gel point of a step-growth network of one kind of group that reacts with itself: conversion, 0 to 1.
 *
 * - `functionality`: groups per molecule, 1 or more; of a mixture the weighted mean sum(n f^2) / sum(n f).
 *
 * p = 1 / (f - 1). Assumes equal reactivity and no loops.
 * @throws InputError when the functionality is below 1.
 * @source As `stepGelPoint`.
 * @example
 * ```ts
 * import { selfReactingGelPoint } from "resinwright";
 * const gel = selfReactingGelPoint({ functionality: 3 });
 * gel.outcome === "gels" && gel.conversion; // → 0.5
 * ```
 */
export function selfReactingGelPoint(input: { readonly functionality: number }): GelPoint {
  checkNumbers("selfReactingGelPoint", input, { functionality });
  return atMost(1 / (input.functionality - 1), 1);
}

/**
 * Gel point of a chain-growth network: conversion of the double bonds, 0 to 1.
 *
 * - `chainLength`: weight-average number of units in a primary chain, Xw, above 1; as if every crosslink were cut.
 * - `crosslinkerShare`: share of all double bonds that sit in crosslinkers (two or more a molecule), above 0, at most 1.
 *
 * A network needs one crosslinked unit per weight-average chain: rho (Xw - 1) = 1. A bond of a crosslinker is crosslinked when
 * its partner has reacted too, so rho = share X and X = 1 / (share (Xw - 1)).
 *
 * Assumes equal reactivity of all double bonds, crosslinkers with two, and no loops. Real diacrylates lose many crosslinks to
 * loops and gel at a few percent (from memory), well above this.
 * @throws InputError when an argument is out of range.
 * @source W. H. Stockmayer, J. Chem. Phys. 12 (1944) 125-131, doi 10.1063/1.1723922 (from memory).
 * @example
 * ```ts
 * import { chainGelPoint } from "resinwright";
 * const gel = chainGelPoint({ chainLength: 1000, crosslinkerShare: 0.5 });
 * gel.outcome === "gels" && gel.conversion; // → 0.002002
 * ```
 */
export function chainGelPoint(input: {
  readonly chainLength: number;
  readonly crosslinkerShare: number;
}): GelPoint {
  const where = "chainGelPoint";
  checkNumber(input.chainLength, { where, field: "chainLength", min: 1, above: true });
  checkNumber(input.crosslinkerShare, { where, field: "crosslinkerShare", ...positive, max: 1 });
  return atMost(1 / (input.crosslinkerShare * (input.chainLength - 1)), 1);
}

const functionality = { min: 1 } as const;

const atMost = (conversion: number, limit: number): GelPoint =>
  conversion <= limit ? { outcome: "gels", conversion } : { outcome: "never-gels" };
