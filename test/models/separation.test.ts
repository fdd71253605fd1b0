import { describe, expect, it } from "vitest";
import { stefanForce, suctionLimit } from "../../lib/models/separation.js";

const disc = (radius_mm: number) => Math.PI * radius_mm ** 2;
const lift = { viscosity_mPas: 500, crossSection_mm2: disc(5), gap_um: 100, liftSpeed_mms: 1 };

describe("stefanForce", () => {
  // Limits of F = 3 π η R⁴ v / (2 h³): linear in viscosity and speed, h⁻³, and A² at fixed shape.
  it.each([
    ["viscosity_mPas", 1],
    ["liftSpeed_mms", 1],
    ["gap_um", -3],
    ["crossSection_mm2", 2],
  ] as const)("goes with %s to the power %d", (field, power) => {
    const doubled = stefanForce({ ...lift, [field]: 2 * lift[field] });
    expect(doubled / stefanForce(lift)).toBeCloseTo(2 ** power, 10);
  });

  it("falls to one N-th when a disc is split into N of the same total area", () => {
    const parts = 4 * stefanForce({ ...lift, crossSection_mm2: lift.crossSection_mm2 / 4 });
    expect(parts / stefanForce(lift)).toBeCloseTo(1 / 4, 12);
  });

  // Worked by hand from Stefan 1874's formula in SI: 3π · 0.5 · (5e-3)⁴ · 1e-3 / (2 · (1e-4)³).
  it("is 1.47262 N for 0.5 Pa s, a 10 mm disc, 100 µm, 1 mm/s", () => {
    expect(Math.abs(stefanForce(lift) - 1.47262)).toBeLessThan(5e-6);
  });

  it("refuses a closed gap", () => {
    expect(() => stefanForce({ ...lift, gap_um: 0 })).toThrow(
      "stefanForce: gap_um is 0; it must be a finite number above 0",
    );
  });
});

describe("suctionLimit", () => {
  it("is area times pressure: 7.958 N for a 10 mm disc at one atmosphere", () => {
    expect(Math.abs(suctionLimit({ crossSection_mm2: disc(5), pressure_Pa: 101325 }) - 7.958)).toBeLessThan(
      5e-4,
    );
  });

  it("refuses a negative area", () => {
    expect(() => suctionLimit({ crossSection_mm2: -1, pressure_Pa: 1e5 })).toThrow(
      "suctionLimit: crossSection_mm2 is -1",
    );
  });
});
