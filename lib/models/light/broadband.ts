// Light of a broad engine on its way through a resin: what is left at a depth, and how fast it falls off there.
// The strongly absorbed wavelengths go first, so the light that is left reaches further: its optical depth grows.
import { checkNumber, notNegative, positive, type NumberRule } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { um_per_cm } from "../scales.js";
import type { LightEngine } from "./engine.js";

/** A resin under a light engine. */
export interface LitResin {
  readonly engine: LightEngine;
  /** Napierian absorption of the whole resin at each node of the engine, 1/cm. */
  readonly napierianAbsorptions_percm: NumberList;
}

/** A substance with a decadic molar absorption at each node of an engine. */
export interface SpectralAbsorber {
  readonly molarAbsorptions_Lmolcm: NumberList;
  readonly concentration_molL: number;
}

/**
 * Napierian absorption of a resin at each node of a spectrum, 1/cm.
 *
 * - `absorbers`: each with decadic `molarAbsorptions_Lmolcm` at the nodes and `concentration_molL`, all at least 0.
 * - `backgrounds_percm`: Napierian absorption of everything else at the nodes, 1/cm, at least 0.
 *
 * alpha_k = ln 10 * sum_i eps_ik c_i + background_k.
 *
 * Assumes that substances absorb independently of each other and do not scatter.
 * @throws InputError when a figure is negative or not finite, or a list has another length than `backgrounds_percm`.
 * @source IUPAC Gold Book, entries B00626 and A00037.
 * @example
 * ```ts
 * import { absorptionSpectrum } from "resinwright";
 * absorptionSpectrum({
 *   absorbers: [{ molarAbsorptions_Lmolcm: [500, 300], concentration_molL: 0.03 }],
 *   backgrounds_percm: [0.5, 0.4],
 * })[1]; // → 21.12
 * ```
 */
export function absorptionSpectrum(input: {
  readonly absorbers: readonly SpectralAbsorber[];
  readonly backgrounds_percm: NumberList;
}): Float64Array {
  const where = "absorptionSpectrum";
  const { absorbers, backgrounds_percm } = input;
  checkList(where, "backgrounds_percm", backgrounds_percm, notNegative);
  const alpha = Float64Array.from(backgrounds_percm);
  absorbers.forEach(({ molarAbsorptions_Lmolcm: eps, concentration_molL: c }, i) => {
    const field = `absorbers[${i}]`;
    checkNumber(c, { where, field: `${field}.concentration_molL`, ...notNegative });
    checkList(where, `${field}.molarAbsorptions_Lmolcm`, eps, notNegative);
    checkSameLength(where, { backgrounds_percm, [`${field}.molarAbsorptions_Lmolcm`]: eps });
    const napierian = Math.LN10 * c;
    for (let k = 0; k < alpha.length; k++) alpha[k]! += napierian * eps[k]!;
  });
  checkList(where, "the absorption", alpha, { advice: "an input is beyond any real substance" });
  return alpha;
}

/**
 * Share of a broad engine's light that is left at a depth, 0 to 1.
 *
 * - `engine`: made by `lightEngine`.
 * - `napierianAbsorptions_percm`: of the whole resin at each node of the engine, at least 0, 1/cm.
 * - `depth_um`: at least 0, um.
 *
 * T(z) = integral(S exp(-alpha z)) / integral(S).
 *
 * Assumes light at right angles to the window, no scattering and absorption that does not bleach.
 * @throws InputError when an argument is out of range or the lists differ in length.
 * @source Beer-Lambert law at each wavelength (IUPAC Gold Book B00626: it holds only for a narrow band).
 * @example
 * ```ts
 * import { broadTransmittedFraction, lightEngine } from "resinwright";
 * const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
 * const resin = { engine, napierianAbsorptions_percm: [200, 50] };
 * broadTransmittedFraction({ ...resin, depth_um: 100 }); // → 0.3709
 * ```
 */
export function broadTransmittedFraction(input: LitResin & { readonly depth_um: number }): number {
  const where = "broadTransmittedFraction";
  checkLitResin(where, input, notNegative);
  checkNumber(input.depth_um, { where, field: "depth_um", ...notNegative });
  return Math.exp(decayAt(input, input.depth_um / um_per_cm).lnTransmitted);
}

/**
 * Depth in um over which the light left at a place falls to 1/e, counted from there: the slope of the bending working curve.
 *
 * - `engine`, `napierianAbsorptions_percm`: as for `broadTransmittedFraction`, but above 0.
 * - `depth_um`: at least 0, um; at 0 it is the optical depth at the surface, 1 over the mean absorption.
 *
 * 1 / alpha_loc, alpha_loc(z) = integral(S alpha exp(-alpha z)) / integral(S exp(-alpha z)). It never falls with depth.
 *
 * Assumes what `broadTransmittedFraction` does.
 * @throws InputError when an argument is out of range or the lists differ in length.
 * @source Derivative of ln T(z); that it bends the working curve: abstract of B. W. Caplins et al., "Influence of spectral
 * bandwidth on the working curve in vat photopolymerization".
 * @example
 * ```ts
 * import { lightEngine, localOpticalDepth } from "resinwright";
 * const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
 * const resin = { engine, napierianAbsorptions_percm: [200, 50] };
 * localOpticalDepth({ ...resin, depth_um: 0 }); // → 80
 * localOpticalDepth({ ...resin, depth_um: 100 }); // → 129.3
 * ```
 */
export function localOpticalDepth(input: LitResin & { readonly depth_um: number }): number {
  const where = "localOpticalDepth";
  checkLitResin(where, input, absorbing);
  checkNumber(input.depth_um, { where, field: "depth_um", ...notNegative });
  return um_per_cm / decayAt(input, input.depth_um / um_per_cm).absorption_percm;
}

/** The rule for a resin in which light has a depth. @internal */
export const absorbing = {
  ...positive,
  advice: "without absorption light has no depth; include the background of the resin",
};

/** Refuses a resin whose absorption does not fit its engine. @internal */
export function checkLitResin(
  where: string,
  { engine, napierianAbsorptions_percm }: LitResin,
  rule: Omit<NumberRule, "where" | "field">,
): void {
  checkList(where, "napierianAbsorptions_percm", napierianAbsorptions_percm, rule);
  checkSameLength(where, { "engine.shares": engine.shares, napierianAbsorptions_percm });
}

/** Light at a depth: ln T, the local absorption, and the variance of the absorption over the light left there. @internal */
export interface Decay {
  readonly lnTransmitted: number;
  readonly absorption_percm: number;
  readonly variance_percm2: number;
}

/**
 * The decay at a depth in cm. The least absorption is taken out of the exponents, so that light many optical depths down does
 * not vanish from the sums.
 * @internal
 */
export function decayAt(
  { engine: { shares }, napierianAbsorptions_percm: alpha }: LitResin,
  z: number,
): Decay {
  let least = Infinity;
  for (let k = 0; k < shares.length; k++) if (shares[k]! > 0 && alpha[k]! < least) least = alpha[k]!;
  let [light, first, second] = [0, 0, 0];
  for (let k = 0; k < shares.length; k++) {
    if (shares[k] === 0) continue;
    const excess = alpha[k]! - least;
    const left = shares[k]! * Math.exp(-excess * z);
    light += left;
    first += excess * left;
    second += excess * excess * left;
  }
  const mean = first / light;
  return {
    lnTransmitted: Math.log(light) - least * z,
    absorption_percm: least + mean,
    variance_percm2: Math.max(second / light - mean * mean, 0),
  };
}
