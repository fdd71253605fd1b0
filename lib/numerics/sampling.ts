// Random numbers that can be had again: a seeded generator, and Latin hypercube samples drawn with it.
// The same seed gives the same numbers on every machine; nothing here reads a clock or Math.random.
import { checkWhole, InputError } from "../door.js";

/** The four 32-bit words a xoshiro128** generator carries; not all zero. */
export type XoshiroState = readonly [number, number, number, number];

/**
 * The xoshiro128** 1.1 generator: a function that gives the next whole number from 0 to 2^32 - 1.
 *
 * - `state`: four whole numbers from 0 to 2^32 - 1, not all zero.
 * @throws InputError when a word is not a 32-bit whole number, or all are zero.
 * @source D. Blackman, S. Vigna, ACM Transactions on Mathematical Software 47 (2021) 36, doi 10.1145/3460772 (from
 * memory).
 * @example
 * ```ts
 * import { xoshiro128 } from "resinwright";
 * const next = xoshiro128({ state: [1, 2, 3, 4] });
 * next(); // → 11520
 * ```
 */
export function xoshiro128({ state }: { readonly state: XoshiroState }): () => number {
  state.forEach((word, i) => checkWord("xoshiro128", `state[${i}]`, word));
  if (state.every((word) => word === 0)) {
    throw new InputError("xoshiro128: state is all zeros; at least one word must differ from 0");
  }
  const s = Uint32Array.from(state);
  return () => {
    const result = Math.imul(rotateLeft(Math.imul(s[1]!, 5), 7), 9) >>> 0;
    const t = s[1]! << 9;
    s[2]! ^= s[0]!;
    s[3]! ^= s[1]!;
    s[1]! ^= s[2]!;
    s[0]! ^= s[3]!;
    s[2]! ^= t;
    s[3] = rotateLeft(s[3]!, 11);
    return result;
  };
}

/**
 * A seeded source of uniform numbers strictly between 0 and 1, in steps of 2^-32: (k + 1/2) / 2^32.
 *
 * - `seed`: whole number from 0 to 4294967295. Its four state words are four successive outputs of a mixing
 *   function that is one-to-one, so no seed gives the forbidden state of four zeros.
 * @throws InputError when the seed is not a whole number in that range.
 * @source xoshiro128** as in `xoshiro128`; seed spread by the 32-bit finaliser of MurmurHash3 (A. Appleby, public
 * domain) over a Weyl sequence, as G. L. Steele, D. Lea, C. H. Flood, OOPSLA 2014, doi 10.1145/2660193.2660195
 * (from memory).
 * @example
 * ```ts
 * import { seededUniform } from "resinwright";
 * const uniform = seededUniform({ seed: 7 });
 * const again = seededUniform({ seed: 7 });
 * uniform() === again(); // → true
 * ```
 */
export function seededUniform({ seed }: { readonly seed: number }): () => number {
  checkWord("seededUniform", "seed", seed);
  const word = (k: number): number => mixBits((seed + k * 0x9e3779b9) >>> 0);
  const next = xoshiro128({ state: [word(1), word(2), word(3), word(4)] });
  return () => (next() + 0.5) / 2 ** 32;
}

/**
 * A Latin hypercube sample of the unit cube: one column of uniform numbers per dimension.
 *
 * - `dimensions`: how many columns, whole, from 1 to 1000.
 * - `draws`: how many numbers per column, whole, from 1 to 1 000 000.
 * - `seed`: whole number from 0 to 4294967295.
 *
 * Column by column: u_j = (pi(j) + v_j) / draws, with pi a random order of 0 ... draws - 1 and v_j uniform, so that
 * each of the `draws` equal strata of each column holds exactly one number. Values are never 0 nor 1. Columns are
 * shuffled independently of each other; their correlation is of the order of 1/sqrt(draws).
 * @throws InputError when an argument is not a whole number in its range.
 * @source M. D. McKay, R. J. Beckman, W. J. Conover, Technometrics 21 (1979) 239-245, doi 10.1080/00401706.1979.10489755
 * (from memory).
 * @example
 * ```ts
 * import { latinHypercube } from "resinwright";
 * const [first] = latinHypercube({ dimensions: 2, draws: 4, seed: 1 });
 * [...first!].map((u) => Math.floor(4 * u)).sort().join(); // → "0,1,2,3"
 * ```
 */
export function latinHypercube(input: {
  readonly dimensions: number;
  readonly draws: number;
  readonly seed: number;
}): Float64Array[] {
  const { dimensions, draws, seed } = input;
  checkWhole(dimensions, { where: "latinHypercube", field: "dimensions", min: 1, max: 1000 });
  checkWhole(draws, { where: "latinHypercube", field: "draws", min: 1, max: 1_000_000 });
  checkWord("latinHypercube", "seed", seed);
  const uniform = seededUniform({ seed });
  return Array.from({ length: dimensions }, () => {
    const strata = shuffled(draws, uniform);
    return Float64Array.from(strata, (stratum) => (stratum + uniform()) / draws);
  });
}

/** The whole numbers below `count` in random order (Fisher and Yates). */
function shuffled(count: number, uniform: () => number): Uint32Array {
  const order = Uint32Array.from({ length: count }, (_, i) => i);
  for (let i = count - 1; i > 0; i--) {
    const j = Math.floor(uniform() * (i + 1));
    [order[i], order[j]] = [order[j]!, order[i]!];
  }
  return order;
}

function mixBits(word: number): number {
  let h = Math.imul(word ^ (word >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return (h ^ (h >>> 16)) >>> 0;
}

const rotateLeft = (word: number, bits: number): number => (word << bits) | (word >>> (32 - bits));

const checkWord = (where: string, field: string, value: number): number =>
  checkWhole(value, { where, field, min: 0, max: 2 ** 32 - 1 });
