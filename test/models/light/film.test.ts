import { describe, expect, it } from "vitest";
import {
  absorbanceSeries,
  interpolateSpectrum,
  opticalDepthOfFilm,
  transmittedFraction,
} from "../../../lib/models/light.js";
import { readTable } from "../../reference/readTable.js";

describe("opticalDepthOfFilm", () => {
  it("is 0.434294 over the absorbance per um, to 1e-12", () => {
    const depth = opticalDepthOfFilm({ absorbance: 0.5, baselineAbsorbance: 0, filmThickness_um: 50 });
    expect(depth / (Math.LOG10E / 0.01)).toBeCloseTo(1, 12);
    const napierianAbsorption_percm = 1e4 / depth;
    expect(-Math.log10(transmittedFraction({ napierianAbsorption_percm, depth_um: 50 }))).toBeCloseTo(
      0.5,
      12,
    );
  });

  it("takes the baseline off", () => {
    const film = { absorbance: 0.53, baselineAbsorbance: 0.03, filmThickness_um: 50 };
    expect(opticalDepthOfFilm(film)).toBeCloseTo(
      opticalDepthOfFilm({ ...film, absorbance: 0.5, baselineAbsorbance: 0 }),
      12,
    );
  });

  it("says what is wrong", () => {
    const film = { absorbance: 0.5, baselineAbsorbance: 0.01, filmThickness_um: 50 };
    expect(() => opticalDepthOfFilm({ ...film, baselineAbsorbance: 0.5 })).toThrow(
      "opticalDepthOfFilm: absorbance is 0.5; it must be a finite number above 0.5; " +
        "a film that absorbs no more than its baseline shows no depth; measure a thicker one",
    );
    expect(() => opticalDepthOfFilm({ ...film, filmThickness_um: 0 })).toThrow(
      "opticalDepthOfFilm: filmThickness_um is 0; it must be a finite number above 0",
    );
    expect(() => opticalDepthOfFilm({ ...film, baselineAbsorbance: NaN })).toThrow(
      "opticalDepthOfFilm: baselineAbsorbance is NaN; it must be a finite number",
    );
  });
});

describe("absorbanceSeries", () => {
  it("finds the bend of a measured series of Sudan I instead of averaging over it", () => {
    // Films of PEGDA with 1 % BAPO and Sudan I at 405 nm: open data published with Gong et al., RSC Adv. 5 (2015) 106621, doi
    // 10.1039/C5RA23855B. An independent reading of the same data: 0.4091, 0.6346, 0.7831, 1.2342, slope 3.74 per percent
    // through the first three, the last 20 % low. Printed to 4 decimals, 3 and 2 digits.
    const table = readTable("light/film-absorbance-bapo-sudan1.csv");
    const columns = { 0.1: 0.0057, 0.15: 0.0076, 0.2: -0.0293, 0.4: -0.0061 };
    const absorbances = Object.entries(columns).map(
      ([percent, baseline]) =>
        interpolateSpectrum({
          nodes_nm: table.nm!,
          values: table[`BAPO1pct_SudanI${percent}pct`]!,
          wavelength_nm: 405,
          where: "film",
        }) - baseline,
    );
    [0.4091, 0.6346, 0.7831, 1.2342].forEach((A, i) =>
      expect(Math.abs(absorbances[i]! - A)).toBeLessThan(6e-5),
    );
    const series = absorbanceSeries({
      massFractions: [0.001, 0.0015, 0.002, 0.004],
      absorbances,
      linearUpTo: 0.002,
    });
    expect(Math.abs(series.slope / 100 - 3.74)).toBeLessThan(0.006);
    expect(Math.abs(series.deviations[3]! - -0.2)).toBeLessThan(0.015);
    expect(series.warnings.map(({ code }) => code)).toEqual(["below-line"]);
    expect(series.warnings[0]!.message).toMatch(
      /^the film of mass fraction 0.004 lies 2\d % below the line of the dilute films: stray light, saturation, or not all dissolved; measure a thinner film$/,
    );
  });

  it("returns the line of a constructed series, without warnings", () => {
    const massFractions = [0.001, 0.002, 0.003, 0.008];
    const series = absorbanceSeries({
      massFractions,
      absorbances: massFractions.map((w) => 0.05 + 90 * w),
      linearUpTo: 0.003,
    });
    expect(series.intercept).toBeCloseTo(0.05, 12);
    expect(series.slope).toBeCloseTo(90, 9);
    expect(series.warnings).toEqual([]);
  });

  it("warns of films above the line too", () => {
    const given = { massFractions: [0.001, 0.002, 0.003, 0.006], absorbances: [0.1, 0.2, 0.3, 0.7] };
    expect(absorbanceSeries({ ...given, linearUpTo: 0.003 }).warnings).toEqual([
      {
        code: "above-line",
        message:
          "the film of mass fraction 0.006 lies 17 % above the line of the dilute films: association, or a thicker film; measure its thickness",
      },
    ]);
  });

  it("says what is wrong", () => {
    const given = { massFractions: [0.001, 0.002, 0.003], absorbances: [0.1, 0.2, 0.3], linearUpTo: 0.003 };
    expect(() => absorbanceSeries({ ...given, linearUpTo: 0.002 })).toThrow(
      "absorbanceSeries: 2 films up to linearUpTo 0.002; at least 3 must be dilute to show a line",
    );
    expect(() => absorbanceSeries({ ...given, absorbances: [1, 2] })).toThrow(
      "absorbanceSeries: massFractions holds 3, absorbances holds 2; the lists must be of the same length",
    );
    expect(() => absorbanceSeries({ ...given, massFractions: [0.1, 0.2, 3] })).toThrow(
      "absorbanceSeries: massFractions[2] is 3; it must be a number from 0 to 1",
    );
    expect(() => absorbanceSeries({ ...given, linearUpTo: 3 })).toThrow(
      "absorbanceSeries: linearUpTo is 3; it must be a number from 0 to 1",
    );
  });
});
