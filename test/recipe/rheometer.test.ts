import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { fitBlend, grunbergNissan } from "../../lib/models/viscosity.js";
import { compareEndPoints } from "../../lib/recipe/endPoints.js";
import type { Ingredient } from "../../lib/recipe/ingredient.js";
import { readRheometerTable } from "../../lib/recipe/rheometer.js";
import { shelf, sure } from "../fixtures.js";

const read = (text: string) => readRheometerTable({ text, where: "r.csv" });
const reasons = (text: string) => read(text).rejected.map(({ row, reason }) => `${row}: ${reason}`);
const refusal = (text: string): string => {
  try {
    read(text);
  } catch (error) {
    return (error as Error).message;
  }
  return "not refused";
};
const HEADER = "THICK (mass %),THIN (mass %),temperature (°C),viscosity (mPa s)";
const withRows = (...rows: string[]) => [HEADER, ...rows].join("\n");
const GOOD = "50,50,25,300";
const THIN = "0,100,25,10";

describe("readRheometerTable", () => {
  it("reads liquids and conditions from columns in any order, and counts rows as the file does", () => {
    const text =
      "\uFEFF# lot 3, read on Monday\r\n\r\nRepeat,viscosity (mPa s),THIN (mass fraction),Shear  Rate (1/s), temperature (°C),THICK (mass %)\r\n" +
      "1,10,1,20,25,0\r\n  # again\r\n,,,,,\r\n2,1.5e3,0.4,,25.5,60\r\n";
    expect(read(text)).toEqual({
      liquids: ["THIN", "THICK"],
      readings: [
        { row: 4, fractions: [1, 0], temperature_C: 25, viscosity_mPas: 10, shearRate_pers: 20, repeat: 1 },
        { row: 7, fractions: [0.4, 0.6], temperature_C: 25.5, viscosity_mPas: 1500, repeat: 2 },
      ],
      rejected: [],
    });
    expect(read(text).readings[1]).not.toHaveProperty("shearRate_pers");
  });

  it("reads any line ends, and a byte-order mark before a quoted name", () => {
    const text = `"THICK (mass %)"${withRows(GOOD, THIN).slice("THICK (mass %)".length)}`;
    const plain = read(text);
    expect(plain.readings).toHaveLength(2);
    for (const end of ["\r\n", "\r"]) expect(read(text.replaceAll("\n", end))).toEqual(plain);
    expect(read(`\uFEFF${text}`)).toEqual(plain);
  });

  it("takes names with brackets and, quoted or under another separator, with commas", () => {
    const rest = "temperature (°C)Sviscosity (mPa s)\n100S25S9";
    const liquids = (name: string, separator: string) =>
      read(`${name}${separator}${rest.replaceAll("S", separator)}`).liquids;
    expect(liquids("poly(propylene glycol) diacrylate (mass %)", ",")).toEqual([
      "poly(propylene glycol) diacrylate",
    ]);
    expect(liquids('"1,6-hexanediol diacrylate (mass %)"', ",")).toEqual(["1,6-hexanediol diacrylate"]);
    expect(liquids("1,6-hexanediol diacrylate (mass %)", ";")).toEqual(["1,6-hexanediol diacrylate"]);
    expect(liquids("lot; opened (mass %)", "\t")).toEqual(["lot; opened"]);
  });

  const table = [
    [0.7, 0.3, 25, 1234.5, 20],
    [0.333, 0.667, 24.05, 87.5, 0.5],
    [0, 1, 40, 6.25, 100],
  ] as const;
  const written = (
    header: string,
    row: (cells: readonly [number, number, number, number, number]) => readonly (number | string)[],
    { separator = ",", comma = false } = {},
  ) => {
    const lines = table.map((cells) =>
      row(cells)
        .map((cell) => (comma ? String(cell).replace(".", ",") : String(cell)))
        .join(separator),
    );
    return [header.split("|").join(separator), ...lines].join("\n");
  };
  const si = "A (mass fraction)|B (mass fraction)|temperature (°C)|viscosity (mPa s)|shear rate (1/s)";
  const same = (cells: readonly number[]) => cells;
  const point = read(written(si, same)).readings;
  const kelvin = (t: number) => (t + 273.15).toFixed(2);
  const scaled = (by: number, x: number) => Number((x * by).toPrecision(12));

  it("keeps the numbers as they are written", () => {
    expect(
      point.map(({ fractions, temperature_C, viscosity_mPas, shearRate_pers }) => [
        ...fractions,
        temperature_C,
        viscosity_mPas,
        shearRate_pers,
      ]),
    ).toEqual(table);
  });

  it.each<[string, string]>([
    ["semicolons and decimal commas", written(si, same, { separator: ";", comma: true })],
    ["semicolons and decimal points", written(si, same, { separator: ";" })],
    ["tabs and decimal commas", written(si, same, { separator: "\t", comma: true })],
    [
      "mass percent, cP and K",
      written(
        "A (mass%)|B (mass-%)|temperature (K)|viscosity (cP)|shear rate (s^-1)",
        ([a, b, t, eta, rate]) => [scaled(100, a), scaled(100, b), kelvin(t), eta, rate],
      ),
    ],
    [
      "percent beside fraction, Pa s, °F and 1/min",
      written(
        "A (mass %)|B (Mass Fraction)|temperature (°F)|viscosity (Pa s)|shear rate (1/min)",
        ([a, b, t, eta, rate]) => [
          scaled(100, a),
          b,
          scaled(1, t * 1.8 + 32),
          scaled(1e-3, eta),
          scaled(60, rate),
        ],
      ),
    ],
  ])("reads the same from %s", (_, text) => {
    expect(read(text).readings).toEqual(point);
  });

  it.each(["mPa s", "mPa·s", "mPa.s", "mPas", "mPa*s", "cP"])("reads a viscosity in %s", (unit) => {
    expect(read(withRows(GOOD).replace("mPa s", unit)).readings[0]!.viscosity_mPas).toBe(300);
  });

  it.each(["1/s", "1 / s", "s^-1", "s⁻¹", "Hz"])("reads a shear rate in %s", (unit) => {
    const text = `${HEADER},shear rate (${unit})\n${GOOD},20`;
    expect(read(text).readings[0]!.shearRate_pers).toBe(20);
  });

  it("divides by the sum of fractions that add up to 1 within 0.005, limits included", () => {
    const { readings, rejected } = read(withRows("60,40.5,25,1", "60,39.5,25,1", "60,40.6,25,1"));
    expect(readings.map(({ fractions }) => fractions[0])).toEqual([0.6 / 1.005, 0.6 / 0.995]);
    expect(rejected).toHaveLength(1);
  });

  it("loses no row: each is a reading or is rejected", () => {
    const cell = fc.constantFrom("0", "50", "100", "-1", "", "x", "25.5", "1e999", '"', "300");
    fc.assert(
      fc.property(fc.array(fc.array(cell, { minLength: 3, maxLength: 5 }), { maxLength: 8 }), (rows) => {
        const lines = rows.map((cells) => cells.join(","));
        const { readings, rejected } = read(withRows(...lines, GOOD));
        const places = [...readings, ...rejected].map(({ row }) => row).sort((a, b) => a - b);
        const filled = [...lines, GOOD].flatMap((line, i) => (/^,*$/.test(line) ? [] : [i + 2]));
        expect(places).toEqual(filled);
        for (const { fractions, temperature_C, viscosity_mPas } of readings) {
          expect(fractions[0]! + fractions[1]!).toBeCloseTo(1, 12);
          expect(Number.isFinite(temperature_C) && viscosity_mPas > 0).toBe(true);
        }
      }),
    );
  });
});

describe("readRheometerTable, rows it rejects", () => {
  it.each([
    ["50,50,25,abc", 'column "viscosity (mPa s)": "abc" is not a number with a decimal point'],
    ["50,50,25,1e999", 'column "viscosity (mPa s)": "1e999" is not a number with a decimal point'],
    ["50,50,25,NaN", 'column "viscosity (mPa s)": "NaN" is not a number with a decimal point'],
    ["50,50,25,0x10", 'column "viscosity (mPa s)": "0x10" is not a number with a decimal point'],
    ['"49,5",50,25,9', 'column "THICK (mass %)": "49,5" is not a number with a decimal point'],
    ["50,50,25,0", 'column "viscosity (mPa s)": viscosity_mPas is 0; it must be a finite number above 0'],
    ["50,50,25,-3", 'column "viscosity (mPa s)": viscosity_mPas is -3; it must be a finite number above 0'],
    ["50,50,25,", 'column "viscosity (mPa s)" is empty; write what was measured'],
    ["50,50,,300", 'column "temperature (°C)" is empty; write what was measured'],
    [
      "50,50,-300,300",
      'column "temperature (°C)": temperature_C is -300; it must be a number above -100 and at most 200',
    ],
    [
      "50,50,298.15,300",
      'column "temperature (°C)": temperature_C is 298.15; it must be a number above -100 and at most 200',
    ],
    ["100,,25,300", 'column "THIN (mass %)" is empty; write 0 for a liquid that is not in it'],
    [
      "110,-10,25,300",
      'column "THIN (mass %)": massFraction is -0.1; it must be a finite number of at least 0',
    ],
    [
      "50,49,25,300",
      "the mass fractions add up to 0.99; they must add up to 1 ± 0.005: give every liquid a column, and check percent against fraction",
    ],
    [
      "50,50,25",
      "3 entries under 4 columns; numbers with a decimal comma need semicolons between the columns",
    ],
    [
      "50,50,25,0,3",
      "5 entries under 4 columns; numbers with a decimal comma need semicolons between the columns",
    ],
    ['50,50,25,"300', "Quoted field unterminated"],
  ])("%s", (row, reason) => {
    const { readings, rejected } = read(withRows(GOOD, row, GOOD));
    expect(rejected).toEqual([{ row: 3, reason }]);
    expect(readings.map((one) => one.row)).toEqual([2, 4]);
  });

  it("shear rates and repeats that are there and wrong", () => {
    const header = `${HEADER},shear rate (1/s),repeat`;
    const rows = ["0,1", "-2,1", "fast,1", "20,1.5", "20,-1", "20,first", ",", "20,2"];
    expect(reasons([header, ...rows.map((row) => `${GOOD},${row}`)].join("\n"))).toEqual([
      '2: column "shear rate (1/s)": shearRate_pers is 0; it must be a finite number above 0',
      '3: column "shear rate (1/s)": shearRate_pers is -2; it must be a finite number above 0',
      '4: column "shear rate (1/s)": "fast" is not a number with a decimal point',
      '5: column "repeat": "1.5" is not a whole number',
      '6: column "repeat": repeat is -1; it must be a finite number of at least 0',
      '7: column "repeat": "first" is not a whole number',
    ]);
  });

  it("numbers with a thousands separator, and says which mark the file has", () => {
    const text = withRows(GOOD, "50,50,25,300,5", "50,50,25,1.234,5").replace(/,/g, ";");
    const semicolons = text.replace("300;5", "300,5").replace("1.234;5", "1.234,5");
    expect(reasons(semicolons)).toEqual([
      '4: column "viscosity (mPa s)": "1.234,5" is not a number with a decimal comma',
    ]);
    expect(reasons(withRows(GOOD, "50,50,25").replace(/,/g, ";"))).toEqual(["3: 3 entries under 4 columns"]);
  });
});

describe("readRheometerTable, what it refuses", () => {
  const place = "r.csv, row 1: ";
  const known = "known: temperature, viscosity, shear rate, repeat";
  it.each([
    [
      "",
      'r.csv: the table is empty; its first line names the columns, as in "UDMA (mass %), IBOA (mass %), temperature (°C), viscosity (mPa s)"',
    ],
    [
      HEADER.replace(" (°C)", ""),
      `${place}column "temperature" has no unit; write for instance "temperature (°C)"`,
    ],
    [
      HEADER.replace("(mPa s)", "( )"),
      `${place}column "viscosity ( )" has no unit; write for instance "viscosity (mPa s)"`,
    ],
    [
      `${HEADER},shear rate`,
      `${place}column "shear rate" has no unit; write for instance "shear rate (1/s)"`,
    ],
    [
      HEADER.replace("mPa s", "mm^2/s"),
      `${place}column "viscosity (mm^2/s)" has the unit "mm^2/s", which does not convert to mPa s; write for instance "viscosity (mPa s)"`,
    ],
    [
      HEADER.replace("°C", "C"),
      `${place}column "temperature (C)" has the unit "C", which does not convert to °C; write for instance "temperature (°C)"`,
    ],
    [
      HEADER.replace("mPa s", "thick"),
      `${place}column "viscosity (thick)" has the unit "thick", which does not convert to mPa s; write for instance "viscosity (mPa s)"`,
    ],
    [
      HEADER.replace("viscosity", "viscocity"),
      `${place}unknown column "viscocity (mPa s)"; did you mean "viscosity"? A liquid is written "viscocity (mass %)" or "viscocity (mass fraction)"`,
    ],
    [
      `${HEADER},torque (N m)`,
      `${place}unknown column "torque (N m)"; ${known}. A liquid is written "torque (mass %)" or "torque (mass fraction)"`,
    ],
    [
      HEADER.replace("THIN (mass %)", "THIN (mol %)"),
      `${place}unknown column "THIN (mol %)"; ${known}. A liquid is written "THIN (mass %)" or "THIN (mass fraction)"`,
    ],
    [`${HEADER},`, `${place}column 5 has no name; name it or take it out`],
    [
      `${HEADER},repeat (1/s)`,
      `${place}column "repeat (1/s)" has a unit; a repeat is a number without one: "repeat"`,
    ],
    [
      HEADER.replace("THIN", "THICK"),
      `${place}THICK has two columns, "THICK (mass %)" and "THICK (mass %)"; keep one of them`,
    ],
    [
      `${HEADER},viscosity (cP)`,
      `${place}viscosity has two columns, "viscosity (mPa s)" and "viscosity (cP)"; keep one of them`,
    ],
    [
      "temperature (K),shear rate (1/s)",
      `${place}no column "UDMA (mass %)" and no column "viscosity (mPa s)"; a table has for instance "UDMA (mass %), IBOA (mass %), temperature (°C), viscosity (mPa s)"`,
    ],
    ['"THICK (mass %),THIN', `${place}Quoted field unterminated`],
    [HEADER, "r.csv: no reading can be used out of 0 rows below the header"],
    [
      `# c\n${HEADER}\n50,50,25,0\n50,20,25,9`,
      "r.csv: no reading can be used out of 2 rows below the header\n" +
        'row 3: column "viscosity (mPa s)": viscosity_mPas is 0; it must be a finite number above 0\n' +
        "row 4: the mass fractions add up to 0.7; they must add up to 1 ± 0.005: give every liquid a column, and check percent against fraction",
    ],
  ])("%j", (text, message) => {
    expect(refusal(text)).toBe(message);
  });

  it("decimal points and commas in one file, whichever comes first", () => {
    const mixed = (...rows: string[]) =>
      refusal([HEADER, ...rows].map((line) => line.replace(/,/g, ";").replace(/_/g, ",")).join("\n"));
    const end = "; use one kind in the whole file, and no thousands separators";
    expect(mixed("50,50,25.0,9", GOOD, "50,50,25,1_234")).toBe(
      `r.csv, row 4: a decimal comma, and a decimal point in row 2${end}`,
    );
    expect(mixed("50,50,25_0,9", "50,50,25,1.234")).toBe(
      `r.csv, row 3: a decimal point, and a decimal comma in row 2${end}`,
    );
    expect(mixed("50,50,25_0,9.5")).toBe(
      `r.csv, row 2: a decimal point, and a decimal comma in the same row${end}`,
    );
  });
});

describe("a table that was read", () => {
  it("fits: fitBlend returns the interaction and the neat liquids it was made with", () => {
    const G = -1.3;
    const eta = (x: number) =>
      grunbergNissan({
        fractions: [x, 1 - x],
        viscosities_mPas: [9600, 8.5],
        basis: "mass",
        interactions: [{ first: 0, second: 1, G, basis: "mass" }],
      });
    const rows = [1, 0.8, 0.6, 0.4, 0.2, 0].map(
      (x, i) => `${100 * x};${100 - 100 * x};298,15;${String(eta(x) / 1000).replace(".", ",")};20;${i}`,
    );
    const header = "UDMA (mass %);IBOA (mass %);temperature (K);viscosity (Pa s);shear rate (1/s);repeat\n";
    const { readings } = read(header + rows.join("\n"));
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    // Twelve digits of each viscosity pass the door.
    expect(fit.pairs[0]!.terms[0]).toBeCloseTo(G, 9);
    expect(fit.neatViscosities_mPas[0]!.value / 9600).toBeCloseTo(1, 9);
    expect(fit.neatViscosities_mPas[1]!.value / 8.5).toBeCloseTo(1, 9);
  });
});

describe("compareEndPoints", () => {
  // The test shelf: THICK 10000 and THIN 10 mPa s at 25 °C, u a tenth, B = 3000 ± 300 K.
  const compare = (rows: string[], { relativeU = 0, on = shelf } = {}) =>
    compareEndPoints({ table: read(withRows(...rows)), shelf: on, relativeU });
  const codes = (...args: Parameters<typeof compare>) => compare(...args).map(({ code }) => code);
  const shelfWith = (id: string, change: Partial<Ingredient>) => ({
    ...shelf,
    ingredients: new Map([...shelf.ingredients, [id, { ...shelf.ingredients.get(id)!, ...change }]]),
  });
  const lnU = Math.sqrt(Math.log(1.01));
  const inverseT = 1 / 313.15 - 1 / 298.15;

  it("is silent where the readings are the catalogue's, at any temperature and with no doubt at all", () => {
    const exact = { u: 0, source: "test", status: "invented for the demo" } as const;
    const on = shelfWith("THICK", {
      viscosity_mPas: { ...exact, value: 10000, temperature_C: 25 },
      viscosityActivation_K: { ...exact, value: 3000 },
    });
    const at40 = 10000 * Math.exp(3000 * inverseT);
    expect(compare([`100,0,40,${at40}`, "100,0,25,10000", THIN], { on })).toEqual([]);
    expect(codes([`100,0,40,${at40 * 1.0001}`, THIN], { on })).toEqual(["neat-differs"]);
  });

  it("looks at neat liquids only", () => {
    expect(compare(["100,0,25,10000", "50,50,25,1e9", THIN])).toEqual([]);
  });

  it.each([
    ["the viscosity's doubt", 25, lnU, 0],
    ["the doubt of B at another temperature", 40, Math.hypot(lnU, 300 * inverseT), 0],
    ["the reading's doubt", 25, Math.hypot(lnU, 0.05), 0.05],
  ])("warns beyond three combined standard uncertainties: %s", (_, temperature, u, relativeU) => {
    const expected = Math.log(10000) + 3000 * (1 / (temperature + 273.15) - 1 / 298.15);
    const reading = (times: number) => `100,0,${temperature},${Math.exp(expected + times * u)}`;
    for (const sign of [-1, 1]) {
      expect(codes([reading(sign * 2.99), THIN], { relativeU })).toEqual([]);
      expect(codes([reading(sign * 3.01), THIN], { relativeU })).toEqual(["neat-differs"]);
    }
  });

  it("says what was read, what was expected, and how many more are off", () => {
    expect(compare(["100,0,25,5000", "100,0,25,10000", "100,0,25,2000", THIN])).toEqual([
      {
        code: "neat-differs",
        message:
          "neat THICK reads 2000 mPa s at 25 °C (row 4); the catalogue has 10000 mPa s there within a factor of 1.349 " +
          "(three combined standard uncertainties); readings so far off: 2 of 3; check bottle, unit and temperature, and " +
          "where they hold, enter the reading as a lot's",
      },
    ]);
  });

  it("names two liquids that look swapped, once, whatever their doubts", () => {
    expect(compare(["100,0,25,10", "0,100,25,10000"])).toEqual([
      {
        code: "ends-swapped",
        message:
          "neat THICK reads 10 mPa s at 25 °C (row 2) and neat THIN 10000 mPa s at 25 °C (row 3), each closer to the " +
          "catalogue's figure of the other; check which column and which sample is which",
      },
    ]);
    expect(codes(["100,0,25,20", "0,100,25,3000"])).toEqual(["ends-swapped"]);
    expect(codes(["100,0,25,10", THIN])).toEqual(["neat-differs"]);
    const three = `MID (mass %),${HEADER}\n100,0,0,25,10000\n0,100,0,25,100\n0,0,100,25,10`;
    expect(compareEndPoints({ table: read(three), shelf })[0]!.message).toMatch(/^neat MID .* neat THICK/);
  });

  it("does not call swapped what agrees within its doubt", () => {
    const on = shelfWith("THIN", { viscosity_mPas: { ...sure(9000, 3000), temperature_C: 25 } });
    expect(compare(["100,0,25,9300", "0,100,25,9700"], { on })).toEqual([]);
  });

  it("says what it could not compare", () => {
    const messages = (...args: Parameters<typeof compare>) => {
      const warnings = compare(...args);
      expect(new Set(warnings.map(({ code }) => code))).toEqual(new Set(["not-compared"]));
      return warnings.map(({ message }) => message);
    };
    expect(messages([THIN])).toEqual(["not compared with the catalogue: no reading of neat THICK"]);
    const bare = { viscosity_mPas: undefined };
    expect(messages(["100,0,25,1", THIN], { on: shelfWith("THICK", bare) })).toEqual([
      "not compared with the catalogue: THICK has no viscosity_mPas",
    ]);
    const still = shelfWith("THICK", { viscosityActivation_K: undefined });
    expect(messages(["100,0,30,1", "100,0,25,10000", THIN], { on: still })).toEqual([
      "not compared with the catalogue: THICK has no viscosityActivation_K, and 1 of its 2 neat readings not taken at 25 °C",
    ]);
    const table = read(withRows(THIN).replace("THICK", "THICKK"));
    expect(compareEndPoints({ table, shelf })).toEqual([
      {
        code: "not-compared",
        message: 'not compared with the catalogue: unknown ingredient "THICKK"; did you mean "THICK"?',
      },
    ]);
  });

  it("does not take a liquid it cannot compare for a swapped one", () => {
    const on = shelfWith("THICK", { viscosityActivation_K: undefined });
    expect(codes(["100,0,30,10", "0,100,25,10000"], { on })).toEqual(["neat-differs", "not-compared"]);
  });

  it("refuses a doubt that is none", () => {
    expect(() => compare([THIN], { relativeU: 3 })).toThrow(
      "compareEndPoints: relativeU is 3; it must be a number from 0 to 1",
    );
  });
});
