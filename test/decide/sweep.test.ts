import { describe, expect, it } from "vitest";
import { deadZoneOf } from "../../lib/assess/oxygen.js";
import { viscosityOf } from "../../lib/assess/viscosity.js";
import { evenSteps, mapOver, nearestWithin, sweep } from "../../lib/decide/sweep.js";
import { withRatio } from "../../lib/recipe/formulation.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const work = { formulation: formulationOf({ THIN: 60, THICK: 38.9, PI: 1, AB: 0.1 }), brief, shelf };

describe("sweep", () => {
  it("assesses the property at each value", () => {
    const at = (share: number) => ({
      ...work,
      formulation: withRatio(work.formulation, { id: "THICK", against: "THIN", share }),
    });
    const curve = sweep({ over: [0.2, 0.5, 0.8], at, of: viscosityOf, draws: 100 });
    expect(curve.y[1]).toBe(viscosityOf({ ...at(0.5), draws: 100 }).value);
    expect(curve.y[0]! < curve.y[1]! && curve.y[1]! < curve.y[2]!).toBe(true);
    expect(curve.never).toEqual([]);
  });

  it("sets places apart where the resin never cures", () => {
    const at = (irradiance: number) => ({
      ...work,
      brief: { ...brief, light: { ...brief.light, irradiance_mWcm2: sure(irradiance) } },
    });
    const curve = sweep({ over: [0.001, 8], at, of: deadZoneOf, draws: 100 });
    expect([curve.never, curve.x]).toEqual([[0.001], [8]]);
  });

  it("refuses nothing to go through", () => {
    expect(() => sweep({ over: [], at: () => work, of: viscosityOf })).toThrow(
      "sweep: over is empty; give the values to go through",
    );
  });
});

describe("evenSteps", () => {
  it("spaces values evenly on either scale, ends included", () => {
    expect(evenSteps({ from: 0, to: 0.3, count: 4 })).toEqual([0, 0.1, 0.2, 0.3]);
    expect(evenSteps({ from: 0.5, to: 8, count: 5, logarithmic: true })).toEqual([0.5, 1, 2, 4, 8]);
  });

  it("refuses ends out of order and a logarithm of nothing", () => {
    expect(() => evenSteps({ from: 2, to: 1, count: 3 })).toThrow(
      "evenSteps: to is 1; it must be a finite number above 2",
    );
    expect(() => evenSteps({ from: 0, to: 1, count: 3, logarithmic: true })).toThrow("evenSteps: from is 0");
    expect(() => evenSteps({ from: 0, to: 1, count: 1 })).toThrow(
      "evenSteps: count is 1; it must be a number from 2 to 10000",
    );
  });
});

describe("mapOver", () => {
  it("gives one row a y and one number an x", () => {
    expect(mapOver({ x: [1, 2, 3], y: [10, 20], at: (x, y) => x + y })).toEqual([
      [11, 12, 13],
      [21, 22, 23],
    ]);
  });
});

describe("nearestWithin", () => {
  const curve = {
    x: [1, 2, 3, 4],
    y: [10, 20, 40, 80],
    low: [8, 15, 30, 60],
    high: [12, 25, 50, 100],
    never: [],
  };

  it("prefers what fits whole, and of that the nearest", () => {
    expect(nearestWithin({ curve, target: { min: 14, max: 60 }, present: 3.4 })).toMatchObject({
      x: 3,
      fits: true,
    });
    expect(nearestWithin({ curve, target: { min: 14, max: 60 }, present: 0 })).toMatchObject({
      x: 2,
      fits: true,
    });
  });

  it("takes the value deepest inside, or least outside, where nothing fits whole", () => {
    expect(nearestWithin({ curve, target: { min: 35, max: 46 }, present: 1 })).toMatchObject({
      x: 3,
      fits: false,
    });
    expect(nearestWithin({ curve, target: { max: 5 }, present: 4 })).toMatchObject({ x: 1, fits: false });
  });

  it("refuses an empty curve", () => {
    const empty = { x: [], y: [], low: [], high: [], never: [1] };
    expect(() => nearestWithin({ curve: empty, target: {}, present: 1 })).toThrow(
      "nearestWithin: curve has no point",
    );
  });
});
