import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { interpolateSpectrum, spectrumMean } from "../../../lib/models/light.js";
import { readTable } from "../../reference/readTable.js";
import { finite } from "./litResins.js";

describe("interpolateSpectrum", () => {
  const table = { nodes_nm: [365, 385, 405], values: [10, 4, 7], where: 'spectrum "demo"' };

  it("goes through the nodes and straight between them", () => {
    expect(table.nodes_nm.map((wavelength_nm) => interpolateSpectrum({ ...table, wavelength_nm }))).toEqual(
      table.values,
    );
    expect(interpolateSpectrum({ ...table, wavelength_nm: 370 })).toBeCloseTo(8.5, 12);
    expect(interpolateSpectrum({ ...table, wavelength_nm: 400 })).toBeCloseTo(6.25, 12);
  });

  it("meets a published value between published nodes", () => {
    // Quantum yield of Fe(II) from ferrioxalate, data behind Wriedt, Ziegenbalg, J. Flow Chem. 10 (2020) 295-306,
    // doi 10.1007/s41981-019-00072-7: 360, 370 and 400, 410 nm give 365 and 405 nm. The curve bends by 5e-4 over 10 nm.
    const nodes_nm = [360, 370, 400, 410];
    const values = [1.2317, 1.2137, 1.1493, 1.1254];
    const yieldAt = (wavelength_nm: number): number =>
      interpolateSpectrum({ nodes_nm, values, wavelength_nm, where: "ferrioxalate" });
    expect(Math.abs(yieldAt(365) - 1.223)).toBeLessThan(5e-4);
    expect(Math.abs(yieldAt(405) - 1.1374)).toBeLessThan(5e-4);
  });

  it("does not guess beyond its nodes, and says how far they go", () => {
    for (const wavelength_nm of [364.9, 405.1, NaN]) {
      expect(() => interpolateSpectrum({ ...table, wavelength_nm })).toThrow(
        `spectrum "demo": wavelength_nm is ${wavelength_nm}; it must be a number from 365 to 405; ` +
          "the spectrum is not known beyond that, and nothing is guessed",
      );
    }
    expect(() => interpolateSpectrum({ ...table, nodes_nm: [365, 365, 405], wavelength_nm: 370 })).toThrow(
      'spectrum "demo": nodes_nm[1] is 365, after 365; the wavelengths must rise, without repeats',
    );
    expect(() => interpolateSpectrum({ ...table, values: [1, 2], wavelength_nm: 370 })).toThrow(
      'spectrum "demo": nodes_nm holds 3, values holds 2; the lists must be of the same length',
    );
  });
});

describe("spectrumMean", () => {
  it("is the value itself for a constant, the linear value at the middle for a straight line under an even source", () => {
    const wavelengths_nm = [380, 384, 393, 400];
    const even = { wavelengths_nm, spectrum: [2, 2, 2, 2] };
    expect(spectrumMean({ ...even, values: [7, 7, 7, 7] })).toBeCloseTo(7, 13);
    expect(spectrumMean({ ...even, values: wavelengths_nm })).toBeCloseTo(390, 10);
  });

  it("does not depend on the unit of the source, and lies between the extremes", () => {
    const rows = fc.array(fc.record({ S: finite(0.001, 5), v: finite(-3, 3) }), {
      minLength: 2,
      maxLength: 20,
    });
    fc.assert(
      fc.property(rows, finite(0.001, 1000), (list, unit) => {
        const wavelengths_nm = list.map((_, k) => 380 + k);
        const values = list.map(({ v }) => v);
        const mean = spectrumMean({ wavelengths_nm, spectrum: list.map(({ S }) => S), values });
        const scaled = spectrumMean({ wavelengths_nm, spectrum: list.map(({ S }) => unit * S), values });
        expect(scaled).toBeCloseTo(mean, 11);
        expect(mean).toBeGreaterThanOrEqual(Math.min(...values) - 1e-12);
        expect(mean).toBeLessThanOrEqual(Math.max(...values) + 1e-12);
      }),
    );
  });

  it("sees only one wavelength of a source that is one line wide", () => {
    const wavelengths_nm = Array.from({ length: 51 }, (_, k) => 380 + k);
    const values = wavelengths_nm.map((nm) => Math.exp(-nm / 20));
    const spectrum = wavelengths_nm.map((nm) => (nm === 405 ? 1 : 0));
    expect(spectrumMean({ wavelengths_nm, spectrum, values }) / Math.exp(-405 / 20)).toBeCloseTo(1, 9);
  });

  it.each([
    [
      { wavelengths_nm: [400, 399], spectrum: [1, 1], values: [1, 1] },
      "spectrumMean: wavelengths_nm[1] is 399, after 400; the wavelengths must rise, without repeats",
    ],
    [
      { wavelengths_nm: [400, 401], spectrum: [1, 1], values: [1] },
      "spectrumMean: wavelengths_nm holds 2, spectrum holds 2, values holds 1; the lists must be of the same length",
    ],
    [
      { wavelengths_nm: [400, 401], spectrum: [1, -0.1], values: [1, 1] },
      "spectrumMean: spectrum[1] is -0.1; it must be a finite number of at least 0",
    ],
    [
      { wavelengths_nm: [400, 401], spectrum: [0, 0], values: [1, 1] },
      "spectrumMean: spectrum is 0 at every node; a source must emit somewhere on the nodes",
    ],
    [
      { wavelengths_nm: [400], spectrum: [1], values: [1] },
      "spectrumMean: wavelengths_nm holds 1 number; at least 2 must be given",
    ],
    [
      { wavelengths_nm: [400, 401], spectrum: [1, 1], values: [1, NaN] },
      "spectrumMean: values[1] is NaN; it must be a finite number",
    ],
    [
      { wavelengths_nm: [400, 401], spectrum: [1e308, 1e308], values: [1, 1] },
      "spectrumMean: the mean is NaN; it must be a finite number; scale the spectrum to values near 1",
    ],
  ])("refuses %j", (input, message) => {
    expect(() => spectrumMean(input)).toThrow(message);
  });
});

describe("spectrumMean on measured engines and films", () => {
  // Open data published with Gong, Beauchamp, Perry, Woolley, Nordin, RSC Adv. 5 (2015) 106621, doi 10.1039/C5RA23855B
  // (files in test/reference/light). The means were worked out from the same data by an independent program and are
  // printed to 4 decimals; 0.2 % covers the last digit. Baselines (690-800 nm) as the header of each film file gives them.
  const engines = readTable("light/projector-led-spectra.csv");
  const brightener = readTable("light/film-absorbance-tpo-bbot.csv");
  const dye = readTable("light/film-absorbance-bapo-sudan1.csv");
  const films = {
    "TPO and BBOT": { nm: brightener.nm!, A: brightener.PI_and_absorber!.map((a) => a - 0.0075) },
    "BAPO 1 %": { nm: dye.nm!, A: dye.BAPO1pct!.map((a) => a - 0.0045) },
    "BAPO 1 %, Sudan I 0.2 %": { nm: dye.nm!, A: dye["BAPO1pct_SudanI0.2pct"]!.map((a) => a - -0.0293) },
  };

  const seen = (film: keyof typeof films, engine: string) => {
    const nodes = engines
      .nm!.map((nm, k) => ({ nm, S: engines[engine]![k]! }))
      .filter(({ nm }) => nm >= 355 && nm <= 430);
    const { nm: nodes_nm, A: values } = films[film];
    const A = nodes.map(({ nm }) =>
      interpolateSpectrum({ nodes_nm, values, wavelength_nm: nm, where: film }),
    );
    const mean = (list: number[]): number =>
      spectrumMean({
        wavelengths_nm: nodes.map(({ nm }) => nm),
        spectrum: nodes.map(({ S }) => S),
        values: list,
      });
    const peak = nodes.reduce((best, node, k) => (node.S > nodes[best]!.S ? k : best), 0);
    return {
      peakAbsorbance: A[peak]!,
      meanAbsorbance: mean(A),
      throughOne: mean(A.map((a) => 10 ** -a)),
      throughTwo: mean(A.map((a) => 10 ** (-2 * a))),
    };
  };

  it.each([
    ["TPO and BBOT", "L387", 0.882, 0.835, 0.1822, 0.055],
    ["TPO and BBOT", "L412", 0.2148, 0.2766, 0.5923, 0.4097],
    ["BAPO 1 %", "L387", 0.1363, 0.1326, 0.7381, 0.5467],
    ["BAPO 1 %", "L412", 0.0754, 0.0757, 0.842, 0.7124],
    ["BAPO 1 %, Sudan I 0.2 %", "L387", 0.6878, 0.6899, 0.2063, 0.0434],
    ["BAPO 1 %, Sudan I 0.2 %", "L412", 0.7948, 0.7831, 0.1652, 0.0275],
  ] as const)("%s under %s", (film, engine, atPeak, meanA, one, two) => {
    const found = seen(film, engine);
    // 0.2 %, or half a unit of the fourth decimal where that is more.
    const near = (value: number, printed: number): void =>
      expect(Math.abs(value - printed)).toBeLessThan(Math.max(2e-3 * printed, 6e-5));
    near(found.peakAbsorbance, atPeak);
    near(found.meanAbsorbance, meanA);
    near(found.throughOne, one);
    near(found.throughTwo, two);
  });
});
