import { describe, expect, it } from "vitest";
import { molarAbsorptionWarnings } from "../../../lib/models/light.js";

describe("molarAbsorptionWarnings", () => {
  it("catches a supplier's mass value of 1-hydroxycyclohexyl phenyl ketone (CAS 947-19-3) that is labelled as molar", () => {
    // 3.317e4 at 254 nm is in circulation as L/(mol cm); as mL/(g cm) with M = 204.26 it is 6775.
    expect(
      molarAbsorptionWarnings({
        molarAbsorption_Lmolcm: 33170,
        molarMass_gmol: 204.26,
        chromophore: "monobenzoyl",
      }),
    ).toEqual([
      {
        code: "mass-value-as-molar",
        message:
          "33170 L/(mol cm) is more than one benzoyl group can have (20000); read as mL/(g cm) it is 6775 L/(mol cm), " +
          "which it can: the label in the source is probably wrong",
      },
    ]);
  });

  it("lets published values of single chromophores pass", () => {
    // Acetophenone 12 800 (Mariella 1952), benzophenone 19 400 (Ito 1984), both in an open spectra collection; curcumin 55 000
    // (Jasim 1989).
    for (const [molarAbsorption_Lmolcm, molarMass_gmol, chromophore] of [
      [12800, 120.15, "monobenzoyl"],
      [19400, 182.22, "monobenzoyl"],
      [20000, 182.22, "monobenzoyl"],
      [55000, 368.38, "organic"],
    ] as const) {
      expect(molarAbsorptionWarnings({ molarAbsorption_Lmolcm, molarMass_gmol, chromophore })).toEqual([]);
    }
  });

  it("says so when no reading of the label helps, and has a limit for any organic substance", () => {
    expect(
      molarAbsorptionWarnings({ molarAbsorption_Lmolcm: 5e5, molarMass_gmol: 900, chromophore: "organic" }),
    ).toEqual([
      {
        code: "beyond-chromophore",
        message:
          "500000 L/(mol cm) is more than any organic substance can have (300000); check the figure, its unit and the chromophore",
      },
    ]);
  });

  it("says what is wrong with the question", () => {
    expect(() =>
      molarAbsorptionWarnings({
        molarAbsorption_Lmolcm: 1,
        molarMass_gmol: 200,
        chromophore: "monobenzoil" as "organic",
      }),
    ).toThrow('molarAbsorptionWarnings: unknown chromophore "monobenzoil"; did you mean "monobenzoyl"?');
    expect(() =>
      molarAbsorptionWarnings({ molarAbsorption_Lmolcm: NaN, molarMass_gmol: 200, chromophore: "organic" }),
    ).toThrow(
      "molarAbsorptionWarnings: molarAbsorption_Lmolcm is NaN; it must be a finite number of at least 0",
    );
    expect(() =>
      molarAbsorptionWarnings({ molarAbsorption_Lmolcm: 1, molarMass_gmol: 0.2, chromophore: "organic" }),
    ).toThrow(
      "molarAbsorptionWarnings: molarMass_gmol is 0.2; it must be a number from 1 to 10000000; give it in g/mol",
    );
  });
});
