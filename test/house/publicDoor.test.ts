import { describe, expect, it } from "vitest";
import { bareFields } from "../../lib/recipe/bareFields.js";
import { unitEndingOf } from "../../lib/recipe/units.js";
import { publicNames } from "./publicDoor.js";

const names = publicNames();
const functions = names.filter(({ kind }) => kind === "function");

// Names that carry no quantity of their own: places in a list or figure, counts, settings of a run, statistics of a fit.
const placesAndCounts = `
  value values low high min max x y from to range levels over present never at before after then shown spectrum first second repeat
  cell cells points shape count digits draws seed parallel layer layers baseLayers transitionLayers fromLayer toLayer
  linearUpTo liquids terms dimensions state start stepLimit tolerance iterations accepted rejected reach
  parameters coefficients standardErrors residuals leverage scores outliers response weights remainingStep
  degreesOfFreedom degreesAbove degreesBelow ratio probability leastProbability chance runs expectedRuns positive negative
  diagonal lower upper right row line loads enoughFor repeats cost total
`
  .trim()
  .split(/\s+/);

describe("the public door", () => {
  it("opens on functions, types and a few lists", () => {
    expect(functions.length).toBeGreaterThan(60);
    expect(names.filter(({ kind }) => kind === "value").map(({ name }) => name)).toEqual(
      expect.arrayContaining(["fieldUnits", "propertyNames"]),
    );
  });

  it.each(names.map((one) => [one.name, one] as const))("%s says what it is", (_, { text }) => {
    expect(text.length).toBeGreaterThan(15);
  });

  it.each(functions.map((one) => [one.name, one] as const))(
    "%s has an example that is run",
    (_, { tags }) => {
      expect(tags.get("example")).toContain("```ts");
    },
  );

  const models = functions.filter(({ file }) => file.startsWith("lib/models/"));
  it.each(models.map((one) => [one.name, one] as const))(
    "the model %s names its source and what it refuses",
    (_, { tags }) => {
      expect(tags.get("source")?.length).toBeGreaterThan(5);
      expect(tags.get("throws")).toContain("InputError");
    },
  );

  const numeric = [...new Set(names.flatMap(({ numericFields }) => numericFields))].sort();
  it.each(numeric)("the field %s ends in a listed unit, or is listed as having none", (field) => {
    const listed =
      unitEndingOf(field) !== undefined || field in bareFields || placesAndCounts.includes(field);
    expect(listed).toBe(true);
  });
});
