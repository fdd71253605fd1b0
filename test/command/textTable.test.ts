import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { listText, paragraph, tableText } from "../../lib/command/textTable.js";
import { tableOf } from "../../lib/notebook/table.js";

const table = tableOf({
  caption: "Two trials",
  rows: [
    { trial: "first", viscosity_mPas: 447.3182, note: "stirred for an hour under amber light" },
    { trial: "the second", viscosity_mPas: 98, note: null },
  ],
});

describe("tableText", () => {
  it("sets text to the left and numbers to the right, under headings with units", () => {
    expect(tableText(table, 80)).toBe(
      [
        "Two trials",
        "trial       viscosity (mPa s)  note",
        "────────────────────────────────────────────────────────────────────",
        "first                   447.3  stirred for an hour under amber light",
        "the second                 98  –",
        "",
      ].join("\n"),
    );
  });

  it("breaks the longest cells first where the terminal is narrow", () => {
    expect(tableText(table, 48)).toBe(
      [
        "Two trials",
        "trial       viscosity (mPa s)  note",
        "───────────────────────────────────────────────",
        "first                   447.3  stirred for an",
        "                               hour under amber",
        "                               light",
        "the second                 98  –",
        "",
      ].join("\n"),
    );
  });

  it("keeps to the width and loses no word, whatever the cells", () => {
    const word = fc.stringMatching(/^[a-z]{1,9}$/);
    const cell = fc.array(word, { minLength: 1, maxLength: 12 }).map((words) => words.join(" "));
    const rows = fc.array(fc.record({ a: cell, b: cell, c: cell }), { minLength: 1, maxLength: 5 });
    fc.assert(
      fc.property(rows, fc.integer({ min: 31, max: 120 }), (given, width) => {
        const text = tableText(tableOf({ caption: "x", rows: given }), width);
        expect(Math.max(...text.split("\n").map((line) => line.length))).toBeLessThanOrEqual(width);
        const words = (all: string) => all.split(/\s+/).filter(Boolean).sort();
        const said = given.flatMap((row) => Object.values(row)).join(" ");
        expect(words(text.replace(/─+/, ""))).toEqual(words(`x a b c ${said}`));
      }),
    );
  });

  it("breaks a word only where it does not fit at all", () => {
    const long = tableOf({ caption: "x", rows: [{ id: "0123456789".repeat(4), what: "short" }] });
    const lines = tableText(long, 40).split("\n");
    expect(lines.slice(3, 5)).toEqual(["012345678901234567890123456789012  short", "3456789"]);
  });

  it("takes more rows than a call can have arguments", () => {
    const rows = Array.from({ length: 20_000 }, (_, i) => ({ record: i, words: "a b c d e f g h i j k l" }));
    expect(tableText(tableOf({ caption: "x", rows }), 20).split("\n").length).toBeGreaterThan(20_000);
  });

  it("lets no text of a file move the cursor or break the lines", () => {
    const hostile = tableOf({ caption: "a\u001b[2Jb", rows: [{ title: "one\n\n\u001b[31mred\u0007 end" }] });
    expect(tableText(hostile, 80)).toBe("a [2Jb\ntitle\n───────────────\none [31mred end\n");
  });
});

it("listText puts what a name means beside it", () => {
  expect(
    listText(
      [
        ["--json", "print one document instead of text"],
        ["--help", "this text"],
      ],
      30,
    ),
  ).toBe("  --json  print one document\n          instead of text\n  --help  this text\n");
});

it("paragraph breaks at spaces", () => {
  expect(paragraph("one two three", 8)).toBe("one two\nthree\n");
});
