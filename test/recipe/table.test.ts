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

  it("takes tabs and semicolons between columns, and then decimal commas", () => {
    const numbers = { x: [0.5, 1], viscosity_mPas: [10, 20.5] };
    expect(read("x;viscosity_mPas\n0,5;10\n1;20,5\n")).toEqual(numbers);
    expect(read("x\tviscosity_mPas\n0.5\t10\n1\t20.5\n")).toEqual(numbers);
  });

  it.each([
    [
      "x;viscosity_mPas\n0,5;10\n1;20.5\n",
      "r.csv, row 3: a decimal point, and decimal commas elsewhere; use one kind in the whole file, and no thousands separators",
    ],
    ["x;viscosity_mPas\n1;2,3,4\n", 'row 2, column viscosity_mPas: "2.3,4" is not a number'],
    ["", "r.csv: the table is empty; its first line names the columns"],
    ["x\n1", "r.csv, row 1: column viscosity_mPas is missing; the columns are x, viscosity_mPas"],
    ["x,viscosity\n1,2", 'r.csv, row 1: unknown column "viscosity"; did you mean "viscosity_mPas"?'],
    [
      "# c\nx,viscosity_mPas\n1,2\n0,5,10",
      "r.csv, row 4: 3 entries under 2 columns; numbers with a decimal comma need semicolons between the columns",
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
