// The public door of resinwright: everything here runs in Node and in a browser. Reading files is in "resinwright/files".

export { InputError } from "./door.js";
export type { Interval, SourcedValue, SourceStatus, UsedSource, Warning } from "./result.js";

export { unitLabel, fieldUnits, type FieldUnit } from "./recipe/units.js";
export { readQuantity } from "./recipe/quantity.js";
export { hasCasCheckDigit, molarMassOfFormula } from "./recipe/identity.js";
export { parseJson, type JsonDocument } from "./recipe/document.js";
export {
  readIngredient,
  readLot,
  roles,
  type Ingredient,
  type IngredientFigures,
  type HazardStatement,
  type Lot,
  type Role,
} from "./recipe/ingredient.js";
export { withLot } from "./recipe/lot.js";
export type { AtTemperature } from "./recipe/sourced.js";
export { readSpectrum, type Spectrum } from "./recipe/spectrum.js";
export { readFilm, type Film } from "./recipe/film.js";
export { readInteraction, type Interaction } from "./recipe/interaction.js";
export { readConstants, type ResinConstants } from "./recipe/constants.js";
export {
  filmOn,
  ingredientOn,
  interactionOn,
  interactionsOn,
  spectrumOn,
  withInteraction,
  type Shelf,
} from "./recipe/shelf.js";
export {
  batchMasses,
  composition,
  densityOf,
  formulate,
  isLiquid,
  largestOf,
  mainPair,
  massFractionOf,
  withMassFraction,
  withMassFractions,
  withRatio,
  withShares,
  type Component,
  type CompositionRow,
  type FigureReader,
  type Formulation,
  type Part,
  type Recipe,
} from "./recipe/formulation.js";
export { readRecipe } from "./recipe/recipe.js";
export { readBrief, type Avoid, type Brief, type PropertyName, type Target } from "./recipe/brief.js";
export { propertyNames } from "./recipe/propertyNames.js";
export { readBlendReadings, type BlendReadings } from "./recipe/readings.js";
export {
  readWindowReadings,
  type InductionReading,
  type ReadValue,
  type UncuredReading,
  type WindowReadings,
} from "./recipe/windowReadings.js";
export {
  readCureDepths,
  type CureDepthSeries,
  type CureDepthSpot,
  type MeasuredWorkingCurve,
} from "./recipe/cureDepths.js";
export type { MeasuredParts } from "./recipe/measuredParts.js";
export { readNumberTable } from "./recipe/table.js";
export {
  readRheometerTable,
  type RejectedRow,
  type RheometerReading,
  type RheometerTable,
} from "./recipe/rheometer.js";
export { compareEndPoints } from "./recipe/endPoints.js";
export { readJcamp } from "./recipe/jcamp.js";
export { readSpectrumTable, type MeasuredSpectrum, type SpectrumColumn } from "./recipe/spectrumTable.js";

export * from "./numerics.js";
export * from "./models/viscosity.js";
export * from "./models/light.js";
export * from "./models/cure.js";
export * from "./models/oxygen.js";
export * from "./models/network.js";
export * from "./models/separation.js";

export type { DoubtShare, DrawOptions } from "./assess/doubt.js";
export type { Case } from "./assess/case.js";
export type { NeverCures, Property, Verdict } from "./assess/property.js";
export { viscosityOf } from "./assess/viscosity.js";
export { opticalDepthOf } from "./assess/light.js";
export { lightTakenOf, type LightTaken, type LightTaker } from "./assess/lightTaken.js";
export { penetrationDepthOf } from "./assess/depth.js";
export { workingCurveOf, type WorkingCurveEstimate } from "./assess/cure.js";
export { bleachingOf, type BleachingEstimate } from "./assess/bleaching.js";
export { deadZoneOf, inductionTimeOf, type DeadZoneEstimate } from "./assess/oxygen.js";
export type { OxygenCorrection } from "./assess/windowCorrection.js";
export { resistanceOf, type ResistanceEstimate } from "./assess/resistance.js";
export { layersOf, type LayerEstimate, type LayerSeries, type SeriesOptions } from "./assess/layers.js";
export { assess, avoidedIn, verdictOf, type Assessment } from "./assess/assess.js";

export {
  compareChanges,
  usualChanges,
  type Change,
  type ChangeComparison,
  type ChangeEffect,
  type Effect,
} from "./decide/changes.js";
export { evenSteps, mapOver, nearestWithin, sweep, type Curve } from "./decide/sweep.js";
export { calibrate, fitReadings, interactionFrom } from "./decide/calibrate.js";
export {
  correctOxygen,
  learntFromWindow,
  type LearntFigure,
  type LearntOxygen,
  type LearntReading,
} from "./decide/calibrateOxygen.js";
export { absorberCandidates, absorberFor, type WantedOfAbsorber } from "./decide/absorberFor.js";
export {
  initiatorCandidates,
  initiatorFor,
  type InitiatorAnswer,
  type InitiatorSearch,
} from "./decide/initiatorFor.js";
export type { Candidate, LevelAnswer, LevelFound, LevelRefused } from "./decide/level.js";
export { compareEngines, type EngineComparison } from "./decide/compareEngines.js";
export {
  exposurePlanOf,
  type ExposurePlanEstimate,
  type PlannedExposure,
  type PlannedLayers,
} from "./decide/exposurePlanOf.js";
export { spotPlanOf, type PlannedSpot, type SpotPlan, type SpotQuestion } from "./decide/spotPlanOf.js";
export { fitCureDepths, workingCurveFrom } from "./decide/workingCurveFrom.js";

export * from "./lab/batch.js";
export * from "./lab/hazards.js";
