// What every transient model of a layer is asked: the gap, the gas, the window, the schedule, and how finely to compute.
import {
  checkNumber,
  checkNumbers,
  checkWhole,
  InputError,
  notNegative,
  positive,
  show,
  unknownName,
} from "../../door.js";
import { checkList } from "../../numerics/lists.js";
import type { CureRates } from "./balance.js";
import type { OxygenWindow } from "./column.js";
import { deadZone } from "./deadZone.js";
import type { DeadZoneLevels } from "./layerReading.js";
import { checkSchedule, durationOf, type ExposureStep } from "./schedule.js";

/** A layer of resin and what is done to it. */
export interface LayerConditions extends DeadZoneLevels {
  /** Resin between window and part, L, above 0, um. */
  readonly gapThickness_um: number;
  /** Oxygen in the fresh resin, at least 0, mol/m3. */
  readonly oxygen_molm3: number;
  /** C*: oxygen the resin would hold in equilibrium with the gas below the window, at least 0, mol/m3. */
  readonly saturation_molm3: number;
  readonly window: OxygenWindow;
  /** Oxygen at the start in a film that stores it, as the resin in equilibrium with it would hold, mol/m3; C* unless given. */
  readonly filmOxygen_molm3?: number;
  readonly schedule: readonly ExposureStep[];
  /** Moments to read the column at, 0 to the whole time of the schedule, s. */
  readonly times_s?: readonly number[];
  /** Cells of the resin, 8 to 20000; 160 unless given. */
  readonly cells?: number;
  /** Cells narrow at the window and where the dead zone should end (graded), or all the same (even); graded unless given. */
  readonly grid?: "graded" | "even";
  /** Error allowed in one step, in conversion and in oxygen over that of the fresh resin, 1e-9 to 0.1; 3e-4 unless given. */
  readonly tolerance?: number;
  /** Steps allowed in the whole schedule; 20000 unless given. */
  readonly stepLimit?: number;
}

/** What is taken where a field is not given. */
export const layerDefaults = {
  oxygenLevel: 0.01,
  conversionLevel: 0.05,
  times_s: [] as readonly number[],
  cells: 160,
  grid: "graded",
  tolerance: 3e-4,
  stepLimit: 20_000,
} as const;

/** Refuses a layer that is out of range. */
export function checkLayer(where: string, input: LayerConditions): void {
  const given = { ...layerDefaults, ...input };
  const between = { min: 0, above: true, max: 1 - 1e-9 } as const;
  const { gapThickness_um, oxygen_molm3, saturation_molm3 } = given;
  const { gelConversion, oxygenLevel, conversionLevel, tolerance } = given;
  const levels = { gelConversion, oxygenLevel, conversionLevel };
  checkNumbers(
    where,
    { gapThickness_um, oxygen_molm3, saturation_molm3, ...levels, tolerance },
    {
      gapThickness_um: { ...positive, max: 1e5 },
      oxygen_molm3: notNegative,
      saturation_molm3: notNegative,
      gelConversion: between,
      oxygenLevel: between,
      conversionLevel: between,
      tolerance: { min: 1e-9, max: 0.1 },
    },
  );
  if (input.filmOxygen_molm3 !== undefined)
    checkNumber(input.filmOxygen_molm3, { where, field: "filmOxygen_molm3", ...notNegative });
  checkWhole(given.cells, { where, field: "cells", min: 8, max: 20_000 });
  checkWhole(given.stepLimit, { where, field: "stepLimit", min: 1, max: 1e9 });
  if (given.grid !== "graded" && given.grid !== "even")
    throw new InputError(unknownName(where, "grid", String(given.grid), ["graded", "even"]));
  checkWindow(where, input);
  checkSchedule(where, input.schedule);
  const all = durationOf(input.schedule);
  checkList(where, "times_s", given.times_s, {
    atLeast: 0,
    min: 0,
    max: all * (1 + 1e-12),
    advice: "the column can be read only while the schedule runs",
  });
}

/** Where fronts are expected to come to rest, um: the steady dead zones of the steps with light, three at most. */
export function edgesOf(
  input: LayerConditions & CureRates & { readonly oxygenPerRadical: number },
): number[] {
  const { window } = input;
  if (window.film === "tight") return [];
  const zones = input.schedule.flatMap(({ relativeIrradiance, saturation_molm3 }) => {
    const radicalGeneration_molm3s = relativeIrradiance * input.radicalGeneration_molm3s;
    if (radicalGeneration_molm3s === 0) return [];
    const zone = deadZone({
      ...input,
      saturation_molm3: saturation_molm3 ?? input.saturation_molm3,
      radicalGeneration_molm3s,
      filmEquivalentThickness_um: equivalentThickness(window, input.diffusivity_m2s),
    });
    return zone.outcome === "dead-zone" && zone.thickness_um > 0 ? [zone.thickness_um] : [];
  });
  const rising = zones.sort((a, b) => a - b);
  const apart = rising.filter((zone, i) => i === 0 || zone > 1.1 * rising[i - 1]!);
  return apart.length <= 3 ? apart : [apart[0]!, apart[apart.length >> 1]!, apart.at(-1)!];
}

function equivalentThickness(window: Exclude<OxygenWindow, { film: "tight" }>, D: number): number {
  if (window.film === "resists") return window.filmEquivalentThickness_um;
  return (D * window.filmThickness_um) / (window.filmPartition * window.filmDiffusivity_m2s);
}

function checkWindow(where: string, { window, filmOxygen_molm3 }: LayerConditions): void {
  const field = (name: string) => ({ where, field: `window.${name}` });
  if (window?.film !== "stores" && filmOxygen_molm3 !== undefined) {
    throw new InputError(
      `${where}: filmOxygen_molm3 is ${filmOxygen_molm3}; only a window with film: "stores" holds oxygen of its own; leave it out`,
    );
  }
  switch (window?.film) {
    case "resists":
      checkNumber(window.filmEquivalentThickness_um, {
        ...field("filmEquivalentThickness_um"),
        ...notNegative,
        advice: 'for a film that lets nothing through give film: "tight"',
      });
      return;
    case "tight":
      return;
    case "stores":
      checkNumber(window.filmThickness_um, { ...field("filmThickness_um"), ...positive });
      checkNumber(window.filmDiffusivity_m2s, { ...field("filmDiffusivity_m2s"), ...positive });
      checkNumber(window.filmPartition, { ...field("filmPartition"), ...positive });
      if (typeof window.sealed === "boolean") return;
      throw new InputError(
        `${where}: window.sealed is ${show(window.sealed)}; it must be true (glass below the film) or false (gas below it)`,
      );
    default:
      throw new InputError(
        unknownName(where, "window.film", String((window as { film?: unknown } | undefined)?.film), [
          "resists",
          "tight",
          "stores",
        ]),
      );
  }
}
