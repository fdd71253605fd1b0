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
    expect([...ingredients.keys()].sort()).toEqual(["AB", "MID", "PI", "SAND", "THICK", "THIN"]);
    expect([spectra.size, films.size]).toEqual([3, 1]);
  });

  it("lets one file in a later folder override an ingredient", () => {
    const own = { ...rounds.ingredients.get("THIN")!, name: "our own" };
    write("mine/ingredients/thin.json", own);
    const { ingredients } = readShelf([join(folder, "base"), join(folder, "mine")]);
    expect(ingredients.get("THIN")!.name).toBe("our own");
    expect(ingredients.size).toBe(6);
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
        { ingredient: "A", mass_pct: 99 },
        { ingredient: "B", mass_pct: 1 },
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
      /again\.json: id "THIN" is used by another file of this folder; rename one of them|THIN\.json: id "THIN"/,
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

describe("readFormulation", () => {
  const outer = { id: "outer", title: "outer", parts: [{ blend: "inner.json", mass_pct: 100 }] };

  it("reads blends beside the file", () => {
    write("inner.json", { id: "inner", title: "inner", parts: [{ ingredient: "THIN", mass_pct: 100 }] });
    const { components } = readFormulation(write("outer.json", outer), base());
    expect(components.map(({ ingredient }) => ingredient.id)).toEqual(["THIN"]);
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
