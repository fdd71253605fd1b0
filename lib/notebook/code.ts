// Code as it stands on a page: TypeScript with its words coloured, anything else as plain text.

import highlighter from "highlight.js/lib/core";
import typescript from "highlight.js/lib/languages/typescript";
import { escapeHtml } from "./html.js";

highlighter.registerLanguage("typescript", typescript);

/** `source` as HTML for a `<code>` element; only TypeScript is coloured. */
export function codeHtml({ source, language }: { source: string; language: string }): string {
  if (!["ts", "typescript"].includes(language)) return escapeHtml(source);
  return highlighter.highlight(source, { language: "typescript" }).value;
}
