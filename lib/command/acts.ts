// All commands with their words, options and notes; what each does stands in a file of its own, loaded when it is used.

import type { Act, Option } from "./act.js";

const json: Option = { about: "print one JSON document with every digit instead of text" };
const records: Option = {
  value: "FOLDER",
  about: "the folder of the lab record; else what RESINWRIGHT_RECORDS names, else records",
};

export const acts: readonly Act[] = [
  {
    name: "assess",
    summary: "judge a formulation under a brief: properties with intervals, verdicts, warnings, sources",
    operand: { name: "BRIEF", needed: true },
    options: {
      formulation: { value: "FILE", about: "assess this formulation instead of the one the brief names" },
      temperature: { value: '"T UNIT"', about: 'resin temperature instead of that of the brief, as "35 °C"' },
      draws: { value: "N", about: "how often the uncertain figures are drawn; 2000 unless given" },
      json,
    },
    notes: [
      "Readings on the shelf (viscosities of blends, cure depths, readings on the window) correct the shipped figures first.",
      "Exit code 1 says that a target fails or that something the brief avoids is in it; a target that cannot be told is neither.",
    ],
    example: 'resinwright assess data/briefs/flow-cell.json --temperature "35 °C"',
    load: () => import("./assess.js"),
  },
  {
    name: "batch",
    summary:
      "the weigh-out sheet of a formulation, with master batches where a portion is too small for the balance",
    operand: { name: "FORMULATION", needed: true },
    options: {
      size: { value: '"M UNIT"', needed: true, about: 'mass of the batch, as "500 g" or "2 kg"' },
      readability: { value: '"M UNIT"', needed: true, about: 'the last digit the balance shows, as "1 mg"' },
      repeatability: {
        value: '"M UNIT"',
        needed: true,
        about: "standard deviation of ten weighings of one small load",
      },
      capacity: { value: '"M UNIT"', needed: true, about: "the most the balance carries, vessel included" },
      accuracy: {
        value: '"P %"',
        about: 'how far a mass fraction may be off, as a share of it; "1 %" unless given',
      },
      shelf: {
        value: "FOLDER",
        many: true,
        about: "where the ingredients stand; a later one comes before an earlier one; data unless given",
      },
      json,
    },
    notes: ["The data sheet of the balance states readability, repeatability and capacity."],
    example:
      'resinwright batch data/formulations/flow-cell-a.json --size "500 g" --readability "1 mg" --repeatability "0.8 mg" --capacity "600 g"',
    load: () => import("./batch.js"),
  },
  {
    name: "record list",
    summary: "the lab record, oldest first, and what is wrong with it",
    options: {
      kind: { value: "KIND", about: "only recipe, batch, measurement, print, decision or amendment" },
      records,
      json,
    },
    notes: [],
    example: "resinwright record list --kind decision",
    load: () => import("./recordList.js"),
  },
  {
    name: "record verify",
    summary: "whether every record is as it was written and none that another was written on is gone",
    options: {
      expect: { value: "ID", many: true, about: "an id noted elsewhere, which must be there" },
      records,
      json,
    },
    notes: [
      "Exit code 1 says that something is wrong. A newest record that was taken away is missed only if its id was noted elsewhere: the ids to note are printed.",
    ],
    example: "resinwright record verify",
    load: () => import("./recordVerify.js"),
  },
  {
    name: "record export",
    summary: "all records as CSV or JSON Lines",
    options: {
      format: {
        value: "csv|jsonl",
        about: "csv for a spreadsheet, jsonl, which keeps everything, unless given",
      },
      records,
    },
    notes: ["Records that are not as they were written are left out, and named on stderr."],
    example: "resinwright record export --format csv > records.csv",
    load: () => import("./recordExport.js"),
  },
  {
    name: "record add",
    summary: "append a record: a recipe, batch, measurement, print, decision or amendment",
    operand: { name: "FILE", needed: false },
    options: { records, json },
    notes: [
      "FILE holds one record as JSON, without time and id, which the writing adds; without FILE it is read from stdin.",
    ],
    example: "resinwright record add reading.json",
    load: () => import("./recordAdd.js"),
  },
  {
    name: "render",
    summary: "run notebooks under a brief and write a page for each, as npm start does",
    operand: { name: "BRIEF", needed: true },
    options: {
      notebook: {
        value: "FILE",
        many: true,
        about: "a notebook to run; all in notebooks unless given",
      },
      to: { value: "FOLDER", about: "where the pages go; rendered unless given" },
    },
    notes: [
      "Exit code 1 says that a notebook failed; old pages then stay as they are. Decisions are appended to the lab record.",
    ],
    example:
      "resinwright render data/briefs/flow-cell.json --notebook notebooks/02-viscosity-and-ratio.ipynb",
    load: () => import("./render.js"),
  },
];
