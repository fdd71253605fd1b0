// The part of a page's script that copies: each table as tab-separated text, and whatever text area a button names.
// Kept as text, as the rest of the page's script is.

const superscripts = "⁻⁰¹²³⁴⁵⁶⁷⁸⁹";

/** Puts a button under each table; without scripts there is none. */
export const copyScript = `(() => {
  const write = async (text) => {
    try {
      await navigator.clipboard.writeText(text);
      return true;
    } catch {
      // Where the browser keeps the clipboard from a page, a selection can still be copied.
      const area = document.createElement("textarea");
      area.value = text;
      document.body.append(area);
      area.select();
      const copied = document.execCommand("copy");
      area.remove();
      return copied;
    }
  };
  const copies = (button, said, textOf) =>
    button.addEventListener("click", async () => {
      said.textContent = "";
      const copied = await write(textOf());
      button.focus();
      said.textContent = copied ? "Copied." : "It could not be copied here; select it and copy it by hand.";
    });

  // A spreadsheet shall read numbers as numbers, and no text as a formula.
  const cellText = (cell) => {
    const text = cell.textContent.replace(/\\s+/g, " ").trim();
    const number = /^(−?)([0-9.]+)(?: × 10([${superscripts}]+))?$/.exec(text);
    if (number === null) return /^[=+\\-@]/.test(text) ? "'" + text : text;
    const [, sign, digits, raised] = number;
    const power = raised?.replace(/./g, (one) => "-0123456789"["${superscripts}".indexOf(one)]);
    return (sign && "-") + digits + (power === undefined ? "" : "e" + power);
  };
  const tableText = (table) =>
    [...table.rows].map((row) => [...row.cells].map(cellText).join("\\t")).join("\\n") + "\\n";

  for (const table of document.querySelectorAll("main table")) {
    const box = table.closest(".scroll") ?? table;
    const line = document.createElement("p");
    line.className = "copy";
    const button = document.createElement("button");
    button.type = "button";
    button.textContent = "Copy table";
    button.setAttribute("aria-label", "Copy table: " + (box.getAttribute("aria-label") ?? "as text"));
    const said = document.createElement("span");
    said.setAttribute("role", "status");
    line.append(button, said);
    box.after(line);
    copies(button, said, () => tableText(table));
  }
  for (const button of document.querySelectorAll("button[data-copies]")) {
    copies(button, button.nextElementSibling, () => document.getElementById(button.dataset.copies).value);
  }
})();
`;
