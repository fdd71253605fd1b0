import { describe, expect, it } from "vitest";
import { readNumberTable } from "../../lib/recipe/table.js";

const read = (text: string) => readNumberTable({ text, where: "r.csv", columns: ["x", "viscosity_mPas"] });

describe("readNumberTable", () => {
  it("reads columns in any order and passes over comments and blank lines", () => {
    expect(read("# note, with comma\nviscosity_mPas, x\n\n10,0.5\n20,1e0\n")).toEqual({
      x: [0.5, 1],
      viscosity_mPas: [10, 20],
    });
  });

  it.each([
    ["", "r.csv: the table is empty; its first line names the columns"],
    ["x\n1", "r.csv, row 1: column viscosity_mPas is missing; the columns are x, viscosity_mPas"],
    ["x,viscosity\n1,2", 'r.csv, row 1: unknown column "viscosity"; did you mean "viscosity_mPas"?'],
    [
      "# c\nx,viscosity_mPas\n1,2\n0,5,10",
      "r.csv, row 4: 3 entries under 2 columns; a decimal comma needs a point",
    ],
    [
      "x,viscosity_mPas\n1,abc",
      'r.csv, row 2, column viscosity_mPas: "abc" is not a number; write it with a decimal point',
    ],
    ["x,viscosity_mPas\n1,", 'r.csv, row 2, column viscosity_mPas: "" is not a number'],
    ["x,viscosity_mPas\n1,Infinity", '"Infinity" is not a number'],
  ])("refuses %j", (text, message) => {
    expect(() => read(text)).toThrow(message);
  });
});
