// How long a dead zone lives when its supply stops: the gas is shut off at the window, or the film lies on glass and
// has only its own oxygen to give.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { m_per_um } from "../scales.js";

/** Time to extinction over delta^2 / D. */
const extinction = 0.197434;

/**
 * Time in s that a steady dead zone lives after the window stops letting oxygen in, with the light left on.
 *
 * - `thickness_um`: of the dead zone when the supply stops, above 0, um; `diffusivity_m2s`: D, above 0, m2/s.
 *
 * t = 0.197434 delta^2 / D, which is 0.395 induction times when the window did not resist.
 *
 * Assumes even light across the dead zone and a sink that uses every radical for oxygen.
 * @throws InputError when an argument is out of range.
 * @source H. O. Dahmardah, D. F. Mayers, IMA Journal of Numerical Analysis 3 (1983) 81-85, as quoted in J. Crank, Free and Moving
 * Boundary Problems, Oxford 1984, p. 170; title pages from memory.
 * @example
 * ```ts
 * import { lifeAfterSupplyCut } from "resinwright";
 * lifeAfterSupplyCut({ thickness_um: 20, diffusivity_m2s: 1e-10 }); // → 0.789736
 * ```
 */
export function lifeAfterSupplyCut(input: {
  readonly thickness_um: number;
  readonly diffusivity_m2s: number;
}): number {
  const where = "lifeAfterSupplyCut";
  checkNumbers(where, input, { thickness_um: positive, diffusivity_m2s: positive });
  return checkNumber(extinction * timeUnit(input), { where, field: "the time in s" });
}

/**
 * Oxygen at the window, mol/m3, shortly after the window stops letting oxygen in.
 *
 * - `thickness_um`, `diffusivity_m2s` as in `lifeAfterSupplyCut`; `wallOxygen_molm3`: at the moment of the cut, at least 0;
 *   `time_s`: since the cut, at least 0, at most delta^2 / (10 D), s.
 *
 * C = Ci (1 - 4 sqrt(D t / (pi delta^2))), right to 1e-5 of Ci within its range, half the life of the dead zone.
 *
 * Assumes what `lifeAfterSupplyCut` does, and no film between the dead zone and the closed window.
 * @throws InputError when an argument is out of range or the time is too long for this law.
 * @source Short-time solution of the oxygen absorption problem: J. Crank, R. S. Gupta, J. Inst. Maths Applics 10 (1972) 19-33,
 * doi 10.1093/imamat/10.1.19 (from memory).
 * @example
 * ```ts
 * import { wallOxygenAfterSupplyCut } from "resinwright";
 * wallOxygenAfterSupplyCut({ thickness_um: 20, diffusivity_m2s: 1e-10, wallOxygen_molm3: 1, time_s: 0.08 }); // → 0.68085
 * ```
 */
export function wallOxygenAfterSupplyCut(input: {
  readonly thickness_um: number;
  readonly diffusivity_m2s: number;
  readonly wallOxygen_molm3: number;
  readonly time_s: number;
}): number {
  checkNumbers("wallOxygenAfterSupplyCut", input, {
    thickness_um: positive,
    diffusivity_m2s: positive,
    wallOxygen_molm3: notNegative,
    time_s: {
      min: 0,
      max: timeUnit(input) / 10,
      advice: "later than that use exposeLayer with a tight window",
    },
  });
  return input.wallOxygen_molm3 * (1 - 4 * Math.sqrt(input.time_s / timeUnit(input) / Math.PI));
}

/**
 * Light time in s until a film on glass has given all its oxygen and the dead zone above it is gone.
 *
 * - `filmThickness_um` h, above 0; `filmPartition` K, oxygen in the film over that in the resin at equilibrium, above 0;
 * - `saturation_molm3` C*: the resin in equilibrium with the film at the start, above 0, mol/m3;
 * - `flux_molm2s` N: into the resin at the start, as `deadZone` gives it, above 0, mol/(m2 s).
 *
 * t = 2 K h C* / N: the flux falls with the root of what is left.
 *
 * Assumes a film well mixed by diffusion, even light across the dead zone, and a dead zone that adjusts at once.
 * @throws InputError when an argument is out of range.
 * @source Oxygen balance of the film, derived for this library.
 * @example
 * ```ts
 * import { sealedFilmLife } from "resinwright";
 * sealedFilmLife({ filmThickness_um: 100, filmPartition: 1.68, saturation_molm3: 1, flux_molm2s: 1e-5 }); // → 33.6
 * ```
 */
export function sealedFilmLife(input: {
  readonly filmThickness_um: number;
  readonly filmPartition: number;
  readonly saturation_molm3: number;
  readonly flux_molm2s: number;
}): number {
  const where = "sealedFilmLife";
  checkNumbers(where, input, {
    filmThickness_um: positive,
    filmPartition: positive,
    saturation_molm3: positive,
    flux_molm2s: positive,
  });
  const held_molm2 = input.filmPartition * m_per_um * input.filmThickness_um * input.saturation_molm3;
  return checkNumber((2 * held_molm2) / input.flux_molm2s, { where, field: "the time in s" });
}

const timeUnit = (input: { readonly thickness_um: number; readonly diffusivity_m2s: number }): number =>
  (1e-12 * input.thickness_um ** 2) / input.diffusivity_m2s;
