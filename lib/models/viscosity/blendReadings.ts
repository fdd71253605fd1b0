// A table of viscometer readings on blends: what a row holds, and what makes a table one.
import { checkNumber, fraction, InputError, positive } from "../../door.js";
import { checkList, type NumberList } from "../../numerics/lists.js";
import { celsius } from "../ranges.js";
import { checkBasis, type MixingBasis } from "./grunbergNissan.js";
import { checkTermCount } from "./redlichKister.js";

/** One reading of one blend. */
export interface BlendReading {
  /** Of every liquid, in the same order in all readings. */
  readonly fractions: NumberList;
  readonly temperature_C: number;
  readonly viscosity_mPas: number;
  readonly shearRate_pers?: number;
  /** Standard uncertainty as a fraction of the reading. */
  readonly relativeU?: number;
  /** Tells a repeat from a row that was entered twice. */
  readonly repeat?: number;
}

/** Refuses what is not a table of readings. @throws InputError naming the reading and the field. @internal */
export function checkTable(
  where: string,
  table: {
    readonly readings: readonly BlendReading[];
    readonly basis: MixingBasis;
    readonly terms: number;
    readonly level: number;
  },
): void {
  const { readings, basis, terms, level } = table;
  checkBasis(where, basis);
  checkTermCount(where, "terms", terms);
  checkNumber(level, { where, field: "level", min: 0.5, max: 0.999 });
  if (readings.length < 4) {
    throw new InputError(`${where}: readings holds ${readings.length}; at least 4 must be given`);
  }
  readings.forEach((reading, i) => checkReading(where, `readings[${i}]`, reading, readings[0]!));
  checkEntered(where, readings);
}

/** The same for readings of one composition. @internal */
export function compositionKey({ fractions }: BlendReading): string {
  return Array.from(fractions, (x) => x.toFixed(6)).join(" ");
}

/** The same for readings of one composition at one temperature, to the degree. @internal */
export function sampleKey(reading: BlendReading): string {
  return `${compositionKey(reading)} at ${Math.round(reading.temperature_C)}`;
}

/** The places of the readings that share a key, group by group. @internal */
export function groupsOf(
  readings: readonly BlendReading[],
  key: (reading: BlendReading) => string,
): number[][] {
  const groups = new Map<string, number[]>();
  readings.forEach((reading, i) => groups.set(key(reading), [...(groups.get(key(reading)) ?? []), i]));
  return [...groups.values()];
}

function checkReading(where: string, of: string, reading: BlendReading, first: BlendReading): void {
  const { fractions, temperature_C, viscosity_mPas, shearRate_pers, relativeU, repeat } = reading;
  checkList(where, `${of}.fractions`, fractions, { ...fraction, atLeast: 2 });
  if (fractions.length !== first.fractions.length) {
    throw new InputError(
      `${where}: ${of}.fractions holds ${fractions.length} and readings[0].fractions ${first.fractions.length}; ` +
        "give one fraction a liquid in every reading",
    );
  }
  const sum = Array.from(fractions).reduce((total, x) => total + x, 0);
  if (Math.abs(sum - 1) > 1e-6) {
    throw new InputError(
      `${where}: ${of}.fractions add up to ${+sum.toPrecision(9)}; they must add up to 1 within 1e-6; divide each by the sum`,
    );
  }
  const check = (field: string, value: unknown, rule: object): number =>
    checkNumber(value, { where, field: `${of}.${field}`, ...rule });
  check("temperature_C", temperature_C, celsius);
  check("viscosity_mPas", viscosity_mPas, positive);
  if (shearRate_pers !== undefined) check("shearRate_pers", shearRate_pers, positive);
  if (relativeU !== undefined) check("relativeU", relativeU, { ...positive, max: 1 });
  if (repeat !== undefined) check("repeat", repeat, {});
  if ((relativeU === undefined) !== (first.relativeU === undefined)) {
    throw new InputError(
      `${where}: ${of} ${relativeU === undefined ? "has no" : "has a"} relativeU and readings[0] ` +
        `${relativeU === undefined ? "has one" : "has none"}; give it for all readings or for none`,
    );
  }
}

function checkEntered(where: string, readings: readonly BlendReading[]): void {
  const seen = new Map<string, number>();
  readings.forEach((reading, i) => {
    if (reading.repeat === undefined) return;
    const key = `${sampleKey(reading)}, ${reading.shearRate_pers ?? ""}, ${reading.repeat}`;
    const before = seen.get(key);
    if (before !== undefined) {
      throw new InputError(
        `${where}: readings[${i}] is the same repeat of the same blend as readings[${before}]; ` +
          "leave out the row that was entered twice, or number the repeats",
      );
    }
    seen.set(key, i);
  });
}
