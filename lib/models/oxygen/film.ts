// How easily oxygen comes through the window film: from a permeability in barrer to a thickness of resin that
// would resist as much.
import { checkNumber, checkNumbers, fraction, positive } from "../../door.js";
import { cm_per_m, gasConstant_JmolK, m_per_um, um_per_m, zeroCelsius_K } from "../scales.js";

const molPerCm3STP = (101_325 * 1e-6) / (gasConstant_JmolK * zeroCelsius_K);
const Pa_per_cmHg = 1333.22387415;

/**
 * One barrer in mol m/(m2 s Pa): 1e-10 cm3(STP) cm/(cm2 s cmHg), with STP 273.15 K and 101325 Pa.
 * @source Definition; molar gas constant exact since the SI of 2019; conventional millimetre of mercury.
 * @example
 * ```ts
 * import { BARRER_molmm2sPa } from "resinwright";
 * BARRER_molmm2sPa; // → 3.346402e-16
 * ```
 */
export const BARRER_molmm2sPa = (1e-10 * molPerCm3STP * cm_per_m) / Pa_per_cmHg;

/**
 * Partial pressure of oxygen in a gas, Pa.
 *
 * - `oxygenFraction`: mole fraction of oxygen, 0 to 1; dry air 0.2095.
 * - `pressure_Pa`: of the whole gas, above 0, Pa.
 *
 * p = x P (Dalton).
 * @throws InputError when an argument is out of range.
 * @source Dalton's law; 0.2095 in dry air (common practice).
 * @example
 * ```ts
 * import { oxygenPartialPressure } from "resinwright";
 * oxygenPartialPressure({ oxygenFraction: 0.2095, pressure_Pa: 101325 }); // → 21227.6
 * ```
 */
export function oxygenPartialPressure(input: {
  readonly oxygenFraction: number;
  readonly pressure_Pa: number;
}): number {
  checkNumbers("oxygenPartialPressure", input, { oxygenFraction: fraction, pressure_Pa: positive });
  return input.oxygenFraction * input.pressure_Pa;
}

/**
 * Permeance of a film in mol/(m2 s Pa).
 *
 * - `permeability_barrer`: of oxygen through the film material, above 0, barrer.
 * - `thickness_um`: above 0, um.
 *
 * P / h. Very thin films of soft silicone pass less than this (their surfaces resist too).
 * @throws InputError when an argument is out of range.
 * @source Definition.
 * @example
 * ```ts
 * import { filmPermeance } from "resinwright";
 * filmPermeance({ permeability_barrer: 600, thickness_um: 100 }); // → 2.008e-9
 * ```
 */
export function filmPermeance(input: {
  readonly permeability_barrer: number;
  readonly thickness_um: number;
}): number {
  const where = "filmPermeance";
  checkNumbers(where, input, { permeability_barrer: positive, thickness_um: positive });
  const thickness_m = input.thickness_um * m_per_um;
  return stated(where, "the permeance", (input.permeability_barrer * BARRER_molmm2sPa) / thickness_m);
}

/**
 * Mass-transfer coefficient kappa of a film in m/s, for concentrations taken in the resin.
 *
 * - `permeance_molm2sPa`: of the film, above 0, mol/(m2 s Pa).
 * - `solubility_molm3Pa`: of oxygen in the resin, above 0, mol/(m3 Pa).
 *
 * kappa = (P / h) / S_resin: flux = kappa (C* - C), with C* = S_resin p the concentration the resin would have in
 * equilibrium with the gas below the window.
 * @throws InputError when an argument is out of range.
 * @source Series resistance with Henry's law on both sides of the film; J. Crank, The Mathematics of Diffusion, 2nd ed.
 * 1975, chapters 1 and 12 (from memory).
 * @example
 * ```ts
 * import { filmTransferCoefficient } from "resinwright";
 * filmTransferCoefficient({ permeance_molm2sPa: 2.008e-9, solubility_molm3Pa: 4.711e-5 }); // → 4.262e-5
 * ```
 */
export function filmTransferCoefficient(input: {
  readonly permeance_molm2sPa: number;
  readonly solubility_molm3Pa: number;
}): number {
  const where = "filmTransferCoefficient";
  checkNumbers(where, input, { permeance_molm2sPa: positive, solubility_molm3Pa: positive });
  return stated(where, "the transfer coefficient", input.permeance_molm2sPa / input.solubility_molm3Pa);
}

/**
 * Thickness of resin in um that resists oxygen as much as the film does.
 *
 * - `diffusivity_m2s`: of oxygen in the resin, above 0, m2/s.
 * - `transferCoefficient_ms`: kappa of the film, above 0, m/s.
 *
 * l = D / kappa. When l is larger than the dead zone would be without a film, the film decides.
 * @throws InputError when an argument is out of range.
 * @source Series resistance; J. Crank, The Mathematics of Diffusion, 2nd ed. 1975, chapter 3 (from memory).
 * @example
 * ```ts
 * import { filmEquivalentThickness } from "resinwright";
 * filmEquivalentThickness({ diffusivity_m2s: 1e-10, transferCoefficient_ms: 4.262e-5 }); // → 2.346
 * ```
 */
export function filmEquivalentThickness(input: {
  readonly diffusivity_m2s: number;
  readonly transferCoefficient_ms: number;
}): number {
  const where = "filmEquivalentThickness";
  checkNumbers(where, input, { diffusivity_m2s: positive, transferCoefficient_ms: positive });
  return stated(
    where,
    "the thickness in um",
    (input.diffusivity_m2s / input.transferCoefficient_ms) * um_per_m,
  );
}

const stated = (where: string, field: string, value: number): number =>
  checkNumber(value, { where, field, ...positive, advice: "an input is beyond any real film or resin" });
