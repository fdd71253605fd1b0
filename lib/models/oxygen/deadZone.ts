// The layer above a permeable window that never cures: oxygen comes in as fast as radicals use it up.
// Closed form for a sink of order zero, with the resistance of the film and the decay of the light.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { findRoot } from "../../numerics/root.js";
import { cm_per_m, m_per_um, um_per_m } from "../scales.js";
import { burnt } from "./burnt.js";

/** What the dead zone depends on. */
export interface DeadZoneInput {
  /** D of oxygen in the resin, above 0, m2/s. */
  readonly diffusivity_m2s: number;
  /** C*: oxygen the resin would hold in equilibrium with the gas below the window, at least 0, mol/m3. */
  readonly saturation_molm3: number;
  /** Ri at the window, above 0, mol/(m3 s). */
  readonly radicalGeneration_molm3s: number;
  /** Oxygen molecules used up per radical, s, above 0. */
  readonly oxygenPerRadical: number;
  /** alpha of the whole resin, at least 0, 1/cm; 0 for uniform light. */
  readonly napierianAbsorption_percm: number;
  /** Resin thickness that resists as the film does, l = D/kappa, at least 0, um; 0 for no film resistance. */
  readonly filmEquivalentThickness_um: number;
}

/** A steady dead zone, or the finding that this light never cures this resin at this window. */
export type DeadZone =
  | {
      readonly outcome: "dead-zone";
      readonly thickness_um: number;
      /** Oxygen in the resin at the window, mol/m3. */
      readonly wallOxygen_molm3: number;
      /** Oxygen entering the resin, mol/(m2 s). */
      readonly flux_molm2s: number;
    }
  | {
      readonly outcome: "never-cures";
      /** Cure starts only above this rate at the window, mol/(m3 s). */
      readonly neededRadicalGeneration_molm3s: number;
    };

/**
 * Steady thickness of the dead zone above a window that lets oxygen in.
 *
 * - `diffusivity_m2s` D, `saturation_molm3` C*, `radicalGeneration_molm3s` Ri at the window, `oxygenPerRadical` s,
 *   `napierianAbsorption_percm` alpha (0: uniform light), `filmEquivalentThickness_um` l = D/kappa (0: no film).
 *
 * Uniform light: delta = sqrt(l^2 + delta0^2) - l, delta0 = sqrt(2 D C* / (s Ri)).
 * Decaying light, x = alpha delta: 1 - (1 + x) e^-x + alpha l (1 - e^-x) = beta, beta = alpha^2 D C* / (s Ri).
 * When beta reaches 1 + alpha l the window feeds in more oxygen than the whole column of resin can use up, and the
 * outcome is `never-cures`. Without oxygen below the window (C* = 0) the thickness is 0.
 *
 * Assumes a steady state (several induction times), a sink that uses every radical for oxygen, no flow, no bleaching
 * and a D that does not change. Compared with the full rate law at rate constants of the usual order, the flux agrees to
 * 1e-4; the depth at which oxygen has fallen to 1 % of C* lies 10 to 16 % below this thickness.
 * @throws InputError when an argument is out of range.
 * @source Free boundary of zero-order consumption, J. Crank, Free and Moving Boundary Problems, Oxford 1984, chapter 1
 * (from memory); decaying light and film in series derived for this library.
 * @example
 * ```ts
 * import { deadZone } from "resinwright";
 * const zone = deadZone({
 *   diffusivity_m2s: 1e-10,
 *   saturation_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   napierianAbsorption_percm: 100,
 *   filmEquivalentThickness_um: 10,
 * });
 * zone.outcome === "dead-zone" && zone.thickness_um; // → 13.0284
 * ```
 */
export function deadZone(input: DeadZoneInput): DeadZone {
  if (!isUsual(input)) checkInput(input);
  const zone = steadyZone({
    D: input.diffusivity_m2s,
    saturation: input.saturation_molm3,
    Ri: input.radicalGeneration_molm3s,
    s: input.oxygenPerRadical,
    alpha: cm_per_m * input.napierianAbsorption_percm,
    l: m_per_um * input.filmEquivalentThickness_um,
  });
  if (!isStated(zone)) checkZone(zone);
  return zone;
}

const where = "deadZone";

/** True for input that `checkInput` passes. Draws by the thousand go by here, without the cost of naming each field. */
function isUsual(input: DeadZoneInput): boolean {
  const { diffusivity_m2s, saturation_molm3, radicalGeneration_molm3s, oxygenPerRadical } = input;
  const { napierianAbsorption_percm, filmEquivalentThickness_um } = input;
  return (
    isBetween(diffusivity_m2s, Number.MIN_VALUE, Number.MAX_VALUE) &&
    isBetween(saturation_molm3, 0, Number.MAX_VALUE) &&
    isBetween(radicalGeneration_molm3s, Number.MIN_VALUE, Number.MAX_VALUE) &&
    isBetween(oxygenPerRadical, Number.MIN_VALUE, Number.MAX_VALUE) &&
    isBetween(napierianAbsorption_percm, 0, 1e6) &&
    isBetween(filmEquivalentThickness_um, 0, Number.MAX_VALUE)
  );
}

const isBetween = (value: unknown, min: number, max: number): boolean =>
  typeof value === "number" && value >= min && value <= max;

const isStated = (zone: DeadZone): boolean =>
  zone.outcome === "dead-zone"
    ? Number.isFinite(zone.thickness_um) &&
      Number.isFinite(zone.wallOxygen_molm3) &&
      Number.isFinite(zone.flux_molm2s)
    : Number.isFinite(zone.neededRadicalGeneration_molm3s);

function checkZone(zone: DeadZone): void {
  for (const [field, value] of Object.entries(zone)) {
    if (field !== "outcome")
      checkNumber(value, { where, field, advice: "an input is beyond any real resin or light" });
  }
}

function checkInput(input: DeadZoneInput): void {
  checkNumbers(where, input, {
    diffusivity_m2s: positive,
    saturation_molm3: notNegative,
    radicalGeneration_molm3s: {
      ...positive,
      advice: "without light nothing cures, and there is no dead zone to speak of",
    },
    oxygenPerRadical: positive,
    napierianAbsorption_percm: { ...notNegative, max: 1e6 },
    filmEquivalentThickness_um: notNegative,
  });
}

/** The symbols of the equations above, in SI units. */
type Symbols = Readonly<Record<"D" | "saturation" | "Ri" | "s" | "alpha" | "l", number>>;

function steadyZone(given: Symbols): DeadZone {
  const { D, saturation, Ri, s, alpha, l } = given;
  if (saturation === 0) return zoneOf(0, 0, 0);
  const delta0 = (Math.sqrt(2 * D) * Math.sqrt(saturation)) / Math.sqrt(s * Ri);
  const uniform = thicknessInUniformLight(delta0, l);
  // Decay adds a share of alpha delta / 2 at most to the thickness: nothing for alpha = 0, below rounding for a tiny one.
  if (alpha === 0 || alpha * uniform < Number.EPSILON) {
    return zoneOf(uniform, saturation * (uniform / delta0) ** 2, s * Ri * uniform);
  }
  const film = alpha * l;
  const needed = (alpha ** 2 * D * saturation) / s / (1 + film);
  if (Ri <= needed) return { outcome: "never-cures", neededRadicalGeneration_molm3s: needed };
  const x = frontPosition({ film, share: needed / Ri, uniform: alpha * uniform });
  const beta = (1 + film) * (needed / Ri);
  return zoneOf(x / alpha, (saturation * burnt(x)) / beta, ((s * Ri) / alpha) * -Math.expm1(-x));
}

/** sqrt(l^2 + delta0^2) - l, written without its cancellation for a film that resists much. */
function thicknessInUniformLight(delta0: number, l: number): number {
  const q = l / delta0;
  return delta0 / (q + Math.hypot(q, 1));
}

/**
 * The root x of 1 - (1 + x) e^-x + alpha l (1 - e^-x) = beta, with film = alpha l and share = beta / (1 + film).
 * The light that decays uses up less oxygen than uniform light, so the root lies above alpha times the uniform thickness.
 */
function frontPosition(given: Readonly<Record<"film" | "share" | "uniform", number>>): number {
  const { film, share, uniform } = given;
  const x = excess(1, film, share) >= 0 ? nearRoot(film, share, uniform) : farRoot(film, share, uniform);
  if (x > 0) return x;
  let high = 2 * uniform;
  while (excess(high, film, share) <= 0) high *= 2;
  return findRoot({ f: (z) => excess(z, film, share), low: 0.999 * uniform, high, where });
}

function excess(x: number, film: number, share: number): number {
  return x < 1
    ? burnt(x) - film * Math.expm1(-x) - (1 + film) * share
    : (1 + film) * (1 - share) - (1 + x + film) * Math.exp(-x);
}

/** Halley's method on `excess` for a root below 1, from the first terms of its expansion; NaN if it strays. */
function nearRoot(film: number, share: number, uniform: number): number {
  let x = Math.min(uniform * (1 + (uniform * (uniform / 3 + film / 2)) / (uniform + film)), 1);
  for (let step = 0; step < 8; step++) {
    const slope = x + film;
    const newton = (excess(x, film, share) * Math.exp(x)) / slope;
    const change = newton / (1 - (newton * (1 - slope)) / (2 * slope));
    x -= change;
    if (!(x >= 0.999 * uniform && x < 1.5)) return NaN;
    if (Math.abs(change) <= 1e-6 * x) return x;
  }
  return NaN;
}

/**
 * Newton's method for a root above 1 on the logarithm of the balance, x - ln(1 + x + film) + ln((1 + film) (1 - share)): it bends
 * upwards everywhere, so that every step after the first comes from above. NaN if it strays.
 */
function farRoot(film: number, share: number, uniform: number): number {
  const left = Math.log((1 + film) * (1 - share));
  let x = Math.max(uniform, 1);
  for (let step = 0; step < 60; step++) {
    const change = ((x - Math.log(1 + x + film) + left) * (1 + x + film)) / (x + film);
    x -= change;
    if (Math.abs(change) <= 1e-9 * x) return x;
  }
  return NaN;
}

const zoneOf = (thickness_m: number, wallOxygen_molm3: number, flux_molm2s: number): DeadZone => ({
  outcome: "dead-zone",
  thickness_um: thickness_m * um_per_m,
  wallOxygen_molm3,
  flux_molm2s,
});
