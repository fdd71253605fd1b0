import { describe, expect, it } from "vitest";
import { darkPalette, lightPalette } from "../../../lib/notebook/palette.js";
import { dashes, lookOf, neutralColor, seriesColors, symbols } from "../../../lib/notebook/figure/style.js";

/** WCAG 2.2, "relative luminance" (https://www.w3.org/TR/WCAG22/#dfn-relative-luminance). */
function luminance(color: string): number {
  const [r, g, b] = [1, 3, 5].map((start) => {
    const channel = parseInt(color.slice(start, start + 2), 16) / 255;
    return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
}

/** WCAG 2.2, "contrast ratio". */
function contrast(a: string, b: string): number {
  const [dark, light] = [luminance(a), luminance(b)].sort((p, q) => p - q);
  return (light! + 0.05) / (dark! + 0.05);
}

describe("colours", () => {
  it("are measured by the published formula: black on white is 21, #777777 on white just misses 4.5", () => {
    expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 10);
    expect(contrast("#777777", "#ffffff")).toBeCloseTo(4.48, 2);
  });

  const papers = ["#ffffff", "#14171a", lightPalette.paper, darkPalette.paper];
  it.each(papers.flatMap((paper) => seriesColors.map((color) => [color, paper])))(
    "of series: %s has a contrast of at least 3:1 on %s",
    (color, paper) => {
      expect(contrast(color, paper)).toBeGreaterThanOrEqual(3);
    },
  );

  it.each(papers)("of text and axes have a contrast of at least 4:1 on %s", (paper) => {
    expect(contrast(neutralColor, paper)).toBeGreaterThanOrEqual(4);
  });
});

describe("lookOf", () => {
  it("gives each of six series a dash and a marker of its own", () => {
    const looks = dashes.map((_, i) => lookOf(i));
    expect(new Set(looks.map((look) => look.dash)).size).toBe(6);
    expect(new Set(looks.map((look) => look.symbol)).size).toBe(6);
    expect(symbols).toHaveLength(dashes.length);
  });
});
