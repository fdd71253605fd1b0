// How a page looks: a quiet report in the reader's own fonts, for a desk, a phone, a dark room and A4 paper.
// One style sheet for notebook pages and the index.

import { darkPalette, lightPalette, type Palette } from "./palette.js";

function variables(palette: Palette): string {
  return Object.entries(palette)
    .map(([name, color]) => `--${name}: ${color};`)
    .join(" ");
}

/** The papers a page can be printed on. */
export const papers = ["A4", "Letter"] as const;
export type Paper = (typeof papers)[number];

const sheet = (paper: Paper) => `@page { size: ${paper}; margin: 18mm 20mm; }`;

/** The page `html`, to be printed on another paper than A4. */
export function onPaper(html: string, paper: Paper): string {
  return html.replace(sheet("A4"), sheet(paper));
}

/** The style sheet of every page. */
export const pageStyle = `
:root { color-scheme: light dark; ${variables(lightPalette)} }
@media screen and (prefers-color-scheme: dark) { :root { ${variables(darkPalette)} } }

* { box-sizing: border-box; }
html { font: 100%/1.6 system-ui, sans-serif; color: var(--ink); background: var(--paper); text-size-adjust: 100%; }
body { margin: 0; overflow-wrap: break-word; }
a { color: var(--accent); text-underline-offset: 0.15em; text-decoration-thickness: 1px; }
a:hover { text-decoration-thickness: 2px; }
:focus-visible { outline: 3px solid var(--accent); outline-offset: 2px; border-radius: 2px; }
.skip { position: absolute; left: 1rem; top: -4rem; padding: 0.5rem 1rem; background: var(--paper); z-index: 2; }
.skip:focus { top: 0.5rem; }

.bar, .page, .foot { width: min(100% - 2rem, 45rem); margin-inline: auto; }
.bar { padding-block: 1rem; font-size: 0.875rem; color: var(--muted); border-bottom: 1px solid var(--rule); }
.page { padding-block: 2rem 3rem; }
.foot { padding-block: 1rem 3rem; font-size: 0.8125rem; color: var(--muted); border-top: 1px solid var(--rule); }
.foot p { margin: 0; }
.print-only { display: none; }

h1, h2, h3, h4, h5, h6 { line-height: 1.25; font-weight: 650; text-wrap: balance; scroll-margin-top: 1rem; }
h1 { font-size: 2rem; margin: 0.5rem 0 1.25rem; letter-spacing: -0.015em; }
h2 { font-size: 1.375rem; margin: 3rem 0 0.75rem; letter-spacing: -0.01em; }
h3 { font-size: 1.125rem; margin: 2rem 0 0.5rem; }
h4, h5, h6 { font-size: 1rem; margin: 1.5rem 0 0.5rem; }
p, ul, ol, dl, blockquote { margin: 0 0 1rem; }
ul, ol { padding-left: 1.5rem; }
li { margin-bottom: 0.25rem; }
blockquote { padding-left: 1rem; border-left: 3px solid var(--rule); color: var(--muted); }
hr { border: 0; border-top: 1px solid var(--rule); margin: 2.5rem 0; }
img { max-width: 100%; height: auto; }
.left-out { color: var(--muted); font-style: italic; }

.contents { margin: 0 0 2rem; font-size: 0.9375rem; }
.contents p { margin: 0 0 0.25rem; font-size: 0.8125rem; color: var(--muted); }
.contents ol { list-style: none; margin: 0; padding: 0; }
.contents li { margin: 0; padding-block: 0.2rem; line-height: 1.4; }
.contents .deeper { padding-left: 1.25rem; }
.contents a { text-decoration: none; }
.contents a:hover { text-decoration: underline; }

.scroll { overflow-x: auto; max-width: 100%; }
.formula { display: flex; flex-wrap: wrap; justify-content: safe center; gap: 0.5rem 2rem; overflow-y: hidden; margin: 1.25rem 0; padding-block: 0.25rem; }
math { font-size: 1.08em; }

code, pre { font-family: ui-monospace, monospace; font-size: 0.875em; }
:not(pre) > code { padding: 0.1em 0.3em; background: var(--shade); border-radius: 3px; }
pre { margin: 0 0 1rem; padding: 0.75rem 1rem; background: var(--shade); border-radius: 4px; line-height: 1.5; tab-size: 2; }
pre code { font-size: 1em; }
pre.output { padding: 0 0 0 1rem; background: none; border-left: 3px solid var(--rule); border-radius: 0; }
.hljs-keyword, .hljs-built_in, .hljs-literal { color: var(--codeWord); }
.hljs-string, .hljs-regexp { color: var(--codeText); }
.hljs-number { color: var(--codeNumber); }
.hljs-comment { color: var(--muted); font-style: italic; }

details { margin: 0 0 1rem; }
details + figure, details + .scroll:has(> table) { margin-top: 0.75rem; }
summary { width: fit-content; padding: 0.25rem 0; font-size: 0.8125rem; color: var(--muted); cursor: pointer; }
summary:hover { color: var(--accent); }
details[open] > summary { margin-bottom: 0.5rem; }
.data .scroll { max-height: 26rem; overflow-y: auto; }

table { border-collapse: collapse; font-size: 0.9375rem; line-height: 1.4; font-variant-numeric: tabular-nums lining-nums; }
.scroll > table { margin: 0.25rem 0 0.5rem; min-width: min(100%, 34rem); }
.scroll:has(> table) { margin: 1.5rem 0; }
.scroll:has(> table) { container-type: inline-size; }
caption span { display: inline-block; position: sticky; left: 0; max-width: 100cqi; }
caption { padding-bottom: 0.5rem; text-align: left; font-size: 0.875rem; line-height: 1.45; color: var(--muted); }
caption strong, figcaption strong { color: var(--ink); }
thead { border-top: 2px solid var(--ink); border-bottom: 1px solid var(--ink); }
tbody { border-bottom: 2px solid var(--ink); }
tbody tr + tr { border-top: 1px solid var(--rule); }
th, td { padding: 0.375rem 1.25rem 0.375rem 0; text-align: left; vertical-align: baseline; font-weight: 400; }
th:last-child, td:last-child { padding-right: 0; }
thead th { vertical-align: bottom; font-weight: 600; }
th.right, td.right { text-align: right; }
td.right, .whole { white-space: nowrap; }
td.sentence { white-space: normal; }
.unit { font-weight: 400; color: var(--muted); white-space: nowrap; }

figure { margin: 2rem 0; }
.plot { width: 100%; overflow: hidden; }
.plot .draglayer * { touch-action: pan-y; }
.moments { display: flex; flex-wrap: wrap; align-items: center; gap: 0.25rem 0.75rem; margin-top: 0.5rem; font-size: 0.875rem; }
.moments[hidden] { display: none; }
.moments label { color: var(--muted); }
.moments input { flex: 1 1 12rem; min-width: 0; height: 1.75rem; margin: 0; accent-color: var(--accent); }
.moments output { min-width: 7.5rem; font-variant-numeric: tabular-nums; }
figcaption { margin-top: 0.5rem; font-size: 0.875rem; line-height: 1.5; color: var(--muted); }
figcaption p { margin: 0 0 0.375rem; }
figcaption .name { color: var(--ink); }

button { font: inherit; font-size: 0.875rem; line-height: 1.4; padding: 0.25rem 0.75rem; color: var(--accent); background: var(--paper); border: 1px solid var(--muted); border-radius: 4px; cursor: pointer; }
button:hover { border-color: var(--accent); text-decoration: underline; }
button + [role="status"] { margin-left: 0.75rem; font-size: 0.8125rem; color: var(--muted); }
.scroll:has(> table):has(+ .copy) { margin-bottom: 0; }
.copy { margin: 0 0 1.5rem; }
.copy button { font-size: 0.75rem; padding: 0.125rem 0.5rem; color: var(--muted); border-color: var(--rule); }
.copy button:hover { color: var(--accent); border-color: var(--accent); }

.card { margin: 0 0 2rem; padding: 1rem 1.25rem; background: var(--shade); border-top: 3px solid var(--accent); border-radius: 0 0 4px 4px; }
.card dl { display: grid; grid-template-columns: 6.5rem 1fr; gap: 0 1rem; margin: 0; }
.card dt { grid-column: 1; font-size: 0.875rem; font-weight: 600; line-height: 1.7; }
.card dd { grid-column: 2; margin: 0; }
.card dd + dd { font-size: 0.875rem; color: var(--muted); }
.card dd + dt, .card dd + dt + dd { margin-top: 0.5rem; }
.card .scroll:has(> table) { margin: 1rem 0 0; }
.card .copy { margin-bottom: 1rem; }
.card .cautions { margin: 0; padding-left: 1.25rem; font-size: 0.875rem; }

.panel { margin: 1.5rem 0 2rem; padding: 1rem 1.25rem; border: 1px solid var(--rule); border-radius: 4px; }
.control { display: grid; grid-template-columns: minmax(8rem, 13rem) minmax(6rem, 1fr) auto; gap: 0 1rem; align-items: center; padding-block: 0.375rem; }
.control label { font-size: 0.9375rem; line-height: 1.35; }
.control input[type="range"] { width: 100%; min-height: 1.75rem; margin: 0; accent-color: var(--accent); cursor: pointer; }
.amount { display: flex; gap: 0.5rem; align-items: baseline; min-width: 10.5rem; }
.amount input { width: 5.5rem; font: inherit; font-size: 0.9375rem; font-variant-numeric: tabular-nums; padding: 0.125rem 0.375rem; color: var(--ink); background: var(--paper); border: 1px solid var(--muted); border-radius: 4px; }
.at-start { grid-column: 2 / -1; font-size: 0.8125rem; color: var(--muted); }
.panel .buttons { display: flex; flex-wrap: wrap; gap: 0.5rem 0.75rem; align-items: center; margin: 0.75rem 0 1rem; }
.panel .buttons [role="status"] { margin: 0; }
.panel td.value { white-space: nowrap; }
.panel-status { margin-top: 0.75rem; font-size: 0.9375rem; }
.refusal { padding-left: 0.75rem; border-left: 3px solid var(--ink); font-weight: 600; }
.refusal:empty { display: none; }
.panel .caution { padding-left: 0.75rem; border-left: 3px solid var(--accent); font-size: 0.9375rem; }
.panel-warnings ul { font-size: 0.875rem; }
.panel-recipe label { display: block; font-size: 0.875rem; }
.panel-recipe textarea { width: 100%; margin: 0.25rem 0; padding: 0.5rem; font: 0.8125rem/1.5 ui-monospace, monospace; color: var(--ink); background: var(--shade); border: 1px solid var(--muted); border-radius: 4px; }
.panel-recipe p { margin: 0; font-size: 0.875rem; }

.list { list-style: none; padding: 0; margin: 2rem 0 0; }
.list li { margin: 0; padding-block: 1.25rem; border-top: 1px solid var(--rule); }
.list a { font-size: 1.125rem; font-weight: 600; }
.list p { margin: 0.375rem 0 0; color: var(--muted); }
.list .decided { color: var(--ink); }
.list .sheets a { font-size: 1rem; font-weight: 400; }

@media (min-width: 75rem) {
  .bar, .page, .foot { margin-left: max(50% - 22.5rem, 18rem); }
  .scroll:has(> .many) { width: min(58rem, 100vw - max(50vw - 22.5rem, 18rem) - 3rem); max-width: none; }
  .has-contents { position: relative; }
  .contents-place { position: absolute; top: 2.9rem; bottom: 0; right: calc(100% + 2.5rem); width: 14rem; }
  .contents { position: sticky; top: 2rem; max-height: calc(100vh - 4rem); overflow-y: auto; font-size: 0.875rem; }
}
@media (max-width: 30rem) {
  h1 { font-size: 1.625rem; }
  h2 { font-size: 1.25rem; margin-top: 2.25rem; }
  table { font-size: 0.875rem; }
  .formula math { font-size: 0.95em; }
  th, td { padding-right: 0.875rem; }
  .card, .panel { padding: 0.75rem; }
  .card dl { display: block; }
  .card dd + dt + dd { margin-top: 0; }
  .control { grid-template-columns: minmax(0, 1fr) auto; gap: 0.25rem 0.75rem; padding-block: 0.625rem; }
  .control label, .at-start { grid-column: 1 / -1; }
  .amount { min-width: 9rem; }
  .amount input { width: 5rem; }
}
@media screen and (max-width: 30rem) {
  .sentences, .sentences caption, .sentences tbody, .sentences tr, .sentences tbody th, .sentences td { display: block; }
  .scroll > .sentences { min-width: 0; }
  .sentences thead { position: absolute; width: 1px; height: 1px; overflow: hidden; clip-path: inset(50%); white-space: nowrap; border: 0; }
  .sentences tbody { border-top: 2px solid var(--ink); }
  .sentences tr { padding-block: 0.5rem; }
  .sentences tbody :is(th, td) { padding: 0.125rem 0; text-align: left; white-space: normal; overflow-wrap: anywhere; }
  .sentences tbody :is(th, td):first-child { font-weight: 600; }
  .sentences td[data-label]::before { content: attr(data-label) ": "; color: var(--muted); }
}
@media (prefers-reduced-motion: no-preference) { html { scroll-behavior: smooth; } }

${sheet("A4")}
@media print {
  html { font-size: 10pt; line-height: 1.45; background: #fff; }
  .bar, .skip, .contents, .copy, .panel .buttons, .panel input[type="range"], details:not(.panel-warnings) { display: none; }
  .panel-warnings summary { list-style: none; }
  .card, .control, .caution { break-inside: avoid; }
  .panel { padding: 0; border: 0; }
  .control { grid-template-columns: 16rem 11rem 1fr; padding-block: 0.125rem; }
  .control .at-start { grid-column: 3; }
  .amount input { border: 0; padding: 0; background: none; }
  .print-only { display: block; }
  .bar, .page, .foot { width: 100%; padding-block: 0; }
  .foot { margin-top: 2rem; padding-top: 0.5rem; }
  a { color: inherit; text-decoration: none; }
  .page a[href^="http"]::after { content: " (" attr(href) ")"; color: var(--muted); overflow-wrap: anywhere; }
  h1, h2, h3, h4, h5, h6, caption { break-after: avoid; }
  h2 { margin-top: 2rem; }
  figure, table, tr, img, .formula, blockquote { break-inside: avoid; }
  .long { break-inside: auto; }
  thead { display: table-header-group; }
  tbody tr:first-child, tbody tr:last-child { break-before: avoid; }
  .scroll { overflow: visible; }
  .moments label, .moments input { display: none; }
  pre { white-space: pre-wrap; overflow-wrap: anywhere; }
  table { max-width: 100%; font-size: 9pt; }
  th, td { padding-right: 0.75rem; }
  .many { font-size: 8pt; }
  .crowded { font-size: 7pt; }
  .crowded th, .crowded td { padding-right: 0.375rem; white-space: normal; overflow-wrap: anywhere; }
  * { print-color-adjust: exact; }
}
`;
