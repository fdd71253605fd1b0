// Computes the spectra of this folder that rest on the measurements in raw/, and writes them as JSON files:
// node data/spectra/from-films.mjs [folder to write to]

import { readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const here = fileURLToPath(new URL(".", import.meta.url));
const openFilms =
  "open film data published with Gong et al., RSC Adv. 5 (2015) 106621, doi 10.1039/C5RA23855B (MIT licence, copyright 2016 G. P. Nordin)";

const path_cm = 63.5e-4;
const density_gL = 1110;
const range_nm = { first: 345, last: 440 };

const bapoFilms = readColumns("film-absorbance-bapo-sudan1.csv");
const tpoFilms = readColumns("film-absorbance-tpo-bbot.csv");
const solutions = readColumns("solution-molar-absorption.csv");
const engines = readColumns("projector-led-spectra.csv");

const bapoFilm = lessBaseline(bapoFilms.BAPO1pct, 0.0045);
const resinFilm = lessBaseline(tpoFilms.no_PI_no_absorber, 0.0116);
const initiatorFilm = lessBaseline(tpoFilms.PI_only, -0.0022);
const completeFilm = lessBaseline(tpoFilms.PI_and_absorber, 0.0075);

const spectra = [
  fromFilm({
    id: "bapo",
    title: "BAPO, from a film with 1 mass % of it",
    medium:
      "poly(ethylene glycol) diacrylate; film path taken as 63.5 um, density as 1110 g/L; averaged onto a 2.5 nm grid",
    relativeU: 0.3,
    source: `${openFilms}; film path uncertain`,
    nodes: bapoFilms.nm,
    absorbance: bapoFilm,
    concentration_molL: concentration({ massFraction: 0.01, molarMass_gmol: 418.473 }),
  }),
  fromFilm({
    id: "tpo",
    title: "TPO, from films with about 0.4 mass % of it and without",
    medium:
      "an acrylate resin; film path taken as 63.5 um, density as 1110 g/L; averaged onto a 2.5 nm grid; above 420 nm negative differences of up to 30 set to 0: the baseline leaves a doubt of that size everywhere",
    relativeU: 0.5,
    source: `${openFilms}; film path and mass % uncertain; from memory, solutions in acetonitrile give 500 to 600 at 380 nm, about twice the value here`,
    nodes: tpoFilms.nm,
    absorbance: difference(initiatorFilm, resinFilm),
    concentration_molL: concentration({ massFraction: 0.004, molarMass_gmol: 348.382 }),
  }),
  fromFilm({
    id: "bbot",
    title: "BBOT, from films with about 0.16 mass % of it and without",
    medium:
      "an acrylate resin with TPO; film path taken as 63.5 um, density as 1110 g/L; averaged onto a 2.5 nm grid; above 430 nm the value is no larger than the doubt of the baseline, about 150",
    relativeU: 0.35,
    source: `${openFilms}; film path and mass % uncertain`,
    nodes: tpoFilms.nm,
    absorbance: difference(completeFilm, initiatorFilm),
    concentration_molL: concentration({ massFraction: 0.0016, molarMass_gmol: 430.566 }),
  }),
  fromSolution({
    id: "sudan-i",
    title: "Sudan I in solution",
    medium: "ethanol",
    relativeU: 0.2,
    source:
      "PhotochemCAD open spectra database, scaled there to 14,500 L/(mol cm) at 481 nm (Iida 1978); others give 17,100 in methanol",
    values: solutions.SudanI_EtOH,
  }),
  fromSolution({
    id: "curcumin",
    title: "curcumin in solution",
    medium: "ethanol",
    relativeU: 0.4,
    source:
      "PhotochemCAD open spectra database, scaled there to 55,000 L/(mol cm) at 425 nm (Jasim 1989); another anchor is 27,500 in ethanol at 430 nm (Chignell 1994)",
    values: solutions.curcumin_EtOH,
  }),
  fromSolution({
    id: "quercetin",
    title: "quercetin in solution",
    medium: "solvent not stated in the source file, probably methanol",
    relativeU: 0.3,
    source: "PhotochemCAD open spectra database, scaled there to 19,500 L/(mol cm) at 372 nm",
    values: solutions.quercetin_M,
  }),
  emission({ id: "led-387", power: engines.L387, peak: "386.5 nm, width at half height 24.5 nm" }),
  emission({ id: "led-412", power: engines.L412, peak: "411.8 nm, width at half height 26.8 nm" }),
];

const folder = process.argv[2] ?? here;
for (const spectrum of spectra) {
  writeFileSync(join(folder, `${spectrum.id}.json`), `${JSON.stringify(spectrum, null, 2)}\n`);
}

/** Beer-Lambert: decadic molar absorption = A / (c l), from the mean absorbance within 1.25 nm of each node. */
function fromFilm({ id, title, medium, relativeU, source, nodes, absorbance, concentration_molL }) {
  const wavelengths_nm = grid(range_nm.first, range_nm.last, 2.5);
  const values = wavelengths_nm.map((wavelength_nm) => {
    const near = absorbance.filter((_, i) => Math.abs(nodes[i] - wavelength_nm) <= 1.25);
    return Math.max(0, rounded(mean(near) / (concentration_molL * path_cm)));
  });
  const quantity = "molarAbsorption_Lmolcm";
  return {
    id,
    quantity,
    title,
    medium,
    relativeU,
    source,
    status: "computed from published data",
    wavelengths_nm,
    values,
  };
}

function fromSolution({ id, title, medium, relativeU, source, values: measured }) {
  const wavelengths_nm = grid(340, 480, 5);
  const values = wavelengths_nm.map((wavelength_nm) =>
    rounded(measured[solutions.nm.indexOf(wavelength_nm)]),
  );
  const quantity = "molarAbsorption_Lmolcm";
  return { id, quantity, title, medium, relativeU, source, status: "published", wavelengths_nm, values };
}

function emission({ id, power, peak }) {
  const inRange = (nm) => nm >= range_nm.first && nm <= range_nm.last;
  const cut_pct = 100 * (1 - integral(power, inRange) / integral(power, () => true));
  const kept = engines.nm.flatMap((nm, i) => (inRange(nm) && i % 2 === 0 ? [i] : []));
  return {
    id,
    quantity: "relativePower",
    title: `projector engine with one light-emitting diode, peak ${peak}; 345 to 440 nm, ${cut_pct.toFixed(1)} % of the power from 340 to 500 nm lies outside and is left out`,
    medium:
      "spectrometer counts, not radiometrically calibrated; every second node of the source, about 1.6 nm apart",
    relativeU: 0,
    source: `taken from ${openFilms.replace("film data", "data")}; the scale is arbitrary, so it has no doubt of its own`,
    status: "published",
    wavelengths_nm: kept.map((i) => engines.nm[i]),
    values: kept.map((i) => power[i]),
  };
}

/** Trapezoid over the nodes that `inRange` lets through. */
function integral(values, inRange) {
  let sum = 0;
  for (let i = 1; i < values.length; i++) {
    const [left, right] = [engines.nm[i - 1], engines.nm[i]];
    if (inRange(left) && inRange(right)) sum += ((right - left) * (values[i - 1] + values[i])) / 2;
  }
  return sum;
}

function concentration({ massFraction, molarMass_gmol }) {
  return (massFraction * density_gL) / molarMass_gmol;
}

function lessBaseline(absorbance, baseline) {
  return absorbance.map((value) => value - baseline);
}

function difference(upper, lower) {
  return upper.map((value, i) => value - lower[i]);
}

function mean(values) {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}

/** Four digits: more than the data are good for, few enough to read. */
function rounded(value) {
  return Number(value.toPrecision(4));
}

function grid(first, last, step) {
  return Array.from({ length: Math.round((last - first) / step) + 1 }, (_, i) => first + i * step);
}

function readColumns(name) {
  const lines = readFileSync(join(here, "raw", name), "utf8")
    .trim()
    .split(/\r?\n/);
  const [header, ...rows] = lines.filter((line) => !line.startsWith("#")).map((line) => line.split(","));
  return Object.fromEntries(header.map((column, i) => [column, rows.map((row) => Number(row[i]))]));
}
