// Cure: the working curve and its fit, and how long a conversion takes.
// The door of the topic; one model a file stands in the folder beside it.
export * from "./cure/conversionTime.js";
export * from "./cure/fitWorkingCurve.js";
export * from "./cure/workingCurve.js";
