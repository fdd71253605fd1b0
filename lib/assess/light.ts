// What the light meets in the resin: how much of it initiator, absorber and the resin itself take at each wavelength of the
// engine; and the optical depth that follows.

import { InputError } from "../door.js";
import {
  absorberConcentration,
  absorptionCoefficient,
  absorptionSpectrum,
  interpolateSpectrum,
  lightEngine,
  opticalDepth,
  type LightEngine,
  type SpectralAbsorber,
} from "../models/light.js";
import { densityOf, type Component } from "../recipe/formulation.js";
import type { Ingredient } from "../recipe/ingredient.js";
import { spectrumOn } from "../recipe/shelf.js";
import type { Spectrum } from "../recipe/spectrum.js";
import type { SourcedValue, Warning } from "../result.js";
import { componentsIn, constantOf, figureOf, figureReader, uncertain, type Case } from "./case.js";
import { startDraws, type DrawOptions, type Draws, type Read, type Uncertain } from "./doubt.js";
import { drawProperty, type Drawn, type Property } from "./property.js";

/** What one draw of the light says. Coefficients are Napierian. */
export interface LightInResin {
  /** Everything that absorbs, averaged over the engine. */
  readonly napierianAbsorption_percm: number;
  /** The initiators alone, averaged over the engine. */
  readonly initiatorAbsorption_percm: number;
  /** Chain-starting radicals per photon the initiators absorb, averaged over what each absorbs. */
  readonly radicalsPerPhoton: number;
  /** Mean wavelength of the engine. */
  readonly wavelength_nm: number;
  /** Everything that absorbs, at each node of the engine. */
  readonly napierianAbsorptions_percm: Float64Array;
  readonly engine: LightEngine;
  /** Initiators and absorbers, by name, in the order of the formulation. */
  readonly substances: readonly (SpectralAbsorber & { readonly id: string })[];
  /** The resin itself, at every node. */
  readonly background_percm: number;
  readonly initiators: readonly SpectralAbsorber[];
  /** The engine by the radicals that each node starts at the window; by its power where nothing starts any. */
  readonly starting: LightEngine;
}

/**
 * Optical depth at the window, µm: 1 over the absorption there, by Beer–Lambert, averaged over the engine's spectrum. Light of one
 * wavelength is down to 1/e at this depth; of a broad engine more is left, since what is absorbed least goes deepest.
 *
 * The slope of a working curve is another quantity, {@link penetrationDepthOf}, and can differ.
 * @throws InputError when an initiator or absorber has no spectrum, molar mass or density, or a spectrum does not cover the light.
 * @source Models: {@link absorptionSpectrum}, {@link opticalDepth}, {@link lightEngine}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { opticalDepthOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const depth = opticalDepthOf(work);
 * depth.unit; // → "µm"
 * // The depth the light reaches is a matter of the spectrum, not of how bright it is.
 * const light = { ...work.brief.light, irradiance_mWcm2: { ...work.brief.light.irradiance_mWcm2, value: 16 } };
 * opticalDepthOf({ ...work, brief: { ...work.brief, light } }).value === depth.value; // → true
 * ```
 */
export function opticalDepthOf(input: Case & DrawOptions): Property {
  return drawOpticalDepth(input, startDraws(input)).property;
}

/** @internal */
export function drawOpticalDepth(input: Case, draws: Draws): Drawn {
  const light = lightModel(input);
  return drawProperty("opticalDepth_um", (read) => opticalDepth(light(read)), lightWarnings(input), draws);
}

/** The light in the resin as a function of what the draws read; other properties build on it. @internal */
export function lightModel(input: Case): (read: Read) => LightInResin {
  const { formulation, shelf } = input;
  const substances = componentsIn(formulation, ["photoinitiator", "absorber"]).map((one) =>
    substanceOf(input, one),
  );
  const background = constantOf(shelf.constants, "backgroundAbsorption_percm");
  const engineAt = engineOf(input);
  return (read) => {
    const engine = engineAt(read);
    const density_gcm3 = densityOf(formulation, figureReader(read));
    const taken = substances.map(({ id, massFraction, scale, molarMass, spectrum, radicals }) => ({
      id,
      radicalsPerPhoton: radicals && read(radicals),
      molarAbsorptions_Lmolcm: absorptionsOn(engine, spectrum),
      // The scale of the spectrum moves the absorption as the concentration does.
      concentration_molL:
        read(scale) * absorberConcentration({ massFraction, density_gcm3, molarMass_gmol: read(molarMass) }),
    }));
    const background_percm = read(background);
    const napierianAbsorptions_percm = absorptionSpectrum({
      absorbers: taken,
      backgrounds_percm: new Float64Array(engine.shares.length).fill(background_percm),
    });
    const initiators = taken
      .filter(({ radicalsPerPhoton }) => radicalsPerPhoton !== undefined)
      .map((one) => ({
        ...one,
        molarAbsorption_Lmolcm: meanOver(engine, one.molarAbsorptions_Lmolcm),
        radicals_molL: one.radicalsPerPhoton! * one.concentration_molL,
      }));
    const absorbed = absorptionCoefficient({ absorbers: initiators, background_percm: 0 });
    const started = absorptionCoefficient({
      absorbers: initiators.map((one) => ({ ...one, concentration_molL: one.radicals_molL })),
      background_percm: 0,
    });
    return {
      napierianAbsorption_percm: meanOver(engine, napierianAbsorptions_percm),
      initiatorAbsorption_percm: absorbed,
      radicalsPerPhoton: absorbed > 0 ? started / absorbed : 0,
      wavelength_nm: meanOver(engine, engine.wavelengths_nm),
      napierianAbsorptions_percm,
      engine,
      substances: taken,
      background_percm,
      initiators,
      starting: byRadicals(engine, initiators),
    };
  };
}

/** A photon carries energy in inverse proportion to its wavelength, so a share of power is a share of photons times 1/nm. */
function byRadicals(
  { wavelengths_nm, shares }: LightEngine,
  initiators: readonly {
    readonly molarAbsorptions_Lmolcm: readonly number[];
    readonly radicals_molL: number;
  }[],
): LightEngine {
  const parts = new Array<number>(shares.length).fill(0);
  for (const { molarAbsorptions_Lmolcm: eps, radicals_molL } of initiators)
    for (let k = 0; k < parts.length; k++)
      parts[k]! += shares[k]! * wavelengths_nm[k]! * eps[k]! * radicals_molL;
  const total = parts.reduce((sum, part) => sum + part, 0);
  if (total === 0) return { wavelengths_nm, shares };
  for (let k = 0; k < parts.length; k++) parts[k]! /= total;
  return { wavelengths_nm, shares: parts };
}

/** Mean over the light of an engine. @internal */
export function meanOver({ shares }: LightEngine, values: ArrayLike<number>): number {
  let mean = 0;
  for (let k = 0; k < shares.length; k++) mean += shares[k]! * values[k]!;
  return mean;
}

/** A spectrum is one engine for all draws; a nominal wavelength is one node, itself in doubt. */
function engineOf({ brief, shelf }: Case): (read: Read) => LightEngine {
  const { spectrum: id, wavelength_nm } = brief.light;
  if (id === undefined) {
    const wavelength = uncertain("wavelength of the light", wavelength_nm!);
    return (read) => ({ wavelengths_nm: [read(wavelength)], shares: [1] });
  }
  const spectrum = spectrumOn(shelf, `brief "${brief.id}"`, id);
  const engine = engines.get(spectrum) ?? lightEngine({ ...spectrum, spectrum: spectrum.values });
  engines.set(spectrum, engine);
  return () => engine;
}

const engines = new WeakMap<Spectrum, LightEngine>();

/** Molar absorption at the nodes of an engine. */
function absorptionsOn(engine: LightEngine, spectrum: Spectrum): readonly number[] {
  const known = onEngine.get(engine) ?? new WeakMap<Spectrum, readonly number[]>();
  onEngine.set(engine, known);
  const { id, wavelengths_nm: nodes_nm, values } = spectrum;
  const where = `spectrum "${id}"`;
  const read =
    known.get(spectrum) ??
    engine.wavelengths_nm.map((wavelength_nm) =>
      interpolateSpectrum({ nodes_nm, values, wavelength_nm, where }),
    );
  known.set(spectrum, read);
  return read;
}

const onEngine = new WeakMap<LightEngine, WeakMap<Spectrum, readonly number[]>>();

function substanceOf({ formulation, shelf }: Case, { ingredient, massFraction }: Component) {
  const where = `formulation "${formulation.id}"`;
  const lack = lightLack(ingredient);
  if (lack !== undefined) throw new InputError(`${where}: ${ingredient.id} ${lack}`);
  const spectrum = spectrumOn(shelf, where, ingredient.spectrum!);
  return {
    id: ingredient.id,
    massFraction,
    molarMass: figureOf(ingredient, "molarMass_gmol")!,
    radicals: ingredient.role === "photoinitiator" ? figureOf(ingredient, "radicalsPerPhoton") : undefined,
    scale: scaleOf(ingredient.id, spectrum),
    spectrum,
  };
}

/** What an initiator or absorber lacks for its light to be assessed, and what to do; undefined where nothing is missing. @internal */
export function lightLack(ingredient: Ingredient): string | undefined {
  if (ingredient.spectrum === undefined)
    return "has no absorption spectrum; add one to spectra/ and name it in the ingredient";
  const needed = ["molarMass_gmol", ...(ingredient.role === "photoinitiator" ? ["radicalsPerPhoton"] : [])];
  const missing = needed.find((figure) => ingredient[figure as "molarMass_gmol"] === undefined);
  return missing && `has no ${missing}; add it to the ingredient with its source and u`;
}

/** One factor moves a whole spectrum: what is uncertain is mostly its scale (concentration, path). */
function scaleOf(id: string, spectrum: Spectrum): Uncertain {
  const { relativeU, source, status } = spectrum;
  const scale = scales.get(spectrum) ?? { value: 1, u: relativeU, source, status };
  scales.set(spectrum, scale);
  return uncertain(`absorption of ${id}`, scale);
}

const scales = new WeakMap<Spectrum, SourcedValue>();

/** What to know before using anything that rests on the absorption. @internal */
export function lightWarnings({ formulation, brief, shelf }: Case): Warning[] {
  const warnings: Warning[] = [];
  if (componentsIn(formulation, ["photoinitiator"]).length === 0) {
    warnings.push({
      code: "no-initiator",
      message: "There is no photoinitiator in it: light passes, nothing cures.",
    });
  }
  if (brief.light.spectrum === undefined) {
    warnings.push({
      code: "nominal-wavelength",
      message:
        "The light is given as one wavelength. Engines stray several nm from the nominal value and are 10 to 25 nm wide; measure the spectrum.",
    });
  }
  const dispersed = componentsIn(formulation, ["pigment", "filler"]);
  if (dispersed.length > 0) {
    warnings.push({
      code: "scattering-left-out",
      message: `${dispersed.map(({ ingredient }) => ingredient.id).join(", ")} scatters light; this is the depth without scattering. Measure a working curve.`,
    });
  }
  const memory = componentsIn(formulation, ["photoinitiator", "absorber"]).filter(
    ({ ingredient }) =>
      ingredient.spectrum !== undefined && shelf.spectra.get(ingredient.spectrum)?.status === "from memory",
  );
  if (memory.length > 0) {
    warnings.push({
      code: "spectrum-from-memory",
      message: `The absorption of ${memory.map(({ ingredient }) => ingredient.id).join(", ")} is from memory. One film of known thickness in a spectrophotometer replaces it.`,
    });
  }
  return warnings;
}
