import { describe, expect, it } from "vitest";
import { viscosityOf } from "../../lib/assess/viscosity.js";
import type { Interaction } from "../../lib/recipe/interaction.js";
import { withInteraction, type Shelf } from "../../lib/recipe/shelf.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const G = (
  pair: [string, string],
  value: number,
  basis: Interaction["basis"] = "mass",
  u = 0,
): Interaction => ({
  pair,
  basis,
  G: sure(value, u),
  temperature_C: 25,
});
const viscosity = (parts: Record<string, number>, on: Shelf = shelf, temperature_C = 25) =>
  viscosityOf({
    formulation: formulationOf(parts),
    brief: { ...brief, temperature_C },
    shelf: on,
    draws: 500,
  });
const codes = (result: { warnings: readonly { code: string }[] }) => result.warnings.map(({ code }) => code);

describe("viscosityOf", () => {
  it("is the liquid's own viscosity for one liquid", () => {
    expect(viscosity({ THIN: 100 }).value).toBeCloseTo(10, 12);
    expect(codes(viscosity({ THIN: 100 }))).toEqual([]);
  });

  it("follows the liquid's temperature law", () => {
    expect(viscosity({ THIN: 100 }, shelf, 45).value).toBeCloseTo(
      10 * Math.exp(3000 * (1 / 318.15 - 1 / 298.15)),
      10,
    );
  });

  // ln η = ½ ln 10 + ½ ln 10000 + ¼ G, by hand.
  it("mixes two liquids by a measured interaction on its basis, whichever way round it is named", () => {
    const expected = Math.sqrt(10 * 10000) * Math.exp(-0.8 / 4);
    expect(
      viscosity({ THIN: 50, THICK: 50 }, withInteraction(shelf, G(["THIN", "THICK"], -0.8))).value,
    ).toBeCloseTo(expected, 9);
    expect(
      viscosity({ THIN: 50, THICK: 50 }, withInteraction(shelf, G(["THICK", "THIN"], -0.8))).value,
    ).toBeCloseTo(expected, 9);
  });

  // Equal masses of 200 and 500 g/mol are 5/7 and 2/7 by amount; of 1 and 1.25 g/cm³ are 5/9 and 4/9 by volume.
  it.each([
    ["mole", 5 / 7],
    ["volume", 5 / 9],
  ] as const)("uses %s fractions for an interaction on that basis", (basis, thin) => {
    const on = withInteraction(shelf, G(["THIN", "THICK"], 0, basis));
    expect(viscosity({ THIN: 50, THICK: 50 }, on).value).toBeCloseTo(10 ** (thin + 4 * (1 - thin)), 8);
  });

  it("leaves dissolved initiator and absorber out of the mixing rule", () => {
    const on = withInteraction(shelf, G(["THIN", "THICK"], -0.8));
    const clean = viscosity({ THIN: 50, THICK: 50 }, on);
    expect(viscosity({ THIN: 49.5, THICK: 49.5, PI: 1 }, on).value).toBeCloseTo(clean.value, 10);
    const loaded = viscosity({ THIN: 47, THICK: 47, PI: 6 }, on);
    expect(codes(loaded)).toEqual(["solutes-left-out"]);
    expect(loaded.warnings[0]!.message).toContain("6.0 % of the mass; above 5 %");
  });

  // Krieger & Dougherty 1959 by hand: 20 g of 2 g/cm³ in 80 g of 1 g/cm³ fill 1/9 of the volume.
  it("thickens with filler by its volume, and says what it leaves out", () => {
    const filled = viscosity({ THIN: 80, SAND: 20 });
    expect(filled.value).toBeCloseTo(10 * (1 - 1 / 9 / 0.6) ** (-2.5 * 0.6), 8);
    expect(codes(filled)).toEqual(["solids-estimated"]);
    expect(filled.sources.map(({ figure }) => figure)).toContain("packing limit of the particles");
  });

  it("refuses a suspension too near its packing limit", () => {
    expect(() => viscosity({ THIN: 30, SAND: 70 })).toThrow(
      'formulation "test": SAND fill 0.54 of the volume; up to 0.48 can be assessed (four u below the packing limit 0.6); measure the viscosity of this suspension',
    );
  });

  it("carries a wide interval and a warning for pairs that nobody measured", () => {
    const guessed = viscosity({ THIN: 50, THICK: 50 });
    const measured = viscosity(
      { THIN: 50, THICK: 50 },
      withInteraction(shelf, G(["THIN", "THICK"], 0, "mass", 0.05)),
    );
    expect(guessed.high / guessed.low).toBeGreaterThan(3 * (measured.high / measured.low));
    expect(guessed.warnings[0]!.message).toContain("No measured interaction for THIN–THICK");
    expect(guessed.doubt[0]!.label).toBe("mixing basis, from mass (0) to mole fraction (1)");
    expect(codes(measured)).toEqual([]);
  });

  it("lists every unmeasured pair of three liquids", () => {
    const some = viscosity(
      { THIN: 40, THICK: 40, MID: 20 },
      withInteraction(shelf, G(["THIN", "THICK"], -0.8)),
    );
    expect(some.warnings[0]!.message).toContain("THIN–MID, THICK–MID: G = 0");
  });

  it("warns far from the temperatures of the readings", () => {
    const on = withInteraction(shelf, G(["THIN", "THICK"], -0.8));
    expect(codes(viscosity({ THIN: 50, THICK: 50 }, on, 60))).toEqual([
      "interaction-other-temperature",
      "viscosity-extrapolated",
    ]);
  });

  it("names the sources it used and no others", () => {
    const { sources } = viscosity({ THIN: 100 });
    expect(sources).toEqual([
      {
        figure: "viscosity activation of THIN",
        source: "round number chosen for a test",
        status: "invented for the demo",
      },
      {
        figure: "viscosity of THIN",
        source: "round number chosen for a test",
        status: "invented for the demo",
      },
    ]);
  });

  it("refuses interactions of two bases, a liquid without viscosity, a formulation without liquid", () => {
    const mixed = withInteraction(
      withInteraction(shelf, G(["THIN", "THICK"], 1)),
      G(["THIN", "MID"], 1, "mole"),
    );
    expect(() => viscosity({ THIN: 40, THICK: 40, MID: 20 }, mixed)).toThrow(
      'formulation "test": the interaction of THIN and MID is on a mole basis, others on a mass basis; fit all of them on one basis',
    );
    expect(() => viscosity({ PI: 100 })).toThrow("no diluent and no oligomer in it; a resin needs a liquid");
    const formulation = formulationOf({ THIN: 100 });
    const { ingredient } = formulation.components[0]!;
    const bare = {
      ...formulation,
      components: [{ ingredient: { ...ingredient, viscosity_mPas: undefined }, massFraction: 1 }],
    };
    expect(() => viscosityOf({ formulation: bare, brief, shelf })).toThrow(
      'formulation "test": THIN has no viscosity_mPas; add it to the ingredient with its source and u, or measure a lot',
    );
  });
});
