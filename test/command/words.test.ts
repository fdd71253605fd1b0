import { describe, expect, it } from "vitest";
import type { Act } from "../../lib/command/act.js";
import { quantityOf } from "../../lib/command/quantity.js";
import { readWords } from "../../lib/command/words.js";

const act: Act = {
  name: "record weigh",
  summary: "for tests",
  operand: { name: "FILE", needed: true },
  options: {
    size: { value: '"M UNIT"', needed: true, about: "a mass" },
    shelf: { value: "FOLDER", many: true, about: "a folder" },
    note: { value: "TEXT", about: "a text" },
    json: { about: "a switch" },
  },
  notes: [],
  example: "",
  load: () => Promise.reject(new Error("not here")),
};
const read = (...words: string[]) => readWords(act, words);

describe("readWords", () => {
  it("reads the operand, options in any place, and switches", () => {
    const given = read("--shelf", "a", "file.json", "--size=500 g", "--shelf=b", "--json");
    expect(given).toMatchObject({
      operand: "file.json",
      text: { size: "500 g" },
      texts: { shelf: ["a", "b"] },
    });
    expect([given.isOn("json"), given.isOn("note")]).toEqual([true, false]);
  });

  it("takes what follows two hyphens as it is, and values that begin with a hyphen after an equals sign", () => {
    expect(read("--size=-5 g", "--", "--file.json")).toMatchObject({
      operand: "--file.json",
      text: { size: "-5 g" },
    });
  });

  const see = "; see resinwright record weigh --help";
  it.each([
    [
      ["f", "--size", "1 g", "--sise", "2 g"],
      'record weigh: unknown option "--sise"; did you mean "--size"?',
    ],
    [["f", "-q"], 'record weigh: unknown option "-q"; known: --size, --shelf, --note, --json, --help'],
    [["f", "--size", "1 g", "--size", "2 g"], `record weigh: --size is given twice; give it once${see}`],
    [["f"], `record weigh: --size is missing; give --size "M UNIT"${see}`],
    [["--size", "1 g"], `record weigh: FILE is missing; name one${see}`],
    [
      ["f", "g", "--size", "1 g"],
      `record weigh: "g" is one word too many; quote what belongs together${see}`,
    ],
    [
      ["f", "--size"],
      `record weigh: --size needs a value: --size "M UNIT", or --size="M UNIT" where it begins with a hyphen${see}`,
    ],
    [
      ["f", "--note", "--json", "--size=1 g"],
      `record weigh: --note needs a value: --note TEXT, or --note=TEXT where it begins with a hyphen${see}`,
    ],
    [["f", "--json=yes"], `record weigh: --json takes no value${see}`],
  ])("refuses %j", (words, message) => {
    expect(() => read(...words)).toThrow(expect.objectContaining({ name: "InputError", message }));
  });

  it("refuses an operand where none is taken", () => {
    expect(() => readWords({ ...act, operand: undefined }, ["f", "--size", "1 g"])).toThrow(
      'record weigh: "f" is one word too many',
    );
  });
});

describe("quantityOf", () => {
  const size = (given: string) =>
    quantityOf({ act: "batch", option: "size", field: "mass_g", given, min: 0, above: true });

  it("reads any unit that converts", () => {
    expect([size("0.5 kg"), size("800 mg"), size("500 g")]).toEqual([500, 0.8, 500]);
  });

  it.each([
    ["500", 'batch: --size is "500" without a unit; write for instance "500 g"'],
    ["5 °C", 'batch: --size is "5 °C"; it must be a quantity that converts to g'],
    ["0 g", "batch: --size is 0; it must be a finite number above 0"],
    ["much", 'batch: --size is "much", which cannot be read as a quantity; write for instance "1 g"'],
  ])("refuses %s", (given, message) => {
    expect(() => size(given)).toThrow(expect.objectContaining({ name: "InputError", message }));
  });
});
