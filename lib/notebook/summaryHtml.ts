// The card at the head of a page, as HTML.

import { scrolling, tableHtml, type TableContent } from "./content.js";
import { escapeHtml } from "./html.js";
import type { SummaryContent } from "./summary.js";

/** The card as a section of the page. */
export function summaryHtml({ asked, formulation, decided, rows, cautions }: SummaryContent): string {
  const parts = [
    ["Asked", asked],
    ["Formulation", formulation],
    ["Decided", [decided]],
  ] as const;
  const said = parts.map(([name, lines]) => `<dt>${name}</dt>${lines.map(definition).join("")}`);
  const warned = cautions.map((line) => `<li>${escapeHtml(line)}</li>`);
  const table = rows.length === 0 ? "" : scrolling(tableHtml(verdictTable(rows)), "Summary table");
  return `<section class="card" aria-label="Summary">
<dl>${said.join("\n")}</dl>
${table}
<ul class="cautions" aria-label="Cautions">${warned.join("\n")}</ul>
</section>`;
}

function definition(line: string): string {
  return `<dd>${escapeHtml(line)}</dd>`;
}

function verdictTable(rows: SummaryContent["rows"]): TableContent {
  return {
    kind: "table",
    caption: "How the formulation stands against the targets",
    columns: [
      { name: "property", align: "left" },
      { name: "value and interval", align: "right" },
      { name: "verdict", align: "left" },
      { name: "target", align: "left" },
    ],
    rows: rows.map(({ property, unit, value, target, verdict }) => [
      `${property} (${unit})`,
      value,
      verdict,
      target,
    ]),
    rowHeader: true,
  };
}
