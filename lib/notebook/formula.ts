// Formulas in prose: `$...$` within a line, `$$...$$` on lines of their own, written in TeX and shown as MathML.
// A browser sets MathML with its own fonts, so a page carries none.

import katex from "katex";
import type MarkdownIt from "markdown-it";
import { InputError } from "../door.js";

/** Teaches `markdown` to read formulas; `env.where` names the cell in the message for one that cannot be set. */
export function addFormulas(markdown: MarkdownIt): void {
  markdown.inline.ruler.after("escape", "formula", inlineFormula);
  markdown.block.ruler.before("fence", "formula", blockFormula, { alt: ["paragraph", "blockquote", "list"] });
  markdown.renderer.rules["formula"] = (tokens, i, _, env) => formulaHtml(tokens[i]!.content, false, env);
  markdown.renderer.rules["formula_shown"] = (tokens, i, _, env) => {
    const { content, block } = tokens[i]!;
    const tag = block ? "div" : "span";
    // Formulas of one line that stand a wide space apart may go on lines of their own where the page is narrow.
    const parts = content.includes("\\begin") ? [content] : content.split("\\qquad");
    const set = parts.map((part) => formulaHtml(part.trim(), true, env)).join("\n");
    return `<${tag} class="formula scroll" role="group" aria-label="Formula">${set}</${tag}>`;
  };
}

function formulaHtml(tex: string, displayMode: boolean, env: { where: string }): string {
  try {
    return katex.renderToString(tex, { displayMode, output: "mathml", throwOnError: true, strict: "ignore" });
  } catch (error) {
    throw new InputError(`${env.where}: formula "${tex}" cannot be set: ${(error as Error).message}`);
  }
}

type InlineRule = Parameters<MarkdownIt["inline"]["ruler"]["after"]>[2];
type BlockRule = Parameters<MarkdownIt["block"]["ruler"]["before"]>[2];

// A dollar sign before a space, or a closing one after a space or before a digit, is money and not a formula.
const inlineFormula: InlineRule = (state, silent) => {
  const rest = state.src.slice(state.pos, state.posMax);
  const found =
    /^(\$\$)([^$]+)\$\$/.exec(rest) ?? /^(\$)(?!\s)((?:\\.|[^$\\])*?(?:\\.|[^$\\\s]))\$(?!\d)/s.exec(rest);
  if (found === null) return false;
  if (!silent) state.push(found[1] === "$$" ? "formula_shown" : "formula", "", 0).content = found[2]!.trim();
  state.pos += found[0].length;
  return true;
};

const blockFormula: BlockRule = (state, startLine, endLine, silent) => {
  const text = (line: number) =>
    state.src.slice(state.bMarks[line]! + state.tShift[line]!, state.eMarks[line]);
  if (!text(startLine).startsWith("$$")) return false;
  let last = startLine;
  let body = text(startLine).slice(2);
  while (!body.trimEnd().endsWith("$$") && last + 1 < endLine) body += `\n${text(++last)}`;
  if (!body.trimEnd().endsWith("$$")) return false;
  if (silent) return true;
  const token = state.push("formula_shown", "", 0);
  token.content = body.trimEnd().slice(0, -2).trim();
  token.map = [startLine, last + 1];
  state.line = last + 1;
  return true;
};
