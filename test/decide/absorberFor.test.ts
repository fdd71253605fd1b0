import { describe, expect, it } from "vitest";
import type { Case } from "../../lib/assess/case.js";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { penetrationDepthOf } from "../../lib/assess/depth.js";
import { absorberCandidates, absorberFor, type WantedOfAbsorber } from "../../lib/decide/absorberFor.js";
import { withOnly, type LevelFound } from "../../lib/decide/level.js";
import type { Ingredient } from "../../lib/recipe/ingredient.js";
import type { Shelf } from "../../lib/recipe/shelf.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const [AB, PI] = ["AB", "PI"].map((id) => shelf.ingredients.get(id)!) as [Ingredient, Ingredient];
const work: Case = { formulation: formulationOf({ THIN: 98.9, PI: 1, AB: 0.1 }), brief, shelf };
const search = (wanted: WantedOfAbsorber, change: Partial<Case> = {}) =>
  absorberFor({ ...work, ...change, wanted, draws: 60 });
const found = (answer: ReturnType<typeof search>): LevelFound => {
  if (!("massFraction" in answer)) throw new Error(answer.reason);
  return answer;
};
const stocked = (...more: Partial<Ingredient>[]): Shelf => ({
  ...shelf,
  ingredients: new Map([...shelf.ingredients, ...more.map((one) => [one.id!, { ...AB, ...one }] as const)]),
});

describe("absorberFor", () => {
  it("refuses a formulation of absorber alone", () => {
    const alone = { ...work.formulation, components: [{ ingredient: AB, massFraction: 1 }] };
    expect(() => search({ penetrationDepth_um: 60 }, { formulation: alone })).toThrow(
      'formulation "test": nothing but absorber in it; add the liquids',
    );
  });

  // The test shelf absorbs alike at every wavelength and every density but THICK's is 1: Beer-Lambert for the level w, with the
  // initiator's 1 % of the rest, is linear in w. 400 g/mol and density 1 make 2.5 mol/L of a mass fraction of 1.
  it("is the level of the Beer-Lambert law where every wavelength is absorbed alike", () => {
    const initiator = 500 * 2.5 * (0.01 / (0.01 + 0.989));
    const w = ((1e4 / 60 - 1) / Math.LN10 - initiator) / (10000 * 2.5 - initiator);
    expect(found(search({ penetrationDepth_um: 60 })).massFraction.value / w).toBeCloseTo(1, 9);
  });

  it.each<[WantedOfAbsorber, (input: Case) => number]>([
    [{ penetrationDepth_um: 40 }, (input) => penetrationDepthOf({ ...input, draws: 40 }).value],
    [
      { layerExposure_mJcm2: 60 },
      (input) => workingCurveOf({ ...input, draws: 40 }).layerExposure_mJcm2.value,
    ],
    [{ layerTime_s: 9 }, (input) => workingCurveOf({ ...input, draws: 40 }).layerTime_s.value],
  ])("put into the formulation gives what was wanted: %j", (wanted, valueOf) => {
    const { massFraction, outcome } = found(search(wanted));
    expect(outcome).toBe("reached");
    const value = valueOf(withOnly(work, AB, massFraction.value));
    expect(value / Object.values(wanted)[0]!).toBeCloseTo(1, 9);
    expect(massFraction.low).toBeLessThan(massFraction.value);
    expect(massFraction.high).toBeGreaterThan(massFraction.value);
  });

  it("asks for more the shallower the depth, and says it in words", () => {
    const [deep, shallow] = [60, 30].map((penetrationDepth_um) => found(search({ penetrationDepth_um })));
    expect(shallow!.massFraction.value).toBeGreaterThan(deep!.massFraction.value);
    expect(deep!.reason).toMatch(/^0\.2\d+ % AB brings the penetration depth to 60 µm\.$/);
  });

  it("stops at what dissolves, and says how much would be needed and how sure that is", () => {
    const on = stocked({ id: "AB", solubility_pct: sure(0.2, 0.05) });
    const { formulation } = withOnly(work, on.ingredients.get("AB")!, 0.001);
    const answer = found(search({ penetrationDepth_um: 30 }, { shelf: on, formulation }));
    expect(answer.outcome).toBe("above solubility");
    expect(answer.reason).toMatch(
      /^It takes 0\.\d+ % AB to bring the penetration depth to 30 µm; about 0\.2 % dissolves\.$/,
    );
    expect(answer.reachedShare).toBeLessThan(0.05);
    expect(answer.sources.map(({ figure }) => figure)).toContain("solubility of AB");
    expect(answer.warnings.map(({ code }) => code)).toEqual(["hazards-unchecked", "working-curve-estimated"]);
  });

  it("says that solubility is unknown, and that nobody has looked at the hazards", () => {
    const { warnings, hazards } = search({ penetrationDepth_um: 60 });
    expect(hazards).toBeUndefined();
    expect(warnings.map(({ code }) => code)).toEqual([
      "hazards-unchecked",
      "solubility-unknown",
      "working-curve-estimated",
    ]);
    expect(warnings[0]!.message).toBe(
      "No hazard statement of AB is on the shelf because nobody has looked. Read its safety data sheet first.",
    );
    expect(warnings[1]!.message).toBe(
      "How much AB dissolves is not on the shelf. Stir the level in, filter, leave it cold for a week and look for crystals; then add solubility_pct.",
    );
    const avoid = [{ hazard: "H360", reason: "fertility" }];
    const [unchecked] = search({ penetrationDepth_um: 60 }, { brief: { ...brief, avoid } }).warnings;
    expect(unchecked!.message).toContain("so whether the brief avoids it is not known. Read");
  });

  it("does not look for crystals of a liquid", () => {
    const { formulation } = withOnly(work, { ...AB, state: "liquid" }, 0.001);
    const { warnings } = search({ penetrationDepth_um: 60 }, { formulation });
    expect(warnings.find(({ code }) => code === "solubility-unknown")!.message).toContain(
      "look for haze or a second layer",
    );
  });

  it("says why no level does it", () => {
    const none = search({ penetrationDepth_um: 5000 });
    expect([none.outcome, none.reason]).toEqual([
      "impossible",
      "Without AB it is 335 µm already, and absorber only takes it further: to bring the penetration depth to 5000 µm, change the initiator.",
    ]);
    const never = search({ penetrationDepth_um: 0.5 });
    expect(never.outcome).toBe("impossible");
    expect(never.reason).toMatch(
      /^Even 10 % AB, the most that is tried, brings it only to 1\.\d+ µm, not the penetration depth to 0\.5 µm/,
    );
  });

  it("does not touch what the brief avoids, and does not guess at missing data", () => {
    const avoid = [{ ingredient: "AB", reason: "stains" }];
    expect(search({ penetrationDepth_um: 60 }, { brief: { ...brief, avoid } })).toMatchObject({
      outcome: "avoided",
      reason: "The brief avoids AB: stains.",
    });
    const on = stocked({ id: "DIM", spectrum: undefined });
    const dim = absorberFor({ ...work, shelf: on, ingredient: "DIM", wanted: { penetrationDepth_um: 60 } });
    expect([dim.outcome, dim.reason]).toEqual([
      "unknown",
      "DIM has no absorption spectrum; add one to spectra/ and name it in the ingredient.",
    ]);
  });

  it.each<[object, string]>([
    [
      {},
      "absorberFor: wanted holds nothing; give one of penetrationDepth_um, layerExposure_mJcm2, layerTime_s",
    ],
    [
      { penetrationDepth_um: 60, layerTime_s: 3 },
      "absorberFor: wanted holds penetrationDepth_um and layerTime_s; give one of",
    ],
    [{ layerTime_s: -1 }, "absorberFor: wanted: layerTime_s is -1; it must be a finite number above 0"],
    [{ layerTimes: 3 }, 'absorberFor: wanted: unknown field "layerTimes"; did you mean "layerTime_s"?'],
  ])("refuses to look for %j", (wanted, message) => {
    expect(() => search(wanted)).toThrow(message);
  });

  it("refuses what is no absorber", () => {
    const of = (ingredient: string) => () =>
      absorberFor({ ...work, ingredient, wanted: { penetrationDepth_um: 60 } });
    expect(of("PI")).toThrow('formulation "test": unknown absorber "PI"');
    expect(of("ABB")).toThrow('formulation "test": unknown ingredient "ABB"; did you mean "AB"?');
  });
});

describe("absorberCandidates", () => {
  it("lists every absorber, those that can do it first, long-term harm after the others, least needed first", () => {
    const on: Shelf = {
      ...stocked(
        { id: "STRONG", spectrum: "strong" },
        { id: "DIM", spectrum: undefined },
        { id: "SHORT", spectrum: "short" },
        { id: "TIGHT", solubility_pct: sure(0.01) },
        { id: "BANNED" },
        { id: "GRAVE", spectrum: "strong", hazards: PI.hazards },
      ),
      spectra: new Map([
        ...shelf.spectra,
        ["strong", { ...shelf.spectra.get("ab")!, id: "strong", values: [2e4, 2e4, 2e4] }],
        ["short", { ...shelf.spectra.get("ab")!, id: "short", wavelengths_nm: [380, 390, 400] }],
      ]),
    };
    const avoid = [{ ingredient: "BANNED", reason: "stains" }];
    const answers = absorberCandidates({
      ...work,
      shelf: on,
      brief: { ...brief, avoid },
      wanted: { penetrationDepth_um: 60 },
      draws: 40,
    });
    expect(answers.map(({ ingredient, outcome }) => `${ingredient} ${outcome}`)).toEqual([
      "STRONG reached",
      "AB reached",
      "GRAVE reached",
      "TIGHT above solubility",
      "DIM unknown",
      "SHORT unknown",
      "BANNED avoided",
    ]);
    expect(answers[5]!.reason).toContain('spectrum "short"');
    expect(answers.map(({ hazards }) => hazards)).toEqual(
      answers.map(({ ingredient }) => (ingredient === "GRAVE" ? ["H360FD"] : undefined)),
    );
    expect(answers[4]!.warnings.map(({ code }) => code)).toEqual(["hazards-unchecked"]);
  });
});
