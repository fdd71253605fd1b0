// Generic limits held against a mixture: what its content says it may be, never what it is in law.

import type { Component, Formulation } from "../../recipe/formulation.js";
import type { Dated, MixtureRule } from "./rules.js";

/** An ingredient that counts towards a limit, and the statement by which it does. */
export interface Contributor {
  readonly ingredient: string;
  readonly code: string;
  /** Its content times what the code counts. */
  readonly counts_pct: number;
}

/** A limit that the mixture reaches. */
export interface HazardFlag extends Dated {
  readonly rule: string;
  readonly statement: string;
  readonly title: string;
  /** `reached`, or `depends` on a condition that is not known here. */
  readonly outcome: "reached" | "depends";
  readonly content_pct: number;
  readonly limit_pct: number;
  readonly contributors: readonly Contributor[];
  readonly condition?: string;
  readonly note?: string;
}

/**
 * The limits that a mixture reaches, in the order of the rules.
 *
 * `single`: the largest of weight × content of one substance; `sum`: that of all together. A substance that carries several codes
 * of a rule counts by the one that weighs most; ingredients with one CAS number are one substance. Statements that are only for
 * mixtures not classified (EUH208, EUH210) are left out where the mixture is. Contents of any size count, also
 * those below the 1 % from which regulations look at irritants. Ingredients whose hazards nobody has checked count nothing here.
 * @param input - `formulation` and `limits`.
 * @example
 * ```ts
 * import { flagMixture } from "resinwright";
 * import { openBrief, readSafetyRules } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * const { limits } = readSafetyRules("data/rules");
 * flagMixture({ formulation, limits }).map(({ statement }) => statement)[0]; // → "H317"
 * ```
 */
export function flagMixture({
  formulation,
  limits,
}: {
  formulation: Formulation;
  limits: readonly MixtureRule[];
}): HazardFlag[] {
  const reached = limits
    .map((rule) => ({ rule, ...contentOf(rule, formulation) }))
    .filter(({ rule, content_pct }) => content_pct >= rule.limit_pct);
  const ids = reached.map(({ rule }) => rule.id);
  const classified = reached.some(
    ({ rule }) => rule.statement.startsWith("H") && rule.condition === undefined,
  );
  return reached
    .filter(({ rule }) => !rule.unless?.some((id) => ids.includes(id)))
    .filter(({ rule }) => !(classified && rule.whenUnclassified))
    .map(({ rule, content_pct, contributors }): HazardFlag => {
      const { id, statement, title, limit_pct, condition, note, source, date, status } = rule;
      const outcome = condition === undefined ? "reached" : "depends";
      return {
        ...{ rule: id, statement, title, outcome, content_pct, limit_pct, contributors },
        ...(condition === undefined ? {} : { condition }),
        ...(note === undefined ? {} : { note }),
        ...{ source, date, status },
      };
    });
}

/** A code without the letters that follow its digits: `H360FD` is `H360`. */
export function bareCode(code: string): string {
  return code.replace(/(\d{3}).*$/, "$1");
}

function contentOf(
  rule: MixtureRule,
  { components }: Formulation,
): Pick<HazardFlag, "content_pct" | "contributors"> {
  const substances = new Map<string, Contributor>();
  for (const component of components) {
    const { ingredient } = component;
    const one = contributorOf(rule, component);
    if (one === undefined) continue;
    const substance = ingredient.cas ?? ingredient.id;
    const before = substances.get(substance)?.counts_pct ?? 0;
    substances.set(substance, { ...one, counts_pct: before + one.counts_pct });
  }
  const contributors = [...substances.values()].sort((a, b) => b.counts_pct - a.counts_pct);
  const counts = contributors.map(({ counts_pct }) => counts_pct);
  const content = rule.how === "single" ? (counts[0] ?? 0) : counts.reduce((sum, one) => sum + one, 0);
  // Nine digits: fractions and weights that add up to the limit but for rounding noise have reached it.
  return { content_pct: Number(content.toPrecision(9)), contributors };
}

function contributorOf(
  { weights }: MixtureRule,
  { ingredient, massFraction }: Component,
): Contributor | undefined {
  const counting = (ingredient.hazards ?? [])
    .map(({ code }) => ({ code, weight: weights[bareCode(code)] ?? 0 }))
    .sort((a, b) => b.weight - a.weight);
  const [first] = counting;
  if (first === undefined || first.weight === 0 || massFraction === 0) return undefined;
  return { ingredient: ingredient.id, code: first.code, counts_pct: 100 * massFraction * first.weight };
}
