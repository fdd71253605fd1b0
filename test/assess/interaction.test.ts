import { describe, expect, it } from "vitest";
import { interactionAt } from "../../lib/assess/interaction.js";
import type { Interaction } from "../../lib/recipe/interaction.js";
import { sure } from "../fixtures.js";

const measured = (
  value: number,
  temperature_C?: number,
  basis: Interaction["basis"] = "mass",
): Interaction => ({
  pair: ["THICK", "THIN"],
  basis,
  G: sure(value, 0.05),
  ...(temperature_C === undefined ? {} : { temperature_C }),
});
const at = (temperature_C: number, ...known: Interaction[]) => interactionAt({ known, temperature_C });

describe("interactionAt", () => {
  it("is what was measured, at its own temperature or where none is named", () => {
    expect(at(25, measured(-0.8, 25)).G).toEqual(sure(-0.8, 0.05));
    expect(at(60, measured(-0.8)).G).toEqual(sure(-0.8, 0.05));
  });

  // By hand: 1/T at 40 °C lies 0.4873 of the way from 1/T at 25 °C to 1/T at 57 °C.
  it("lies between two measured temperatures, linear in 1/T, and on them at the ends", () => {
    const two = [measured(-0.8, 25), measured(-0.4, 57)];
    const way = (1 / 313.15 - 1 / 298.15) / (1 / 330.15 - 1 / 298.15);
    expect(at(40, ...two).G.value).toBeCloseTo(-0.8 + 0.4 * way, 10);
    expect(at(57, ...two).G.value).toBe(-0.4);
    expect(at(40, ...two).warnings).toEqual([]);
    expect(at(80, ...two).warnings.map(({ code }) => code)).toEqual(["extrapolated"]);
  });

  // Isdale's law by hand (from memory, as in the model): G(T) = 1 - (1 - G)(573 - T)/(573 - T0).
  it("is carried by the law from one temperature, with a doubt as large as the change", () => {
    const { G, warnings } = at(45, measured(-0.8, 25));
    const value = 1 - 1.8 * ((573 - 318.15) / (573 - 298.15));
    expect(G.value).toBeCloseTo(value, 10);
    expect(G.u).toBeCloseTo(Math.hypot(0.05, value + 0.8), 10);
    expect(warnings.map(({ code }) => code)).toEqual(["interaction-other-temperature"]);
    expect(warnings[0]!.message).toContain(
      "was measured at 25 °C and is carried to 45 °C by a law: the law was found for G on the mole basis",
    );
    expect(at(28, measured(-0.8, 25)).warnings).toEqual([]);
  });

  it("warns where the law went the wrong way", () => {
    expect(at(45, measured(0.5, 25, "mole")).warnings[0]!.message).toContain(
      "between 0 and 1 the law lets it grow",
    );
  });

  it("refuses two bases for one pair", () => {
    expect(() => at(40, measured(-0.8, 25), measured(-0.4, 60, "mole"))).toThrow(
      "interaction of THICK and THIN: a mass basis at 25 °C and a mole basis at 60 °C; fit both on one basis",
    );
  });
});
