// The working curve of a broad light engine: it bends upward, because the light that is left deep down is absorbed less.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { absorbing, checkLitResin, decayAt, type LitResin } from "../light/broadband.js";
import type { LightEngine } from "../light/engine.js";
import { um_per_cm } from "../scales.js";

/** A resin under an engine, with the exposure that just begins to gel it at the window. */
export interface BroadCure extends LitResin {
  /** Ec: above 0, mJ/cm2 of this engine's light. */
  readonly criticalExposure_mJcm2: number;
}

/**
 * Depth in um to which an exposure by a broad engine cures; 0 up to the critical exposure.
 *
 * - `engine`: made by `lightEngine`; `napierianAbsorptions_percm`: of the whole resin at its nodes, above 0, 1/cm.
 * - `criticalExposure_mJcm2`: above 0; `exposure_mJcm2`: at least 0; both in light of this engine.
 *
 * The z with E T(z) = Ec, T(z) = integral(S exp(-alpha z)) / integral(S), by Halley's iteration on ln T. For one wavelength it
 * is Cd = ln(E / Ec) / alpha. For a whole map of resins use `broadCureDepthMap`.
 *
 * Assumes that every wavelength of the engine starts the cure alike; if not, give `lightEngine` the power weighted with what
 * the initiator absorbs. Only the exposure counts, not the irradiance; no bleaching.
 * @throws InputError when an argument is out of range or the lists differ in length.
 * @source Beer-Lambert law at each wavelength; abstract of B. W. Caplins et al., "Influence of spectral bandwidth on the
 * working curve in vat photopolymerization"; equation derived for this library.
 * @example
 * ```ts
 * import { broadCureDepth, lightEngine } from "resinwright";
 * const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
 * const resin = { engine, napierianAbsorptions_percm: [200, 50], criticalExposure_mJcm2: 5 };
 * broadCureDepth({ ...resin, exposure_mJcm2: 20 }); // → 156.8
 * ```
 */
export function broadCureDepth(input: BroadCure & { readonly exposure_mJcm2: number }): number {
  const where = "broadCureDepth";
  const { exposure_mJcm2: E, criticalExposure_mJcm2: Ec } = input;
  checkLitResin(where, input, absorbing);
  checkNumber(E, { where, field: "exposure_mJcm2", ...notNegative });
  checkNumber(Ec, { where, field: "criticalExposure_mJcm2", ...positive });
  if (E <= Ec) return 0;
  const z = depthAtLight(input, Math.log(Ec) - Math.log(E), 0);
  return checkNumber(z * um_per_cm, { where, field: "the cure depth in um" });
}

/**
 * Exposure in mJ/cm2 by a broad engine that cures to a depth.
 *
 * - the fields of `broadCureDepth`, and `cureDepth_um`: at least 0, um.
 *
 * E = Ec / T(Cd).
 *
 * Assumes what `broadCureDepth` does.
 * @throws InputError when an argument is out of range, or no light reaches the depth.
 * @source As `broadCureDepth`.
 * @example
 * ```ts
 * import { broadExposureForDepth, lightEngine } from "resinwright";
 * const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
 * const resin = { engine, napierianAbsorptions_percm: [200, 50], criticalExposure_mJcm2: 5 };
 * broadExposureForDepth({ ...resin, cureDepth_um: 100 }); // → 13.48
 * ```
 */
export function broadExposureForDepth(input: BroadCure & { readonly cureDepth_um: number }): number {
  const where = "broadExposureForDepth";
  const { cureDepth_um, criticalExposure_mJcm2 } = input;
  checkLitResin(where, input, absorbing);
  checkNumbers(
    where,
    { cureDepth_um, criticalExposure_mJcm2 },
    { cureDepth_um: notNegative, criticalExposure_mJcm2: positive },
  );
  const { lnTransmitted } = decayAt(input, cureDepth_um / um_per_cm);
  return checkNumber(criticalExposure_mJcm2 * Math.exp(-lnTransmitted), {
    where,
    field: "the exposure in mJ/cm2",
    advice: "no light reaches that far",
  });
}

/** What a map of cure depths over initiator and absorber needs. */
export interface CureDepthMap {
  readonly engine: LightEngine;
  /** Decadic, at the nodes of the engine, at least 0, L/(mol cm). */
  readonly initiatorAbsorptions_Lmolcm: NumberList;
  readonly absorberAbsorptions_Lmolcm: NumberList;
  /** Napierian, of the resin itself, at the nodes, above 0, 1/cm. */
  readonly backgrounds_percm: NumberList;
  /** Levels, at least 0, mol/L; best in rising order. */
  readonly initiatorLevels_molL: NumberList;
  readonly absorberLevels_molL: NumberList;
  /** Ec at each level of initiator, above 0, mJ/cm2. */
  readonly criticalExposures_mJcm2: NumberList;
  readonly exposure_mJcm2: number;
}

/**
 * Cure depths in um of a whole map of resins under a broad engine: one row per level of initiator, one column per level of
 * absorber.
 *
 * - the fields of `CureDepthMap`.
 *
 * Each depth is that of `broadCureDepth`, found from its neighbours and therefore several times faster.
 *
 * Assumes what `broadCureDepth` does.
 * @throws InputError when an argument is out of range or lists that belong together differ in length.
 * @source As `broadCureDepth`.
 * @example
 * ```ts
 * import { broadCureDepthMap, lightEngine } from "resinwright";
 * const map = broadCureDepthMap({
 *   engine: lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] }),
 *   initiatorAbsorptions_Lmolcm: [600, 400],
 *   absorberAbsorptions_Lmolcm: [8700, 9500],
 *   backgrounds_percm: [0.5, 0.5],
 *   initiatorLevels_molL: [0.01, 0.02],
 *   absorberLevels_molL: [0, 0.002, 0.004],
 *   criticalExposures_mJcm2: [16, 8],
 *   exposure_mJcm2: 40,
 * });
 * map[1]?.[2]; // → 149.9
 * ```
 */
export function broadCureDepthMap(input: CureDepthMap): number[][] {
  checkMap(input);
  const { engine, backgrounds_percm, exposure_mJcm2 } = input;
  const nodes = engine.shares.length;
  const alpha = new Float64Array(nodes);
  const resin = { engine, napierianAbsorptions_percm: alpha };
  const initiator = Float64Array.from(input.initiatorAbsorptions_Lmolcm, (eps) => Math.LN10 * eps);
  const absorber = Float64Array.from(input.absorberAbsorptions_Lmolcm, (eps) => Math.LN10 * eps);
  let before: number[] = [];
  return Array.from(input.initiatorLevels_molL, (ci, i) => {
    const lnNeeded = Math.log(input.criticalExposures_mJcm2[i]!) - Math.log(exposure_mJcm2);
    const row: number[] = [];
    for (const ca of input.absorberLevels_molL) {
      if (lnNeeded >= 0) {
        row.push(0);
        continue;
      }
      for (let k = 0; k < nodes; k++) {
        alpha[k] = backgrounds_percm[k]! + ci * initiator[k]! + ca * absorber[k]!;
      }
      row.push(depthAtLight(resin, lnNeeded, guess(row, before)));
    }
    before = row;
    return row.map((z) =>
      checkNumber(z * um_per_cm, { where: "broadCureDepthMap", field: "the cure depth in um" }),
    );
  });
}

/** On the parabola through the last three of the row, or as in the row before. */
function guess(row: readonly number[], before: readonly number[]): number {
  const j = row.length;
  if (j < 3) return before[j] ?? 0;
  return Math.max(3 * row[j - 1]! - 3 * row[j - 2]! + row[j - 3]!, 0);
}

function checkMap(input: CureDepthMap): void {
  const where = "broadCureDepthMap";
  const { engine, initiatorAbsorptions_Lmolcm, absorberAbsorptions_Lmolcm, backgrounds_percm } = input;
  const { initiatorLevels_molL, absorberLevels_molL, criticalExposures_mJcm2, exposure_mJcm2 } = input;
  checkList(where, "initiatorAbsorptions_Lmolcm", initiatorAbsorptions_Lmolcm, notNegative);
  checkList(where, "absorberAbsorptions_Lmolcm", absorberAbsorptions_Lmolcm, notNegative);
  checkList(where, "backgrounds_percm", backgrounds_percm, absorbing);
  checkSameLength(where, {
    "engine.shares": engine.shares,
    initiatorAbsorptions_Lmolcm,
    absorberAbsorptions_Lmolcm,
    backgrounds_percm,
  });
  checkList(where, "initiatorLevels_molL", initiatorLevels_molL, notNegative);
  checkList(where, "absorberLevels_molL", absorberLevels_molL, notNegative);
  checkList(where, "criticalExposures_mJcm2", criticalExposures_mJcm2, positive);
  checkSameLength(where, { initiatorLevels_molL, criticalExposures_mJcm2 });
  checkNumber(exposure_mJcm2, { where, field: "exposure_mJcm2", ...positive });
}

/**
 * The depth in cm at which ln T has fallen to `lnNeeded`, below 0. Halley's step where the curve bends little on the way,
 * Newton's otherwise: ln T is convex, so that one never goes too far.
 */
function depthAtLight(resin: LitResin, lnNeeded: number, start: number): number {
  let z = start;
  for (;;) {
    const { lnTransmitted, absorption_percm: alpha, variance_percm2 } = decayAt(resin, z);
    const newton = (lnTransmitted - lnNeeded) / alpha;
    const bend = (newton * variance_percm2) / (2 * alpha);
    const step = newton / (1 - (Math.abs(bend) < 0.3 ? bend : 0));
    z = Math.max(z + step, 0);
    // The step after this one would be smaller by its square.
    if (Math.abs(step) <= 1e-4 * z || Math.abs(step) * alpha < 1e-13) return z;
  }
}
