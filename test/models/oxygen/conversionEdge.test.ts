import { describe, expect, it } from "vitest";
import { conversionEdge, deadZone, exposeLayer } from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

const input = { ...P0, filmEquivalentThickness_um: 0, exposureTime_s: 5 };

function edge(change: Partial<typeof input>) {
  const found = conversionEdge({ ...input, ...change });
  if (found.outcome !== "dead-zone") throw new Error(found.outcome);
  return found;
}

describe("conversionEdge", () => {
  // By an independent program, to 9 digits.
  it.each([
    [0.1, 1.17797386e-3, 19.3135675],
    [0.2, 5.42326031e-4, 19.5342421],
  ])("stands where conversion %d is reached in 5 s", (gelConversion, oxygen, thickness) => {
    const found = edge({ gelConversion: gelConversion as 0.2 });
    expect(Math.abs(found.edgeOxygen_molm3 / oxygen - 1)).toBeLessThan(1e-8);
    expect(Math.abs(found.thickness_um / thickness - 1)).toBeLessThan(1e-8);
  });

  it("tends to the whole dead zone as little radical suffices late, and lies at its tail with a film", () => {
    const zone = deadZone({ ...input, napierianAbsorption_percm: 0, filmEquivalentThickness_um: 10 });
    if (zone.outcome !== "dead-zone") throw new Error(zone.outcome);
    const found = edge({ filmEquivalentThickness_um: 10 });
    expect(zone.thickness_um - found.thickness_um).toBeCloseTo(20 - 19.5342421, 6);
  });

  it("agrees with the full profile to the tail that the closed form leaves out", () => {
    const { end } = exposeLayer({
      ...P0,
      napierianAbsorption_percm: 0,
      // So long that the start does not matter.
      schedule: [{ duration_s: 200, relativeIrradiance: 1 }],
      window: { film: "resists", filmEquivalentThickness_um: 0 },
    });
    // The tail of the full rate law adds a few front widths of 0.14 um.
    expect(Math.abs(end.deadZone.byGel_um! - edge({ exposureTime_s: 200 as 5 }).thickness_um)).toBeLessThan(
      0.6,
    );
  });

  it("says when no depth gels, and how long it would take without oxygen", () => {
    const found = conversionEdge({ ...input, exposureTime_s: 0.5 });
    expect(found.outcome).toBe("stays-liquid");
    // X = 0.2 at kp sqrt(Ri / 2 kt) = 0.25 per second.
    if (found.outcome === "stays-liquid") expect(found.neededTime_s).toBeCloseTo(-Math.log(0.8) / 0.25, 12);
    expect(conversionEdge({ ...input, exposureTime_s: -Math.log(0.8) / 0.25 + 1e-9 }).outcome).toBe(
      "dead-zone",
    );
  });

  it("is 0 when the edge lies below the window, and refuses a gel conversion of 0", () => {
    expect(edge({ saturation_molm3: 1e-5 as 1 }).thickness_um).toBe(0);
    expect(() => conversionEdge({ ...input, gelConversion: 0 })).toThrow(
      "conversionEdge: gelConversion is 0; it must be a number above 0 and at most 0.999999999",
    );
  });
});
