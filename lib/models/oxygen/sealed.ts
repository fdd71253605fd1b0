// Resin cut off from oxygen supply: a sealed cell, or the far end of a thick layer. Exact results for the full rate law.
import { checkNumber, checkNumbers, notNegative, positive } from "../../door.js";
import { findRoot } from "../../numerics/root.js";
import { um_per_cm } from "../scales.js";

/** A resin without oxygen supply under steady light. */
export interface SealedResin {
  /** Oxygen at the start, C0, above 0, mol/m3. */
  readonly startOxygen_molm3: number;
  /** Ri, above 0, mol/(m3 s). */
  readonly radicalGeneration_molm3s: number;
  /** Oxygen molecules used up per radical, s, above 0. */
  readonly oxygenPerRadical: number;
  /** kO of radical + oxygen, above 0, m3/(mol s). */
  readonly oxygenCapture_m3mols: number;
  /** kt with d[R]/dt = -2 kt [R]^2, above 0, m3/(mol s). */
  readonly termination_m3mols: number;
}

/**
 * Depth in um down to which the light has used up the dissolved oxygen; 0 before the induction time at the window.
 *
 * - `inductionTime_s`: at the window, above 0, s; `time_s`: at least 0, s; `napierianAbsorption_percm`: alpha, above 0, 1/cm.
 *
 * z = ln(t / t_ind) / alpha: a working curve whose critical exposure is oxygen.
 *
 * Assumes that oxygen does not diffuse meanwhile.
 * @throws InputError when an argument is out of range.
 * @source Oxygen balance with the Beer-Lambert law, derived for this library.
 * @example
 * ```ts
 * import { oxygenFreeDepth } from "resinwright";
 * oxygenFreeDepth({ inductionTime_s: 2, time_s: 4, napierianAbsorption_percm: 100 }); // → 69.315
 * ```
 */
export function oxygenFreeDepth(input: {
  readonly inductionTime_s: number;
  readonly time_s: number;
  readonly napierianAbsorption_percm: number;
}): number {
  const where = "oxygenFreeDepth";
  checkNumbers(where, input, {
    inductionTime_s: positive,
    time_s: notNegative,
    napierianAbsorption_percm: { ...positive, advice: "in even light all depths are freed at once" },
  });
  const { inductionTime_s, time_s, napierianAbsorption_percm: alpha } = input;
  if (time_s <= inductionTime_s) return 0;
  return checkNumber((um_per_cm * Math.log(time_s / inductionTime_s)) / alpha, {
    where,
    field: "the depth in um",
  });
}

/**
 * Time in s until oxygen in a sealed resin has fallen to a given concentration.
 *
 * - the fields of `SealedResin`; `oxygen_molm3`: C, above 0, at most C0, mol/m3.
 *
 * With y = kO C, w = sqrt(y^2 + b^2), b = sqrt(8 kt Ri):
 * t = [y0 - y + w0 - w - b (asinh(b / y0) - asinh(b / y))] / (2 s Ri kO). While oxygen is plenty this is (C0 - C) / (s Ri).
 *
 * Assumes radicals that adjust at once.
 * @throws InputError when an argument is out of range.
 * @source Integral of dC/dt = -s kO C R with quasi-steady R, derived for this library.
 * @example
 * ```ts
 * import { sealedDepletionTime } from "resinwright";
 * sealedDepletionTime({
 *   startOxygen_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   oxygenCapture_m3mols: 5e3,
 *   termination_m3mols: 2500,
 *   oxygen_molm3: 0.01,
 * }); // → 1.99631203639
 * ```
 */
export function sealedDepletionTime(input: SealedResin & { readonly oxygen_molm3: number }): number {
  const where = "sealedDepletionTime";
  checkSealed(where, input);
  const { oxygen_molm3, startOxygen_molm3 } = input;
  checkNumber(oxygen_molm3, { where, field: "oxygen_molm3", ...positive, max: startOxygen_molm3 });
  return checkNumber(timeTo(input, Math.log(oxygen_molm3 / startOxygen_molm3)), {
    where,
    field: "the time in s",
  });
}

/**
 * Conversion, 0 to 1, of a sealed resin in which oxygen has fallen to a given concentration.
 *
 * - `startOxygen_molm3` C0, above 0; `oxygen_molm3` C, above 0, at most C0; `propagation_m3mols` kp, at least 0;
 *   `oxygenCapture_m3mols` kO, above 0; `oxygenPerRadical` s, above 0.
 *
 * X = 1 - (C / C0)^(kp / (s kO)), whatever the light and the termination: with kO twenty thousand times kp nothing is converted
 * until oxygen is truly gone.
 * @throws InputError when an argument is out of range.
 * @source d ln C / dQ = -s kO / kp, derived for this library.
 * @example
 * ```ts
 * import { conversionAtOxygen } from "resinwright";
 * conversionAtOxygen({
 *   startOxygen_molm3: 1,
 *   oxygen_molm3: 1e-6,
 *   propagation_m3mols: 25,
 *   oxygenCapture_m3mols: 5e5,
 *   oxygenPerRadical: 1,
 * }); // → 6.905e-4
 * ```
 */
export function conversionAtOxygen(input: {
  readonly startOxygen_molm3: number;
  readonly oxygen_molm3: number;
  readonly propagation_m3mols: number;
  readonly oxygenCapture_m3mols: number;
  readonly oxygenPerRadical: number;
}): number {
  checkNumbers("conversionAtOxygen", input, {
    startOxygen_molm3: positive,
    oxygen_molm3: { ...positive, max: input.startOxygen_molm3 },
    propagation_m3mols: notNegative,
    oxygenCapture_m3mols: positive,
    oxygenPerRadical: positive,
  });
  return converted(input, Math.log(input.oxygen_molm3 / input.startOxygen_molm3));
}

/**
 * Conversion, 0 to 1, of a sealed resin after some time of steady light.
 *
 * - the fields of `SealedResin`; `propagation_m3mols` kp, at least 0; `time_s`: at least 0, s.
 *
 * The oxygen that `sealedDepletionTime` gives for this time, put into `conversionAtOxygen`.
 *
 * Assumes radicals that adjust at once: the true conversion lags by (kp / 2 kt) ln 2 in -ln(1 - X).
 * @throws InputError when an argument is out of range.
 * @source Derived for this library.
 * @example
 * ```ts
 * import { sealedConversion } from "resinwright";
 * sealedConversion({
 *   startOxygen_molm3: 1,
 *   radicalGeneration_molm3s: 0.5,
 *   oxygenPerRadical: 1,
 *   oxygenCapture_m3mols: 5e5,
 *   termination_m3mols: 2500,
 *   propagation_m3mols: 25,
 *   time_s: 3,
 * }); // → 0.22154
 * ```
 */
export function sealedConversion(
  input: SealedResin & { readonly propagation_m3mols: number; readonly time_s: number },
): number {
  const where = "sealedConversion";
  checkSealed(where, input);
  const { propagation_m3mols, time_s } = input;
  checkNumbers(
    where,
    { propagation_m3mols, time_s },
    { propagation_m3mols: notNegative, time_s: notNegative },
  );
  if (time_s === 0) return 0;
  // ln(C / C0) falls at most by s kO R(C = 0) per second.
  const { radicalGeneration_molm3s: Ri, termination_m3mols: kt, oxygenCapture_m3mols: kO } = input;
  const fastest = input.oxygenPerRadical * kO * Math.sqrt(Ri / (2 * kt));
  const lnShare = findRoot({
    f: (ln) => timeTo(input, ln) - time_s,
    low: -1.001 * fastest * time_s - 1e-9,
    high: 0,
    where,
  });
  return converted(input, lnShare);
}

function checkSealed(where: string, resin: SealedResin): void {
  const { startOxygen_molm3, radicalGeneration_molm3s, oxygenPerRadical } = resin;
  const { oxygenCapture_m3mols, termination_m3mols } = resin;
  checkNumbers(
    where,
    {
      startOxygen_molm3,
      radicalGeneration_molm3s,
      oxygenPerRadical,
      oxygenCapture_m3mols,
      termination_m3mols,
    },
    {
      startOxygen_molm3: positive,
      radicalGeneration_molm3s: positive,
      oxygenPerRadical: positive,
      oxygenCapture_m3mols: positive,
      termination_m3mols: positive,
    },
  );
}

/** t for C = C0 exp(lnShare); the logarithm, because C itself is soon below any number a machine can hold. */
function timeTo(resin: SealedResin, lnShare: number): number {
  const { radicalGeneration_molm3s: Ri, oxygenCapture_m3mols: kO, oxygenPerRadical: s } = resin;
  const b = Math.sqrt(8 * resin.termination_m3mols * Ri);
  const y0 = kO * resin.startOxygen_molm3;
  const y = y0 * Math.exp(lnShare);
  const lnRatio = Math.log(b / y0) - lnShare;
  const asinh = lnRatio > 30 ? lnRatio + Math.LN2 : Math.asinh(Math.exp(lnRatio));
  return (
    (y0 - y + Math.hypot(y0, b) - Math.hypot(y, b) - b * (Math.asinh(b / y0) - asinh)) / (2 * s * Ri * kO)
  );
}

const converted = (
  input: { readonly propagation_m3mols: number; readonly oxygenCapture_m3mols: number } & Pick<
    SealedResin,
    "oxygenPerRadical"
  >,
  lnShare: number,
): number =>
  0 -
  Math.expm1((input.propagation_m3mols / (input.oxygenPerRadical * input.oxygenCapture_m3mols)) * lnShare);
