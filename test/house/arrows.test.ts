import { readFileSync } from "node:fs";
import { dirname, normalize } from "node:path";
import { describe, expect, it } from "vitest";
import { librarySources } from "./sources.js";

// Who may import whom. Everything may use door.ts and result.ts; a folder may use itself.
const allowed: Record<string, readonly string[]> = {
  numerics: [],
  models: ["numerics"],
  recipe: [],
  assess: ["recipe", "models", "numerics"],
  decide: ["assess", "recipe", "models", "numerics"],
  lab: ["decide", "assess", "recipe", "models", "numerics"],
  notebook: ["lab", "decide", "assess", "recipe", "models", "numerics"],
  command: ["notebook", "lab", "decide", "assess", "recipe", "models", "numerics"],
};

const files = librarySources().filter((file) => file.split("/").length > 2);

describe("the arrows between folders", () => {
  it("covers every folder of the library", () => {
    expect([...new Set(files.map((file) => file.split("/")[1]))].sort()).toEqual(Object.keys(allowed).sort());
  });

  it.each(files)("%s imports only what its folder may", (file) => {
    const folder = file.split("/")[1]!;
    const imports = [...readFileSync(file, "utf8").matchAll(/ from "(\.[^"]*)"/g)].map(([, path]) =>
      normalize(`${dirname(file)}/${path!}`),
    );
    for (const path of imports) {
      const [, target, deeper] = path.split("/");
      if (deeper === undefined) expect(["door.js", "result.js"], `${file} imports ${path}`).toContain(target);
      else expect([folder, ...allowed[folder]!], `${file} imports ${path}`).toContain(target);
    }
  });

  const knowers: Record<string, RegExp> = {
    tslab: /^lib\/notebook\//,
    "danfojs-node": /notebook\/table\.ts$/,
  };
  it.each(Object.entries(knowers))("only the named files know %s", (name, where) => {
    const knowing = files.filter((file) => new RegExp(`["']${name}["'/]`).test(readFileSync(file, "utf8")));
    for (const file of knowing) expect(file).toMatch(where);
    expect(knowing.length).toBeGreaterThan(0);
  });

  it.each(files.filter((file) => !/lib\/(command|notebook|lab)\/|recipe\/files\.ts/.test(file)))(
    "%s runs in a browser: no node: import",
    (file) => {
      expect(readFileSync(file, "utf8")).not.toMatch(/from "node:/);
    },
  );
});
