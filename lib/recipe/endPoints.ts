// The neat liquids in a table of blend readings against the catalogue: a wrong bottle, a wrong unit or two columns exchanged
// show here before any fit.

import { checkNumber, fraction, unknownName } from "../door.js";
import type { Warning } from "../result.js";
import type { Ingredient } from "./ingredient.js";
import type { RheometerReading, RheometerTable } from "./rheometer.js";
import type { Shelf } from "./shelf.js";

/**
 * Warnings where a neat liquid reads other than the catalogue says, or could not be compared; none where all agree.
 *
 * - `table`: of {@link readRheometerTable}; its liquids are ingredients on the shelf.
 * - `relativeU`: standard uncertainty of a reading as a fraction of it, 0 to 1; 0 where left out, so that only the doubt of
 *   the catalogue counts.
 *
 * The catalogue's viscosity at the reading's temperature is ln eta = ln eta0 + B (1/T - 1/T0), T in K, with B the
 * ingredient's `viscosityActivation_K`. u^2 of the difference in ln is ln(1 + (u0/eta0)^2) + (u_B (1/T - 1/T0))^2 +
 * relativeU^2. Codes: `neat-differs`, beyond 3 u; `ends-swapped`, in its place, where two liquids lie each closer to the
 * other's figure; `not-compared`, where there is no neat reading or no figure.
 *
 * Assumes that the doubts of viscosity, B and reading are independent.
 * @throws InputError when `relativeU` is not from 0 to 1.
 * @source Temperature law as {@link andradeViscosity}; combined uncertainty as JCGM 100:2008, 5.1.2 (from memory).
 * @example
 * ```ts
 * import { compareEndPoints, readRheometerTable } from "resinwright";
 * import { readShelf } from "resinwright/files";
 * const text = `UDMA (mass %), IBOA (mass %), temperature (°C), viscosity (mPa s)
 * 100, 0, 25, 8.5
 * 0, 100, 25, 9640
 * `;
 * const table = readRheometerTable({ text, where: "blends.csv" });
 * compareEndPoints({ table, shelf: readShelf(["data"]) }).map(({ code }) => code); // → ["ends-swapped"]
 * ```
 */
export function compareEndPoints({
  table,
  shelf,
  relativeU = 0,
}: {
  readonly table: Pick<RheometerTable, "liquids" | "readings">;
  readonly shelf: Pick<Shelf, "ingredients">;
  readonly relativeU?: number;
}): Warning[] {
  checkNumber(relativeU, { where: "compareEndPoints", field: "relativeU", ...fraction });
  const ends = table.liquids.map((id, i): End => {
    const neat = table.readings.filter(({ fractions }) => fractions[i] === 1);
    return { id, neat, ingredient: shelf.ingredients.get(id), relativeU };
  });
  const swaps = swapsAmong(ends);
  return [
    ...swaps.map(swapWarning),
    ...ends.filter((end) => !swaps.flat().includes(end)).flatMap(differenceWarnings),
    ...ends.flatMap((end) => gapWarnings(end, shelf)),
  ];
}

/** A liquid, its neat readings, and what the catalogue knows of it. */
interface End {
  readonly id: string;
  readonly neat: readonly RheometerReading[];
  readonly ingredient?: Ingredient;
  readonly relativeU: number;
}

interface Difference {
  readonly reading: RheometerReading;
  /** ln(read / catalogue), and its standard uncertainty. */
  readonly ln: number;
  readonly u: number;
}

/** Of the neat readings of `end` from the figure of an ingredient, its own or another's; none where there is no figure. */
function differences({ neat, relativeU }: End, ingredient?: Ingredient): Difference[] {
  const { viscosity_mPas: figure, viscosityActivation_K: B } = ingredient ?? {};
  if (figure === undefined) return [];
  return neat.flatMap((reading) => {
    const inverseT = 1 / (reading.temperature_C + 273.15) - 1 / (figure.temperature_C + 273.15);
    if (B === undefined && inverseT !== 0) return [];
    const ln = Math.log(reading.viscosity_mPas / figure.value) - (B?.value ?? 0) * inverseT;
    const lnU = Math.sqrt(Math.log1p((figure.u / figure.value) ** 2));
    return [{ reading, ln, u: Math.hypot(lnU, (B?.u ?? 0) * inverseT, relativeU) }];
  });
}

const COVERAGE = 3;
const ROUNDING = 1e-9;

const beyond = ({ ln, u }: Difference): number => Math.abs(ln) - COVERAGE * u - ROUNDING;

/** How far the neat readings lie from a figure on the average; NaN, closer to nothing, where they cannot be compared. */
function distance(end: End, ingredient?: Ingredient): number {
  const found = differences(end, ingredient);
  return Math.abs(found.reduce((sum, { ln }) => sum + ln, 0)) / found.length;
}

function swapsAmong(ends: readonly End[]): [End, End][] {
  const pairs = ends.flatMap((a, i) => ends.slice(i + 1).map((b): [End, End] => [a, b]));
  return pairs.filter(([a, b]) => {
    const differs = [a, b].some((end) => differences(end, end.ingredient).some((one) => beyond(one) > 0));
    const closerTo = (end: End, other: End) =>
      distance(end, other.ingredient) < distance(end, end.ingredient);
    return differs && closerTo(a, b) && closerTo(b, a);
  });
}

function swapWarning([a, b]: [End, End]): Warning {
  const message =
    `neat ${a.id} reads ${shown(a.neat[0]!)} and neat ${b.id} ${shown(b.neat[0]!)}, each closer to the catalogue's ` +
    "figure of the other; check which column and which sample is which";
  return { code: "ends-swapped", message };
}

/** One warning a liquid, about its reading that is furthest off. */
function differenceWarnings(end: End): Warning[] {
  const off = differences(end, end.ingredient).filter((one) => beyond(one) > 0);
  const [furthest] = off.sort((a, b) => beyond(b) - beyond(a));
  if (furthest === undefined) return [];
  const { reading, ln, u } = furthest;
  const message =
    `neat ${end.id} reads ${shown(reading)}; the catalogue has ${digits(reading.viscosity_mPas / Math.exp(ln))} mPa s there ` +
    `within a factor of ${digits(Math.exp(COVERAGE * u))} (three combined standard uncertainties); readings so far off: ` +
    `${off.length} of ${end.neat.length}; check bottle, unit and temperature, and where they hold, enter the reading as a lot's`;
  return [{ code: "neat-differs", message }];
}

function gapWarnings({ id, neat, ingredient, relativeU }: End, shelf: Pick<Shelf, "ingredients">): Warning[] {
  const start = "not compared with the catalogue";
  const warn = (message: string) => [{ code: "not-compared", message: `${start}: ${message}` }];
  if (ingredient === undefined) {
    const message = unknownName(start, "ingredient", id, [...shelf.ingredients.keys()]);
    return [{ code: "not-compared", message }];
  }
  if (neat.length === 0) return warn(`no reading of neat ${id}`);
  if (ingredient.viscosity_mPas === undefined) return warn(`${id} has no viscosity_mPas`);
  const left = neat.length - differences({ id, neat, relativeU }, ingredient).length;
  if (left === 0) return [];
  return warn(
    `${id} has no viscosityActivation_K, and ${left} of its ${neat.length} neat readings not taken at ` +
      `${ingredient.viscosity_mPas.temperature_C} °C`,
  );
}

const shown = ({ viscosity_mPas, temperature_C, row }: RheometerReading): string =>
  `${digits(viscosity_mPas)} mPa s at ${digits(temperature_C)} °C (row ${row})`;

const digits = (value: number): number => Number(value.toPrecision(4));
