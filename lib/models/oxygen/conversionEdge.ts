// The dead zone as a part shows it: the layer that has not reached gel conversion when the light goes off.
import { checkNumbers, notNegative, positive } from "../../door.js";
import { um_per_m } from "../scales.js";
import { deadZone, type DeadZoneInput } from "./deadZone.js";

/** A dead zone read from conversion, or the finding that this exposure gels no depth at all. */
export type ConversionEdge =
  | {
      readonly outcome: "dead-zone";
      readonly thickness_um: number;
      /** Oxygen at its edge, mol/m3. */
      readonly edgeOxygen_molm3: number;
    }
  | {
      readonly outcome: "stays-liquid";
      /** Exposure that gels resin without oxygen, s. */
      readonly neededTime_s: number;
    };

/**
 * Thickness of the layer that stays below gel conversion under a steady dead zone.
 *
 * - the fields of `deadZone` but for `napierianAbsorption_percm`: the light is taken as even;
 * - `gelConversion` Xg, above 0, below 1; `exposureTime_s` te, above 0, s;
 * - `propagation_m3mols` kp, `termination_m3mols` kt, `oxygenCapture_m3mols` kO, above 0.
 *
 * Rg = -ln(1 - Xg) / (kp te) radicals gel the resin in time; the oxygen that leaves as many is
 * Cg = (Ri / Rg - 2 kt Rg) / kO, and it stands at z = delta - sqrt(2 D Cg / (s Ri)).
 *
 * Assumes that the dead zone is steady from the start of the exposure.
 * @throws InputError when an argument is out of range.
 * @source Quasi-steady balance of radicals with the profile of `deadZone`, derived for this library.
 * @example
 * ```ts
 * import { conversionEdge } from "resinwright";
 * const edge = conversionEdge({
 *   diffusivity_m2s: 1e-10,
 *   saturation_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   filmEquivalentThickness_um: 0,
 *   gelConversion: 0.2,
 *   exposureTime_s: 5,
 *   propagation_m3mols: 25,
 *   termination_m3mols: 2500,
 *   oxygenCapture_m3mols: 5e5,
 * });
 * edge.outcome === "dead-zone" && edge.thickness_um; // → 19.5342
 * ```
 */
export function conversionEdge(
  input: Omit<DeadZoneInput, "napierianAbsorption_percm"> & {
    readonly gelConversion: number;
    readonly exposureTime_s: number;
    readonly propagation_m3mols: number;
    readonly termination_m3mols: number;
    readonly oxygenCapture_m3mols: number;
  },
): ConversionEdge {
  checkNumbers("conversionEdge", input, {
    diffusivity_m2s: positive,
    saturation_molm3: notNegative,
    radicalGeneration_molm3s: positive,
    oxygenPerRadical: positive,
    filmEquivalentThickness_um: notNegative,
    gelConversion: { ...positive, max: 1 - 1e-9 },
    exposureTime_s: positive,
    propagation_m3mols: positive,
    termination_m3mols: positive,
    oxygenCapture_m3mols: positive,
  });
  const { diffusivity_m2s: D, radicalGeneration_molm3s: Ri, oxygenPerRadical: s } = input;
  const { termination_m3mols: kt, propagation_m3mols: kp } = input;
  const growth = -Math.log1p(-input.gelConversion);
  const Rg = growth / (kp * input.exposureTime_s);
  const edgeOxygen_molm3 = (Ri / Rg - 2 * kt * Rg) / input.oxygenCapture_m3mols;
  if (edgeOxygen_molm3 < 0)
    return { outcome: "stays-liquid", neededTime_s: growth / (kp * Math.sqrt(Ri / (2 * kt))) };
  const zone = deadZone({ ...input, napierianAbsorption_percm: 0 });
  const whole = zone.outcome === "dead-zone" ? zone.thickness_um : Infinity;
  const tail = um_per_m * Math.sqrt((2 * D * edgeOxygen_molm3) / (s * Ri));
  return { outcome: "dead-zone", thickness_um: Math.max(whole - tail, 0), edgeOxygen_molm3 };
}
