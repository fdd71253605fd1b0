// Separation: what it takes to pull a cured layer off the window through a thin liquid gap, and the most a window can hold.

import { checkNumbers, positive } from "../door.js";

/** Resin in the gap, the layer's area as a disc of the same size, and how the gap opens. */
export interface LiftInput {
  readonly viscosity_mPas: number;
  readonly crossSection_mm2: number;
  readonly gap_um: number;
  readonly liftSpeed_mms: number;
}

/**
 * Force to pull a rigid disc off a rigid window through a filled gap, N.
 *
 * - `viscosity_mPas`: above 0, Newtonian.
 * - `crossSection_mm2`: above 0; taken as one disc of radius R = sqrt(area / pi). A square of that area pulls 0.883 of it.
 * - `gap_um`: above 0 and far below R; the dead zone at the start of a lift.
 * - `liftSpeed_mms`: above 0.
 *
 * F = 3 pi eta R^4 v / (2 h^3). Assumes no slip, no inertia, nothing gives way: a film that flexes peels off with less, and
 * no window holds more than {@link suctionLimit}.
 * @throws InputError when a field is not a finite number above 0.
 * @source Stefan, J., Sitzungsber. Akad. Wiss. Wien 69 (1874) 713 (citation from memory); the dimensionally wrong R^2 form
 * in circulation is not used.
 * @example
 * ```ts
 * import { stefanForce } from "resinwright";
 * stefanForce({ viscosity_mPas: 1000, crossSection_mm2: Math.PI, gap_um: 100, liftSpeed_mms: 1 }); // → 0.0047124
 * ```
 */
export function stefanForce(input: LiftInput): number {
  checkNumbers("stefanForce", input, {
    viscosity_mPas: positive,
    crossSection_mm2: positive,
    gap_um: positive,
    liftSpeed_mms: positive,
  });
  const eta = input.viscosity_mPas * 1e-3;
  const R = Math.sqrt((input.crossSection_mm2 * 1e-6) / Math.PI);
  const h = input.gap_um * 1e-6;
  const v = input.liftSpeed_mms * 1e-3;
  return (3 * Math.PI * eta * R ** 4 * v) / (2 * h ** 3);
}

/**
 * The most a window can hold a layer back, N: its area times the pressure above it, when the liquid in the gap is about to
 * boil or tear.
 *
 * - `crossSection_mm2`: above 0.
 * - `pressure_Pa`: of the air above the resin, above 0; 101325 at sea level.
 * @throws InputError when a field is not a finite number above 0.
 * @source Identity: force = area times pressure difference, the gap's pressure being no less than zero.
 * @example
 * ```ts
 * import { suctionLimit } from "resinwright";
 * suctionLimit({ crossSection_mm2: 320, pressure_Pa: 101325 }); // → 32.42
 * ```
 */
export function suctionLimit(input: {
  readonly crossSection_mm2: number;
  readonly pressure_Pa: number;
}): number {
  checkNumbers("suctionLimit", input, { crossSection_mm2: positive, pressure_Pa: positive });
  return input.crossSection_mm2 * 1e-6 * input.pressure_Pa;
}
