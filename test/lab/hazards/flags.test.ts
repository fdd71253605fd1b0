import { describe, expect, it } from "vitest";
import { flagMixture, type MixtureRule } from "../../../lib/lab/hazards.js";
import { readSafetyRules } from "../../../lib/lab/hazards/files.js";
import type { Formulation } from "../../../lib/recipe/formulation.js";
import type { Ingredient } from "../../../lib/recipe/ingredient.js";

const { limits } = readSafetyRules("data/rules");
const INERT: Ingredient = { id: "INERT", name: "inert", role: "diluent", state: "liquid", hazards: [] };

function carrier(id: string, codes: readonly string[], change: Partial<Ingredient> = {}): Ingredient {
  const hazards = codes.map((code) => ({
    code,
    source: "chosen for a test",
    status: "invented for the demo" as const,
  }));
  return { ...INERT, id, hazards, ...change };
}

/** A mixture of carriers, written as `"H314+H318": 4` in percent, made up with something inert. */
function mixture(parts: Record<string, number>, change: Partial<Ingredient>[] = []): Formulation {
  const components = Object.entries(parts).map(([codes, pct], i) => ({
    ingredient: carrier(`X${i}`, codes.split("+"), change[i]),
    massFraction: pct / 100,
  }));
  const rest = 1 - components.reduce((sum, { massFraction }) => sum + massFraction, 0);
  return {
    id: "m",
    title: "mixture",
    components: [...components, { ingredient: INERT, massFraction: rest }],
  };
}

const flagged = (parts: Record<string, number>, rules: readonly MixtureRule[] = limits) =>
  flagMixture({ formulation: mixture(parts), limits: rules }).map(({ rule }) => rule);
const alone = (id: string) =>
  limits
    .filter((rule) => rule.id === id)
    .map((rule) => ({ ...rule, unless: [], whenUnclassified: undefined }));

// Limits of Regulation (EC) 1272/2008, Annex I, from memory: tables 3.1.2, 3.2.3, 3.3.3, 3.4.5, 3.4.6, 3.5.2, 3.6.2, 3.7.2, 3.8.3,
// 3.9.4, 4.1.1, 4.1.2, sections 3.8.3.4.5 and 3.10.3.3; the last three rules are Annex II, 2.10, read in the text.
// Which of them are idle where the mixture is classified: Annex II, 2.8 and 2.10, read in public copies.
const cases: [rule: string, on: Record<string, number>, below: Record<string, number>][] = [
  ["skin-sensitiser", { H317: 1 }, { H317: 0.99 }],
  ["skin-sensitiser-1A", { H317: 0.1 }, { H317: 0.099 }],
  ["respiratory-sensitiser", { H334: 1 }, { H334: 0.99 }],
  ["respiratory-sensitiser-1A", { H334: 0.1 }, { H334: 0.099 }],
  ["elicitation", { H317: 0.1 }, { H317: 0.099 }],
  ["elicitation-1A", { H334: 0.01 }, { H334: 0.0099 }],
  ["skin-corrosion", { H314: 5 }, { H314: 4.99 }],
  ["skin-irritation", { H315: 10 }, { H315: 9.99 }],
  ["skin-irritation", { H314: 1 }, { H314: 0.99 }],
  ["skin-irritation", { H314: 0.5, H315: 5 }, { H314: 0.5, H315: 4.99 }],
  ["eye-damage", { H318: 3 }, { H318: 2.99 }],
  ["eye-damage", { H314: 1.5, H318: 1.5 }, { H314: 1.5, H318: 1.49 }],
  ["eye-irritation", { H319: 10 }, { H319: 9.99 }],
  ["eye-irritation", { H318: 0.5, H319: 5 }, { H318: 0.5, H319: 4.99 }],
  ["respiratory-irritation", { H335: 20 }, { H335: 19.9 }],
  ["narcosis", { H336: 20 }, { H336: 19.9 }],
  ["carcinogen-1", { H350: 0.1 }, { H350: 0.099 }],
  ["carcinogen-2", { H351: 1 }, { H351: 0.99 }],
  ["mutagen-1", { H340: 0.1 }, { H340: 0.099 }],
  ["mutagen-2", { H341: 1 }, { H341: 0.99 }],
  ["reproductive-1", { H360FD: 0.3 }, { H360FD: 0.299 }],
  ["reproductive-2", { H361f: 3 }, { H361f: 2.99 }],
  ["lactation", { H362: 0.3 }, { H362: 0.299 }],
  ["organ-single-1", { H370: 10 }, { H370: 9.99 }],
  ["organ-single-2", { H371: 10 }, { H371: 9.99 }],
  ["organ-single-2", { H370: 1 }, { H370: 0.99 }],
  ["organ-repeated-1", { H372: 10 }, { H372: 9.99 }],
  ["organ-repeated-2", { H373: 10 }, { H373: 9.99 }],
  ["organ-repeated-2", { H372: 1 }, { H372: 0.99 }],
  ["aspiration", { H304: 10 }, { H304: 9.99 }],
  // 100 / ATE = sum of content / estimate: 25 % at 500 mg/kg make 2000 mg/kg, and so on.
  ["acute-oral-4", { H302: 25 }, { H302: 24.9 }],
  ["acute-oral-4", { H301: 2, H302: 15 }, { H301: 2, H302: 14.9 }],
  ["acute-oral-3", { H301: 33.34 }, { H301: 33.3 }],
  ["acute-oral-2", { H300: 1 }, { H300: 0.99 }],
  ["acute-dermal-4", { H312: 55 }, { H312: 54.9 }],
  ["acute-dermal-3", { H311: 30 }, { H311: 29.9 }],
  ["acute-dermal-2", { H310: 2.5 }, { H310: 2.49 }],
  ["acute-inhaled-4", { H332: 30 }, { H332: 29.9 }],
  ["acute-inhaled-3", { H331: 50 }, { H331: 49.9 }],
  ["acute-inhaled-2", { H330: 1 }, { H330: 0.99 }],
  ["aquatic-acute-1", { H400: 25 }, { H400: 24.9 }],
  ["aquatic-chronic-1", { H410: 25 }, { H410: 24.9 }],
  ["aquatic-chronic-2", { H410: 2.5 }, { H410: 2.49 }],
  ["aquatic-chronic-2", { H410: 1, H411: 15 }, { H410: 1, H411: 14.9 }],
  ["aquatic-chronic-3", { H412: 25 }, { H412: 24.9 }],
  ["aquatic-chronic-3", { H410: 0.1, H411: 1, H412: 5 }, { H410: 0.1, H411: 1, H412: 4.9 }],
  ["aquatic-chronic-4", { H413: 25 }, { H413: 24.9 }],
  ["sheet-sensitiser", { H317: 0.1 }, { H317: 0.099 }],
  ["sheet-reproductive", { H361: 0.1 }, { H361: 0.099 }],
  ["sheet-other", { H412: 1 }, { H412: 0.99 }],
];

describe("the shipped limits", () => {
  it.each(cases)("%s: reached by %j, not by %j", (id, on, below) => {
    expect(flagged(on, alone(id))).toEqual([id]);
    expect(flagged(below, alone(id))).toEqual([]);
  });

  it("all have a case on either side", () => {
    expect([...new Set(cases.map(([id]) => id))].sort()).toEqual(limits.map(({ id }) => id).sort());
  });

  it("say where and when they were read", () => {
    for (const { source, date, status } of limits) {
      expect(source).toMatch(/^Regulation \(EC\) 1272\/2008/);
      expect(date).toMatch(/^(2008|2011)$/);
      expect(["from memory", "published"]).toContain(status);
    }
  });
});

describe("flagMixture", () => {
  it("gives the mixture the graver statement only", () => {
    expect(flagged({ H317: 2 })).toEqual(["skin-sensitiser"]);
    expect(flagged({ H318: 4 })).toEqual(["eye-damage"]);
    expect(flagged({ H410: 30 })).toEqual(["aquatic-chronic-1"]);
    expect(flagged({ H410: 3 })).toEqual(["aquatic-chronic-2"]);
    expect(flagged({ H314: 6 })).toEqual(["skin-corrosion", "eye-damage"]);
    expect(flagged({ H300: 2 })).toEqual(["acute-oral-2"]);
  });

  it("leaves to a mixture that is not classified what is only for such a one", () => {
    // May be sensitising: H317 if the ingredient is sub-category 1A, EUH208 if it is not.
    const unsure = ["skin-sensitiser-1A", "elicitation", "sheet-sensitiser"];
    expect(flagged({ H317: 0.5 })).toEqual(unsure);
    expect(flagged({ H315: 5 })).toEqual(["sheet-other"]);
    // Classified for something else: the sensitiser is still to be named, the data sheet comes anyway.
    expect(flagged({ H317: 0.5, H319: 12 })).toEqual(["skin-sensitiser-1A", "elicitation", "eye-irritation"]);
    expect(flagged({ H317: 0.05, H334: 2 })).toEqual(["respiratory-sensitiser"]);
  });

  it("says how much there is of what, against which limit, and what it hangs on", () => {
    const [flag] = flagMixture({ formulation: mixture({ H317: 0.5 }), limits: alone("skin-sensitiser-1A") });
    expect(flag).toEqual({
      rule: "skin-sensitiser-1A",
      statement: "H317",
      title: "may cause an allergic skin reaction",
      outcome: "depends",
      content_pct: 0.5,
      limit_pct: 0.1,
      contributors: [{ ingredient: "X0", code: "H317", counts_pct: 0.5 }],
      condition:
        "only if the ingredient is sub-category 1A, which its code does not tell: look in its safety data sheet",
      source: "Regulation (EC) 1272/2008 (CLP), Annex I, Table 3.4.5, as amended by Regulation (EU) 286/2011",
      date: "2011",
      status: "from memory",
    });
    const [reached] = flagMixture({
      formulation: mixture({ H335: 30 }),
      limits: alone("respiratory-irritation"),
    });
    expect(reached).toMatchObject({ outcome: "reached", note: "a guide value: expert judgement decides" });
  });

  it("counts a substance once, by the code that weighs most", () => {
    expect(flagged({ "H314+H318": 2.9 }, alone("eye-damage"))).toEqual([]);
    const [flag] = flagMixture({
      formulation: mixture({ "H315+H314": 2 }),
      limits: alone("skin-irritation"),
    });
    expect(flag!.contributors).toEqual([{ ingredient: "X0", code: "H314", counts_pct: 20 }]);
  });

  it("adds nothing up where a single ingredient has to reach the limit", () => {
    const two = { H317: 0.6, "H317+H315": 0.6 };
    expect(flagged(two, alone("skin-sensitiser"))).toEqual([]);
    const sameCas = [{ cas: "26570-48-9" }, { cas: "26570-48-9" }];
    const formulation = mixture(two, sameCas);
    expect(flagMixture({ formulation, limits: alone("skin-sensitiser") })).toHaveLength(1);
  });

  it("takes the limit itself as reached, rounding noise or not", () => {
    expect(flagged({ H315: 0.1 + 0.2, "H315+H319": 9.7 }, alone("skin-irritation"))).toEqual([
      "skin-irritation",
    ]);
  });

  it("says nothing of what nobody checked, of what has no share, and of other statements", () => {
    const unchecked = { ...INERT, id: "U", hazards: undefined };
    const components = [
      { ingredient: unchecked, massFraction: 0.5 },
      { ingredient: carrier("Z", ["H317"]), massFraction: 0 },
      { ingredient: carrier("F", ["H225", "EUH066"]), massFraction: 0.5 },
    ];
    expect(flagMixture({ formulation: { id: "m", title: "m", components }, limits })).toEqual([]);
  });
});
