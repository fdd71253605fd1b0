// The shipped catalogue: every file readable, every figure sourced and plausible, nothing edited by accident.
// Checksums and reruns guard the files; they prove no figure right.

import { execFileSync } from "node:child_process";
import { mkdtempSync, readdirSync, readFileSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";
import { describe, expect, it } from "vitest";
import { readConstants } from "../../lib/recipe/constants.js";
import { parseJson, type JsonDocument } from "../../lib/recipe/document.js";
import { readFilm, type Film } from "../../lib/recipe/film.js";
import { hasCasCheckDigit, molarMassOfFormula } from "../../lib/recipe/identity.js";
import {
  readIngredient,
  roles,
  type Ingredient,
  type IngredientFigures,
} from "../../lib/recipe/ingredient.js";
import { readSpectrum, type Spectrum } from "../../lib/recipe/spectrum.js";
import type { SourcedValue } from "../../lib/result.js";

const data = fileURLToPath(new URL("../../data/", import.meta.url));

const ingredients = readFolder("ingredients", readIngredient);
const spectra = readFolder("spectra", readSpectrum);
const films = readFolder("films", readFilm);
const constants = readConstants(document("constants/resin.json"));

const liquids = ingredients.filter(({ role }) => role === "diluent" || role === "oligomer");
const absorptions = spectra.filter(({ quantity }) => quantity === "molarAbsorption_Lmolcm");
const engines = spectra.filter(({ quantity }) => quantity === "relativePower");

describe("files", () => {
  it.each(["ingredients", "spectra", "films"])("%s are named by their id in lower case", (folder) => {
    for (const name of jsonFiles(folder)) {
      const { id } = document(`${folder}/${name}`).value as { id: string };
      expect(`${id.toLowerCase()}.json`).toBe(name);
    }
  });

  it("hold as many ingredients of each role as were entered", () => {
    const counts = Object.fromEntries(roles.map((role) => [role, withRole(role).length]));
    expect(counts).toEqual({
      diluent: 27,
      oligomer: 8,
      photoinitiator: 8,
      synergist: 1,
      absorber: 6,
      inhibitor: 4,
      pigment: 1,
      filler: 2,
    });
  });

  // Sums as entered; half a unit of the last stated digit catches any edit of a figure.
  it.each<[keyof IngredientFigures, number, number, number]>([
    ["molarMass_gmol", 57, 16590.807, 5e-4],
    ["density_gcm3", 57, 70.0003, 5e-5],
    ["viscosity_mPas", 35, 2150969.557, 5e-4],
    ["viscosityActivation_K", 35, 121557, 0.5],
    ["refractiveIndex", 43, 65.2788, 5e-5],
    ["homopolymerGlassTransition_C", 34, 2359, 0.5],
    ["radicalsPerPhoton", 6, 5.2, 0.05],
    ["solubility_pct", 5, 40.3, 0.05],
  ])("%s: %i figures with the sum %f", (figure, count, sum, tolerance) => {
    const values = ingredients.flatMap((one) => one[figure]?.value ?? []);
    expect(values).toHaveLength(count);
    expect(Math.abs(total(values) - sum)).toBeLessThan(tolerance);
  });

  it("hold as many hazard statements, films and spectra as were entered", () => {
    expect(ingredients.flatMap(({ hazards }) => hazards ?? [])).toHaveLength(135);
    expect(films.map(({ oxygenPermeability_barrer }) => oxygenPermeability_barrer.value)).toEqual([
      5, 8, 340, 1300, 600, 30,
    ]);
    expect(absorptions.map(({ id }) => id)).toEqual([
      "bapo",
      "bbot",
      "curcumin",
      "quercetin",
      "sudan-i",
      "tpo-l",
      "tpo",
    ]);
    expect(engines.map(({ id }) => id)).toEqual(["led-387", "led-412"]);
  });
});

describe("identity", () => {
  it("every CAS number carries its check digit; a slip is caught", () => {
    const numbers = [...ingredients, ...films].flatMap(({ cas }) => cas ?? []);
    expect(numbers).toHaveLength(62);
    expect(numbers.filter((cas) => !hasCasCheckDigit(cas))).toEqual([]);
    // CAS Registry, "Check Digit Verification": 7732-18-5 is valid, 77332-18-5 is not; 10287-53-3 with a wrong last digit.
    expect(hasCasCheckDigit("7732-18-5")).toBe(true);
    expect(hasCasCheckDigit("77332-18-5")).toBe(false);
    expect(hasCasCheckDigit("10287-53-5")).toBe(false);
  });

  it("no two definite substances share a CAS number", () => {
    const numbers = ingredients.flatMap(({ cas, formula }) =>
      formula === undefined || cas === undefined ? [] : [cas],
    );
    expect(new Set(numbers).size).toBe(numbers.length);
  });

  it("the molar mass of every definite compound follows from its formula", () => {
    const definite = ingredients.filter(({ formula }) => formula !== undefined);
    expect(definite).toHaveLength(51);
    for (const { id, formula, molarMass_gmol } of definite) {
      // 0.02 g/mol: room for the last digit of the abridged atomic weights, far less than one hydrogen.
      expect(Math.abs(molarMass_gmol!.value - molarMassOfFormula(formula!)), id).toBeLessThan(0.02);
    }
  });
});

describe("figures", () => {
  it.each(liquids)("$id has the five figures of a liquid that mixes, all plausible", (one) => {
    expect(one.state).toBe("liquid");
    expect(one.functionality).toBeGreaterThanOrEqual(1);
    expect(one.molarMass_gmol!.value).toBeGreaterThan(80);
    expect(one.density_gcm3!.value).toBeGreaterThan(0.85);
    expect(one.density_gcm3!.value).toBeLessThan(1.2);
    expect(one.viscosity_mPas!.value).toBeGreaterThan(0.4);
    // -d ln(viscosity)/dT = B/T²: thin esters lose 1 % a kelvin near 25 °C, stiff oligomers 11 %.
    const lossPerKelvin = one.viscosityActivation_K!.value / 298.15 ** 2;
    expect(lossPerKelvin).toBeGreaterThan(0.01);
    expect(lossPerKelvin).toBeLessThan(0.11);
  });

  it("oligomer is what is heavier than 450 g/mol or thicker than 1000 mPa s, diluent every other reactive liquid", () => {
    for (const { id, role, molarMass_gmol, viscosity_mPas } of liquids) {
      const heavy = molarMass_gmol!.value > 450 || viscosity_mPas!.value > 1000;
      expect(role, id).toBe(heavy ? "oligomer" : "diluent");
    }
  });

  it("what does not polymerise says so, and everything that can be weighed in has a density", () => {
    for (const one of ingredients) {
      expect(one.density_gcm3, one.id).toBeDefined();
      if (!liquids.includes(one)) expect(one.functionality, one.id).toBe(0);
    }
  });

  it("every photoinitiator with a spectrum has its radicals per photon", () => {
    const seen = withRole("photoinitiator").filter(({ spectrum }) => spectrum !== undefined);
    expect(seen.map(({ id }) => id)).toEqual(["BAPO", "TPO-L", "TPO"]);
    for (const { radicalsPerPhoton } of seen) expect(radicalsPerPhoton!.value).toBeLessThanOrEqual(2);
  });

  it("oxygen solubility and the spread of an unmeasured interaction follow from what their sources state", () => {
    // Gou, Coretsopoulos, Scranton 2004: 0.59 to 2.07 mol/m³ under 21,228 Pa of oxygen; stated to two digits.
    const [low, high] = [0.59 / 21228, 2.07 / 21228];
    expect(constants.oxygenSolubility_molm3Pa.value).toBeCloseTo((low + high) / 2, 6);
    expect(constants.oxygenSolubility_molm3Pa.u).toBeCloseTo((high - low) / Math.sqrt(12), 6);
    // 10 % and 90 % quantiles of a normal distribution lie 1.2816 u from its middle; stated to two digits.
    expect(constants.unmeasuredInteraction.u).toBeCloseTo((1.54 + 1.28) / 2 / 1.2816, 1);
    expect(constants.termination_m3mols.value).toBe(2520 / 2);
  });
});

describe("sources", () => {
  const figures = [...ingredients, ...films, constants].flatMap((owner) => figuresOf(owner));

  it.each(figures)("$title is as doubtful as its status", ({ field, figure }) => {
    const { value, u, source, status } = figure;
    expect(u).toBeGreaterThan(0);
    const read = status === "published" || status === "computed from published data";
    if (read) expect(source).toMatch(nameable);
    else expect(["common practice", "from memory"]).toContain(status);
    expect(source.startsWith(status)).toBe(!read);
    if (status !== "from memory") return;
    if (field === "homopolymerGlassTransition_C") expect(u).toBeGreaterThanOrEqual(10);
    else expect(u / value).toBeGreaterThanOrEqual(closelyKnown.includes(field) ? 0.005 : 0.05);
  });

  it("hazard statements say where they were read", () => {
    for (const { id, hazards } of ingredients) {
      for (const { source, status } of hazards ?? []) {
        expect(["published", "from memory"], id).toContain(status);
        expect(source.startsWith("from memory"), id).toBe(status === "from memory");
      }
    }
  });

  it("an ingredient without hazard statements does not pass for harmless", () => {
    const silent = ingredients.filter(({ hazards }) => hazards === undefined);
    expect(silent).toHaveLength(12);
    for (const { id, note } of silent) expect(note, id).toContain("safety data sheet");
  });

  it("TPO carries its reproductive hazard with the date", () => {
    const tpo = ingredients.find(({ id }) => id === "TPO")!;
    const statement = tpo.hazards!.find(({ code }) => code === "H360")!;
    expect(statement.status).toBe("published");
    expect(statement.source).toContain("(EU) 2024/197");
    expect(tpo.note).toContain("2025-09-01");
  });

  it("no brand or company: names are lower case, and every capital in a text is a known word", () => {
    for (const { id, name } of [...ingredients, ...films]) {
      expect(name.replace(/N-|N,|2H-|bisphenol A|Sudan I/g, ""), id).toMatch(/^[a-z0-9(),\-./% ]+$/);
    }
    const texts = [ingredients, films, spectra, constants].flatMap((owner) => textsOf(owner));
    const capitals = texts.flatMap((text) => text.match(/\p{L}[\p{L}\d-]*/gu) ?? []);
    const unknown = capitals.filter((word) => /\p{Lu}/u.test(word) && !knownWords.has(word));
    expect([...new Set(unknown)]).toEqual([]);
    expect(texts.filter((text) => /[®™]/.test(text))).toEqual([]);
  });
});

describe("spectra", () => {
  it("every one that an ingredient names is there and is an absorption, and none is left over", () => {
    const named = ingredients.flatMap(({ spectrum }) => spectrum ?? []);
    expect(named.sort()).toEqual(absorptions.map(({ id }) => id).sort());
  });

  it.each(absorptions)("$id covers 345 to 440 nm and has a doubt", ({ wavelengths_nm, relativeU }) => {
    expect(wavelengths_nm[0]).toBeLessThanOrEqual(345);
    expect(wavelengths_nm.at(-1)).toBeGreaterThanOrEqual(440);
    expect(relativeU).toBeGreaterThanOrEqual(0.15);
  });

  it.each([
    ["led-387", 386.5],
    ["led-412", 411.8],
  ])("%s peaks at %f nm within its nodes, inside the range of the absorptions", (id, peak_nm) => {
    const { wavelengths_nm, values } = spectrum(id);
    const top = values.indexOf(Math.max(...values));
    // Nodes are 1.6 nm apart.
    expect(Math.abs(wavelengths_nm[top]! - peak_nm)).toBeLessThan(0.9);
    expect(wavelengths_nm[0]).toBeGreaterThanOrEqual(345);
    expect(wavelengths_nm.at(-1)).toBeLessThanOrEqual(440);
  });

  it("running from-films.mjs again gives the shipped files", () => {
    const folder = mkdtempSync(join(tmpdir(), "spectra-"));
    try {
      execFileSync(process.execPath, [join(data, "spectra/from-films.mjs"), folder]);
      const made = readdirSync(folder).sort();
      expect(made).toEqual(jsonFiles("spectra").filter((name) => name !== "tpo-l.json"));
      for (const name of made) {
        const again: unknown = JSON.parse(readFileSync(join(folder, name), "utf8"));
        expect(again).toEqual(document(`spectra/${name}`).value);
      }
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  // The same open films (Gong et al., RSC Adv. 5 (2015) 106621) read off by hand before this program existed; ±30 % is the
  // doubt of their path, so this catches a wrong base, unit, mass fraction or column, not a wrong path.
  it.each([
    ["bapo", 365, 940, 940],
    ["bapo", 385, 830, 830],
    ["bapo", 395, 690, 690],
    ["bapo", 405, 560, 560],
    ["bapo", 430, 110, 110],
    ["bbot", 365, 43000, 43000],
    ["bbot", 385, 34000, 34000],
    ["bbot", 405, 13000, 18000],
  ])("%s at %i nm lies near %i to %i L/(mol cm)", (id, wavelength_nm, low, high) => {
    const value = valueAt(spectrum(id), wavelength_nm);
    expect(value).toBeGreaterThan(0.7 * low);
    expect(value).toBeLessThan(1.3 * high);
  });

  // PhotochemCAD open spectra database, literature anchors named in each file; values at whole nanometres are copied as they are.
  it.each([
    ["sudan-i", 405, 9092],
    ["curcumin", 425, 55000],
    ["quercetin", 385, 16850],
  ])("%s at %i nm is the database's %i L/(mol cm)", (id, wavelength_nm, expected) => {
    // Four digits are kept.
    expect(valueAt(spectrum(id), wavelength_nm) / expected).toBeCloseTo(1, 3);
  });

  it("the resin's own absorption follows from the film without initiator and absorber", () => {
    const absorbances = readFileSync(join(data, "spectra/raw/film-absorbance-tpo-bbot.csv"), "utf8")
      .split("\n")
      .map((line) => line.split(",").map(Number))
      .filter(([nm]) => Math.abs(nm! - 405) <= 1.25)
      .map(([, absorbance]) => absorbance! - 0.0116);
    const napierian_percm = (Math.LN10 * total(absorbances)) / absorbances.length / 63.5e-4;
    // Stated to two digits.
    expect(constants.backgroundAbsorption_percm.value).toBeCloseTo(napierian_percm, 2);
    expect(constants.backgroundAbsorption_percm.u).toBeGreaterThanOrEqual(napierian_percm);
  });
});

const closelyKnown = ["molarMass_gmol", "density_gcm3", "refractiveIndex"];
const nameable = /\b(19|20)\d\d\b|Handbook|J\. [A-Z]|HomoPolymer/;

const knownWords = new Set(
  [
    "About Absorbs Alpha Amorphous Below Beware Bleaches Consider Corrosive Density Do Exposure Fluoresces From",
    "Highly It Its Keep Known Lets Made May Melts Needs No Radicals Serious Skin Suspected The Toxic Treat Usually Works",
    "Alentiev Anseth Bartlett Bowman Burton Chang Chen Chignell Coretsopoulos Decker Dendukuri Einstein Jenkins Iersel Kruif Russel Vrij Ferracane G P Kolibaba Nordin Gong Gou Iida Ingold Jasim Mansour",
    "Mark Merkel Peppas Perry Pinnau Prahl Prohaska Robb Scranton Sideridou Toy Traylor Al",
    "A Acta Addit Adv Am Appl Bull CRC Chem Chemical Chemistry Data Dent Eng Engineers Front Handbook Int J Macromolecules Manuf Mater",
    "Physics Polym Polymer Pure R RSC Sci Soc Table Thermochim Thermophys C5RA23855B PMC9555746 PhotochemCAD HomoPolymer",
    "Annex C Carc Court Delegated EC EU General H319 H334 H335 H360Fd IARC ICSC L MIT Regulation VI",
    "B BAPO BBOT C2 C3 D H-benzotriazol-2-yl HMPP I K N N-dimethylacrylamide N-vinyl-2-pyrrolidone Pa Sudan T TMPTA TPO",
    "TPO-L X dT mL mPa",
  ].flatMap((line) => line.split(" ")),
);

function document(path: string): JsonDocument {
  return parseJson(readFileSync(join(data, path), "utf8"), path);
}

function jsonFiles(folder: string): string[] {
  return readdirSync(join(data, folder))
    .filter((name) => name.endsWith(".json"))
    .sort();
}

function readFolder<T extends Ingredient | Spectrum | Film>(
  folder: string,
  read: (from: JsonDocument) => T,
): T[] {
  return jsonFiles(folder).map((name) => read(document(`${folder}/${name}`)));
}

function withRole(role: Ingredient["role"]): Ingredient[] {
  return ingredients.filter((one) => one.role === role);
}

function spectrum(id: string): Spectrum {
  return spectra.find((one) => one.id === id)!;
}

function valueAt({ wavelengths_nm, values }: Spectrum, wavelength_nm: number): number {
  return values[wavelengths_nm.indexOf(wavelength_nm)]!;
}

function total(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0);
}

function figuresOf(owner: object): { title: string; field: string; figure: SourcedValue }[] {
  const name = "id" in owner ? String(owner.id) : "resin";
  return Object.entries(owner).flatMap(([field, figure]: [string, unknown]) =>
    isFigure(figure) ? [{ title: `${field} of ${name}`, field, figure }] : [],
  );
}

function isFigure(value: unknown): value is SourcedValue {
  return typeof value === "object" && value !== null && "value" in value && "status" in value;
}

const writtenByPeople = ["name", "note", "title", "medium", "source"];

function textsOf(owner: unknown): string[] {
  if (typeof owner !== "object" || owner === null) return [];
  return Object.entries(owner).flatMap(([key, value]: [string, unknown]) =>
    typeof value === "string" && writtenByPeople.includes(key) ? [value] : textsOf(value),
  );
}
