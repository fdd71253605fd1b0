// A small shelf of round numbers chosen for testing; these are not materials.

import type { Balance, WeighedBatch } from "../lib/lab/batch.js";
import type { Brief } from "../lib/recipe/brief.js";
import { formulate, type Formulation, type Part } from "../lib/recipe/formulation.js";
import type { Ingredient } from "../lib/recipe/ingredient.js";
import type { BlendReadings } from "../lib/recipe/readings.js";
import type { Shelf } from "../lib/recipe/shelf.js";
import type { SourcedValue } from "../lib/result.js";

export function sure(value: number, u = 0): SourcedValue {
  return { value, u, source: "round number chosen for a test", status: "invented for the demo" };
}

const at25 = (value: number, u = 0) => ({ ...sure(value, u), temperature_C: 25 });

function liquid(id: string, viscosity: number, molarMass: number, density: number): Ingredient {
  return {
    id,
    name: `liquid ${id}`,
    role: viscosity > 1000 ? "oligomer" : "diluent",
    state: "liquid",
    functionality: 2,
    molarMass_gmol: sure(molarMass),
    density_gcm3: at25(density),
    viscosity_mPas: at25(viscosity, viscosity / 10),
    viscosityActivation_K: sure(3000, 300),
    hazards: [{ code: "H317", source: "chosen for a test", status: "invented for the demo" }],
  };
}

const initiator: Ingredient = {
  id: "PI",
  name: "an initiator",
  role: "photoinitiator",
  state: "solid",
  molarMass_gmol: sure(400),
  density_gcm3: at25(1),
  radicalsPerPhoton: sure(1, 0.2),
  spectrum: "pi",
  hazards: [{ code: "H360FD", source: "chosen for a test", status: "invented for the demo" }],
};

const absorber: Ingredient = {
  ...initiator,
  id: "AB",
  name: "an absorber",
  role: "absorber",
  spectrum: "ab",
  hazards: undefined,
};

function flatSpectrum(id: string, value: number, quantity: "molarAbsorption_Lmolcm" | "relativePower") {
  const { source, status } = sure(0);
  const common = { id, title: `flat ${id}`, medium: "none", quantity, relativeU: 0.1, source, status };
  return { ...common, wavelengths_nm: [380, 400, 420], values: [value, value, value] };
}

const inhibitor: Ingredient = {
  ...initiator,
  id: "KEEP",
  name: "an inhibitor",
  role: "inhibitor",
  molarMass_gmol: sure(125),
  radicalsPerPhoton: undefined,
  spectrum: undefined,
  peroxylCapture_m3mols: sure(30, 10),
  radicalsCaught: sure(2, 0.2),
};

const filler: Ingredient = {
  ...initiator,
  id: "SAND",
  name: "a filler",
  role: "filler",
  density_gcm3: at25(2),
  radicalsPerPhoton: undefined,
  spectrum: undefined,
};

export const shelf: Shelf = {
  ingredients: new Map(
    [
      liquid("THIN", 10, 200, 1),
      liquid("THICK", 10000, 500, 1.25),
      liquid("MID", 100, 300, 1),
      initiator,
      absorber,
      inhibitor,
      filler,
    ].map((one) => [one.id, one]),
  ),
  lots: new Map([
    [
      "T-7",
      {
        id: "T-7",
        ingredient: "THICK",
        measured: { viscosity_mPas: { ...at25(12000, 100), status: "measured here" } },
      },
    ],
  ]),
  spectra: new Map(
    [
      flatSpectrum("pi", 500, "molarAbsorption_Lmolcm"),
      flatSpectrum("ab", 10000, "molarAbsorption_Lmolcm"),
      flatSpectrum("lamp", 1, "relativePower"),
    ].map((one) => [one.id, one]),
  ),
  films: new Map([
    ["OPEN", { id: "OPEN", name: "a permeable film", oxygenPermeability_barrer: sure(600, 60) }],
  ]),
  interactions: [],
  readings: [],
  windowReadings: [],
  cureDepths: [],
  workingCurves: [],
  constants: {
    oxygenSolubility_molm3Pa: sure(5e-5, 1e-5),
    oxygenPerRadical: sure(1, 0.2),
    peroxylTermination_m3mols: sure(500, 1000),
    oxygenReturned: sure(0.5, 0.2),
    diffusivityFactor: sure(1, 0.5),
    propagation_m3mols: sure(25, 5),
    termination_m3mols: sure(1250, 250),
    oxygenCapture_m3mols: sure(5e5, 1e5),
    gelConversion: sure(0.1, 0.02),
    bleachingYield: sure(0.6, 0.1),
    slopeFactor: sure(1, 0.15),
    backgroundAbsorption_percm: sure(1, 0.5),
    unmeasuredInteraction: sure(0, 1.1),
    packingLimit: sure(0.6, 0.03),
    intrinsicViscosity: sure(2.5, 0.2),
  },
};

export const brief: Brief = {
  id: "test",
  title: "a brief for tests",
  scenario: "round numbers",
  formulation: "test.json",
  shelf: [".."],
  temperature_C: 25,
  layerThickness_um: 50,
  cureDepthPerLayer: 1.5,
  light: { spectrum: "lamp", irradiance_mWcm2: sure(8, 0.8) },
  window: {
    film: "OPEN",
    filmThickness_um: sure(200, 20),
    gasOxygenFraction: 0.2095,
    gasPressure_Pa: 101325,
  },
  crossSection_mm2: 100,
  liftSpeed_mms: 1,
  betweenLayers: { dark_s: 5, freshFraction: 0.7 },
  targets: {},
  avoid: [],
};

/** Parts as `{ THIN: 60, THICK: 40 }` in mass percent. */
export function formulationOf(parts: Record<string, number>, on: Shelf = shelf): Formulation {
  const list = Object.entries(parts).map(([ingredient, mass_pct]): Part => ({ ingredient, mass_pct }));
  return formulate({ recipe: { id: "test", title: "test", normalise: false, parts: list }, shelf: on });
}

/** Neat 5000 and 20 mPa s with an interaction `G` on mass fractions. */
export const blendLaw = (w: number, G: number): number =>
  5000 ** w * 20 ** (1 - w) * Math.exp(G * w * (1 - w));

const massFractions = [0, 0.25, 0.5, 0.75, 1];

/** Constructed so that the answer is exact: {@link blendLaw} with G = -1.5, no scatter. */
export const exactReadings: BlendReadings = {
  id: "r1",
  pair: ["THICK", "THIN"],
  temperature_C: 25,
  relativeU: 0.02,
  massFractions,
  viscosities_mPas: massFractions.map((w) => blendLaw(w, -1.5)),
  source: "constructed for a test",
  status: "invented for the demo",
};

export const balance: Balance = { readability_g: 0.01, repeatability_g: 0, capacity_g: 2000 };

/** A batch on {@link balance} before its weighings. */
export const weighedBatch: WeighedBatch = {
  id: "T-1",
  formulation: "test",
  batch_g: 1000,
  balance,
  weighings: [],
  source: "round numbers chosen for a test",
  status: "invented for the demo",
};
