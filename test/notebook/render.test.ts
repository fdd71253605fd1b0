import { createHash } from "node:crypto";
import { describe, expect, it } from "vitest";
import { embed, type Content } from "../../lib/notebook/content.js";
import type { Notebook, Output } from "../../lib/notebook/notebookFile.js";
import { darkPalette, lightPalette, type Palette } from "../../lib/notebook/palette.js";
import * as pages from "../../lib/notebook/pages.js";
import { panelOf } from "../../lib/notebook/panel/panel.js";
import { renderIndex, renderNotebook, renderSheet } from "../../lib/notebook/render.js";
import { summaryOf } from "../../lib/notebook/summary.js";
import { readWorkbench } from "../../lib/recipe/files.js";
import { figure, sheet, table } from "./contents.js";

const origin = {
  brief: "flow-cell.json",
  libraryVersion: "1.2.3",
  nodeVersion: "20.20.2",
  date: "2026-01-05",
};
const emptyIndex = { pages: [], origin, title: "A brief", introduction: "Of nothing." };
const hostile = `</script><script>alert(1)</script>"><img src=x onerror=alert(1)>`;

const notebook = (...cells: Notebook["cells"]): Notebook => ({ file: "notebooks/07-trial_run.ipynb", cells });
const prose = (source: string) => ({ kind: "markdown", source }) as const;
const shown = (...outputs: Output[]) => ({ kind: "code", source: "const a = 1;", outputs }) as const;
const display = (type: string, text: string): Output => ({ kind: "display", data: { [type]: text } });
const page = (...cells: Notebook["cells"]) => renderNotebook({ notebook: notebook(...cells), origin });
const mainOf = (html: string) => /<main[^]*<\/main>/.exec(html)![0];

const html = (content: Content) =>
  display("text/html", `${embed(content)}<div onclick="alert(1)">live fallback</div>`);

describe("renderNotebook, the page", () => {
  it("takes its title from the first heading, or from the file", () => {
    expect(page(prose("# Light & $D_p$\n\nFirst *words*.\n\nMore.")).title).toBe("Light & Dp");
    expect(page(prose("# Light\n\nFirst *words*.\n\nMore.")).summary).toBe("First words.");
    expect(page(prose("## Part")).title).toBe("07-trial_run");
    expect(page(shown()).html).toContain("<h1>07-trial_run</h1>");
    expect(page(prose("# A\n\nb")).html.match(/<h1>/g)).toHaveLength(1);
  });

  it("has a language, landmarks, a way past the bar, contents and one title", () => {
    const { html } = page(prose("# T\n\n## One\n\n### Two\n\n#### Three"));
    for (const part of [
      `<html lang="en">`,
      `<a class="skip" href="#main">`,
      `<header class="bar">`,
      `<main id="main"`,
      `<nav class="contents" aria-label="Contents">`,
      `<li><a href="#one">One</a></li>`,
      `<li class="deeper"><a href="#two">Two</a></li>`,
      `<footer class="foot">`,
      `<title>T</title>`,
    ]) {
      expect(html).toContain(part);
    }
    expect(html).not.toContain(`href="#three"`);
    expect(page(prose("# T\n\n## One")).html).not.toContain("<nav");
  });

  it("says where it comes from", () => {
    expect(page(prose("a")).html).toContain(
      "<p>Brief flow-cell.json · run 2026-01-05 · resinwright 1.2.3 · Node 20.20.2</p>",
    );
  });

  it("folds code under a label, coloured, and says so in print", () => {
    const { html } = page(shown(), { kind: "code", source: " \n", outputs: [] });
    expect(html).toContain("<summary>Code of cell 1</summary>");
    expect(html).toContain(`<span class="hljs-keyword">const</span> a`);
    expect(html).not.toContain("Code of cell 2");
    expect(html).toContain(
      `<p class="print-only">The code and the numbers behind the figures are left out in print;`,
    );
    expect(page(prose("a")).html).not.toContain(`class="print-only"`);
  });

  it("is the same through the public door", async () => {
    const given = { notebook: notebook(prose("# A")), origin };
    expect(await pages.renderNotebook(given)).toEqual(renderNotebook(given));
    expect(await pages.renderIndex(emptyIndex)).toBe(renderIndex(emptyIndex));
  });
});

describe("renderNotebook, what cells show", () => {
  it("draws a figure from its data, with caption, words, table and a line for readers without scripts", () => {
    const main = mainOf(page(shown(html(figure), html(table), html(figure))).html);
    expect(main).toContain(
      `<div class="plot" role="img" aria-labelledby="resinwright-figure-1-name" aria-describedby="resinwright-figure-1-words">`,
    );
    expect(main).toContain(
      `<script type="application/json">{"data":[{"x":[1,2],"y":[3,4]}],"layout":{"height":300}}</script>`,
    );
    expect(main).toContain(`id="resinwright-figure-2-name"><strong>Figure 2.</strong> A line</p>`);
    expect(main).toContain(`<p id="resinwright-figure-1-words">It rises.</p>`);
    expect(main).toContain("<summary>Figure 1 in words and numbers</summary>");
    expect(main.match(/<noscript>/g)).toHaveLength(2);
    expect(main).toContain("<strong>Table 1.</strong> Numbers");
    expect(main.match(/<table/g)).toHaveLength(3);
    expect(main).not.toContain("live fallback");
  });

  it("gives a figure of several moments a slider that a script has to unhide, and its steps in place of its data", () => {
    const steps = ["1 s", "2 s"].map((name, i) => ({ name, data: [{ x: [1], y: [i] }] }));
    const main = mainOf(page(shown(html({ ...figure, moments: { label: "light", shown: 1, steps } }))).html);
    expect(main).toContain(`<script type="application/json">{"layout":{"height":300},"moments":{`);
    expect(main).toContain(
      `<div class="moments" hidden><label for="resinwright-figure-1-moment">light</label>`,
    );
    expect(main).toContain(`type="range" min="0" max="1" step="1" value="1" aria-valuetext="2 s">`);
    expect(main).toContain(`<output for="resinwright-figure-1-moment">2 s</output>`);
  });

  it("carries the figure library once, and only where there is a figure", () => {
    const withFigures = page(shown(html(figure), html(figure))).html;
    const scripts = [...withFigures.matchAll(/<script>([^]*?)<\/script>/g)];
    expect(scripts).toHaveLength(2);
    expect(withFigures.length).toBeGreaterThan(1e6);
    expect(withFigures.length).toBeLessThan(3e6);
    expect(page(shown(html(table))).html.length).toBeLessThan(5e4);
  });

  it("shows text, prose and pictures", () => {
    const main = mainOf(
      page(
        shown(
          { kind: "text", text: "a <b>\n" },
          display("text/plain", "plain"),
          display("text/markdown", "*set*"),
          display("image/png", "iVBORw0KGgo="),
          display("image/svg+xml", `<svg xmlns="http://www.w3.org/2000/svg"><title>A "bar"</title></svg>`),
        ),
      ).html,
    );
    expect(main).toContain(`<pre class="output scroll">a &lt;b&gt;</pre>`);
    expect(main).toContain(`<pre class="output scroll">plain</pre>`);
    expect(main).toContain("<em>set</em>");
    expect(main).toContain(
      `<img src="data:image/png;base64,iVBORw0KGgo=" alt="Picture 1, without a description">`,
    );
    expect(main).toMatch(/<img src="data:image\/svg\+xml;base64,[A-Za-z0-9+/=]+" alt="A &quot;bar&quot;">/);
  });

  it.each(["text/html", "text/javascript", "text/latex", "image/jpeg", "application/x-made-up"])(
    "shows %s as text",
    (type) => {
      expect(mainOf(page(shown(display(type, `<b>x</b>`))).html)).toContain(
        `<pre class="output scroll">&lt;b&gt;x&lt;/b&gt;</pre>`,
      );
    },
  );

  it("refuses what it cannot show, naming the cell", () => {
    const bad = `<script type="application/json" data-resinwright="figure">{}</script>`;
    expect(() => page(shown(), shown(display("text/html", bad)))).toThrow(
      "notebooks/07-trial_run.ipynb, code cell 2: output figure: kind: ",
    );
    expect(() => page(shown(display("image/png", `x" onerror="alert(1)`)))).toThrow(
      "notebooks/07-trial_run.ipynb, code cell 1: a picture of type image/png is not base64; display the bytes of a PNG file",
    );
    expect(() => page(prose("a"), prose("$\\frac$"))).toThrow(
      "notebooks/07-trial_run.ipynb, cell 2: formula",
    );
  });
});

describe("renderNotebook, the panel and the card", () => {
  const work = readWorkbench("data/briefs/flow-cell.json");
  const card = (decided: string) => shown(html(summaryOf({ work, decided })));

  it("puts a panel where the cell shows it, its data inert, its script once", () => {
    const { html: whole } = page(shown(html(panelOf(work)), html(panelOf(work))));
    const main = mainOf(whole);
    expect(main).toContain(
      `<section class="panel" id="resinwright-panel-1" aria-label="Panel 1: other settings">`,
    );
    expect(main).toContain(
      `<section class="panel" id="resinwright-panel-2" aria-label="Panel 2: other settings">`,
    );
    expect(main).toContain(`<script type="application/json">{"kind":"panel","work":{"formulation":`);
    expect(main).toContain(
      "<noscript><p>This panel computes in the page. It needs a browser that may run scripts;",
    );
    expect(main).not.toContain("live fallback");
    expect([...whole.matchAll(/<script>/g)]).toHaveLength(2);
    expect(whole.length).toBeLessThan(3e5);
  });

  it("keeps hostile text in a panel's data inside its element", () => {
    const formulation = { ...work.formulation, title: hostile };
    const { html: whole } = page(shown(html(panelOf({ ...work, formulation }))));
    const main = mainOf(whole);
    expect(main.match(/<script/g)).toHaveLength(1);
    expect(main.match(/<\/script/g)).toHaveLength(1);
    expect(main).not.toContain("<img");
  });

  it("heads the page with the last card, before the contents, and leaves nothing where the cell stood", () => {
    const main = mainOf(page(prose("# T\n\n## One"), card("First."), card("Last."), prose("## Two")).html);
    expect(main.match(/class="card"/g)).toHaveLength(1);
    expect(main).toContain("<dd>Last.</dd>");
    expect(main).not.toContain("First.");
    expect(main.indexOf(`class="card"`)).toBeGreaterThan(main.indexOf("<h1>"));
    expect(main.indexOf(`class="card"`)).toBeLessThan(main.indexOf("<nav"));
  });
});

describe("renderNotebook, safety", () => {
  const everywhere = renderNotebook({
    notebook: {
      file: `${hostile.replaceAll("/", "")}.ipynb`,
      cells: [
        prose(`text ${hostile}\n\n## ${hostile}\n\n## ${hostile}`),
        { kind: "code", source: `const a = \`${hostile}\`;`, outputs: [] },
        shown(
          { kind: "text", text: hostile },
          display("text/html", hostile),
          display("text/markdown", hostile),
          display("image/svg+xml", `<svg><title>${hostile}</title></svg>`),
          display(hostile, hostile),
          html({
            ...figure,
            caption: hostile,
            alternativeText: hostile,
            data: [{ name: hostile }],
            layout: { title: { text: hostile } },
            table: {
              ...table,
              caption: hostile,
              columns: [{ name: hostile, unit: hostile, align: "left" }],
              rows: [[hostile]],
            },
          }),
        ),
      ],
    },
    origin: { brief: hostile, libraryVersion: hostile, nodeVersion: hostile, date: hostile },
  }).html;

  it("keeps hostile text as text wherever it stands", () => {
    const library = everywhere.indexOf("<script>");
    const own = everywhere.slice(0, library);
    expect(own).not.toMatch(/<script(?! type="application\/json">)/);
    expect(own.match(/<script/g)).toHaveLength(1);
    expect(own.match(/<\/script/g)).toHaveLength(1);
    expect(
      (own.match(/<[^>]*>/g) ?? []).filter((tag) => /\son\w+\s*=/.test(tag.replace(/"[^"]*"/g, ""))),
    ).toEqual([]);
    expect((own.match(/<img[^>]*>/g) ?? []).every((tag) => tag.startsWith(`<img src="data:image/`))).toBe(
      true,
    );
  });

  it("lets only its own scripts run, by their hash, and fetches nothing", () => {
    const policy = /<meta http-equiv="Content-Security-Policy" content="([^"]*)">/.exec(everywhere)![1]!;
    const scripts = [...everywhere.matchAll(/<script>([^]*?)<\/script>/g)].map(([, script]) => script!);
    const hashes = scripts.map(
      (script) => `'sha256-${createHash("sha256").update(script).digest("base64")}'`,
    );
    expect(scripts).toHaveLength(2);
    expect(policy.split("; ")).toEqual([
      "default-src 'none'",
      `script-src ${hashes.join(" ")}`,
      "style-src 'unsafe-inline'",
      "img-src data:",
      "font-src data:",
      "base-uri 'none'",
      "form-action 'none'",
    ]);
    expect(everywhere.indexOf("http-equiv")).toBeLessThan(everywhere.indexOf("<style"));
    expect(renderIndex(emptyIndex)).toContain("script-src 'none'");
  });
});

describe("a decision", () => {
  it("is taken from the Markdown that says so, the last one if there are several", () => {
    const said = (text: string) => shown(display("text/markdown", text));
    expect(
      page(said("**Decided.** First."), said("Then."), said("**Decided.** Print at 30 °C.")).decision,
    ).toBe("Print at 30 °C.");
    expect(page(prose("**Decided.** In prose, not computed.")).decision).toBeUndefined();
  });
});

describe("renderIndex", () => {
  it("lists the pages in order, as text", () => {
    const index = renderIndex({
      pages: [
        { file: "02-b c.html", title: hostile, summary: hostile },
        { file: "01-a.html", title: "A", summary: "", decision: hostile },
      ],
      origin,
      title: hostile,
      introduction: hostile,
    });
    expect(index).toContain(`<h1>&lt;/script&gt;`);
    expect(index).toContain(`<a href="02-b%20c.html">&lt;/script&gt;`);
    expect(index).toContain(
      `<li><a href="01-a.html">A</a><p class="decided"><strong>Decided.</strong> &lt;/script&gt;`,
    );
    expect(index.indexOf("02-b")).toBeLessThan(index.indexOf("01-a"));
    expect(index).not.toMatch(/<script|<img/);
    expect(index).toContain("run 2026-01-05");
  });
});

describe("a weigh-out sheet", () => {
  const links =
    '<a href="weigh-out-a4.html">weigh-out sheet, A4</a> · <a href="weigh-out-letter.html">weigh-out sheet, US Letter</a>';

  it("is linked from the page that shows it and handed on to be written beside it", () => {
    const { html: written, sheets } = page(shown(html(sheet)));
    expect(mainOf(written)).toContain(`<p>${links}</p>`);
    expect(mainOf(written)).not.toContain("live fallback");
    expect(sheets).toEqual([sheet]);
    expect(page(prose("a")).sheets).toEqual([]);
  });

  it("is linked from the index under its notebook", () => {
    const index = renderIndex({
      ...emptyIndex,
      pages: [{ file: "01-a.html", title: "A", summary: "", sheets: [sheet] }],
    });
    expect(index).toContain(`<a href="01-a.html">A</a><p class="sheets">${links}</p></li>`);
  });

  it("becomes a page a paper, each with a way back and to the other", () => {
    const written = renderSheet({ content: sheet, origin });
    expect([...written.keys()]).toEqual(["weigh-out-a4.html", "weigh-out-letter.html"]);
    for (const one of written.values())
      expect(one).toContain(`<header class="bar"><a href="index.html">All notebooks</a> · ${links}</header>`);
    expect(written.get("weigh-out-a4.html")).toContain("size: A4 landscape");
    expect(written.get("weigh-out-letter.html")).toContain("size: letter landscape");
  });
});

describe("palettes", () => {
  // Relative luminance and contrast as the Web Content Accessibility Guidelines 2.2 define them (from memory).
  const luminance = (color: string) => {
    const [r, g, b] = [1, 3, 5]
      .map((start) => parseInt(color.slice(start, start + 2), 16) / 255)
      .map((c) => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4));
    return 0.2126 * r! + 0.7152 * g! + 0.0722 * b!;
  };
  const contrast = (one: string, other: string) => {
    const [low, high] = [luminance(one), luminance(other)].sort((a, b) => a - b);
    return (high! + 0.05) / (low! + 0.05);
  };

  it("know the contrast of black on white", () => {
    expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 10);
  });

  it.each([
    ["light", lightPalette],
    ["dark", darkPalette],
  ])("%s: every text colour is readable on paper and on shade", (_, palette: Palette) => {
    for (const text of ["ink", "muted", "accent", "codeWord", "codeText", "codeNumber"] as const) {
      for (const ground of ["paper", "shade"] as const) {
        expect([text, ground, contrast(palette[text], palette[ground]) >= 4.5]).toEqual([text, ground, true]);
      }
    }
  });
});
