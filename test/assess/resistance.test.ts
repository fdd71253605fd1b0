import { describe, expect, it } from "vitest";
import { resistanceOf } from "../../lib/assess/resistance.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const on = (filmThickness_um: number, irradiance = 8, gasOxygenFraction = 0.2095) =>
  resistanceOf({
    formulation,
    shelf,
    draws: 200,
    brief: {
      ...brief,
      light: { ...brief.light, irradiance_mWcm2: sure(irradiance) },
      window: { ...brief.window, gasOxygenFraction, filmThickness_um: sure(filmThickness_um) },
    },
  });

describe("resistanceOf", () => {
  it("is the resin's on a film of next to nothing, the film's on one of metres", () => {
    const [none, thick] = [on(1e-3), on(1e6)];
    expect([none.rules, none.filmRulesShare]).toEqual(["resin", 0]);
    expect(none.filmShare!.high).toBeLessThan(1e-3);
    expect([thick.rules, thick.filmRulesShare]).toEqual(["film", 1]);
    expect(thick.filmShare!.low).toBeGreaterThan(0.99);
  });

  it("grows with the film", () => {
    const shares = [20, 200, 2000].map((thickness) => on(thickness).filmShare!.value);
    expect(shares).toEqual([...shares].sort((a, b) => a - b));
  });

  it("says that nothing cures in hardly any light, and counts the draws", () => {
    const dark = on(1, 1e-6);
    expect(dark).toMatchObject({ rules: "nothing cures", filmShare: undefined, neverCuresShare: 1 });
  });
});
