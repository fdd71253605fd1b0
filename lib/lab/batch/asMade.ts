// What was really made: the actual masses back in, the formulation that came of them, and which properties it changes.

import { checkNumber, InputError, notNegative } from "../../door.js";
import { assess } from "../../assess/assess.js";
import type { DrawOptions } from "../../assess/doubt.js";
import type { NeverCures, Property, Verdict } from "../../assess/property.js";
import type { Case } from "../../assess/case.js";
import type { PropertyName } from "../../recipe/brief.js";
import type { Formulation } from "../../recipe/formulation.js";
import { propertyNames } from "../../recipe/propertyNames.js";
import { ingredientOn } from "../../recipe/shelf.js";
import { weighingUncertainty } from "./balance.js";
import { mixtureUncertainties } from "./uncertainty.js";
import type { Portion, WeighOutSheet } from "./weighOut.js";

/** What the balance showed for a line of the sheet. */
export interface Weighing {
  readonly line: number;
  readonly mass_g: number;
  /** As the bottle says. Where the shelf knows the lot, its measured figures are used. */
  readonly lot?: string;
}

/** An ingredient as planned and as made. */
export interface MadePart {
  readonly ingredient: string;
  readonly plannedMassFraction: number;
  readonly massFraction: number;
  /** Standard uncertainty of the mass fraction, from the weighings. */
  readonly u: number;
  /** massFraction / plannedMassFraction - 1. */
  readonly relativeChange: number;
  /** Whether the change is within the accuracy that was asked for. */
  readonly within: boolean;
}

/** A property before and after; `changed` says whether anyone has to care. */
export interface PropertyChange {
  readonly property: PropertyName;
  readonly title: string;
  readonly unit: string;
  readonly before: Property | NeverCures;
  readonly after: Property | NeverCures;
  /** after / before - 1; null where one of them never cures. */
  readonly relativeChange: number | null;
  readonly verdictBefore: Verdict["outcome"] | null;
  readonly verdictAfter: Verdict["outcome"] | null;
  /** By more than the accuracy asked for the mass fractions, to another verdict, or to or from never curing. */
  readonly changed: boolean;
}

/** A batch as it was made. */
export interface AsMade {
  readonly formulation: Formulation;
  readonly total_g: number;
  readonly parts: readonly MadePart[];
  /** The lines as a batch record takes them. */
  readonly lines: readonly { ingredient: string; lot: string; target_g: number; actual_g: number }[];
  /** Empty unless a brief and a shelf were given. */
  readonly changes: readonly PropertyChange[];
}

/**
 * The formulation that was really made, from the masses weighed, and what that changes.
 *
 * Mass fractions w_i = sum_p c_pi m_p / M, their uncertainties as {@link massFractionUncertainties}; master batches are taken to be
 * made as the sheet says. With `work`, the planned and the made formulation are assessed with the same draws and compared;
 * the weighing uncertainty is not in those intervals.
 * @param input - `sheet`; `weighings`, one for each line, 0 g for what was left out; `work`, a brief with its shelf; draw options.
 * @throws InputError when a line is missing, given twice or unknown, a mass is out of range, nothing was weighed, or a lot is of
 * another ingredient; as {@link assess}.
 * @source Uncertainty: JCGM 100:2008 (GUM), equation 10.
 * @example
 * ```ts
 * import { asMade, weighOut } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const balance = { readability_g: 0.01, repeatability_g: 0.01, capacity_g: 2000 };
 * const sheet = weighOut({ formulation: work.formulation, batch_g: 1000, balance, weighingAccuracy: 0.1 });
 * const weighings = sheet.portions.map(({ line, target_g }) => ({ line, mass_g: line === 6 ? 600 : target_g }));
 * const made = asMade({ sheet, weighings, work, draws: 200 });
 * made.parts[0].massFraction; // → 0.5714
 * made.changes.filter(({ changed }) => changed).map(({ property }) => property).includes("viscosity_mPas"); // → true
 * ```
 */
export function asMade({
  sheet,
  weighings,
  work,
  ...options
}: DrawOptions & {
  sheet: WeighOutSheet;
  weighings: readonly Weighing[];
  work?: Omit<Case, "formulation">;
}): AsMade {
  const { formulation: planned, accuracy } = sheet;
  const where = `batch of "${planned.id}"`;
  const given = inLines(where, sheet.portions, weighings);
  const total_g = given.reduce((sum, { mass_g }) => sum + mass_g, 0);
  checkNumber(total_g, { where, field: "the sum of mass_g", min: 0, above: true });
  const u = uncertaintiesOf(sheet, given);
  const components = planned.components.map((component) => {
    const { ingredient } = component;
    const mass_g = given.reduce((sum, { portion, mass_g }) => sum + shareIn(portion, ingredient) * mass_g, 0);
    const lot = given.find(({ portion }) => shareIn(portion, ingredient) === 1)?.lot ?? "";
    const known = work !== undefined && work.shelf.lots.has(lot);
    return {
      ingredient: known ? ingredientOn(work.shelf, where, ingredient.id, lot) : ingredient,
      massFraction: mass_g / total_g,
    };
  });
  const formulation = { id: `${planned.id}-as-made`, title: `${planned.title}, as made`, components };
  return {
    formulation,
    total_g,
    parts: components.map(({ ingredient, massFraction }, i) => {
      const before = planned.components[i]!.massFraction;
      const relativeChange = before === 0 ? 0 : massFraction / before - 1;
      return {
        ingredient: ingredient.id,
        plannedMassFraction: before,
        massFraction,
        u: u[i]!,
        relativeChange,
        within: Math.abs(relativeChange) <= accuracy * (1 + 1e-9),
      };
    }),
    lines: given.map(({ portion, mass_g, lot }) => ({
      ingredient: portion.label,
      lot,
      target_g: portion.target_g,
      actual_g: mass_g,
    })),
    changes: work === undefined ? [] : changesOf({ ...options, planned, formulation, accuracy, work }),
  };
}

interface Given {
  readonly portion: Portion;
  readonly mass_g: number;
  readonly lot: string;
}

/** The weighings beside their lines, each line once. */
function inLines(where: string, portions: readonly Portion[], weighings: readonly Weighing[]): Given[] {
  checkLines(where, portions, weighings);
  return portions.map((portion) => {
    const weighing = weighings.find(({ line }) => line === portion.line);
    if (weighing === undefined) {
      throw new InputError(
        `${where}: line ${portion.line} (${portion.label}) has no weighing; give its mass_g, 0 if it was left out`,
      );
    }
    return { portion, mass_g: weighing.mass_g, lot: weighing.lot ?? portion.lot };
  });
}

/** Refuses a line that is unknown or given twice, and a mass that is none. */
export function checkLines(
  where: string,
  portions: readonly Portion[],
  weighings: readonly Weighing[],
): void {
  weighings.forEach(({ line, mass_g }, i) => {
    if (!portions.some((portion) => portion.line === line)) {
      throw new InputError(
        `${where}: weighings[${i}].line is ${line}; the sheet has lines 1 to ${portions.length}`,
      );
    }
    if (weighings.findIndex((one) => one.line === line) !== i)
      throw new InputError(`${where}: line ${line} is weighed twice; add the two masses up`);
    checkNumber(mass_g, { where, field: `weighings[${i}].mass_g`, ...notNegative });
  });
}

/** How much of an ingredient a portion holds; lots of one ingredient are told apart. */
function shareIn({ contents }: Portion, ingredient: Formulation["components"][number]["ingredient"]): number {
  return contents.find((content) => content.ingredient === ingredient)?.massFraction ?? 0;
}

function uncertaintiesOf({ formulation, balance }: WeighOutSheet, given: readonly Given[]): number[] {
  return mixtureUncertainties(
    given.map(({ portion, mass_g }) => ({
      mass_g,
      u_g: weighingUncertainty({ balance, loads: Math.ceil(mass_g / balance.capacity_g) || 1 }),
      fractions: formulation.components.map(({ ingredient }) => {
        const content = portion.contents.find((one) => one.ingredient === ingredient);
        return content ?? { massFraction: 0, u: 0 };
      }),
    })),
  );
}

function changesOf({
  planned,
  formulation,
  accuracy,
  work,
  ...options
}: DrawOptions & {
  planned: Formulation;
  formulation: Formulation;
  accuracy: number;
  work: Omit<Case, "formulation">;
}): PropertyChange[] {
  const was = assess({ ...work, ...options, formulation: planned });
  const is = assess({ ...work, ...options, formulation });
  return propertyNames.map((property): PropertyChange => {
    const [before, after] = [was.properties[property], is.properties[property]];
    const verdict = (verdicts: readonly Verdict[]) =>
      verdicts.find((one) => one.property === property)?.outcome ?? null;
    const [verdictBefore, verdictAfter] = [verdict(was.verdicts), verdict(is.verdicts)];
    const bothCure = before.outcome === "value" && after.outcome === "value";
    const relativeChange = bothCure && before.value !== 0 ? after.value / before.value - 1 : null;
    const moved =
      relativeChange === null ? before.outcome !== after.outcome : Math.abs(relativeChange) > accuracy;
    const { title, unit } = after;
    return {
      ...{ property, title, unit, before, after, relativeChange, verdictBefore, verdictAfter },
      changed: moved || verdictBefore !== verdictAfter,
    };
  });
}
