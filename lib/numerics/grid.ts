// Cells for a line along which something happens in few places: narrow there, wide elsewhere, never a sudden change.
import { checkNumber, InputError, positive, show } from "../door.js";
import { findRoot, type RootProblem } from "./root.js";

/** A place that needs narrow cells: about `width` around `at` gets `share` of all cells. */
export interface Focus {
  readonly at: number;
  readonly width: number;
  /** Share of the cells, above 0; the shares of all places add up to less than 1, the rest is spread evenly. */
  readonly share: number;
}

/**
 * Faces of `cells` cells from 0 to `length`: cells + 1 rising numbers.
 *
 * The width of a cell near a focus is proportional to sqrt(width^2 + (z - at)^2), so that neighbours differ little and halving
 * every cell halves every width. Without a focus the cells are even.
 * @throws InputError when the number of cells is not whole or below 2, or a place is out of range.
 */
export function gradedFaces(input: {
  readonly length: number;
  readonly cells: number;
  readonly focuses: readonly Focus[];
}): Float64Array {
  const where = "gradedFaces";
  const { length, cells, focuses } = input;
  checkNumber(length, { where, field: "length", ...positive });
  if (!Number.isInteger(cells) || cells < 2) {
    throw new InputError(`${where}: cells is ${show(cells)}; it must be a whole number of at least 2`);
  }
  focuses.forEach(({ at, width, share }, i) => {
    checkNumber(at, { where, field: `focuses[${i}].at`, min: 0, max: length });
    checkNumber(width, { where, field: `focuses[${i}].width`, ...positive });
    checkNumber(share, { where, field: `focuses[${i}].share`, ...positive, max: 1 });
  });
  const even = 1 - focuses.reduce((sum, { share }) => sum + share, 0);
  checkNumber(even, { where, field: "the share left for even cells", ...positive });
  const scaled = focuses.map(({ at, width, share }) => {
    const below = Math.asinh(-at / width);
    return { at, width, below, perUnit: share / (Math.asinh((length - at) / width) - below) };
  });
  /** Share of all cells that lie below z: each focus is the integral of 1 / sqrt(width^2 + (z - at)^2), scaled. */
  const shareBelow = (z: number): number => {
    let sum = (even * z) / length;
    for (const { at, width, below, perUnit } of scaled)
      sum += perUnit * (Math.asinh((z - at) / width) - below);
    return sum;
  };
  const density = (z: number): number => {
    let sum = even / length;
    for (const { at, width, perUnit } of scaled) sum += perUnit / Math.hypot(width, z - at);
    return sum;
  };
  const faces = new Float64Array(cells + 1);
  faces[cells] = length;
  for (let i = 1; i < cells; i++) {
    const low = faces[i - 1]!;
    const guess = low + 1 / (cells * density(low));
    faces[i] =
      focuses.length === 0
        ? (length * i) / cells
        : newtonWithin({
            f: (z) => shareBelow(z) - i / cells,
            slope: density,
            guess,
            low,
            high: length,
            where,
          });
  }
  return faces;
}

interface NewtonProblem extends RootProblem {
  readonly slope: (x: number) => number;
  readonly guess: number;
}

/** Newton's method from a close guess; where it strays, the bracket decides. */
function newtonWithin({ f, slope, guess, low, high, where }: NewtonProblem): number {
  let x = guess;
  for (let step = 0; step < 20; step++) {
    const change = f(x) / slope(x);
    x -= change;
    if (!(x > low && x < high)) break;
    if (Math.abs(change) <= 1e-14 * high) return x;
  }
  return findRoot({ f, low, high, where });
}
