import { describe, expect, it } from "vitest";
import {
  deadZone,
  depthsAtLevel,
  evenLightDepth,
  evenLightFlux,
  steadyOxygenProfile,
  valueAtDepth,
  type SteadyOxygenInput,
} from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

const input: SteadyOxygenInput = { ...P0, filmEquivalentThickness_um: 0 };
const steady = (change: Partial<SteadyOxygenInput> = {}) => steadyOxygenProfile({ ...input, ...change });
const depthOf = (profile: ReturnType<typeof steady>, level: number): number =>
  depthsAtLevel({ depths_um: profile.depths_um, values: profile.oxygen_molm3, level })[0]!;
const relative = (found: number, expected: number): number => Math.abs(found / expected - 1);

describe("steadyOxygenProfile against the exact first integral in even light", () => {
  // The gap is many tails deep for the fast captures; for the slowest, the part above would be felt, so the gap is 0.4 mm, in twice the cells.
  it.each([
    [5e5, 0],
    [5e5, 10],
    [5e3, 0],
    [50, 0],
    [50, 10],
  ])(
    "kO %d, film %d um: flux and wall to 1e-6, depths to 1e-4",
    (oxygenCapture_m3mols, filmEquivalentThickness_um) => {
      const [gapThickness_um, cells] = oxygenCapture_m3mols < 1e3 ? [400, 2000] : [100, 1000];
      const even = {
        ...input,
        napierianAbsorption_percm: 0,
        oxygenCapture_m3mols,
        filmEquivalentThickness_um,
      };
      const found = steady({ ...even, gapThickness_um, cells });
      const exact = evenLightFlux(even);
      expect(relative(found.flux_molm2s, exact.flux_molm2s)).toBeLessThan(1e-6);
      expect(relative(found.wallOxygen_molm3, exact.wallOxygen_molm3)).toBeLessThan(1e-6);
      for (const level of [0.1, 0.01, 1e-3]) {
        expect(
          relative(depthOf(found, level), evenLightDepth({ ...even, oxygen_molm3: level })),
        ).toBeLessThan(1e-4);
      }
    },
  );

  it.each(["even", "graded"] as const)("with errors falling by 4 for each halving of %s cells", (grid) => {
    const even = {
      ...input,
      napierianAbsorption_percm: 0,
      filmEquivalentThickness_um: 10,
      oxygenCapture_m3mols: 5e3,
    };
    const exact = evenLightFlux(even).flux_molm2s;
    const errors = [200, 400, 800].map((cells) => steady({ ...even, grid, cells }).flux_molm2s / exact - 1);
    expect(errors[0]! / errors[1]!).toBeGreaterThan(3.5);
    expect(errors[0]! / errors[1]!).toBeLessThan(4.5);
    expect(errors[1]! / errors[2]!).toBeGreaterThan(3.5);
    expect(errors[1]! / errors[2]!).toBeLessThan(4.5);
  });
});

describe("steadyOxygenProfile in decaying light", () => {
  // By an independent program (Newton on a refined grid), to 9 digits; here 1600 graded cells, whose error is 4e-6.
  it.each([
    [0, 9.660232031e-6, 1, 0.5784596226, 0.275847693, [14.51309901, 19.26340744, 20.80768921, 21.38243485]],
    [
      10,
      6.107150656e-6,
      0.3892849344,
      0.1453986188,
      0.02044063477,
      [6.356166758, 10.9134048, 12.39537107, 12.95019411],
    ],
  ])("film %d um", (filmEquivalentThickness_um, flux, wall, at5, at10, depths) => {
    const found = steady({ filmEquivalentThickness_um, cells: 1600 });
    expect(relative(found.flux_molm2s, flux)).toBeLessThan(1e-6);
    expect(relative(found.wallOxygen_molm3, wall)).toBeLessThan(1e-6);
    const at = (depth_um: number): number =>
      valueAtDepth({ depths_um: found.depths_um, values: found.oxygen_molm3, depth_um });
    expect(relative(at(5), at5)).toBeLessThan(1e-5);
    expect(relative(at(10), at10)).toBeLessThan(2e-5);
    [0.1, 0.01, 1e-3, 1e-4].forEach((level, k) =>
      expect(relative(depthOf(found, level), depths[k]!)).toBeLessThan(5e-6),
    );
    expect(found.iterations).toBeLessThan(30);
  });

  it("lies by 1e-4 below the closed form in flux", () => {
    const zone = deadZone(input);
    if (zone.outcome !== "dead-zone") throw new Error(zone.outcome);
    expect(relative(steady().flux_molm2s, zone.flux_molm2s)).toBeLessThan(1e-4);
  });

  it("balances: what comes in is used up, cell by cell, and radicals follow oxygen", () => {
    const even = steady({ grid: "even", cells: 500 });
    const width_m = 100e-6 / 500;
    const used = even.oxygen_molm3.reduce(
      (sum, C, i) => sum + 5e5 * C * even.radicals_molm3[i]! * width_m,
      0,
    );
    expect(relative(used, even.flux_molm2s)).toBeLessThan(1e-11);
    even.radicals_molm3.forEach((R, i) => {
      const Ri = 0.5 * Math.exp((-1e4 * even.depths_um[i]!) / 1e6);
      // Light is averaged over 0.2 um: 2e-7.
      expect(relative(2 * 2500 * R * R + 5e5 * even.oxygen_molm3[i]! * R, Ri)).toBeLessThan(1e-6);
    });
  });
});

describe("steadyOxygenProfile at the edges", () => {
  it("fills the whole gap with oxygen when this light never cures, and has none over nitrogen", () => {
    const never = steady({ radicalGeneration_molm3s: 1e-4 });
    expect(Math.min(...never.oxygen_molm3)).toBeGreaterThan(0.9);
    const none = steady({ saturation_molm3: 0 });
    expect(Math.max(...none.oxygen_molm3)).toBe(0);
    expect(none.flux_molm2s).toBe(0);
    expect(none.radicals_molm3[0]).toBeCloseTo(0.01, 4);
  });

  it.each([
    { oxygenCapture_m3mols: 1e9, termination_m3mols: 1e-3 },
    { oxygenCapture_m3mols: 1e-3 },
    { napierianAbsorption_percm: 1e6 },
    { radicalGeneration_molm3s: 1e8 },
    { radicalGeneration_molm3s: 1e-12 },
    { filmEquivalentThickness_um: 1e9 },
    { gapThickness_um: 0.01 },
    { gapThickness_um: 5e4 },
    { cells: 8 },
    { oxygenPerRadical: 50 },
  ])("settles for %j", (change) => {
    const found = steady(change);
    expect([...found.oxygen_molm3, ...found.radicals_molm3, found.flux_molm2s].every(Number.isFinite)).toBe(
      true,
    );
    expect(found.iterations).toBeLessThan(200);
  });

  it.each([
    [
      { termination_m3mols: 0 },
      "steadyOxygenProfile: termination_m3mols is 0; it must be a finite number above 0; without termination radicals have no steady level",
    ],
    [
      { gapThickness_um: NaN },
      "steadyOxygenProfile: gapThickness_um is NaN; it must be a finite number above 0",
    ],
    [{ cells: 4 }, "steadyOxygenProfile: cells is 4; it must be a number from 8 to 20000"],
    [{ grid: "fine" as "even" }, 'steadyOxygenProfile: grid is "fine"; it must be "graded" or "even"'],
  ])("refuses %j", (change, message) => {
    expect(() => steady(change)).toThrow(message);
  });
});
