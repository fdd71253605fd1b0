// The rules of the screening as their files state them: limits for mixtures, dated regulatory notes, notes on keeping and handling,
// heats of polymerisation. All of them age, so each says where and when it was read.

import { z } from "zod";
import { InputError } from "../../door.js";
import { readDocument, strict, type JsonDocument } from "../../recipe/document.js";
import { roles, type Role } from "../../recipe/ingredient.js";
import { idSchema, sourced, sourceText, statusSchema } from "../../recipe/sourced.js";
import type { SourcedValue, SourceStatus } from "../../result.js";

/** Where a rule or note was read, when that was said, and the ground it stands on. */
export interface Dated {
  readonly source: string;
  /** Year, or day, ISO 8601; of practice without a source, when it was written down. */
  readonly date: string;
  readonly status: SourceStatus;
}

/** From which content of which ingredients a mixture may have to carry a statement. */
export interface MixtureRule extends Dated {
  readonly id: string;
  readonly title: string;
  /** The statement the mixture may have to carry. */
  readonly statement: string;
  /** `single`: the ingredient with most of it counts; `sum`: all that carry one of the codes count together. */
  readonly how: "single" | "sum";
  /** What a percent of an ingredient with that code counts, without letters after the digits (`H360` is `H360FD` too). */
  readonly weights: Readonly<Record<string, number>>;
  readonly limit_pct: number;
  /** Rules that make this one idle when their limit is reached. */
  readonly unless?: readonly string[];
  /** Idle as soon as the mixture reaches a limit of a hazard statement (`H...`) that hangs on no condition. */
  readonly whenUnclassified?: true;
  /** What besides the content has to be so, and is not known here. */
  readonly condition?: string;
  readonly note?: string;
}

/** What an authority has said of a substance. */
export interface RegulatoryNote extends Dated {
  readonly cas: string;
  readonly substance: string;
  readonly region: string;
  readonly fact: string;
}

/** How to keep or handle a mixture; holds always, or when an ingredient has one of the roles or codes or is polymerisable. */
export interface HandlingNote extends Dated {
  readonly id: string;
  readonly kind: "storage" | "protection" | "law";
  readonly when?: {
    readonly roles?: readonly Role[];
    readonly codes?: readonly string[];
    /** Double bonds an ingredient must have at least. */
    readonly functionality?: number;
  };
  readonly text: string;
}

/** Heat of polymerisation by kind of double bond, and the heat capacity of the liquid. */
export interface PolymerisationHeats {
  readonly heatCapacity_JgK: SourcedValue;
  readonly classes: readonly {
    readonly title: string;
    readonly heatOfPolymerisation_Jmol: SourcedValue;
    /** Ids of the ingredients whose double bonds are of this kind. */
    readonly ingredients: readonly string[];
  }[];
  /** For every other ingredient with double bonds. */
  readonly otherHeatOfPolymerisation_Jmol: SourcedValue;
}

/** All that the screening goes by. */
export interface SafetyRules {
  readonly limits: readonly MixtureRule[];
  readonly regulatory: readonly RegulatoryNote[];
  readonly handling: readonly HandlingNote[];
  readonly heats: PolymerisationHeats;
}

/**
 * Reads a file of mixture limits.
 * @throws InputError with file, line and field; when two rules share an id or `unless` names none.
 * @example
 * ```ts
 * import { parseJson, readMixtureRules } from "resinwright";
 * const rule = `{ "id": "sensitiser", "title": "may cause an allergic skin reaction", "statement": "H317", "how": "single",
 *   "weights": { "H317": 1 }, "limit_pct": 1, "source": "house rule", "date": "2026", "status": "common practice" }`;
 * readMixtureRules(parseJson(`{ "rules": [${rule}] }`, "mine.json"))[0].limit_pct; // → 1
 * ```
 */
export function readMixtureRules(document: JsonDocument): MixtureRule[] {
  const { rules } = readDocument(mixtureSchema, document);
  const ids = rules.map(({ id }) => id);
  const twice = ids.find((id, i) => ids.indexOf(id) !== i);
  if (twice !== undefined)
    throw new InputError(`${document.where}: rule "${twice}" is given twice; rename one`);
  for (const { id, unless = [] } of rules) {
    const unknown = unless.find((one) => !ids.includes(one));
    if (unknown !== undefined) {
      throw new InputError(
        `${document.where}: rule "${id}" has unless "${unknown}", which is no rule of this file`,
      );
    }
  }
  return rules;
}

/**
 * Reads a file of regulatory notes.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readRegulatoryNotes } from "resinwright";
 * const note = `{ "cas": "119-61-9", "substance": "benzophenone", "region": "world", "fact": "Group 2B.",
 *   "date": "2013", "source": "IARC Monographs, volume 101", "status": "published" }`;
 * readRegulatoryNotes(parseJson(`{ "notes": [${note}] }`, "mine.json"))[0].date; // → "2013"
 * ```
 */
export function readRegulatoryNotes(document: JsonDocument): RegulatoryNote[] {
  return readDocument(regulatorySchema, document).notes;
}

/**
 * Reads a file of notes on keeping and handling.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readHandlingNotes } from "resinwright";
 * const note = `{ "id": "eyes", "kind": "protection", "text": "Eye protection.", "date": "2026",
 *   "source": "house rule", "status": "common practice" }`;
 * readHandlingNotes(parseJson(`{ "notes": [${note}] }`, "mine.json"))[0].kind; // → "protection"
 * ```
 */
export function readHandlingNotes(document: JsonDocument): HandlingNote[] {
  return readDocument(handlingSchema, document).notes;
}

/**
 * Reads a file of heats of polymerisation.
 * @throws InputError with file, line and field.
 * @example
 * ```ts
 * import { parseJson, readPolymerisationHeats } from "resinwright";
 * const figure = (value: number, u: number) => ({ value, u, source: "round number", status: "invented for the demo" });
 * const heats = { heatCapacity_JgK: figure(1.8, 0.2), classes: [], otherHeatOfPolymerisation_Jmol: figure(70000, 12000) };
 * readPolymerisationHeats(parseJson(JSON.stringify(heats), "mine.json")).otherHeatOfPolymerisation_Jmol.value; // → 70000
 * ```
 */
export function readPolymerisationHeats(document: JsonDocument): PolymerisationHeats {
  return readDocument(heatSchema, document);
}

const dated = {
  source: sourceText,
  date: z.string().regex(/^\d{4}(-\d\d-\d\d)?$/, { error: "must be a year or a day such as 2025-09-01" }),
  status: statusSchema,
};

const codeError = "must be a hazard statement code such as H317, without letters after it";
const code = z.string().regex(/^(H|EUH)\d{3}$/, { error: codeError });

const mixtureSchema: z.ZodType<{ rules: MixtureRule[] }> = strict({
  rules: z.array(
    strict({
      id: idSchema,
      title: z.string().min(3),
      statement: code,
      how: z.enum(["single", "sum"]),
      weights: z.record(code, z.number().positive(), {
        error: (issue) => (issue.code === "invalid_key" ? codeError : undefined),
      }),
      limit_pct: z.number().positive().max(100),
      unless: z.array(idSchema).optional(),
      whenUnclassified: z.literal(true).optional(),
      condition: z.string().min(3).optional(),
      note: z.string().min(3).optional(),
      ...dated,
    }),
  ),
});

const regulatorySchema: z.ZodType<{ notes: RegulatoryNote[] }> = strict({
  notes: z.array(
    strict({
      cas: z.string().min(7),
      substance: z.string().min(3),
      region: z.string().min(2),
      fact: z.string().min(3),
      ...dated,
    }),
  ),
});

const handlingSchema: z.ZodType<{ notes: HandlingNote[] }> = strict({
  notes: z.array(
    strict({
      id: idSchema,
      kind: z.enum(["storage", "protection", "law"]),
      when: strict({
        roles: z.array(z.enum(roles as [Role, ...Role[]])).optional(),
        codes: z.array(code).optional(),
        functionality: z.number().int().min(1).optional(),
      }).optional(),
      text: z.string().min(3),
      ...dated,
    }),
  ),
});

const heatOf = () => sourced("heatOfPolymerisation_Jmol", { above: 0, max: 2e5 });

const heatSchema: z.ZodType<PolymerisationHeats> = strict({
  heatCapacity_JgK: sourced("heatCapacity_JgK", { above: 0, max: 10 }),
  classes: z.array(
    strict({ title: z.string().min(3), heatOfPolymerisation_Jmol: heatOf(), ingredients: z.array(idSchema) }),
  ),
  otherHeatOfPolymerisation_Jmol: heatOf(),
});
