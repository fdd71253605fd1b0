// A bleaching initiator beside an absorber that does not bleach: the exact reduction of the two equations to one integral.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { areaUnder } from "../../numerics/quadrature.js";
import { findRoot } from "../../numerics/root.js";
import { um_per_cm } from "../scales.js";
import type { Bleached, BleachingInput } from "./bleaching.js";

/**
 * What is left of a bleaching initiator and of the light at a depth after a time, beside an absorber that stays.
 *
 * - the fields of `bleachedFractions`, and `otherAbsorption_percm` alpha_b: Napierian, of absorber and resin, at least 0, 1/cm.
 *
 * The dose D = integral(I dt) obeys dD/dz = -(C0 / phi) (1 - exp(-phi kappa D)) - alpha_b D, for the light that the initiator
 * took is what it lost over phi. With s = phi kappa D, Z = kappa C0 z, tau = phi kappa I0 t, b = alpha_b / (kappa C0) and
 * g(u) = 1 - e^-u + b u: Z = integral from s to tau of du / g(u), C/C0 = e^-s and I/I0 = g(s) / g(tau).
 *
 * Assumes products that do not absorb, an absorber that does not bleach, no diffusion, one wavelength.
 * @throws InputError when an argument is out of range.
 * @source Derived for this library from dI/dz = -(kappa C + alpha_b) I, dC/dt = -phi kappa C I. Without the absorber it is
 * `bleachedFractions`.
 * @example
 * ```ts
 * import { bleachedBesideAbsorber } from "resinwright";
 * const left = bleachedBesideAbsorber({
 *   concentration_molL: 0.03,
 *   molarAbsorption_Lmolcm: 500,
 *   quantumYield: 0.5,
 *   photonFlux_molm2s: 1.7e-4,
 *   otherAbsorption_percm: 60,
 *   depth_um: 100,
 *   time_s: 100,
 * });
 * left.initiator.share; // → 0.6592
 * left.light.share; // → 0.4582
 * ```
 */
export function bleachedBesideAbsorber(
  input: BleachingInput & {
    readonly otherAbsorption_percm: number;
    readonly depth_um: number;
    readonly time_s: number;
  },
): Bleached {
  const where = "bleachedBesideAbsorber";
  checkNumbers(where, input, {
    concentration_molL: positive,
    molarAbsorption_Lmolcm: positive,
    quantumYield: { ...positive, max: 4 },
    photonFlux_molm2s: notNegative,
    otherAbsorption_percm: notNegative,
    depth_um: notNegative,
    time_s: notNegative,
  });
  const { molarAbsorption_Lmolcm: eps, concentration_molL: C0 } = input;
  const initiator_percm = Math.LN10 * eps * C0;
  const b = input.otherAbsorption_percm / initiator_percm;
  const Z = (initiator_percm * input.depth_um) / um_per_cm;
  // 1 L/(mol cm) is 0.1 m2/mol.
  const tau = input.quantumYield * Math.LN10 * 0.1 * eps * input.photonFlux_molm2s * input.time_s;
  checkNumbers(where, { b, Z, tau }, { b: {}, Z: {}, tau: {} });
  if (tau === 0) return { initiator: { share: 1 }, light: { share: Math.exp(-(1 + b) * Z) } };
  const lnS = doseAt({ Z, tau, b, where });
  return {
    initiator: { share: Math.exp(-Math.exp(lnS)) },
    light: {
      share: checkNumber((Math.exp(lnS) * takenOver(lnS, b)) / (tau * takenOver(Math.log(tau), b)), {
        where,
        field: "the share of the light",
      }),
    },
  };
}

/**
 * Depth Z between two doses s and tau, all without dimension as in {@link bleachedBesideAbsorber}. In ln u the integrand is
 * smooth over any range: u / g(u) lies between 1 / (1 + b) and 1 / b.
 * @internal
 */
export function depthBetween(given: { lnS: number; lnTau: number; b: number; where: string }): number {
  const { lnS, lnTau, b, where } = given;
  return areaUnder({ f: (lnU) => 1 / takenOver(lnU, b), low: lnS, high: lnTau, panel: 0.5, where });
}

/** ln s at a depth Z: the light falls off at least as fast as by the absorber alone, at most as fast as by all of both. */
function doseAt({ Z, tau, b, where }: { Z: number; tau: number; b: number; where: string }): number {
  const lnTau = Math.log(tau);
  const [low, high] = [lnTau - (1 + b) * Z, lnTau - b * Z];
  const excess = (lnS: number): number => depthBetween({ lnS, lnTau, b, where }) - Z;
  return Z === 0 || excess(low) <= 0 ? low : findRoot({ f: excess, low, high, where });
}

/** g(u) / u, which is 1 + b for small u and tends to b for large ones. */
const takenOver = (lnU: number, b: number): number => {
  const u = Math.exp(lnU);
  return (u === 0 ? 1 : -Math.expm1(-u) / u) + b;
};
