import { describe, expect, it } from "vitest";
import { z } from "zod";
import { parseJson, quantity, readDocument, strict } from "../../lib/recipe/document.js";

const schema = strict({
  name: z.string(),
  kind: z.enum(["diluent", "oligomer"]),
  viscosity_mPas: quantity("viscosity_mPas", { above: 0 }),
  list: z.array(z.number()).optional(),
});
const read = (text: string) => readDocument(schema, parseJson(text, "a.json"));

describe("parseJson", () => {
  it("names file, line and column of what is not JSON", () => {
    expect(() => read('{\n  "name": "x",\n  "kind": }')).toThrow(
      /^a\.json, line 3, column 11: this is not valid JSON: /,
    );
  });

  it("knows a decimal comma and curly quotation marks", () => {
    expect(() => read('{\n "name": "x",\n "list": 18,4 }')).toThrow(
      "a.json, line 3, column 13: this is not valid JSON: 18,4 has a decimal comma; write 18.4",
    );
    expect(() => read("{ “name”: 1 }")).toThrow(
      'a.json, line 1, column 3: this is not valid JSON: “ is a curly quotation mark; write the straight one, "',
    );
    // A list of two numbers, and nothing that follows it, is a comma in its place.
    expect(() => read('{ "list": [18,4], "name": }')).toThrow(/not valid JSON: Unexpected/);
  });

  it("refuses a key given twice, which JSON readers drop silently", () => {
    expect(() => read('{\n "name": "x",\n "name": "y"\n}')).toThrow(
      'a.json, line 3: "name" is given twice; keep one of them',
    );
  });

  it("refuses comments and trailing commas", () => {
    expect(() => read("// note\n{}")).toThrow("a.json, line 1, column 1: this is not valid JSON");
    expect(() => read('{"name": "x",}')).toThrow("this is not valid JSON");
  });
});

describe("readDocument", () => {
  it("reads what fits the schema", () => {
    const text = '{"name": "x", "kind": "diluent", "viscosity_mPas": "10 cP"}';
    expect(read(text)).toEqual({ name: "x", kind: "diluent", viscosity_mPas: 10 });
  });

  it.each([
    ['"viscosity_mPas": 0', "a.json, line 4: viscosity_mPas is 0; it must be above 0"],
    [
      '"viscosity_mPas": "10 um"',
      'a.json, line 4: viscosity_mPas is "10 um"; it must be a quantity that converts to mPa s',
    ],
    ['"viscosity_mPas": 5, "list": [1, "b"]', 'a.json, line 4: list[1] is "b"; it must be a number'],
    [
      '"viscosity_mPas": 5, "viscosty": 1',
      'a.json, line 4: the file has an unknown field "viscosty"; did you mean "viscosity_mPas"?',
    ],
    [
      '"viscosity_mPas": 5, "colour": 1',
      'the file has an unknown field "colour"; known: name, kind, viscosity_mPas, list',
    ],
  ])("refuses %s with line and field", (line, message) => {
    expect(() => read(`{\n "name": "x",\n "kind": "diluent",\n ${line}\n}`)).toThrow(message);
  });

  it("says what is missing and suggests the nearest word", () => {
    const text = '{\n "kind": "diluant",\n "viscosity_mPas": 1\n}';
    expect(() => read(text)).toThrow("a.json, line 1: name is missing; it must be a string");
    expect(() => read(text)).toThrow(
      'a.json, line 2: kind is "diluant"; it must be one of "diluent", "oligomer"; did you mean "diluent"?',
    );
  });
});
