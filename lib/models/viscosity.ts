// Viscosity: mixtures, their interactions and how to fit them; temperature; filled resins; reference liquids; fractions.
// The door of the topic; one model a file stands in the folder beside it.
export { massToMoleFractions, massToVolumeFractions, moleToMassFractions } from "./fractions.js";
export type { Adequacy, AdequacyVerdict, LackOfFit, TermGain } from "./viscosity/adequacy.js";
export { andradeFromReference, andradeViscosity, fitAndrade } from "./viscosity/andrade.js";
export type { AndradeFit, AndradeParameters } from "./viscosity/andrade.js";
export type { BlendShape } from "./viscosity/blendDesign.js";
export { blendViscosity } from "./viscosity/blendViscosity.js";
export {
  effectiveSolidFraction,
  hardSpherePacking,
  hardSphereViscosity,
  kriegerDougherty,
  maronPierce,
  solidVolumeFraction,
  sphereIntrinsicViscosity,
} from "./viscosity/filled.js";
export { fitBlend } from "./viscosity/fitBlend.js";
export type { BlendFit, BlendReading, FittedPair } from "./viscosity/fitBlend.js";
export { fitEffectiveOligomer } from "./viscosity/fitEffectiveOligomer.js";
export type { Dilutions, EffectiveOligomer } from "./viscosity/fitEffectiveOligomer.js";
export { fitGrunbergNissan } from "./viscosity/fitGrunbergNissan.js";
export type { GrunbergNissanFit } from "./viscosity/fitGrunbergNissan.js";
export { fitRedlichKister } from "./viscosity/fitRedlichKister.js";
export type { BinaryViscosities, RedlichKisterFit } from "./viscosity/fitRedlichKister.js";
export { fitTemperatureLaw, viscosityAtTemperature, viscosityByLaw } from "./viscosity/fitTemperatureLaw.js";
export type { TemperatureLaw, TemperatureLawFit } from "./viscosity/fitTemperatureLaw.js";
export { fiveConstantViscosity } from "./viscosity/fiveConstants.js";
export { fractionForViscosity } from "./viscosity/fractionForViscosity.js";
export type { FractionAnswer, FractionQuestion, FractionRoot } from "./viscosity/fractionForViscosity.js";
export { glycerolWaterViscosity } from "./viscosity/glycerolWater.js";
export { grunbergNissan } from "./viscosity/grunbergNissan.js";
export type { GrunbergNissanMixture, MixingBasis, PairInteraction } from "./viscosity/grunbergNissan.js";
export { interactionAtTemperature, isdaleTemperatureLaw } from "./viscosity/interactionTemperature.js";
export type { MeasuredInteraction } from "./viscosity/interactionTemperature.js";
export { isdaleInteraction } from "./viscosity/isdaleInteraction.js";
export type { IsdaleEstimate, IsdaleGroup, IsdaleMolecule } from "./viscosity/isdaleInteraction.js";
export { kendallMonroe } from "./viscosity/kendallMonroe.js";
export { prepareBlend } from "./viscosity/prepareBlend.js";
export type { PreparedBlend } from "./viscosity/prepareBlend.js";
export { redlichKisterViscosity } from "./viscosity/redlichKister.js";
export type { BinaryBlend, BinaryInteraction } from "./viscosity/redlichKister.js";
export { shearThinning } from "./viscosity/shearThinning.js";
export type { ShearReadings, ShearThinning } from "./viscosity/shearThinning.js";
export { temperatureForViscosity } from "./viscosity/temperatureForViscosity.js";
export type { TemperatureAnswer, TemperatureQuestion } from "./viscosity/temperatureForViscosity.js";
export { vogelViscosity } from "./viscosity/vogel.js";
export type { VogelParameters } from "./viscosity/vogel.js";
export { waterViscosity } from "./viscosity/water.js";
