// Light in a resin: how strongly it is absorbed, how many photons come, and what a broad source makes of a spectrum.
// The door of the topic; one subject a file stands in the folder beside it.
export * from "./light/absorption.js";
export * from "./light/photons.js";
export * from "./light/spectrum.js";
