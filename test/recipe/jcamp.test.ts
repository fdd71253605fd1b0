import { readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { readJcamp } from "../../lib/recipe/jcamp.js";

const reference = (name: string): string =>
  readFileSync(new URL(`../reference/jcamp/${name}`, import.meta.url), "utf8");
const read = (text: string) => readJcamp({ text, where: "film.jdx" });

/** A whole file around data lines; a record set to undefined is left out. */
function fileOf(data: string, change: Readonly<Record<string, string | undefined>> = {}): string {
  const records: Record<string, string | undefined> = {
    TITLE: "film",
    "JCAMP-DX": "4.24",
    "DATA TYPE": "UV/VIS SPECTRUM",
    XUNITS: "NANOMETERS",
    YUNITS: "ABSORBANCE",
    FIRSTX: "400",
    LASTX: "409",
    NPOINTS: "10",
    XFACTOR: "1",
    YFACTOR: "1",
    ...change,
  };
  const form = change.XYPOINTS === undefined ? "##XYDATA= (X++(Y..Y))\n" : "";
  const head = Object.entries(records).flatMap(([label, value]) =>
    value === undefined || label === "XYPOINTS" ? [] : [`##${label}= ${value}\n`],
  );
  const points = change.XYPOINTS === undefined ? "" : `##XYPOINTS= ${change.XYPOINTS}\n`;
  return `${head.join("")}${form}${points}${data}\n##END=\n`;
}

describe("the number forms", () => {
  // Table VII of McDonald, Wilks, Appl. Spectrosc. 42 (1988) 151 (as quoted in the tests of several open decoders): one line of
  // ordinates in every form. The X before it is ours.
  it.each([
    ["AFFN", "400 1  2  3  3  2  1  0 -1 -2 -3"],
    ["PAC", "400 1+2+3+3+2+1+0-1-2-3"],
    ["SQZ", "400 1BCCBA@abc"],
    ["SQZ after X", "400ABCCBA@abc"],
    ["DIF", "400 1JJ%jjjjjj"],
    ["DIF with DUP", "400 1JT%jX"],
    ["SQZ with DUP", "400 1BCTBA@abc"],
  ])("%s", (_, line) => {
    expect(read(fileOf(line)).values).toEqual([1, 2, 3, 3, 2, 1, 0, -1, -2, -3]);
  });

  it("reads the standard's example of 53 ordinates alike in plain and in compressed form", () => {
    const ordinates = [
      ...[0, 0, 0, 0, 2, 4, 4, 4, 7, 5, 4, 4, 5, 5, 7, 10, 11, 11, 6, 5, 7, 6, 9, 9, 7],
      ...[10, 10, 9, 10, 11, 12, 15, 16, 16, 14, 17, 38, 38, 35, 38, 42, 47, 54],
      ...[59, 66, 75, 78, 88, 96, 104, 110, 121, 128],
    ];
    for (const name of ["table-vi-affn.jdx", "table-vi-difdup.jdx"]) {
      const { values, wavelengths_nm, title, quantity } = read(reference(name));
      expect([...values].reverse().map((A) => Math.round(1000 * A))).toEqual(ordinates);
      expect(title).toBe("coding example of the standard");
      expect(quantity).toBe("absorbance");
      // 1/cm to nm turns the order round.
      expect(wavelengths_nm[0]).toBeCloseTo(1e7 / 700.158, 6);
      expect(wavelengths_nm.at(-1)).toBeCloseTo(1e7 / 599.86, 6);
    }
  });

  it("takes E for an exponent only before a sign and two or three digits, and for a 5 otherwise", () => {
    const short = { NPOINTS: "3", LASTX: "402" };
    expect(read(fileOf("400 1.5E+02 -2.0E-01 3", short)).values).toEqual([150, -0.2, 3]);
    expect(read(fileOf("400 E3e@", short)).values).toEqual([53, -5, 0]);
  });

  it("survives a trip through an encoder of differences written for this test", () => {
    const digits = (n: number, alphabet: string): string => {
      const text = String(Math.abs(n));
      return alphabet[Number(text[0]) + (n < 0 ? 9 : 0)]! + text.slice(1);
    };
    const encode = (ys: readonly number[], perLine: number): string => {
      const lines: string[] = [];
      for (let i = 0; i < ys.length - 1; i += perLine) {
        const part = ys.slice(i, i + perLine + 1);
        const jumps = part.slice(1).map((y, k) => digits(y - part[k]!, "%JKLMNOPQRjklmnopqr"));
        lines.push(`${400 + i}${digits(part[0]!, "@ABCDEFGHIabcdefghi")}${jumps.join("")}`);
      }
      return [...lines, `${400 + ys.length - 1}${digits(ys.at(-1)!, "@ABCDEFGHIabcdefghi")}`].join("\n");
    };
    const ordinates = fc.array(fc.integer({ min: -9999, max: 9999 }), { minLength: 2, maxLength: 60 });
    fc.assert(
      fc.property(ordinates, fc.integer({ min: 1, max: 9 }), (ys, perLine) => {
        const ends = { NPOINTS: String(ys.length), LASTX: String(400 + ys.length - 1) };
        expect(read(fileOf(encode(ys, perLine), ends)).values).toEqual(ys.map((y) => y + 0));
      }),
    );
  });
});

describe("axes and units", () => {
  it("applies both factors, and turns a falling axis round", () => {
    const text = fileOf("8180 100 200 300", {
      XFACTOR: "0.05",
      YFACTOR: "0.002",
      FIRSTX: "409",
      LASTX: "407",
      DELTAX: "-1",
      FIRSTY: "0.2",
      NPOINTS: "3",
    });
    const { wavelengths_nm, values } = read(text);
    expect(wavelengths_nm).toEqual([407, 408, 409]);
    expect(values).toEqual([0.6, 0.4, 0.2]);
  });

  it("turns micrometres into nm and transmittance into absorbance", () => {
    const ends = { NPOINTS: "2", FIRSTX: "0.4", LASTX: "0.5" };
    const { wavelengths_nm, values } = read(
      fileOf("0.4 0.1 0.01", { ...ends, XUNITS: "MICROMETERS", YUNITS: "TRANSMITTANCE" }),
    );
    expect(wavelengths_nm).toEqual([400, 500]);
    expect(values[0]).toBeCloseTo(1, 12);
    expect(values[1]).toBeCloseTo(2, 12);
  });

  it("reads points of any spacing in pairs", () => {
    const change = { XYPOINTS: "(XY..XY)", NPOINTS: "4", FIRSTX: "400", LASTX: "420", FIRSTY: "0.5" };
    const { wavelengths_nm, values } = read(fileOf("400,0.5; 401,0.6\n410 0.7, 420 0.8", change));
    expect(wavelengths_nm).toEqual([400, 401, 410, 420]);
    expect(values).toEqual([0.5, 0.6, 0.7, 0.8]);
  });

  it("passes over comments and the makers' own records, and knows labels however they are written", () => {
    const text = fileOf("400 1 2 3 $$ first\n403 4 5 6\n406 7 8 9 10", {
      $MAKER: "x",
      "first y": "1",
      DELTAX: "1",
    });
    expect(read(text.replace("##XUNITS", "##X_Units")).values).toHaveLength(10);
  });
});

describe("damaged files", () => {
  const line = "400 1JJ%jjjjjj\n409C";
  const good = fileOf("400 1JJ%jjj\n406@jjj\n409c");

  it("starts from a good one", () => {
    expect(read(good).values).toHaveLength(10);
  });

  it.each([
    [
      "a damaged difference",
      good.replace("400 1JJ%jjj", "400 1JJ%kjj"),
      "film.jdx, line 13: begins with Y 0; it must repeat the last Y before it, -1: a difference was damaged",
    ],
    [
      "a damaged check at the end",
      good.replace("409c", "409d"),
      "film.jdx, line 14: begins with Y -4; it must repeat the last Y before it, -3: a difference was damaged",
    ],
    [
      "a lost line",
      good.replace("406@jjj\n", ""),
      "film.jdx, line 13: begins at X 409; point 7 of 10 must lie at 406: a line is missing, or FIRSTX, LASTX or NPOINTS is wrong",
    ],
    [
      "lines exchanged",
      fileOf("400 1 2 3\n406 7 8 9 10\n403 4 5 6"),
      "film.jdx, line 13: begins at X 406; point 4 of 10 must lie at 403: a line is missing, or FIRSTX, LASTX or NPOINTS is wrong",
    ],
    [
      "a lost ordinate at the end",
      fileOf("400 1 2 3\n403 4 5 6\n406 7 8 9"),
      "film.jdx, line 14: ends the data after 9 points; NPOINTS says 10: the file was damaged or cut",
    ],
    [
      "a wrong NPOINTS",
      fileOf(line.replace("409C", "409c"), { NPOINTS: "11", LASTX: "410" }),
      "film.jdx, line 13: ends the data after 10 points; NPOINTS says 11: the file was damaged or cut",
    ],
    [
      "a wrong LASTX",
      fileOf("400 1 2 3 4 5\n405 6 7 8 9 10", { LASTX: "419" }),
      "film.jdx, line 13: begins at X 405; point 6 of 10 must lie at 410.555556: a line is missing, or FIRSTX, LASTX or NPOINTS is wrong",
    ],
    [
      "a LASTX that DELTAX contradicts",
      fileOf("400 1 2 3 4 5 6 7 8 9 10", { LASTX: "419", DELTAX: "1.00" }),
      "film.jdx, line 11: gives ##DELTAX= 1; FIRSTX, LASTX and NPOINTS make it 2.11111111",
    ],
    [
      "a wrong FIRSTX",
      fileOf("400 1 2 3 4 5 6 7 8 9 10", { FIRSTX: "390", LASTX: "399" }),
      "film.jdx, line 12: begins at X 400; point 1 of 10 must lie at 390: a line is missing, or FIRSTX, LASTX or NPOINTS is wrong",
    ],
    [
      "a wrong FIRSTY",
      fileOf("400 1 2 3 4 5 6 7 8 9 10", { FIRSTY: "3" }),
      "film.jdx, line 11: gives ##FIRSTY= 3; the first ordinate is 1",
    ],
    [
      "no end",
      good.replace("##END=\n", ""),
      "film.jdx, line 14: is the last, without ##END=; the file was cut off",
    ],
    [
      "no title",
      good.replace("##TITLE= film\n", ""),
      "film.jdx, line 1: begins with ##JCAMP-DX=; the first record must be ##TITLE=",
    ],
    [
      "another kind of file",
      "nm,A\n400,1\n",
      "film.jdx, line 1: stands before ##TITLE=; this is not a JCAMP-DX file",
    ],
    ["two blocks", good + good, "film.jdx, line 16: stands after ##END=; give one spectrum a file"],
    [
      "a block within a block",
      good.replace("##XUNITS", "##TITLE= inner\n##XUNITS"),
      "film.jdx, line 4: begins a second block; give one spectrum a file",
    ],
    [
      "a record twice",
      good.replace("##NPOINTS= 10", "##NPOINTS= 10\n##N POINTS= 12"),
      "film.jdx, line 9: repeats ##N POINTS=, given in line 8; keep one",
    ],
    [
      "no version",
      good.replace("##JCAMP-DX= 4.24\n", ""),
      "film.jdx, line 14: is reached without ##JCAMPDX=; the record must be there",
    ],
    [
      "a missing record",
      good.replace("##NPOINTS= 10\n", ""),
      "film.jdx, line 14: is reached without ##NPOINTS=; the record must be there",
    ],
    [
      "no number",
      good.replace("##FIRSTX= 400", "##FIRSTX= 4OO"),
      "film.jdx, line 6: gives ##FIRSTX= 4OO, which is not a number",
    ],
    [
      "a factor of 0",
      good.replace("##YFACTOR= 1", "##YFACTOR= 0"),
      "film.jdx, line 10: gives ##YFACTOR= 0; a factor must differ from 0",
    ],
    [
      "half a point",
      good.replace("##NPOINTS= 10", "##NPOINTS= 9.5"),
      "film.jdx, line 8: gives ##NPOINTS= 9.5; it must be a whole number of at least 2",
    ],
    [
      "other X units",
      good.replace("NANOMETERS", "SECONDS"),
      "film.jdx, line 4: gives ##XUNITS= SECONDS; it must be one of 1/CM, NANOMETERS, MICROMETERS",
    ],
    [
      "other Y units",
      good.replace("ABSORBANCE", "ARBITRARY UNITS"),
      "film.jdx, line 5: gives ##YUNITS= ARBITRARY UNITS; it must be one of ABSORBANCE, TRANSMITTANCE",
    ],
    [
      "another form",
      good.replace("(X++(Y..Y))", "(XY..XY)"),
      "film.jdx, line 11: gives ##XYDATA= (XY..XY); the form read here is (X++(Y..Y))",
    ],
    [
      "a missing ordinate",
      fileOf("400 1 2 ? 4 5 6 7 8 9 10"),
      'film.jdx, line 12: holds "?", which no number form of JCAMP-DX uses; missing ordinates cannot be read',
    ],
    [
      "a line that begins with a difference",
      fileOf("400JJ"),
      "film.jdx, line 12: begins with a difference; the first ordinate of a line must be a value",
    ],
    [
      "a line that begins with repeats",
      fileOf("400T"),
      "film.jdx, line 12: begins with a count of repeats; there is nothing to repeat",
    ],
    [
      "a line without X",
      fileOf("ABC"),
      'film.jdx, line 12: begins with "A"; a line must begin with its X as a plain number',
    ],
    [
      "a line without ordinates",
      fileOf("400"),
      "film.jdx, line 12: holds no ordinate; a line gives X and at least one Y",
    ],
    [
      "ends that are equal",
      fileOf("400 1 2", { NPOINTS: "2", LASTX: "400" }),
      "film.jdx, line 7: gives LASTX equal to FIRSTX; the points must spread",
    ],
    [
      "no light left",
      fileOf("400 0.5 0", { NPOINTS: "2", LASTX: "401", YUNITS: "TRANSMITTANCE" }),
      "film.jdx, line 12: Y is 0; it must be above 0, for nothing can be said about light that is not there; leave it out or measure a thinner film",
    ],
    [
      "a wavenumber of 0",
      fileOf("0 1 2", { NPOINTS: "2", FIRSTX: "0", LASTX: "1", XUNITS: "1/CM" }),
      "film.jdx, line 12: X is 0; a wavelength or wavenumber must be above 0",
    ],
  ])("with %s", (_, text, message) => {
    let given = "";
    try {
      read(text);
    } catch (error) {
      given = (error as Error).message;
    }
    expect(given).toBe(message);
  });

  const pairs = { XYPOINTS: "(XY..XY)", NPOINTS: "2", FIRSTX: "400", LASTX: "410" };
  it.each([
    ["400,1; 410,2; 411", pairs, "film.jdx, line 12: holds 5 numbers; X and Y must come in pairs"],
    ["400,1; 410,2x", pairs, 'film.jdx, line 12: holds "2x", which is not a number'],
    [
      "400,1; 410,2; 420,3",
      pairs,
      "film.jdx, line 12: ends the data after 3 points; NPOINTS says 2: the file was damaged or cut",
    ],
    ["400,1; 411,2", pairs, "film.jdx, line 7: gives ##LASTX= 410; the data say 411"],
    ["402,1; 410,2", pairs, "film.jdx, line 6: gives ##FIRSTX= 400; the data say 402"],
    [
      "400,1; 405,2; 403,3; 410,4",
      { ...pairs, NPOINTS: "4" },
      "film.jdx: 403 nm follows 405 nm; the wavelengths must all rise or all fall, without repeats",
    ],
  ])("with the pairs %s", (data, change, message) => {
    expect(() => read(fileOf(data, change))).toThrow(message);
  });
});
