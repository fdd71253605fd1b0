import { describe, expect, it } from "vitest";
import { parseJson } from "../../lib/recipe/document.js";
import { readRecipe } from "../../lib/recipe/recipe.js";

describe("readRecipe", () => {
  it("refuses a negative share with its line", () => {
    const text = '{"id": "a", "title": "abc",\n "parts": [\n {"ingredient": "THIN", "mass_pct": -5}]}';
    expect(() => readRecipe(parseJson(text, "a.json"))).toThrow(
      "a.json, line 3: parts[0].mass_pct is -5; it must be at least 0",
    );
  });
});
