// Numbers in the sentences of warnings and reasons.

/** A number as a sentence says it. */
export function shortText(value: number): string {
  return String(Number(value.toPrecision(3)));
}
