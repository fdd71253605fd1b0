import { describe, expect, it } from "vitest";
import { readQuantity } from "../../lib/recipe/quantity.js";
import { fieldUnits, unitEndingOf, unitLabel } from "../../lib/recipe/units.js";

const read = (field: string, given: unknown) => readQuantity({ where: "brief.json", field, given });

describe("readQuantity", () => {
  it("takes a number as being in the field's own unit", () => {
    expect(read("viscosity_mPas", 450)).toBe(450);
  });

  // Exact by definition of the units (SI Brochure, 9th edition, 2019; 1 cP = 1 mPa s; °F by its definition).
  it.each([
    ["viscosity_mPas", "450 cP", 450],
    ["viscosity_mPas", "0.45 Pa s", 450],
    ["viscosity_mPas", "4.5 poise", 450],
    ["temperature_C", "77 °F", 25],
    ["temperature_C", "298.15 K", 25],
    ["irradiance_mWcm2", "25 W/m^2", 2.5],
    ["irradiance_mWcm2", "2.5 mW/cm²", 2.5],
    ["exposure_mJcm2", "120 J/m^2", 12],
    ["layerThickness_um", "0.05 mm", 50],
    ["layerThickness_um", "50 µm", 50],
    ["molarAbsorption_Lmolcm", "100 m^2/mol", 1000],
    ["diffusivity_m2s", "1e-6 cm^2/s", 1e-10],
    ["mass_pct", "12 %", 12],
  ])("%s reads %s as %d", (field, given, expected) => {
    expect(read(field, given)).toBeCloseTo(expected, 12);
  });

  // Stern 1968 as given in IUPAC's glossary of membranes; SI values of cm³(STP) and cmHg. The unit is defined to seven digits.
  it("reads a barrer as its amount of substance", () => {
    const molarVolume_cm3 = ((8.314462618 * 273.15) / 101325) * 1e6;
    const barrer = ((1e-10 / molarVolume_cm3) * 100) / 1333.22387415;
    expect(read("oxygenPermeability_molmm2sPa", "1 barrer") / barrer).toBeCloseTo(1, 6);
  });

  it.each([
    ["450", 'brief.json: viscosity_mPas is "450" without a unit; write for instance "450 mPa s"'],
    [
      "18,4 cP",
      'brief.json: viscosity_mPas is "18,4 cP", with a comma in the number; write "18.4 cP": the decimal mark is a point, and thousands have none',
    ],
    ["18,4", 'viscosity_mPas is "18,4", with a comma in the number; write "18.4"'],
    [
      "1,000 cP",
      'viscosity_mPas is "1,000 cP", with a comma in the number; write "1.000 cP" or "1000 cP", whichever is meant',
    ],
    ["450 um", 'brief.json: viscosity_mPas is "450 um"; it must be a quantity that converts to mPa s'],
    [
      "450 cPp",
      'brief.json: viscosity_mPas is "450 cPp", which cannot be read as a quantity; did you mean "cP"?',
    ],
    [
      "thick",
      'brief.json: viscosity_mPas is "thick", which cannot be read as a quantity; write for instance "1 mPa s"',
    ],
    [NaN, "brief.json: viscosity_mPas is NaN; it must be a finite number of mPa s or text with a unit"],
    [null, "brief.json: viscosity_mPas is null; it must be a finite number of mPa s or text with a unit"],
    [
      undefined,
      "brief.json: viscosity_mPas is missing; it must be a finite number of mPa s or text with a unit",
    ],
  ])("refuses %s", (given, message) => {
    expect(() => read("viscosity_mPas", given)).toThrow(message);
  });
});

describe("field names", () => {
  it("end in a listed unit or carry none", () => {
    expect(unitEndingOf("layerThickness_um")).toBe("um");
    expect(unitEndingOf("massFraction")).toBeUndefined();
    expect(unitLabel("layerThickness_um")).toBe("µm");
    expect(unitLabel("massFraction")).toBe("");
  });

  it("have endings that mathjs can read", () => {
    for (const ending of Object.keys(fieldUnits)) {
      expect(read(`x_${ending}`, `2 ${fieldUnits[ending]!.mathjs}`), ending).toBeCloseTo(2, 10);
    }
  });
});
