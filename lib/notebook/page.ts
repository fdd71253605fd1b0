// The shell of a page: head, landmarks, footer, and a security policy that lets nothing in from outside.
// Scripts run only if their hash stands in the policy; pictures and fonts come from within the page.

import { createHash } from "node:crypto";
import { escapeHtml } from "./html.js";
import { pageStyle } from "./pageStyle.js";

/** What a page says of its making, in its footer. */
export interface Origin {
  /** File name of the brief, without folders. */
  readonly brief: string;
  readonly libraryVersion: string;
  readonly nodeVersion: string;
  /** When the notebooks were run, as an ISO 8601 date. */
  readonly date: string;
}

/**
 * A page around `main`; `scripts` stand at its end and are the only ones that run. `title` is plain text; `style` comes after the
 * style of every page.
 */
export function pageHtml(given: {
  readonly title: string;
  readonly main: string;
  readonly origin: Origin;
  readonly bar?: string;
  readonly note?: string;
  readonly mainClass?: string;
  readonly style?: string;
  readonly scripts?: readonly string[];
}): string {
  const { title, main, origin, bar = "", note = "", mainClass = "page", style = "", scripts = [] } = given;
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${securityPolicy(scripts)}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="referrer" content="no-referrer">
<title>${escapeHtml(title)}</title>
<style>${pageStyle}${style}</style>
</head>
<body>
<a class="skip" href="#main">Skip to the text</a>
${bar}
<main id="main" class="${mainClass}" tabindex="-1">
${main}
</main>
<footer class="foot">
${note}<p>${originText(origin)}</p>
</footer>
${scripts.map((script) => `<script>${script}</script>`).join("\n")}
</body>
</html>
`;
}

// The figure library writes its own rules into style elements, so styles are allowed; they can fetch nothing.
function securityPolicy(scripts: readonly string[]): string {
  const hashes = scripts.map((script) => `'sha256-${createHash("sha256").update(script).digest("base64")}'`);
  return [
    "default-src 'none'",
    `script-src ${hashes.length > 0 ? hashes.join(" ") : "'none'"}`,
    "style-src 'unsafe-inline'",
    "img-src data:",
    "font-src data:",
    "base-uri 'none'",
    "form-action 'none'",
  ].join("; ");
}

function originText({ brief, libraryVersion, nodeVersion, date }: Origin): string {
  const parts = [`Brief ${brief}`, `run ${date}`, `resinwright ${libraryVersion}`, `Node ${nodeVersion}`];
  return parts.map(escapeHtml).join(" · ");
}
