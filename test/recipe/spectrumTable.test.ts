import { describe, expect, it } from "vitest";
import { readSpectrumTable } from "../../lib/recipe/spectrumTable.js";

const read = (text: string) => readSpectrumTable({ text, where: "film.csv" });

describe("readSpectrumTable", () => {
  it("keeps decadic values and divides Napierian ones by ln 10", () => {
    const decadic = read("wavelength_nm,decadicAbsorbance\n400,0.5\n410,0.4\n");
    expect(decadic).toEqual({
      title: "film.csv",
      quantity: "absorbance",
      wavelengths_nm: [400, 410],
      values: [0.5, 0.4],
    });
    const napierian = read(
      `wavelength_nm,napierianAbsorbance\n400,${0.5 * Math.LN10}\n410,${0.4 * Math.LN10}\n`,
    );
    expect(napierian.quantity).toBe("absorbance");
    napierian.values.forEach((A, i) => expect(A).toBeCloseTo(decadic.values[i]!, 14));
    const molar = read("wavelength_nm,napierianMolarAbsorption_Lmolcm\n400,2302.585093\n410,0\n");
    expect(molar.quantity).toBe("molarAbsorption_Lmolcm");
    expect(molar.values[0]).toBeCloseTo(1000, 6);
    expect(read("wavelength_nm,decadicMolarAbsorption_Lmolcm\n400,7\n410,8\n").values).toEqual([7, 8]);
    expect(read("wavelength_nm,relativePower\n400,0\n410,3\n").quantity).toBe("relativePower");
  });

  it("turns transmitted fractions into absorbance, and falling wavelengths round", () => {
    const { wavelengths_nm, values } = read(
      "# film 3\nwavelength_nm,transmittedFraction\n410,0.1\n405,1\n400,0.01\n",
    );
    expect(wavelengths_nm).toEqual([400, 405, 410]);
    expect(values[0]).toBeCloseTo(2, 12);
    expect(values[1]).toBeCloseTo(0, 12);
    expect(values[2]).toBeCloseTo(1, 12);
  });

  it("takes semicolons and decimal commas", () => {
    expect(read("wavelength_nm;decadicAbsorbance\n400,5;0,7\n410,5;0,4\n")).toMatchObject({
      wavelengths_nm: [400.5, 410.5],
      values: [0.7, 0.4],
    });
  });

  it("keeps absorbances a little below 0: a baseline is not perfect", () => {
    expect(read("wavelength_nm,decadicAbsorbance\n400,-0.002\n410,0\n").values).toEqual([-0.002, 0]);
  });

  const columns =
    "decadicAbsorbance, napierianAbsorbance, transmittedFraction, decadicMolarAbsorption_Lmolcm, " +
    "napierianMolarAbsorption_Lmolcm, relativePower";
  it.each([
    [
      "# film\nnm,Abs\n400,1\n",
      `film.csv, row 2: the header is "nm,Abs"; it must name wavelength_nm and one column that states quantity and base: ${columns}`,
    ],
    [
      "wavelength_nm,decadicAbsorbance,relativePower\n400,1,1\n",
      'film.csv, row 1: the header is "wavelength_nm,decadicAbsorbance,relativePower"; it must name wavelength_nm and one column',
    ],
    [
      "",
      'film.csv, row 1: the header is ""; it must name wavelength_nm and one column that states quantity and base',
    ],
    [
      "wavelength,decadicAbsorbance\n400,1\n",
      'film.csv, row 1: unknown column "wavelength"; did you mean "wavelength_nm"?',
    ],
    [
      "wavelength_nm,decadicAbsorbance\n400,0.5\n405,oops\n",
      'film.csv, row 3, column decadicAbsorbance: "oops" is not a number; write it with a decimal point',
    ],
    [
      "wavelength_nm,decadicAbsorbance\n400,0.5\n410,0.4\n405,0.3\n",
      "film.csv: 405 nm follows 410 nm; the wavelengths must all rise or all fall, without repeats",
    ],
    [
      "wavelength_nm,decadicAbsorbance\n400,0.5\n400,0.4\n",
      "film.csv: 400 nm follows 400 nm; the wavelengths must all rise or all fall, without repeats",
    ],
    ["wavelength_nm,decadicAbsorbance\n400,0.5\n", "film.csv: 1 points; a spectrum has at least 2"],
    [
      "wavelength_nm,transmittedFraction\n400,0.5\n410,0\n",
      "film.csv: transmittedFraction at 410 nm is 0; it must be above 0, for nothing can be said about light that is not there; leave it out or measure a thinner film",
    ],
    [
      "wavelength_nm,relativePower\n400,0.5\n410,-1\n",
      "film.csv: relativePower at 410 nm is -1; it must be at least 0; take the baseline off or cut the range",
    ],
  ])("refuses %j", (text, message) => {
    expect(() => read(text)).toThrow(message);
  });
});
