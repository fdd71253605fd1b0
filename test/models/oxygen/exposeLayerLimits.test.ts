import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  evenLightDepth,
  evenLightFlux,
  exposeLayer,
  inductionTime,
  sealedConversion,
  steadyOxygenProfile,
  depthsAtLevel,
  wallOxygenAfterSupplyCut,
  type LayerExposure,
  type LayerInput,
} from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

const noFilm = { film: "resists", filmEquivalentThickness_um: 0 } as const;
const film = { film: "resists", filmEquivalentThickness_um: 10 } as const;
const base: LayerInput = { ...P0, window: film, schedule: [{ duration_s: 5, relativeIrradiance: 1 }] };
const expose = (change: Partial<LayerInput>): LayerExposure => exposeLayer({ ...base, ...change });
const relative = (found: number, expected: number): number => Math.abs(found / expected - 1);

/** Every number of a result, however deep. */
function numbersOf(value: unknown): number[] {
  if (typeof value === "number") return [value];
  return typeof value === "object" && value !== null ? Object.values(value).flatMap(numbersOf) : [];
}

describe("exposeLayer keeps the books", () => {
  it("explains all oxygen to 1e-10, whatever window, light and time", () => {
    const windows = fc.constantFrom<LayerInput["window"]>(
      noFilm,
      film,
      { film: "tight" },
      { film: "stores", filmThickness_um: 50, filmDiffusivity_m2s: 3e-9, filmPartition: 1.7, sealed: false },
      { film: "stores", filmThickness_um: 50, filmDiffusivity_m2s: 3e-9, filmPartition: 1.7, sealed: true },
    );
    const step = fc.record({
      duration_s: fc.double({ min: 0.01, max: 8, noNaN: true }),
      relativeIrradiance: fc.constantFrom(0, 0.3, 1, 5),
      saturation_molm3: fc.constantFrom(0, 1, 4.8),
      supplyCut: fc.boolean(),
    });
    const inputs = fc.record({
      window: windows,
      schedule: fc.array(step, { minLength: 1, maxLength: 4 }),
      oxygenPerRadical: fc.constantFrom(0.5, 1, 3),
      napierianAbsorption_percm: fc.constantFrom(0, 100, 3000),
      curedDiffusivityShare: fc.constantFrom(1, 0.05),
      cells: fc.constant(60),
      tolerance: fc.constant(1e-3),
    });
    fc.assert(
      fc.property(inputs, (input) => {
        const layer = expose(input);
        expect(layer.oxygenImbalance).toBeLessThan(1e-10);
        expect(numbersOf(layer).every((value) => Number.isFinite(value))).toBe(true);
        expect(layer.end.conversion.every((X) => X >= 0 && X <= 1)).toBe(true);
        expect(layer.end.oxygen_molm3.every((C) => C >= 0)).toBe(true);
      }),
      { numRuns: 60 },
    );
  });

  it("gives the same fields over z/L when everything is scaled: (Ri, kt, alpha, L, l, t) to (m^2, m^-2, m, 1/m, 1/m, 1/m^2)", () => {
    const m = 2;
    const scaled = expose({
      radicalGeneration_molm3s: m ** 2 * 0.5,
      termination_m3mols: 2500 / m ** 2,
      napierianAbsorption_percm: m * 100,
      gapThickness_um: 100 / m,
      window: { film: "resists", filmEquivalentThickness_um: 10 / m },
      schedule: [{ duration_s: 5 / m ** 2, relativeIrradiance: 1 }],
    });
    const plain = expose({});
    scaled.end.oxygen_molm3.forEach((C, i) =>
      expect(Math.abs(C - plain.end.oxygen_molm3[i]!)).toBeLessThan(1e-9),
    );
    scaled.end.conversion.forEach((X, i) =>
      expect(Math.abs(X - plain.end.conversion[i]!)).toBeLessThan(1e-9),
    );
  });

  it("moves the way it should with each input", () => {
    const moves: readonly [Partial<LayerInput>, (layer: LayerExposure) => number, 1 | -1][] = [
      [{ radicalGeneration_molm3s: 0.55 }, (layer) => layer.end.deadZone.byGel_um!, -1],
      [{ oxygenPerRadical: 1.1 }, (layer) => layer.inductionTime_s!, -1],
      [
        { window: { film: "resists", filmEquivalentThickness_um: 12 } },
        (layer) => layer.end.deadZone.byGel_um!,
        -1,
      ],
      [{ saturation_molm3: 1.1 }, (layer) => layer.end.deadZone.byGel_um!, 1],
      [{ oxygen_molm3: 1.1 }, (layer) => layer.gelTime_s!, 1],
      [{ diffusivity_m2s: 1.2e-10 }, (layer) => layer.end.deadZone.byGel_um!, 1],
      [{ napierianAbsorption_percm: 110 }, (layer) => layer.end.interfaceConversion, -1],
      [{ propagation_m3mols: 30 }, (layer) => layer.end.meanConversion, 1],
      [{ termination_m3mols: 3000 }, (layer) => layer.end.meanConversion, -1],
      [{ oxygenCapture_m3mols: 5e4 }, (layer) => layer.end.conversion[0]!, 1],
      [{ gapThickness_um: 120 }, (layer) => layer.end.interfaceConversion, -1],
      [{ gelConversion: 0.25 }, (layer) => layer.end.deadZone.byGel_um!, 1],
      [{ conversionLevel: 0.1 }, (layer) => layer.end.deadZone.byConversion_um!, 1],
      [{ oxygenLevel: 0.02 }, (layer) => layer.end.deadZone.byOxygen_um!, -1],
    ];
    const plain = expose({ tolerance: 1e-6 });
    for (const [change, read, sign] of moves) {
      const moved = expose({ tolerance: 1e-6, ...change });
      expect(Math.sign(read(moved) - read(plain)), JSON.stringify(change)).toBe(sign);
    }
  });
});

describe("exposeLayer agrees with the simpler levels", () => {
  it("settles to the steady profile, and that to the exact first integral, in even light", () => {
    for (const filmEquivalentThickness_um of [0, 10]) {
      const window = { film: "resists", filmEquivalentThickness_um } as const;
      const even = { ...P0, napierianAbsorption_percm: 0, filmEquivalentThickness_um, cells: 400 };
      const { end } = expose({
        ...even,
        window,
        schedule: [{ duration_s: 40, relativeIrradiance: 1 }],
        tolerance: 1e-8,
      });
      const steady = steadyOxygenProfile({ ...even });
      // The same grid and the same sums: what is left is the 1e-8 of the steps.
      expect(relative(end.flux_molm2s, steady.flux_molm2s)).toBeLessThan(1e-7);
      expect(relative(end.wallOxygen_molm3, steady.wallOxygen_molm3)).toBeLessThan(1e-7);
      steady.oxygen_molm3.forEach((C, i) =>
        expect(Math.abs(C - end.oxygen_molm3[i + 1]!)).toBeLessThan(1e-7),
      );
      // The grid error of 400 cells: 5e-6 in the flux, 5e-5 in the depth.
      expect(relative(steady.flux_molm2s, evenLightFlux(even).flux_molm2s)).toBeLessThan(5e-6);
      const [depth] = depthsAtLevel({ depths_um: end.depths_um, values: end.oxygen_molm3, level: 0.01 });
      expect(relative(depth!, evenLightDepth({ ...even, oxygen_molm3: 0.01 }))).toBeLessThan(1e-4);
    }
  });

  it("is the sealed cell behind a tight window in even light: conversion and induction", () => {
    for (const oxygenCapture_m3mols of [5e5, 5e3]) {
      const sealed = { ...P0, oxygenCapture_m3mols, startOxygen_molm3: 1 };
      const layer = expose({
        oxygenCapture_m3mols,
        window: { film: "tight" },
        napierianAbsorption_percm: 0,
        schedule: [{ duration_s: 3, relativeIrradiance: 1 }],
        tolerance: 1e-8,
        cells: 8,
      });
      expect(relative(layer.end.meanConversion, sealedConversion({ ...sealed, time_s: 3 }))).toBeLessThan(
        1e-6,
      );
      // The time is read by a straight line within a step.
      const found = sealedConversion({ ...sealed, time_s: layer.inductionTime_s! });
      expect(Math.abs(found - 0.05)).toBeLessThan(1e-4);
      expect(layer.inductionTime_s!).toBeGreaterThan(inductionTime({ ...P0 }));
    }
  });

  // Extinction of the oxygen absorption problem at 0.197434 delta^2 / D: H. O. Dahmardah, D. F. Mayers 1983, quoted in J. Crank, Free
  // and Moving Boundary Problems, Oxford 1984, p. 170. Oxygen at the window before it by an independent front-fixing solution.
  it("dies out at the published time when the supply is cut", () => {
    const unit_s = 4;
    const sinceCut = [0.04, 0.1, 0.16, 0.18, 0.19, 0.1972, 0.1974];
    const { readings } = expose({
      // So fast a capture that radicals win nowhere while there is oxygen: Lambda 1e-6, against the 0 of the problem.
      oxygenCapture_m3mols: 5e7,
      napierianAbsorption_percm: 0,
      gapThickness_um: 40,
      window: noFilm,
      schedule: [
        { duration_s: 30, relativeIrradiance: 1 },
        { duration_s: 0.79, relativeIrradiance: 1, supplyCut: true },
      ],
      times_s: sinceCut.map((t) => 30 + unit_s * t),
      cells: 400,
      tolerance: 1e-7,
    });
    const wall = readings.map(({ wallOxygen_molm3 }) => wallOxygen_molm3 / 2);
    [0.274324167, 0.143176704, 0.048822738, 0.021780934, 0.009020878].forEach((c, k) =>
      expect(Math.abs(wall[k]! - c)).toBeLessThan(5e-6),
    );
    const [late, last] = [wall[5]!, wall[6]!];
    const extinction = 0.1974 + (0.0002 * last) / (late - last);
    expect(Math.abs(extinction - 0.197434)).toBeLessThan(3e-6);
    const law = wallOxygenAfterSupplyCut({
      thickness_um: 20,
      diffusivity_m2s: 1e-10,
      wallOxygen_molm3: 1,
      time_s: unit_s * 0.04,
    });
    expect(Math.abs(readings[0]!.wallOxygen_molm3 - law)).toBeLessThan(1e-5);
  });
});

describe("exposeLayer at the edges", () => {
  it("only lets oxygen diffuse in the dark, and keeps a saturated gap as it is", () => {
    const dark = expose({ schedule: [{ duration_s: 100, relativeIrradiance: 0 }] });
    expect(dark).toMatchObject({ outcome: "stays-liquid", inductionTime_s: undefined, gelTime_s: undefined });
    expect(dark.end.meanConversion).toBe(0);
    expect(dark.end.deadZone).toEqual({
      byOxygen_um: undefined,
      byConversion_um: undefined,
      byGel_um: undefined,
    });
    expect(dark.end.cureDepth_um).toBe(0);
    expect(Math.abs(dark.end.meanOxygen_molm3 - 1)).toBeLessThan(1e-12);
    expect(expose({ radicalGeneration_molm3s: 0 }).outcome).toBe("stays-liquid");
  });

  it("cures at once and evenly without oxygen: X = 1 - exp(-kp sqrt(Ri / 2 kt) t)", () => {
    const layer = expose({ oxygen_molm3: 0, saturation_molm3: 0, napierianAbsorption_percm: 0 });
    expect(relative(layer.end.meanConversion, -Math.expm1(-25 * 0.01 * 5))).toBeLessThan(1e-12);
    expect(layer.end.deadZone).toEqual({ byOxygen_um: 0, byConversion_um: 0, byGel_um: 0 });
    expect(layer.end.cureDepth_um).toBe(100);
    expect(layer.outcome).toBe("gels");
  });

  it("has no dead zone behind a tight window, and the same over a film that hardly lets anything through", () => {
    const even = { grid: "even", tolerance: 1e-7 } as const;
    const tight = expose({ ...even, window: { film: "tight" } });
    expect(tight.oxygenTakenUp_molm3).toBe(0);
    expect(tight.end.deadZone.byGel_um).toBe(0);
    const almost = expose({ ...even, window: { film: "resists", filmEquivalentThickness_um: 1e9 } });
    expect(Math.abs(almost.end.meanConversion - tight.end.meanConversion)).toBeLessThan(1e-6);
  });

  it("lets oxygen back into cured resin slowly when diffusion falls with conversion", () => {
    const schedule = [
      { duration_s: 10, relativeIrradiance: 1 },
      { duration_s: 20, relativeIrradiance: 0 },
    ];
    const [open, halfway, slow] = [1, 0.1, 0.01].map(
      (curedDiffusivityShare) => expose({ schedule, curedDiffusivityShare }).end.meanOxygen_molm3,
    );
    expect(halfway!).toBeLessThan(0.9 * open!);
    expect(slow!).toBeLessThan(0.9 * halfway!);
  });

  it("counts every photon when the light dies out within the first micrometre", () => {
    const layer = expose({ napierianAbsorption_percm: 1e6, gapThickness_um: 50 });
    // Radicals started over the gap: Ri / alpha = 0.5 / 1e8, of which oxygen can take no more than all.
    expect(layer.oxygenUsed_molm3 * 50e-6).toBeLessThan((5 * 0.5) / 1e8);
    expect(layer.oxygenUsed_molm3 * 50e-6).toBeGreaterThan((0.999 * 5 * 0.5) / 1e8);
    expect(layer.outcome).toBe("stays-liquid");
  });

  it.each([
    ["fast capture", { oxygenCapture_m3mols: 1e7 }],
    ["hardly any termination", { termination_m3mols: 1e-6 }],
    ["hardly any capture", { oxygenCapture_m3mols: 1 }],
    ["slow diffusion", { diffusivity_m2s: 1e-14 }],
    ["fast diffusion", { diffusivity_m2s: 1e-6 }],
    ["a flash of 1 ms", { schedule: [{ duration_s: 1e-3, relativeIrradiance: 1e4 }] }],
    ["three hours", { schedule: [{ duration_s: 1e4, relativeIrradiance: 1 }] }],
    ["a thick gap", { gapThickness_um: 2e4 }],
    ["a thin gap", { gapThickness_um: 0.1 }],
    ["light beyond any lamp", { radicalGeneration_molm3s: 1e9 }],
    ["light below any lamp", { radicalGeneration_molm3s: 1e-12 }],
  ] as const)("stands %s", (_, change) => {
    const layer = expose(change);
    expect(numbersOf(layer).every((value) => Number.isFinite(value))).toBe(true);
    expect(layer.oxygenImbalance).toBeLessThan(1e-9);
    expect(layer.steps.accepted).toBeGreaterThan(0);
  });

  it("cures less in the same dose given faster, square-root-like, once oxygen is gone", () => {
    const none = { oxygen_molm3: 0, saturation_molm3: 0 };
    const slow = expose({ ...none, schedule: [{ duration_s: 4, relativeIrradiance: 1 }] });
    const fast = expose({ ...none, schedule: [{ duration_s: 1, relativeIrradiance: 4 }] });
    const Q = (layer: LayerExposure): number => -Math.log1p(-layer.end.conversion[1]!);
    expect(Q(slow) / Q(fast)).toBeCloseTo(2, 10);
  });

  it("reads the column at the moments asked, in order, and at the end of a step before the next begins", () => {
    const { readings } = expose({
      schedule: [
        { duration_s: 3, relativeIrradiance: 1 },
        { duration_s: 1, relativeIrradiance: 0 },
      ],
      times_s: [3.5, 0, 3, 4, 3],
    });
    expect(readings.map(({ time_s }) => time_s)).toEqual([0, 3, 3, 3.5, 4]);
    expect(readings[0]!.meanOxygen_molm3).toBeCloseTo(1, 12);
    expect(readings[1]!.radicals_molm3[100]!).toBeGreaterThan(0);
    expect(readings[3]!.radicals_molm3.every((R) => R === 0)).toBe(true);
  });
});

describe("exposeLayer refuses", () => {
  it.each<[string, Partial<LayerInput>, string]>([
    [
      "no termination",
      { termination_m3mols: 0 },
      "exposeLayer: termination_m3mols is 0; it must be a finite number above 0; without termination radicals have no steady level; use exposeLayerFully",
    ],
    [
      "an empty schedule",
      { schedule: [] },
      "exposeLayer: schedule is empty; it must list at least one step, such as",
    ],
    [
      "a step of no length",
      { schedule: [{ duration_s: 0, relativeIrradiance: 1 }] },
      "exposeLayer: schedule[0].duration_s is 0; it must be a number above 0 and at most 10000000",
    ],
    [
      "negative light",
      { schedule: [{ duration_s: 1, relativeIrradiance: -1 }] },
      "exposeLayer: schedule[0].relativeIrradiance is -1; it must be a finite number of at least 0",
    ],
    [
      "a cut that is no yes or no",
      { schedule: [{ duration_s: 1, relativeIrradiance: 1, supplyCut: "yes" as unknown as boolean }] },
      'exposeLayer: schedule[0].supplyCut is "yes"; it must be true or false',
    ],
    [
      "a gas that is no number",
      { schedule: [{ duration_s: 1, relativeIrradiance: 1, saturation_molm3: NaN }] },
      "exposeLayer: schedule[0].saturation_molm3 is NaN; it must be a finite number of at least 0",
    ],
    [
      "a time after the end",
      { times_s: [1, 6] },
      "exposeLayer: times_s[1] is 6; it must be a number from 0 to 5",
    ],
    [
      "an infinite film",
      { window: { film: "resists", filmEquivalentThickness_um: Infinity } },
      'exposeLayer: window.filmEquivalentThickness_um is Infinity; it must be a finite number of at least 0; for a film that lets nothing through give film: "tight"',
    ],
    [
      "a window of another kind",
      { window: { film: "store" } as unknown as LayerInput["window"] },
      'exposeLayer: unknown window.film "store"; did you mean "stores"?',
    ],
    [
      "a film that stores without saying whether it is sealed",
      {
        window: {
          film: "stores",
          filmThickness_um: 50,
          filmDiffusivity_m2s: 1e-9,
          filmPartition: 1,
        } as unknown as LayerInput["window"],
      },
      "exposeLayer: window.sealed is missing; it must be true (glass below the film) or false (gas below it)",
    ],
    [
      "film oxygen without such a film",
      { filmOxygen_molm3: 1 },
      'exposeLayer: filmOxygen_molm3 is 1; only a window with film: "stores" holds oxygen of its own; leave it out',
    ],
    [
      "a grid of another kind",
      { grid: "fine" as "even" },
      'exposeLayer: unknown grid "fine"; known: graded, even',
    ],
    ["half a cell", { cells: 100.5 }, "exposeLayer: cells is 100.5; it must be a whole number"],
    [
      "a gel conversion of 1",
      { gelConversion: 1 },
      "exposeLayer: gelConversion is 1; it must be a number above 0",
    ],
    [
      "a tolerance of nothing",
      { tolerance: 0 },
      "exposeLayer: tolerance is 0; it must be a number from 1e-9 to 0.1",
    ],
  ])("%s", (_, change, message) => {
    expect(() => expose(change)).toThrow(message);
  });

  it("to go on when the steps are used up, saying when, where and what to do", () => {
    expect(() => expose({ stepLimit: 20 })).toThrow(
      /^exposeLayer: stopped at [\d.]+ s of 5 s \(schedule\[0\]\) after 20 steps, radicals change most at [\d.]+ um; raise stepLimit or tolerance, or use fewer cells$/,
    );
  });
});
