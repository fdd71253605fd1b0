// What a record can be, and what each kind has to hold before it is written.
// A record that stands is never held to these rules again: it is as it was written.

import {
  checkNumber,
  fraction,
  InputError,
  notNegative,
  positive,
  refuseUnknownKeys,
  show,
  type NumberRule,
} from "../../door.js";

/** Numbers or short text, units in the names: `{ viscosity_mPas: 318, spindle: "4 cm plate" }`. */
export type Figures = Readonly<Record<string, number | string>>;

/** What every record says. */
interface Common {
  /** The notebook, script or person it comes from. */
  readonly from: string;
  /** What was done, decided or found, in a sentence. */
  readonly statement: string;
  readonly brief?: string;
}

/** A version of a recipe. */
export interface RecipeRecord extends Common {
  readonly kind: "recipe";
  readonly formulation: string;
  /** Mass fractions, 0 to 1, adding up to 1 within 1e-6. */
  readonly parts: readonly {
    readonly ingredient: string;
    readonly lot?: string;
    readonly massFraction: number;
  }[];
}

/** A batch as it was weighed. */
export interface BatchRecord extends Common {
  readonly kind: "batch";
  readonly formulation: string;
  /** What it was weighed out from, by {@link dataHashOf}. */
  readonly dataHash?: string;
  /** The name on the bottle. */
  readonly batch: string;
  readonly lines: readonly {
    readonly ingredient: string;
    /** Empty where the bottle names none. */
    readonly lot: string;
    readonly target_g: number;
    readonly actual_g: number;
  }[];
}

/** Readings of one quantity. */
export interface MeasurementRecord extends Common {
  readonly kind: "measurement";
  readonly formulation: string;
  readonly batch?: string;
  /** What was read, its unit in the name: `viscosity_mPas`. */
  readonly quantity: string;
  /** Every reading, in the order it was taken. */
  readonly repeats: readonly number[];
  readonly instrument: string;
  readonly conditions: Figures;
}

/** A print made to try a resin or a setting. */
export interface PrintRecord extends Common {
  readonly kind: "print";
  readonly formulation: string;
  readonly batch?: string;
  readonly outcome: "printed" | "printed with faults" | "failed";
  readonly conditions: Figures;
  readonly figures: Figures;
}

/** What was decided, and the figures behind it. */
export interface DecisionRecord extends Common {
  readonly kind: "decision";
  readonly brief: string;
  readonly formulation: string;
  /** What the figures were computed from, by {@link dataHashOf}. */
  readonly dataHash?: string;
  readonly figures: Figures;
}

/** A correction of a record that stands: the old one stays, this one says what is right and why. */
export interface AmendmentRecord extends Common {
  readonly kind: "amendment";
  /** The id of the record it corrects. */
  readonly amends: string;
  readonly corrections: Figures;
}

/** A record to be written. */
export type NewRecord =
  RecipeRecord | BatchRecord | MeasurementRecord | PrintRecord | DecisionRecord | AmendmentRecord;

/** What the writing adds. */
export interface Written {
  /** When it was written, ISO 8601 in UTC, by the clock of that machine. */
  readonly at: string;
  /** Tells two records apart that say the same at the same time. */
  readonly nonce: string;
  /** Ids of the newest records it was written on: what ties the record together. */
  readonly after: readonly string[];
  /** Of this library, when it wrote the record; absent in records older than this field. */
  readonly libraryVersion?: string;
}

/** A record as it stands. */
export type LabRecord = NewRecord & Written;

/**
 * Refuses a record that its kind does not allow.
 * @throws InputError naming the field, what was given and what is allowed.
 */
export function checkRecord(record: NewRecord): void {
  if (typeof record !== "object" || record === null || Array.isArray(record)) {
    throw new InputError(`${where}: this is ${show(record)}; it must be one record, an object with its kind`);
  }
  const rules = Object.hasOwn(kinds, record.kind) ? kinds[record.kind] : undefined;
  if (rules === undefined) {
    throw new InputError(
      `${where}: kind is ${show(record.kind)}; it must be one of ${recordKinds.join(", ")}`,
    );
  }
  checkFields("", record, rules);
  if (record.kind === "measurement") {
    record.repeats.forEach((value, i) => checkPhysical(record.quantity, `repeats[${i}]`, value));
    for (const [name, value] of Object.entries(record.conditions)) {
      if (typeof value === "number") checkPhysical(name, `conditions.${name}`, value);
    }
  }
  if (record.kind !== "recipe") return;
  const total = record.parts.reduce((sum, { massFraction }) => sum + massFraction, 0);
  if (Math.abs(total - 1) > 1e-6) {
    throw new InputError(
      `${where}: massFraction of the parts adds up to ${+total.toPrecision(8)}; it must add up to 1 ± 1e-6`,
    );
  }
}

const where = "record";

/** What nature allows of a quantity, by how its name ends: `neatViscosity_mPas` is a viscosity. */
const physicalRanges: readonly (readonly [
  ending: string,
  range: Pick<NumberRule, "min" | "above" | "max">,
])[] = [
  ["temperature_C", { min: -273.15 }],
  ["viscosity_mPas", positive],
  ["density_gcm3", { ...positive, max: 25 }],
  ["molarMass_gmol", positive],
  ["irradiance_mWcm2", notNegative],
  ["exposure_mJcm2", notNegative],
  ["depth_um", notNegative],
  ["deadZone_um", notNegative],
  ["thickness_um", notNegative],
  ["time_s", notNegative],
  ["wavelength_nm", positive],
  ["pressure_Pa", notNegative],
  ["shearRate_pers", notNegative],
];

function checkPhysical(quantity: string, field: string, value: number): void {
  const name = quantity.toLowerCase();
  const range = physicalRanges.find(([ending]) => name.endsWith(ending.toLowerCase()))?.[1];
  if (range === undefined) return;
  checkNumber(value, {
    where,
    field: `${field} (${quantity})`,
    ...range,
    advice: "a record is never changed, so check sign and unit before it is written",
  });
}

type Rule = (field: string, value: unknown) => void;
type Rules = Readonly<Record<string, Rule>>;

const text: Rule = (field, value) => {
  if (typeof value === "string" && value.trim() !== "") return;
  throw new InputError(`${where}: ${field} is ${show(value)}; it must be text that is not empty`);
};

const anyText: Rule = (field, value) => {
  if (typeof value === "string") return;
  throw new InputError(`${where}: ${field} is ${show(value)}; it must be text, "" where there is none`);
};

const statement: Rule = (field, value) => {
  if (typeof value === "string" && value.trim() !== "") return;
  throw new InputError(`${where}: ${field} is empty; say what was decided or found`);
};

const optional =
  (rule: Rule): Rule =>
  (field, value) => {
    if (value !== undefined) rule(field, value);
  };

const number =
  (range: { min?: number; max?: number } = {}): Rule =>
  (field, value) => {
    checkNumber(value, { where, field, ...range });
  };

const oneOf =
  (allowed: readonly string[]): Rule =>
  (field, value) => {
    if (allowed.includes(value as string)) return;
    throw new InputError(
      `${where}: ${field} is ${show(value)}; it must be one of ${allowed.map(show).join(", ")}`,
    );
  };

const listOf =
  (rule: Rule): Rule =>
  (field, value) => {
    if (!Array.isArray(value) || value.length === 0) {
      const given = Array.isArray(value) ? "an empty list" : show(value);
      throw new InputError(`${where}: ${field} is ${given}; it must be a list of at least one`);
    }
    value.forEach((one, i) => rule(`${field}[${i}]`, one));
  };

const shape =
  (rules: Rules): Rule =>
  (field, value) => {
    if (typeof value !== "object" || value === null || Array.isArray(value)) {
      throw new InputError(
        `${where}: ${field} is ${show(value)}; it must hold ${Object.keys(rules).join(", ")}`,
      );
    }
    checkFields(`${field}.`, value, rules);
  };

const figures: Rule = (field, value) => {
  if (typeof value !== "object" || value === null || Array.isArray(value)) {
    throw new InputError(`${where}: ${field} is ${show(value)}; it must hold named numbers or text`);
  }
  for (const [name, one] of Object.entries(value)) {
    if (typeof one === "string" || Number.isFinite(one)) continue;
    throw new InputError(`${where}: ${field}.${name} is ${show(one)}; a record holds finite numbers or text`);
  }
};

const someFigures: Rule = (field, value) => {
  figures(field, value);
  if (Object.keys(value as object).length === 0)
    throw new InputError(`${where}: ${field} is empty; name what is corrected and give the right value`);
};

const quantity: Rule = (field, value) => {
  if (typeof value === "string" && /^[a-z][A-Za-z0-9]*_[A-Za-z0-9]+$/.test(value)) return;
  throw new InputError(
    `${where}: ${field} is ${show(value)}; it must be a name that ends in its unit, such as viscosity_mPas`,
  );
};

const id: Rule = (field, value) => {
  if (typeof value === "string" && /^[0-9a-f]{64}$/.test(value)) return;
  throw new InputError(`${where}: ${field} is ${show(value)}; it must be the id of a record, 64 hex digits`);
};

const dataHash: Rule = (field, value) => {
  if (typeof value === "string" && /^[0-9a-f]{64}$/.test(value)) return;
  throw new InputError(
    `${where}: ${field} is ${show(value)}; it must be 64 hex digits, as dataHashOf gives them`,
  );
};

const mass = number(notNegative);
const common: Rules = { kind: text, from: text, statement, brief: optional(text) };

const kinds: Readonly<Record<NewRecord["kind"], Rules>> = {
  recipe: {
    ...common,
    formulation: text,
    parts: listOf(shape({ ingredient: text, lot: optional(text), massFraction: number(fraction) })),
  },
  batch: {
    ...common,
    formulation: text,
    dataHash: optional(dataHash),
    batch: text,
    lines: listOf(shape({ ingredient: text, lot: anyText, target_g: mass, actual_g: mass })),
  },
  measurement: {
    ...common,
    formulation: text,
    batch: optional(text),
    quantity,
    repeats: listOf(number()),
    instrument: text,
    conditions: figures,
  },
  print: {
    ...common,
    formulation: text,
    batch: optional(text),
    outcome: oneOf(["printed", "printed with faults", "failed"]),
    conditions: figures,
    figures,
  },
  decision: { ...common, brief: text, formulation: text, dataHash: optional(dataHash), figures },
  amendment: { ...common, amends: id, corrections: someFigures },
};

/** Every kind of record, in the order work goes. */
export const recordKinds = Object.keys(kinds) as readonly NewRecord["kind"][];

function checkFields(prefix: string, value: object, rules: Rules): void {
  refuseUnknownKeys(prefix === "" ? where : `${where}: ${prefix.slice(0, -1)}`, value, Object.keys(rules));
  for (const [field, rule] of Object.entries(rules))
    rule(`${prefix}${field}`, (value as Record<string, unknown>)[field]);
}
