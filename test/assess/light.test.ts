import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { opticalDepthOf } from "../../lib/assess/light.js";
import type { Brief } from "../../lib/recipe/brief.js";
import { brief, formulationOf, shelf, sure } from "../fixtures.js";

const depth = (parts: Record<string, number>, under: Brief = brief, on = shelf) =>
  opticalDepthOf({ formulation: formulationOf(parts), brief: under, shelf: on, draws: 200 });
const nominal = (value: number, u = 0): Brief => ({
  ...brief,
  light: { ...brief.light, spectrum: undefined, wavelength_nm: sure(value, u) },
});

describe("opticalDepthOf", () => {
  // 1 % of 400 g/mol in a resin of density 1 is 0.025 mol/L; 500 L/(mol cm) decadic; background 1 per cm Napierian.
  it("is one over the Napierian absorption of initiator and resin", () => {
    const alpha_percm = Math.LN10 * 500 * 0.025 + 1;
    expect(depth({ THIN: 99, PI: 1 }).value).toBeCloseTo(1e4 / alpha_percm, 8);
  });

  it("is the background's own depth without initiator, and says so", () => {
    const clear = depth({ THIN: 100 });
    expect(clear.value).toBeCloseTo(1e4, 8);
    expect(clear.warnings.map(({ code }) => code)).toEqual(["no-initiator"]);
  });

  it("gives a flat spectrum and any one wavelength the same depth", () => {
    expect(depth({ THIN: 98.9, PI: 1, AB: 0.1 }, nominal(391)).value).toBeCloseTo(
      depth({ THIN: 98.9, PI: 1, AB: 0.1 }).value,
      8,
    );
  });

  it("never deepens with more absorber", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.double({ min: 0.001, max: 1, noNaN: true }),
        (less, more) => {
          const of = (absorber: number) => depth({ THIN: 98 - absorber, PI: 2, AB: absorber }).value;
          expect(of(less + more)).toBeLessThan(of(less));
        },
      ),
      { numRuns: 20 },
    );
  });

  it("shows the nominal wavelength as a warning and its doubt in the sources", () => {
    const result = depth({ THIN: 99, PI: 1 }, nominal(400, 3));
    expect(result.warnings.map(({ code }) => code)).toEqual(["nominal-wavelength"]);
    expect(result.sources.map(({ figure }) => figure)).toContain("wavelength of the light");
  });

  it("refuses light that a spectrum does not cover", () => {
    expect(() => depth({ THIN: 99, PI: 1 }, nominal(450))).toThrow('spectrum "pi"');
    expect(() => depth({ THIN: 99, PI: 1 }, nominal(450))).toThrow("380");
  });

  it("names the ingredient that lacks what light needs", () => {
    const without = (field: string) => {
      const formulation = formulationOf({ THIN: 99, PI: 1 });
      const [liquid, initiator] = formulation.components;
      const stripped = { ...initiator!, ingredient: { ...initiator!.ingredient, [field]: undefined } };
      return () =>
        opticalDepthOf({
          formulation: { ...formulation, components: [liquid!, stripped] },
          brief,
          shelf,
        });
    };
    expect(without("spectrum")).toThrow(
      'formulation "test": PI has no absorption spectrum; add one to spectra/',
    );
    expect(without("molarMass_gmol")).toThrow(
      'formulation "test": PI has no molarMass_gmol; add it to the ingredient',
    );
    expect(without("radicalsPerPhoton")).toThrow('formulation "test": PI has no radicalsPerPhoton; add it');
    expect(without("density_gcm3")).toThrow('formulation "test": PI has no density_gcm3; add it');
    expect(() =>
      depth({ THIN: 99, PI: 1 }, { ...brief, light: { ...brief.light, spectrum: "lampp" } }),
    ).toThrow('brief "test": unknown spectrum "lampp"; did you mean "lamp"?');
  });
});
