import { readdirSync, readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";
import { hazardCodeProblem, isStatement } from "../../lib/recipe/hazardCodes.js";

describe("hazardCodeProblem", () => {
  it.each(["H317", "H360", "H360FD", "H360Fd", "H361f", "H350i", "EUH208", "EUH201A", "H420"])(
    "knows %s",
    (code) => {
      expect(hazardCodeProblem(code)).toBeUndefined();
    },
  );

  it.each([
    ["h317", 'is "h317"; it must be the code of a hazard statement of GHS or CLP; did you mean "H317"?'],
    ["H 360-FD", 'did you mean "H360FD"?'],
    [
      "H999",
      'is "H999"; it must be the code of a hazard statement of GHS or CLP, such as H317, as the safety data sheet writes it, one code an entry',
    ],
    ["H36", 'is "H36"; it must be the code'],
    ["H360X", 'is "H360X"; it must be the code'],
    ["H300+H310", "one code an entry"],
    ["", 'is ""; it must be the code'],
  ])("refuses %j", (code, message) => {
    expect(hazardCodeProblem(code)).toContain(message);
  });

  it("knows every statement of the shipped ingredients and rules", () => {
    for (const folder of ["data/ingredients", "data/rules"]) {
      for (const name of readdirSync(folder)) {
        for (const [, code] of readFileSync(`${folder}/${name}`, "utf8").matchAll(/"(E?U?H\d\w*)"/g))
          expect(hazardCodeProblem(code!), `${name}: ${code}`).toBeUndefined();
      }
    }
  });
});

describe("isStatement", () => {
  it.each([
    ["H360FD", "H360", true],
    ["H360FD", "H360F", true],
    ["H360FD", "H360D", true],
    ["H360", "H360D", true],
    ["H360Df", "H360F", false],
    ["H361f", "H360", false],
    ["H317", "H31", false],
    ["EUH208", "EUH208", true],
  ])("says of %s, asked for %s: %s", (stated, asked, answer) => {
    expect(isStatement(stated, asked)).toBe(answer);
  });
});
