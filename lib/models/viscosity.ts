// Viscosity: mixtures by Grunberg and Nissan, temperature by Andrade, water as a reference, fractions on three bases.
// The door of the topic; one model a file stands in the folder beside it.
export { massToMoleFractions, massToVolumeFractions, moleToMassFractions } from "./fractions.js";
export { andradeFromReference, andradeViscosity, fitAndrade } from "./viscosity/andrade.js";
export type { AndradeFit, AndradeParameters } from "./viscosity/andrade.js";
export { fitGrunbergNissan } from "./viscosity/fitGrunbergNissan.js";
export type { BinaryViscosities, GrunbergNissanFit } from "./viscosity/fitGrunbergNissan.js";
export { grunbergNissan } from "./viscosity/grunbergNissan.js";
export type { GrunbergNissanMixture, MixingBasis, PairInteraction } from "./viscosity/grunbergNissan.js";
export { waterViscosity } from "./viscosity/water.js";
