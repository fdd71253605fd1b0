// What a result looks like everywhere: an interval with its warnings and its sources, never a bare digit.

/** How well a value is known to be what it says: the ground it stands on. */
export type SourceStatus =
  | "published"
  | "computed from published data"
  | "measured here"
  | "common practice"
  | "from memory"
  | "invented for the demo";

export const sourceStatuses: readonly SourceStatus[] = [
  "published",
  "computed from published data",
  "measured here",
  "common practice",
  "from memory",
  "invented for the demo",
];

/** A figure with its standard uncertainty `u` (same unit as `value`, k = 1), its source and the ground it stands on. */
export interface SourcedValue {
  readonly value: number;
  readonly u: number;
  readonly source: string;
  readonly status: SourceStatus;
}

/** A value with its coverage interval: `low` to `high` holds the true value with probability `level` (0 to 1). */
export interface Interval {
  readonly value: number;
  readonly low: number;
  readonly high: number;
  readonly level: number;
}

/** A source a result rests on: of which figure, where it was read, and the ground it stands on. */
export interface UsedSource {
  readonly figure: string;
  readonly source: string;
  readonly status: SourceStatus;
}

/** Something a reader has to know before using a result. `code` is stable for scripts; `message` is for people. */
export interface Warning {
  readonly code: string;
  readonly message: string;
}
