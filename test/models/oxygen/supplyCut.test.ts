import { describe, expect, it } from "vitest";
import {
  deadZone,
  exposeLayer,
  inductionTime,
  lifeAfterSupplyCut,
  sealedFilmLife,
  wallOxygenAfterSupplyCut,
} from "../../../lib/models/oxygen.js";
import { P0 } from "../../reference/oxygen/readTransient.js";

describe("lifeAfterSupplyCut", () => {
  it("is 0.395 induction times for a dead zone without film", () => {
    const life = lifeAfterSupplyCut({ thickness_um: 20, diffusivity_m2s: 1e-10 });
    // The factor itself is held against the transient model in exposeLayerLimits.test.ts.
    expect(life / inductionTime({ ...P0 })).toBeCloseTo(0.394868, 6);
    expect(lifeAfterSupplyCut({ thickness_um: 40, diffusivity_m2s: 1e-10 }) / life).toBeCloseTo(4, 12);
    expect(() => lifeAfterSupplyCut({ thickness_um: 0, diffusivity_m2s: 1e-10 })).toThrow(
      "lifeAfterSupplyCut: thickness_um is 0; it must be a finite number above 0",
    );
  });
});

describe("wallOxygenAfterSupplyCut", () => {
  const zone = { thickness_um: 20, diffusivity_m2s: 1e-10, wallOxygen_molm3: 1 };

  // c(0, t) of the front-fixing solution of an independent program, 9 digits; c is half of C / Ci, t in units of 4 s here.
  it.each([
    [0.02, 0.340423088, 1e-8],
    [0.04, 0.274324167, 1e-6],
    [0.1, 0.143176704, 1e-5],
  ])("at %d delta^2 / D", (t, c, allowed) => {
    expect(Math.abs(wallOxygenAfterSupplyCut({ ...zone, time_s: 4 * t }) - 2 * c)).toBeLessThan(allowed);
  });

  it("starts at the value at the window and refuses what it does not hold for", () => {
    expect(wallOxygenAfterSupplyCut({ ...zone, time_s: 0 })).toBe(1);
    expect(() => wallOxygenAfterSupplyCut({ ...zone, time_s: 0.5 })).toThrow(
      /wallOxygenAfterSupplyCut: time_s is 0.5; it must be a number from 0 to 0.4\d*; later than that use exposeLayer/,
    );
  });
});

describe("sealedFilmLife", () => {
  it("is 33.6 s for 100 um of film with a partition of 1.68, and what the transient model tends to for a film well mixed", () => {
    const film = { filmThickness_um: 100, filmPartition: 1.68, saturation_molm3: 1, flux_molm2s: 1e-5 };
    expect(sealedFilmLife(film)).toBeCloseTo(33.6, 10);
    // A film that mixes fast under even light: oxygen left in it goes as (1 - t / t_x)^2 once the dead zone stands.
    const { readings } = exposeLayer({
      ...P0,
      napierianAbsorption_percm: 0,
      window: {
        film: "stores",
        filmThickness_um: 100,
        filmDiffusivity_m2s: 1e-6,
        filmPartition: 1.68,
        sealed: true,
      },
      schedule: [{ duration_s: 20, relativeIrradiance: 1 }],
      times_s: [10, 20],
    });
    const [early, late] = readings.map(({ meanFilmOxygen_molm3 }) => Math.sqrt(meanFilmOxygen_molm3!));
    // To an eighth: the dead zone shrinks as it goes and gives up oxygen of its own.
    expect(Math.abs(((early! - late!) / 10) * 33.6 - 1)).toBeLessThan(0.12);
    expect(early!).toBeGreaterThan(late!);
  });

  it("follows deadZone's flux, and refuses no flux", () => {
    const zone = deadZone({ ...P0, napierianAbsorption_percm: 0, filmEquivalentThickness_um: 0 });
    if (zone.outcome !== "dead-zone") throw new Error(zone.outcome);
    const film = { filmThickness_um: 50, filmPartition: 1, saturation_molm3: 1 };
    expect(sealedFilmLife({ ...film, flux_molm2s: zone.flux_molm2s })).toBeCloseTo(10, 10);
    expect(() => sealedFilmLife({ ...film, flux_molm2s: 0 })).toThrow(
      "sealedFilmLife: flux_molm2s is 0; it must be a finite number above 0",
    );
  });
});
