// The door for programs that run in Node: reads briefs, formulations and shelves from disc, and keeps the lab record.

export { readFormulation, readShelf, openBrief, readNumberFile, type Workbench } from "./recipe/files.js";
export { readSafetyRules } from "./lab/hazards/files.js";
export { dataHashOf } from "./lab/dataHash.js";
export { openBatch, type ReturnedBatch } from "./lab/batch/files.js";
export * from "./lab/record.js";
