import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { workingCurveOf } from "../../lib/assess/cure.js";
import { deadZoneOf } from "../../lib/assess/oxygen.js";
import type { Brief, PropertyName } from "../../lib/recipe/brief.js";
import { openBrief } from "../../lib/recipe/files.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const run = (change: Partial<Brief> = {}, what = formulation) =>
  assess({ formulation: what, brief: { ...brief, ...change }, shelf, draws: 300 });
const valueOf = (property: ReturnType<typeof run>["properties"][PropertyName]) =>
  property.outcome === "value" ? property.value : NaN;

describe("workingCurveOf", () => {
  // With light at the window only and everything sure, the layer's exposure is Ec exp(depth / Dp), exactly.
  it("is one curve: exposure of a layer from penetration depth and critical exposure", () => {
    const {
      penetrationDepth_um: Dp,
      criticalExposure_mJcm2: Ec,
      ...layer
    } = workingCurveOf({ formulation, brief, shelf });
    const expected = Ec.value * Math.exp((1.5 * 50) / Dp.value);
    expect(layer.layerExposure_mJcm2.value / expected).toBeCloseTo(1, 10);
    expect(layer.layerTime_s.value / (expected / 8)).toBeCloseTo(1, 10);
  });

  it("refuses a resin that no light starts", () => {
    expect(() => workingCurveOf({ formulation: formulationOf({ THIN: 100 }), brief, shelf })).toThrow(
      'formulation "test": no photoinitiator in it',
    );
  });
});

describe("deadZoneOf", () => {
  const zone = (change: Partial<Brief>) =>
    deadZoneOf({ formulation, brief: { ...brief, ...change }, shelf, draws: 300 });

  it("vanishes without oxygen below the film, with a warning", () => {
    const none = zone({ window: { ...brief.window, gasOxygenFraction: 0 } });
    expect(none.outcome === "value" && [none.value, none.high]).toEqual([0, 0]);
    expect(none.warnings.map(({ code }) => code)).toContain("no-oxygen-below");
  });

  it("says that a light too weak for the window never cures", () => {
    const dark = zone({ light: { ...brief.light, irradiance_mWcm2: sure(0.001) } });
    expect(dark.outcome).toBe("never-cures");
    expect(dark.outcome === "never-cures" && dark.share).toBeGreaterThan(0.9);
    expect(dark.warnings.map(({ message }) => message).join()).toMatch(
      /^In 100 % of the draws this light never/,
    );
  });

  it("gives the share of draws that never cure beside a thickness, and what would help", () => {
    const edge = zone({ light: { ...brief.light, irradiance_mWcm2: sure(0.12) } });
    expect(edge.outcome === "value" && edge.neverCuresShare).toBeGreaterThan(0);
    expect(edge.warnings.find(({ code }) => code === "may-never-cure")!.message).toMatch(
      /In [\d.]+ % of the draws/,
    );
  });

  it("spans all draws that cure where they are too few to leave any out", () => {
    const dim = { ...brief, light: { ...brief.light, irradiance_mWcm2: sure(0.12) } };
    const few = deadZoneOf({ formulation, brief: dim, shelf, draws: 40 });
    expect(few.outcome === "value" && few.neverCuresShare).toBeGreaterThan(0);
    expect(few.outcome === "value" && few.low < few.value && few.value < few.high).toBe(true);
  });

  it("refuses a film it does not know", () => {
    expect(() => zone({ window: { ...brief.window, film: "OPN" } })).toThrow(
      'brief "test": unknown film "OPN"; did you mean "OPEN"?',
    );
  });
});

describe("assess", () => {
  it("gives the same answer for the same seed", () => {
    expect(run()).toEqual(run());
  });

  it("keeps every value inside its own interval", () => {
    for (const property of Object.values(run().properties)) {
      if (property.outcome !== "value") continue;
      expect(property.low, property.title).toBeLessThanOrEqual(property.value);
      expect(property.high, property.title).toBeGreaterThanOrEqual(property.value);
    }
  });

  it("judges a target as met, failed or not to be told, by the share of draws", () => {
    const { low, value, high } = run().properties.viscosity_mPas;
    const verdict = (min: number, max: number) =>
      run({ targets: { viscosity_mPas: { min, max } } }).verdicts[0]!;
    expect(verdict(low / 2, high * 2)).toMatchObject({
      outcome: "meets",
      title: "viscosity at print temperature",
    });
    expect(verdict(high * 2, high * 3)).toMatchObject({ outcome: "fails", share: 0 });
    expect(verdict(value, high * 2).outcome).toBe("cannot tell");
  });

  it("counts a draw that never cures as missing a dead-zone target", () => {
    const dark = { ...brief.light, irradiance_mWcm2: sure(0.001) };
    expect(run({ light: dark, targets: { deadZone_um: { max: 1e9 } } }).verdicts[0]!.outcome).toBe("fails");
  });

  it("warns where the brief avoids a statement and an ingredient was never checked", () => {
    const codes = (avoid: Brief["avoid"], what = formulation) =>
      run({ avoid }, what).warnings.filter(({ code }) => code === "hazards-unchecked");
    const avoid = [{ hazard: "H350", reason: "a house rule" }];
    expect(codes(avoid).map(({ message }) => message)).toEqual([
      "The brief avoids H350, and nobody has checked which hazard statements AB carry: they may carry it. Take the statements from the safety data sheets into the ingredients' files.",
    ]);
    expect(codes([])).toEqual([]);
    expect(codes(avoid, formulationOf({ THIN: 60, THICK: 39, PI: 1 }))).toEqual([]);
  });

  it("refuses to avoid an ingredient that is not on the shelf", () => {
    expect(() => run({ avoid: [{ ingredient: "thn", reason: "a slip" }] })).toThrow(
      'brief "test": avoid[0].ingredient: unknown ingredient "thn"; did you mean "THIN"?',
    );
  });

  it("warns of a solid that may not or does not dissolve, lots and parts together", () => {
    const ingredients = new Map(shelf.ingredients);
    ingredients.set("PI", { ...shelf.ingredients.get("PI")!, solubility_pct: sure(1, 0.5) });
    const codes = (PI: number) =>
      assess({
        formulation: formulationOf({ THIN: 100 - PI, PI }, { ...shelf, ingredients }),
        ...{ brief, shelf, draws: 40 },
      }).warnings.filter(({ code }) => code.endsWith("dissolve"));
    expect(codes(1)).toEqual([]);
    expect(codes(1.9)).toEqual([
      {
        code: "may-not-dissolve",
        message:
          "1.9 % of PI may be more than a liquid resin dissolves (1 ± 0.5 %). Stir a sample, leave it cold for a night and look for crystals before you make a batch.",
      },
    ]);
    expect(codes(2.1)).toEqual([
      {
        code: "does-not-dissolve",
        message:
          "2.1 % of PI is more than a liquid resin dissolves (1 ± 0.5 %). What stays solid settles, and takes no part in what is computed here: take less, or measure how much dissolves and put it on the shelf.",
      },
    ]);
  });

  it("finds what is to be avoided by name and by hazard, with the reason", () => {
    const avoid = [
      { ingredient: "THIN", reason: "smells" },
      { hazard: "H360", reason: "fertility" },
      { ingredient: "MID", reason: "not in it" },
    ];
    expect(run({ avoid }).avoided).toEqual([
      { ingredient: "THIN", reason: "smells" },
      { ingredient: "PI", reason: "fertility" },
    ]);
  });

  // Each field of the brief must move the property it is there for; one that moves nothing would be dead.
  it.each<[string, Partial<Brief>, PropertyName]>([
    ["temperature_C", { temperature_C: 35 }, "viscosity_mPas"],
    ["layerThickness_um", { layerThickness_um: 100 }, "layerExposure_mJcm2"],
    ["cureDepthPerLayer", { cureDepthPerLayer: 2 }, "layerExposure_mJcm2"],
    ["irradiance_mWcm2", { light: { ...brief.light, irradiance_mWcm2: sure(16) } }, "inductionTime_s"],
    ["filmThickness_um", { window: { ...brief.window, filmThickness_um: sure(800) } }, "deadZone_um"],
    ["gasOxygenFraction", { window: { ...brief.window, gasOxygenFraction: 1 } }, "deadZone_um"],
    ["gasPressure_Pa", { window: { ...brief.window, gasPressure_Pa: 50000 } }, "deadZone_um"],
  ])("%s moves the assessment", (_, change, property) => {
    const before = valueOf(run().properties[property]);
    expect(Math.abs(valueOf(run(change).properties[property]) / before - 1)).toBeGreaterThan(0.01);
  });

  it("moves each property the right way", () => {
    const value = (change: Partial<Brief>, name: PropertyName) => valueOf(run(change).properties[name]);
    const bright = { light: { ...brief.light, irradiance_mWcm2: sure(16) } };
    expect(value(bright, "inductionTime_s")).toBeCloseTo(value({}, "inductionTime_s") / 2, 10);
    expect(value(bright, "deadZone_um")).toBeLessThan(value({}, "deadZone_um"));
    expect(value(bright, "penetrationDepth_um")).toBe(value({}, "penetrationDepth_um"));
  });
});

describe("the demo briefs", () => {
  it.each(["flow-cell", "screen-housing"])("%s is assessed with a value for every property", (id) => {
    const { properties, sources, avoided } = assess({ ...openBrief(`data/briefs/${id}.json`), draws: 300 });
    for (const property of Object.values(properties)) expect(property.outcome, property.title).toBe("value");
    expect(sources.length).toBeGreaterThan(20);
    expect(avoided).toEqual([]);
  });

  // Common practice, no source: a silicone window over air leaves 5 to 50 µm of resin uncured.
  it("flow-cell has a dead zone of the size that is common practice for a silicone window", () => {
    const zone = assess({ ...openBrief("data/briefs/flow-cell.json"), draws: 300 }).properties.deadZone_um;
    expect(zone.outcome === "value" && zone.value).toBeGreaterThan(5);
    expect(zone.outcome === "value" && zone.value).toBeLessThan(50);
  });

  // Derived in closed form for a fluoropolymer film of 127 µm: about a micrometre of standing dead zone, not tens.
  it("screen-housing has hardly any standing dead zone on its fluoropolymer film", () => {
    const zone = assess({ ...openBrief("data/briefs/screen-housing.json"), draws: 300 }).properties
      .deadZone_um;
    expect(zone.outcome === "value" && zone.value).toBeLessThan(5);
  });
});
