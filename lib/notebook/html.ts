// Text made safe to stand in HTML, as content or inside a quoted attribute.
// The one place where text that a notebook or a chemist wrote becomes part of a page.

const entities: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

/** `text` with the five characters that mean something in HTML written as entities. */
export function escapeHtml(text: string): string {
  return text.replace(/[&<>"']/g, (character) => entities[character]!);
}
