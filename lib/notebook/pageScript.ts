// The only code a page runs of its own: it draws the figures, redraws them to fit, and lets the keyboard reach what scrolls.
// Kept as text, since it runs in the reader's browser and its hash stands in the page's security policy.

import { figureLook } from "./figureLook.js";
import { darkPalette, lightPalette } from "./palette.js";

// A4 less its margins, in CSS pixels.
const printWidth_px = 620;
// Two figures and what belongs to them then fit on a page.
const printHeight_px = 340;

/** The script of every notebook page. */
export const pageScript = `"use strict";
(() => {
  const light = ${JSON.stringify(lightPalette)};
  const dark = ${JSON.stringify(darkPalette)};
  const prefersDark = matchMedia("(prefers-color-scheme: dark)");
  const config = { displayModeBar: false, displaylogo: false, scrollZoom: false, responsive: false };
  const figures = [...document.querySelectorAll("figure.drawn")].map((figure) => ({
    plot: figure.querySelector(".plot"),
    ...JSON.parse(figure.querySelector("script").textContent),
  }));
  const figureLook = ${figureLook};
  let printing = false;

  const draw = ({ plot, data, layout }) => {
    const colors = prefersDark.matches && !printing ? dark : light;
    const width = printing ? ${printWidth_px} : plot.clientWidth;
    const look = figureLook(printing ? { height: ${printHeight_px}, ...layout } : layout, colors);
    Plotly.react(plot, data, { ...look, width, autosize: false }, config);
  };
  const drawAll = () => figures.forEach(draw);
  const reachScrolling = () => {
    for (const box of document.querySelectorAll(".scroll")) {
      if (box.scrollWidth > box.clientWidth || box.scrollHeight > box.clientHeight) box.tabIndex = 0;
      else box.removeAttribute("tabindex");
    }
  };
  const fit = () => {
    drawAll();
    reachScrolling();
  };

  let waiting;
  addEventListener("resize", () => {
    clearTimeout(waiting);
    waiting = setTimeout(fit, 150);
  });
  prefersDark.addEventListener("change", drawAll);
  addEventListener("beforeprint", () => {
    printing = true;
    drawAll();
  });
  addEventListener("afterprint", () => {
    printing = false;
    drawAll();
  });
  document.addEventListener("toggle", reachScrolling, true);
  fit();
})();
`;
