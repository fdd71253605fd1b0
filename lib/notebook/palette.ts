// The colours of a page, for light and for dark surroundings; print uses the light ones.
// Text colours keep a contrast of at least 4.5:1 on the paper and on the shade behind code; a test computes it.

/** The colours a page is set in, each as `#rrggbb`. */
export interface Palette {
  readonly paper: string;
  readonly shade: string;
  readonly rule: string;
  readonly ink: string;
  readonly muted: string;
  readonly accent: string;
  readonly codeWord: string;
  readonly codeText: string;
  readonly codeNumber: string;
}

export const lightPalette: Palette = {
  paper: "#fdfdfb",
  shade: "#f3f3ef",
  rule: "#d3d6d3",
  ink: "#1d2125",
  muted: "#59626a",
  accent: "#4b3f91",
  codeWord: "#4b3f91",
  codeText: "#23643f",
  codeNumber: "#8a4a0b",
};

export const darkPalette: Palette = {
  paper: "#15181b",
  shade: "#1d2125",
  rule: "#3b4248",
  ink: "#e2e5e7",
  muted: "#a2abb3",
  accent: "#b9aef3",
  codeWord: "#b9aef3",
  codeText: "#8fcba8",
  codeNumber: "#e3b272",
};
