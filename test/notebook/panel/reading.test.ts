import { describe, expect, it } from "vitest";
import { assess } from "../../../lib/assess/assess.js";
import { panelOf } from "../../../lib/notebook/panel/panel.js";
import { readingOf, recipeText } from "../../../lib/notebook/panel/reading.js";
import { assessmentTable } from "../../../lib/notebook/views.js";
import { parseJson } from "../../../lib/recipe/document.js";
import { formulate, withRatio } from "../../../lib/recipe/formulation.js";
import { readWorkbench } from "../../../lib/recipe/files.js";
import { readRecipe } from "../../../lib/recipe/recipe.js";

const work = readWorkbench("data/briefs/flow-cell.json");

describe("readingOf", () => {
  const assessment = assess(work);

  it("says the same as the notebook's table", () => {
    const { rows } = readingOf(assessment);
    expect(rows.map((row) => [row.property, row.unit, row.value, row.target, row.verdict])).toEqual(
      assessmentTable(assessment).rows,
    );
  });

  it("puts what is to be avoided before the other warnings", () => {
    const avoided = [{ ingredient: "TPO", reason: "of a test" }];
    expect(readingOf({ ...assessment, avoided }).warnings).toEqual([
      "It holds TPO, which the brief says to avoid: of a test.",
      ...assessment.warnings.map(({ message }) => message),
    ]);
  });
});

describe("recipeText", () => {
  it("is a formulation file that gives the same formulation", () => {
    const { id, against, share } = { id: "UDMA", against: "IBOA", share: 1 / 3 };
    const tried = withRatio(work.formulation, { id, against, share });
    const recipe = readRecipe(parseJson(recipeText(tried), "tried.json"));
    expect([recipe.id, recipe.title]).toEqual([
      "flow-cell-a-tried",
      "Flow-cell resin, first proposal (invented for the demo), as tried on the page",
    ]);
    const { components } = formulate({ recipe, shelf: work.shelf });
    components.forEach(({ ingredient, massFraction }, i) => {
      expect(ingredient).toEqual(tried.components[i]!.ingredient);
      // Eight significant digits are written.
      expect(massFraction / tried.components[i]!.massFraction).toBeCloseTo(1, 7);
    });
  });

  it("names lots, and keeps hostile names as text", () => {
    const title = `a "quoted"\n</script> title`;
    const components = work.formulation.components.map((one) => ({
      ...one,
      ingredient: { ...one.ingredient, lot: { id: "L-1", measured: [] } },
    }));
    const { value } = parseJson(recipeText({ id: "a", title, components }), "a.json") as {
      value: { title: string; parts: { lot: string }[] };
    };
    expect(value.title).toBe(`${title}, as tried on the page`);
    expect(value.parts.map(({ lot }) => lot)).toEqual(components.map(() => "L-1"));
  });
});

describe("panelOf", () => {
  it("carries the case and what the models say of it", () => {
    const { kind, start, work: plain } = panelOf(work);
    expect([kind, plain.formulation.id, start.draws]).toEqual(["panel", "flow-cell-a", 2000]);
    expect(start).toEqual(readingOf(assess(work)));
  });
});
