// Which of the two resists oxygen more on its way into the dead zone: the film or the resin.
import { deadZone, type DeadZoneInput } from "./deadZone.js";

/** What holds oxygen back, or the finding that this light never cures this resin at this window. */
export type OxygenResistance =
  | {
      readonly outcome: "dead-zone";
      /** Where more than half of the fall in oxygen happens. */
      readonly rules: "film" | "resin";
      /** Share of the fall that happens across the film, 0 to 1. */
      readonly filmShare: number;
    }
  | { readonly outcome: "never-cures"; readonly neededRadicalGeneration_molm3s: number };

/**
 * Says whether the film or the resin rules the dead zone, and by how much.
 *
 * - the fields of `deadZone`, with `saturation_molm3` above 0 for an answer other than the resin's.
 *
 * share of the film = (C* - Ci) / C*. Where the film rules, a thinner or more permeable film thickens the dead zone and the
 * thickness goes with the oxygen below and against the light, one to one; where the resin rules, film and gas change little and
 * the thickness goes with the square roots.
 * @throws InputError when an argument is out of range.
 * @source Series resistance, derived for this library from `deadZone`.
 * @example
 * ```ts
 * import { oxygenResistance } from "resinwright";
 * const film = oxygenResistance({
 *   diffusivity_m2s: 1e-10,
 *   saturation_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   napierianAbsorption_percm: 100,
 *   filmEquivalentThickness_um: 350,
 * });
 * film.outcome === "dead-zone" && film.rules; // → "film"
 * ```
 */
export function oxygenResistance(input: DeadZoneInput): OxygenResistance {
  const zone = deadZone(input);
  if (zone.outcome === "never-cures") return zone;
  const { saturation_molm3: saturation } = input;
  const filmShare = saturation === 0 ? 0 : Math.min(Math.max(1 - zone.wallOxygen_molm3 / saturation, 0), 1);
  return { outcome: "dead-zone", rules: filmShare > 0.5 ? "film" : "resin", filmShare };
}
