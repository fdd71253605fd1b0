// Cure: the working curve, its fit and its plan, what a broad light engine makes of it, how much absorber and initiator, layers
// on layers, conversion and gel. The door of the topic; one model a file stands in the folder beside it.
export * from "./cure/absorberLevel.js";
export * from "./cure/bendingCurve.js";
export * from "./cure/bleachedCureDepth.js";
export * from "./cure/broadInitiatorLevel.js";
export * from "./cure/conversion.js";
export * from "./cure/conversionTime.js";
export * from "./cure/criticalExposure.js";
export * from "./cure/exposurePlan.js";
export * from "./cure/fitWorkingCurve.js";
export * from "./cure/gelPoint.js";
export { deepestInitiatorLevel, type InitiatorLevel, type InitiatorQuestion } from "./cure/initiatorLevel.js";
export * from "./cure/layers.js";
export * from "./cure/planCureDepths.js";
export * from "./cure/rates.js";
export type { CureDepthLackOfFit, Curvature } from "./cure/straightness.js";
export * from "./cure/workingCurve.js";
export * from "./cure/workingCurveRegion.js";
