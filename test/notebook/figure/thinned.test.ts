import { describe, expect, it } from "vitest";
import { thinned } from "../../../lib/notebook/figure/thinned.js";

describe("thinned", () => {
  it("keeps both ends", () => {
    expect(thinned([1, 2, 3, 4, 5], 3)).toEqual([1, 3, 5]);
    expect(thinned([1, 2], 3)).toEqual([1, 2]);
  });
});
