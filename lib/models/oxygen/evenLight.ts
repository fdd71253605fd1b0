// Steady oxygen above the window in even light with the full rate law, exactly: the flux, the value at the window, the depth
// at which oxygen has fallen to a given level. What the numerical models are held to.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { findRoot } from "../../numerics/root.js";
import { m_per_um, um_per_m } from "../scales.js";

/** What steady oxygen in even light depends on. */
export interface EvenLightInput {
  /** D of oxygen in the resin, above 0, m2/s. */
  readonly diffusivity_m2s: number;
  /** C* of the gas below the window, above 0, mol/m3. */
  readonly saturation_molm3: number;
  /** Ri, the same at every depth, above 0, mol/(m3 s). */
  readonly radicalGeneration_molm3s: number;
  /** Oxygen molecules used up per radical, s, above 0. */
  readonly oxygenPerRadical: number;
  /** Resin thickness that resists as the film does, l = D/kappa, at least 0, um. */
  readonly filmEquivalentThickness_um: number;
  /** kO of radical + oxygen, above 0, m3/(mol s). */
  readonly oxygenCapture_m3mols: number;
  /** kt with d[R]/dt = -2 kt [R]^2, at least 0, m3/(mol s). */
  readonly termination_m3mols: number;
}

/**
 * Steady flux of oxygen into resin of unlimited depth in even light, mol/(m2 s), and oxygen at the window, mol/m3.
 *
 * The sink is s kO C R with R = 2 Ri / (y + w), y = kO C, w = sqrt(y^2 + 8 kt Ri). Its first integral is exact:
 * N = sqrt(2 D G(Ci)), G(C) = (2 s Ri / (3 kO)) y^2 [1 / (w + b) + 1 / (w + y)], b = sqrt(8 kt Ri), and the film adds
 * (C* - Ci) / (l / D) = N. Without termination this is the flux of `deadZone`.
 *
 * Assumes light that does not decay, a steady state, and resin much deeper than the dead zone.
 * @throws InputError when an argument is out of range.
 * @source First integral of D C'' = F(C), derived for this library.
 * @example
 * ```ts
 * import { evenLightFlux } from "resinwright";
 * const steady = evenLightFlux({
 *   diffusivity_m2s: 1e-10,
 *   saturation_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   filmEquivalentThickness_um: 10,
 *   oxygenCapture_m3mols: 5e5,
 *   termination_m3mols: 2500,
 * });
 * steady.flux_molm2s; // → 6.1797437e-6
 * steady.wallOxygen_molm3; // → 0.38202563
 * ```
 */
export function evenLightFlux(input: EvenLightInput): {
  readonly flux_molm2s: number;
  readonly wallOxygen_molm3: number;
} {
  checkInput("evenLightFlux", input);
  return steadyFlux("evenLightFlux", input);
}

/**
 * Depth in um at which steady oxygen in even light has fallen to a given concentration; exact.
 *
 * - the fields of `evenLightFlux`;
 * - `oxygen_molm3`: C, above 0, at most the oxygen at the window, mol/m3.
 *
 * z(C) = int from C to Ci of sqrt(D / 2 G) dC.
 * @throws InputError when an argument is out of range, or there is less oxygen than that at the window already.
 * @source As `evenLightFlux`.
 * @example
 * ```ts
 * import { evenLightDepth } from "resinwright";
 * evenLightDepth({
 *   diffusivity_m2s: 1e-10,
 *   saturation_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   filmEquivalentThickness_um: 0,
 *   oxygenCapture_m3mols: 5e5,
 *   termination_m3mols: 2500,
 *   oxygen_molm3: 0.01,
 * }); // → 18.012011
 * ```
 */
export function evenLightDepth(input: EvenLightInput & { readonly oxygen_molm3: number }): number {
  const where = "evenLightDepth";
  checkInput(where, input);
  const { wallOxygen_molm3 } = steadyFlux(where, input);
  checkNumber(input.oxygen_molm3, {
    where,
    field: "oxygen_molm3",
    ...positive,
    max: wallOxygen_molm3,
    advice: "the most there is stands at the window",
  });
  const D = input.diffusivity_m2s;
  const [from, to] = [Math.log(input.oxygen_molm3), Math.log(wallOxygen_molm3)];
  // In ln C the integrand is smooth on a scale of 1 and never steeper than sqrt(C).
  const depth_m = gaussIntegral(
    (lnC) => Math.sqrt(D / 2 / steepness(input, Math.exp(lnC))),
    from,
    to,
    1 + Math.ceil(4 * (to - from)),
  );
  return checkNumber(um_per_m * depth_m, { where, field: "the depth in um", ...notNegative });
}

function checkInput(where: string, input: EvenLightInput): void {
  const { diffusivity_m2s, saturation_molm3, radicalGeneration_molm3s, oxygenPerRadical } = input;
  const { filmEquivalentThickness_um, oxygenCapture_m3mols, termination_m3mols } = input;
  checkNumbers(
    where,
    {
      diffusivity_m2s,
      saturation_molm3,
      radicalGeneration_molm3s,
      oxygenPerRadical,
      filmEquivalentThickness_um,
      oxygenCapture_m3mols,
      termination_m3mols,
    },
    {
      diffusivity_m2s: positive,
      saturation_molm3: positive,
      radicalGeneration_molm3s: positive,
      oxygenPerRadical: positive,
      filmEquivalentThickness_um: notNegative,
      oxygenCapture_m3mols: positive,
      termination_m3mols: notNegative,
    },
  );
}

function steadyFlux(where: string, input: EvenLightInput) {
  const { diffusivity_m2s: D, saturation_molm3: saturation } = input;
  const filmResistance = (m_per_um * input.filmEquivalentThickness_um) / D;
  const flux = (C: number): number => Math.sqrt(2 * D * firstIntegral(input, C));
  const wallOxygen_molm3 =
    filmResistance === 0
      ? saturation
      : findRoot({ f: (C) => saturation - C - filmResistance * flux(C), low: 0, high: saturation, where });
  const flux_molm2s = checkNumber(flux(wallOxygen_molm3), { where, field: "the flux", ...positive });
  return { flux_molm2s, wallOxygen_molm3 };
}

/** G(C), with D C'^2 / 2 = G. */
const firstIntegral = (input: EvenLightInput, C: number): number =>
  C === 0 ? 0 : steepness(input, C) * C * C;

/** G / C^2, written without the difference of nearly equal numbers. */
function steepness(input: EvenLightInput, C: number): number {
  const { radicalGeneration_molm3s: Ri, oxygenCapture_m3mols: kO, oxygenPerRadical: s } = input;
  const y = kO * C;
  const b = Math.sqrt(8 * input.termination_m3mols * Ri);
  const w = Math.hypot(y, b);
  return ((2 * s * Ri * kO) / 3) * (1 / (w + b) + 1 / (w + y));
}

/** Gauss-Legendre with five points in each of `panels` equal panels. */
function gaussIntegral(f: (x: number) => number, from: number, to: number, panels: number): number {
  const half = (to - from) / panels / 2;
  let sum = 0;
  for (let k = 0; k < panels; k++) {
    const middle = from + (2 * k + 1) * half;
    sum += (128 / 225) * f(middle);
    for (const [x, weight] of gaussPairs) sum += weight * (f(middle - x * half) + f(middle + x * half));
  }
  return sum * half;
}

const gaussPairs = [-1, 1].map(
  (sign) =>
    [Math.sqrt(5 + sign * 2 * Math.sqrt(10 / 7)) / 3, (322 - sign * 13 * Math.sqrt(70)) / 900] as const,
);
