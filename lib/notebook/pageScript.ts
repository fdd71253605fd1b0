// The code every page runs: it draws the figures, redraws them to fit, lets the keyboard reach what scrolls, and copies tables.
// Kept as text, since it runs in the reader's browser and its hash stands in the page's security policy.

import { copyScript } from "./copyScript.js";
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
  const figures = [...document.querySelectorAll("figure.drawn")].map((figure) => {
    const drawing = JSON.parse(figure.querySelector("script").textContent);
    const { moments } = drawing;
    if (moments !== undefined) drawing.data = moments.steps[moments.shown].data;
    return { figure, plot: figure.querySelector(".plot"), ...drawing };
  });
  const figureLook = ${figureLook};
  let printing = false;

  const draw = ({ plot, data, layout }) => {
    const colors = prefersDark.matches && !printing ? dark : light;
    const width = printing ? ${printWidth_px} : plot.clientWidth;
    const look = figureLook(printing ? { height: ${printHeight_px}, ...layout } : layout, colors);
    Plotly.react(plot, data, { ...look, width, autosize: false }, config);
  };
  const drawAll = () => figures.forEach(draw);
  const followSlider = (drawing) => {
    if (drawing.moments === undefined) return;
    const box = drawing.figure.querySelector(".moments");
    const slider = box.querySelector("input");
    const name = box.querySelector("output");
    // A browser may bring a page back with the slider where it was left.
    slider.value = drawing.moments.shown;
    box.hidden = false;
    slider.addEventListener("input", () => {
      const step = drawing.moments.steps[slider.value];
      drawing.data = step.data;
      name.textContent = step.name;
      slider.setAttribute("aria-valuetext", step.name);
      draw(drawing);
    });
  };
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
  figures.forEach(followSlider);
  fit();
})();
${copyScript}`;
