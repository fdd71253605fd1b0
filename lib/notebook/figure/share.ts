// Shares as bars, the largest on top: which inputs carry the doubt in a result.

import { checkNumber, InputError, refuseUnknownKeys } from "../../door.js";
import { numberText } from "../digits.js";
import type { FigureContent } from "../content.js";
import { plotAxis } from "./axis.js";
import { heightOf, rowAxis, valueAxis } from "./interval.js";
import { layoutOf, seriesColors } from "./style.js";
import { captionOf, checkCaption, counted, plainText, sentence } from "./words.js";

/** One input and its share, 0 to 1. */
export interface ShareRow {
  readonly label: string;
  readonly share: number;
}

/** What a share figure shows. `conditions` says formulation and conditions and stands under the figure. */
export interface ShareFigure {
  readonly caption: string;
  readonly conditions: string;
  /** What the figure shows, in words, for those who cannot see it. Written from the numbers unless given. */
  readonly alternativeText?: string;
  /** In any order; shares need not add up to 1, since inputs that act together are counted with each of them. */
  readonly rows: readonly ShareRow[];
}

/**
 * Builds a bar chart of shares, drawn in percent and sorted, each bar with its number.
 * @throws InputError when there are no rows or a share is not a number from 0 to 1.
 * @example
 * ```ts
 * import { shareFigure } from "resinwright/notebook";
 * const figure = shareFigure({
 *   caption: "What carries the doubt in the viscosity",
 *   conditions: "Invented resin, 25 °C",
 *   rows: [{ label: "temperature", share: 0.2 }, { label: "unmeasured interaction", share: 0.75 }],
 * });
 * figure.table.rows; // → [["unmeasured interaction", 75], ["temperature", 20]]
 * ```
 */
export function shareFigure(figure: ShareFigure): FigureContent {
  checkShareFigure(figure);
  const rows = figure.rows.toSorted((a, b) => b.share - a.share);
  const percents = rows.map(({ share }) => 100 * share);
  const texts = percents.map((percent) => `${numberText(percent, percent < 10 ? 1 : 2)} %`);
  // Room at the right for the number beside the longest bar.
  const axis = plotAxis({ label: "share of the doubt", unit: "%", range: [0, 1.25 * percents[0]! || 1] }, []);
  return {
    kind: "figure",
    caption: captionOf(figure),
    alternativeText: figure.alternativeText ?? describe(rows, texts),
    data: [
      {
        type: "bar",
        orientation: "h",
        x: percents,
        y: rows.map((_, i) => i),
        text: texts.map(plainText),
        textposition: "outside",
        cliponaxis: false,
        marker: { color: seriesColors[0] },
        customdata: rows.map(({ label }) => plainText(label)),
        hovertemplate: "<b>%{customdata}</b><br>share of the doubt: %{x:.4~r} &#37;<extra></extra>",
        width: 0.6,
      },
    ],
    layout: layoutOf({
      x: valueAxis(axis),
      y: rowAxis(rows.map(({ label }) => label)),
      height: heightOf(rows),
      showlegend: false,
    }),
    table: {
      kind: "table",
      caption: sentence(figure.caption),
      columns: [
        { name: "input", align: "left" },
        { name: "share of the doubt", unit: "%", align: "right" },
      ],
      rows: rows.map(({ label }, i) => [label, percents[i]!]),
      rowHeader: true,
    },
  };
}

function describe(rows: readonly ShareRow[], texts: readonly string[]): string {
  const bars = rows.map(({ label }, i) => `${label} ${texts[i]}`);
  return `Bars of ${counted(rows.length, "input")} by share of the doubt, largest first: ${bars.join(", ")}.`;
}

function checkShareFigure(figure: ShareFigure): void {
  const where = checkCaption("shareFigure", figure);
  refuseUnknownKeys(where, figure, ["caption", "conditions", "alternativeText", "rows"]);
  if (figure.rows.length === 0) throw new InputError(`${where}: rows is empty; give at least one row`);
  for (const row of figure.rows) {
    const place = `${where}: row "${row.label}"`;
    refuseUnknownKeys(place, row, ["label", "share"]);
    checkNumber(row.share, { where: place, field: "share", min: 0, max: 1, advice: "write 0.43 for 43 %" });
  }
}
