import { describe, expect, it } from "vitest";
import { readBrief } from "../../lib/recipe/brief.js";
import { parseJson } from "../../lib/recipe/document.js";
import { brief } from "../fixtures.js";

const read = (change: (draft: Record<string, never>) => void) => {
  const draft = structuredClone(brief) as unknown as Record<string, never>;
  change(draft);
  return readBrief(parseJson(JSON.stringify(draft, null, 1), "b.json"));
};
const set = (path: string[], value: unknown) => (draft: Record<string, never>) => {
  const last = path.at(-1)!;
  const holder = path.slice(0, -1).reduce((at, key) => at[key] as never, draft) as Record<string, unknown>;
  holder[last] = value;
};

describe("readBrief", () => {
  it("reads a brief as it stands, and quantities with units", () => {
    expect(read(() => undefined)).toEqual(brief);
    expect(read(set(["layerThickness_um"], "0.1 mm")).layerThickness_um).toBe(100);
    expect(read(set(["temperature_C"], "86 °F")).temperature_C).toBe(30);
  });

  it("looks for its shelf in the folder above when it names none", () => {
    expect(read(set(["shelf"], undefined)).shelf).toEqual([".."]);
  });

  it.each([
    [
      ["temperature_C"],
      undefined,
      "temperature_C is missing; it must be a finite number of °C or text with a unit",
    ],
    [["temperature_C"], "28", 'temperature_C is "28" without a unit; write for instance "28 °C"'],
    [["layerThickness_um"], -50, "layerThickness_um is -50; it must be at least 1"],
    [
      ["layerThickness_um"],
      "50 mPa s",
      'layerThickness_um is "50 mPa s"; it must be a quantity that converts to µm',
    ],
    [
      ["layerThicknes_um"],
      50,
      'the file has an unknown field "layerThicknes_um"; did you mean "layerThickness_um"?',
    ],
    [
      ["light", "spectrum"],
      undefined,
      "b.json: light has neither of spectrum and wavelength_nm; give one of them",
    ],
    [["window", "gasPressure_Pa"], 1.013, "window.gasPressure_Pa is 1.013; it must be at least 1000"],
    [
      ["window", "gasPressure_Pa"],
      "1.013 GPa",
      'window.gasPressure_Pa is "1.013 GPa"; it must be at most 10000000',
    ],
    [
      ["avoid"],
      [{ hazard: "h317", reason: "sensitises" }],
      'avoid[0].hazard is "h317"; it must be the code of a hazard statement of GHS or CLP; did you mean "H317"?',
    ],
    [["avoid"], [{ hazard: "H999", reason: "no such" }], 'avoid[0].hazard is "H999"; it must be the code'],
    [["light", "irradiance_mWcm2"], 8, "light.irradiance_mWcm2 is 8; it must be an object"],
    [["window", "gasOxygenFraction"], 21, "window.gasOxygenFraction is 21; it must be at most 1"],
    [
      ["targets"],
      { viscosity: { max: 5 } },
      'targets has an unknown field "viscosity"; did you mean "viscosity_mPas"?',
    ],
    [["targets"], { viscosity_mPas: {} }, "targets.viscosity_mPas has neither min nor max; give one of them"],
    [
      ["targets"],
      { deadZone_um: { min: 50, max: 5 } },
      "targets.deadZone_um runs from 50 to 5; min must be below max",
    ],
    [["avoid"], [{ reason: "because" }], "avoid[0] must name either an ingredient or a hazard"],
  ])("refuses %j = %j", (path, value, message) => {
    expect(() => read(set(path, value))).toThrow(message);
  });

  it("refuses both a spectrum and a wavelength", () => {
    const wavelength_nm = { value: 405, u: 3, source: "nominal", status: "common practice" };
    expect(() => read(set(["light", "wavelength_nm"], wavelength_nm))).toThrow(
      "light has both of spectrum and wavelength_nm; give one of them",
    );
  });
});
