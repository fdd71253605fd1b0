// How many radicals the light starts at the window, and how many live beside a given amount of oxygen.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { radicalYield } from "../ranges.js";
import { cm_per_m } from "../scales.js";

/**
 * Rate at which light starts radicals at the window, Ri in mol/(m3 s).
 *
 * - `photonFlux_molm2s`: entering the resin, at least 0, mol/(m2 s).
 * - `initiatorAbsorption_percm`: Napierian absorption of the initiator alone, at least 0, 1/cm; light taken by an
 *   absorber starts nothing.
 * - `radicalsPerPhoton`: chain-starting radicals per photon absorbed by the initiator (2 x efficiency x cleavage
 *   yield for a splitting initiator, 4 if both bonds of a bisacyl one are counted), above 0, at most 4.
 *
 * Ri = phi alpha_PI Phi0. Deeper down it falls as exp(-alpha z), alpha of everything.
 * @throws InputError when an argument is out of range.
 * @source Rate of light absorption, IUPAC Gold Book A00028 (from memory), times the radical yield.
 * @example
 * ```ts
 * import { radicalGeneration } from "resinwright";
 * radicalGeneration({ photonFlux_molm2s: 1.6928e-4, initiatorAbsorption_percm: 20, radicalsPerPhoton: 1 }); // → 0.3386
 * ```
 */
export function radicalGeneration(input: {
  readonly photonFlux_molm2s: number;
  readonly initiatorAbsorption_percm: number;
  readonly radicalsPerPhoton: number;
}): number {
  const where = "radicalGeneration";
  checkNumbers(where, input, {
    photonFlux_molm2s: notNegative,
    initiatorAbsorption_percm: notNegative,
    radicalsPerPhoton: radicalYield,
  });
  const initiatorAbsorption_perm = cm_per_m * input.initiatorAbsorption_percm;
  return checkNumber(input.radicalsPerPhoton * initiatorAbsorption_perm * input.photonFlux_molm2s, {
    where,
    field: "the radical generation",
  });
}

/**
 * Steady concentration of chain radicals beside oxygen, mol/m3.
 *
 * - `radicalGeneration_molm3s`: Ri, at least 0, mol/(m3 s).
 * - `oxygen_molm3`: C, at least 0, mol/m3.
 * - `termination_m3mols`: kt with d[R]/dt = Ri - 2 kt [R]^2 - kO C [R], above 0, m3/(mol s).
 * - `oxygenCapture_m3mols`: kO of radical + oxygen, above 0, m3/(mol s).
 *
 * R = 2 Ri / (kO C + sqrt((kO C)^2 + 8 kt Ri)). This is the root of the balance written so that nothing cancels: the
 * usual form -kO C + sqrt(...) loses up to half of all digits while oxygen is there.
 *
 * Assumes that radicals adjust at once (microseconds with oxygen, milliseconds without) and that a peroxyl radical
 * does not start a chain.
 * @throws InputError when an argument is out of range.
 * @source Quasi-steady balance; C. Decker, A. D. Jenkins, Macromolecules 18 (1985) 1241-1244, doi 10.1021/ma00148a034
 * (from memory).
 * @example
 * ```ts
 * import { quasiSteadyRadicals } from "resinwright";
 * quasiSteadyRadicals({
 *   radicalGeneration_molm3s: 0.5,
 *   oxygen_molm3: 1,
 *   termination_m3mols: 2500,
 *   oxygenCapture_m3mols: 5e5,
 * }); // → 9.9999999e-7
 * ```
 */
export function quasiSteadyRadicals(input: {
  readonly radicalGeneration_molm3s: number;
  readonly oxygen_molm3: number;
  readonly termination_m3mols: number;
  readonly oxygenCapture_m3mols: number;
}): number {
  checkNumbers("quasiSteadyRadicals", input, {
    radicalGeneration_molm3s: notNegative,
    oxygen_molm3: notNegative,
    termination_m3mols: positive,
    oxygenCapture_m3mols: positive,
  });
  const { radicalGeneration_molm3s: Ri, oxygen_molm3: C } = input;
  if (Ri === 0) return 0;
  const captured = input.oxygenCapture_m3mols * C;
  return checkNumber(
    (2 * Ri) / (captured + Math.hypot(captured, Math.sqrt(8 * input.termination_m3mols * Ri))),
    {
      where: "quasiSteadyRadicals",
      field: "the radical concentration",
      advice: "check that the rate constants are in m3/(mol s)",
    },
  );
}
