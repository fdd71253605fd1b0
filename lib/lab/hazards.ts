// Hazards: what the ingredients carry, what a mixture of them may be, how hot it can get, how to keep and handle it.
// The door of the topic; reading the rules from disc is in hazards/files.ts, so that this part runs in a browser.
export {
  readHandlingNotes,
  readMixtureRules,
  readPolymerisationHeats,
  readRegulatoryNotes,
  type HandlingNote,
  type MixtureRule,
  type PolymerisationHeats,
  type RegulatoryNote,
  type SafetyRules,
} from "./hazards/rules.js";
export { flagMixture, type Contributor, type HazardFlag } from "./hazards/flags.js";
export { temperatureRiseOf, type TemperatureRise } from "./hazards/temperatureRise.js";
export { screenHazards, type HazardScreening, type ScreenedIngredient } from "./hazards/screen.js";
