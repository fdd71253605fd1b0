import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { grunbergNissan, kendallMonroe } from "../../../lib/models/viscosity.js";

describe("kendallMonroe", () => {
  it("agrees with a worked example of the two ideal rules, styrene and toluene 50/50 at 20 °C", () => {
    // Perry's Chemical Engineers' Handbook, 7th ed., p. 2-367 (second hand): 0.76 and 0.59 mPa s, logarithmic rule printed
    // as 0.67; the further digits of both rules were worked out by an independent program.
    const [moleFractions, viscosities_mPas] = [
      [0.5, 0.5],
      [0.76, 0.59],
    ];
    expect(kendallMonroe({ moleFractions, viscosities_mPas })).toBeCloseTo(0.67142, 5);
    const logarithmic = {
      fractions: moleFractions,
      viscosities_mPas,
      basis: "mole",
      interactions: [],
    } as const;
    expect(grunbergNissan(logarithmic)).toBeCloseTo(0.66963, 5);
  });

  it("lies between the neat liquids and above the logarithmic rule", () => {
    const viscosity = fc.double({ min: 0.1, max: 1e3, noNaN: true });
    fc.assert(
      fc.property(fc.double({ min: 0.01, max: 0.99, noNaN: true }), viscosity, viscosity, (x, eta1, eta2) => {
        const mixture = { moleFractions: [x, 1 - x], viscosities_mPas: [eta1, eta2] };
        const eta = kendallMonroe(mixture);
        const logarithmic = Math.exp(x * Math.log(eta1) + (1 - x) * Math.log(eta2));
        expect(eta).toBeLessThanOrEqual(Math.max(eta1, eta2) * (1 + 1e-12));
        expect(eta).toBeGreaterThanOrEqual(logarithmic * (1 - 1e-12));
      }),
    );
  });

  it("refuses what is not a mixture", () => {
    expect(() => kendallMonroe({ moleFractions: [0.5, 0.4], viscosities_mPas: [1, 2] })).toThrow(
      "kendallMonroe: moleFractions add up to 0.9; they must add up to 1 within 1e-9; divide each by the sum",
    );
    expect(() => kendallMonroe({ moleFractions: [0.5, 0.5], viscosities_mPas: [1, -2] })).toThrow(
      "kendallMonroe: viscosities_mPas[1] is -2; it must be a finite number above 0",
    );
    expect(() => kendallMonroe({ moleFractions: [1], viscosities_mPas: [1, 2] })).toThrow(
      "kendallMonroe: moleFractions holds 1, viscosities_mPas holds 2; the lists must be of the same length",
    );
  });
});
