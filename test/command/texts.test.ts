// What the commands print, from documents made for the purpose.

import { describe, expect, it } from "vitest";
import { assess } from "../../lib/assess/assess.js";
import { assessText } from "../../lib/command/assess.js";
import { sheetText } from "../../lib/command/batch.js";
import { recordText } from "../../lib/command/recordList.js";
import { checkText } from "../../lib/command/recordVerify.js";
import { weighOut } from "../../lib/lab/batch.js";
import { appendRecord, listRecords } from "../../lib/lab/record.js";
import { decision, freshFolder, oneOfEach } from "../lab/record/fixtures.js";
import { brief, formulationOf, shelf } from "../fixtures.js";

const targets = { viscosity_mPas: { max: 20 }, penetrationDepth_um: { min: 1 } };
const avoid = [{ ingredient: "THIN", reason: "for a test" }];
const formulation = formulationOf({ THIN: 69, THICK: 30, PI: 1 });
const document = {
  ...assess({ brief: { ...brief, targets, avoid }, shelf, formulation, draws: 100 }),
  libraryVersion: "1.2.3",
  dataHash: "0123456789abcdef".repeat(4),
  temperature_C: 25,
  calibratedBy: [],
};

describe("assessText", () => {
  const text = assessText(document, 100);

  it("begins with the properties, their intervals, targets and verdicts", () => {
    const lines = text.split("\n");
    expect(lines[0]).toBe("Assessment of test under test: value and 95 % interval from 100 draws");
    expect(lines[3]).toMatch(
      /^viscosity at print temperature {2}mPa s {3}\d+ \(\d+ to \d+\) +at most 20 +fails \(0 % of draws\)$/,
    );
    expect(lines[4]).toMatch(/^optical depth .* {3}/);
    expect(lines[5]).toMatch(/^penetration depth .* at least 1 +meets \(100 % of draws\)$/);
  });

  it("says what is to be avoided, what to know, what it rests on and how it was made", () => {
    expect(text).toContain("The brief avoids what is in it\ningredient  reason\n");
    expect(text).toMatch(/^THIN {8}for a test$/m);
    expect(text).toContain("What to know before using these numbers");
    expect(text).toContain("Sources of the figures used");
    expect(text).toContain(
      "Resin at 25 °C, corrected by no readings. Computed by resinwright 1.2.3 from the data 0123456789ab,\nseed 1.",
    );
    expect(text).toContain("safety data sheets");
  });

  it("names the readings that corrected figures, and leaves out what does not apply", () => {
    const other = assessText({ ...document, avoided: [], calibratedBy: ["r-1", "r-2"] }, 100);
    expect(other).toContain("corrected by the readings r-1, r-2.");
    expect(other).not.toContain("avoids");
  });

  it("keeps to a narrow terminal", () => {
    const longest = (width: number) =>
      Math.max(
        ...assessText(document, width)
          .split("\n")
          .map((line) => line.length),
      );
    expect(longest(80)).toBeLessThanOrEqual(80);
    expect(longest(60)).toBeLessThanOrEqual(60);
  });
});

describe("sheetText", () => {
  const sheetOn = (readability_g: number, repeatability_g: number) =>
    sheetText(
      weighOut({
        formulation: formulationOf({ THIN: 69.9, THICK: 30, PI: 0.1 }),
        batch_g: 1000,
        balance: { readability_g, repeatability_g, capacity_g: 2000 },
      }),
      100,
    );

  it("has a line a portion, in the digits of the balance, with room for lot and mass", () => {
    const text = sheetOn(0.01, 0.01);
    expect(text).toContain(
      "Weigh-out of test, test: 1000 g, each mass within 0.5 % of itself; the balance weighs honestly from\n20 g on",
    );
    expect(text).toMatch(/^ +\d {2}THICK +300\.00 +298\.51 +301\.49 +1000\.00 +1 {2}amber {2}_{8} +_{8}$/m);
    expect(text).toContain("Make first: master batch of PI in THIN");
    expect(text).toContain("Why in this order: 1: ");
    expect(text).toContain("safety data sheets");
  });

  it("shows tenths on a balance that shows tenths, and warns of what it cannot weigh", () => {
    const text = sheetOn(0.5, 0.5);
    expect(text).toMatch(/THICK +300\.0 /);
    expect(text).toContain("is below the 1000 g");
  });
});

describe("the record", () => {
  const folder = freshFolder();

  it("is listed with kind, statement and what amends it, and with what is wrong", () => {
    const { id } = appendRecord({ folder: folder.path, record: oneOfEach[1]! });
    appendRecord({ folder: folder.path, record: decision("Sixty to forty.") });
    const amendment = appendRecord({
      folder: folder.path,
      record: {
        kind: "amendment",
        from: "bench 2",
        statement: "Misread.",
        amends: id,
        corrections: { a_g: 1 },
      },
    });
    const list = listRecords(folder.path);
    const problems = [
      { code: "edited", file: "x.json", message: "x.json: is not what was written" },
    ] as const;
    const text = recordText({ ...list, problems }, 140);
    expect(text).toContain("The lab record: 3 records\nwritten (UTC)     kind       about");
    expect(text).toMatch(
      new RegExp(
        `^\\S+ \\S+ {2}batch +f +As usual\\. \\[amended by ${amendment.id.slice(0, 12)}\\] +bench 2 +${id.slice(0, 12)}$`,
        "m",
      ),
    );
    expect(text).toMatch(new RegExp(`amendment +${id.slice(0, 12)} +Misread\\.`));
    expect(text).toMatch(/\n\nx\.json: is not what was written\n$/);
  });

  it("may be empty", () => {
    expect(recordText({ entries: [], problems: [], newest: [] }, 80)).toBe("The lab record: 0 records.\n");
  });

  it("is told to be sound, or what is wrong", () => {
    const newest = ["ab".repeat(32)];
    expect(checkText({ sound: true, count: 1, newest, problems: [] }, 80)).toBe(
      `Sound: 1 record is as it was written.\n\nThe newest; note elsewhere, and name with --expect next time:\n  ${newest[0]!}\n`,
    );
    const problems = [{ code: "edited", file: "x.json", message: "x.json: restore it" }] as const;
    expect(checkText({ sound: false, count: 2, newest: [], problems }, 80)).toBe(
      "Not sound: 2 records are as they were written, but something is wrong.\n\nx.json: restore it\n",
    );
  });
});
