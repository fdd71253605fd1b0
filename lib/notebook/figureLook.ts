// How every figure looks, on a rendered page and in a running notebook: one font, one colour for words, grids that recede.
// Kept as text, since it runs in the reader's browser.

/** A JavaScript function of a figure's layout and the colours of its surroundings; returns the layout to draw. */
export const figureLook = `(layout, colors) => {
    const axis = { color: colors.muted, gridcolor: colors.rule, zerolinecolor: colors.rule, automargin: true };
    return {
      ...layout,
      height: layout.height ?? 420,
      paper_bgcolor: "transparent",
      plot_bgcolor: "transparent",
      font: { size: 13, ...layout.font, family: "system-ui, sans-serif", color: colors.ink },
      template: { layout: { xaxis: axis, yaxis: axis, margin: { l: 8, r: 16, t: 16, b: 8 } } },
    };
  }`;
