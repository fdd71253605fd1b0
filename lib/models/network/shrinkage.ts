// How much a resin contracts on cure: each double bond that reacts draws two molecules together.
import { checkNumbers, fraction, notNegative, positive } from "../../door.js";

/**
 * Volume lost on cure over volume before it, 0 to 1.
 *
 * - `doubleBonds_molL` [C=C]: at least 0; `conversion` X: 0 to 1; `contraction_cm3mol` dV: volume lost per mole of double
 *   bonds reacted, above 0: 22 for methacrylates; acrylates 19 to 25, known to no better than 15 %.
 *
 * s = X [C=C] dV / 1000. Assumes one dV for all double bonds, which held for blends of two urethane and ether
 * dimethacrylates and not for blends with methyl or hydroxyethyl methacrylate.
 * @throws InputError when a field is out of range.
 * @source dV of methacrylates: Patel, Braden, Davy, Biomaterials 8 (1987) 53-56, doi 10.1016/0142-9612(87)90030-5 (abstract).
 * @example
 * ```ts
 * import { polymerisationShrinkage } from "resinwright";
 * polymerisationShrinkage({ doubleBonds_molL: 5.8932, conversion: 0.75, contraction_cm3mol: 22.5 }); // → 0.09945
 * ```
 */
export function polymerisationShrinkage(input: {
  readonly doubleBonds_molL: number;
  readonly conversion: number;
  readonly contraction_cm3mol: number;
}): number {
  checkNumbers("polymerisationShrinkage", input, {
    doubleBonds_molL: { ...notNegative, max: 100 },
    conversion: fraction,
    contraction_cm3mol: { ...positive, max: 100, advice: "give it in cm3 per mole of double bonds" },
  });
  return (input.conversion * input.doubleBonds_molL * input.contraction_cm3mol) / 1000;
}
