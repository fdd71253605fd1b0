import { describe, expect, it } from "vitest";
import { screenHazards } from "../../lib/lab/hazards.js";
import { readSafetyRules } from "../../lib/lab/hazards/files.js";
import { handlingTable, screeningTable } from "../../lib/notebook/safety.js";
import { openBrief } from "../../lib/recipe/files.js";

const { formulation } = openBrief("data/briefs/flow-cell.json");
const screening = screenHazards({ formulation, rules: readSafetyRules("data/rules"), draws: 100 });

describe("screeningTable", () => {
  const { rows, caption } = screeningTable(screening);

  it("begins with the runaway and holds every flag, every note and every ingredient nobody checked", () => {
    expect(rows[0]![1]).toMatch(/^warms by \d+ \(\d+ to \d+\) K without cooling/);
    expect(rows).toHaveLength(
      1 + screening.flags.length + screening.regulatory.length + screening.notChecked.length,
    );
    expect(screening.flags.length).toBeGreaterThan(0);
    expect(rows.at(-1)).toEqual(["BBOT", "nobody has checked its hazards", null]);
  });

  it("says of each flag what is in it, the limit, the rule's date and ground", () => {
    const flag = screening.flags[0]!;
    const row = rows[1]!;
    expect(row[0]).toBe(`${flag.statement} ${flag.title}`);
    expect(row[1]).toContain(`generic limit of ${flag.limit_pct} %`);
    expect(row[2]).toContain(`(${flag.date}; ${flag.status})`);
  });

  it("says what it is not", () => {
    expect(caption).toMatch(/A screening, not a classification/);
    expect(caption).toContain("safety data sheets");
  });
});

describe("handlingTable", () => {
  it("holds the notes of each kind with their ground, protection first", () => {
    const { rows } = handlingTable(screening);
    const { protection, storage, law } = screening;
    expect(rows).toHaveLength(protection.length + storage.length + law.length);
    expect(rows.map(([about]) => about)).toEqual([
      ...protection.map(() => "protection"),
      ...storage.map(() => "storage"),
      ...law.map(() => "law"),
    ]);
  });
});
