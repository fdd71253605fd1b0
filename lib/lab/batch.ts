// The batch: weigh it out, say what was really made, save it when it went wrong.
// The door of the topic; one subject a file stands in the folder beside it. Reading weighed batches from disc is in batch/files.ts.
export { minimumWeight, weighingUncertainty, type Balance } from "./batch/balance.js";
export { massFractionUncertainties } from "./batch/uncertainty.js";
export type { Addition } from "./batch/order.js";
export { orderOfAddition } from "./batch/order.js";
export type { MasterBatch, MasterStage } from "./batch/masterBatch.js";
export type { Content } from "./batch/doses.js";
export { weighOut, type Portion, type Prices, type WeighOutSheet } from "./batch/weighOut.js";
export { asMade, type AsMade, type MadePart, type PropertyChange, type Weighing } from "./batch/asMade.js";
export { rescue, type Rescue, type RescueAddition, type SmallerRescue } from "./batch/rescue.js";
export { readWeighedBatch, weighingsOn, type WeighedBatch } from "./batch/weighedBatch.js";
