// The network: double bonds in the bottle, and what their reaction brings in heat, shrinkage, glass transition and stiffness.
// The door of the topic; one subject a file stands in the folder beside it.
export { doubleBondConcentration, type DoubleBondInput } from "./network/doubleBonds.js";
export * from "./network/glassTransition.js";
export * from "./network/heat.js";
export * from "./network/rubberElasticity.js";
export * from "./network/shrinkage.js";
