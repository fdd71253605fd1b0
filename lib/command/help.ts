// What help says: of all commands, or of one.

import type { Act } from "./act.js";
import { listText, paragraph } from "./textTable.js";

/** Help on all commands, or on those given. */
export function helpOnAll(acts: readonly Act[], width: number): string {
  return [
    paragraph("Usage: resinwright COMMAND ..., or resinwright COMMAND --help", width),
    listText(
      acts.map(({ name, summary }) => [name, summary]),
      width,
    ),
    paragraph(
      'Quantities are text with any unit that converts: "500 g", "0.8 mg", "95 °F". Results go to stdout, messages to stderr.',
      width,
    ),
    exitCodes(width),
  ].join("\n");
}

/** Help on one command. */
export function helpOn(act: Act, width: number): string {
  const options = [
    ...Object.entries(act.options).map(
      ([name, { value, about, needed, many }]) =>
        [
          value === undefined ? `--${name}` : `--${name} ${value}`,
          `${about}${needed ? " (needed)" : ""}${many ? " (may be given several times)" : ""}`,
        ] as const,
    ),
    ["--help", "this text"] as const,
  ];
  return [
    paragraph(`Usage: ${usage(act)}`, width),
    paragraph(`${act.name}: ${act.summary}.`, width),
    listText(options, width),
    ...act.notes.map((note) => paragraph(note, width)),
    exitCodes(width),
    `For example:\n  ${act.example}\n`,
  ].join("\n");
}

function usage({ name, operand, options }: Act): string {
  const needed = Object.entries(options).flatMap(([option, { needed, value }]) =>
    needed ? [`--${option} ${value!}`] : [],
  );
  const operandText = operand === undefined ? [] : [operand.needed ? operand.name : `[${operand.name}]`];
  return ["resinwright", name, ...operandText, ...needed, "[options]"].join(" ");
}

function exitCodes(width: number): string {
  const codes = [
    ["0", "done"],
    [
      "1",
      "the answer is no: a target fails, something avoided is in it, the record is not sound, a notebook failed",
    ],
    ["2", "no answer: bad input or use, or the disc refused; stderr says what to do, stdout stays empty"],
  ] as const;
  return `Exit codes:\n${listText(codes, width)}`;
}
