// The lab record: what was mixed, measured, printed and decided, added to and never changed.
// The door of the topic; one subject a file stands in the folder beside it.
export { appendRecord } from "./record/append.js";
export { exportRecords } from "./record/export.js";
export { listRecords, readRecords, type RecordEntry, type RecordList } from "./record/list.js";
export { libraryVersion } from "./record/version.js";
export { verifyRecords, type RecordCheck } from "./record/verify.js";
export type { RecordProblem } from "./record/folder.js";
export type {
  AmendmentRecord,
  BatchRecord,
  DecisionRecord,
  Figures,
  LabRecord,
  MeasurementRecord,
  NewRecord,
  PrintRecord,
  RecipeRecord,
  Written,
} from "./record/kinds.js";
