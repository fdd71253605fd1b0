// The checks every door of the library shares: an input is refused with the field, what was given, what is allowed and what to do.

/** An input that cannot be used. The message names the field, what was given, what is allowed and what to do. */
export class InputError extends Error {
  override readonly name = "InputError";
}

/** Where and how a number is checked: `field` carries its unit in the name, `where` names the model or file. */
export interface NumberRule {
  readonly where: string;
  readonly field: string;
  readonly min?: number;
  readonly max?: number;
  /** `min` itself is refused. */
  readonly above?: boolean;
  /** What to do about a value out of range, as a full clause. */
  readonly advice?: string;
}

/**
 * Returns `value` if it is a finite number within the rule, and refuses it otherwise.
 * @throws InputError naming the field, the value given and the range allowed.
 */
export function checkNumber(value: unknown, rule: NumberRule): number {
  const { min = -Infinity, max = Infinity } = rule;
  const tooLow = typeof value === "number" && (rule.above ? value <= min : value < min);
  if (typeof value === "number" && Number.isFinite(value) && !tooLow && value <= max) return value;
  const advice = rule.advice === undefined ? "" : `; ${rule.advice}`;
  throw new InputError(
    `${rule.where}: ${rule.field} is ${show(value)}; it must be ${describeRange(rule)}${advice}`,
  );
}

/** Checks every number of `input` named in `rules`; `where` stands before each message. */
export function checkNumbers<I extends object>(
  where: string,
  input: I,
  rules: { readonly [F in keyof I]?: Omit<NumberRule, "where" | "field"> },
): void {
  for (const field of Object.keys(rules) as (keyof I & string)[]) {
    checkNumber(input[field], { where, field, ...rules[field] });
  }
}

/**
 * Returns `value` if it is a whole number within the rule, and refuses it otherwise.
 * @throws InputError as {@link checkNumber}.
 */
export function checkWhole(value: unknown, rule: NumberRule): number {
  const number = checkNumber(value, rule);
  if (Number.isInteger(number)) return number;
  throw new InputError(`${rule.where}: ${rule.field} is ${number}; it must be a whole number`);
}

export const positive = { min: 0, above: true } as const;
export const notNegative = { min: 0 } as const;
export const fraction = { min: 0, max: 1 } as const;

/**
 * Refuses keys that are not `known`, with the nearest known name.
 * @throws InputError naming the key and the known ones.
 */
export function refuseUnknownKeys(where: string, given: object, known: readonly string[]): void {
  for (const key of Object.keys(given)) {
    if (!known.includes(key)) throw new InputError(unknownName(where, "field", key, known));
  }
}

/** The message for a name that is not among `known`: says the nearest one, or lists them. */
export function unknownName(where: string, kind: string, given: string, known: readonly string[]): string {
  const near = nearestName(given, known);
  const all = known.length === 0 ? "none is known here" : `known: ${known.join(", ")}`;
  const hint = near === undefined ? all : `did you mean "${near}"?`;
  return `${where}: unknown ${kind} "${given}"; ${hint}`;
}

/**
 * The name in `known` within a third of its length in edits from `given`, or undefined. Letter case is ignored, and a unit
 * ending (`_mPas`) may be left off.
 */
export function nearestName(given: string, known: readonly string[]): string | undefined {
  let best: string | undefined;
  let bestEdits = Infinity;
  for (const name of known) {
    const stem = name.replace(/_[^_]*$/, "");
    const edits = Math.min(edit(given, name), edit(given, stem));
    if (edits < bestEdits && edits <= Math.max(1, Math.ceil(stem.length / 3)))
      [best, bestEdits] = [name, edits];
  }
  return best;
}

/** A value as an error shows it: text in quotes, numbers bare, everything else named by its kind. */
export function show(value: unknown): string {
  if (typeof value === "string")
    return JSON.stringify(value.length > 60 ? `${value.slice(0, 57)}...` : value);
  if (typeof value === "number" || typeof value === "boolean" || value === null) return String(value);
  if (value === undefined) return "missing";
  return Array.isArray(value) ? "a list" : typeof value === "object" ? "an object" : `a ${typeof value}`;
}

function describeRange({ min = -Infinity, max = Infinity, above }: NumberRule): string {
  if (min === -Infinity && max === Infinity) return "a finite number";
  if (max === Infinity) return `a finite number ${above ? "above" : "of at least"} ${min}`;
  if (min === -Infinity) return `a finite number of at most ${max}`;
  return above ? `a number above ${min} and at most ${max}` : `a number from ${min} to ${max}`;
}

/** Levenshtein distance, letter case ignored. */
function edit(first: string, second: string): number {
  const [a, b] = [first.toLowerCase(), second.toLowerCase()];
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const swap = previous[j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      row.push(Math.min(swap, previous[j]! + 1, row[j - 1]! + 1));
    }
    previous = row;
  }
  return previous[b.length]!;
}
