// The door `resinwright/notebook`: what a notebook shows, and how notebooks are run and rendered without a browser.

export type { Content, FigureContent, Moments, TableColumn, TableContent } from "./content.js";
export type { PanelContent } from "./panel/panel.js";
export type { PlainCase } from "./panel/plainCase.js";
export type { Reading } from "./panel/reading.js";
export type { SummaryContent } from "./summary.js";
export type { AssessmentRow } from "./verdicts.js";
export { showFigure, showMarkdown, showPanel, showSheet, showTable } from "./show.js";

export { lineFigure, type LineFigure, type Series } from "./figure/line.js";
export {
  contourFigure,
  type ContourFigure,
  type GridAxis,
  type GridValues,
  type Region,
} from "./figure/contour.js";
export { momentsFigure, type Moment, type MomentsFigure } from "./figure/moments.js";
export { intervalFigure, type IntervalFigure, type IntervalRow } from "./figure/interval.js";
export { shareFigure, type ShareFigure, type ShareRow } from "./figure/share.js";
export type { Axis, Limits } from "./figure/axis.js";
export type { Band, Mark } from "./figure/marks.js";

export {
  frameOf,
  tableOf,
  tableOfFrame,
  type Column,
  type Frame,
  type FrameColumn,
  type FrameCondition,
  type FrameGroups,
  type TableInput,
} from "./table.js";
export { intervalText, numberText, settingText } from "./digits.js";

export {
  gasText,
  lightText,
  sharePercent,
  targetBand,
  targetRegion,
  targetText,
  windowText,
  withinText,
} from "./phrases.js";
export {
  assessmentTable,
  briefTable,
  figureRows,
  formulationTable,
  hazardTable,
  propertyTable,
  readingTable,
  sourceTable,
  warningTable,
  type FigureRow,
} from "./views.js";
export { valueText, verdictText } from "./verdicts.js";
export {
  beforeAfterFigure,
  blendFigure,
  doubtFigure,
  hardestToCall,
  liftFigure,
  targetFigure,
} from "./plots.js";
export { layerMoments, layerTable, settlingFigure } from "./layers.js";
export { changeFigure, changeTable, deadZoneMap, learntTable, resistanceText } from "./oxygen.js";
export { candidateTable, engineTable, spectraFigure, takenTable } from "./light.js";
export {
  cureDepthFigure,
  exposureTable,
  exposureText,
  layerFactsTable,
  spotTable,
  stackFigure,
  type ExposureDecision,
} from "./exposure.js";
export { warmthText, type WarmthQuestion } from "./viscosity.js";
export { handlingTable, screeningTable } from "./safety.js";
export { recordFrame } from "./recordFrame.js";
export {
  batchChangeTable,
  batchDecision,
  madeTable,
  masterBatchTable,
  weighedTable,
  weighOutTable,
} from "./batch.js";
export { rescueTable, rescueText } from "./batchRescue.js";
export { sheetOf, weighOutPage, type SheetInput } from "./sheet.js";
export type { SheetContent, SheetMasterBatch, SheetPortion } from "./sheet/content.js";
export type { Paper } from "./sheet/style.js";
export { decide, recordBatch } from "./decision.js";

export type { CodeCell, MarkdownCell, Notebook, Output } from "./notebookFile.js";
export type { Origin } from "./page.js";
export { renderIndex, renderNotebook } from "./pages.js";
export type { IndexEntry, Page } from "./render.js";
export { runNotebook, runNotebooks } from "./run.js";
export type { NotebookRun, Progress, RunFailure, RunOptions } from "./run.js";
