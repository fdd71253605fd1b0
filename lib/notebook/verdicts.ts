// An assessment in words: the value of a property, the verdict on it, one row a property. The one wording for tables, for the
// card at the head of a page and for what is computed in a page.

import type { Assessment } from "../assess/assess.js";
import type { NeverCures, Property, Verdict } from "../assess/property.js";
import { propertyNames } from "../recipe/propertyNames.js";
import { intervalText } from "./digits.js";
import { sharePercent, targetText } from "./phrases.js";

/** A property of an assessment as it is shown; `target` and `verdict` are `null` where the brief sets no target. */
export interface AssessmentRow {
  readonly property: string;
  readonly unit: string;
  readonly value: string;
  readonly target: string | null;
  readonly verdict: string | null;
}

/** The rows of an assessment, in the order of the properties. */
export function assessmentRows({ properties, verdicts }: Assessment): AssessmentRow[] {
  const verdictOn = new Map(verdicts.map((verdict) => [verdict.property, verdict]));
  return propertyNames.map((name) => {
    const property = properties[name];
    const verdict = verdictOn.get(name);
    return {
      property: property.title,
      unit: property.unit,
      value: valueText(property),
      target: verdict === undefined ? null : targetText(verdict.target),
      verdict: verdict === undefined ? null : verdictText(verdict),
    };
  });
}

/**
 * A property as text without its unit: "450 (300 to 610)", or "never cures".
 * @example
 * ```ts
 * import { viscosityOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { valueText } from "resinwright/notebook";
 * const viscosity = viscosityOf(openBrief("data/briefs/flow-cell.json"));
 * valueText({ ...viscosity, value: 447.3, low: 301.2, high: 612.9 }); // → "450 (300 to 610)"
 * ```
 */
export function valueText(property: Property | NeverCures): string {
  return property.outcome === "value" ? intervalText(property) : "never cures";
}

/**
 * A verdict as text with its share of draws: "meets (98 % of draws)".
 * @example
 * ```ts
 * import { calibrate, verdictOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * import { verdictText } from "resinwright/notebook";
 * const work = calibrate(openBrief("data/briefs/flow-cell.json"));
 * const verdict = verdictOf({ ...work, property: "viscosity_mPas", target: { max: 50 } });
 * verdictText(verdict); // → "fails (0 % of draws)"
 * ```
 */
export function verdictText({ outcome, share }: Verdict): string {
  return `${outcome} (${sharePercent(share)} % of draws)`;
}
