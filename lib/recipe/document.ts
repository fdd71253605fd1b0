// A JSON file as its author sees it: parsed strictly, held to a schema, every complaint with file, line and field.

import { parse as parseJsonText, evaluate, type DocumentNode, type ValueNode } from "@humanwhocodes/momoa";
import { z } from "zod";
import { InputError, nearestName, show, unknownName } from "../door.js";
import { toFieldUnit } from "./quantity.js";

/** A parsed JSON text that remembers where each of its values stood. `where` is the file name used in messages. */
export interface JsonDocument {
  readonly where: string;
  readonly value: unknown;
  readonly tree: DocumentNode;
}

/**
 * Parses JSON strictly: no comments, no trailing commas, no key given twice.
 * @throws InputError with file, line and column.
 * @example
 * ```ts
 * import { parseJson } from "resinwright";
 * const document = parseJson('{ "layerThickness_um": 50 }', "brief.json");
 * document.value; // → { layerThickness_um: 50 }
 * ```
 */
export function parseJson(text: string, where: string): JsonDocument {
  let tree: DocumentNode;
  try {
    tree = parseJsonText(text.replace(/^\uFEFF/, ""), { mode: "json" });
  } catch (error) {
    const { line, column, message } = error as { line?: number; column?: number; message: string };
    const place = line === undefined ? "" : `, line ${line}, column ${column}`;
    const fault = slipAt(text, line, column) ?? message.replace(/\s*\(\d+:\d+\)$/, "");
    throw new InputError(`${where}${place}: this is not valid JSON: ${fault}`);
  }
  refuseRepeatedKeys(tree.body, where);
  return { where, value: evaluate(tree), tree };
}

/** What people and their programs write in place of JSON, where the parser stumbled over it. */
function slipAt(text: string, line = 1, column = 1): string | undefined {
  const source = text.replace(/^\uFEFF/, "").split(/\r\n|\n|\r/)[line - 1] ?? "";
  const [, whole] = /:\s*([-+]?\d+),$/.exec(source.slice(0, column - 1)) ?? [];
  const [digits] = /^\d+/.exec(source.slice(column - 1)) ?? [];
  if (whole !== undefined && digits !== undefined)
    return `${whole},${digits} has a decimal comma; write ${whole}.${digits}`;
  const character = source[column - 1];
  return character !== undefined && "“”„‘’".includes(character)
    ? `${character} is a curly quotation mark; write the straight one, "`
    : undefined;
}

/**
 * Holds a document to a schema and returns what the schema makes of it.
 * @throws InputError listing every complaint, each with file, line, field, what was given and what is allowed.
 */
export function readDocument<T>(schema: z.ZodType<T>, document: JsonDocument): T {
  const result = schema.safeParse(document.value, { reportInput: true, error: describeIssue });
  if (result.success) return result.data;
  const complaints = result.error.issues.map((issue) => {
    const unknownKey = issue.code === "unrecognized_keys" ? issue.keys.slice(0, 1) : [];
    return `${placeOf(document, issue.path, unknownKey)} ${issue.message}`;
  });
  throw new InputError(complaints.join("\n"));
}

/** A field of a document by file, line and name; `within` leads on to the line, not to the name. */
export function placeOf(
  { where, tree }: JsonDocument,
  path: readonly PropertyKey[],
  within: readonly PropertyKey[] = [],
): string {
  const field = path.map((step) => (typeof step === "number" ? `[${step}]` : `.${String(step)}`)).join("");
  return `${where}, line ${lineOf(tree, [...path, ...within])}: ${field.replace(/^\./, "") || "the file"}`;
}

/** An object that refuses unknown keys with the nearest known one. */
export function strict<S extends z.ZodRawShape>(shape: S) {
  return z.strictObject(shape, {
    error: (issue) =>
      issue.code === "unrecognized_keys"
        ? issue.keys
            .map((key) => unknownName("", "field", key, Object.keys(shape)).replace(/^: /, "has an "))
            .join("; ")
        : undefined,
  });
}

/** A number, or text with a unit, read into the unit that `field` ends in; optionally held to a range. */
export function quantity(field: string, range: { above?: number; min?: number; max?: number } = {}) {
  return z.unknown().transform((given, context): number => {
    try {
      const value = toFieldUnit(field, given);
      const problem = rangeProblem(value, range);
      if (problem === undefined) return value;
      context.addIssue({ code: "custom", message: `is ${show(given)}; it must be ${problem}` });
    } catch (error) {
      if (!(error instanceof InputError)) throw error;
      context.addIssue({ code: "custom", message: error.message });
    }
    return z.NEVER;
  });
}

function rangeProblem(value: number, { above, min, max }: { above?: number; min?: number; max?: number }) {
  if (above !== undefined && !(value > above)) return `above ${above}`;
  if (min !== undefined && !(value >= min)) return `at least ${min}`;
  if (max !== undefined && !(value <= max)) return `at most ${max}`;
  return undefined;
}

function describeIssue(issue: z.core.$ZodRawIssue): string | undefined {
  const given = show(issue.input);
  switch (issue.code) {
    case "invalid_type":
      return `is ${given}; it must be ${articled(String(issue.expected))}`;
    case "invalid_value": {
      const allowed = (issue.values as unknown[]).map(String);
      const near = typeof issue.input === "string" ? nearestName(issue.input, allowed) : undefined;
      return `is ${given}; it must be one of ${allowed.map(show).join(", ")}${near ? `; did you mean "${near}"?` : ""}`;
    }
    case "too_small":
      return `is ${given}; it must be ${issue.inclusive ? "at least" : "above"} ${String(issue.minimum)}${unitOfSize(issue)}`;
    case "too_big":
      return `is ${given}; it must be ${issue.inclusive ? "at most" : "below"} ${String(issue.maximum)}${unitOfSize(issue)}`;
    default:
      return undefined;
  }
}

function unitOfSize(issue: { origin?: unknown }): string {
  return issue.origin === "string" ? " characters long" : issue.origin === "array" ? " entries long" : "";
}

function articled(expected: string): string {
  const words: Record<string, string> = { array: "a list", object: "an object", int: "a whole number" };
  return words[expected] ?? `a ${expected}`;
}

function lineOf(tree: DocumentNode, path: readonly PropertyKey[]): number {
  let node: ValueNode = tree.body;
  let line = node.loc.start.line;
  for (const step of path) {
    const next = childOf(node, step);
    if (next === undefined) break;
    node = next;
    line = node.loc.start.line;
  }
  return line;
}

function childOf(node: ValueNode, step: PropertyKey): ValueNode | undefined {
  if (node.type === "Array" && typeof step === "number") return node.elements[step]?.value;
  if (node.type !== "Object") return undefined;
  return node.members.find(({ name }) => keyText(name) === step)?.value;
}

function refuseRepeatedKeys(node: ValueNode, where: string): void {
  if (node.type === "Array") for (const { value } of node.elements) refuseRepeatedKeys(value, where);
  if (node.type !== "Object") return;
  const seen = new Set<string>();
  for (const { name, value } of node.members) {
    const key = keyText(name);
    if (seen.has(key)) {
      throw new InputError(
        `${where}, line ${name.loc.start.line}: "${key}" is given twice; keep one of them`,
      );
    }
    seen.add(key);
    refuseRepeatedKeys(value, where);
  }
}

function keyText(name: { type: string; value?: unknown; name?: unknown }): string {
  return String(name.type === "String" ? name.value : name.name);
}
