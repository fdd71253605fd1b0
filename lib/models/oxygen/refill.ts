// Dark between exposures: how fast resin that has lost its oxygen gets it back through the window by diffusion alone.
import { checkNumber, checkNumbers, InputError, notNegative, positive, unknownName } from "../../door.js";
import { findRoot } from "../../numerics/root.js";
import { robinRoot, scaledErfc } from "../../numerics/robin.js";
import { m_per_um } from "../scales.js";

/** A gap of resin that holds no oxygen at the start of the dark. */
export interface DarkGap {
  /** L, window to part, above 0, um. */
  readonly gapThickness_um: number;
  /** D, above 0, m2/s. */
  readonly diffusivity_m2s: number;
  /** Resin thickness that resists as the film does, l = D/kappa, at least 0, um. */
  readonly filmEquivalentThickness_um: number;
}

/** Oxygen over saturation, 0 to 1: at the window, at the part, and on average. */
export interface DarkRefill {
  readonly atWindow: number;
  readonly atPart: number;
  readonly mean: number;
}

/**
 * How far the oxygen of a gap has come back after some time in the dark, from none.
 *
 * - `gapThickness_um` L, `diffusivity_m2s` D, `filmEquivalentThickness_um` l; `time_s`: at least 0, s.
 *
 * Fo = D t / L^2, Bi = L / l, roots of b tan b = Bi:
 * C(z) / C* = 1 - sum of 2 Bi cos(b (1 - z/L)) / [(b^2 + Bi^2 + Bi) cos b] exp(-b^2 Fo); for l = 0, b = (n + 1/2) pi. Below
 * Fo = 0.02 the half-space is used for the window and the mean, which differs by less than 1e-20.
 *
 * Assumes no flow: resin that streams in when the part lifts brings its own oxygen and is usually the larger share.
 * @throws InputError when an argument is out of range.
 * @source J. Crank, The Mathematics of Diffusion, 2nd ed. 1975, sections 3.3.1 and 4.3.6 (from memory).
 * @example
 * ```ts
 * import { darkRefill } from "resinwright";
 * const gap = { gapThickness_um: 50, diffusivity_m2s: 1e-10, filmEquivalentThickness_um: 0 };
 * darkRefill({ ...gap, time_s: 6.25 }).mean; // → 0.562234
 * darkRefill({ ...gap, time_s: 6.25 }).atPart; // → 0.314554
 * ```
 */
export function darkRefill(input: DarkGap & { readonly time_s: number }): DarkRefill {
  const where = "darkRefill";
  checkGap(where, input);
  checkNumber(input.time_s, { where, field: "time_s", ...notNegative });
  return refillAt(input, input.time_s / timeUnit(input));
}

/**
 * Time in s in the dark until a share of the oxygen is back, from none.
 *
 * - `gapThickness_um` L, `diffusivity_m2s` D, `filmEquivalentThickness_um` l; `refilled`: share of saturation, above 0, below 1;
 * - `at`: "mean" of the gap or "part", the far end.
 *
 * The time at which `darkRefill` reaches the share. Without film: 0.848 L^2/D for 90 % of the mean, 1.031 L^2/D at the part.
 *
 * Assumes what `darkRefill` does.
 * @throws InputError when an argument is out of range.
 * @source As `darkRefill`.
 * @example
 * ```ts
 * import { refillTime } from "resinwright";
 * const gap = { gapThickness_um: 50, diffusivity_m2s: 1e-10, filmEquivalentThickness_um: 0 };
 * refillTime({ ...gap, refilled: 0.9, at: "part" }); // → 25.7776
 * ```
 */
export function refillTime(
  input: DarkGap & { readonly refilled: number; readonly at: "mean" | "part" },
): number {
  const where = "refillTime";
  checkGap(where, input);
  const { refilled, at } = input;
  checkNumber(refilled, { where, field: "refilled", ...positive, max: 1 - 1e-9 });
  if (at !== "mean" && at !== "part")
    throw new InputError(unknownName(where, "at", String(at), ["mean", "part"]));
  const missing = (Fo: number): number => {
    const { mean, atPart } = refillAt(input, Fo);
    return (at === "mean" ? mean : atPart) - refilled;
  };
  let high = 1;
  while (missing(high) < 0) high *= 2;
  return findRoot({ f: missing, low: 0, high, where }) * timeUnit(input);
}

function checkGap(where: string, gap: DarkGap): void {
  const { gapThickness_um, diffusivity_m2s, filmEquivalentThickness_um } = gap;
  checkNumbers(
    where,
    { gapThickness_um, diffusivity_m2s, filmEquivalentThickness_um },
    {
      gapThickness_um: positive,
      diffusivity_m2s: positive,
      filmEquivalentThickness_um: notNegative,
    },
  );
}

const timeUnit = ({ gapThickness_um, diffusivity_m2s }: DarkGap): number =>
  (m_per_um * gapThickness_um) ** 2 / diffusivity_m2s;

function refillAt({ gapThickness_um, filmEquivalentThickness_um }: DarkGap, Fo: number): DarkRefill {
  const film = filmEquivalentThickness_um / gapThickness_um;
  const series = Fo >= 1e-3 ? seriesAt(film, Fo) : { atWindow: 0, atPart: 0, mean: 0 };
  if (Fo >= 0.02) return series;
  // q = sqrt(Fo) / film; by 1e6 the film is not felt.
  const q = Math.sqrt(Fo) / film;
  const early =
    film === 0 || q > 1e6
      ? { atWindow: Fo > 0 ? 1 : 0, mean: 2 * Math.sqrt(Fo / Math.PI) }
      : { atWindow: 0 - scaledErfc(q, 1), mean: film * scaledErfc(q, 2) };
  return { ...early, atPart: series.atPart };
}

function seriesAt(film: number, Fo: number): DarkRefill {
  let [atWindow, atPart, mean] = [1, 1, 1];
  for (let n = 0; ; n++) {
    const b = film === 0 ? (n + 0.5) * Math.PI : robinRoot(n, 1 / film);
    const decay = Math.exp(-b * b * Fo);
    // 2 Bi / (b^2 + Bi^2 + Bi) and, with cos b = b sin b / Bi, the same over cos b: both hold without a film.
    const part = 2 / (film * film * b * b + 1 + film);
    atWindow -= film * part * decay;
    atPart -= (part / (b * Math.sin(b))) * decay;
    mean -= (part / (b * b)) * decay;
    if (b * b * Fo > 45) return { atWindow, atPart, mean };
  }
}
