import fc from "fast-check";
import { describe, expect, it } from "vitest";
import {
  inlineHtml,
  markdownHtml,
  plainText,
  splitTitle,
  type Heading,
} from "../../lib/notebook/markdown.js";

const render = (source: string, headings: Heading[] = []) =>
  markdownHtml({ source, where: "trial.ipynb, cell 1", headings });

describe("markdownHtml, text", () => {
  it("sets paragraphs, emphasis, lists and code", () => {
    expect(render("A *b* **c** `d`\n\n- e")).toBe(
      "<p>A <em>b</em> <strong>c</strong> <code>d</code></p>\n<ul>\n<li>e</li>\n</ul>\n",
    );
  });

  it("colours TypeScript and leaves other code plain", () => {
    expect(render("```ts\nconst a = 1;\n```")).toContain(`<span class="hljs-keyword">const</span>`);
    expect(render("```sh\nconst a = 1;\n```")).toContain("<code>const a = 1;\n</code>");
    expect(render("    <b>")).toContain("<code>&lt;b&gt;\n</code>");
  });

  it.each([
    "</script><script>alert(1)",
    `"><img src=x onerror=alert(1)>`,
    "<b onclick=alert(1)>x</b>",
    "`<script>alert(1)</script>`",
    "```html\n<script>alert(1)</script>\n```",
    "```ts\n</code></pre><script>alert(1)</script>\n```",
    "```<script>\nx\n```",
    "# <script>alert(1)</script>",
    "| <script>x</script> |\n|---|\n| <img src=x> |",
    "[a](javascript:alert(1))",
    "[<img src=x onerror=alert(1)>](https://example.org)",
    `[a](https://example.org "\\"><script>alert(1)</script>")`,
    `![" onerror="alert(1)](data:image/png;base64,AAAA)`,
    `![" onerror="alert(1)](x.png)`,
    "$\\text{<script>alert(1)</script>}$",
    "$\\href{javascript:alert(1)}{x}$",
  ])("lets nothing of %j act", (source) => {
    for (const tag of render(source).match(/<[^>]*>/g) ?? []) {
      expect(tag).not.toMatch(/^<\/?(script|b)\b|(src|href)="(?!https:|data:image\/)/i);
      expect(tag.replace(/"[^"]*"/g, "")).not.toMatch(/\son\w+=/i);
    }
  });

  it("has the same words as its source, whatever they are", () => {
    fc.assert(
      fc.property(fc.stringMatching(/^[a-z<>&"']{1,20}$/), (text) => {
        expect(plainText(inlineHtml({ source: `x${text}`, where: "" }))).toBe(`x${text}`);
      }),
    );
  });
});

describe("markdownHtml, headings", () => {
  it("start below the title, skip no level, and have anchors of their own across cells", () => {
    const headings: Heading[] = [];
    const html =
      render("# One\n\n#### Two\n\n## One", headings) + render("###### Schicht *größe*\n\n# <b>", headings);
    expect(html.match(/<h\d id="[^"]*">/g)).toEqual([
      `<h2 id="one">`,
      `<h3 id="two">`,
      `<h2 id="one-2">`,
      `<h3 id="schicht-größe">`,
      `<h2 id="b">`,
    ]);
    expect(html.match(/<\/h\d>/g)).toEqual(["</h2>", "</h3>", "</h2>", "</h3>", "</h2>"]);
    expect(headings.map(({ html }) => html)).toEqual([
      "One",
      "Two",
      "One",
      "Schicht <em>größe</em>",
      "&lt;b&gt;",
    ]);
    const mark: Heading[] = [];
    render("## !", mark);
    expect(mark[0]?.anchor).toBe("part");
  });

  it("leave the title to the page", () => {
    expect(splitTitle("\n# A title #\n\nText")).toEqual({ title: "A title", rest: "\nText" });
    expect(splitTitle("# Alone")).toEqual({ title: "Alone", rest: "" });
    expect(splitTitle("## Not one")).toEqual({ rest: "## Not one" });
    expect(splitTitle("Text\n# Later")).toEqual({ rest: "Text\n# Later" });
  });
});

describe("markdownHtml, formulas", () => {
  it("are MathML, within a line or on their own", () => {
    expect(render("with $D_p$ of")).toMatch(
      /^<p>with <span class="katex"><math [^>]*>.*<\/math><\/span> of<\/p>/s,
    );
    const shown = render("$$\n\\eta =\n\\frac{a}{b}\n$$\nafter");
    expect(shown).toMatch(
      /^<div class="formula scroll" role="group" aria-label="Formula"><span class="katex"><math [^>]*display="block"/,
    );
    expect(shown).toContain("<mfrac>");
    expect(shown).toContain("<p>after</p>");
    expect(render("so $$a$$ it")).toMatch(/^<p>so <span class="formula scroll" [^>]*>.*<\/span> it<\/p>/s);
    // Two formulas a wide space apart may stand below each other.
    expect(render("$$a = b, \\qquad c = d$$").match(/<math /g)).toHaveLength(2);
    expect(render("$$\\begin{matrix} a \\qquad b \\end{matrix}$$").match(/<math /g)).toHaveLength(1);
    expect(render("- item\n  $$\n  a\n  $$")).toMatch(/<li>item\n?<div class="formula/);
  });

  it("say of what they are made to those who cannot see them", () => {
    expect(plainText(render("$\\eta$"))).toBe("η\n");
  });

  it.each(["costs $5 to $9", "a $ b $ c", "\\$a$", "$", "$$", "$$\nopen", "`$a$`", "a$1"])(
    "are not read into %j",
    (source) => {
      expect(render(source)).not.toContain("<math");
    },
  );

  it("keep an escaped dollar sign inside", () => {
    expect(render("$a\\$b$")).toContain("<math");
  });

  it("that cannot be set are refused with their cell", () => {
    expect(() => render("$\\frac{a$")).toThrow(
      /^trial\.ipynb, cell 1: formula "\\frac\{a" cannot be set: KaTeX parse error: /,
    );
  });
});

describe("markdownHtml, tables, pictures and links", () => {
  it("sets tables in a box of their own, numbers to the right", () => {
    const html = render("| a | b |\n|---|---:|\n| x | 1 |");
    expect(html).toContain(`<div class="scroll"><table>`);
    expect(html).toContain(`<th scope="col">a</th>`);
    expect(html).toContain(`<th class="right" scope="col">b</th>`);
    expect(html).toContain(`<td class="right">1</td>`);
    expect(html).not.toContain("style=");
  });

  it("shows a picture the text carries and names one it does not", () => {
    expect(render("![bar](data:image/png;base64,AAAA)")).toContain(
      `<img src="data:image/png;base64,AAAA" alt="bar">`,
    );
    expect(render("![photo](https://example.org/a.png)")).toContain("[picture left out: photo]");
    expect(render("![](b.png)")).toContain("[picture left out: b.png]");
  });

  it("leads from notebook to notebook by their pages", () => {
    expect(render("[n](02-light.ipynb#dose)")).toContain(`href="02-light.html#dose"`);
    expect(render("[w](https://example.org/a.ipynb)")).toContain(`href="https://example.org/a.ipynb"`);
    expect(render("[h](#dose)")).toContain(`href="#dose"`);
  });
});
