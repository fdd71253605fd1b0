// Copies the tables of a page, with the clipboard and without it.
/* global document, navigator */

import path from "node:path";
import { pathToFileURL } from "node:url";

/** Presses the copy button of the first table with the keyboard and compares what arrives with what the table shows. */
export async function checkCopying({ browser, place, check }) {
  const file = path.basename(place);
  for (const clipboard of ["with the clipboard", "without the clipboard"]) {
    const context = await browser.newContext({ permissions: ["clipboard-read", "clipboard-write"] });
    const page = await context.newPage();
    if (clipboard === "without the clipboard") {
      await page.addInitScript(() =>
        Object.defineProperty(navigator.clipboard, "writeText", { value: () => Promise.reject(new Error()) }),
      );
    }
    await page.goto(pathToFileURL(place).href);
    const tables = await page.locator("main table").count();
    const buttons = page.locator(".copy button");
    check(`${file}: every table can be copied`, (await buttons.count()) === tables, `${tables} tables`);
    if (tables > 0) {
      await buttons.first().focus();
      await page.keyboard.press("Enter");
      const said = page.locator(".copy [role=status]").first();
      await said
        .filter({ hasText: "Copied." })
        .waitFor({ timeout: 5000 })
        .catch(() => undefined);
      check(`${file} ${clipboard}: says that it copied`, (await said.textContent()) === "Copied.");
      const copied = await page.evaluate(() => navigator.clipboard.readText());
      const shown = await page.evaluate(() =>
        [...document.querySelector("main table").rows].map((row) =>
          [...row.cells].map((cell) => cell.textContent.trim().replace(/^−/, "-")),
        ),
      );
      const cells = copied
        .trimEnd()
        .split("\n")
        .map((line) => line.split("\t"));
      check(
        `${file} ${clipboard}: the copy is the table`,
        JSON.stringify(cells) === JSON.stringify(shown),
        copied.slice(0, 300),
      );
    }
    await context.close();
  }
}
