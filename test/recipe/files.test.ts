import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { openBrief, readFormulation, readNumberFile, readShelf } from "../../lib/recipe/files.js";
import { brief, shelf as rounds } from "../fixtures.js";

let folder: string;
const write = (name: string, content: unknown) => {
  const file = join(folder, name);
  mkdirSync(dirname(file), { recursive: true });
  writeFileSync(file, typeof content === "string" ? content : JSON.stringify(content));
  return file;
};

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "resinwright-"));
  for (const one of rounds.ingredients.values()) write(`base/ingredients/${one.id}.json`, one);
  for (const one of rounds.spectra.values()) write(`base/spectra/${one.id}.json`, one);
  for (const one of rounds.films.values()) write(`base/films/${one.id}.json`, one);
  write("base/constants/resin.json", rounds.constants);
});
afterEach(() => {
  vi.unstubAllEnvs();
  rmSync(folder, { recursive: true });
});

const base = () => readShelf([join(folder, "base")]);

describe("readShelf", () => {
  it("reads what the folders hold", () => {
    const { ingredients, spectra, films } = base();
    expect([...ingredients.keys()].sort()).toEqual(["AB", "KEEP", "MID", "PI", "SAND", "THICK", "THIN"]);
    expect([spectra.size, films.size]).toEqual([3, 1]);
  });

  it("lets one file in a later folder override an ingredient", () => {
    const own = { ...rounds.ingredients.get("THIN")!, name: "our own" };
    write("mine/ingredients/thin.json", own);
    const { ingredients } = readShelf([join(folder, "base"), join(folder, "mine")]);
    expect(ingredients.get("THIN")!.name).toBe("our own");
    expect(ingredients.size).toBe(7);
  });

  it("lets a later interaction of the same pair come first, whichever way round it is named", () => {
    const one = (pair: string[], value: number) => ({
      pair,
      basis: "mass",
      G: { ...rounds.constants.gelConversion, value },
    });
    write("base/interactions/a.json", one(["THIN", "THICK"], 1));
    write("mine/interactions/b.json", one(["THICK", "THIN"], 2));
    const { interactions } = readShelf([join(folder, "base"), join(folder, "mine")]);
    expect(interactions.map(({ G }) => G.value)).toEqual([2]);
  });

  it("tells window readings from blend readings by their kind, and refuses a kind it does not know", () => {
    const window = {
      ...{ kind: "window", id: "w", formulation: "f", wavelength_nm: 405, temperature_C: 25, film: "OPEN" },
      parts: [
        { ingredient: "THIN", mass_pct: 99 },
        { ingredient: "PI", mass_pct: 1 },
      ],
      filmThickness_um: { value: 100, u: 5 },
      inductionTimes: [{ until: "first gel", irradiance_mWcm2: 8, time_s: { value: 1, u: 0.1 } }],
      ...{ source: "a test", status: "measured here" },
    };
    write("base/measurements/w.json", window);
    const { readings, windowReadings } = base();
    expect([readings, windowReadings.map(({ id }) => id)]).toEqual([[], ["w"]]);
    write("base/measurements/w.json", { ...window, kind: "windw" });
    expect(base).toThrow('w.json: unknown kind of measurement "windw"; did you mean "window"?');
  });

  it("refuses two files with one id, a missing folder, missing constants, a wrong check digit", () => {
    write("base/ingredients/again.json", rounds.ingredients.get("THIN"));
    expect(base).toThrow(
      /again\.json: id "THIN" is that of .*THIN\.json too; give one of them another id, or take it out/,
    );
    expect(() => readShelf([join(folder, "none")])).toThrow("none: this shelf folder does not exist");
    write("empty/ingredients/MID.json", rounds.ingredients.get("MID"));
    expect(() => readShelf([join(folder, "empty")])).toThrow("empty: no constants/resin.json");
    write("empty/ingredients/MID.json", { ...rounds.ingredients.get("MID")!, cas: "7732-18-4" });
    expect(() => readShelf([join(folder, "empty")])).toThrow(
      'cas is "7732-18-4", whose check digit is wrong',
    );
  });

  it("refuses a spectrum whose columns differ in length or run backwards", () => {
    const spectrum = { ...rounds.spectra.get("pi")!, values: [1, 2] };
    write("base/spectra/pi.json", spectrum);
    expect(base).toThrow("wavelengths_nm has 3 entries and values has 2; each wavelength needs one value");
    write("base/spectra/pi.json", { ...spectrum, wavelengths_nm: [400, 390] });
    expect(base).toThrow("wavelengths_nm[1] is 390, after 400; wavelengths must increase");
  });
});

describe("names that lead from one file of a shelf to another", () => {
  const ground = { source: "a test", status: "measured here" };
  const parts = [
    { ingredient: "THIN", mass_pct: 99 },
    { ingredient: "PI", mass_pct: 1 },
  ];
  const blend = {
    ...{ id: "b", pair: ["THICK", "THIN"], temperature_C: 25, relativeU: 0.03 },
    ...{ massFractions: [1, 0.6, 0.3, 0], viscosities_mPas: [10000, 600, 80, 10] },
    ...ground,
  };
  const window = {
    ...{
      kind: "window",
      id: "w",
      formulation: "f",
      spectrum: "lamp",
      temperature_C: 25,
      film: "OPEN",
      parts,
    },
    filmThickness_um: { value: 100, u: 5 },
    inductionTimes: [{ until: "first gel", irradiance_mWcm2: 8, time_s: { value: 1, u: 0.1 } }],
    ...ground,
  };
  const depths = {
    ...{ id: "d", kind: "cure depths", formulation: "f", parts, depthU_um: 4 },
    light: { spectrum: "lamp", irradiance_mWcm2: rounds.constants.gelConversion },
    spots: [10, 14, 20, 28, 40].map((exposure_mJcm2, i) => ({ exposure_mJcm2, cureDepth_um: 30 + 34 * i })),
    ...ground,
  };
  const refused = (name: string, content: unknown, message: string | RegExp) => {
    const file = write(`base/${name}`, JSON.stringify(content, null, 1));
    expect(base).toThrow(message);
    rmSync(file);
  };

  it("reads files whose names are all there", () => {
    write("base/measurements/b.json", blend);
    write("base/measurements/w.json", window);
    write("base/measurements/d.json", depths);
    const { readings, windowReadings, cureDepths } = base();
    expect([readings.length, windowReadings.length, cureDepths.length]).toEqual([1, 1, 1]);
  });

  it("refuses one that is not, with file, line, field and the nearest", () => {
    refused(
      "measurements/b.json",
      { ...blend, pair: ["THICK", "THN"] },
      /measurements\/b\.json, line 5: pair\[1\]: unknown ingredient "THN"; did you mean "THIN"\?/,
    );
    refused(
      "measurements/w.json",
      { ...window, parts: [parts[0], { ingredient: "PIX", mass_pct: 1 }], film: "OPN" },
      /w\.json, line 14: parts\[1\]\.ingredient: unknown ingredient "PIX"; did you mean "PI"\?\n.*line \d+: film: unknown film "OPN"; did you mean "OPEN"\?/,
    );
    refused(
      "measurements/d.json",
      { ...depths, light: { ...depths.light, spectrum: "lmp" } },
      'light.spectrum: unknown spectrum "lmp"; did you mean "lamp"?',
    );
    refused(
      "lots/x.json",
      { id: "X-1", ingredient: "THINN", measured: {} },
      'ingredient: unknown ingredient "THINN"',
    );
    const G = { ...rounds.constants.gelConversion, value: 1 };
    refused("interactions/x.json", { pair: ["THIN", "TICK"], basis: "mass", G }, 'did you mean "THICK"?');
  });

  it("refuses what an engine sends out for what an ingredient absorbs, and the other way round", () => {
    refused(
      "ingredients/PI2.json",
      { ...rounds.ingredients.get("PI")!, id: "PI2", spectrum: "lamp" },
      /PI2\.json, line \d+: spectrum is "lamp", which is a spectrum of relativePower; it must be what the ingredient absorbs \(molarAbsorption_Lmolcm\): /,
    );
    refused(
      "measurements/w.json",
      { ...window, spectrum: "pi" },
      'spectrum is "pi", which is a spectrum of molarAbsorption_Lmolcm; it must be what the light engine sends out (relativePower): lamp',
    );
    refused(
      "spectra/dark.json",
      { ...rounds.spectra.get("lamp")!, id: "dark", values: [0, 0, 0] },
      "dark.json: values are 0 at every wavelength; a light engine must send light at some of them",
    );
  });

  it("refuses two measurements of one id in a folder, of whatever kind, and lets a later folder's come first", () => {
    write("base/measurements/b.json", blend);
    refused(
      "measurements/copy.json",
      { ...window, id: "b" },
      /copy\.json: id "b" is that of .*measurements\/b\.json too; give one of them another id, or take it out/,
    );
    write("mine/measurements/b.json", { ...blend, relativeU: 0.01 });
    const { readings } = readShelf([join(folder, "base"), join(folder, "mine")]);
    expect(readings.map(({ relativeU }) => relativeU)).toEqual([0.01]);
  });

  it("refuses a file among the measurements that it would not read, and leaves folders and hidden files alone", () => {
    write("base/measurements/raw/blends.csv", "a,b");
    write("base/measurements/.hidden", "");
    expect(base().readings).toEqual([]);
    write("base/measurements/blends.csv", "a,b");
    expect(base).toThrow(
      /measurements\/blends\.csv: only \.json files are read here, and its readings would be left out; bring them into a \.json file \(data\/README\.md shows the shape\), or keep this one in a folder of its own, such as .*measurements\/raw$/,
    );
  });

  it("names the encoding of a file that is not UTF-8", () => {
    const file = write("base/lots/x.json", "");
    writeFileSync(file, Buffer.from("\uFEFF{}", "utf16le"));
    expect(base).toThrow("x.json: is not text in UTF-8 but in UTF-16; save it as UTF-8");
    writeFileSync(file, Buffer.from('{ "id": "20 °C" }', "latin1"));
    expect(base).toThrow("x.json: is not text in UTF-8; save it as UTF-8 (an editor offers it when saving)");
  });
});

describe("readFormulation", () => {
  const outer = { id: "outer", title: "outer", parts: [{ blend: "inner.json", mass_pct: 100 }] };

  it("reads blends beside the file", () => {
    write("inner.json", { id: "inner", title: "inner", parts: [{ ingredient: "THIN", mass_pct: 100 }] });
    const { components } = readFormulation(write("outer.json", outer), base());
    expect(components.map(({ ingredient }) => ingredient.id)).toEqual(["THIN"]);
  });

  it("names file, line and field of what it cannot use", () => {
    const of = (parts: unknown[]) => () =>
      readFormulation(write("f.json", JSON.stringify({ id: "f", title: "one", parts }, null, 1)), base());
    const thin = { ingredient: "THIN", mass_pct: 98 };
    expect(of([thin])).toThrow(
      /f\.json, line 4: parts: mass_pct adds up to 98; parts must add up to 100 ± 0\.05, or say "normalise": true/,
    );
    expect(of([thin, { ingredient: "PII", mass_pct: 2 }])).toThrow(
      /f\.json, line 10: parts\[1\]\.ingredient: unknown ingredient "PII"; did you mean "PI"\?/,
    );
    expect(of([thin, { ingredient: "PI", lot: "P-1", mass_pct: 2 }])).toThrow(
      /f\.json, line 11: parts\[1\]\.lot: unknown lot "P-1"; none is known here/,
    );
    expect(of([thin, { ...thin, mass_pct: 2 }])).toThrow(
      /f\.json, line 9: parts\[1\]: THIN stands in parts\[0\] and in parts\[1\]; add the two mass_pct up/,
    );
  });

  it("refuses a ring of blends and a file that is not there", () => {
    write("inner.json", { ...outer, parts: [{ blend: "outer.json", mass_pct: 100 }] });
    expect(() => readFormulation(write("outer.json", outer), base())).toThrow(
      "these blends contain each other",
    );
    expect(() => readFormulation(join(folder, "none.json"), base())).toThrow(
      "none.json: cannot be read (ENOENT); check the path",
    );
  });
});

describe("openBrief", () => {
  beforeEach(() => {
    write("base/formulations/f.json", {
      id: "f",
      title: "one",
      parts: [{ ingredient: "THIN", mass_pct: 100 }],
    });
    write("base/briefs/b.json", { ...brief, formulation: "../formulations/f.json" });
  });

  it("opens the brief with its formulation and shelf", () => {
    const opened = openBrief(join(folder, "base/briefs/b.json"));
    expect([opened.brief.id, opened.formulation.id, opened.shelf.films.size]).toEqual(["test", "f", 1]);
  });

  it("takes shelf and formulation by an absolute path, too", () => {
    const absolute = { formulation: join(folder, "base/formulations/f.json"), shelf: [join(folder, "base")] };
    write("elsewhere/b.json", { ...brief, ...absolute });
    expect(openBrief(join(folder, "elsewhere/b.json")).formulation.id).toBe("f");
  });

  it("names file, line and field of a name that is not on the shelf", () => {
    const of = (change: object) => () =>
      openBrief(
        write(
          "base/briefs/b.json",
          JSON.stringify({ ...brief, formulation: "../formulations/f.json", ...change }, null, 1),
        ),
      );
    expect(of({ avoid: [{ ingredient: "thn", reason: "a slip" }] })).toThrow(
      /b\.json, line \d+: avoid\[0\]\.ingredient: unknown ingredient "thn"; did you mean "THIN"\?/,
    );
    expect(of({ window: { ...brief.window, film: "OPN" } })).toThrow(
      /b\.json, line \d+: window\.film: unknown film "OPN"; did you mean "OPEN"\?/,
    );
    expect(of({ light: { ...brief.light, spectrum: "ab" } })).toThrow(
      /b\.json, line \d+: light\.spectrum is "ab", which is a spectrum of molarAbsorption_Lmolcm; it must be what the light engine sends out \(relativePower\): lamp/,
    );
  });

  it("refuses an engine that reaches beyond what is known of an absorption, naming both", () => {
    write("base/formulations/f.json", {
      id: "f",
      title: "one",
      parts: [
        { ingredient: "THIN", mass_pct: 99 },
        { ingredient: "PI", mass_pct: 1 },
      ],
    });
    const opened = () => openBrief(join(folder, "base/briefs/b.json"));
    expect(opened().formulation.id).toBe("f");
    write("base/spectra/lamp.json", { ...rounds.spectra.get("lamp")!, wavelengths_nm: [380, 400, 430] });
    expect(opened).toThrow(
      /b\.json, line 1: light\.spectrum is "lamp", which runs from 380 to 430 nm; the absorption "pi" of PI is known from 380 to 420 nm only/,
    );
    const wavelength_nm = { ...rounds.constants.gelConversion, value: 365, u: 4 };
    const { irradiance_mWcm2 } = brief.light;
    write("base/briefs/b.json", {
      ...brief,
      formulation: "../formulations/f.json",
      light: { wavelength_nm, irradiance_mWcm2 },
    });
    expect(opened).toThrow("light.wavelength_nm is 365 nm; the absorption");
  });

  it("lets the environment name another brief", () => {
    vi.stubEnv("RESINWRIGHT_BRIEF", join(folder, "base/briefs/b.json"));
    expect(openBrief("nowhere.json").brief.id).toBe("test");
  });
});

describe("readNumberFile", () => {
  it("reads a table and names the file in errors", () => {
    const file = write("t.csv", "x\n1\nb\n");
    expect(() => readNumberFile({ file, columns: ["x"] })).toThrow(
      /t\.csv, row 3, column x: "b" is not a number/,
    );
  });
});
