// Light in a resin: how strongly it is absorbed, how many photons come, what a broad source makes of a spectrum, how the
// initiator bleaches and particles scatter. The door of the topic; one subject a file stands in the folder beside it.
export { absorbedShares, type AbsorbedShares, type AbsorbingComponent } from "./light/absorbedShares.js";
export * from "./light/absorption.js";
export * from "./light/actinometer.js";
export * from "./light/bleaching.js";
export { bleachedBesideAbsorber } from "./light/bleachingBeside.js";
export {
  absorptionSpectrum,
  broadTransmittedFraction,
  localOpticalDepth,
  type LitResin,
  type SpectralAbsorber,
} from "./light/broadband.js";
export * from "./light/engine.js";
export * from "./light/film.js";
export * from "./light/photons.js";
export * from "./light/plausibility.js";
export * from "./light/scattering.js";
export { interpolateSpectrum, spectrumMean } from "./light/spectrum.js";
