import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  andradeViscosity,
  blendViscosity,
  fitBlend,
  fitRedlichKister,
  grunbergNissan,
  redlichKisterViscosity,
  type BlendReading,
} from "../../../lib/models/viscosity.js";
import { readBlocks } from "../../reference/readTable.js";
import { readIsotherm } from "./readIsotherm.js";

const binary = (x: number, viscosity_mPas: number, temperature_C = 25): BlendReading => ({
  fractions: [x, 1 - x],
  temperature_C,
  viscosity_mPas,
});
const codes = (fit: { readonly warnings: readonly { readonly code: string }[] }): string[] =>
  fit.warnings.map(({ code }) => code);

/** Repeatable normal numbers. */
function normals(seed: number): () => number {
  let state = seed;
  const uniform = (): number => (state = (state * 16807) % 2147483647) / 2147483647;
  return () => Math.sqrt(-2 * Math.log(uniform())) * Math.cos(2 * Math.PI * uniform());
}

const line = (x: number): number =>
  redlichKisterViscosity({
    fraction: x,
    viscosities_mPas: [2400, 10],
    basis: "mass",
    interaction: { terms: [-1.1], basis: "mass" },
  });
const places = [0, 0.15, 0.3, 0.4, 0.5, 0.6, 0.7, 0.85, 1];

describe("fitBlend, what it fits", () => {
  it("returns the neat liquids and the terms a binary was made with", () => {
    const term = fc.double({ min: -3, max: 3, noNaN: true });
    fc.assert(
      fc.property(term, term, term, (G0, G1, G2) => {
        const interaction = { terms: [G0, G1, G2], basis: "mass" } as const;
        const readings = places.map((x) => {
          const blend = { fraction: x, viscosities_mPas: [2400, 10], basis: "mass", interaction } as const;
          return binary(x, redlichKisterViscosity(blend));
        });
        const fit = fitBlend({ readings, basis: "mass", terms: 3, level: 0.95 });
        interaction.terms.forEach((G, k) => expect(fit.pairs[0]!.terms[k]).toBeCloseTo(G, 9));
        expect(fit.neatViscosities_mPas[0]!.value / 2400).toBeCloseTo(1, 9);
        expect(fit.neatViscosities_mPas[1]!.value / 10).toBeCloseTo(1, 9);
        const at = blendViscosity({ fit, fractions: [0.55, 0.45], temperature_C: 25, level: 0.95 });
        const made = { fraction: 0.55, viscosities_mPas: [2400, 10], basis: "mass", interaction } as const;
        expect(at.value / redlichKisterViscosity(made)).toBeCloseTo(1, 9);
      }),
    );
  });

  it("returns three liquids, their pairs and their temperature laws", () => {
    const laws = [
      { lnPrefactor: -9, activation_K: 5000 },
      { lnPrefactor: -6, activation_K: 2600 },
      { lnPrefactor: -5, activation_K: 2200 },
    ];
    const G = [-1.2, -0.7, 0.3];
    const made = (fractions: readonly number[], temperature_C: number): number =>
      grunbergNissan({
        fractions: [...fractions],
        viscosities_mPas: laws.map((law) => andradeViscosity({ ...law, temperature_C })),
        basis: "mass",
        interactions: [
          { first: 0, second: 1, G: G[0]! * (1 + 200 / (temperature_C + 273.15)), basis: "mass" },
          { first: 0, second: 2, G: G[1]!, basis: "mass" },
          { first: 1, second: 2, G: G[2]!, basis: "mass" },
        ],
      });
    const blends = [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
      [0.5, 0.5, 0],
      [0.5, 0, 0.5],
      [0, 0.5, 0.5],
      [0.4, 0.3, 0.3],
    ];
    const readings = [20, 40].flatMap((temperature_C) =>
      blends.map((fractions) => ({
        fractions,
        temperature_C,
        viscosity_mPas: made(fractions, temperature_C),
      })),
    );
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    expect(fit.pairs.map(({ first, second }) => [first, second])).toEqual([
      [0, 1],
      [0, 2],
      [1, 2],
    ]);
    expect(fit.pairs[2]!.terms[0]).toBeCloseTo(0.3, 9);
    for (const temperature_C of [20, 31, 40]) {
      const at = blendViscosity({ fit, fractions: [0.6, 0.1, 0.3], temperature_C, level: 0.95 });
      expect(at.value / made([0.6, 0.1, 0.3], temperature_C)).toBeCloseTo(1, 9);
    }
    const reference = fit.referenceTemperature_C;
    expect(fit.neatViscosities_mPas[0]!.value / made([1, 0, 0], reference)).toBeCloseTo(1, 9);
  });

  it("comes to the fit with held ends when the neat readings weigh all but everything", () => {
    const { x1, eta, pure } = readIsotherm("benzene__butyl-acrylate", "298.15");
    const readings = x1.map((x, i) => ({
      ...binary(x, eta[i]!),
      relativeU: x === 0 || x === 1 ? 1e-7 : 0.003,
    }));
    const free = fitBlend({ readings, basis: "mole", terms: 1, level: 0.95 });
    const held = fitRedlichKister({
      fractions: x1,
      viscosities_mPas: eta,
      pureViscosities_mPas: pure,
      basis: "mole",
      terms: 1,
    });
    expect(free.pairs[0]!.terms[0]).toBeCloseTo(held.terms[0]!, 6);
    // 11 readings less 3 coefficients against 9 less 1: the same degrees, so the same standard error.
    expect(free.pairs[0]!.standardErrors[0]).toBeCloseTo(held.standardErrors[0]!, 6);
    expect(free.pairs[0]!.basis).toBe("mole");
  });

  it("does not see a change of unit, or of the order of readings and liquids", () => {
    const random = normals(99);
    const readings = places.map((x) => binary(x, line(x) * Math.exp(0.03 * random())));
    const fit = fitBlend({ readings, basis: "mass", terms: 2, level: 0.9 });
    const changed = readings
      .map(({ fractions, viscosity_mPas }) => ({
        fractions: [fractions[1]!, fractions[0]!],
        temperature_C: 25,
        viscosity_mPas: 1000 * viscosity_mPas,
      }))
      .reverse();
    const other = fitBlend({ readings: changed, basis: "mass", terms: 2, level: 0.9 });
    expect(other.pairs[0]!.terms[0]).toBeCloseTo(fit.pairs[0]!.terms[0]!, 9);
    expect(other.pairs[0]!.terms[1]).toBeCloseTo(-fit.pairs[0]!.terms[1]!, 9);
    expect(other.residualStandardDeviation).toBeCloseTo(fit.residualStandardDeviation, 10);
    expect(other.adequacy.runs.runs).toBe(fit.adequacy.runs.runs);
    expect(other.neatViscosities_mPas[1]!.low / fit.neatViscosities_mPas[0]!.low).toBeCloseTo(1000, 6);
  });
});

describe("fitBlend and blendViscosity, how far to trust it", () => {
  it("covers neat viscosities and new readings as often as it says", () => {
    // Normal scatter of 3 %, 1500 tables, level 0.9 +- 4 standard errors.
    const random = normals(2024);
    let [neat, fresh] = [0, 0];
    for (let k = 0; k < 1500; k++) {
      const readings = places.map((x) => binary(x, line(x) * Math.exp(0.03 * random())));
      const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.9 });
      const { low, high } = fit.neatViscosities_mPas[0]!;
      if (low <= 2400 && 2400 <= high) neat++;
      const at = blendViscosity({ fit, fractions: [0.45, 0.55], temperature_C: 25, level: 0.9 });
      const reading = line(0.45) * Math.exp(0.03 * random());
      if (at.low <= reading && reading <= at.high) fresh++;
    }
    const margin = 4 * Math.sqrt(0.09 / 1500);
    expect(Math.abs(neat / 1500 - 0.9)).toBeLessThan(margin);
    expect(Math.abs(fresh / 1500 - 0.9)).toBeLessThan(margin);
  });

  it("weighs readings by their stated uncertainty, and states the scatter in it", () => {
    const random = normals(5);
    const u = (x: number): number => (x > 0.5 ? 0.05 : 0.01);
    const readings = [...places, ...places].map((x) => ({
      ...binary(x, line(x) * Math.exp(u(x) * random())),
      relativeU: u(x),
    }));
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    // 15 degrees of freedom: s lies within 0.5 and 1.5 of the stated uncertainty but once in a thousand times.
    expect(fit.residualStandardDeviation).toBeGreaterThan(0.5);
    expect(fit.residualStandardDeviation).toBeLessThan(1.5);
    const mean = Math.sqrt(
      readings.reduce((sum, { relativeU }) => sum + relativeU ** 2, 0) / readings.length,
    );
    expect(fit.readingStandardDeviation).toBeCloseTo(mean * fit.residualStandardDeviation, 12);
    const halved = fitBlend({
      readings: readings.map((reading) => ({ ...reading, relativeU: reading.relativeU / 2 })),
      basis: "mass",
      terms: 1,
      level: 0.95,
    });
    expect(halved.pairs[0]!.standardErrors[0]).toBeCloseTo(fit.pairs[0]!.standardErrors[0]!, 12);
    expect(halved.residualStandardDeviation).toBeCloseTo(2 * fit.residualStandardDeviation, 10);
  });

  it("flags blends and temperatures beyond the readings", () => {
    const readings = [0.3, 0.4, 0.5, 0.6, 0.7].flatMap((x) =>
      [20, 40].map((t) => binary(x, line(x) * Math.exp(-0.05 * (t - 25) + 0.01 * Math.sin(9 * x + t)), t)),
    );
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    const at = (x: number, temperature_C: number) =>
      blendViscosity({ fit, fractions: [x, 1 - x], temperature_C, level: 0.95 });
    expect(at(0.5, 30).warnings).toEqual([]);
    expect(at(0.95, 30).warnings).toEqual([
      {
        code: "extrapolated",
        message: "this blend lies further out than any reading; the interval takes the rule for true there",
      },
    ]);
    expect(at(0.5, 45).warnings[0]).toEqual({
      code: "extrapolated",
      message: "45 °C lies outside the 20 to 40 °C measured",
    });
    expect(at(0.95, 30).high / at(0.95, 30).low).toBeGreaterThan(at(0.5, 30).high / at(0.5, 30).low);
    expect(codes(fit)).toEqual(["neat-extrapolated", "neat-extrapolated"]);
    expect(fit.warnings[0]!.message).toBe(
      "no reading holds more than 0.7 of liquid 0; its neat viscosity is an extrapolation, good for blends only",
    );
  });

  it("flags blends beyond the readings with weights as without", () => {
    const readings = [0.3, 0.4, 0.5, 0.6, 0.7].map((x, i) => ({
      ...binary(x, line(x) * (1 + 0.01 * Math.sin(9 * x))),
      relativeU: i === 0 ? 0.04 : 0.02,
    }));
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    const at = (x: number) => blendViscosity({ fit, fractions: [x, 1 - x], temperature_C: 25, level: 0.95 });
    for (const x of [0.3, 0.5, 0.7]) expect(at(x).warnings).toEqual([]);
    expect(codes(at(0.95))).toEqual(["extrapolated"]);
  });

  it("does not answer for a temperature it knows nothing of, nor for other liquids", () => {
    const fit = fitBlend({
      readings: places.map((x) => binary(x, line(x) * (1 + 0.01 * Math.sin(20 * x)))),
      basis: "mass",
      terms: 1,
      level: 0.95,
    });
    const ask = { fit, fractions: [0.5, 0.5], temperature_C: 25, level: 0.95 };
    expect(() => blendViscosity({ ...ask, temperature_C: 40 })).toThrow(
      "blendViscosity: all readings are near 25 °C, and they do not say what happens at 40 °C; measure at a second temperature",
    );
    expect(() => blendViscosity({ ...ask, fractions: [0.5, 0.3, 0.2] })).toThrow(
      "blendViscosity: fractions holds 3; the fit has 2 liquids, give one fraction each",
    );
    expect(() => blendViscosity({ ...ask, fractions: [0.5, 0.4] })).toThrow(
      "blendViscosity: fractions add up to 0.9",
    );
    expect(() => blendViscosity({ ...ask, level: 2 })).toThrow(
      "blendViscosity: level is 2; it must be a number from 0.5 to 0.999",
    );
    expect(() => blendViscosity({ ...ask, temperature_C: NaN })).toThrow(
      "blendViscosity: temperature_C is NaN",
    );
  });

  it("counts a pair that was never mixed as ideal, and says so where it matters", () => {
    const three = (a: number, b: number, c: number, viscosity_mPas: number): BlendReading => ({
      fractions: [a, b, c],
      temperature_C: 25,
      viscosity_mPas,
    });
    const readings = [
      three(1, 0, 0, 2400),
      three(0.7, 0.3, 0, 380),
      three(0.4, 0.6, 0, 75),
      three(0, 1, 0, 10),
      three(0.7, 0, 0.3, 500),
      three(0.4, 0, 0.6, 112),
      three(0, 0, 1, 16),
    ];
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    expect(fit.pairs).toHaveLength(2);
    expect(fit.warnings).toContainEqual({
      code: "pair-not-measured",
      message: "no reading holds both liquid 1 and liquid 2; the pair counts as ideal",
    });
    const ask = { fit, temperature_C: 25, level: 0.95 };
    expect(codes(blendViscosity({ ...ask, fractions: [0.5, 0.25, 0.25] }))).toContain("pair-not-measured");
    expect(codes(blendViscosity({ ...ask, fractions: [0.5, 0.5, 0] }))).not.toContain("pair-not-measured");
  });
});

describe("fitBlend, is the model enough?", () => {
  it("does not call one G adequate for squalane and 1-octanol", () => {
    // Dubey, Sharma, Int. J. Thermophys. 29 (2008) 1361-1375, 298.15 K: an S-shaped misfit of 6 to 11 %.
    const { x1, eta } = readIsotherm("squalane__1-octanol", "298.15");
    const fit = fitBlend({
      readings: x1.map((x, i) => binary(x, eta[i]!)),
      basis: "mole",
      terms: 1,
      level: 0.95,
    });
    expect(fit.adequacy.verdict).toBe("systematic misfit: add a term");
    expect(fit.adequacy.runs.probability).toBeLessThan(0.05);
    expect(fit.adequacy.gain!.terms).toBe(3);
  });

  it("uses repeats: the same scatter is adequate beside coarse repeats and a misfit beside fine ones", () => {
    // A second term of -1 left out makes a wave of some 4 %.
    const curved = (x: number): number =>
      redlichKisterViscosity({
        fraction: x,
        viscosities_mPas: [2400, 10],
        basis: "mass",
        interaction: { terms: [-1.1, -1], basis: "mass" },
      });
    const table = (spread: number) =>
      fitBlend({
        readings: [0, 0.25, 0.5, 0.75, 1].flatMap((x) =>
          [1, 2].map((repeat) => ({ ...binary(x, curved(x) * Math.exp((repeat - 1.5) * spread)), repeat })),
        ),
        basis: "mass",
        terms: 1,
        level: 0.95,
      }).adequacy;
    const [fine, coarse] = [table(0.002), table(0.5)];
    expect(fine.verdict).toBe("systematic misfit: add a term");
    expect(fine.reason).toMatch(
      /^the readings lie further from the fit than repeats from each other \(chance/,
    );
    // Repeats 0.002 apart: a standard deviation of 0.002 / sqrt(2).
    expect(fine.lackOfFit!.repeatability).toBeCloseTo(0.002 / Math.SQRT2, 10);
    expect(coarse.lackOfFit!.probability).toBeGreaterThan(0.5);
    expect(coarse.verdict).toBe("adequate");
  });

  it("accepts what is within the stated uncertainty, and says when it cannot tell", () => {
    const { x1, eta } = readIsotherm("1-propanol__butyl-lactate", "298.15");
    const verdict = (relativeU?: number) =>
      fitBlend({
        readings: x1.map((x, i) => ({ ...binary(x, eta[i]!), ...(relativeU && { relativeU }) })),
        basis: "mole",
        terms: 1,
        level: 0.95,
      }).adequacy;
    // One G leaves 0.6 %, smooth enough to be seen, and nothing to a viscometer of 2 %.
    expect(verdict().verdict).toBe("systematic misfit: add a term");
    expect(verdict(0.02).verdict).toBe("adequate");
    expect(verdict(0.02).reason).toBe(
      "the residuals are no larger than the stated uncertainty of the readings",
    );

    const few = fitBlend({
      readings: [binary(0, 10), binary(0.3, 38), binary(0.6, 220), binary(1, 2400)],
      basis: "mass",
      terms: 1,
      level: 0.95,
    });
    expect(few.adequacy.verdict).toBe("too few readings to tell");
    expect(codes(few)).toEqual(["few-degrees"]);
    expect(few.warnings[0]!.message).toBe(
      "1 reading more than coefficients; with fewer than 3 more the intervals are very wide",
    );
  });
});

describe("fitBlend, readings to look at again", () => {
  it("finds the one misprinted point of a ternary table among its 81 readings", () => {
    // Iloukhani, Habibi, Khanlarzadeh, Thermochim. Acta 563 (2013) 67-71, doi 10.1016/j.tca.2013.03.008: (0.2007, 0.3501)
    // is printed as 1.784, twice its neighbours.
    const path = "viscosity/ternary__3-pentanone__2-butanol__ethyl-chloroacetate.csv";
    const [butanolPentanone, butanolAcetate, pentanoneAcetate, ternary] = readBlocks(path);
    const row = (fractions: number[], viscosity_mPas: number): BlendReading => ({
      fractions,
      temperature_C: 25,
      viscosity_mPas,
    });
    const readings = [
      ...ternary!.map(([x1, x2, eta]) => row([x1!, x2!, 1 - x1! - x2!], eta!)),
      ...butanolPentanone!.map(([x, eta]) => row([1 - x!, x!, 0], eta!)),
      ...butanolAcetate!.map(([x, eta]) => row([0, x!, 1 - x!], eta!)),
      ...pentanoneAcetate!.map(([x, eta]) => row([x!, 0, 1 - x!], eta!)),
    ];
    const fit = fitBlend({ readings, basis: "mole", terms: 2, level: 0.95 });
    expect(readings).toHaveLength(81);
    expect(fit.outliers.map((i) => readings[i]!.viscosity_mPas)).toEqual([1.784]);
    expect(fit.warnings).toEqual([
      {
        code: "outlier",
        message:
          "reading 15 (0.2007 / 0.3501 / 0.4492 at 25 °C, 1.784 mPas) lies 28 robust standard deviations off the others; " +
          "measure it again, or leave it out and say so",
      },
    ]);
  });

  it("suspects neat readings that were exchanged", () => {
    const readings = places.map((x) => binary(x, line(x) * (1 + 0.01 * Math.sin(20 * x))));
    const fit = (exchange: boolean) =>
      fitBlend({
        readings: readings.map((r, i) =>
          exchange && (i === 0 || i === 8) ? { ...r, viscosity_mPas: readings[8 - i]!.viscosity_mPas } : r,
        ),
        basis: "mass",
        terms: 1,
        level: 0.95,
      });
    expect(codes(fit(false))).toEqual([]);
    expect(fit(true).warnings).toContainEqual({
      code: "ends-swapped",
      message:
        "with the neat readings counted for the other liquid the scatter falls by more than 3 times; " +
        "check which liquid the fractions count and which neat reading is whose",
    });
  });

  it("flags a blend that is thicker when warmer, by the places of its readings", () => {
    const readings = [0, 0.25, 0.5, 0.75, 1].flatMap((x) =>
      [20, 40].map((t) => binary(x, line(x) * Math.exp(-0.03 * (t - 25)), t)),
    );
    readings[5] = binary(0.5, 1.1 * readings[4]!.viscosity_mPas, 40);
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    const rise = fit.warnings.find(({ code }) => code === "not-falling");
    expect(rise!.message).toMatch(
      /^the viscosity does not fall from reading 4 \(20 °C, .* mPas\) to reading 5 \(40 °C, .* mPas\); check both/,
    );
  });

  it("minds shear rates: quiet at one rate, doubtful when mixed, warning when a blend thins", () => {
    const random = normals(31);
    const base = places.map((x) => ({
      ...binary(x, line(x) * Math.exp(0.01 * random())),
      shearRate_pers: 20,
    }));
    const found = (readings: readonly BlendReading[]) =>
      fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 }).warnings;
    expect(found(base)).toEqual([]);
    const mixed = base.map((r, i) => ({ ...r, shearRate_pers: i > 4 ? 2 : 100 }));
    expect(found(mixed)).toEqual([
      {
        code: "mixed-shear-rates",
        message:
          "shear rates run from 2 to 100 1/s and no blend was read at two of them; " +
          "read one blend at both ends to see whether it thins",
      },
    ]);
    const thinning = [
      ...base,
      { ...base[7]!, shearRate_pers: 200, viscosity_mPas: 0.7 * base[7]!.viscosity_mPas },
    ];
    expect(found(thinning).map(({ code }) => code)).toContain("shear-thinning");
    const steady = [
      ...base,
      { ...base[7]!, shearRate_pers: 200, viscosity_mPas: 1.005 * base[7]!.viscosity_mPas },
    ];
    expect(found(steady)).toEqual([]);
  });

  it("takes temperatures within 2 K as one, and says so", () => {
    const readings = places.map((x, i) => binary(x, line(x) * (1 + 0.01 * Math.sin(20 * x)), 25 + i / 10));
    const fit = fitBlend({ readings, basis: "mass", terms: 1, level: 0.95 });
    expect(fit.shape.severalTemperatures).toBe(false);
    expect(fit.referenceTemperature_C).toBeCloseTo(25.4, 2);
    expect(fit.warnings).toEqual([
      {
        code: "temperatures-differ",
        message:
          "readings from 25 to 25.8 °C are taken as one temperature; 1 K changes a resin by 3 to 6 %, " +
          "so hold it within 0.1 K or measure at temperatures 10 K apart",
      },
    ]);
  });
});

describe("fitBlend, refusals", () => {
  const readings = places.map((x) => binary(x, line(x)));
  const good = { readings, basis: "mass", terms: 1, level: 0.95 } as const;
  const changed = (place: number, change: object): typeof good => ({
    ...good,
    readings: readings.map((reading, i) => (i === place ? { ...reading, ...change } : reading)),
  });
  it.each([
    [{ ...good, readings: readings.slice(0, 3) }, "fitBlend: readings holds 3; at least 4 must be given"],
    [
      { ...good, readings: readings.slice(0, 4), terms: 2 as const },
      "fitBlend: 4 readings for 4 coefficients (2 neat liquids and 2 interaction terms); give at least 5 readings, " +
        "fewer terms or one temperature",
    ],
    [
      {
        ...good,
        readings: [0, 0.3, 0.6, 1]
          .flatMap((x) => [binary(x, line(x)), binary(x, line(x) / 2, 45)])
          .slice(0, 6),
      },
      "fitBlend: 6 readings for 6 coefficients (2 neat liquids and 1 interaction terms, each with its slope in 1/T)",
    ],
    [
      { ...good, readings: places.map((_, i) => binary(0.5, 100 + i)) },
      "fitBlend: the readings do not tell the 3 coefficients apart: 1 different compositions of 2 liquids; " +
        "measure other compositions or fit fewer terms",
    ],
    [
      { ...good, readings: places.map((x, i) => binary(x, line(x), i === 8 ? 50 : 25)) },
      "fitBlend: the readings do not tell the 6 coefficients apart: 9 different compositions of 2 liquids; " +
        "measure other compositions, each at two temperatures, or fit fewer terms",
    ],
    [
      changed(2, { viscosity_mPas: 0 }),
      "fitBlend: readings[2].viscosity_mPas is 0; it must be a finite number above 0",
    ],
    [
      changed(2, { viscosity_mPas: -3 }),
      "fitBlend: readings[2].viscosity_mPas is -3; it must be a finite number above 0",
    ],
    [
      changed(2, { fractions: [1.3, -0.3] }),
      "fitBlend: readings[2].fractions[0] is 1.3; it must be a number from 0 to 1",
    ],
    [
      changed(2, { fractions: [0.3, 0.6] }),
      "fitBlend: readings[2].fractions add up to 0.9; they must add up to 1 within 1e-6; divide each by the sum",
    ],
    [
      changed(2, { fractions: [0.3, 0.3, 0.4] }),
      "fitBlend: readings[2].fractions holds 3 and readings[0].fractions 2; give one fraction a liquid in every reading",
    ],
    [
      changed(2, { temperature_C: -300 }),
      "fitBlend: readings[2].temperature_C is -300; it must be a finite number above -273.15; give it in degrees Celsius",
    ],
    [
      changed(2, { shearRate_pers: 0 }),
      "fitBlend: readings[2].shearRate_pers is 0; it must be a finite number above 0",
    ],
    [
      changed(2, { relativeU: 0.02 }),
      "fitBlend: readings[2] has a relativeU and readings[0] has none; give it for all readings or for none",
    ],
    [
      changed(0, { relativeU: 0.02 }),
      "fitBlend: readings[1] has no relativeU and readings[0] has one; give it for all readings or for none",
    ],
    [
      changed(0, { relativeU: 2 }),
      "fitBlend: readings[0].relativeU is 2; it must be a number above 0 and at most 1",
    ],
    [changed(2, { repeat: NaN }), "fitBlend: readings[2].repeat is NaN; it must be a finite number"],
    [
      { ...good, readings: [...readings, { ...readings[3]!, repeat: 1 }, { ...readings[3]!, repeat: 1 }] },
      "fitBlend: readings[10] is the same repeat of the same blend as readings[9]; " +
        "leave out the row that was entered twice, or number the repeats",
    ],
    [{ ...good, terms: 0 as 1 }, "fitBlend: terms is 0; it must be 1, 2 or 3"],
    [{ ...good, basis: "vol" as "volume" }, 'fitBlend: unknown basis "vol"; '],
    [{ ...good, level: 1 }, "fitBlend: level is 1; it must be a number from 0.5 to 0.999"],
  ])("refuses case %#", (table, message) => {
    expect(() => fitBlend(table)).toThrow(message);
  });
});
