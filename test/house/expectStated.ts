// Compares what an example gives with what it states: numbers to the digits shown, everything else exactly.

import { deepStrictEqual, ok } from "node:assert";

export function expectStated(expression: string, given: unknown, stated: unknown, text: string): void {
  if (typeof given === "number" && typeof stated === "number") {
    const digits =
      text
        .replace(/e.*$/i, "")
        .replace(/[^0-9]/g, "")
        .replace(/^0+/, "").length || 1;
    const unit = stated === 0 ? 0.5 : 10 ** (Math.floor(Math.log10(Math.abs(stated))) + 1 - digits);
    // Half a unit of the last digit shown, and rounding noise.
    ok(Math.abs(given - stated) <= 0.5000001 * unit, `${expression} is ${given}, stated as ${text}`);
    return;
  }
  deepStrictEqual(given, stated, `${expression} is ${JSON.stringify(given)}, stated as ${text}`);
}
