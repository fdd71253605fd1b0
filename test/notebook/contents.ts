// What a notebook may put on its page, at its smallest.

import type { FigureContent, TableContent } from "../../lib/notebook/content.js";
import type { SheetContent } from "../../lib/notebook/sheet/content.js";

export const table: TableContent = {
  kind: "table",
  caption: "Numbers",
  columns: [{ name: "x", align: "right" }],
  rows: [[1]],
};

export const figure: FigureContent = {
  kind: "figure",
  caption: "A line",
  alternativeText: "It rises.",
  data: [{ x: [1, 2], y: [3, 4] }],
  layout: { height: 300 },
  table,
};

export const sheet: SheetContent = {
  kind: "sheet",
  name: "weigh-out",
  title: "Weigh out 500 g",
  label: "a, 500 g",
  facts: [],
  warnings: [],
  protection: [],
  masterBatches: [],
  portions: [],
  hazards: [],
  findings: [],
  storage: [],
  law: [],
  caution: "",
};
