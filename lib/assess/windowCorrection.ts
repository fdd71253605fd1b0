// Readings taken on the window, carried into every draw: the figures of a draw are corrected until they say what was read,
// give or take the doubt of the reading. Draws stay draws, and figures that the readings tie together stay tied.

import {
  correctByReadings,
  oxygenPartialPressure,
  type PerWindowFigure,
  type WindowReading,
} from "../models/oxygen.js";
import type { WindowReadings } from "../recipe/windowReadings.js";
import type { Warning } from "../result.js";
import { constantOf, uncertain, type Case } from "./case.js";
import type { Read, Uncertain } from "./doubt.js";
import { radicalFigures, transportFigures } from "./windowFigures.js";

/** Readings on a window with the case they were taken on: what a calibrated case carries with it. */
export interface OxygenCorrection {
  readonly readings: WindowReadings;
  /** The formulation, light and film as they were when it was read; nothing corrected. */
  readonly takenOn: Omit<Case, "oxygenCorrection">;
  /** Relative standard uncertainty of each figure before the readings. */
  readonly relativeU: PerWindowFigure;
  readonly warnings: readonly Warning[];
}

/** No correction. */
export const untouched: PerWindowFigure = {
  radicalGeneration: 1,
  oxygenPerRadical: 1,
  solubility: 1,
  diffusivity: 1,
  permeance: 1,
  propagation: 1,
};

/** The factors of a draw, for the case they are to be used on. */
export function correctionModel({ oxygenCorrection, brief }: Case): (read: Read) => PerWindowFigure {
  if (oxygenCorrection === undefined) return () => untouched;
  const { readings, relativeU } = oxygenCorrection;
  const sameFilm = brief.window.film === readings.film;
  const ask = questionOf(oxygenCorrection);
  return (read) => {
    const { factors } = correctByReadings({ ...ask(read), relativeU });
    // What was read on one film says nothing of another.
    return sameFilm ? factors : { ...factors, permeance: 1 };
  };
}

/** All that `correctByReadings` asks but the spreads, as a function of what the draws read. */
export function questionOf({ takenOn, readings }: Pick<OxygenCorrection, "takenOn" | "readings">) {
  const { brief, shelf } = takenOn;
  const radicals = radicalFigures(takenOn);
  const transport = transportFigures(takenOn);
  const asked = readingsOf(readings, brief.light.irradiance_mWcm2.value);
  const constant = (name: "gelConversion" | "termination_m3mols") => constantOf(shelf.constants, name);
  const freshOxygen_Pa = oxygenPartialPressure({ oxygenFraction: 0.2095, pressure_Pa: 101325 });
  return (read: Read) => {
    const drawn = radicals(read);
    return {
      figures: { ...drawn, ...transport(read) },
      readings: asked.map((one) => one(read)),
      napierianAbsorption_percm: drawn.napierianAbsorption_percm,
      freshOxygen_Pa,
      gelConversion: read(constant("gelConversion")),
      termination_m3mols: read(constant("termination_m3mols")),
    };
  };
}

/**
 * The readings as they may have been: each with an error of its own in every draw. What the meter says of the light is wrong by
 * the same factor whenever it is read, so only the ratio to the brief's irradiance counts.
 */
function readingsOf(file: WindowReadings, irradiance_mWcm2: number): ((read: Read) => WindowReading)[] {
  const errorOf = (what: string, i: number, { value, u }: { value: number; u: number }) => {
    const relativeU = u / value;
    const error: Uncertain = uncertain(`${what} reading ${i + 1} of ${file.id}`, {
      value: 1,
      u: relativeU,
      source: file.source,
      status: file.status,
    });
    return { error, relativeU };
  };
  const times = file.inductionTimes.map(({ until, time_s, ...at }, i) => {
    const { error, relativeU } = errorOf("induction-time", i, time_s);
    return (read: Read): WindowReading => ({
      of: "induction time",
      until,
      relativeIrradiance: at.irradiance_mWcm2 / irradiance_mWcm2,
      time_s: time_s.value,
      errorFactor: read(error),
      relativeU,
    });
  });
  const layers = file.uncuredLayers.map(({ thickness_um, gasOxygenFraction, ...at }, i) => {
    const { error, relativeU } = errorOf("uncured-layer", i, thickness_um);
    return (read: Read): WindowReading => ({
      of: "uncured layer",
      relativeIrradiance: at.irradiance_mWcm2 / irradiance_mWcm2,
      gasOxygen_Pa: oxygenPartialPressure({
        oxygenFraction: gasOxygenFraction,
        pressure_Pa: file.gasPressure_Pa,
      }),
      thickness_um: thickness_um.value,
      errorFactor: read(error),
      relativeU,
    });
  });
  return [...times, ...layers];
}
