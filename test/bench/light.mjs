// How long a map of cure depth over initiator and absorber takes with the full spectrum of an engine: 200 x 200 resins, each a
// sum over about 120 nodes and a solve for the depth. Build first: npm run build.
import { broadCureDepthMap, lightEngine } from "resinwright";

const side = 200;
const limit_ms = 300;

// Constructed shapes, not a material: an engine around 405 nm, an initiator that falls off, a dye that rises.
const wavelengths_nm = Array.from({ length: 121 }, (_, k) => 375 + k / 2);
const engine = lightEngine({
  wavelengths_nm,
  spectrum: wavelengths_nm.map((nm) => Math.exp(-(((nm - 405) / 8) ** 2))),
});
const initiator = wavelengths_nm.map((nm) => 800 * Math.exp(-(nm - 375) / 30));
const absorber = wavelengths_nm.map((nm) => 9000 + 20 * (nm - 400));
const backgrounds_percm = wavelengths_nm.map(() => 0.5);

const levels = (most, least) =>
  Array.from({ length: side }, (_, k) => least + ((most - least) * k) / (side - 1));
const initiatorLevels_molL = levels(0.05, 0.002);

const map = () =>
  broadCureDepthMap({
    engine,
    initiatorAbsorptions_Lmolcm: initiator,
    absorberAbsorptions_Lmolcm: absorber,
    backgrounds_percm,
    initiatorLevels_molL,
    absorberLevels_molL: levels(0.01, 0),
    criticalExposures_mJcm2: initiatorLevels_molL.map((c) => 0.15 / c),
    exposure_mJcm2: 30,
  });

const times_ms = Array.from({ length: 5 }, () => {
  const start = performance.now();
  const depths = map();
  if (depths.flat().length !== side * side) throw new Error("the map has holes");
  return performance.now() - start;
});
const median_ms = times_ms.sort((a, b) => a - b)[2];
console.log(
  `${median_ms > limit_ms ? "FAIL" : "ok  "} cure-depth map ${side} x ${side}, ${wavelengths_nm.length} nodes: ${median_ms.toFixed(0)} ms (limit ${limit_ms} ms)`,
);
