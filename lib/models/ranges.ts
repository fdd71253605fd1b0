// What a physical figure can be at all. The bounds are wide; they are there to show a slip of unit at once.

import { zeroCelsius_K } from "./scales.js";

/** A molar mass in g/mol: from a hydrogen atom to a polymer. */
export const molarMass = { min: 1, max: 1e7, advice: "give it in g/mol" } as const;

/** A density in g/cm3: from a foam to the densest filler. */
export const density = { min: 0.1, max: 25, advice: "give it in g/cm3" } as const;

/** A wavelength in nm: from the vacuum ultraviolet to the near infrared. */
export const wavelength = { min: 100, max: 2000, advice: "give it in nm" } as const;

/** A temperature in degrees Celsius above absolute zero. */
export const celsius = { min: -zeroCelsius_K, above: true, advice: "give it in degrees Celsius" } as const;

/** Chain-starting radicals per absorbed photon: none is no initiator, and no photon starts more than four. */
export const radicalYield = { min: 0, above: true, max: 4 } as const;
