import { describe, expect, it } from "vitest";
import { depthsAtLevel, valueAtDepth } from "../../lib/numerics/profile.js";

const depths_um = [0, 0.5, 1.2, 2, 3.1, 4];

describe("valueAtDepth", () => {
  it("is exact for a cubic, at and between the points, at both ends", () => {
    const cubic = (z: number): number => 2 - z + 0.3 * z ** 2 - 0.05 * z ** 3;
    const values = depths_um.map(cubic);
    for (const depth_um of [0, 0.2, 0.5, 1, 2.7, 3.9, 4]) {
      expect(valueAtDepth({ depths_um, values, depth_um })).toBeCloseTo(cubic(depth_um), 13);
    }
  });

  it("stays within its points beside a step", () => {
    const values = [0, 0, 0, 1, 1, 1];
    for (let depth_um = 0; depth_um <= 4; depth_um += 0.1) {
      const value = valueAtDepth({ depths_um, values, depth_um });
      expect(value).toBeGreaterThanOrEqual(0);
      expect(value).toBeLessThanOrEqual(1);
    }
    expect(valueAtDepth({ depths_um, values, depth_um: 2.4 })).toBeGreaterThan(0.1);
  });

  it.each([
    [{ depths_um, values: [1, 2], depth_um: 1 }, "valueAtDepth: depths_um holds 6, values holds 2"],
    [
      { depths_um, values: depths_um, depth_um: 5 },
      "valueAtDepth: depth_um is 5; it must be a number from 0 to 4",
    ],
    [
      { depths_um: [0, 1, 1, 2], values: [1, 2, 3, 4], depth_um: 1 },
      "valueAtDepth: depths_um[2] is 1 after 1; the depths must rise",
    ],
    [
      { depths_um: [0, 1, 2], values: [1, 2, 3], depth_um: 1 },
      "valueAtDepth: depths_um holds 3 numbers; at least 4 must be given",
    ],
  ])("refuses %j", (input, message) => {
    expect(() => valueAtDepth(input)).toThrow(message);
  });
});

describe("depthsAtLevel", () => {
  it("is exact where the logarithm is a cubic, for every passage", () => {
    const values = depths_um.map((z) => Math.exp(-3 + 4 * z - z ** 2));
    // -3 + 4 z - z^2 = 0 at 1 and 3.
    const found = depthsAtLevel({ depths_um, values, level: 1 });
    expect(found).toHaveLength(2);
    expect(found[0]).toBeCloseTo(1, 12);
    expect(found[1]).toBeCloseTo(3, 12);
  });

  it("takes the values themselves where one is not above 0", () => {
    const values = depths_um.map((z) => z ** 2 - 2);
    expect(depthsAtLevel({ depths_um, values, level: -1 })[0]).toBeCloseTo(1, 12);
    expect(depthsAtLevel({ depths_um, values, level: 2 })[0]).toBeCloseTo(2, 12);
  });

  it("finds none when the level is not passed, and a point that lies on it", () => {
    expect(depthsAtLevel({ depths_um, values: [1, 1, 1, 1, 1, 1], level: 2 })).toEqual([]);
    expect(depthsAtLevel({ depths_um, values: [0, 0, 1, 2, 3, 4], level: 2 })[0]).toBeCloseTo(2, 12);
  });

  it("stays between two points when the profile jumps there", () => {
    const values = [1e-12, 1e-12, 1e-12, 0.9, 0.9, 0.9];
    const [found] = depthsAtLevel({ depths_um, values, level: 0.2 });
    expect(found).toBeGreaterThan(1.2);
    expect(found).toBeLessThan(2);
  });

  it("refuses a level that is not a number", () => {
    expect(() => depthsAtLevel({ depths_um, values: depths_um, level: NaN })).toThrow(
      "depthsAtLevel: level is NaN; it must be a finite number",
    );
  });
});
