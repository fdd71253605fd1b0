import { execFileSync } from "node:child_process";
import type * as fs from "node:fs";
import { chmodSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { appendRecord, listRecords, verifyRecords } from "../../../lib/lab/record.js";
import { decision, freshFolder } from "./fixtures.js";

// A disc that refuses, put in the place of the system's: the named call throws the code.
const refuse = vi.hoisted(() => ({ call: "", code: "" }));
vi.mock("node:fs", async (original) => {
  const real = await original<typeof fs>();
  const refusing = (call: "openSync" | "writeFileSync" | "fsyncSync" | "linkSync") =>
    ((...given: never[]) => {
      if (refuse.call === call) throw Object.assign(new Error(refuse.code), { code: refuse.code });
      return (real[call] as (...given: never[]) => unknown)(...given);
    }) as never;
  return {
    ...real,
    openSync: refusing("openSync"),
    writeFileSync: refusing("writeFileSync"),
    fsyncSync: refusing("fsyncSync"),
    linkSync: refusing("linkSync"),
  };
});

const folder = freshFolder();
const append = (statement: string) => appendRecord({ folder: folder.path, record: decision(statement) });
beforeEach(() => Object.assign(refuse, { call: "", code: "" }));

describe("a disc that refuses", () => {
  it.each([
    [
      "openSync",
      "EACCES",
      "nothing was recorded; the folder is read-only, name another one or change its rights",
    ],
    ["writeFileSync", "ENOSPC", "nothing was recorded; free some space and append it again"],
    ["writeFileSync", "EDQUOT", "nothing was recorded; free some space and append it again"],
    ["fsyncSync", "ENOSPC", "nothing was recorded; free some space and append it again"],
    ["fsyncSync", "EIO", "look with verifyRecords whether it stands before you append it again"],
    [
      "linkSync",
      "EPERM",
      "nothing was recorded; the folder is read-only or its disc has no hard links, name another one",
    ],
    [
      "linkSync",
      "EROFS",
      "nothing was recorded; the folder is read-only, name another one or change its rights",
    ],
    ["linkSync", "EEXIST", "look with verifyRecords whether it stands before you append it again"],
  ])("at %s with %s leaves what stands, nothing half-written, and says so", (call, code, advice) => {
    append("one");
    Object.assign(refuse, { call, code });
    expect(() => append("two")).toThrow(
      `records folder ${folder.path}: the record could not be written (${code}); ${advice}`,
    );
    refuse.call = "";
    expect(verifyRecords({ folder: folder.path })).toMatchObject({ sound: true, count: 1, problems: [] });
    append("three");
    expect(listRecords(folder.path).entries.map(({ record }) => record.statement)).toEqual(["one", "three"]);
  });

  it("gives the system's own error as the cause", () => {
    Object.assign(refuse, { call: "linkSync", code: "EROFS" });
    let cause: unknown;
    try {
      append("one");
    } catch (error) {
      cause = (error as Error).cause;
    }
    expect(cause).toMatchObject({ code: "EROFS" });
  });
});

const mountable = canMount();

describe.runIf(mountable)("a real disc, small and mounted for the test", () => {
  beforeEach(() => mount("-o", "size=96k", "tmpfs", folder.path));
  afterEach(() => unmount(folder.path));

  it("that fills up keeps every record that was written, and takes the next once there is room", () => {
    const filling = join(folder.path, "ballast");
    writeFileSync(filling, "x".repeat(40000));
    const written: string[] = [];
    let refusal = "";
    while (refusal === "" && written.length < 100) {
      try {
        written.push(append(`record ${written.length}`).id);
      } catch (error) {
        refusal = (error as Error).message;
      }
    }
    expect(written.length).toBeGreaterThan(3);
    expect(written.length).toBeLessThan(100);
    expect(refusal).toContain("could not be written (ENOSPC); nothing was recorded; free some space");
    expect(verifyRecords({ folder: folder.path, expected: written })).toMatchObject({
      sound: true,
      count: written.length,
      problems: [],
    });
    rmSync(filling);
    append("after");
    expect(verifyRecords({ folder: folder.path })).toMatchObject({ sound: true, count: written.length + 1 });
  });

  it("that is read-only is read, and refuses the next record in words", () => {
    append("one");
    mount("-o", "remount,ro", folder.path);
    expect(() => append("two")).toThrow(
      "could not be written (EROFS); nothing was recorded; the folder is read-only, name another one",
    );
    expect(verifyRecords({ folder: folder.path })).toMatchObject({ sound: true, count: 1, problems: [] });
  });
});

describe.skipIf(process.getuid?.() === 0)("a folder without the right to write", () => {
  afterEach(() => chmodSync(folder.path, 0o755));

  it("is read, and refuses the next record in words", () => {
    append("one");
    chmodSync(folder.path, 0o555);
    expect(() => append("two")).toThrow("could not be written (EACCES); nothing was recorded; the folder is");
    expect(readdirSync(folder.path)).toHaveLength(1);
  });
});

function mount(...words: string[]): void {
  const kind = words.includes("tmpfs") ? ["-t", "tmpfs"] : [];
  execFileSync("mount", [...kind, ...words], { stdio: "ignore" });
}

function unmount(place: string): void {
  execFileSync("umount", [place], { stdio: "ignore" });
}

function canMount(): boolean {
  const place = mkdtempSync(join(tmpdir(), "mount-"));
  try {
    mount("-o", "size=16k", "tmpfs", place);
    unmount(place);
    return true;
  } catch {
    return false;
  } finally {
    rmSync(place, { recursive: true });
  }
}
