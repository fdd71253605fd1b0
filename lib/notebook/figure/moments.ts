// Curves that change with time, shown one moment at a time: a slider chooses the moment, print shows the one chosen.

import { checkNumber, checkWhole, InputError, refuseUnknownKeys } from "../../door.js";
import { numberText } from "../digits.js";
import type { FigureContent, TableContent } from "../content.js";
import { checkAxis, plotAxis, type Axis } from "./axis.js";
import { lineFigure, type Series } from "./line.js";
import { describeLines } from "./lineWords.js";
import type { Mark } from "./marks.js";
import { thinned } from "./thinned.js";
import { captionOf, checkCaption, quantityText, sentence } from "./words.js";

/** The curves at one moment; `at` rises from moment to moment. */
export interface Moment {
  readonly at: number;
  readonly series: readonly Series[];
}

/** What a figure of moments shows. `conditions` says formulation and conditions and stands under the figure. */
export interface MomentsFigure {
  readonly caption: string;
  readonly conditions: string;
  readonly x: Axis;
  readonly y: Axis;
  /** What is chosen by the slider, such as a time with its unit. */
  readonly by: { readonly label: string; readonly unit?: string };
  /** 2 to 40, all with series of the same names in the same order. */
  readonly moments: readonly Moment[];
  /** Index of the moment that is shown first; the last unless given. */
  readonly shown?: number;
  readonly marks?: readonly Mark[];
}

/**
 * Builds a figure of curves over a slider: axes stay, curves move.
 *
 * The slider is a plain control of the page, for mouse, finger and keyboard; without scripts, and in print, one moment stands. The
 * table behind the figure holds at most nine of the moments at at most thirteen places each; its caption says so.
 * @throws InputError when there are fewer than 2 or more than 40 moments, when they do not rise, when their series differ in name
 *   or order, and as {@link lineFigure}.
 * @example
 * ```ts
 * import { momentsFigure } from "resinwright/notebook";
 * const curve = (y: number[]) => [{ name: "conversion", x: [0, 25, 50], y }];
 * const figure = momentsFigure({
 *   caption: "Conversion from the window up",
 *   conditions: "Invented resin",
 *   x: { label: "distance from the window", unit: "µm" },
 *   y: { label: "conversion" },
 *   by: { label: "light", unit: "s" },
 *   moments: [{ at: 1, series: curve([0, 0.1, 0.05]) }, { at: 2, series: curve([0, 0.3, 0.2]) }],
 * });
 * figure.moments?.steps.map(({ name }) => name); // → ["light 1 s", "light 2 s"]
 * ```
 */
export function momentsFigure(figure: MomentsFigure): FigureContent {
  checkMoments(figure);
  const { moments, by, caption, conditions } = figure;
  const shown = figure.shown ?? moments.length - 1;
  const every = moments.flatMap(({ series }) => series);
  const x = plotAxis(
    figure.x,
    every.flatMap((one) => one.x),
  );
  const y = plotAxis(
    figure.y,
    every.flatMap((one) => [...one.y, ...(one.low ?? []), ...(one.high ?? [])]),
  );
  const common = {
    caption,
    conditions,
    x: { ...figure.x, range: x.range },
    y: { ...figure.y, range: y.range },
    ...(figure.marks && { marks: figure.marks }),
  };
  const drawn = moments.map(({ series }) => lineFigure({ ...common, series }));
  const told = [...new Set([0, shown, moments.length - 1])].sort((a, b) => a - b);
  return {
    ...drawn[shown]!,
    caption: captionOf({ caption, conditions }),
    alternativeText: [
      `Curves at ${moments.length} moments, ${nameOf(moments[0]!, by)} to ${nameOf(moments.at(-1)!, by)}.`,
      ...told.map(
        (i) =>
          `At ${nameOf(moments[i]!, by)}: ${describeLines({ ...common, series: moments[i]!.series }, { x, y })}`,
      ),
    ].join(" "),
    table: tableOfMoments(figure),
    moments: {
      label: `${by.label}, ${moments.length} moments`,
      shown,
      steps: moments.map((moment, i) => ({ name: nameOf(moment, by), data: drawn[i]!.data })),
    },
  };
}

const mostMoments = 40;

function nameOf({ at }: Moment, { label, unit }: MomentsFigure["by"]): string {
  return `${label} ${quantityText(Number(at.toPrecision(3)), unit)}`;
}

function tableOfMoments({ caption, x, y, by, moments }: MomentsFigure): TableContent {
  const kept = thinned(moments, 9);
  const names = moments[0]!.series.map(({ name }) => name);
  const number = (name: string, unit?: string) => ({ name, unit, align: "right" }) as const;
  const shorter =
    kept.length < moments.length ? `${kept.length} of ${moments.length} moments` : "All moments";
  return {
    kind: "table",
    caption: `${sentence(caption)} ${shorter}, at up to 13 places each.`,
    columns: [
      number(by.label, by.unit),
      number(x.label, x.unit),
      ...names.map((name) => number(names.length === 1 ? y.label : name, y.unit)),
    ],
    rows: kept.flatMap(({ at, series }) => {
      const places = thinned([...series[0]!.x.keys()], 13);
      return places.map((i) => [
        numberText(at, 3),
        series[0]!.x[i]!,
        ...series.map((one) => one.y[i] ?? null),
      ]);
    }),
  };
}

function checkMoments(figure: MomentsFigure): void {
  const where = checkCaption("momentsFigure", figure);
  const { moments, shown, x, y } = figure;
  refuseUnknownKeys(where, figure, figureKeys);
  checkAxis(`${where}: x axis`, x);
  checkAxis(`${where}: y axis`, y);
  if (!Array.isArray(moments) || moments.length < 2 || moments.length > mostMoments) {
    const given = Array.isArray(moments) ? moments.length : "no list";
    throw new InputError(
      `${where}: moments holds ${given}; give 2 to ${mostMoments}, for more make the page heavy`,
    );
  }
  const names = (moment: Moment) => moment.series.map(({ name }) => name).join(", ");
  (moments as readonly Moment[]).forEach((moment, i) => {
    checkNumber(moment.at, { where: `${where}: moments[${i}]`, field: "at" });
    const before = moments[i - 1] as Moment | undefined;
    if (before === undefined) return;
    if (moment.at <= before.at)
      throw new InputError(
        `${where}: moments[${i}].at is ${moment.at} after ${before.at}; each must be above the one before`,
      );
    if (names(moment) !== names(before))
      throw new InputError(
        `${where}: moments[${i}] shows ${names(moment)} and the one before ${names(before)}; all must show the same curves`,
      );
  });
  if (shown === undefined) return;
  checkWhole(shown, { where, field: "shown", min: 0, max: moments.length - 1 });
}

const figureKeys = ["caption", "conditions", "x", "y", "by", "moments", "shown", "marks"];
