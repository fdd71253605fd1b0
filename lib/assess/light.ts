// What the light meets in the resin: how much of it initiator, absorber and the resin itself take, weighted by the engine's
// spectrum; and the penetration depth that follows.

import { InputError } from "../door.js";
import {
  absorberConcentration,
  absorptionCoefficient,
  interpolateSpectrum,
  penetrationDepth,
  spectrumMean,
} from "../models/light.js";
import { densityOf, type Component } from "../recipe/formulation.js";
import { spectrumOn } from "../recipe/shelf.js";
import type { Spectrum } from "../recipe/spectrum.js";
import type { Warning } from "../result.js";
import { componentsIn, constantOf, figureOf, figureReader, uncertain, type Case } from "./case.js";
import { startDraws, type DrawOptions, type Draws, type Read, type Uncertain } from "./doubt.js";
import { drawProperty, type Drawn, type Property } from "./property.js";

/** What one draw of the light says. Coefficients are Napierian. */
export interface LightInResin {
  /** Everything that absorbs. */
  readonly napierianAbsorption_percm: number;
  /** The initiators alone. */
  readonly initiatorAbsorption_percm: number;
  /** Chain-starting radicals per photon the initiators absorb, averaged over what each absorbs. */
  readonly radicalsPerPhoton: number;
  /** Photon-averaged wavelength of the engine. */
  readonly wavelength_nm: number;
}

/**
 * Penetration depth at the window, µm: the depth at which the light is down to 1/e, by Beer–Lambert, with the absorption
 * averaged over the engine's spectrum.
 *
 * This is the optical depth; the slope of a measured working curve is another quantity and can differ.
 * @throws InputError when an initiator or absorber has no spectrum, molar mass or density, or a spectrum does not cover the light.
 * @source Models: {@link absorptionCoefficient}, {@link penetrationDepth}, {@link spectrumMean}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { penetrationDepthOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const depth = penetrationDepthOf(work);
 * depth.unit; // → "µm"
 * // The depth the light reaches is a matter of the spectrum, not of how bright it is.
 * const light = { ...work.brief.light, irradiance_mWcm2: { ...work.brief.light.irradiance_mWcm2, value: 16 } };
 * penetrationDepthOf({ ...work, brief: { ...work.brief, light } }).value === depth.value; // → true
 * ```
 */
export function penetrationDepthOf(input: Case & DrawOptions): Property {
  return drawPenetrationDepth(input, startDraws(input)).property;
}

/** @internal */
export function drawPenetrationDepth(input: Case, draws: Draws): Drawn {
  const light = lightModel(input);
  return drawProperty(
    "penetrationDepth_um",
    (read) => penetrationDepth(light(read)),
    lightWarnings(input),
    draws,
  );
}

/** The light in the resin as a function of what the draws read; other properties build on it. @internal */
export function lightModel(input: Case): (read: Read) => LightInResin {
  const { formulation, shelf } = input;
  const absorbers = componentsIn(formulation, ["photoinitiator", "absorber"]).map((one) =>
    absorberOf(input, one),
  );
  const background = constantOf(shelf.constants, "backgroundAbsorption_percm");
  const engine = engineOf(input);
  return (read) => {
    const density_gcm3 = densityOf(formulation, figureReader(read));
    const taken = absorbers.map(({ massFraction, scale, molarMass, absorptionAt, radicals }) => ({
      radicals: radicals === undefined ? 0 : read(radicals),
      isInitiator: radicals !== undefined,
      molarAbsorption_Lmolcm: read(scale) * engine.average(absorptionAt, read),
      concentration_molL: absorberConcentration({
        massFraction,
        density_gcm3,
        molarMass_gmol: read(molarMass),
      }),
    }));
    const initiators = taken.filter(({ isInitiator }) => isInitiator);
    const initiatorAbsorption_percm = absorptionCoefficient({ absorbers: initiators, background_percm: 0 });
    const started = initiators.reduce(
      (sum, one) => sum + one.radicals * one.molarAbsorption_Lmolcm * one.concentration_molL,
      0,
    );
    const absorbed = initiators.reduce(
      (sum, one) => sum + one.molarAbsorption_Lmolcm * one.concentration_molL,
      0,
    );
    return {
      napierianAbsorption_percm: absorptionCoefficient({
        absorbers: taken,
        background_percm: read(background),
      }),
      initiatorAbsorption_percm,
      radicalsPerPhoton: absorbed > 0 ? started / absorbed : 0,
      wavelength_nm: engine.wavelength_nm(read),
    };
  };
}

/** The wavelength-dependent molar absorption of an ingredient, ready for either kind of engine. */
interface AbsorptionAt {
  readonly spectrum: Spectrum;
  readonly engineMean: number;
}

interface Engine {
  readonly average: (absorption: AbsorptionAt, read: Read) => number;
  readonly wavelength_nm: (read: Read) => number;
}

/** A spectrum averages each absorption over its nodes; a nominal wavelength reads it at one place, itself in doubt. */
function engineOf({ brief, shelf }: Case): Engine {
  const { spectrum: id, wavelength_nm } = brief.light;
  if (id === undefined) {
    const wavelength = uncertain("wavelength of the light", wavelength_nm!);
    return {
      average: ({ spectrum }, read) => absorptionAtWavelength(spectrum, read(wavelength)),
      wavelength_nm: (read) => read(wavelength),
    };
  }
  const { wavelengths_nm, values } = spectrumOn(shelf, `brief "${brief.id}"`, id);
  const mean_nm = spectrumMean({ wavelengths_nm, spectrum: values, values: wavelengths_nm });
  return { average: ({ engineMean }) => engineMean, wavelength_nm: () => mean_nm };
}

function absorberOf({ formulation, brief, shelf }: Case, { ingredient, massFraction }: Component) {
  const where = `formulation "${formulation.id}"`;
  const molarMass = figureOf(ingredient, "molarMass_gmol");
  const radicals =
    ingredient.role === "photoinitiator" ? figureOf(ingredient, "radicalsPerPhoton") : undefined;
  if (ingredient.spectrum === undefined) {
    throw new InputError(
      `${where}: ${ingredient.id} has no absorption spectrum; add one to spectra/ and name it in the ingredient`,
    );
  }
  if (molarMass === undefined) {
    throw new InputError(
      `${where}: ${ingredient.id} has no molarMass_gmol; add it to the ingredient with its source and u`,
    );
  }
  if (ingredient.role === "photoinitiator" && radicals === undefined) {
    throw new InputError(
      `${where}: ${ingredient.id} has no radicalsPerPhoton; add it to the ingredient with its source and u`,
    );
  }
  const spectrum = spectrumOn(shelf, where, ingredient.spectrum);
  return {
    massFraction,
    molarMass,
    radicals,
    scale: scaleOf(ingredient.id, spectrum),
    absorptionAt: { spectrum, engineMean: meanOverEngine(spectrum, brief, shelf) },
  };
}

function meanOverEngine(absorption: Spectrum, brief: Case["brief"], shelf: Case["shelf"]): number {
  if (brief.light.spectrum === undefined) return NaN;
  const { wavelengths_nm, values } = spectrumOn(shelf, `brief "${brief.id}"`, brief.light.spectrum);
  const onNodes = wavelengths_nm.map((wavelength_nm) => absorptionAtWavelength(absorption, wavelength_nm));
  return spectrumMean({ wavelengths_nm, spectrum: values, values: onNodes });
}

function absorptionAtWavelength({ id, wavelengths_nm, values }: Spectrum, wavelength_nm: number): number {
  return interpolateSpectrum({ nodes_nm: wavelengths_nm, values, wavelength_nm, where: `spectrum "${id}"` });
}

/** One factor moves a whole spectrum: what is uncertain is mostly its scale (concentration, path). */
function scaleOf(id: string, { relativeU, source, status }: Spectrum): Uncertain {
  return uncertain(`absorption of ${id}`, { value: 1, u: relativeU, source, status });
}

function lightWarnings({ formulation, brief, shelf }: Case): Warning[] {
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
