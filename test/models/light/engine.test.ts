import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { lightEngine, spectrumMean } from "../../../lib/models/light.js";

describe("lightEngine", () => {
  it("gives each node the share of the trapezoid rule, whatever the unit of the spectrum", () => {
    const rows = fc.array(
      fc.tuple(fc.double({ min: 0.1, max: 20, noNaN: true }), fc.double({ min: 0.001, max: 5, noNaN: true })),
      {
        minLength: 2,
        maxLength: 30,
      },
    );
    fc.assert(
      fc.property(rows, fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (list, unit) => {
        let nm = 380;
        const wavelengths_nm = list.map(([step]) => (nm += step));
        const spectrum = list.map(([, S]) => S);
        const { shares } = lightEngine({ wavelengths_nm, spectrum: spectrum.map((S) => unit * S) });
        expect(shares.reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 12);
        const values = wavelengths_nm.map((x) => Math.sin(x));
        const mean = shares.reduce((sum, share, k) => sum + share * values[k]!, 0);
        expect(mean).toBeCloseTo(spectrumMean({ wavelengths_nm, spectrum, values }), 12);
      }),
    );
  });

  it.each([
    [
      { wavelengths_nm: [400], spectrum: [1] },
      "lightEngine: wavelengths_nm holds 1 number; at least 2 must be given",
    ],
    [
      { wavelengths_nm: [400, 400], spectrum: [1, 1] },
      "lightEngine: wavelengths_nm[1] is 400, after 400; the wavelengths must rise, without repeats",
    ],
    [
      { wavelengths_nm: [400, 410], spectrum: [1, -1] },
      "lightEngine: spectrum[1] is -1; it must be a finite number of at least 0",
    ],
    [
      { wavelengths_nm: [400, 410], spectrum: [1] },
      "lightEngine: wavelengths_nm holds 2, spectrum holds 1; the lists must be of the same length",
    ],
    [
      { wavelengths_nm: [400, 410], spectrum: [0, 0] },
      "lightEngine: spectrum is 0 at every node; a source must emit somewhere on the nodes",
    ],
    [
      { wavelengths_nm: [400, 410], spectrum: [1e308, 1e308] },
      "lightEngine: shares[0] is NaN; it must be a finite number; scale the spectrum to values near 1",
    ],
  ])("refuses %j", (input, message) => {
    expect(() => lightEngine(input)).toThrow(message);
  });
});
