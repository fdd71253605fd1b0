import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { doubleBondConcentration } from "../../../lib/models/network.js";

describe("doubleBondConcentration", () => {
  const neat = (functionality: number, molarMass: number, density_gcm3: number) =>
    doubleBondConcentration({
      massFractions: [1],
      functionalities: [functionality],
      molarMasses_gmol: [molarMass],
      density_gcm3,
    });

  it("of one mole of single bonds in a litre is 1, and grows with functionality and density", () => {
    expect(neat(1, 1000, 1)).toBeCloseTo(1, 14);
    expect(neat(4, 1000, 1.5)).toBeCloseTo(6, 14);
    expect(neat(0, 1000, 1)).toBe(0);
  });

  it("adds up over what is in the bottle, whatever the order", () => {
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 0.99, noNaN: true }), (w) => {
        const blend = (massFractions: number[], functionalities: number[], molarMasses_gmol: number[]) =>
          doubleBondConcentration({ massFractions, functionalities, molarMasses_gmol, density_gcm3: 1 });
        const both = blend([w, 1 - w], [2, 3], [200, 300]);
        expect(both).toBeCloseTo(w * neat(2, 200, 1) + (1 - w) * neat(3, 300, 1), 12);
        expect(both).toBeCloseTo(blend([1 - w, w], [3, 2], [300, 200]), 12);
      }),
    );
  });

  // Calculated outside this program from the same molar masses and densities; half a unit of the last digit.
  it.each([
    ["methyl methacrylate", 1, 100.12, 0.9377, 9.3658],
    ["1,6-hexanediol diacrylate", 2, 226.27, 1.01, 8.9274],
    ["trimethylolpropane triacrylate", 3, 296.32, 1.1, 11.1366],
    ["pentaerythritol tetraacrylate", 4, 352.34, 1.185, 13.4529],
  ])("of %s", (_, f, M, rho, expected) => {
    expect(Math.abs(neat(f, M, rho) - expected)).toBeLessThan(5.1e-5);
  });

  it.each([
    [{ massFractions: [0.6, 0.3] }, "doubleBondConcentration: massFractions add up to 0.9; they must add up"],
    [
      { functionalities: [2, 13] },
      "doubleBondConcentration: functionalities[1] is 13; it must be a number from 0 to 12",
    ],
    [{ functionalities: [2] }, "the lists must be of the same length"],
    [
      { molarMasses_gmol: [470, 0.286] },
      "doubleBondConcentration: molarMasses_gmol[1] is 0.286; it must be a number from 1 to 10000000; give it in g/mol",
    ],
    [
      { density_gcm3: 1100 },
      "doubleBondConcentration: density_gcm3 is 1100; it must be a number from 0.1 to 25; give it in g/cm3",
    ],
  ])("refuses %j", (change, message) => {
    const good = {
      massFractions: [0.6, 0.4],
      functionalities: [2, 2],
      molarMasses_gmol: [470, 286],
      density_gcm3: 1.1,
    };
    expect(() => doubleBondConcentration({ ...good, ...change })).toThrow(message);
  });
});
