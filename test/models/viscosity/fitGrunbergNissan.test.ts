import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  fitGrunbergNissan,
  grunbergNissan,
  moleToMassFractions,
  type MixingBasis,
} from "../../../lib/models/viscosity.js";
import { readIsotherm, type Isotherm } from "./readIsotherm.js";

function fit(
  { x1, eta, pure }: Isotherm,
  basis: MixingBasis = "mole",
  molarMasses?: readonly [number, number],
) {
  const fractions =
    molarMasses === undefined
      ? x1
      : x1.map((x) => moleToMassFractions({ moleFractions: [x, 1 - x], molarMasses_gmol: molarMasses })[0]!);
  const blends = { fractions, viscosities_mPas: eta, pureViscosities_mPas: pure, basis };
  const deviations = fractions
    .map((x, k) => ({ x, eta: eta[k]! }))
    .filter(({ x }) => x > 0 && x < 1)
    .map((blend) => {
      const ideal = { fractions: [blend.x, 1 - blend.x], viscosities_mPas: pure, basis, interactions: [] };
      return Math.abs(grunbergNissan(ideal) / blend.eta - 1);
    });
  return {
    ...fitGrunbergNissan(blends),
    idealDeviation: deviations.reduce((sum, d) => sum + d, 0) / deviations.length,
  };
}

describe("fitGrunbergNissan", () => {
  it("returns the G a mixture was made with, and no doubt", () => {
    const G = fc.double({ min: -5, max: 5, noNaN: true });
    const eta = fc.double({ min: 0.5, max: 1e4, noNaN: true });
    fc.assert(
      fc.property(G, eta, eta, (made, eta1, eta2) => {
        const fractions = [0, 0.2, 0.5, 0.7, 1];
        const viscosities_mPas = fractions.map((x) =>
          grunbergNissan({
            fractions: [x, 1 - x],
            viscosities_mPas: [eta1, eta2],
            basis: "volume",
            interactions: [{ first: 0, second: 1, G: made, basis: "volume" }],
          }),
        );
        const found = fitGrunbergNissan({
          fractions,
          viscosities_mPas,
          pureViscosities_mPas: [eta1, eta2],
          basis: "volume",
        });
        expect(found.G).toBeCloseTo(made, 11);
        expect(found.u).toBeLessThan(1e-12);
        expect(found).toMatchObject({ basis: "volume", points: 3 });
      }),
    );
  });

  // Published tables; G, s and the average deviations (AAD) were fitted to them by an independent program with the
  // definition in the documentation of fitGrunbergNissan, and printed to 5 decimals and 0.01 %.
  it.each([
    // Ali, Nabi, Tariq, Int. J. Thermophys. 30 (2009) 464-474, doi 10.1007/s10765-009-0562-x.
    {
      file: "benzene__methyl-acrylate",
      T: "298.15",
      G: -0.04248,
      u: 0.001,
      s: 0.00059,
      AAD: 0.04,
      points: 9,
    },
    { file: "benzene__butyl-acrylate", T: "298.15", G: -0.0624, u: 0.0047, s: 0.00275, AAD: 0.23, points: 9 },
    // Dubey, Sharma, Int. J. Thermophys. 29 (2008) 1361-1375, doi 10.1007/s10765-008-0491-0.
    { file: "1-octanol__hexadecane", T: "298.15", G: -0.95038, u: 0.0144, s: 0.00933, AAD: 0.77, points: 14 },
    { file: "1-octanol__hexadecane", T: "308.15", G: -0.87412, u: 0.0186, s: 0.01206, AAD: 0.98, points: 14 },
  ])("fits $file at $T K", ({ file, T, G, u, s, AAD, points }) => {
    const found = fit(readIsotherm(file, T));
    expect(Math.abs(found.G - G)).toBeLessThan(2e-5);
    expect(Math.abs(found.u - u)).toBeLessThan(6e-5);
    expect(Math.abs(found.residualStandardDeviation - s)).toBeLessThan(2e-5);
    expect(Math.abs(100 * found.averageDeviation - AAD)).toBeLessThan(0.02);
    expect(found.points).toBe(points);
  });

  it("gives a G that belongs to its basis: what is ideal by mass is far from it by mole, and the reverse", () => {
    // Bajic, Zivkovic, Serbanovic, Kijevcanin, Thermochim. Acta 562 (2013) 42-55, doi 10.1016/j.tca.2013.03.025,
    // 298.15 K; figures by an independent program, printed to 0.01 % and 5 decimals. Molar masses from atomic weights.
    const diol = readIsotherm("12-propanediol__butyl-lactate", "298.15");
    const [byMole, byMass] = [fit(diol), fit(diol, "mass", [76.094, 146.184])];
    expect(Math.abs(byMole.G - -1.67317)).toBeLessThan(2e-5);
    expect(Math.abs(byMass.G - -0.01104)).toBeLessThan(2e-5);
    expect(Math.abs(100 * byMole.idealDeviation - 36.87)).toBeLessThan(0.02);
    expect(Math.abs(100 * byMass.idealDeviation - 0.78)).toBeLessThan(0.02);

    const alcohol = readIsotherm("1-propanol__butyl-lactate", "298.15");
    expect(Math.abs(100 * fit(alcohol).idealDeviation - 0.61)).toBeLessThan(0.02);
    expect(Math.abs(100 * fit(alcohol, "mass", [60.095, 146.184]).idealDeviation - 9.27)).toBeLessThan(0.02);
  });

  const good = {
    fractions: [0.3, 0.6],
    viscosities_mPas: [20, 60],
    pureViscosities_mPas: [300, 9],
    basis: "mass",
  } as const;
  it.each([
    [
      { ...good, fractions: [0.3, 0.3] },
      "fitGrunbergNissan: all blends have the fraction 0.3; measure at least two different compositions",
    ],
    [
      { ...good, fractions: [0, 0.3] },
      "fitGrunbergNissan: 1 of the fractions lie between 0 and 1; at least 2 blends must be measured",
    ],
    [
      { ...good, fractions: [0.3, 1.6] },
      "fitGrunbergNissan: fractions[1] is 1.6; it must be a number from 0 to 1",
    ],
    [
      { ...good, viscosities_mPas: [20, -1] },
      "fitGrunbergNissan: viscosities_mPas[1] is -1; it must be a finite number above 0",
    ],
    [
      { ...good, pureViscosities_mPas: [0, 9] as const },
      "fitGrunbergNissan: pureViscosities_mPas[0] is 0; it must be a finite number above 0",
    ],
    [
      { ...good, viscosities_mPas: [20] },
      "fitGrunbergNissan: fractions holds 2, viscosities_mPas holds 1; the lists must be of the same length",
    ],
    [
      { ...good, basis: "weight" as "mass" },
      'fitGrunbergNissan: unknown basis "weight"; known: mole, mass, volume',
    ],
  ])("refuses %j", (blends, message) => {
    expect(() => fitGrunbergNissan(blends)).toThrow(message);
  });
});
