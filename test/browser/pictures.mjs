// Takes the pictures that the README shows from the rendered pages of the demo brief: node test/browser/pictures.mjs
// Run `npm start` before it. Needs a Chromium; none of the tests do.

import { mkdirSync } from "node:fs";
import { resolve } from "node:path";
import { pathToFileURL } from "node:url";
import { launchBrowser } from "./launch.mjs";

const browser = await launchBrowser();
const page = await browser.newPage({ viewport: { width: 1000, height: 760 }, colorScheme: "light" });
await page.goto(pathToFileURL(resolve("rendered/02-viscosity-and-ratio.html")).href);
await page.waitForSelector(".main-svg");
const heading = await page.getByRole("heading", { name: "The ratio to take" }).boundingBox();
mkdirSync("notebooks/pictures", { recursive: true });
const clip = { x: 100, y: heading.y - 20, width: 800, height: 640 };
await page.screenshot({ path: "notebooks/pictures/viscosity.png", fullPage: true, clip });
await browser.close();
