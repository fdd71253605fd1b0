// Does it matter for this brief that the initiator bleaches: by how much the cure depth changes at the layer's exposure.

import { checkNumber, positive } from "../door.js";
import { bleachedCureDepth, exposureForDepth } from "../models/cure.js";
import { absorptionCoefficient, bleachingExposure, bleachingRate, photonFlux } from "../models/light.js";
import type { Bleaching } from "../models/oxygen.js";
import { um_per_cm } from "../models/scales.js";
import type { Interval, UsedSource, Warning } from "../result.js";
import { constantOf, irradianceOf, layerCureDepth, type Case } from "./case.js";
import { curveModel } from "./cure.js";
import { intervalOf, propagate, sourcesOf, startDraws, type DrawOptions, type Read } from "./doubt.js";
import { lightModel, lightWarnings, meanOver, type LightInResin } from "./light.js";

/** What bleaching does to the cure depth of a layer. */
export interface BleachingEstimate {
  /** `matters`: all of the interval lies beyond 5 % of the layer's cure depth; `does not matter`: all of it within. */
  readonly outcome: "matters" | "may matter" | "does not matter";
  readonly exposure_mJcm2: number;
  /** Cure depth with bleaching less that without; a loss of all of it where the initiator is used up before the resin gels. */
  readonly depthChange_um: Interval;
  /** Part of the initiator that is gone at the window after the exposure. */
  readonly bleachedShare: Interval;
  readonly warnings: readonly Warning[];
  readonly sources: readonly UsedSource[];
}

/**
 * By how much the cure depth at an exposure changes because the initiator loses its colour as it reacts.
 *
 * Both depths are of the estimated light in this resin at one effective wavelength: absorptions averaged over the light that
 * starts radicals. Without bleaching ln(E / Ec) / alpha, with it {@link bleachedCureDepth}; the absorber stays, what the
 * initiator becomes does not absorb. The critical exposure is that of the working curve. A measured working curve holds the
 * effect already, for the exposures it was measured at.
 * @param input - The case; `exposure_mJcm2`, that of the brief's layer unless given; draw options.
 * @throws InputError as {@link workingCurveOf}; when the exposure is not above 0.
 * @source Models: {@link bleachedCureDepth}, {@link bleachingExposure}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { bleachingOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const layer = bleachingOf({ ...work, draws: 200 });
 * const base = bleachingOf({ ...work, exposure_mJcm2: 10 * layer.exposure_mJcm2, draws: 200 });
 * base.bleachedShare.value > layer.bleachedShare.value; // → true
 * ```
 */
export function bleachingOf(
  input: Case & DrawOptions & { readonly exposure_mJcm2?: number },
): BleachingEstimate {
  const stated: Read = ({ value }) => value;
  const exposure_mJcm2 = input.exposure_mJcm2 ?? layerExposure(input, stated);
  checkNumber(exposure_mJcm2, { where: "bleachingOf", field: "exposure_mJcm2", ...positive });
  const draws = startDraws(input);
  const run = propagate(bleachingModel(input, exposure_mJcm2), draws);
  const interval = (of: (one: typeof run.stated) => number): Interval =>
    intervalOf({ stated: of(run.stated), values: run.outcomes.map(of), level: draws.level });
  const depthChange_um = interval(({ change_um }) => change_um);
  const { low, high } = depthChange_um;
  const small = SMALL * layerCureDepth(input);
  const within = low >= -small && high <= small;
  const beyond = low > small || high < -small;
  return {
    outcome: within ? "does not matter" : beyond ? "matters" : "may matter",
    exposure_mJcm2,
    depthChange_um,
    bleachedShare: interval(({ bleached }) => bleached),
    warnings: lightWarnings(input),
    sources: sourcesOf(run.inputs),
  };
}

/** A change of the depth that a thickness gauge would hardly show (common practice). */
const SMALL = 0.05;

function layerExposure(input: Case, read: Read): number {
  const { penetrationDepthAt, criticalExposure_mJcm2 } = curveModel(input)(read);
  const cureDepth_um = layerCureDepth(input);
  const penetrationDepth_um = penetrationDepthAt(cureDepth_um);
  return exposureForDepth({ cureDepth_um, penetrationDepth_um, criticalExposure_mJcm2 });
}

/** How the initiator fades in the engine's light, for a layer that is followed in time. @internal */
export function fadingModel(input: Case): (read: Read) => Bleaching {
  const light = lightModel(input);
  const irradiance = irradianceOf(input);
  const lost = constantOf(input.shelf.constants, "bleachingYield");
  return (read) => {
    const { initiators, wavelength_nm, ...inResin } = light(read);
    const initiatorAbsorption_percm = Math.min(
      inResin.initiatorAbsorption_percm,
      inResin.napierianAbsorption_percm,
    );
    return {
      initiatorAbsorption_percm,
      rate_pers: bleachingRate({
        molarAbsorption_Lmolcm: initiatorAbsorption_percm / (Math.LN10 * amountOf(initiators)),
        quantumYield: read(lost),
        photonFlux_molm2s: photonFlux({ irradiance_mWcm2: read(irradiance), wavelength_nm }),
      }),
    };
  };
}

const amountOf = (initiators: LightInResin["initiators"]): number =>
  initiators.reduce((sum, { concentration_molL }) => sum + concentration_molL, 0);

function bleachingModel(input: Case, exposure_mJcm2: number) {
  const light = lightModel(input);
  const curve = curveModel(input);
  const lost = constantOf(input.shelf.constants, "bleachingYield");
  return (read: Read) => {
    const { starting, napierianAbsorptions_percm, initiators } = light(read);
    const { criticalExposure_mJcm2 } = curve(read);
    const all_percm = meanOver(starting, napierianAbsorptions_percm);
    const concentration_molL = amountOf(initiators);
    const initiator_percm = absorptionCoefficient({
      absorbers: initiators.map((one) => ({
        ...one,
        molarAbsorption_Lmolcm: meanOver(starting, one.molarAbsorptions_Lmolcm),
      })),
      background_percm: 0,
    });
    const bleaching = {
      concentration_molL,
      molarAbsorption_Lmolcm: initiator_percm / (Math.LN10 * concentration_molL),
      quantumYield: read(lost),
      wavelength_nm: meanOver(starting, starting.wavelengths_nm),
      otherAbsorption_percm: Math.max(all_percm - initiator_percm, 0),
      exposure_mJcm2,
      criticalExposure_mJcm2,
    };
    const straight_um = (um_per_cm * Math.log(exposure_mJcm2 / criticalExposure_mJcm2)) / all_percm;
    const depth = bleachedCureDepth(bleaching);
    const bleached_um = depth.outcome === "cures" ? depth.cureDepth_um : 0;
    return {
      change_um: bleached_um - Math.max(straight_um, 0),
      bleached: -Math.expm1(-exposure_mJcm2 / bleachingExposure(bleaching)),
    };
  };
}
