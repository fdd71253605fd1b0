// How much absorber a wanted depth asks for. More absorber never deepens, so the answer is one number, or a reason why not.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { findRoot } from "../../numerics/root.js";
import { decayAt } from "../light/broadband.js";
import type { LightEngine } from "../light/engine.js";
import { um_per_cm } from "../scales.js";
import { broadCureDepth } from "./bendingCurve.js";

/** The level of absorber, or why there is none; the depth is of the kind that was asked for. */
export type AbsorberLevel =
  | { readonly outcome: "found"; readonly concentration_molL: number }
  /** The resin is no deeper than wanted without any absorber: take initiator out, or use less exposure. */
  | { readonly outcome: "shallow-without-absorber"; readonly depthWithoutAbsorber_um: number }
  /** Even as much absorber as dissolves leaves it deeper: take a stronger absorber. */
  | { readonly outcome: "beyond-solubility"; readonly depthAtSolubility_um: number };

/**
 * Concentration of absorber that gives a resin the wanted optical depth.
 *
 * - `opticalDepth_um`: wanted, 1 over the Napierian absorption, above 0, um. It is not the slope of a working curve.
 * - `molarAbsorption_Lmolcm`: of the absorber, decadic, above 0, L/(mol cm).
 * - `otherAbsorption_percm`: Napierian, of initiator and resin, at least 0, 1/cm.
 * - `solubility_molL`: the most that dissolves, above 0, mol/L.
 *
 * c = (1/depth - alpha_other) / (ln 10 eps).
 *
 * Assumes one wavelength; for a broad engine use `absorberForCureDepth`.
 * @throws InputError when an argument is out of range.
 * @source Beer-Lambert law (IUPAC Gold Book B00626), solved for c.
 * @example
 * ```ts
 * import { absorberForOpticalDepth } from "resinwright";
 * const level = absorberForOpticalDepth({
 *   opticalDepth_um: 50,
 *   molarAbsorption_Lmolcm: 9092,
 *   otherAbsorption_percm: 30,
 *   solubility_molL: 0.02,
 * });
 * level.outcome === "found" && level.concentration_molL; // → 0.00812
 * ```
 */
export function absorberForOpticalDepth(input: {
  readonly opticalDepth_um: number;
  readonly molarAbsorption_Lmolcm: number;
  readonly otherAbsorption_percm: number;
  readonly solubility_molL: number;
}): AbsorberLevel {
  const where = "absorberForOpticalDepth";
  checkNumbers(where, input, {
    opticalDepth_um: positive,
    molarAbsorption_Lmolcm: positive,
    otherAbsorption_percm: notNegative,
    solubility_molL: positive,
  });
  const { otherAbsorption_percm: other, solubility_molL } = input;
  const wanted = um_per_cm / input.opticalDepth_um;
  const perMole = Math.LN10 * input.molarAbsorption_Lmolcm;
  if (other >= wanted) {
    return { outcome: "shallow-without-absorber", depthWithoutAbsorber_um: um_per_cm / other };
  }
  const most = checkNumber(other + perMole * solubility_molL, {
    where,
    field: "the absorption at solubility_molL",
  });
  if (most < wanted) return { outcome: "beyond-solubility", depthAtSolubility_um: um_per_cm / most };
  return { outcome: "found", concentration_molL: (wanted - other) / perMole };
}

/**
 * Concentration of absorber with which a broad engine cures to the wanted depth.
 *
 * - `cureDepth_um`: wanted, above 0, um.
 * - `engine`: made by `lightEngine`; `absorberAbsorptions_Lmolcm`: decadic, at its nodes, at least 0, L/(mol cm).
 * - `otherAbsorptions_percm`: Napierian, of initiator and resin at the nodes, above 0, 1/cm.
 * - `exposure_mJcm2`: above `criticalExposure_mJcm2`, which is above 0; `solubility_molL`: above 0.
 *
 * The c with E T(Cd; c) = Ec, T as in `broadCureDepth`; found by a bracketing root finder, for T falls with c.
 *
 * Assumes what `broadCureDepth` does, and a critical exposure that does not depend on the absorber: at the window there is
 * nothing before the initiator.
 * @throws InputError when an argument is out of range, the lists differ in length, or the absorber absorbs nothing.
 * @source As `broadCureDepth`.
 * @example
 * ```ts
 * import { absorberForCureDepth, lightEngine } from "resinwright";
 * const level = absorberForCureDepth({
 *   cureDepth_um: 75,
 *   engine: lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] }),
 *   absorberAbsorptions_Lmolcm: [8700, 9500],
 *   otherAbsorptions_percm: [40, 25],
 *   exposure_mJcm2: 20,
 *   criticalExposure_mJcm2: 5,
 *   solubility_molL: 0.02,
 * });
 * level.outcome === "found" && level.concentration_molL; // → 0.00727
 * ```
 */
export function absorberForCureDepth(input: {
  readonly cureDepth_um: number;
  readonly engine: LightEngine;
  readonly absorberAbsorptions_Lmolcm: NumberList;
  readonly otherAbsorptions_percm: NumberList;
  readonly exposure_mJcm2: number;
  readonly criticalExposure_mJcm2: number;
  readonly solubility_molL: number;
}): AbsorberLevel {
  const where = "absorberForCureDepth";
  const { cureDepth_um, engine, solubility_molL } = input;
  const { exposure_mJcm2: E, criticalExposure_mJcm2: Ec } = input;
  const { absorberAbsorptions_Lmolcm: eps, otherAbsorptions_percm: other } = input;
  checkNumber(cureDepth_um, { where, field: "cureDepth_um", ...positive });
  checkNumber(solubility_molL, { where, field: "solubility_molL", ...positive });
  checkNumber(Ec, { where, field: "criticalExposure_mJcm2", ...positive });
  checkNumber(E, {
    where,
    field: "exposure_mJcm2",
    min: Ec,
    above: true,
    advice: "up to the critical exposure nothing cures, with or without absorber",
  });
  checkList(where, "absorberAbsorptions_Lmolcm", eps, notNegative);
  checkList(where, "otherAbsorptions_percm", other, positive);
  checkSameLength(where, {
    "engine.shares": engine.shares,
    absorberAbsorptions_Lmolcm: eps,
    otherAbsorptions_percm: other,
  });
  const resin = (c: number) => ({
    engine,
    napierianAbsorptions_percm: Array.from(other, (alpha, k) => alpha + Math.LN10 * eps[k]! * c),
  });
  const depthAt = (c: number): number =>
    broadCureDepth({ ...resin(c), exposure_mJcm2: E, criticalExposure_mJcm2: Ec });
  const withoutAbsorber = depthAt(0);
  if (withoutAbsorber <= cureDepth_um) {
    return { outcome: "shallow-without-absorber", depthWithoutAbsorber_um: withoutAbsorber };
  }
  const atSolubility = depthAt(solubility_molL);
  if (atSolubility > cureDepth_um) {
    return { outcome: "beyond-solubility", depthAtSolubility_um: atSolubility };
  }
  const excess = (c: number): number =>
    decayAt(resin(c), cureDepth_um / um_per_cm).lnTransmitted + Math.log(E) - Math.log(Ec);
  const concentration_molL = findRoot({ f: excess, low: 0, high: solubility_molL, where });
  return { outcome: "found", concentration_molL };
}
