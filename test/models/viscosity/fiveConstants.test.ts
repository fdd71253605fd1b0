import { describe, expect, it } from "vitest";
import { andradeViscosity, fiveConstantViscosity } from "../../../lib/models/viscosity.js";

type Constants = readonly [number, number, number, number, number];

describe("fiveConstantViscosity", () => {
  // Constants of Perry's Chemical Engineers' Handbook, 8th ed. 2008, table 2-313; viscosities at 293.15, 298.15, 303.15 and
  // 313.15 K worked out from them by an independent program and printed to 1e-4.
  it.each([
    ["methyl methacrylate", [-0.099, 496, -1.5939, 0, 0], [0.5748, 0.5439, 0.5153, 0.4644]],
    ["methyl acrylate", [10.848, 75, -3.297, 0, 0], [0.4879, 0.4595, 0.4332, 0.3861]],
    ["acrylic acid", [-28.12, 2280.2, 2.3956, 0, 0], [1.1909, 1.0884, 0.9984, 0.8487]],
    ["methacrylic acid", [-14.527, 1497.7, 0.51747, 0, 0], [1.5362, 1.4225, 1.3207, 1.147]],
  ] as const)("gives the viscosity of %s", (_, constants, values) => {
    [20, 25, 30, 40].forEach((temperature_C, k) => {
      // Printed to 1e-4, and the third constant to four or five digits.
      expect(Math.abs(fiveConstantViscosity({ constants, temperature_C }) - values[k]!)).toBeLessThan(1e-4);
    });
  });

  it("is Andrade's law with two constants, in Pa s, and takes the fourth and fifth", () => {
    const andrade = andradeViscosity({ lnPrefactor: -5, activation_K: 2000, temperature_C: 40 });
    const at = (constants: Constants): number => fiveConstantViscosity({ constants, temperature_C: 40 });
    expect(at([-5 - Math.log(1000), 2000, 0, 0, 0]) / andrade).toBeCloseTo(1, 12);
    expect(at([0, 0, 0, 1e-5, 2])).toBeCloseTo(1000 * Math.exp(1e-5 * 313.15 ** 2), 9);
  });

  it("refuses what is not five constants", () => {
    const four = [1, 2, 3, 4] as unknown as Constants;
    expect(() => fiveConstantViscosity({ constants: four, temperature_C: 25 })).toThrow(
      "fiveConstantViscosity: constants holds 4 numbers; it must hold 5, C1 to C5",
    );
    expect(() => fiveConstantViscosity({ constants: [1e4, 0, 0, 0, 0], temperature_C: 25 })).toThrow(
      "fiveConstantViscosity: the viscosity in mPas is Infinity; it must be a finite number above 0; check the constants",
    );
    expect(() => fiveConstantViscosity({ constants: [1, NaN, 0, 0, 0], temperature_C: 25 })).toThrow(
      "fiveConstantViscosity: constants[1] is NaN; it must be a finite number",
    );
    expect(() => fiveConstantViscosity({ constants: [1, 0, 0, 0, 0], temperature_C: -280 })).toThrow(
      "fiveConstantViscosity: temperature_C is -280; it must be a finite number above -273.15",
    );
  });
});
