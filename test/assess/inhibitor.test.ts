import { describe, expect, it } from "vitest";
import { deadZoneOf, inductionTimeOf } from "../../lib/assess/oxygen.js";
import { layersOf } from "../../lib/assess/layers.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const without = { formulation: formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 }), brief, shelf };
const withInhibitor = (keep: number, constants: Partial<typeof shelf.constants> = {}) => ({
  formulation: formulationOf({ THIN: 60 - keep, THICK: 38.9, PI: 1, AB: 0.1, KEEP: keep }),
  brief,
  shelf: { ...shelf, constants: { ...shelf.constants, ...constants } },
});
const relativeWidth = ({ low, high }: { low: number; high: number }) => Math.log(high / low);

describe("an inhibitor in the formulation", () => {
  it("brings oxygen per radical towards 1: less of it where chains took more, and the induction longer", () => {
    const chains = { oxygenPerRadical: sure(3, 0.1) };
    const bare = inductionTimeOf({ ...without, shelf: withInhibitor(0, chains).shelf }).value;
    const some = inductionTimeOf(withInhibitor(0.05, chains)).value;
    const much = inductionTimeOf(withInhibitor(1, chains)).value;
    expect(some / bare).toBeGreaterThan(1.5);
    // Three oxygen per radical become one; the rest is the density, which moves by parts in ten thousand.
    expect(much / bare).toBeGreaterThan(2.7);
    expect(much / bare).toBeLessThan(3.001);
  });

  it("leaves less doubt of it, in induction time and dead zone", () => {
    for (const of of [inductionTimeOf, deadZoneOf]) {
      const [bare, kept] = [of(without), of(withInhibitor(0.5))];
      if (bare.outcome === "never-cures" || kept.outcome === "never-cures") throw new Error("it cures");
      expect(relativeWidth(kept)).toBeLessThan(0.97 * relativeWidth(bare));
    }
  });

  it("names what it read, and only where there is an inhibitor", () => {
    const figures = (work: typeof without) => inductionTimeOf(work).sources.map(({ figure }) => figure);
    expect(figures(withInhibitor(0.05))).toEqual(
      expect.arrayContaining([
        "peroxyl capture rate constant of KEEP",
        "radicals caught per molecule of KEEP",
        "molar mass of KEEP",
        "termination of peroxyl pairs",
        "oxygen given back by peroxyl pairs",
      ]),
    );
    expect(figures(without).filter((figure) => figure.includes("peroxyl"))).toEqual([]);
  });

  it.each(["peroxylCapture_m3mols", "radicalsCaught", "molarMass_gmol"] as const)(
    "says that it is not counted where %s is not known, and leaves the figures as they are without it",
    (missing) => {
      const ingredients = new Map(shelf.ingredients);
      ingredients.set("KEEP", { ...shelf.ingredients.get("KEEP")!, [missing]: undefined });
      const bottle = { ...shelf, ingredients };
      const formulation = formulationOf({ THIN: 59.9, THICK: 38.9, PI: 1, AB: 0.1, KEEP: 0.1 }, bottle);
      const work = { formulation, brief, shelf: bottle };
      const message =
        "What KEEP does to induction time and dead zone is not counted: the shelf lacks its molar mass, peroxylCapture_m3mols or radicalsCaught. Measure an induction time with it.";
      const warnings = [
        inductionTimeOf(work).warnings,
        deadZoneOf(work).warnings,
        layersOf({ ...work, layers: 1, draws: 40 }).warnings,
      ];
      for (const found of warnings) expect(found).toContainEqual({ code: "inhibitor-not-counted", message });
      expect(inductionTimeOf(work).value / inductionTimeOf(without).value).toBeCloseTo(1, 3);
      expect(inductionTimeOf(withInhibitor(0.1)).warnings).toEqual([]);
    },
  );
});
