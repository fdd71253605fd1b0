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

/**
 * A sourced value under a label, spread as its kind needs, up to `max` where nature sets a limit. The same value under the
 * same label is the same object, so that a model built many times over one set of draws reads one input.
 */
export function uncertain(
  label: string,
  stated: SourcedValue,
  spread: Uncertain["spread"] = "positive",
  max?: number,
): Uncertain {
  const made = inputsOf(stated);
  const known = made.get(label);
  if (known !== undefined) return known;
  const { value, u, source, status } = stated;
  const input: Uncertain = { label, value, u, source, status, spread, max };
  made.set(label, input);
  return input;
}

/** A figure of an ingredient, or undefined where the shelf has none. */
export function figureOf(ingredient: Ingredient, figure: keyof IngredientFigures): Uncertain | undefined {
  const stated = ingredient[figure];
  if (stated === undefined) return undefined;
  const known = figureInputs.get(stated);
  if (known !== undefined) return known;
  const lot = ingredient.lot?.measured.includes(figure) ? ` (lot ${ingredient.lot.id})` : "";
  const label = `${figureTitles[figure]} of ${ingredient.id}${lot}`;
  const input = uncertain(label, stated, spreadOf(figure), limits[figure]);
  figureInputs.set(stated, input);
  return input;
}

/** A class constant. */
export function constantOf(constants: ResinConstants, name: keyof ResinConstants): Uncertain {
  return uncertain(constantTitles[name], constants[name], "positive", limits[name]);
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

/** The light at the window. */
export function irradianceOf({ brief }: Pick<Case, "brief">): Uncertain {
  return uncertain("irradiance at the window", brief.light.irradiance_mWcm2);
}

/** How deep the brief wants a layer to cure, µm. */
export function layerCureDepth({ brief }: Pick<Case, "brief">): number {
  return brief.cureDepthPerLayer * brief.layerThickness_um;
}

/** Of an ingredient's figures, which are read so often that even making the label would cost. */
const figureInputs = new WeakMap<SourcedValue, Uncertain>();
const inputs = new WeakMap<SourcedValue, Map<string, Uncertain>>();

function inputsOf(stated: SourcedValue): Map<string, Uncertain> {
  const known = inputs.get(stated) ?? new Map<string, Uncertain>();
  inputs.set(stated, known);
  return known;
}

const figureTitles: Readonly<Record<keyof IngredientFigures, string>> = {
  molarMass_gmol: "molar mass",
  density_gcm3: "density",
  viscosity_mPas: "viscosity",
  viscosityActivation_K: "viscosity activation",
  refractiveIndex: "refractive index",
  homopolymerGlassTransition_C: "homopolymer glass transition",
  radicalsPerPhoton: "radicals per photon",
  peroxylCapture_m3mols: "peroxyl capture rate constant",
  radicalsCaught: "radicals caught per molecule",
  solubility_pct: "solubility",
};

const constantTitles: Readonly<Record<keyof ResinConstants, string>> = {
  oxygenSolubility_molm3Pa: "oxygen solubility in the resin",
  oxygenPerRadical: "oxygen used per radical without inhibitor",
  peroxylTermination_m3mols: "termination of peroxyl pairs",
  oxygenReturned: "oxygen given back by peroxyl pairs",
  diffusivityFactor: "oxygen diffusivity against the two-thirds law",
  propagation_m3mols: "propagation rate constant",
  termination_m3mols: "termination rate constant",
  oxygenCapture_m3mols: "oxygen capture rate constant",
  gelConversion: "gel conversion",
  bleachingYield: "initiator lost per photon absorbed",
  slopeFactor: "working-curve slope against optical depth",
  backgroundAbsorption_percm: "absorption of the resin itself",
  unmeasuredInteraction: "interaction of an unmeasured pair",
  packingLimit: "packing limit of the particles",
  intrinsicViscosity: "intrinsic viscosity of the particles",
};

/** A photon splits at most one molecule and starts at most two radicals; a pair of peroxyls gives one oxygen back at most; no more dissolves than there is; a gel holds before nine bonds in ten have reacted. */
const limits: Readonly<Partial<Record<keyof IngredientFigures | keyof ResinConstants, number>>> = {
  radicalsPerPhoton: 2,
  radicalsCaught: 10,
  solubility_pct: 100,
  bleachingYield: 1,
  oxygenReturned: 1,
  gelConversion: 0.9,
};

function spreadOf(figure: keyof IngredientFigures): Uncertain["spread"] {
  return figure === "homopolymerGlassTransition_C" ? "signed" : "positive";
}
