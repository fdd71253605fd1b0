// A panel as a cell hands it over: the case it computes with, and what the models say of it before anything is moved.

import { assess } from "../../assess/assess.js";
import type { Case } from "../../assess/case.js";
import { plainCase, type PlainCase } from "./plainCase.js";
import { readingOf, type Reading } from "./reading.js";

/** A panel as data; the page's script makes its controls and its table of it. */
export interface PanelContent {
  readonly kind: "panel";
  readonly work: PlainCase;
  readonly start: Reading;
}

/**
 * The panel of a case, ready to be shown.
 * @throws InputError as {@link assess}.
 */
export function panelOf(work: Case): PanelContent {
  return { kind: "panel", work: plainCase(work), start: readingOf(assess(work)) };
}
