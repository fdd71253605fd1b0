// The figures behind oxygen at a window, read from ingredients, constants and film as they stand on the shelf: what light
// starts, what oxygen meets, what the film lets through. Nothing measured on the window is in them yet.

import { InputError } from "../door.js";
import { diffusivityFromViscosity, filmPermeance, radicalGeneration } from "../models/oxygen.js";
import { photonFlux } from "../models/light.js";
import { filmOn } from "../recipe/shelf.js";
import { componentsIn, constantOf, irradianceOf, uncertain, type Case } from "./case.js";
import type { Read } from "./doubt.js";
import { inhibitorModel } from "./inhibitor.js";
import { lightModel } from "./light.js";
import { viscosityModel } from "./viscosity.js";

/** Radicals started at the window, and the oxygen figures that go with them. */
export function radicalFigures(input: Case) {
  const { shelf } = input;
  if (componentsIn(input.formulation, ["photoinitiator"]).length === 0) {
    throw new InputError(
      `formulation "${input.formulation.id}": no photoinitiator in it; nothing would start the cure`,
    );
  }
  const light = lightModel(input);
  const irradiance = irradianceOf(input);
  const oxygenPerRadical = inhibitorModel(input);
  return (read: Read) => {
    const inResin = light(read);
    const irradiance_mWcm2 = read(irradiance);
    const photonFlux_molm2s = photonFlux({ irradiance_mWcm2, wavelength_nm: inResin.wavelength_nm });
    const radicalGeneration_molm3s = radicalGeneration({ ...inResin, photonFlux_molm2s });
    return {
      ...inResin,
      irradiance_mWcm2,
      radicalGeneration_molm3s,
      oxygenPerRadical: oxygenPerRadical(read, radicalGeneration_molm3s),
      solubility_molm3Pa: read(constantOf(shelf.constants, "oxygenSolubility_molm3Pa")),
      propagation_m3mols: read(constantOf(shelf.constants, "propagation_m3mols")),
    };
  };
}

/** How fast oxygen moves through resin and film. */
export function transportFigures(input: Case) {
  const { brief, shelf } = input;
  const { window } = brief;
  const viscosity = viscosityModel(input);
  const film = filmOn(shelf, `brief "${brief.id}"`, window.film);
  const permeability = uncertain(`oxygen permeability of ${film.id}`, film.oxygenPermeability_barrer);
  const filmThickness = uncertain("film thickness", window.filmThickness_um);
  const diffusivityFactor = constantOf(shelf.constants, "diffusivityFactor");
  return (read: Read) => ({
    diffusivity_m2s:
      read(diffusivityFactor) *
      diffusivityFromViscosity({ viscosity_mPas: viscosity(read), temperature_C: brief.temperature_C }),
    permeance_molm2sPa: filmPermeance({
      permeability_barrer: read(permeability),
      thickness_um: read(filmThickness),
    }),
  });
}
