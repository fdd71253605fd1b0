// Engines of many wavelengths, one nm apart, over resins that absorb differently at each: for properties that hold of any.
import fc from "fast-check";
import { lightEngine } from "../../../lib/models/light.js";

export const finite = (min: number, max: number) => fc.double({ min, max, noNaN: true });

export interface Node {
  readonly S: number;
  readonly alpha: number;
}

/** Spectrum and Napierian absorption in 1/cm at 2 to 20 wavelengths. */
export const nodes = fc.array(fc.record({ S: finite(0.001, 5), alpha: finite(1, 2000) }), {
  minLength: 2,
  maxLength: 20,
});

export const litBy = (list: readonly Node[]) => ({
  engine: lightEngine({ wavelengths_nm: list.map((_, k) => 380 + k), spectrum: list.map(({ S }) => S) }),
  napierianAbsorptions_percm: list.map(({ alpha }) => alpha),
});
