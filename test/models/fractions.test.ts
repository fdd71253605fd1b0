import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  massToMoleFractions,
  massToVolumeFractions,
  moleToMassFractions,
} from "../../lib/models/viscosity.js";

const mixture = fc
  .array(
    fc.record({
      amount: fc.double({ min: 0.01, max: 1, noNaN: true }),
      M: fc.double({ min: 18, max: 5000, noNaN: true }),
    }),
    {
      minLength: 1,
      maxLength: 6,
    },
  )
  .map((parts) => {
    const total = parts.reduce((sum, { amount }) => sum + amount, 0);
    return {
      fractions: parts.map(({ amount }) => amount / total),
      molarMasses_gmol: parts.map(({ M }) => M),
    };
  });

describe("fractions", () => {
  it("goes to moles and back", () => {
    fc.assert(
      fc.property(mixture, ({ fractions, molarMasses_gmol }) => {
        const moleFractions = massToMoleFractions({ massFractions: fractions, molarMasses_gmol });
        const back = moleToMassFractions({ moleFractions, molarMasses_gmol });
        back.forEach((w, i) => expect(w).toBeCloseTo(fractions[i]!, 13));
        expect(moleFractions.reduce((sum, x) => sum + x, 0)).toBeCloseTo(1, 13);
      }),
    );
  });

  it("does not change fractions of substances alike", () => {
    fc.assert(
      fc.property(mixture, ({ fractions }) => {
        const alike = fractions.map(() => 200);
        massToMoleFractions({ massFractions: fractions, molarMasses_gmol: alike }).forEach((x, i) =>
          expect(x).toBeCloseTo(fractions[i]!, 13),
        );
      }),
    );
  });

  it("counts a urethane dimethacrylate with its diluent", () => {
    // UDMA 470.563 and TEGDMA 286.324 g/mol (from atomic weights): 70/30 and 50/50 by mass, worked out by hand.
    const molarMasses_gmol = [470.563, 286.324];
    expect(massToMoleFractions({ massFractions: [0.7, 0.3], molarMasses_gmol })[0]).toBeCloseTo(0.5867, 4);
    expect(massToMoleFractions({ massFractions: [0.5, 0.5], molarMasses_gmol })[0]).toBeCloseTo(0.3783, 4);
  });

  it("gives the denser part the smaller volume", () => {
    const phi = massToVolumeFractions({ massFractions: [0.5, 0.5], densities_gcm3: [1.1, 2.2] });
    expect(phi[0]).toBeCloseTo(2 / 3, 14);
    expect(phi[1]).toBeCloseTo(1 / 3, 14);
  });

  it("says what is wrong", () => {
    expect(() => massToMoleFractions({ massFractions: [0.5, 0.4], molarMasses_gmol: [100, 100] })).toThrow(
      "massToMoleFractions: massFractions add up to 0.9; they must add up to 1 within 1e-9; divide each by the sum",
    );
    expect(() => moleToMassFractions({ moleFractions: [0.5, 0.5], molarMasses_gmol: [100, 0.2] })).toThrow(
      "moleToMassFractions: molarMasses_gmol[1] is 0.2; it must be a number from 1 to 10000000; give it in g/mol",
    );
    expect(() => massToVolumeFractions({ massFractions: [1], densities_gcm3: [1100] })).toThrow(
      "massToVolumeFractions: densities_gcm3[0] is 1100; it must be a number from 0.1 to 25; give it in g/cm3",
    );
    expect(() => massToMoleFractions({ massFractions: [1], molarMasses_gmol: [100, 100] })).toThrow(
      "massToMoleFractions: massFractions holds 1, molarMasses_gmol holds 2; the lists must be of the same length",
    );
    expect(() => massToMoleFractions({ massFractions: [], molarMasses_gmol: [] })).toThrow(
      "massToMoleFractions: massFractions holds 0 numbers; at least 1 must be given",
    );
  });
});
