// Measured engines and films as the models see them: open data published with Gong, Beauchamp, Perry, Woolley, Nordin, RSC Adv.
// 5 (2015) 106621, doi 10.1039/C5RA23855B (files in test/reference/light), nodes 355 to 430 nm, baselines (690-800 nm) taken off.
import { interpolateSpectrum, lightEngine } from "../../../lib/models/light.js";
import { readTable } from "../../reference/readTable.js";

const engines = readTable("light/projector-led-spectra.csv");
const brightener = readTable("light/film-absorbance-tpo-bbot.csv");
const dye = readTable("light/film-absorbance-bapo-sudan1.csv");

export const films = {
  "TPO and BBOT": { nm: brightener.nm!, A: brightener.PI_and_absorber!.map((a) => a - 0.0075) },
  "BAPO 1 %": { nm: dye.nm!, A: dye.BAPO1pct!.map((a) => a - 0.0045) },
  "BAPO 1 %, Sudan I 0.2 %": { nm: dye.nm!, A: dye["BAPO1pct_SudanI0.2pct"]!.map((a) => a - -0.0293) },
};

/** Films are taken as 100 um thick: the table compares whole films, so that their true thickness does not matter. */
export const filmThickness_um = 100;

/** The engine and the film's Napierian absorption at its nodes; `peak` is the place of the strongest node. */
export function filmUnder(film: keyof typeof films, name: "L387" | "L412") {
  const nodes = engines
    .nm!.map((nm, k) => ({ nm, S: engines[name]![k]! }))
    .filter(({ nm }) => nm >= 355 && nm <= 430);
  const { nm: nodes_nm, A: values } = films[film];
  const absorbances = nodes.map(({ nm }) =>
    interpolateSpectrum({ nodes_nm, values, wavelength_nm: nm, where: film }),
  );
  const spectrum = nodes.map(({ S }) => S);
  return {
    engine: lightEngine({ wavelengths_nm: nodes.map(({ nm }) => nm), spectrum }),
    napierianAbsorptions_percm: absorbances.map((A) => (Math.LN10 * A) / (filmThickness_um / 1e4)),
    absorbances,
    peak: spectrum.indexOf(Math.max(...spectrum)),
  };
}
