// Elements made in the page. Text only ever becomes text: no string of data is read as HTML.

/** An element with its attributes and children. */
export function element<K extends keyof HTMLElementTagNameMap>(
  name: K,
  attributes: Readonly<Record<string, string>> = {},
  ...children: readonly Node[]
): HTMLElementTagNameMap[K] {
  const made = document.createElement(name);
  for (const [attribute, value] of Object.entries(attributes)) made.setAttribute(attribute, value);
  made.append(...children);
  return made;
}

/** A piece of text. */
export function text(words: string): Text {
  return document.createTextNode(words);
}
