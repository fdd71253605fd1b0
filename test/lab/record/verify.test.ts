import { execFileSync } from "node:child_process";
import {
  chmodSync,
  copyFileSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  renameSync,
  unlinkSync,
  writeFileSync,
} from "node:fs";
import { join } from "node:path";
import fc from "fast-check";
import { afterEach, describe, expect, it, vi } from "vitest";
import { appendRecord, listRecords, readRecords, verifyRecords } from "../../../lib/lab/record.js";
import { fileOf } from "../../../lib/lab/record/folder.js";
import { decision, freshFolder } from "./fixtures.js";

const folder = freshFolder();
const append = (statement: string, place = folder.path) =>
  appendRecord({ folder: place, record: decision(statement, { statement }) });
const statements = () => listRecords(folder.path).entries.map(({ record }) => record.statement);
const verify = () => verifyRecords({ folder: folder.path });
const codes = () => verify().problems.map(({ code }) => code);
const pathOf = ({ file }: { file: string }) => join(folder.path, file);
afterEach(() => vi.useRealTimers());

describe("a sound folder", () => {
  it("that does not exist holds nothing", () => {
    const none = join(folder.path, "none");
    expect(readRecords(none)).toEqual([]);
    expect(verifyRecords({ folder: none })).toEqual({ sound: true, count: 0, newest: [], problems: [] });
  });

  it("is sound, and says which record is the newest", () => {
    append("one");
    const { id } = append("two");
    expect(verify()).toEqual({ sound: true, count: 2, newest: [id], problems: [] });
  });

  it("may hold other files", () => {
    append("one");
    writeFileSync(join(folder.path, "README.md"), "# Records\n");
    expect(verify()).toMatchObject({ sound: true, count: 1, problems: [] });
  });

  it("may hold records from before they named the library's version and the data", () => {
    const old = { ...decision("old"), at: "2025-12-01T08:00:00.000Z", nonce: "00", after: [] };
    const { file, id, text } = fileOf(old);
    writeFileSync(join(folder.path, file), text);
    append("new");
    expect(verify()).toMatchObject({ sound: true, count: 2, problems: [] });
    expect(listRecords(folder.path).entries[0]).toMatchObject({ id, record: old });
  });

  it("may have been checked out with the line endings of another system", () => {
    const one = append("one");
    writeFileSync(pathOf(one), readFileSync(pathOf(one), "utf8").replaceAll("\n", "\r\n"));
    expect(verify()).toMatchObject({ sound: true, count: 1 });
    expect(statements()).toEqual(["one"]);
  });
});

describe("an edited record", () => {
  it("is found whichever bit is turned, and the others still stand", () => {
    append("one");
    const changed = append("two µm, 25 °C");
    append("three");
    const before = readFileSync(pathOf(changed));
    fc.assert(
      fc.property(fc.nat(before.length - 1), fc.nat(7), (place, bit) => {
        const bytes = Buffer.from(before);
        bytes[place]! ^= 1 << bit;
        writeFileSync(pathOf(changed), bytes);
        const check = verify();
        expect(check.sound).toBe(false);
        expect(check.problems).toEqual([
          {
            code: "edited",
            file: changed.file,
            message: `${changed.file}: is not what was written: its content does not match the hash in its name; restore it from a copy`,
          },
        ]);
        expect(statements()).toEqual(["one", "three"]);
      }),
      { numRuns: 300 },
    );
    expect(() => readRecords(folder.path)).toThrow("is not what was written");
    writeFileSync(pathOf(changed), before);
    expect(verify().sound).toBe(true);
  });

  it("is found when cut short or emptied", () => {
    const one = append("one");
    append("two");
    const text = readFileSync(pathOf(one), "utf8");
    for (const length of [0, 1, text.length - 1]) {
      writeFileSync(pathOf(one), text.slice(0, length));
      expect(codes()).toEqual(["edited"]);
    }
  });

  it("with a new name to match is missed by the one written on it", () => {
    const one = append("one");
    const two = append("two");
    unlinkSync(pathOf(one));
    const forged = fileOf({ ...one.record, statement: "forged" });
    writeFileSync(pathOf(forged), forged.text);
    expect(verify().problems).toEqual([
      {
        code: "missing",
        file: two.file,
        message: `${two.file}: was written on a record that is not here; restore the file that ends in ${one.id}.json`,
      },
    ]);
  });

  it("does not stop the next one", () => {
    const one = append("one");
    writeFileSync(pathOf(one), "{}");
    expect(append("two").record.after).toEqual([one.id]);
    expect(statements()).toEqual(["two"]);
  });
});

describe("a missing record", () => {
  it("is found wherever it stood, the newest by an id noted elsewhere", () => {
    const written = ["one", "two", "three", "four"].map((statement) => append(statement));
    const expected = [written.at(-1)!.id];
    written.forEach((gone, i) => {
      const text = readFileSync(pathOf(gone), "utf8");
      unlinkSync(pathOf(gone));
      const check = verifyRecords({ folder: folder.path, expected });
      expect(check.sound).toBe(false);
      expect(check.problems.map(({ code }) => code)).toEqual(["missing"]);
      expect(check.problems[0]!.message).toContain(`restore the file that ends in ${gone.id}.json`);
      expect(verify().sound).toBe(i === 3);
      writeFileSync(pathOf(gone), text);
    });
    expect(verifyRecords({ folder: folder.path, expected }).sound).toBe(true);
  });

  it("that is amended is named", () => {
    const one = append("one");
    const rest = { kind: "amendment", from: "x", statement: "y", corrections: { a: 1 } } as const;
    const amendment = appendRecord({ folder: folder.path, record: { ...rest, amends: one.id } });
    unlinkSync(pathOf(one));
    expect(codes()).toEqual(["missing", "amends-nothing"]);
    expect(verify().problems[1]!.message).toBe(
      `${amendment.file}: amends ${one.id}, which is not here; restore that record`,
    );
  });
});

describe("a file that is no record", () => {
  it.each(["{", "{}", "[]"])("is named: %s", (text) => {
    writeFileSync(join(folder.path, "stray.json"), text);
    const message = "stray.json: this is not a lab record; move it out of the records folder";
    expect(() => readRecords(folder.path)).toThrow(message);
    expect(verify().problems).toEqual([{ code: "not-a-record", file: "stray.json", message }]);
  });

  it("is named though its hash is right", () => {
    const odd = fileOf({ at: "2026-01-01T00:00:00.000Z" } as never);
    writeFileSync(pathOf(odd), odd.text);
    expect(codes()).toEqual(["not-a-record"]);
  });

  it("is named when it is a folder", () => {
    const one = append("one");
    unlinkSync(pathOf(one));
    mkdirSync(pathOf(one));
    expect(verify().problems.map(({ message }) => message)).toEqual([
      `${one.file}: cannot be read (EISDIR); check the disc and the rights`,
    ]);
  });
});

describe("a record under another name", () => {
  it("is named when its time was changed, and is not lost", () => {
    const one = append("one");
    const wrong = `2020-01-01T00-00-00-000Z-${one.id}.json`;
    renameSync(pathOf(one), join(folder.path, wrong));
    expect(verify().problems[0]!.message).toBe(`${wrong}: was renamed; name it ${one.file} again`);
    expect(statements()).toEqual(["one"]);
  });

  it("is named when it is a second copy", () => {
    const one = append("one");
    const copy = `2999-01-01T00-00-00-000Z-${one.id}.json`;
    copyFileSync(pathOf(one), join(folder.path, copy));
    expect(verify().problems.some(({ code }) => code === "misnamed")).toBe(true);
    expect(statements()).toEqual(["one"]);
  });
});

describe("an unfinished write", () => {
  it("is ignored and named", () => {
    append("one");
    const file = ".0123456789abcdef.tmp";
    writeFileSync(join(folder.path, file), '{ "at": "2026');
    append("two");
    expect(readRecords(folder.path)).toHaveLength(2);
    expect(verify()).toMatchObject({ sound: true, count: 2 });
    expect(verify().problems).toEqual([
      {
        code: "unfinished-write",
        file,
        message: `${file}: left by a write that did not finish, or is under way; no record is lost, delete it when nothing writes here`,
      },
    ]);
  });
});

describe("a clock set back", () => {
  it("does not change the order, and is named", () => {
    vi.useFakeTimers({ now: new Date("2026-05-01T12:00:00Z") });
    append("one");
    vi.setSystemTime(new Date("2026-05-01T11:00:00Z"));
    const two = append("two");
    vi.setSystemTime(new Date("2026-05-01T11:30:00Z"));
    append("three");
    expect(statements()).toEqual(["one", "two", "three"]);
    expect(readRecords(folder.path)).toHaveLength(3);
    expect(verify().sound).toBe(true);
    expect(verify().problems).toEqual([
      {
        code: "clock-backwards",
        file: two.file,
        message: `${two.file}: says it was written at 2026-05-01T11:00:00.000Z, after one of 2026-05-01T12:00:00.000Z; a clock was set back or two clocks differ`,
      },
    ]);
  });

  it("does not change the order of a long record", () => {
    vi.useFakeTimers({ now: new Date("2026-05-01T12:00:00Z") });
    for (let i = 0; i < 200; i++) {
      vi.setSystemTime(new Date(Date.parse("2026-05-01T12:00:00Z") - 1000 * i));
      append(String(i));
    }
    expect(statements()).toEqual(Array.from({ length: 200 }, (_, i) => String(i)));
  });
});

describe("two copies of a folder", () => {
  it("merge in git without conflict, and the next record is written on both ends", () => {
    const git = (...words: string[]) =>
      execFileSync("git", [
        "-C",
        folder.path,
        "-c",
        "user.name=x",
        "-c",
        "user.email=x@example.org",
        ...words,
      ]);
    const commit = (message: string) => {
      git("add", "-A");
      git("commit", "-q", "-m", message);
    };
    const records = join(folder.path, "records");
    git("init", "-q", "-b", "main");
    append("common", records);
    commit("common");
    git("checkout", "-q", "-b", "other");
    append("other 1", records);
    const other = append("other 2", records);
    commit("other");
    git("checkout", "-q", "main");
    const here = append("here", records);
    commit("here");
    git("merge", "-q", "-m", "merge", "other");
    expect(verifyRecords({ folder: records })).toEqual({
      sound: true,
      count: 4,
      newest: [other.id, here.id].sort(),
      problems: [],
    });
    const next = append("next", records);
    expect(next.record.after).toEqual([other.id, here.id].sort());
    expect(verifyRecords({ folder: records }).newest).toEqual([next.id]);
  });
});

describe("a record nobody may read", () => {
  it.skipIf(process.getuid?.() === 0)("is named", () => {
    const one = append("one");
    chmodSync(pathOf(one), 0);
    expect(codes()).toEqual(["unreadable"]);
    expect(readdirSync(folder.path)).toHaveLength(1);
  });
});
