// How a weigh-out sheet looks: black on white across the paper, to be read at arm's length and written on with gloves;
// on a screen like the other pages, wider.

/** The paper a sheet is printed on, across. */
export type Paper = "A4" | "Letter";

/** The style of a sheet, after that of every page; `label` stands at the foot of each printed page. */
export function sheetStyle({ paper, label }: { paper: Paper; label: string }): string {
  return `
.written, .facts { display: grid; gap: 0.25rem 1.5rem; grid-template-columns: repeat(auto-fit, minmax(min(100%, 18rem), 1fr)); }
.written div, .facts div { display: flex; gap: 0.5rem; align-items: baseline; }
.masters { display: grid; gap: 0 2rem; grid-template-columns: repeat(auto-fit, minmax(min(100%, 32rem), 1fr)); }
.written dt, .facts dt { color: var(--muted); flex: none; }
.written dd, .facts dd { margin: 0; flex: 1; }
.written dd { border-bottom: 1px solid var(--ink); min-height: 2.25rem; }
.sheet .name { font-weight: 650; font-size: 1.125em; overflow-wrap: anywhere; }
.sheet .target { font-weight: 650; font-size: 1.25em; }
.sheet th, .sheet td { vertical-align: middle; }
.sheet .pen { border: 1px solid var(--ink); padding: 0.25rem 0.375rem; overflow-wrap: anywhere; }
.sheet thead .pen { white-space: nowrap; }
.sheet td.pen { height: 3rem; min-width: 4rem; }
.sheet .tick { display: block; width: 1.5rem; height: 1.5rem; margin: auto; border: 2px solid var(--ink); }
@media screen {
  .sheet { width: min(100% - 2rem, 76rem); margin-inline: auto; }
  .bar:has(+ .sheet), .sheet + .foot { width: min(100% - 2rem, 76rem); margin-inline: auto; }
  .scroll > .weigh { min-width: 62rem; }
}
@media screen and (max-width: 48rem) {
  .sheet .pen { display: none; }
  .scroll > .weigh { min-width: 38rem; }
}
@page {
  size: ${paper === "A4" ? "A4" : "letter"} landscape;
  margin: 11mm 12mm 15mm;
  @bottom-left { content: ${cssText(label)}; font: 10pt system-ui, sans-serif; }
  @bottom-right { content: "page " counter(page) " of " counter(pages); font: 10pt system-ui, sans-serif; }
}
@media print {
  :root { --ink: #000; --muted: #000; --rule: #000; --paper: #fff; }
  html { font-size: 11pt; line-height: 1.35; }
  .screen-only { display: none; }
  .sheet h1 { font-size: 17pt; margin: 0 0 2mm; }
  .sheet h2 { font-size: 13pt; margin: 4mm 0 1.5mm; }
  .sheet p, .sheet ul, .sheet dl { margin-bottom: 2mm; }
  .sheet li { margin-bottom: 0.5mm; break-inside: avoid; }
  .sheet ul, .sheet p, .facts { font-size: 10pt; }
  .sheet code { font-size: 10pt; background: none; padding: 0; }
  .written { grid-template-columns: repeat(4, 1fr); }
  .written div { display: block; }
  .written dd { height: 9mm; min-height: 0; }
  .facts { grid-template-columns: 1fr 1fr; gap: 0 8mm; }
  .facts dt { width: 23mm; }
  .side-by-side > ul { columns: 2; column-gap: 8mm; }
  .masters { grid-template-columns: 1fr 1fr; gap: 0 8mm; }
  .whole-block, .masters > div { break-inside: avoid; }
  .at-the-bench { break-before: page; }
  .sheet .at-the-bench { margin-top: 0; }
  .sheet .scroll { margin: 1mm 0 1.5mm; }
  .sheet .scroll > table { margin: 0; }
  .sheet table { width: calc(100% - 0.5mm); font-size: 11pt; break-inside: auto; }
  .sheet caption { font-size: 11pt; padding-bottom: 1mm; }
  .sheet th, .sheet td { padding: 1mm 2.5mm 1mm 0; }
  .sheet thead th { font-size: 10pt; }
  .sheet .hazards th { white-space: nowrap; }
  .sheet .pen { padding: 1mm 1.5mm; }
  .sheet td.pen { height: 13mm; min-width: 0; }
  .sheet .master td.pen { height: 11mm; }
  .sheet .target { font-size: 15pt; }
  .sheet .name { font-size: 12pt; }
  .sheet .reason { font-size: 10pt; line-height: 1.25; }
  .step { width: 12mm; }
  .mass { width: 26mm; }
  .limits { width: 40mm; }
  .vessel { width: 22mm; }
  .lot, .actual { width: 24mm; }
  .initials { width: 18mm; }
  .done { width: 14mm; }
  .master .lot, .master .actual { width: 22mm; }
  .foot { font-size: 10pt; margin-top: 4mm; padding: 1mm 0 0; }
}
`;
}

/** Text inside a style sheet: whatever is not a plain letter, digit or space is written by its code point. */
function cssText(text: string): string {
  return `"${text.replace(/[^A-Za-z0-9 ]/gu, (character) => `\\${character.codePointAt(0)!.toString(16)} `)}"`;
}
