import { describe, expect, it } from "vitest";
import fc from "fast-check";
import { intervalText, numberText, settingText } from "../../lib/notebook/digits.js";

/** Reads a text such as "−1.2 × 10⁻⁹" back into a number. */
function readBack(text: string): number {
  const plain = text.replace("−", "-");
  const [mantissa, power = ""] = plain.split(" × 10");
  const digits = [...power].map((sign) => (sign === "⁻" ? "-" : String("⁰¹²³⁴⁵⁶⁷⁸⁹".indexOf(sign)))).join("");
  return Number(`${mantissa}e${digits === "" ? 0 : digits}`);
}

describe("numberText", () => {
  it.each([
    [447.3182, 4, "447.3"],
    [450, 4, "450"],
    [0, 4, "0"],
    [-0, 4, "0"],
    [0.0012346, 4, "0.001235"],
    [0.000999951, 4, "0.001"],
    [0.00012346, 4, "1.235 × 10⁻⁴"],
    [999999, 4, "1 × 10⁶"],
    [123456, 4, "123500"],
    [123456, 2, "120000"],
    [1.93e-9, 4, "1.93 × 10⁻⁹"],
    [-6.02214076e23, 4, "−6.022 × 10²³"],
    [-0.05, 2, "−0.05"],
    [99.97, 3, "100"],
    [5e-324, 4, "5 × 10⁻³²⁴"],
    [1.7976931348623157e308, 4, "1.798 × 10³⁰⁸"],
  ])("writes %d to %d digits as %s", (value, digits, text) => {
    expect(numberText(value, digits)).toBe(text);
  });

  it("differs from the number by at most half a unit of the last digit", () => {
    // The size stays clear of both ends of double precision, where reading back itself rounds.
    const number = fc.double({ min: 1e-280, max: 1e280, noNaN: true });
    const signedNumber = fc.tuple(number, fc.constantFrom(-1, 1)).map(([size, sign]) => size * sign);
    fc.assert(
      fc.property(signedNumber, fc.integer({ min: 1, max: 12 }), (value, digits) => {
        const error = Math.abs(readBack(numberText(value, digits)) / value - 1);
        expect(error).toBeLessThanOrEqual(0.5 * 10 ** (1 - digits) * (1 + 1e-3));
      }),
    );
  });

  it("refuses what is not a finite number", () => {
    expect(() => numberText(NaN)).toThrow("numberText: value is NaN; it must be a finite number");
    expect(() => numberText(1, 0)).toThrow("numberText: digits is 0; it must be a number from 1 to 15");
  });
});

describe("settingText", () => {
  it.each([
    ["two digits where the doubt leaves fewer", 27.83, 7.4, 133, "28"],
    ["two digits of a value far below its high end", 0.4512, 0.05, 150, "0.45"],
    ["as many as the doubt leaves", 3.4621, 3.22, 3.71, "3.46"],
    ["tens where the doubt is hundreds", 222.4, 60, 1060, "220"],
    ["three at most", 21.44, 20.58, 22.35, "21.4"],
    ["three without doubt", 3.46213, 3.46213, 3.46213, "3.46"],
  ])("%s", (_, value, low, high, text) => {
    expect(settingText({ value, low, high })).toBe(text);
  });

  it("refuses what is not a finite number", () => {
    expect(() => settingText({ value: NaN, low: 1, high: 2 })).toThrow(
      "numberText: value is NaN; it must be a finite number",
    );
  });
});

describe("intervalText", () => {
  it.each([
    ["the rule", 447.3, 301.2, 612.9, "450 (300 to 610)"],
    ["decimals", 0.14237, 0.1181, 0.1702, "0.142 (0.118 to 0.170)"],
    ["trailing zeros that the width earns", 12, 11.5, 12.5, "12.00 (11.50 to 12.50)"],
    ["a half width that rounds up to three digits", 500, 400.4, 599.6, "500 (400 to 600)"],
    ["zero width", 25, 25, 25, "25 (no spread)"],
    ["zero width at zero", 0, 0, 0, "0 (no spread)"],
    ["negative", -5.21, -8.13, -2.34, "−5.2 (−8.1 to −2.3)"],
    ["both signs", 0.04, -1.96, 2.04, "0.0 (−2.0 to 2.0)"],
    ["no negative zero", -0.04, -3, 3, "0.0 (−3.0 to 3.0)"],
    ["very small", 1.934e-9, 1.71e-9, 2.22e-9, "1.93 (1.71 to 2.22) × 10⁻⁹"],
    ["very large", 2.5e9, 1.1e9, 4.2e9, "2.5 (1.1 to 4.2) × 10⁹"],
    ["far wider than its value", 0.5, 0, 100000, "0.5 (0 to 100000)"],
    ["a value that its width would hide", 100, 3.14, 63000, "100 (3.1 to 63000)"],
    ["one that a shared power would hide", 2.34e9, 1.2e7, 1.82e15, "2.3 × 10⁹ (1.2 × 10⁷ to 1.8 × 10¹⁵)"],
    ["a negative one", -0.5, -100000, 0, "−0.5 (−100000 to 0)"],
    ["far narrower than its value", 1000, 999.9995, 1000.0005, "1000.00000 (999.99950 to 1000.00050)"],
    ["the whole range of doubles", 0, -1.7e308, 1.7e308, "0.0 (−1.7 to 1.7) × 10³⁰⁸"],
    ["the smallest doubles", 5e-324, 0, 1e-323, "5.0 (0.0 to 10.0) × 10⁻³²⁴"],
  ])("writes %s", (_name, value, low, high, text) => {
    expect(intervalText({ value, low, high })).toBe(text);
  });

  it("keeps each figure within half a step, a step being at most a tenth of the half width", () => {
    const number = fc.double({ min: -1e12, max: 1e12, noNaN: true });
    fc.assert(
      fc.property(number, fc.double({ min: 1e-3, max: 1e12, noNaN: true }), (low, width) => {
        const high = low + width;
        const value = low + width / 3;
        const text = intervalText({ value, low, high });
        const [, v, l, h, power = ""] = /^(.+) \((.+) to (.+)\)( × 10.+)?$/.exec(text)!;
        const step = (high - low) / 2 / 10;
        const figures = [v, l, h].map((figure) => readBack(`${figure}${power}`));
        // 1e-15 of the largest figure: beyond it doubles themselves have no digits.
        const allowed = step / 2 + 1e-14 * Math.max(Math.abs(low), Math.abs(high));
        [value, low, high].forEach((x, i) => {
          expect(Math.abs(figures[i]! - x)).toBeLessThanOrEqual(allowed * 1.06);
        });
      }),
    );
  });

  it("refuses an interval upside down and numbers that are not finite", () => {
    expect(() => intervalText({ value: 1, low: 2, high: 0 })).toThrow(
      "intervalText: low is 2 and high is 0; low must be at most high",
    );
    expect(() => intervalText({ value: 1, low: -Infinity, high: 2 })).toThrow(
      "intervalText: low is -Infinity; it must be a finite number",
    );
  });
});
