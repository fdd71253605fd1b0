import { describe, expect, it } from "vitest";
import { gradedFaces } from "../../lib/numerics/grid.js";

const widths = (faces: Float64Array): number[] =>
  Array.from(faces.subarray(1), (face, i) => face - faces[i]!);

describe("gradedFaces", () => {
  const focuses = [
    { at: 0, width: 0.05, share: 0.2 },
    { at: 0.2, width: 0.02, share: 0.4 },
  ];

  it("is even without a focus", () => {
    const faces = gradedFaces({ length: 3, cells: 6, focuses: [] });
    faces.forEach((face, i) => expect(face).toBeCloseTo(i / 2, 14));
  });

  it("puts its share of cells around each focus, the narrowest at the narrowest focus", () => {
    const faces = gradedFaces({ length: 1, cells: 200, focuses });
    expect(faces[0]).toBe(0);
    expect(faces[200]).toBe(1);
    const all = widths(faces);
    const narrowest = all.indexOf(Math.min(...all));
    expect(Math.abs(faces[narrowest]! - 0.2)).toBeLessThan(0.01);
    expect(Math.max(...all)).toBeLessThan(2 / 200);
    // 0.4 of the cells follow 1 / sqrt(w^2 + (z - 0.2)^2); within 0.1 of the focus lie 2 asinh(5) / (asinh(10) + asinh(40)) of them.
    const near = faces.filter((face) => Math.abs(face - 0.2) < 0.1).length / 200;
    expect(near).toBeGreaterThan((0.4 * 2 * Math.asinh(5)) / (Math.asinh(10) + Math.asinh(40)));
  });

  it("changes width smoothly, and halves every width when the cells are doubled", () => {
    const coarse = gradedFaces({ length: 1, cells: 150, focuses });
    const fine = gradedFaces({ length: 1, cells: 300, focuses });
    coarse.forEach((face, i) => expect(fine[2 * i]).toBeCloseTo(face, 12));
    const all = widths(coarse);
    all.slice(1).forEach((width, i) => expect(Math.abs(Math.log(width / all[i]!))).toBeLessThan(0.25));
  });

  it("holds when a focus is many decades narrower than the length", () => {
    const faces = gradedFaces({ length: 1, cells: 100, focuses: [{ at: 0, width: 1e-9, share: 0.5 }] });
    expect(faces[1]).toBeLessThan(1e-9);
    widths(faces).forEach((width) => expect(width).toBeGreaterThan(0));
  });

  it.each([
    [{ length: 0, cells: 4, focuses: [] }, "gradedFaces: length is 0; it must be a finite number above 0"],
    [
      { length: 1, cells: 1.5, focuses: [] },
      "gradedFaces: cells is 1.5; it must be a whole number of at least 2",
    ],
    [
      { length: 1, cells: 4, focuses: [{ at: 2, width: 1, share: 0.1 }] },
      "gradedFaces: focuses[0].at is 2; it must be a number from 0 to 1",
    ],
    [
      { length: 1, cells: 4, focuses: [{ at: 0, width: 0, share: 0.1 }] },
      "gradedFaces: focuses[0].width is 0; it must be a finite number above 0",
    ],
    [
      { length: 1, cells: 4, focuses: [{ at: 0, width: 1, share: 1 }] },
      "gradedFaces: the share left for even cells is 0; it must be a finite number above 0",
    ],
  ])("refuses %j", (input, message) => {
    expect(() => gradedFaces(input)).toThrow(message);
  });
});
