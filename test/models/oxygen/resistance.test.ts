import { describe, expect, it } from "vitest";
import { deadZone, oxygenResistance } from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

const at = (filmEquivalentThickness_um: number) => oxygenResistance({ ...P0, filmEquivalentThickness_um });

describe("oxygenResistance", () => {
  it("is the resin's without film and the film's when that is worth many dead zones", () => {
    expect(at(0)).toMatchObject({ outcome: "dead-zone", rules: "resin" });
    expect(at(350)).toMatchObject({ outcome: "dead-zone", rules: "film" });
    const [none, thick] = [at(0), at(1e6)];
    expect(none.outcome === "dead-zone" && none.filmShare).toBeCloseTo(0, 12);
    expect(thick.outcome === "dead-zone" && thick.filmShare).toBeCloseTo(1, 4);
  });

  it("turns where half the fall lies in the film: l = delta0 / (2 sqrt 2) in even light", () => {
    const even = (filmEquivalentThickness_um: number) =>
      oxygenResistance({ ...P0, napierianAbsorption_percm: 0, filmEquivalentThickness_um });
    const turn = 20 / (2 * Math.SQRT2);
    expect(even(turn * (1 - 1e-9))).toMatchObject({ rules: "resin" });
    expect(even(turn * (1 + 1e-9))).toMatchObject({ rules: "film" });
  });

  it("tells how the thickness answers: one to one with the light where the film rules, by the root where the resin does", () => {
    const power = (filmEquivalentThickness_um: number): number => {
      const [low, high] = [0.5, 0.505].map((radicalGeneration_molm3s) => {
        const zone = deadZone({
          ...P0,
          napierianAbsorption_percm: 0,
          filmEquivalentThickness_um,
          radicalGeneration_molm3s,
        });
        return zone.outcome === "dead-zone" ? zone.thickness_um : NaN;
      });
      return Math.log(high! / low!) / Math.log(1.01);
    };
    expect(power(0)).toBeCloseTo(-0.5, 6);
    expect(power(1e5)).toBeCloseTo(-1, 3);
  });

  it("passes on that this light never cures, and calls it the resin's over nitrogen", () => {
    expect(
      oxygenResistance({ ...P0, filmEquivalentThickness_um: 0, radicalGeneration_molm3s: 0.001 }),
    ).toMatchObject({
      outcome: "never-cures",
    });
    expect(oxygenResistance({ ...P0, filmEquivalentThickness_um: 50, saturation_molm3: 0 })).toEqual({
      outcome: "dead-zone",
      rules: "resin",
      filmShare: 0,
    });
  });
});
