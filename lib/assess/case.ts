// One formulation under one brief, with its figures made ready to be drawn: the only place where an ingredient becomes a
// model's input.

import type { Brief } from "../recipe/brief.js";
import type { Component, FigureReader, Formulation } from "../recipe/formulation.js";
import type { Ingredient, IngredientFigures } from "../recipe/ingredient.js";
import type { ResinConstants } from "../recipe/constants.js";
import type { Shelf } from "../recipe/shelf.js";
import type { SourcedValue } from "../result.js";
import type { Read, Uncertain } from "./doubt.js";
import type { OxygenCorrection } from "./windowCorrection.js";

/** What is asked of every property: this formulation, under this brief, with what the shelf knows. */
export interface Case {
  readonly formulation: Formulation;
  readonly brief: Brief;
  readonly shelf: Shelf;
  /** Readings on this window that correct what is said of oxygen; `calibrate` adds it. */
  readonly oxygenCorrection?: OxygenCorrection | undefined;
}

/** A sourced value under a label, spread as its kind needs, up to `max` where nature sets a limit. */
export function uncertain(
  label: string,
  { value, u, source, status }: SourcedValue,
  spread: Uncertain["spread"] = "positive",
  max?: number,
): Uncertain {
  return { label, value, u, source, status, spread, max };
}

/** A figure of an ingredient, or undefined where the shelf has none. The same figure is the same object in every use. */
export function figureOf(ingredient: Ingredient, figure: keyof IngredientFigures): Uncertain | undefined {
  const stated = ingredient[figure];
  if (stated === undefined) return undefined;
  const known = figureInputs.get(stated);
  if (known !== undefined) return known;
  const lot = ingredient.lot?.measured.includes(figure) ? ` (lot ${ingredient.lot.id})` : "";
  const made = uncertain(
    `${figureTitles[figure]} of ${ingredient.id}${lot}`,
    stated,
    spreadOf(figure),
    limits[figure],
  );
  figureInputs.set(stated, made);
  return made;
}

/** A class constant. The same constant is the same object in every use. */
export function constantOf(constants: ResinConstants, name: keyof ResinConstants): Uncertain {
  const stated = constants[name];
  const made = figureInputs.get(stated) ?? uncertain(constantTitles[name], stated, "positive", limits[name]);
  figureInputs.set(stated, made);
  return made;
}

/** Reads densities and molar masses for {@link composition} from the present draw. */
export function figureReader(read: Read): FigureReader {
  return (ingredient, figure) => {
    const input = figureOf(ingredient, figure);
    return input === undefined ? undefined : read(input);
  };
}

/** The components of the given roles. */
export function componentsIn(formulation: Formulation, roles: readonly Ingredient["role"][]): Component[] {
  return formulation.components.filter(({ ingredient }) => roles.includes(ingredient.role));
}

const figureInputs = new WeakMap<SourcedValue, Uncertain>();

const figureTitles: Readonly<Record<keyof IngredientFigures, string>> = {
  molarMass_gmol: "molar mass",
  density_gcm3: "density",
  viscosity_mPas: "viscosity",
  viscosityActivation_K: "viscosity activation",
  refractiveIndex: "refractive index",
  homopolymerGlassTransition_C: "homopolymer glass transition",
  radicalsPerPhoton: "radicals per photon",
};

const constantTitles: Readonly<Record<keyof ResinConstants, string>> = {
  oxygenSolubility_molm3Pa: "oxygen solubility in the resin",
  oxygenPerRadical: "oxygen used per radical",
  diffusivityFactor: "oxygen diffusivity against the two-thirds law",
  propagation_m3mols: "propagation rate constant",
  termination_m3mols: "termination rate constant",
  oxygenCapture_m3mols: "oxygen capture rate constant",
  gelConversion: "gel conversion",
  backgroundAbsorption_percm: "absorption of the resin itself",
  unmeasuredInteraction: "interaction of an unmeasured pair",
  packingLimit: "packing limit of the particles",
  intrinsicViscosity: "intrinsic viscosity of the particles",
};

/** A photon starts at most two radicals; a gel holds before nine bonds in ten have reacted. */
const limits: Readonly<Partial<Record<keyof IngredientFigures | keyof ResinConstants, number>>> = {
  radicalsPerPhoton: 2,
  gelConversion: 0.9,
};

function spreadOf(figure: keyof IngredientFigures): Uncertain["spread"] {
  return figure === "homopolymerGlassTransition_C" ? "signed" : "positive";
}
