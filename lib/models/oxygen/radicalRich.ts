// The other end of the range: so many radicals that oxygen hardly lowers their number, and every oxygen has the same chance
// of being taken. Oxygen then falls exponentially from the window.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { um_per_m } from "../scales.js";

/**
 * Rate in 1/s at which radicals take oxygen where they are many: k = s kO sqrt(Ri / (2 kt)).
 *
 * - `radicalGeneration_molm3s` Ri, `oxygenCapture_m3mols` kO, `termination_m3mols` kt, `oxygenPerRadical` s: all above 0.
 *
 * Assumes that termination, not oxygen, sets the number of radicals: sqrt(2 kt Ri) well above kO C.
 * @throws InputError when an argument is out of range.
 * @source Quasi-steady balance of radicals without oxygen, derived for this library.
 * @example
 * ```ts
 * import { radicalRichRate } from "resinwright";
 * radicalRichRate({
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenCapture_m3mols: 5e5,
 *   termination_m3mols: 2500,
 *   oxygenPerRadical: 1,
 * }); // → 5000
 * ```
 */
export function radicalRichRate(input: {
  readonly radicalGeneration_molm3s: number;
  readonly oxygenCapture_m3mols: number;
  readonly termination_m3mols: number;
  readonly oxygenPerRadical: number;
}): number {
  const where = "radicalRichRate";
  checkNumbers(where, input, {
    radicalGeneration_molm3s: positive,
    oxygenCapture_m3mols: positive,
    termination_m3mols: positive,
    oxygenPerRadical: positive,
  });
  const { radicalGeneration_molm3s: Ri, oxygenCapture_m3mols: kO, termination_m3mols: kt } = input;
  return checkNumber(input.oxygenPerRadical * kO * Math.sqrt(Ri / (2 * kt)), { where, field: "the rate" });
}

/**
 * Steady oxygen at a depth, at the window and at the part, mol/m3, and its flux, mol/(m2 s), when oxygen is used at a rate k C.
 *
 * - `rate_pers` k, above 0, 1/s; `diffusivity_m2s` D, above 0; `saturation_molm3` C*, at least 0.
 * - `gapThickness_um` L to the part, above 0; `filmEquivalentThickness_um` l, at least 0; `depth_um` z, 0 to L.
 *
 * m = sqrt(k / D): C = Ci cosh(m (L - z)) / cosh(m L), Ci = C* / (1 + m l tanh(m L)), flux = Ci D m tanh(m L).
 *
 * Assumes a steady state and the same rate at every depth.
 * @throws InputError when an argument is out of range.
 * @source First-order reaction in a slab: J. Crank, The Mathematics of Diffusion, 2nd ed. 1975, chapter 14 (from memory).
 * @example
 * ```ts
 * import { radicalRichProfile } from "resinwright";
 * const steady = radicalRichProfile({
 *   rate_pers: 1,
 *   diffusivity_m2s: 1e-10,
 *   saturation_molm3: 1,
 *   gapThickness_um: 100,
 *   filmEquivalentThickness_um: 10,
 *   depth_um: 10,
 * });
 * steady.wallOxygen_molm3; // → 0.5
 * steady.oxygen_molm3; // → 0.18394
 * ```
 */
export function radicalRichProfile(input: {
  readonly rate_pers: number;
  readonly diffusivity_m2s: number;
  readonly saturation_molm3: number;
  readonly gapThickness_um: number;
  readonly filmEquivalentThickness_um: number;
  readonly depth_um: number;
}): {
  readonly oxygen_molm3: number;
  readonly wallOxygen_molm3: number;
  readonly topOxygen_molm3: number;
  readonly flux_molm2s: number;
} {
  const where = "radicalRichProfile";
  checkNumbers(where, input, {
    rate_pers: positive,
    diffusivity_m2s: positive,
    saturation_molm3: notNegative,
    gapThickness_um: positive,
    filmEquivalentThickness_um: notNegative,
    depth_um: { min: 0, max: input.gapThickness_um },
  });
  const { diffusivity_m2s: D, depth_um: z, gapThickness_um: L, filmEquivalentThickness_um: l } = input;
  const m = Math.sqrt(input.rate_pers / D) / um_per_m;
  const wall = input.saturation_molm3 / (1 + m * l * Math.tanh(m * L));
  const flux_molm2s = wall * D * um_per_m * m * Math.tanh(m * L);
  checkNumber(flux_molm2s, { where, field: "the flux", advice: "the rate is beyond any real resin" });
  // cosh(m (L - z)) / cosh(m L), without the overflow of either.
  const share = (depth: number): number =>
    (Math.exp(-m * depth) * (1 + Math.exp(-2 * m * (L - depth)))) / (1 + Math.exp(-2 * m * L));
  return {
    oxygen_molm3: wall * share(z),
    wallOxygen_molm3: wall,
    topOxygen_molm3: wall * share(L),
    flux_molm2s,
  };
}
