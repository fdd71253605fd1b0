import { mkdirSync, mkdtempSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { readCureDepths } from "../../lib/recipe/cureDepths.js";
import { parseJson } from "../../lib/recipe/document.js";
import { openBrief, readShelf } from "../../lib/recipe/files.js";
import { sure } from "../fixtures.js";

const spots = [
  { exposure_mJcm2: 10, cureDepth_um: 22 },
  { exposure_mJcm2: 10, cureDepth_um: 25 },
  { exposure_mJcm2: 20, cureDepth_um: 76 },
  { exposure_mJcm2: 40, cureDepth_um: 131 },
  { exposure_mJcm2: 80, cureDepth_um: 186 },
];
const series = {
  id: "s1",
  kind: "cure depths",
  formulation: "test",
  parts: [
    { ingredient: "THIN", mass_pct: 99 },
    { ingredient: "PI", mass_pct: 1 },
  ],
  light: { spectrum: "lamp", irradiance_mWcm2: sure(8, 0.4) },
  depthU_um: 3,
  spots,
  source: "constructed for a test",
  status: "invented for the demo",
};
const read = (change: object) =>
  readCureDepths(parseJson(JSON.stringify({ ...series, ...change }, null, 1), "s.json"));

describe("readCureDepths", () => {
  it("reads what it wrote, units converted and readings named", () => {
    const lost = { exposure_mJcm2: "0.16 J/cm^2", reading: "floated", note: "washed off" };
    const { spots: got, ...rest } = read({ spots: [...spots, lost] });
    expect(rest).toEqual({ ...series, spots: undefined });
    expect(got[0]).toEqual({ ...spots[0], reading: "measured" });
    expect(got[5]).toEqual({ exposure_mJcm2: 160, reading: "floated", note: "washed off" });
  });

  it.each<[object, string]>([
    [
      { parts: [{ ingredient: "THIN", mass_pct: 90 }, series.parts[1]] },
      "s.json, line 5: parts: mass_pct adds up to 91; it must add up to 100 ± 0.05",
    ],
    [
      { light: { irradiance_mWcm2: sure(8) } },
      "s.json: light has neither of spectrum and wavelength_nm; give one of them",
    ],
    [
      { light: { ...series.light, wavelength_nm: sure(405) } },
      "s.json: light has both of spectrum and wavelength_nm; give one of them",
    ],
    [
      { spots: [...spots, { exposure_mJcm2: 160 }] },
      's.json: spots[5] has no cureDepth_um; add it, or say "reading": "floated" if the film was lost',
    ],
    [
      { spots: spots.slice(1) },
      "s.json: 4 depths at 4 exposures are measured; a working curve needs 5 depths at 3 exposures, best over a factor of 8",
    ],
    [
      { spots: spots.map((spot, i) => ({ ...spot, exposure_mJcm2: i < 3 ? 10 : 20 })) },
      "s.json: 5 depths at 2 exposures are measured; a working curve needs 5 depths at 3 exposures",
    ],
    [
      { spots: [...spots, { exposure_mJcm2: 160, cureDepth_um: 240, reading: "float" }] },
      'spots[5].reading is "float"; it must be one of "measured", "at-least", "at-most", "floated"; did you mean "floated"?',
    ],
    [{ spots: [{ ...spots[0], depth_um: 3 }] }, 'spots[0] has an unknown field "depth_um"'],
    [
      { spots: spots.map((spot) => ({ ...spot, cureDepth_um: spot.cureDepth_um / 1000 })) },
      "spots[0].cureDepth_um is 0.022; it must be at least 1",
    ],
    [
      { depthU_um: 200 },
      "s.json, line 24: depthU_um is 200, and the deepest measured cureDepth_um is 186; a depth has to be known better than that: check the units of both (µm)",
    ],
    [{ depthU_um: 0 }, "depthU_um is 0; it must be above 0"],
    [
      { spots: [{ exposure_mJcm2: -1, cureDepth_um: 3 }] },
      "spots[0].exposure_mJcm2 is -1; it must be above 0",
    ],
  ])("refuses %j", (change, message) => {
    expect(() => read(change)).toThrow(message);
  });
});

describe("the shelf", () => {
  const onShelf = {
    ...series,
    parts: [
      { ingredient: "HDDA", mass_pct: 99 },
      { ingredient: "BAPO", mass_pct: 1 },
    ],
    light: { ...series.light, spectrum: "led-412" },
  };

  it("tells measurements apart by their kind, and refuses a kind it does not know", () => {
    const folder = mkdtempSync(join(tmpdir(), "shelf-"));
    mkdirSync(join(folder, "measurements"));
    writeFileSync(join(folder, "measurements", "s1.json"), JSON.stringify(onShelf));
    const { cureDepths, readings } = readShelf(["data", folder]);
    expect(cureDepths.map(({ id }) => id)).toEqual(["flow-cell-a-412", "s1"]);
    expect(readings.map(({ id }) => id)).toEqual(["udma-iboa-25C"]);
    writeFileSync(
      join(folder, "measurements", "s1.json"),
      JSON.stringify({ ...onShelf, kind: "cure depth" }),
    );
    expect(() => readShelf(["data", folder])).toThrow(
      'unknown kind of measurement "cure depth"; did you mean "cure depths"?',
    );
  });

  it("holds a demo series of the very resin and light of its brief", () => {
    const { brief, formulation, shelf } = openBrief("data/briefs/flow-cell.json");
    const [demo] = shelf.cureDepths;
    expect(demo!.status).toBe("invented for the demo");
    expect(demo!.light.spectrum).toBe(brief.light.spectrum);
    const parts = formulation.components.map(({ ingredient, massFraction }) => [
      ingredient.id,
      Number((100 * massFraction).toFixed(8)),
    ]);
    expect(demo!.parts.map(({ ingredient, mass_pct }) => [ingredient, mass_pct])).toEqual(parts);
  });
});
