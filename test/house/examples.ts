// Takes the runnable examples out of documentation and turns each into a program that checks what it states.

import { readFileSync } from "node:fs";
import ts from "typescript";
import { librarySources } from "./sources.js";

/** One fenced `ts` block with the place it stands at. */
export interface Example {
  readonly place: string;
  readonly code: string;
}

/** Every example of the library's documentation comments and of the Markdown files at the top. */
export function examples(): Example[] {
  return [
    ...librarySources().flatMap((file) => blocksOf(file, readFileSync(file, "utf8"), " *")),
    ...["README.md", "DEVELOPERS.md"].flatMap((file) => blocksOf(file, readFileSync(file, "utf8"), "")),
  ];
}

function blocksOf(file: string, text: string, margin: string): Example[] {
  const found: Example[] = [];
  let block: string[] | undefined;
  let start = 0;
  text.split("\n").forEach((raw, index) => {
    const line = margin === "" ? raw : raw.replace(/^\s*\* ?/, "");
    if (block === undefined && line.trim() === "```ts") [block, start] = [[], index + 1];
    else if (block !== undefined && line.trim() === "```") {
      found.push({ place: `${file}:${start}`, code: block.join("\n") });
      block = undefined;
    } else block?.push(line);
  });
  return found;
}

/** The program of an example: each statement `expression; // → value` becomes a check of the value to the digits shown. */
export function programOf({ code }: Example): string {
  const source = ts.createSourceFile("example.ts", code, ts.ScriptTarget.ES2022, true);
  const pieces: string[] = [`import { expectStated } from "./expectStated.js";\n`];
  let done = 0;
  for (const statement of source.statements) {
    const [comment] = ts.getTrailingCommentRanges(code, statement.end) ?? [];
    const stated = comment && /^\/\/ → (.*)$/.exec(code.slice(comment.pos, comment.end))?.[1];
    if (stated === undefined || !ts.isExpressionStatement(statement)) continue;
    const expression = statement.expression.getText();
    pieces.push(code.slice(done, statement.getStart()));
    pieces.push(
      `expectStated(${JSON.stringify(expression)}, (${expression}), (${stated}), ${JSON.stringify(stated)});`,
    );
    done = comment!.end;
  }
  return `${pieces.join("")}${code.slice(done)}\nexport {};\n`;
}
