import { describe, expect, it } from "vitest";
import { longTermHarm, weighedHazards } from "../../lib/decide/longTermHarm.js";
import { readShelf } from "../../lib/recipe/files.js";
import { shelf } from "../fixtures.js";

const ingredient = shelf.ingredients.get("PI")!;
const carrying = (...codes: string[]) => ({
  ...ingredient,
  hazards: codes.map((code) => ({
    code,
    source: "chosen for a test",
    status: "invented for the demo" as const,
  })),
});

describe("longTermHarm", () => {
  it.each([
    ["H341", "suspected of causing genetic defects"],
    ["H350i", "may cause cancer"],
    ["H361fd", "suspected of damaging fertility or the unborn child"],
    ["H317", undefined],
    ["EUH208", undefined],
  ])("of %s: %s", (code, words) => {
    expect(longTermHarm(code)).toBe(words);
  });
});

describe("weighedHazards", () => {
  it("puts long-term harm first, then sensitisers, each in the order of the shelf", () => {
    const codes = ["H413", "H334", "H351", "H302", "H317", "H360FD"];
    expect(weighedHazards(carrying(...codes))).toEqual(["H351", "H360FD", "H334", "H317", "H413", "H302"]);
  });

  it("tells none from not looked at", () => {
    expect(weighedHazards(carrying())).toEqual([]);
    expect(weighedHazards({ ...ingredient, hazards: undefined })).toBeUndefined();
  });

  it("finds what the shipped shelf says of the azo dye", () => {
    const dye = readShelf(["data"]).ingredients.get("Sudan-I")!;
    expect(weighedHazards(dye)).toEqual(["H341", "H351", "H317", "H413"]);
  });
});
