// Oxygen: how long it delays cure, how thick a dead zone a permeable window keeps open, and what feeds it. Closed forms first,
// then the steady profile, then layers exposed step by step.
// The door of the topic; one subject a file stands in the folder beside it.
export { depthsAtLevel, valueAtDepth, type DepthProfile } from "../numerics/profile.js";
export * from "./oxygen/conversionEdge.js";
export * from "./oxygen/deadZone.js";
export * from "./oxygen/diffusivity.js";
export * from "./oxygen/evenLight.js";
export * from "./oxygen/exposeLayer.js";
export * from "./oxygen/exposeLayerFully.js";
export * from "./oxygen/film.js";
export * from "./oxygen/fitScalingLaw.js";
export * from "./oxygen/induction.js";
export * from "./oxygen/inhibitor.js";
export * from "./oxygen/radicalRich.js";
export * from "./oxygen/radicals.js";
export * from "./oxygen/refill.js";
export * from "./oxygen/resistance.js";
export * from "./oxygen/scalingLaw.js";
export * from "./oxygen/sealed.js";
export * from "./oxygen/steadyProfile.js";
export * from "./oxygen/supplyCut.js";
export * from "./oxygen/windowReadings.js";
export type { CureRates } from "./oxygen/balance.js";
export type { Bleaching } from "./oxygen/bleaching.js";
export type { OxygenWindow } from "./oxygen/column.js";
export type { PeroxylRates } from "./oxygen/fullRadicals.js";
export type { LayerExposure } from "./oxygen/layerExposure.js";
export type { LayerConditions } from "./oxygen/layerInput.js";
export type { DeadZoneLevels, DeadZoneReadings, LayerReading } from "./oxygen/layerReading.js";
export type { ExposureStep } from "./oxygen/schedule.js";
