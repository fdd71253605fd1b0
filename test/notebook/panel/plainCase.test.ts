import { describe, expect, it } from "vitest";
import { assess, assessing } from "../../../lib/assess/assess.js";
import type { Case } from "../../../lib/assess/case.js";
import { calibrate } from "../../../lib/decide/calibrate.js";
import { caseOf, plainCase, type PlainCase } from "../../../lib/notebook/panel/plainCase.js";
import { propertyNames } from "../../../lib/recipe/propertyNames.js";
import { readWorkbench } from "../../../lib/recipe/files.js";
import { withLot } from "../../../lib/recipe/lot.js";
import { sure } from "../../fixtures.js";

const flowCell = readWorkbench("data/briefs/flow-cell.json");
const sent = (work: Case) => JSON.parse(JSON.stringify(plainCase(work))) as PlainCase;

function withMeasuredLot(work: Case): Case {
  const measured = { viscosity_mPas: { ...sure(9000, 200), temperature_C: 25 } };
  const components = work.formulation.components.map((one, i) =>
    i === 0
      ? {
          ...one,
          ingredient: withLot(one.ingredient, { id: "L-1", ingredient: one.ingredient.id, measured }),
        }
      : one,
  );
  return { ...work, formulation: { ...work.formulation, components } };
}

describe("a case sent to a page", () => {
  it.each<[string, Case]>([
    ["the flow cell", flowCell],
    ["the flow cell with its readings", calibrate(flowCell)],
    ["a measured lot", withMeasuredLot(flowCell)],
    ["one wavelength and a blend", readWorkbench("data/briefs/screen-housing.json")],
  ])("is assessed there as here, to the last digit: %s", (_, work) => {
    expect(assess({ ...caseOf(sent(work)), draws: 200 })).toEqual(assess({ ...work, draws: 200 }));
  });

  it("holds no more than the formulation and the brief name, and not where their files lie", () => {
    const plain = sent(flowCell);
    expect(plain.films.map(({ id }) => id)).toEqual(["PDMS"]);
    expect(plain.spectra.map(({ id }) => id).sort()).toEqual(["bapo", "bbot", "led-412"]);
    expect([plain.brief.formulation, plain.brief.shelf]).toEqual(["", []]);
    expect(JSON.stringify(plain)).not.toContain("flow-cell-a.json");
    expect(JSON.stringify(plain).length).toBeLessThan(40_000);
  });
});

describe("assessing", () => {
  it("pauses after each property and ends with the assessment", () => {
    const steps = assessing({ ...flowCell, draws: 100 });
    const paused = propertyNames.map(() => steps.next());
    expect(paused.map(({ value }) => value)).toEqual(propertyNames);
    expect(steps.next()).toEqual({ done: true, value: assess({ ...flowCell, draws: 100 }) });
  });
});
