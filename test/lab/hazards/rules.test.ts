import { describe, expect, it } from "vitest";
import {
  readHandlingNotes,
  readMixtureRules,
  readPolymerisationHeats,
  readRegulatoryNotes,
} from "../../../lib/lab/hazards.js";
import { readSafetyRules } from "../../../lib/lab/hazards/files.js";
import { parseJson } from "../../../lib/recipe/document.js";
import { readShelf } from "../../../lib/recipe/files.js";
import { hasCasCheckDigit } from "../../../lib/recipe/identity.js";

const document = (value: unknown) => parseJson(JSON.stringify(value), "x.json");
const dated = { source: "chosen for a test", date: "2026", status: "common practice" };
const rule = {
  ...{ id: "r", title: "a rule", statement: "H317", how: "single", weights: { H317: 1 }, limit_pct: 1 },
  ...dated,
};

describe("readMixtureRules", () => {
  it.each<[string, object[], string]>([
    ["an unknown field", [{ ...rule, limit: 1 }], 'x.json, line 1: rules[0] has an unknown field "limit"'],
    [
      "a letter after a code",
      [{ ...rule, weights: { H360FD: 1 } }],
      "must be a hazard statement code such as H317",
    ],
    [
      "a limit of nothing",
      [{ ...rule, limit_pct: 0 }],
      "x.json, line 1: rules[0].limit_pct is 0; it must be above 0",
    ],
    [
      "a weight of nothing",
      [{ ...rule, weights: { H317: 0 } }],
      "rules[0].weights.H317 is 0; it must be above 0",
    ],
    [
      "a date that is none",
      [{ ...rule, date: "last year" }],
      "x.json, line 1: rules[0].date must be a year or a day such as 2025-09-01",
    ],
    ["no source", [{ ...rule, source: undefined }], "rules[0].source is missing; it must be a string"],
    ["two of one id", [rule, rule], 'x.json: rule "r" is given twice; rename one'],
    [
      "an unless that is no rule",
      [{ ...rule, unless: ["s"] }],
      'x.json: rule "r" has unless "s", which is no rule of this file',
    ],
    [
      "a whenUnclassified that is no yes",
      [{ ...rule, whenUnclassified: false }],
      "rules[0].whenUnclassified is false; it must be",
    ],
  ])("refuses %s", (_, rules, message) => {
    expect(() => readMixtureRules(document({ rules }))).toThrow(message);
  });
});

describe("the other rule files", () => {
  it("are refused with file, line and field", () => {
    const note = { cas: "119-61-9", substance: "benzophenone", region: "EU", fact: "A fact.", ...dated };
    expect(() => readRegulatoryNotes(document({ notes: [{ ...note, status: "sure" }] }))).toThrow(
      'x.json, line 1: notes[0].status is "sure"; it must be one of "published"',
    );
    const handling = { id: "h", kind: "storage", text: "Keep cool.", ...dated };
    expect(() =>
      readHandlingNotes(document({ notes: [{ ...handling, when: { roles: ["monomer"] } }] })),
    ).toThrow('notes[0].when.roles[0] is "monomer"; it must be one of "diluent"');
    const figure = { value: 1.8, u: 0.2, source: "chosen for a test", status: "invented for the demo" };
    expect(() =>
      readPolymerisationHeats(
        document({
          heatCapacity_JgK: { ...figure, value: 0 },
          classes: [],
          otherHeatOfPolymerisation_Jmol: figure,
        }),
      ),
    ).toThrow("x.json, line 1: heatCapacity_JgK.value is 0; it must be above 0");
  });

  it("are named where the folder does not hold them", () => {
    expect(() => readSafetyRules("nowhere")).toThrow(
      "nowhere/mixture-limits.json: cannot be read (ENOENT); check the path of the rules folder",
    );
  });
});

describe("the shipped rules", () => {
  const { limits, regulatory, handling, heats } = readSafetyRules("data/rules");
  const shelf = readShelf(["data"]);
  const ingredients = [...shelf.ingredients.values()];

  it("are as many as were entered", () => {
    expect([limits.length, regulatory.length, handling.length]).toEqual([41, 13, 17]);
  });

  it("judge every statement of the shipped ingredients but flammability, which is measured", () => {
    const judged = new Set(limits.flatMap(({ weights }) => Object.keys(weights)));
    const codes = ingredients.flatMap(({ hazards }) => (hazards ?? []).map(({ code }) => code.slice(0, 4)));
    expect([...new Set(codes)].filter((code) => !judged.has(code)).sort()).toEqual(["H225", "H226"]);
  });

  it("speak of substances on the shelf, each with a right check digit", () => {
    for (const { cas } of regulatory) {
      expect(hasCasCheckDigit(cas)).toBe(true);
      expect(ingredients.some((one) => one.cas === cas)).toBe(true);
    }
  });

  it("know the kind of double bond of every shipped acrylate and methacrylate, by its name", () => {
    const classOf = (id: string) => heats.classes.find(({ ingredients }) => ingredients.includes(id))?.title;
    for (const { id, name, functionality } of ingredients.filter((one) => (one.functionality ?? 0) > 0)) {
      const kind = /methacrylate/.test(name)
        ? "methacrylates"
        : /acrylate/.test(name)
          ? "acrylates"
          : undefined;
      expect([id, functionality, classOf(id)]).toEqual([id, functionality, kind]);
    }
    const listed = heats.classes.flatMap((one) => one.ingredients);
    expect(listed.filter((id) => !shelf.ingredients.has(id))).toEqual([]);
  });
});
