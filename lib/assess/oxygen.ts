// Oxygen in the resin and through the window: what delays the cure, and how thick a layer stays liquid on the window.

import {
  deadZone,
  filmEquivalentThickness,
  filmTransferCoefficient,
  inductionTime,
  oxygenPartialPressure,
} from "../models/oxygen.js";
import { unitLabel } from "../recipe/units.js";
import type { Warning } from "../result.js";
import type { Case } from "./case.js";
import {
  doubtShares,
  intervalAmong,
  propagate,
  sourcesOf,
  startDraws,
  type DrawOptions,
  type Draws,
  type Read,
} from "./doubt.js";
import { inhibitorWarnings } from "./inhibitor.js";
import { drawProperty, propertyTitles, type Drawn, type NeverCures, type Property } from "./property.js";
import { correctionModel } from "./windowCorrection.js";
import { radicalFigures, transportFigures } from "./windowFigures.js";

/** The dead zone of an assessed formulation: a thickness, with the share of draws that never cure, or the "never cures" outcome. */
export type DeadZoneEstimate = (Property & { readonly neverCuresShare: number }) | NeverCures;

/**
 * Thickness of the layer that stays liquid on the window under steady light, µm, or the outcome that nothing ever cures.
 *
 * Zero-order oxygen sink in light that decays with depth, oxygen fed through the film in series; oxygen diffuses as the
 * two-thirds power of viscosity allows. Steady state, no flow: layers shorter than a few induction times never reach it.
 * @throws InputError as {@link viscosityOf} and {@link opticalDepthOf}; when the film is unknown.
 * @source Models: {@link deadZone}, `diffusivityFromViscosity`, `filmPermeance`. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { deadZoneOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * deadZoneOf(work).outcome; // → "value"
 * const nitrogen = { ...work.brief.window, gasOxygenFraction: 0 };
 * const zone = deadZoneOf({ ...work, brief: { ...work.brief, window: nitrogen } });
 * zone.outcome === "value" && zone.value; // → 0
 * zone.warnings.map(({ code }) => code); // → ["no-oxygen-below"]
 * ```
 */
export function deadZoneOf(input: Case & DrawOptions): DeadZoneEstimate {
  return drawDeadZone(input, startDraws(input)).property;
}

/** The dead zone at the stated figures alone, µm, or null where nothing ever cures: for maps. @internal */
export function statedDeadZone(input: Case): number | null {
  const zone = deadZoneModel(input)(({ value }) => value);
  return zone.outcome === "dead-zone" ? zone.thickness_um : null;
}

/** @internal */
export function drawDeadZone(input: Case, draws: Draws): Drawn<DeadZoneEstimate> {
  const property = "deadZone_um" as const;
  const { stated, outcomes, inputs } = propagate(deadZoneModel(input), draws);
  const values = outcomes.map((one) => (one.outcome === "dead-zone" ? one.thickness_um : NaN));
  const cured = values.filter((value) => !Number.isNaN(value));
  const share = 1 - cured.length / values.length;
  // A draw that never cures is the thickest of all.
  const ranked = values.map((value) => (Number.isNaN(value) ? Number.MAX_VALUE : value));
  const common = {
    property,
    title: propertyTitles[property],
    unit: unitLabel(property),
    warnings: deadZoneWarnings(input, share),
    doubt: doubtShares(ranked, inputs, draws),
    sources: sourcesOf(inputs),
  };
  if (stated.outcome === "never-cures" || cured.length === 0)
    return { values, property: { ...common, outcome: "never-cures", share } };
  const { thickness_um: value } = stated;
  const interval = intervalAmong({ stated: value, values: cured, level: draws.level });
  return { values, property: { ...common, outcome: "value", ...interval, neverCuresShare: share } };
}

/**
 * Light until the oxygen dissolved in fresh resin is used up at the window, s, with no supply from below.
 * @throws InputError as {@link deadZoneOf}.
 * @source Model: {@link inductionTime}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { inductionTimeOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * inductionTimeOf(openBrief("data/briefs/flow-cell.json")).unit; // → "s"
 * ```
 */
export function inductionTimeOf(input: Case & DrawOptions): Property {
  return drawInductionTime(input, startDraws(input)).property;
}

/** @internal */
export function drawInductionTime(input: Case, draws: Draws): Drawn {
  return drawProperty("inductionTime_s", inductionModel(input), radicalWarnings(input), draws);
}

/** Radicals started at the window and the oxygen figures that go with them, corrected by what was read on it. @internal */
export function radicalModel(input: Case) {
  const figures = radicalFigures(input);
  const correction = correctionModel(input);
  return (read: Read) => {
    const drawn = figures(read);
    const factors = correction(read);
    return {
      ...drawn,
      factors,
      radicalGeneration_molm3s: factors.radicalGeneration * drawn.radicalGeneration_molm3s,
      oxygenPerRadical: factors.oxygenPerRadical * drawn.oxygenPerRadical,
      solubility_molm3Pa: factors.solubility * drawn.solubility_molm3Pa,
      propagation_m3mols: factors.propagation * drawn.propagation_m3mols,
    };
  };
}

/** Oxygen that fresh resin brings along, mol/m³: it has stood in dry air at 101325 Pa. @internal */
export function airSaturation(solubility_molm3Pa: number): number {
  return solubility_molm3Pa * oxygenPartialPressure({ oxygenFraction: 0.2095, pressure_Pa: 101325 });
}

function inductionModel(input: Case) {
  const radicals = radicalModel(input);
  return (read: Read) => {
    const { radicalGeneration_molm3s, oxygenPerRadical, solubility_molm3Pa } = radicals(read);
    return inductionTime({
      oxygen_molm3: airSaturation(solubility_molm3Pa),
      radicalGeneration_molm3s,
      oxygenPerRadical,
    });
  };
}

/** @internal */
export function deadZoneModel(input: Case) {
  const oxygen = oxygenModel(input);
  return (read: Read) => deadZone(oxygen(read));
}

/** Oxygen at this window in this light, as a function of what the draws read: what every model of it starts from. @internal */
export function oxygenModel(input: Case) {
  const { window } = input.brief;
  const radicals = radicalModel(input);
  const transport = transportFigures(input);
  const gasOxygen_Pa = oxygenPartialPressure({
    oxygenFraction: window.gasOxygenFraction,
    pressure_Pa: window.gasPressure_Pa,
  });
  return (read: Read) => {
    const { factors, solubility_molm3Pa, ...drawn } = radicals(read);
    const moved = transport(read);
    const diffusivity_m2s = factors.diffusivity * moved.diffusivity_m2s;
    const permeance_molm2sPa = factors.permeance * moved.permeance_molm2sPa;
    const transferCoefficient_ms = filmTransferCoefficient({ permeance_molm2sPa, solubility_molm3Pa });
    return {
      diffusivity_m2s,
      saturation_molm3: solubility_molm3Pa * gasOxygen_Pa,
      freshOxygen_molm3: airSaturation(solubility_molm3Pa),
      radicalGeneration_molm3s: drawn.radicalGeneration_molm3s,
      oxygenPerRadical: drawn.oxygenPerRadical,
      propagation_m3mols: drawn.propagation_m3mols,
      napierianAbsorption_percm: drawn.napierianAbsorption_percm,
      solubility_molm3Pa,
      permeance_molm2sPa,
      filmEquivalentThickness_um: filmEquivalentThickness({ diffusivity_m2s, transferCoefficient_ms }),
    };
  };
}

/** What there is to say of the figures behind every answer on oxygen. @internal */
export function radicalWarnings(input: Case): Warning[] {
  return [...(input.oxygenCorrection?.warnings ?? []), ...inhibitorWarnings(input)];
}

function deadZoneWarnings(input: Case, neverCuresShare: number): Warning[] {
  const warnings = radicalWarnings(input);
  if (neverCuresShare > 0) {
    warnings.push({
      code: "may-never-cure",
      message: `In ${Number((100 * neverCuresShare).toPrecision(2))} % of the draws this light never cures this resin at this window: oxygen comes in faster than it is burnt. More light, more initiator or a tighter film cures it.`,
    });
  }
  if (input.brief.window.gasOxygenFraction === 0) {
    warnings.push({
      code: "no-oxygen-below",
      message:
        "The gas under the film holds no oxygen: no standing dead zone, and the part may stick to the window.",
    });
  }
  return warnings;
}
