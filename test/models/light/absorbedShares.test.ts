import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { absorbedShares, broadTransmittedFraction, lightEngine } from "../../../lib/models/light.js";

const engine = lightEngine({ wavelengths_nm: [395, 400, 405, 410], spectrum: [1, 3, 2, 1] });
const alphas = fc.array(fc.double({ min: 0, max: 500, noNaN: true }), { minLength: 4, maxLength: 4 });

describe("absorbedShares", () => {
  it("leave nothing out: absorbed and transmitted add up to 1, and what goes through is what broadTransmittedFraction says", () => {
    fc.assert(
      fc.property(
        alphas,
        alphas,
        alphas,
        fc.double({ min: 0, max: 500, noNaN: true }),
        (a, b, c, depth_um) => {
          const lists = { initiator: a, absorber: b, resin: c };
          const components = Object.entries(lists).map(([name, napierianAbsorptions_percm]) => ({
            name,
            napierianAbsorptions_percm,
          }));
          const found = absorbedShares({ engine, components, depth_um });
          const absorbed = found.components.reduce((sum, { share }) => sum + share, 0);
          expect(absorbed + found.transmitted.share).toBeCloseTo(1, 12);
          const napierianAbsorptions_percm = a.map((x, k) => x + b[k]! + c[k]!);
          const through = broadTransmittedFraction({ engine, napierianAbsorptions_percm, depth_um });
          expect(found.transmitted.share).toBeCloseTo(through, 12);
        },
      ),
    );
  });

  it("split the light as the absorptions do where those keep one ratio", () => {
    const found = absorbedShares({
      engine,
      components: [
        { name: "initiator", napierianAbsorptions_percm: [10, 20, 30, 40] },
        { name: "absorber", napierianAbsorptions_percm: [30, 60, 90, 120] },
      ],
      depth_um: 120,
    });
    const [initiator, absorber] = found.components;
    expect(absorber!.share / initiator!.share).toBeCloseTo(3, 12);
    expect(initiator!.name).toBe("initiator");
  });

  it("give a thick layer all of the light in the ratio of the absorptions, a thin one alpha z", () => {
    const mono = lightEngine({ wavelengths_nm: [404, 405, 406], spectrum: [0, 1, 0] });
    const components = [
      { name: "initiator", napierianAbsorptions_percm: [0, 20, 0] },
      { name: "absorber", napierianAbsorptions_percm: [0, 60, 0] },
    ];
    const share = (depth_um: number): number =>
      absorbedShares({ engine: mono, components, depth_um }).components[0]!.share;
    expect(share(1e5)).toBeCloseTo(0.25, 12);
    expect(share(1e-6) / (20 * 1e-10)).toBeCloseTo(1, 7);
  });

  it("say what is wrong", () => {
    const components = [{ name: "dye", napierianAbsorptions_percm: [1, 2, 3] }];
    expect(() => absorbedShares({ engine, components, depth_um: 1 })).toThrow(
      'absorbedShares: engine.shares holds 4, napierianAbsorptions_percm of "dye" holds 3; the lists must be of the same length',
    );
    expect(() =>
      absorbedShares({
        engine,
        components: [{ name: "dye", napierianAbsorptions_percm: [1, 2, 3, -4] }],
        depth_um: 1,
      }),
    ).toThrow(
      'absorbedShares: napierianAbsorptions_percm of "dye"[3] is -4; it must be a finite number of at least 0',
    );
    expect(() => absorbedShares({ engine, components: [], depth_um: -1 })).toThrow(
      "absorbedShares: depth_um is -1; it must be a finite number of at least 0",
    );
  });
});
