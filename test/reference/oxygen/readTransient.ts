// Reads the transient reference solutions and holds a layer's readings to them.
import { readFileSync } from "node:fs";
import { depthsAtLevel, valueAtDepth } from "../../../lib/numerics/profile.js";
import type { LayerInput, LayerReading } from "../../../lib/models/oxygen.js";

type Values = Readonly<Record<string, { readonly value: number; readonly grid_rel_change: number }>>;

const file = readJson<{
  readonly cases: Readonly<Record<string, Readonly<Record<string, Values>>>>;
}>("transient-reference.json");

/** Round numbers for checking, not a material: 20 um of dead zone in even light without film, induction time 2 s. */
export const P0 = readJson<{ readonly layer: Omit<LayerInput, "window" | "schedule"> }>(
  "round-numbers.json",
).layer;

/** The moments of a case, s, and its values by name. */
export function transientCase(name: string): { times_s: number[]; at: (time_s: number) => Values } {
  const values = file.cases[name]!;
  return {
    times_s: Object.keys(values).map((key) => Number(key.slice(2))),
    at: (time_s) => values[`t=${time_s}`]!,
  };
}

/** What a reading has under the name of a reference value: `C@20`, `meanX`, `zX=0.2#0`; NaN where it has none. */
export function named(reading: LayerReading, name: string): number {
  const { depths_um } = reading;
  const profile = { C: reading.oxygen_molm3, X: reading.conversion, R: reading.radicals_molm3 };
  const [, letter, depth] = /^([CXR])@(\d+)$/.exec(name) ?? [];
  if (letter !== undefined)
    return valueAtDepth({ depths_um, values: profile[letter as "C"], depth_um: Number(depth) });
  const [, quantity, level, place] = /^z([CX])=([\d.]+)#(\d)$/.exec(name) ?? [];
  if (quantity !== undefined) {
    const values = profile[quantity as "C"];
    return depthsAtLevel({ depths_um, values, level: Number(level) })[Number(place)] ?? NaN;
  }
  if (name === "meanC") return reading.meanOxygen_molm3;
  if (name === "meanX") return reading.meanConversion;
  return name === "flux" ? reading.flux_molm2s : NaN;
}

/**
 * How far a value may lie off at cells of h = 0.25 um. Means (over no less than 1e-2), fronts and fluxes: 1e-3. At a point as well,
 * but a front, which is thinner than a cell, stands anywhere within it: that moves what lies beside it by up to h^2 s Ri / 8 D = 4e-5
 * of saturation; radicals, of which there are 8e-3 mol/m3 at most, by a thousandth of a thousandth.
 */
export function allowedAtQuarterMicrometre(field: string, value: number): number {
  if (field.startsWith("mean")) return 1e-3 * Math.max(value, 1e-2);
  const beside = field.includes("@") ? (field.startsWith("R") ? 1e-6 : 4e-5) : 0;
  return 1e-3 * Math.abs(value) + beside;
}

function readJson<T>(name: string): T {
  return JSON.parse(readFileSync(new URL(name, import.meta.url), "utf8")) as T;
}
