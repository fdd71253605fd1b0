import { describe, expect, it } from "vitest";
import {
  cureDepth,
  fitWorkingCurve,
  workingCurveRegion,
  type WorkingCurve,
} from "../../../lib/models/cure.js";
import { normalQuantile } from "../../../lib/numerics/distributions.js";
import { seededUniform } from "../../../lib/numerics/sampling.js";

const exposures_mJcm2 = [8, 12, 20, 35, 60, 100];
const truth = { penetrationDepth_um: 100, criticalExposure_mJcm2: 5 };
const fit = fitWorkingCurve({ exposures_mJcm2, cureDepths_um: [40, 95, 130, 200, 240, 305], level: 0.95 });

/** Whether a point lies inside the polygon of the region, in (Dp, ln Ec), by counting crossings. */
function holds(
  region: readonly WorkingCurve[],
  { penetrationDepth_um: x, criticalExposure_mJcm2 }: WorkingCurve,
): boolean {
  const y = Math.log(criticalExposure_mJcm2);
  const corners = region.map((p) => [p.penetrationDepth_um, Math.log(p.criticalExposure_mJcm2)] as const);
  return corners.reduce((inside, [x1, y1], i) => {
    const [x2, y2] = corners[(i + 1) % corners.length]!;
    const crosses = y1 > y !== y2 > y && x < x1 + ((y - y1) * (x2 - x1)) / (y2 - y1);
    return crosses ? !inside : inside;
  }, false);
}

describe("workingCurveRegion", () => {
  it("reaches sqrt(2 F) standard errors along both axes", () => {
    // F(0.95; 2, 4) = 6.944 (tables, 4 digits).
    const region = workingCurveRegion({ fit, level: 0.95, count: 1000 });
    const reach = (values: number[], centre: number, u: number): void =>
      expect(Math.abs((Math.max(...values) - centre) / u / Math.sqrt(2 * 6.944) - 1)).toBeLessThan(1e-4);
    reach(
      region.map((p) => p.penetrationDepth_um),
      fit.penetrationDepth_um.value,
      Math.sqrt(fit.covariance[0][0]),
    );
    reach(
      region.map((p) => Math.log(p.criticalExposure_mJcm2)),
      Math.log(fit.criticalExposure_mJcm2.value),
      Math.sqrt(fit.covariance[1][1]),
    );
  });

  it("holds the fitted curve, is slanted, and grows with the level", () => {
    const [small, large] = [0.5, 0.95].map((level) => workingCurveRegion({ fit, level, count: 60 }));
    const centre = {
      penetrationDepth_um: fit.penetrationDepth_um.value,
      criticalExposure_mJcm2: fit.criticalExposure_mJcm2.value,
    };
    expect(holds(small!, centre)).toBe(true);
    for (const point of small!) expect(holds(large!, point)).toBe(true);
    // The box of the largest Dp with the smallest Ec is far outside: the two go together.
    const corner = {
      penetrationDepth_um: Math.max(...small!.map((p) => p.penetrationDepth_um)),
      criticalExposure_mJcm2: Math.min(...small!.map((p) => p.criticalExposure_mJcm2)),
    };
    expect(holds(large!, corner)).toBe(false);
  });

  it("holds the true pair in 95 of 100 series", () => {
    const uniform = seededUniform({ seed: 21 });
    const runs = 2000;
    let held = 0;
    for (let run = 0; run < runs; run++) {
      const cureDepths_um = exposures_mJcm2.map(
        (exposure_mJcm2) =>
          cureDepth({ ...truth, exposure_mJcm2 }) + 3 * normalQuantile({ probability: uniform() }),
      );
      const series = fitWorkingCurve({ exposures_mJcm2, cureDepths_um, level: 0.95 });
      if (holds(workingCurveRegion({ fit: series, level: 0.95, count: 72 }), truth)) held++;
    }
    // 2000 runs know 95 % to 0.5 %.
    expect(Math.abs(held / runs - 0.95)).toBeLessThan(0.015);
  });

  it("says what is wrong", () => {
    expect(() => workingCurveRegion({ fit, level: 0.95, count: 12.5 })).toThrow(
      "workingCurveRegion: count is 12.5; it must be a whole number",
    );
    expect(() => workingCurveRegion({ fit, level: 0.95, count: 4 })).toThrow(
      "workingCurveRegion: count is 4; it must be a number from 8 to 1000",
    );
    expect(() => workingCurveRegion({ fit, level: 95, count: 12 })).toThrow(
      "workingCurveRegion: level is 95; it must be a number from 0.5 to 0.999",
    );
    const loose = fitWorkingCurve({
      exposures_mJcm2,
      cureDepths_um: [150, 60, 200, 90, 210, 180],
      level: 0.95,
    });
    expect(() => workingCurveRegion({ fit: loose, level: 0.95, count: 12 })).toThrow(
      /^workingCurveRegion: the penetration depth on the region is -\S+; it must be a finite number above 0; these readings hardly show a slope; measure more, or ask for a lower level$/,
    );
  });
});
