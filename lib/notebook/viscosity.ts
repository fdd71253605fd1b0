// How the warmth of the vat is told: the temperatures between which a viscosity keeps to its target.

import { temperatureForViscosity } from "../models/viscosity.js";
import type { Target } from "../recipe/brief.js";
import { numberText } from "./digits.js";
import { targetText } from "./phrases.js";

/** A viscosity that falls with temperature, the target it has to keep to, and the temperatures that are looked at. */
export interface WarmthQuestion {
  /** The whole interval, mPa s, at a temperature in °C. */
  readonly viscosityAt: (temperature_C: number) => { readonly low: number; readonly high: number };
  readonly target: Target | undefined;
  readonly coolest_C: number;
  readonly warmest_C: number;
}

/**
 * Between which temperatures the whole interval of a viscosity keeps to its target, in a sentence; ends in whole degrees, on
 * the safe side.
 * @throws InputError as `temperatureForViscosity`.
 * @example
 * ```ts
 * import { warmthText } from "resinwright/notebook";
 * const viscosityAt = (temperature_C: number) => ({ low: 4000 / temperature_C, high: 9000 / temperature_C });
 * const vat = { viscosityAt, coolest_C: 15, warmest_C: 45 };
 * warmthText({ ...vat, target: { min: 100, max: 400 } });
 * // → "From 23 to 40 °C the whole interval is within the target (100 to 400 mPa s)."
 * warmthText({ ...vat, target: { max: 900 } });
 * // → "From 15 °C, the coolest looked at, to 45 °C, the warmest looked at, the whole interval is within the target (at most 900 mPa s)."
 * ```
 */
export function warmthText({ viscosityAt, target, coolest_C, warmest_C }: WarmthQuestion): string {
  if (target === undefined) return "No target is set for the viscosity.";
  const fallsTo = (end: "low" | "high", limit_mPas: number) =>
    temperatureForViscosity({ viscosityAt: (at) => viscosityAt(at)[end], limit_mPas, coolest_C, warmest_C });
  const thinEnough = target.max === undefined ? undefined : fallsTo("high", target.max);
  const tooThin = target.min === undefined ? undefined : fallsTo("low", target.min);
  const from = thinEnough?.outcome === "warm-to" ? Math.ceil(thinEnough.temperature_C) : coolest_C;
  const to = tooThin?.outcome === "warm-to" ? Math.floor(tooThin.temperature_C) : warmest_C;
  const within = `within the target (${targetText(target)} mPa s)`;
  if (thinEnough?.outcome === "too-thick" || tooThin?.outcome === "thin-enough" || from > to)
    return `At no temperature from ${numberText(coolest_C)} to ${numberText(warmest_C)} °C is the whole interval ${within}.`;
  const start = from === coolest_C ? `${numberText(from)} °C, the coolest looked at,` : numberText(from);
  const end = to === warmest_C ? `${numberText(to)} °C, the warmest looked at,` : `${numberText(to)} °C`;
  return `From ${start} to ${end} the whole interval is ${within}.`;
}
