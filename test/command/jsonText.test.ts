import { expect, it } from "vitest";
import { jsonText } from "../../lib/command/jsonText.js";

it("begins with the name and version of the shape and keeps every digit", () => {
  const text = jsonText("resinwright test 1", { value: 0.1 + 0.2, none: undefined });
  expect(text).toBe('{\n  "format": "resinwright test 1",\n  "value": 0.30000000000000004\n}\n');
});

it.each([NaN, Infinity, -Infinity])("refuses %s", (share) => {
  expect(() => jsonText("resinwright test 1", { verdicts: [{ share }] })).toThrow(
    `resinwright test 1: share is ${share}; it must be a finite number`,
  );
});
