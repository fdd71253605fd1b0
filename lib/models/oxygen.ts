// Oxygen: how long it delays cure, how thick a dead zone a permeable window keeps open, and what feeds it.
// The door of the topic; one subject a file stands in the folder beside it.
export * from "./oxygen/deadZone.js";
export * from "./oxygen/diffusivity.js";
export * from "./oxygen/film.js";
export * from "./oxygen/induction.js";
export * from "./oxygen/radicals.js";
export * from "./oxygen/scalingLaw.js";
