// How much initiator cures deepest at a given exposure: too little starts too slowly, too much takes the light to itself.
import { checkNumber, checkNumbers, InputError, notNegative, positive, unknownName } from "../../door.js";
import { findRoot } from "../../numerics/root.js";
import { um_per_cm } from "../scales.js";

/** What the best level of initiator depends on. */
export interface InitiatorQuestion {
  /** E: above 0, mJ/cm2. */
  readonly exposure_mJcm2: number;
  /** Of the initiator, decadic, above 0, L/(mol cm). */
  readonly molarAbsorption_Lmolcm: number;
  /** Napierian, of absorber and resin, at least 0, 1/cm; 0 for the initiator alone. */
  readonly otherAbsorption_percm: number;
  /** Ec at `referenceConcentration_molL`, above 0, mJ/cm2. */
  readonly criticalExposure_mJcm2: number;
  /** Initiator at which that critical exposure holds, above 0, mol/L. */
  readonly referenceConcentration_molL: number;
  /** How Ec falls with c: `inverse` where oxygen takes the light, `inverse-root` where the way to the gel does. */
  readonly dependence: "inverse" | "inverse-root";
  /** The most that dissolves, above 0, mol/L. */
  readonly solubility_molL: number;
}

/** The level that cures deepest, and how deep; or the finding that no level that dissolves cures at all. */
export type InitiatorLevel =
  | {
      readonly outcome: "deepest" | "limited-by-solubility";
      readonly concentration_molL: number;
      readonly cureDepth_um: number;
      /** 1 over the absorption of the whole resin at that level. */
      readonly opticalDepth_um: number;
      readonly criticalExposure_mJcm2: number;
    }
  | { readonly outcome: "never-cures"; readonly neededExposure_mJcm2: number };

/**
 * Concentration of initiator that cures deepest at an exposure, with or without absorber.
 *
 * - the fields of `InitiatorQuestion`.
 *
 * Cd = ln(E / Ec(c)) / (kappa c + alpha_other), Ec(c) = Ec_ref (c_ref / c)^m, m = 1 (`inverse`) or 1/2 (`inverse-root`). With c1
 * the concentration at which Ec(c1) = E, the maximum is at c* = c1 e^(1 + v), v e^v = alpha_other / (kappa c1 e); there
 * Cd* = m / (kappa c*). Without absorber v = 0 and c* = e c1. Below c* the depth rises with c, so a solubility below it is the
 * best level.
 *
 * Assumes one wavelength, a working-curve depth equal to the optical one, and one of the two laws for Ec; a real resin lies
 * between them.
 * @throws InputError when an argument is out of range or the dependence is not known.
 * @source Derived for this library. That such an optimum exists: abstract of J. H. Lee, R. K. Prud'homme, I. A. Aksay, J. Mater.
 * Res. 16 (2001) 3536-3544; that 1/Dp is linear in initiator and dye: abstract of V. Tomeckova, J. W. Halloran, J. Eur. Ceram.
 * Soc. 30 (2010) 3023-3033.
 * @example
 * ```ts
 * import { deepestInitiatorLevel } from "resinwright";
 * const level = deepestInitiatorLevel({
 *   exposure_mJcm2: 40,
 *   molarAbsorption_Lmolcm: 560,
 *   otherAbsorption_percm: 100,
 *   criticalExposure_mJcm2: 6,
 *   referenceConcentration_molL: 0.026,
 *   dependence: "inverse",
 *   solubility_molL: 0.1,
 * });
 * level.outcome === "deepest" && level.concentration_molL; // → 0.05000
 * level.outcome === "deepest" && level.cureDepth_um; // → 155.1
 * ```
 */
export function deepestInitiatorLevel(input: InitiatorQuestion): InitiatorLevel {
  checkInput(input);
  const { exposure_mJcm2: E, otherAbsorption_percm: other, solubility_molL } = input;
  const { criticalExposure_mJcm2: Ec, referenceConcentration_molL: reference } = input;
  const m = exponentOf(where, input.dependence);
  const kappa = Math.LN10 * input.molarAbsorption_Lmolcm;
  const c1 = reference * (Ec / E) ** (1 / m);
  const deepest = c1 * Math.exp(1 + productLog(other / (kappa * c1 * Math.E)));
  const c = checkNumber(Math.min(deepest, solubility_molL), {
    where,
    field: "the concentration in mol/L",
    ...positive,
  });
  const critical = Ec * (reference / c) ** m;
  if (critical >= E) return { outcome: "never-cures", neededExposure_mJcm2: critical };
  const alpha = kappa * c + other;
  return {
    outcome: deepest <= solubility_molL ? "deepest" : "limited-by-solubility",
    concentration_molL: c,
    cureDepth_um: (um_per_cm * Math.log(E / critical)) / alpha,
    opticalDepth_um: um_per_cm / alpha,
    criticalExposure_mJcm2: critical,
  };
}

const where = "deepestInitiatorLevel";
function checkInput(input: InitiatorQuestion): void {
  const { dependence, ...numbers } = input;
  checkNumbers(where, numbers, {
    exposure_mJcm2: positive,
    molarAbsorption_Lmolcm: positive,
    otherAbsorption_percm: notNegative,
    criticalExposure_mJcm2: positive,
    referenceConcentration_molL: positive,
    solubility_molL: positive,
  });
  exponentOf(where, dependence);
}

const exponents = { inverse: 1, "inverse-root": 0.5 } as const;

/** The m of Ec ~ c^-m. @internal */
export function exponentOf(where: string, dependence: InitiatorQuestion["dependence"]): number {
  if (dependence in exponents) return exponents[dependence];
  throw new InputError(unknownName(where, "dependence", String(dependence), Object.keys(exponents)));
}

/** The v of v e^v = x for x of at least 0: Lambert's function, which lies between 0 and ln(1 + x). */
const productLog = (x: number): number =>
  findRoot({ f: (v) => v - x * Math.exp(-v), low: 0, high: Math.log1p(x), where });
