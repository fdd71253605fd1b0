import { describe, expect, it } from "vitest";
import {
  chainGelPoint,
  selfReactingGelPoint,
  stepGelPoint,
  type GelPoint,
} from "../../../lib/models/cure.js";

const conversionOf = (gel: GelPoint): number => (gel.outcome === "gels" ? gel.conversion : NaN);

describe("stepGelPoint", () => {
  // Exact: 1 / sqrt((f - 1)(g - 1)).
  it.each([
    [3, 2, 0.707107],
    [4, 2, 0.57735],
    [3, 3, 0.5],
    [4, 4, 0.333333],
  ])("A%d + B%d gels at %d", (functionalityA, functionalityB, conversion) => {
    const found = conversionOf(stepGelPoint({ functionalityA, functionalityB, groupRatio: 1 }));
    expect(Math.abs(found - conversion)).toBeLessThan(1e-6);
  });

  it("counts either group: the conversion of B is r times that of A", () => {
    const ofA = conversionOf(stepGelPoint({ functionalityA: 4, functionalityB: 3, groupRatio: 0.8 }));
    const ofB = conversionOf(stepGelPoint({ functionalityA: 3, functionalityB: 4, groupRatio: 1 / 0.8 }));
    expect(ofB / ofA).toBeCloseTo(0.8, 12);
  });

  it("never gels when one kind runs out first, or without branches", () => {
    expect(stepGelPoint({ functionalityA: 2, functionalityB: 2, groupRatio: 1 })).toEqual({
      outcome: "gels",
      conversion: 1,
    });
    expect(stepGelPoint({ functionalityA: 4, functionalityB: 2, groupRatio: 0.3 })).toEqual({
      outcome: "never-gels",
    });
    expect(stepGelPoint({ functionalityA: 4, functionalityB: 2, groupRatio: 3.5 })).toEqual({
      outcome: "never-gels",
    });
    expect(stepGelPoint({ functionalityA: 6, functionalityB: 1, groupRatio: 1 })).toEqual({
      outcome: "never-gels",
    });
  });

  it("says what is wrong", () => {
    expect(() => stepGelPoint({ functionalityA: 0.5, functionalityB: 2, groupRatio: 1 })).toThrow(
      "stepGelPoint: functionalityA is 0.5; it must be a finite number of at least 1",
    );
    expect(() => stepGelPoint({ functionalityA: 3, functionalityB: 2, groupRatio: 0 })).toThrow(
      "stepGelPoint: groupRatio is 0; it must be a finite number above 0",
    );
  });
});

describe("selfReactingGelPoint", () => {
  it.each([
    [3, 0.5],
    [4, 1 / 3],
    [6, 0.2],
  ])("A%d gels at %d", (functionality, conversion) => {
    expect(conversionOf(selfReactingGelPoint({ functionality }))).toBeCloseTo(conversion, 12);
  });

  it("never gels without branches, and says what is wrong", () => {
    expect(selfReactingGelPoint({ functionality: 1.5 })).toEqual({ outcome: "never-gels" });
    expect(() => selfReactingGelPoint({ functionality: NaN })).toThrow(
      "selfReactingGelPoint: functionality is NaN; it must be a finite number of at least 1",
    );
  });
});

describe("chainGelPoint", () => {
  it("needs one crosslinked unit per weight-average chain: 0.1 % of the units for chains of 1000", () => {
    expect(conversionOf(chainGelPoint({ chainLength: 1000, crosslinkerShare: 1 }))).toBeCloseTo(1 / 999, 12);
  });

  it("comes later with less crosslinker and shorter chains, and never with too little of both", () => {
    const gel = (chainLength: number, crosslinkerShare: number): number =>
      conversionOf(chainGelPoint({ chainLength, crosslinkerShare }));
    expect(gel(1000, 0.1) / gel(1000, 1)).toBeCloseTo(10, 10);
    expect(gel(101, 0.1) / gel(1001, 0.1)).toBeCloseTo(10, 10);
    expect(chainGelPoint({ chainLength: 50, crosslinkerShare: 0.01 })).toEqual({ outcome: "never-gels" });
  });

  it("says what is wrong", () => {
    expect(() => chainGelPoint({ chainLength: 1, crosslinkerShare: 1 })).toThrow(
      "chainGelPoint: chainLength is 1; it must be a finite number above 1",
    );
    expect(() => chainGelPoint({ chainLength: 100, crosslinkerShare: 30 })).toThrow(
      "chainGelPoint: crosslinkerShare is 30; it must be a number above 0 and at most 1",
    );
  });
});
