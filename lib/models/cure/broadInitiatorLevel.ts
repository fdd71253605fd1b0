// How much initiator cures deepest under a broad light engine: the same question as for one wavelength, solved by numbers.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { findRoot } from "../../numerics/root.js";
import type { LightEngine } from "../light/engine.js";
import { um_per_cm } from "../scales.js";
import { broadCureDepth } from "./bendingCurve.js";
import { exponentOf, type InitiatorQuestion } from "./initiatorLevel.js";

/** The level that cures deepest, and how deep; or the finding that no level that dissolves cures at all. */
export type BroadInitiatorLevel =
  | {
      readonly outcome: "deepest" | "limited-by-solubility";
      readonly concentration_molL: number;
      readonly cureDepth_um: number;
      readonly criticalExposure_mJcm2: number;
    }
  | { readonly outcome: "never-cures"; readonly neededExposure_mJcm2: number };

/**
 * Concentration of initiator that cures deepest at an exposure by a broad engine, with or without absorber.
 *
 * - `engine`: made by `lightEngine`; `initiatorAbsorptions_Lmolcm`: decadic, at its nodes, at least 0, L/(mol cm).
 * - `otherAbsorptions_percm`: Napierian, of absorber and resin at the nodes, above 0, 1/cm.
 * - the other fields as in `deepestInitiatorLevel`.
 *
 * Along E T(z; c) = Ec(c) the depth is greatest where m = c kappa_loc z, kappa_loc the Napierian molar absorption of the
 * initiator averaged over the light left at z; found by a bracketing root finder between the level that just cures and the
 * solubility.
 *
 * Assumes what `broadCureDepth` and `deepestInitiatorLevel` do; the depth has one maximum.
 * @throws InputError when an argument is out of range, the lists differ in length, or the dependence is not known.
 * @source Derived for this library; tends to `deepestInitiatorLevel` for an engine of one line.
 * @example
 * ```ts
 * import { deepestBroadInitiatorLevel, lightEngine } from "resinwright";
 * const level = deepestBroadInitiatorLevel({
 *   engine: lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] }),
 *   initiatorAbsorptions_Lmolcm: [600, 400],
 *   otherAbsorptions_percm: [100, 100],
 *   exposure_mJcm2: 40,
 *   criticalExposure_mJcm2: 6,
 *   referenceConcentration_molL: 0.026,
 *   dependence: "inverse",
 *   solubility_molL: 0.1,
 * });
 * level.outcome === "deepest" && level.cureDepth_um; // → 163.3
 * ```
 */
export function deepestBroadInitiatorLevel(
  input: Omit<InitiatorQuestion, "molarAbsorption_Lmolcm" | "otherAbsorption_percm"> & {
    readonly engine: LightEngine;
    readonly initiatorAbsorptions_Lmolcm: NumberList;
    readonly otherAbsorptions_percm: NumberList;
  },
): BroadInitiatorLevel {
  const where = "deepestBroadInitiatorLevel";
  const { engine, initiatorAbsorptions_Lmolcm: eps, otherAbsorptions_percm: other } = input;
  const { exposure_mJcm2: E, criticalExposure_mJcm2: Ec } = input;
  const { referenceConcentration_molL: reference, solubility_molL: most } = input;
  checkNumbers(where, input, {
    exposure_mJcm2: positive,
    criticalExposure_mJcm2: positive,
    referenceConcentration_molL: positive,
    solubility_molL: positive,
  });
  const m = exponentOf(where, input.dependence);
  checkList(where, "initiatorAbsorptions_Lmolcm", eps, notNegative);
  checkList(where, "otherAbsorptions_percm", other, positive);
  checkSameLength(where, {
    "engine.shares": engine.shares,
    initiatorAbsorptions_Lmolcm: eps,
    otherAbsorptions_percm: other,
  });
  const criticalAt = (c: number): number => Ec * (reference / c) ** m;
  const alphaAt = (c: number): number[] => Array.from(other, (alpha, k) => alpha + Math.LN10 * eps[k]! * c);
  const depthAt = (c: number): number =>
    broadCureDepth({
      engine,
      napierianAbsorptions_percm: alphaAt(c),
      exposure_mJcm2: E,
      criticalExposure_mJcm2: criticalAt(c),
    });
  const levelAt = (outcome: "deepest" | "limited-by-solubility", concentration_molL: number) => ({
    outcome,
    concentration_molL,
    cureDepth_um: depthAt(concentration_molL),
    criticalExposure_mJcm2: criticalAt(concentration_molL),
  });
  if (criticalAt(most) >= E) return { outcome: "never-cures", neededExposure_mJcm2: criticalAt(most) };
  /** Sign of dz/dc: above 0 more initiator still deepens. */
  const gain = (c: number): number => {
    const z = depthAt(c) / um_per_cm;
    const alpha = alphaAt(c);
    const least = Math.min(...alpha);
    let [light, taken] = [0, 0];
    engine.shares.forEach((share, k) => {
      const left = share * Math.exp(-(alpha[k]! - least) * z);
      light += left;
      taken += left * Math.LN10 * eps[k]!;
    });
    return m - (c * z * taken) / light;
  };
  if (gain(most) >= 0) return levelAt("limited-by-solubility", most);
  const justCures = checkNumber(reference * (Ec / E) ** (1 / m), {
    where,
    field: "the level that just cures",
  });
  return levelAt("deepest", findRoot({ f: gain, low: justCures, high: most, where }));
}
