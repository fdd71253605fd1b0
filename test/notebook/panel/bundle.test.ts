import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";

// Built by `npm run build`, which `npm test` runs first.
const bundle = readFileSync("lib/dist/panel/panel.js", "utf8");
const found = (words: readonly string[]) => words.filter((word) => bundle.includes(word));

describe("the bundle of the panel", () => {
  it("is small enough to stand in a page", () => {
    expect(bundle.length).toBeLessThan(250_000);
    expect(found(["Back to the brief", "never cures"])).toHaveLength(2);
  });

  it("leaves file reading and Node behind", () => {
    expect(found(["createUnit", "ZodError", "createRequire", "`node:", "require(", "import("])).toEqual([]);
  });

  it("asks nothing of any network and makes no code or markup of text", () => {
    expect(found(["fetch(", "XMLHttpRequest", "WebSocket", "eval(", "new Function", "innerHTML"])).toEqual(
      [],
    );
  });
});
