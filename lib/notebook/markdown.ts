// The prose of a notebook as HTML: Markdown without raw HTML, formulas, headings in order, and nothing fetched.
// One call a cell; the list of headings passes from cell to cell, so that levels and anchors hold for the whole page.

import MarkdownIt from "markdown-it";
import { codeHtml } from "./code.js";
import { addFormulas } from "./formula.js";
import { escapeHtml } from "./html.js";

/** A heading of the page: its level (1 to 6), the anchor it carries, and its text as HTML. */
export interface Heading {
  readonly level: number;
  readonly anchor: string;
  readonly html: string;
}

interface Env {
  readonly where: string;
  readonly headings: Heading[];
}

const markdown = new MarkdownIt({ html: false });
addFormulas(markdown);
const { rules } = markdown.renderer;
type RenderRule = NonNullable<(typeof rules)[string]>;

/**
 * `source` as HTML. Headings are added to `headings`; the page has its title, so they start at level 2 and skip none.
 * @throws InputError naming `where` for a formula that cannot be set.
 */
export function markdownHtml(given: { source: string; where: string; headings: Heading[] }): string {
  const { source, where, headings } = given;
  return markdown.render(source, { where, headings } satisfies Env);
}

/** One line of Markdown as HTML, without a paragraph around it. */
export function inlineHtml({ source, where }: { source: string; where: string }): string {
  return markdown.renderInline(source, { where, headings: [] } satisfies Env);
}

/** The words of HTML that `markdownHtml` or `inlineHtml` made, without its tags and the TeX behind its formulas. */
export function plainText(html: string): string {
  const words = html.replace(/<annotation[^]*?<\/annotation>/g, "").replace(/<[^>]*>/g, "");
  return words.replace(/&(amp|lt|gt|quot|#39);/g, (entity) => characters[entity]!);
}

const characters: Readonly<Record<string, string>> = {
  "&amp;": "&",
  "&lt;": "<",
  "&gt;": ">",
  "&quot;": '"',
  "&#39;": "'",
};

/** The title of a notebook whose first cell starts with a heading of level 1, and what follows it. */
export function splitTitle(source: string): { title?: string; rest: string } {
  const found = /^\s*# +(.+?)(?: +#+)? *(?:\n|$)/.exec(source);
  return found === null ? { rest: source } : { title: found[1]!, rest: source.slice(found[0].length) };
}

rules["heading_open"] = (tokens, i, options, env: Env, self) => {
  const html = self.renderInline(tokens[i + 1]!.children ?? [], options, env);
  const level = Math.max(2, Math.min(Number(tokens[i]!.tag.slice(1)), (env.headings.at(-1)?.level ?? 1) + 1));
  const anchor = newAnchor(plainText(html), env.headings);
  env.headings.push({ level, anchor, html });
  return `<h${level} id="${escapeHtml(anchor)}">`;
};

rules["heading_close"] = (_tokens, _i, _options, env: Env) => `</h${env.headings.at(-1)!.level}>\n`;

function newAnchor(text: string, headings: readonly Heading[]): string {
  const words = text.toLowerCase().match(/[\p{L}\p{N}]+/gu) ?? ["part"];
  const plain = words.join("-");
  const taken = (anchor: string) => headings.some((heading) => heading.anchor === anchor);
  for (let n = 1; ; n++) {
    const anchor = n === 1 ? plain : `${plain}-${n}`;
    if (!taken(anchor)) return anchor;
  }
}

rules["table_open"] = () => `<div class="scroll"><table>\n`;
rules["table_close"] = () => `</table></div>\n`;

const alignedCell: RenderRule = (tokens, i, options, _env, self) => {
  const token = tokens[i]!;
  const right = token.attrGet("style") === "text-align:right";
  token.attrs = right ? [["class", "right"]] : [];
  if (token.type === "th_open") token.attrSet("scope", "col");
  return self.renderToken(tokens, i, options);
};
rules["th_open"] = alignedCell;
rules["td_open"] = alignedCell;

rules["fence"] = (tokens, i) => {
  const { info, content } = tokens[i]!;
  return codeBlock(content, info.trim().split(/\s+/)[0]!);
};
rules["code_block"] = (tokens, i) => codeBlock(tokens[i]!.content, "");

function codeBlock(source: string, language: string): string {
  return `<pre class="scroll"><code>${codeHtml({ source, language })}</code></pre>\n`;
}

// A page stands alone: a picture is shown only if the text carries it whole.
rules["image"] = (tokens, i) => {
  const token = tokens[i]!;
  const source = token.attrGet("src") ?? "";
  const alternative = escapeHtml(token.content);
  if (source.startsWith("data:image/")) return `<img src="${escapeHtml(source)}" alt="${alternative}">`;
  return `<span class="left-out">[picture left out: ${alternative || escapeHtml(source)}]</span>`;
};

// The next notebook stands beside this page as a page.
rules["link_open"] = (tokens, i, options, _env, self) => {
  const token = tokens[i]!;
  const target = token.attrGet("href") ?? "";
  if (!/^[a-z]+:/i.test(target)) token.attrSet("href", target.replace(/\.ipynb(?=$|#)/, ".html"));
  return self.renderToken(tokens, i, options);
};
