import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import type { Case } from "../../lib/assess/case.js";
import { InputError } from "../../lib/door.js";
import { calibrate } from "../../lib/decide/calibrate.js";
import { dataHashOf } from "../../lib/lab/dataHash.js";
import { formulate } from "../../lib/recipe/formulation.js";
import type { CureDepthSeries } from "../../lib/recipe/cureDepths.js";
import type { BlendReadings } from "../../lib/recipe/readings.js";
import { withInteraction, type Shelf } from "../../lib/recipe/shelf.js";
import type { WindowReadings } from "../../lib/recipe/windowReadings.js";
import { brief, shelf, sure } from "../fixtures.js";

const recipe = {
  id: "made",
  title: "made for a test",
  normalise: false,
  parts: [
    { ingredient: "THIN", mass_pct: 55 },
    { ingredient: "THICK", lot: "T-7", mass_pct: 43 },
    { ingredient: "PI", mass_pct: 1.5 },
    { ingredient: "AB", mass_pct: 0.5 },
  ],
};
const made = { source: "made up for a test", status: "invented for the demo" } as const;
const depthsOf = (id: string, parts: CureDepthSeries["parts"]): CureDepthSeries => ({
  id,
  kind: "cure depths",
  formulation: "made",
  parts,
  light: { spectrum: "lamp", irradiance_mWcm2: sure(8, 0.4) },
  depthU_um: 4,
  spots: [
    [8, 41],
    [12, 66],
    [20, 88],
    [20, 94],
    [35, 121],
    [70, 153],
  ].map(([exposure_mJcm2, cureDepth_um]) => ({
    exposure_mJcm2: exposure_mJcm2!,
    cureDepth_um: cureDepth_um!,
    reading: "measured",
  })),
  ...made,
});
const windowReadingsOf = (formulation: string, parts: CureDepthSeries["parts"]): WindowReadings => ({
  kind: "window",
  id: `window of ${formulation}`,
  formulation,
  parts,
  spectrum: "lamp",
  temperature_C: 25,
  film: "OPEN",
  filmThickness_um: { value: 200, u: 10 },
  gasPressure_Pa: 101325,
  inductionTimes: [{ until: "first gel", irradiance_mWcm2: 8, time_s: { value: 1, u: 0.2 } }],
  uncuredLayers: [{ irradiance_mWcm2: 8, gasOxygenFraction: 0.2095, thickness_um: { value: 15, u: 2 } }],
  ...made,
});
const readingsOf = (first: string, second: string): BlendReadings => ({
  id: `${first}-${second}`,
  pair: [first, second],
  temperature_C: 25,
  relativeU: 0.03,
  massFractions: [1, 0.7, 0.4, 0],
  viscosities_mPas: [9000, 900, 120, 11],
  ...made,
});
const G = (value: number) => sure(value, 0.1);
const stocked: Shelf = {
  ...[
    { pair: ["THICK", "THIN"], basis: "mass", G: G(-1), temperature_C: 20 } as const,
    { pair: ["MID", "THIN"], basis: "mass", G: G(-2), temperature_C: 25 } as const,
  ].reduce(withInteraction, shelf),
  readings: [readingsOf("THICK", "THIN"), readingsOf("THICK", "MID"), readingsOf("MID", "OTHER")],
  cureDepths: [depthsOf("ours", recipe.parts), depthsOf("other", [{ ingredient: "MID", mass_pct: 100 }])],
  windowReadings: [
    windowReadingsOf("made", recipe.parts),
    windowReadingsOf("other", [{ ingredient: "MID", mass_pct: 100 }]),
  ],
};
const workOn = (on: Shelf, change: Partial<Case["brief"]> = {}): Case => ({
  brief: { ...brief, targets: { viscosity_mPas: { max: 300 } }, ...change },
  shelf: on,
  formulation: formulate({ recipe, shelf: on }),
});
const work = workOn(stocked);
const hash = dataHashOf(work);

/** Every number of a value, each in turn a little larger. */
function* withOneNumberChanged<T>(value: T): Generator<T> {
  if (typeof value === "number") yield (value === 0 ? 0.01 : value * 1.01) as T;
  if (typeof value !== "object" || value === null) return;
  if (value instanceof Map) {
    for (const [key, one] of value as Map<unknown, unknown>)
      for (const changed of withOneNumberChanged(one)) yield new Map(value).set(key, changed) as T;
    return;
  }
  for (const [key, one] of Object.entries(value)) {
    for (const changed of withOneNumberChanged(one as unknown)) {
      if (Array.isArray(value)) yield value.with(Number(key), changed) as T;
      else yield { ...value, [key]: changed };
    }
  }
}

/** The assessment as text, or that the case is refused: calibration checks all readings of the shelf. */
const assessed = (one: Case) => {
  try {
    return JSON.stringify(assess({ ...calibrate(one), draws: 40 }));
  } catch (error) {
    if (error instanceof InputError) return "refused";
    throw error;
  }
};

describe("dataHashOf", () => {
  it("of a calibrated case holds what calibration made of the measurements", () => {
    const known = calibrate(work);
    const all = dataHashOf(known);
    expect(all).not.toBe(hash);
    expect(dataHashOf({ ...known, oxygenCorrection: undefined })).not.toBe(all);
    expect(dataHashOf({ ...known, shelf: { ...known.shelf, workingCurves: [] } })).not.toBe(all);
  });

  it("changes with every figure that changes an assessment", () => {
    const before = assessed(work);
    const outcomes = { told: 0, unused: 0, changedBoth: 0 };
    const changedCases = [
      ...[...withOneNumberChanged(stocked)].map((on) => workOn(on)),
      ...[...withOneNumberChanged(work.formulation)].map((formulation) => ({ ...work, formulation })),
      ...[...withOneNumberChanged(work.brief)].map((changed) => ({ ...work, brief: changed })),
    ];
    for (const changed of changedCases) {
      const sameHash = dataHashOf(changed) === hash;
      const result = assessed(changed);
      const sameResult = result === before;
      if (sameHash) expect([before, "refused"]).toContain(result);
      outcomes[sameHash ? "unused" : sameResult ? "told" : "changedBoth"]++;
    }
    // About a hundred figures move a result; those of what is not in the formulation move neither.
    expect(outcomes.changedBoth).toBeGreaterThan(80);
    expect(outcomes.unused).toBeGreaterThan(10);
  }, 300_000);

  it("stays where something unused changes", () => {
    const without = (key: "ingredients" | "lots" | "spectra", id: string) => {
      const kept = new Map<string, never>(stocked[key] as ReadonlyMap<string, never>);
      expect(kept.delete(id)).toBe(true);
      return { ...work, shelf: { ...stocked, [key]: kept } };
    };
    expect(dataHashOf(without("ingredients", "SAND"))).toBe(hash);
    expect(dataHashOf(without("ingredients", "MID"))).toBe(hash);
    expect(dataHashOf(without("lots", "T-7"))).toBe(hash);
    const films = new Map([...shelf.films, ["TIGHT", shelf.films.get("OPEN")!]]);
    expect(dataHashOf({ ...work, shelf: { ...stocked, films } })).toBe(hash);
    const interactions = stocked.interactions.filter(({ pair }) => !pair.includes("MID"));
    expect(dataHashOf({ ...work, shelf: { ...stocked, interactions } })).toBe(hash);
    const readings = stocked.readings.slice(0, 2);
    expect(dataHashOf({ ...work, shelf: { ...stocked, readings } })).toBe(hash);
    const cureDepths = stocked.cureDepths.slice(0, 1);
    expect(dataHashOf({ ...work, shelf: { ...stocked, cureDepths } })).toBe(hash);
    const windowReadings = stocked.windowReadings.slice(0, 1);
    expect(dataHashOf({ ...work, shelf: { ...stocked, windowReadings } })).toBe(hash);
  });

  it.each<[string, Case]>([
    [
      "a lot left out",
      {
        ...work,
        formulation: formulate({
          recipe: {
            ...recipe,
            parts: recipe.parts.map(({ ingredient, mass_pct }) => ({ ingredient, mass_pct })),
          },
          shelf: stocked,
        }),
      },
    ],
    [
      "a spectrum",
      {
        ...work,
        shelf: { ...stocked, spectra: new Map([...stocked.spectra].filter(([id]) => id !== "ab")) },
      },
    ],
    [
      "the engine's spectrum",
      {
        ...work,
        shelf: { ...stocked, spectra: new Map([...stocked.spectra].filter(([id]) => id !== "lamp")) },
      },
    ],
    ["an interaction of its pair", { ...work, shelf: { ...stocked, interactions: [] } }],
    [
      "readings of one of its liquids with another",
      { ...work, shelf: { ...stocked, readings: stocked.readings.slice(0, 1) } },
    ],
    [
      "a source",
      {
        ...work,
        brief: {
          ...work.brief,
          light: {
            ...work.brief.light,
            irradiance_mWcm2: { ...work.brief.light.irradiance_mWcm2, source: "another meter" },
          },
        },
      },
    ],
    [
      "what is to be avoided",
      { ...work, brief: { ...work.brief, avoid: [{ hazard: "H360", reason: "not this" }] } },
    ],
    ["calibration", calibrate(work)],
  ])("tells %s", (_, changed) => {
    expect(dataHashOf(changed)).not.toBe(hash);
  });

  it("does not hang on the order of keys, the case's own extra fields or the place of files", () => {
    const backwards = <T>(value: T): T => {
      if (Array.isArray(value)) return value.map(backwards) as T;
      if (typeof value !== "object" || value === null || value instanceof Map) return value;
      const entries = Object.entries(value).map(([key, one]) => [key, backwards(one)] as const);
      return Object.fromEntries(entries.reverse()) as T;
    };
    expect(Object.keys(backwards(work.brief))).not.toEqual(Object.keys(work.brief));
    expect(dataHashOf({ ...backwards({ ...work, file: "elsewhere/test.json" }) })).toBe(hash);
    const moved = { ...work.brief, formulation: "../elsewhere/made.json", shelf: ["elsewhere"] };
    expect(dataHashOf({ ...work, brief: moved })).toBe(hash);
    expect(dataHashOf({ ...work, brief: { ...work.brief, note: undefined } as Case["brief"] })).toBe(hash);
  });

  // Known answer, so that the form that is hashed cannot drift unseen: sha256sum of the text below, by GNU coreutils.
  it("hashes the JSON that its documentation describes", () => {
    const ingredient = {
      role: "diluent",
      id: "µ",
      name: 'a "name"',
      state: "liquid",
      functionality: 1e21,
    } as const;
    const formulation = { title: "two", id: "b", components: [{ massFraction: 0.1 + 0.2, ingredient }] };
    // {"formulation":{"components":[{"ingredient":{"functionality":1e+21,"id":"µ","name":"a \"name\"","role":"diluent","state":"liquid"},"massFraction":0.30000000000000004}],"id":"b","title":"two"}}
    expect(dataHashOf({ formulation })).toBe(
      "8ac4eab35d4c1c422145dced28e8dff7ed02c6bb27aa7c2c5b719ddfb3c7d425",
    );
  });

  it("refuses a number that is not finite, and says where it stands", () => {
    const changed = { ...work, brief: { ...work.brief, temperature_C: NaN } };
    expect(() => dataHashOf(changed)).toThrow(
      "dataHashOf.brief.temperature_C is NaN; a hash is taken of finite numbers and text",
    );
  });
});
