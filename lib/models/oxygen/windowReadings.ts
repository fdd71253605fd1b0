// What readings on a window say of the figures behind them: an induction time and an uncured layer against radicals, oxygen
// budget, diffusivity and film. Each figure moves as far as its own doubt allows.
import { checkNumber, checkNumbers, InputError, notNegative, positive, unknownName } from "../../door.js";
import { solveDefinite } from "../../numerics/definite.js";
import { cm_per_m, m_per_um } from "../scales.js";
import { burnt } from "./burnt.js";

/** The figures that readings on a window correct, all above 0. Spreads and factors go by the same names. */
export interface WindowFigures {
  /** Ri at the window at relative irradiance 1, mol/(m3 s). */
  readonly radicalGeneration_molm3s: number;
  /** s, oxygen molecules used up per radical. */
  readonly oxygenPerRadical: number;
  /** S of oxygen in the resin, mol/(m3 Pa). */
  readonly solubility_molm3Pa: number;
  /** D of oxygen in the resin, m2/s. */
  readonly diffusivity_m2s: number;
  /** Of the film, mol/(m2 s Pa). */
  readonly permeance_molm2sPa: number;
  /** kp of chain growth, m3/(mol s). */
  readonly propagation_m3mols: number;
}

/** One number for each figure: its relative standard uncertainty, or the factor it is to be corrected by. */
export interface PerWindowFigure {
  readonly radicalGeneration: number;
  readonly oxygenPerRadical: number;
  readonly solubility: number;
  readonly diffusivity: number;
  readonly permeance: number;
  readonly propagation: number;
}

/** A reading on the window. */
export type WindowReading = {
  /** Irradiance over the one that Ri is stated for, above 0. */
  readonly relativeIrradiance: number;
  /** Standard uncertainty of the reading as a fraction of it. */
  readonly relativeU: number;
  /** What the reading is multiplied by in a draw of its error, above 0; 1 unless given. */
  readonly errorFactor?: number;
} & (
  | {
      readonly of: "induction time";
      readonly until: "first gel" | "oxygen used";
      /** Above 0, s. */
      readonly time_s: number;
    }
  | {
      readonly of: "uncured layer";
      /** Pressure of oxygen under the film, above 0, Pa. */
      readonly gasOxygen_Pa: number;
      /** Above 0, um. */
      readonly thickness_um: number;
    }
);

/** What `correctByReadings` is asked. */
export interface WindowCorrectionInput {
  readonly figures: WindowFigures;
  /** Relative standard uncertainty of each figure before the readings, at least 0. */
  readonly relativeU: PerWindowFigure;
  readonly readings: readonly WindowReading[];
  /** alpha of the whole resin, at least 0, 1/cm. */
  readonly napierianAbsorption_percm: number;
  /** Pressure of oxygen the fresh resin has stood under, above 0, Pa. */
  readonly freshOxygen_Pa: number;
  /** X at which the resin holds, above 0, below 1, and kt with d[R]/dt = -2 kt [R]^2, above 0: for the time to the first gel. */
  readonly gelConversion: number;
  readonly termination_m3mols: number;
}

/** What came of it. */
export interface WindowCorrection {
  /** What each figure is to be multiplied by. */
  readonly factors: PerWindowFigure;
  /** Of each reading: how far it lies above what the figures had said, in standard deviations of reading and figures together. */
  readonly surprises: readonly number[];
}

/**
 * Corrects what stands behind a dead zone by readings on the window.
 *
 * - `figures` Ri, s, S, D, film permeance P, kp and their `relativeU`; `readings` with theirs, above 0;
 * - `napierianAbsorption_percm` alpha; `freshOxygen_Pa` p0; `gelConversion` X; `termination_m3mols` kt.
 *
 * Each reading says that two terms add up to 1. At relative irradiance m:
 *
 * - an induction time t: S p0 / (s m Ri t), the oxygen, and for the first gel -ln(1 - X) / (kp sqrt(m Ri / 2 kt) t), the growth;
 * - an uncured layer d over oxygen of the pressure p, x = alpha d: s m Ri A / (D S p), the resin, and s m Ri B / (P p), the film,
 *   with A = (1 - (1 + x) e^-x) / alpha^2, B = (1 - e^-x) / alpha: the balance of the steady dead zone.
 *
 * The factors exp(dq) on the figures minimise sum (dq / sigma)^2 + sum (ln(a + b) / (slope sigma_reading))^2, where sigma is
 * sqrt(ln(1 + u^2)) and slope that of ln(a + b) with the logarithm of the reading, at the solution. Newton's steps, shortened
 * until they go downhill. Without a reading every factor is 1; a reading in great doubt changes nothing; a sure one is met
 * exactly. Where readings cannot tell figures apart, each takes a part of the change in proportion to its variance.
 *
 * Assumes doubts that are log-normal and independent, and readings that are what the models mean: a steady dead zone, and
 * oxygen that does not come in during the induction time.
 * @throws InputError when an argument is out of range, or a factor comes out beyond all numbers.
 * @source Bayes' rule for log-normal quantities, as in A. Tarantola, Inverse Problem Theory, SIAM 2005, section 3.4 (from
 * memory); balances as `inductionTime`, `steadyConversionTime` and `deadZone`.
 * @example
 * ```ts
 * import { correctByReadings } from "resinwright";
 * const { factors } = correctByReadings({
 *   figures: {
 *     radicalGeneration_molm3s: 0.5, oxygenPerRadical: 1, solubility_molm3Pa: 5e-5,
 *     diffusivity_m2s: 1e-10, permeance_molm2sPa: 1e-9, propagation_m3mols: 25,
 *   },
 *   relativeU: {
 *     radicalGeneration: 0.5, oxygenPerRadical: 0, solubility: 0, diffusivity: 0, permeance: 0, propagation: 0,
 *   },
 *   readings: [{ of: "induction time", until: "oxygen used", relativeIrradiance: 1, time_s: 1, relativeU: 1e-6 }],
 *   napierianAbsorption_percm: 100, freshOxygen_Pa: 20000, gelConversion: 0.1, termination_m3mols: 1250,
 * });
 * // Said to take 2 s, read as 1 s: twice the radicals.
 * factors.radicalGeneration; // → 2.0000
 * factors.diffusivity; // → 1
 * ```
 */
export function correctByReadings(input: WindowCorrectionInput): WindowCorrection {
  checkCorrection(input);
  const { readings, relativeU } = input;
  const sigmas = figureNames.map((name) => Math.sqrt(Math.log1p(relativeU[name] ** 2)));
  const equations = readings.map((reading) => equationOf(reading, input));
  // In units of sigma, so that figures without doubt stay where they are.
  let change: readonly number[] = sigmas.map(() => 0);
  const surprises = equations.map((equation) => {
    const { misfit, slopes, sigma, sign } = misfitOf(equation, sigmas, change);
    return (sign * misfit) / Math.hypot(sigma, ...slopes);
  });
  for (let step = 0; step < 100 && equations.length > 0; step++) {
    const next = newtonStep(equations, sigmas, change);
    const moved = Math.max(...next.map((value, k) => Math.abs(value - change[k]!)));
    change = next;
    if (moved < 1e-10) break;
  }
  const factors = perFigure((k) => Math.exp(sigmas[k]! * change[k]!));
  for (const name of figureNames) {
    checkNumber(factors[name], {
      where,
      field: `the factor on ${name}`,
      ...positive,
      advice: "no figures within reason meet these readings; look for a slip in a unit",
    });
  }
  return { factors, surprises };
}

const where = "correctByReadings";

/** The figures by the names of their factors, in the order the columns of the equations stand in. */
export const figureNames = [
  "radicalGeneration",
  "oxygenPerRadical",
  "solubility",
  "diffusivity",
  "permeance",
  "propagation",
] as const satisfies readonly (keyof PerWindowFigure)[];

/** A reading as an equation, a + b = 1, each term a product of powers of the figures. */
interface Equation {
  readonly terms: readonly [Term, Term];
  /** Doubt of the logarithm of the reading. */
  readonly sigma: number;
}

interface Term {
  readonly value: number;
  /** Powers of the figures, in their order. */
  readonly powers: readonly number[];
  /** Power of the reading itself. */
  readonly readingPower: number;
}

const oxygenPowers = [-1, -1, 1, 0, 0, 0];
const growthPowers = [-0.5, 0, 0, 0, 0, -1];
const resinPowers = [1, 1, -1, -1, 0, 0];
const filmPowers = [1, 1, 0, 0, -1, 0];

function equationOf(reading: WindowReading, input: WindowCorrectionInput): Equation {
  const { figures, termination_m3mols: kt } = input;
  const { oxygenPerRadical: s, solubility_molm3Pa: S, diffusivity_m2s: D } = figures;
  const Ri = reading.relativeIrradiance * figures.radicalGeneration_molm3s;
  const sigma = Math.sqrt(Math.log1p(reading.relativeU ** 2));
  const error = reading.errorFactor ?? 1;
  if (reading.of === "induction time") {
    const { until } = reading;
    const t = error * reading.time_s;
    const Q = until === "first gel" ? -Math.log1p(-input.gelConversion) : 0;
    const R = Math.sqrt(Ri / (2 * kt));
    const oxygen = (S * input.freshOxygen_Pa) / (s * Ri * t);
    const growth = Q / (figures.propagation_m3mols * R * t);
    return {
      terms: [
        { value: oxygen, powers: oxygenPowers, readingPower: -1 },
        { value: growth, powers: growthPowers, readingPower: -1 },
      ],
      sigma,
    };
  }
  const alpha = cm_per_m * input.napierianAbsorption_percm;
  // The doubt of the reading is that at the reading itself, not at what a draw makes of it.
  const asRead = depthIntegrals(alpha, m_per_um * reading.thickness_um);
  const drawn = depthIntegrals(alpha, error * m_per_um * reading.thickness_um);
  const perGas = (s * Ri) / reading.gasOxygen_Pa;
  return {
    terms: [
      { value: (perGas * drawn.A) / (D * S), powers: resinPowers, readingPower: asRead.powerOfA },
      {
        value: (perGas * drawn.B) / figures.permeance_molm2sPa,
        powers: filmPowers,
        readingPower: asRead.powerOfB,
      },
    ],
    sigma,
  };
}

/** A and B of a depth, m2 and m, and the powers with which they grow with it. */
function depthIntegrals(alpha: number, d: number) {
  const x = alpha * d;
  const a = x === 0 ? 0.5 : burnt(x) / (x * x);
  const b = x === 0 ? 1 : -Math.expm1(-x) / x;
  return { A: a * d * d, B: b * d, powerOfA: Math.exp(-x) / a, powerOfB: Math.exp(-x) / b };
}

/** ln(a + b) after a change, its slopes with the change, the share of the first term, and the doubt the reading brings to it. */
function misfitOf(
  { terms: [first, second], sigma }: Equation,
  sigmas: readonly number[],
  change: readonly number[],
) {
  const a = termAt(first, sigmas, change);
  const b = termAt(second, sigmas, change);
  const share = a / (a + b);
  const perReading = share * first.readingPower + (1 - share) * second.readingPower;
  return {
    misfit: Math.log(a + b),
    share,
    slopes: sigmas.map((one, k) => one * (share * first.powers[k]! + (1 - share) * second.powers[k]!)),
    sigma: Math.abs(perReading) * sigma,
    sign: Math.sign(perReading),
  };
}

function termAt({ value, powers }: Term, sigmas: readonly number[], change: readonly number[]): number {
  let power = 0;
  for (let k = 0; k < powers.length; k++) power += powers[k]! * sigmas[k]! * change[k]!;
  return value * Math.exp(power);
}

/** One step towards the least strain, the doubts of the readings held; no step where none goes downhill. */
function newtonStep(
  equations: readonly Equation[],
  sigmas: readonly number[],
  change: readonly number[],
): readonly number[] {
  const rows = equations.map((equation) => misfitOf(equation, sigmas, change));
  const strainAt = (at: readonly number[]): number => {
    let sum = 0;
    for (const value of at) sum += value * value;
    equations.forEach(({ terms: [a, b] }, i) => {
      sum += (Math.log(termAt(a, sigmas, at) + termAt(b, sigmas, at)) / rows[i]!.sigma) ** 2;
    });
    return sum;
  };
  const slope = [...change];
  for (const { misfit, slopes, sigma } of rows)
    for (let k = 0; k < slope.length; k++) slope[k]! += (misfit * slopes[k]!) / sigma ** 2;
  const here = strainAt(change);
  // With its bend the valley may look like a ridge from afar; without it there is always a way down.
  for (const bend of [1, 0]) {
    const step = solveDefinite(curvatureOf(equations, rows, sigmas, bend), slope);
    for (let part = 1; part > 1e-4; part /= 2) {
      const at = change.map((value, k) => value - part * step[k]!);
      if (strainAt(at) < here) return at;
    }
  }
  return change;
}

/** Lower half of the curvature of half the strain; `bend` counts that of the misfits themselves (1) or leaves it out (0). */
function curvatureOf(
  equations: readonly Equation[],
  rows: readonly ReturnType<typeof misfitOf>[],
  sigmas: readonly number[],
  bend: number,
): number[][] {
  const curvature = sigmas.map((_, k) => sigmas.map((__, j) => (k === j ? 1 : 0)));
  rows.forEach(({ misfit, share, slopes, sigma }, i) => {
    const [a, b] = equations[i]!.terms;
    const apart = sigmas.map((one, k) => one * (a.powers[k]! - b.powers[k]!));
    const bent = bend * misfit * share * (1 - share);
    for (let k = 0; k < sigmas.length; k++)
      for (let j = 0; j <= k; j++)
        curvature[k]![j]! += (slopes[k]! * slopes[j]! + bent * apart[k]! * apart[j]!) / sigma ** 2;
  });
  return curvature;
}

function checkCorrection(input: WindowCorrectionInput): void {
  checkNumbers(`${where}: figures`, input.figures, {
    radicalGeneration_molm3s: positive,
    oxygenPerRadical: positive,
    solubility_molm3Pa: positive,
    diffusivity_m2s: positive,
    permeance_molm2sPa: positive,
    propagation_m3mols: positive,
  });
  for (const name of figureNames)
    checkNumber(input.relativeU[name], { where: `${where}: relativeU`, field: name, ...notNegative });
  checkNumbers(where, input, {
    napierianAbsorption_percm: { ...notNegative, max: 1e6 },
    freshOxygen_Pa: positive,
    gelConversion: { ...positive, max: 1 - 1e-9 },
    termination_m3mols: positive,
  });
  input.readings.forEach((reading, i) => {
    const place = `${where}: readings[${i}]`;
    const { relativeIrradiance, relativeU, errorFactor = 1 } = reading;
    checkNumbers(
      place,
      { relativeIrradiance, relativeU, errorFactor },
      { relativeIrradiance: positive, relativeU: positive, errorFactor: positive },
    );
    if (reading.of === "induction time") checkNumbers(place, reading, { time_s: positive });
    else if (reading.of === "uncured layer")
      checkNumbers(place, reading, { gasOxygen_Pa: positive, thickness_um: positive });
    else {
      const { of } = reading as { of: unknown };
      throw new InputError(unknownName(place, "of", String(of), ["induction time", "uncured layer"]));
    }
  });
}

const perFigure = (of: (k: number) => number): PerWindowFigure =>
  Object.fromEntries(figureNames.map((name, k) => [name, of(k)])) as unknown as PerWindowFigure;
