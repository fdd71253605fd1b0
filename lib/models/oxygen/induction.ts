// How long, or how much exposure, the dissolved oxygen costs before polymerisation can start.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { photonEnergy } from "../light/photons.js";
import { radicalYield, wavelength } from "../ranges.js";
import { cm_per_m, um_per_cm } from "../scales.js";

/** What the induction time at the window depends on. */
export interface InductionInput {
  /** Oxygen dissolved at the start, C0, at least 0, mol/m3. */
  readonly oxygen_molm3: number;
  /** Ri at the window, above 0, mol/(m3 s). */
  readonly radicalGeneration_molm3s: number;
  /** Oxygen molecules used up per radical started, s, above 0; 1 unless measured. */
  readonly oxygenPerRadical: number;
}

/**
 * Time in s until the dissolved oxygen at the window is used up, with no supply from outside.
 *
 * - `oxygen_molm3`: C0, at least 0, mol/m3; 0.6 to 2 in air-saturated acrylates.
 * - `radicalGeneration_molm3s`: Ri at the window, above 0, mol/(m3 s).
 * - `oxygenPerRadical`: s, above 0; 1 when each radical takes one oxygen, more with thiols or amines.
 *
 * t = C0 / (s Ri). Measured on a sealed film it gives s.
 *
 * Assumes that oxygen takes every radical until it is gone; with rate constants of the usual order that is true to 0.1 %.
 * @throws InputError when an argument is out of range.
 * @source Oxygen balance; C. Decker, A. D. Jenkins, Macromolecules 18 (1985) 1241-1244, doi 10.1021/ma00148a034
 * (from memory). Range of C0: L. Gou, C. N. Coretsopoulos, A. B. Scranton, J. Polym. Sci. A 42 (2004) 1285 (abstract).
 * @example
 * ```ts
 * import { inductionTime } from "resinwright";
 * inductionTime({ oxygen_molm3: 1, radicalGeneration_molm3s: 0.5, oxygenPerRadical: 1 }); // → 2
 * ```
 */
export function inductionTime(input: InductionInput): number {
  const where = "inductionTime";
  checkInduction(where, input);
  return stated(where, atWindow(input));
}

/**
 * Time in s until the dissolved oxygen at a depth is used up, with no supply from outside.
 *
 * - the fields of `inductionTime`, with Ri at the window;
 * - `napierianAbsorption_percm`: of everything in the resin, at least 0, 1/cm;
 * - `depth_um`: at least 0, um.
 *
 * t(z) = C0 / (s Ri) exp(alpha z). The depth freed of oxygen therefore grows as a working curve of its own.
 *
 * Assumes what `inductionTime` does, and that oxygen does not diffuse in the meantime.
 * @throws InputError when an argument is out of range, or so little light reaches the depth that no time can be stated.
 * @source Oxygen balance with the Beer-Lambert law, derived for this library.
 * @example
 * ```ts
 * import { inductionTimeAtDepth } from "resinwright";
 * inductionTimeAtDepth({
 *   oxygen_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   napierianAbsorption_percm: 100,
 *   depth_um: 50,
 * }); // → 3.2974
 * ```
 */
export function inductionTimeAtDepth(
  input: InductionInput & { readonly napierianAbsorption_percm: number; readonly depth_um: number },
): number {
  const where = "inductionTimeAtDepth";
  const { napierianAbsorption_percm, depth_um } = input;
  checkInduction(where, input);
  checkNumbers(
    where,
    { napierianAbsorption_percm, depth_um },
    { napierianAbsorption_percm: notNegative, depth_um: notNegative },
  );
  return stated(where, atWindow(input) * Math.exp((napierianAbsorption_percm * depth_um) / um_per_cm));
}

/**
 * Exposure in mJ/cm2 that uses up the dissolved oxygen at the window: the part of the critical exposure that is oxygen.
 *
 * - `oxygen_molm3`: C0, at least 0, mol/m3.
 * - `wavelength_nm`: 100 to 2000 nm.
 * - `radicalsPerPhoton`: chain-starting radicals per photon absorbed by the initiator, above 0, at most 4.
 * - `oxygenPerRadical`: s, above 0.
 * - `initiatorAbsorption_percm`: Napierian absorption of the initiator alone, above 0, 1/cm.
 *
 * Ec = C0 N_A h c / (lambda s phi alpha_PI).
 *
 * Assumes what `inductionTime` does. A measured critical exposure also holds the way from the first chains to the gel.
 * @throws InputError when an argument is out of range.
 * @source Oxygen balance, derived for this library.
 * @example
 * ```ts
 * import { oxygenCriticalExposure } from "resinwright";
 * oxygenCriticalExposure({
 *   oxygen_molm3: 1,
 *   wavelength_nm: 405,
 *   radicalsPerPhoton: 1,
 *   oxygenPerRadical: 1,
 *   initiatorAbsorption_percm: 20,
 * }); // → 14.77
 * ```
 */
export function oxygenCriticalExposure(input: {
  readonly oxygen_molm3: number;
  readonly wavelength_nm: number;
  readonly radicalsPerPhoton: number;
  readonly oxygenPerRadical: number;
  readonly initiatorAbsorption_percm: number;
}): number {
  const where = "oxygenCriticalExposure";
  checkNumbers(where, input, {
    oxygen_molm3: notNegative,
    wavelength_nm: wavelength,
    radicalsPerPhoton: radicalYield,
    oxygenPerRadical: positive,
    initiatorAbsorption_percm: positive,
  });
  const { oxygen_molm3: C0, radicalsPerPhoton: phi, oxygenPerRadical: s } = input;
  const initiatorAbsorption_perm = cm_per_m * input.initiatorAbsorption_percm;
  const exposure_Jm2 = (C0 * photonEnergy(input)) / (s * phi * initiatorAbsorption_perm);
  return checkNumber(exposure_Jm2 / 10, { where, field: "the exposure in mJ/cm2" });
}

function checkInduction(where: string, input: InductionInput): void {
  checkNumbers(where, input, {
    oxygen_molm3: notNegative,
    radicalGeneration_molm3s: { ...positive, advice: "without light oxygen is never used up" },
    oxygenPerRadical: positive,
  });
}

const atWindow = ({
  oxygen_molm3: C0,
  radicalGeneration_molm3s: Ri,
  oxygenPerRadical: s,
}: InductionInput): number => C0 / (s * Ri);

const stated = (where: string, time_s: number): number =>
  checkNumber(time_s, { where, field: "the induction time in s", advice: "hardly any light arrives there" });
