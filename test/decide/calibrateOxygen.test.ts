import { describe, expect, it } from "vitest";
import { workingCurveOf } from "../../lib/assess/cure.js";
import type { Case } from "../../lib/assess/case.js";
import { deadZoneOf, inductionTimeOf } from "../../lib/assess/oxygen.js";
import { calibrate } from "../../lib/decide/calibrate.js";
import { correctOxygen, learntFromWindow } from "../../lib/decide/calibrateOxygen.js";
import { parseJson } from "../../lib/recipe/document.js";
import { readWindowReadings, type WindowReadings } from "../../lib/recipe/windowReadings.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const formulation = formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 });
const work: Case = { formulation, brief, shelf };
const draws = 200;
const zoneOf = (one: Case) => {
  const zone = deadZoneOf({ ...one, draws });
  if (zone.outcome !== "value") throw new Error("must cure");
  return zone;
};
const expected = {
  zone: zoneOf(work).value,
  oxygen_s: inductionTimeOf({ ...work, draws }).value,
  gel_s: workingCurveOf({ ...work, draws }).criticalExposure_mJcm2.value / 8,
};

const readings = (
  times: [number, number][],
  layers: [number, number][],
  change: Partial<WindowReadings> = {},
) => ({
  kind: "window" as const,
  id: "w1",
  formulation: "test",
  parts: [
    { ingredient: "THIN", mass_pct: 60 },
    { ingredient: "THICK", mass_pct: 38.9 },
    { ingredient: "PI", mass_pct: 1 },
    { ingredient: "AB", mass_pct: 0.1 },
  ],
  spectrum: "lamp",
  temperature_C: 25,
  film: "OPEN",
  filmThickness_um: { value: 200, u: 20 },
  gasPressure_Pa: 101325,
  inductionTimes: times.map(([value, u]) => ({
    until: "oxygen used" as const,
    irradiance_mWcm2: 8,
    time_s: { value, u },
  })),
  uncuredLayers: layers.map(([value, u]) => ({
    irradiance_mWcm2: 8,
    gasOxygenFraction: 0.2095,
    thickness_um: { value, u },
  })),
  source: "constructed for a test",
  status: "invented for the demo" as const,
  ...change,
});
const knowing = (...files: WindowReadings[]): Case =>
  correctOxygen({ ...work, shelf: { ...shelf, windowReadings: files } });
const width = ({ low, high }: { low: number; high: number }) => Math.log(high / low);

describe("correctOxygen", () => {
  it("holds readings against the amounts that were on the window, whatever stands in the case now", () => {
    const file = readings([[expected.oxygen_s, 0.01 * expected.oxygen_s]], []);
    const strong = formulationOf({ THIN: 60, THICK: 34.9, PI: 5, AB: 0.1 });
    const now: Case = { ...work, formulation: strong, shelf: { ...shelf, windowReadings: [file] } };
    // It was read as expected, and stays so: five times the initiator does not make the reading a surprise.
    const told = correctOxygen(now);
    expect(told.oxygenCorrection?.warnings).toEqual([]);
    const fractions = (one: Case) => one.formulation.components.map(({ massFraction }) => massFraction);
    const takenOn = fractions(told.oxygenCorrection!.takenOn);
    takenOn.forEach((massFraction, i) => expect(massFraction).toBeCloseTo(fractions(work)[i]!, 12));
    const ratio = inductionTimeOf({ ...told, draws }).value / inductionTimeOf({ ...now, draws }).value;
    expect(ratio).toBeCloseTo(1, 2);
  });

  it("leaves a case alone that no readings are there for: other formulation, other light", () => {
    expect(correctOxygen(work)).toBe(work);
    const parts = [
      { ingredient: "MID", mass_pct: 99 },
      { ingredient: "PI", mass_pct: 1 },
    ];
    for (const change of [{ parts }, { spectrum: undefined, wavelength_nm: 405 }])
      expect(knowing(readings([[1, 0.1]], [], change)).oxygenCorrection).toBeUndefined();
  });

  it("says what was read, with the doubt of the reading, where that is small", () => {
    const told = knowing(readings([[0.8 * expected.oxygen_s, 0.002]], [[1.2 * expected.zone, 0.02]]));
    expect(inductionTimeOf({ ...told, draws }).value).toBeCloseTo(0.8 * expected.oxygen_s, 4);
    const zone = zoneOf(told);
    expect(zone.value / (1.2 * expected.zone)).toBeCloseTo(1, 4);
    // 95 % of a normal spread is 3.92 standard deviations wide; 200 draws place its ends to a tenth.
    expect(width(zone) / ((3.92 * 0.02) / (1.2 * expected.zone))).toBeGreaterThan(0.85);
    expect(width(zone) / ((3.92 * 0.02) / (1.2 * expected.zone))).toBeLessThan(1.15);
  });

  it("changes nothing by a reading in great doubt", () => {
    const told = knowing(readings([[9 * expected.oxygen_s, 1e9]], [[9 * expected.zone, 1e9]]));
    // sqrt(ln(1 + u^2)) is 6 for so large a u, against 0.4 to 0.7 of the figures.
    expect(zoneOf(told).value / zoneOf(work).value).toBeCloseTo(1, 1);
    expect(width(zoneOf(told)) / width(zoneOf(work))).toBeCloseTo(1, 1);
  });

  it("narrows from either reading alone, and more from both", () => {
    const time: [number, number][] = [[expected.oxygen_s, 0.05 * expected.oxygen_s]];
    const layer: [number, number][] = [[expected.zone, 0.05 * expected.zone]];
    const [none, byTime, byLayer, both] = [
      work,
      knowing(readings(time, [])),
      knowing(readings([], layer)),
      knowing(readings(time, layer)),
    ];
    expect(width(inductionTimeOf({ ...byTime, draws }))).toBeLessThan(
      0.3 * width(inductionTimeOf({ ...none, draws })),
    );
    expect(width(zoneOf(byTime))).toBeLessThan(width(zoneOf(none)));
    expect(width(zoneOf(byLayer))).toBeLessThan(0.3 * width(zoneOf(none)));
    expect(width(zoneOf(both))).toBeLessThan(1.05 * width(zoneOf(byLayer)));
    expect(width(inductionTimeOf({ ...both, draws }))).toBeLessThan(
      width(inductionTimeOf({ ...byLayer, draws })),
    );
  });

  it("carries what it learnt to another light: twice the light halves the induction time that was read", () => {
    const told = knowing(readings([[0.8 * expected.oxygen_s, 0.002]], []));
    const light = { ...brief.light, irradiance_mWcm2: sure(16, 1.6) };
    const bright = inductionTimeOf({ ...told, brief: { ...brief, light }, draws });
    expect(bright.value).toBeCloseTo(0.4 * expected.oxygen_s, 4);
    expect(width(bright)).toBeLessThan(0.1);
  });

  it("says nothing of a film that it was not read on", () => {
    const other = { ...shelf.films.get("OPEN")!, id: "OTHER" };
    const films = new Map([...shelf.films, ["OTHER", other]]);
    const file = readings([], [[0.5 * expected.zone, 0.02]]);
    const told = correctOxygen({ ...work, shelf: { ...shelf, films, windowReadings: [file] } });
    const onOther = { ...told, brief: { ...brief, window: { ...brief.window, film: "OTHER" } } };
    expect(zoneOf(onOther).value).toBeGreaterThan(1.0001 * zoneOf(told).value);
  });

  it("takes the readings of the last shelf folder", () => {
    const [first, last] = [readings([[5, 0.01]], []), readings([[0.7, 0.001]], [])];
    expect(inductionTimeOf({ ...knowing(first, last), draws }).value).toBeCloseTo(0.7, 3);
  });

  it("warns of a reading that contradicts the figures, wherever oxygen is spoken of", () => {
    const told = knowing(readings([], [[20 * expected.zone, 0.5]]));
    const [warning] = zoneOf(told).warnings;
    expect(warning!.code).toBe("reading-contradicts");
    expect(warning!.message).toMatch(
      /µm of uncured layer at 8 mW\/cm² over 20.95 % oxygen \(\S+\) is more than the figures allow, by \d+(\.\d)? standard deviations\. Check its unit, its u and the light/,
    );
    expect(inductionTimeOf({ ...told, draws }).warnings).toEqual([warning]);
    expect(zoneOf(knowing(readings([], [[expected.zone, 0.5]]))).warnings).toEqual([]);
  });

  it("belongs to calibrate", () => {
    const windowReadings = [readings([[0.7, 0.001]], [])];
    const told = calibrate({ ...work, shelf: { ...shelf, windowReadings } });
    expect(inductionTimeOf({ ...told, draws }).value).toBeCloseTo(0.7, 3);
  });

  it("names the reading among the sources and in the doubt", () => {
    const zone = zoneOf(knowing(readings([], [[expected.zone, 0.1 * expected.zone]])));
    expect(zone.doubt[0]!.label).toBe("uncured-layer reading 1 of w1");
    expect(zone.sources.map(({ source }) => source)).toContain("constructed for a test");
  });
});

describe("learntFromWindow", () => {
  it("tells each figure before and after, and how each reading lay", () => {
    expect(learntFromWindow(work)).toBeUndefined();
    const learnt = learntFromWindow({
      ...knowing(readings([[0.5 * expected.oxygen_s, 0.01]], [[expected.zone, 0.3]])),
      draws,
    })!;
    const [radicals] = learnt.figures;
    expect(radicals!.figure).toBe("radicals started by the light");
    expect(radicals!.before.value).toBe(1);
    expect(radicals!.after.value).toBeGreaterThan(1);
    expect(width(radicals!.after)).toBeLessThan(width(radicals!.before));
    expect(learnt.readings.map(({ reading, unit }) => [reading, unit])).toEqual([
      ["light until oxygen is used up at 8 mW/cm²", "s"],
      ["uncured layer at 8 mW/cm² over 20.95 % oxygen", "µm"],
    ]);
    expect(learnt.readings[0]!.surprise).toBeLessThan(-1);
  });

  it("gives back the reading of the first gel", () => {
    const file = readings([[expected.gel_s / 2, 0.0005]], []);
    const inductionTimes = file.inductionTimes.map((one) => ({ ...one, until: "first gel" as const }));
    const told = knowing({ ...file, inductionTimes });
    expect(workingCurveOf({ ...told, draws }).criticalExposure_mJcm2.value / 8).toBeCloseTo(
      expected.gel_s / 2,
      4,
    );
  });
});

describe("readWindowReadings", () => {
  const read = (change: object) =>
    readWindowReadings(
      parseJson(JSON.stringify({ ...readings([[1, 0.1]], [[10, 1]]), ...change }, null, 1), "w.json"),
    );

  it("reads what it wrote", () => {
    expect(read({})).toEqual(readings([[1, 0.1]], [[10, 1]]));
  });

  it("takes a wavelength as a number, as text, or as the brief states it", () => {
    const stated = { value: "405 nm", u: 4, source: "nominal", status: "common practice" };
    for (const wavelength_nm of [405, "405 nm", stated])
      expect(read({ spectrum: undefined, wavelength_nm }).wavelength_nm).toBe(405);
    expect(() => read({ spectrum: undefined, wavelength_nm: { ...stated, uu: 1 } })).toThrow(
      'wavelength_nm has an unknown field "uu"',
    );
    expect(() => read({ spectrum: undefined, wavelength_nm: 4050 })).toThrow(
      "is 4050; it must be at most 700",
    );
    expect(() => read({ spectrum: undefined })).toThrow("neither of spectrum and wavelength_nm");
  });

  it.each([
    [{ gasPressure_Pa: 1.013 }, "gasPressure_Pa is 1.013; it must be at least 1000"],
    [
      { inductionTimes: [], uncuredLayers: [] },
      "w.json: neither inductionTimes nor uncuredLayers holds a reading; give at least one",
    ],
    [
      { wavelength_nm: 405 },
      "w.json: both of spectrum and wavelength_nm is given; name the light with one of them",
    ],
    [{ spectrum: undefined }, "w.json: neither of spectrum and wavelength_nm is given"],
    [
      { inductionTimes: [{ until: "first gell", irradiance_mWcm2: 8, time_s: { value: 1, u: 0.1 } }] },
      'inductionTimes[0].until is "first gell"; it must be one of "first gel", "oxygen used"; did you mean "first gel"?',
    ],
    [
      { inductionTimes: [{ until: "first gel", irradiance_mWcm2: 8, time_s: { value: 1, u: 0 } }] },
      "inductionTimes[0].time_s.u is 0; it must be above 0",
    ],
    [
      { uncuredLayers: [{ irradiance_mWcm2: 8, thickness_um: { value: "1 s", u: 0.1 } }] },
      'uncuredLayers[0].thickness_um.value is "1 s"; it must be a quantity that converts to µm',
    ],
    [{ uncuredLayer: [] }, 'the file has an unknown field "uncuredLayer"; did you mean "uncuredLayers"?'],
  ])("refuses %j", (change, message) => {
    expect(() => read(change)).toThrow(message);
  });
});
