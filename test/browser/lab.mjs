// Starts `npm run lab` and runs every notebook in the Jupyter Notebook of Debian, in a headless browser, as a chemist would.
// It works in a copy of the workbench, since Jupyter saves what it opens; the copy's path has a blank in it.
// node test/browser/lab.mjs [--shots <folder for pictures>]
/* global document, Jupyter, getComputedStyle */

import { spawn } from "node:child_process";
import { cpSync, mkdirSync, mkdtempSync, readFileSync, readdirSync, rmSync, symlinkSync } from "node:fs";
import { createServer } from "node:net";
import path from "node:path";
import { setTimeout as pause } from "node:timers/promises";
import { check, tellCounts } from "./check.mjs";
import { launchBrowser } from "./launch.mjs";

const shotsAt = process.argv.indexOf("--shots");
const shots = shotsAt === -1 ? undefined : process.argv[shotsAt + 1];
const startLimit_ms = 240_000;
const notebookLimit_ms = 480_000;

const folder = workbenchCopy();
const token = "only-for-this-check";
const origin = `http://127.0.0.1:${await freePort()}`;
const lab = startLab();
const browser = await launchBrowser();
try {
  await until("Jupyter answers", startLimit_ms, async () => {
    if (lab.hasEnded()) throw new Error("npm run lab ended");
    return (await globalThis.fetch(`${origin}/api`).catch(() => undefined))?.ok;
  });
  const files = readdirSync(path.join(folder, "notebooks")).filter((name) => name.endsWith(".ipynb"));
  for (const file of files) await checkNotebook(file);
  check("there are notebooks", files.length > 0);
  checkRecords(files);
  await checkEnd();
} catch (error) {
  check("it runs to the end", false, `${error.message}\n${lab.told()}`);
} finally {
  await browser.close();
  if (!lab.hasEnded()) process.kill(-lab.child.pid, "SIGTERM");
  await lab.ended;
  rmSync(folder, { recursive: true });
}
tellCounts();

function workbenchCopy() {
  mkdirSync(".vitest", { recursive: true });
  const copy = mkdtempSync(path.resolve(".vitest", "lab at work-"));
  for (const name of ["notebooks", "data", "package.json"]) {
    cpSync(name, path.join(copy, name), { recursive: true });
  }
  for (const name of ["node_modules", "lib"]) symlinkSync(path.resolve(name), path.join(copy, name));
  mkdirSync(path.join(copy, "home"));
  return copy;
}

async function freePort() {
  const server = createServer();
  await new Promise((resolve) => server.listen(0, "127.0.0.1", resolve));
  const { port } = server.address();
  await new Promise((resolve) => server.close(resolve));
  return port;
}

// In a process group of its own, so that an interrupt reaches all of it, as from a terminal.
function startLab() {
  const options = ["--no-browser", "--ip=127.0.0.1", `--port=${new URL(origin).port}`, "--allow-root"];
  const child = spawn("npm", ["run", "lab", "--", "data/briefs/screen-housing.json", ...options], {
    cwd: folder,
    env: { ...process.env, HOME: path.join(folder, "home"), JUPYTER_TOKEN: token },
    stdio: ["ignore", "pipe", "pipe"],
    detached: true,
  });
  let told = "";
  for (const stream of [child.stdout, child.stderr]) stream.on("data", (data) => (told += data));
  const ended = new Promise((resolve) => child.on("close", resolve));
  const hasEnded = () => child.exitCode !== null || child.signalCode !== null;
  return { child, ended, hasEnded, told: () => told };
}

async function until(what, limit_ms, met) {
  for (const start = Date.now(); Date.now() - start < limit_ms; await pause(200)) if (await met()) return;
  throw new Error(`not within ${limit_ms / 1000} s: ${what}`);
}

// Debian's Jupyter names an extension that it does not bring, and its formulas try whether a font is there: neither is ours.
async function checkNotebook(file) {
  const context = await browser.newContext({ viewport: { width: 1280, height: 900 } });
  const page = await context.newPage();
  const troubles = [];
  const elsewhere = [];
  page.on("console", (message) => {
    const trouble = `${message.text()} ${message.location().url}`;
    if (message.type() === "error" && !/\/nbextensions\/|about:blank/.test(trouble)) troubles.push(trouble);
  });
  page.on("pageerror", (error) => troubles.push(error.message));
  page.on("request", (request) => {
    const { protocol, host } = new URL(request.url());
    if (!["data:", "blob:", "about:"].includes(protocol) && host !== new URL(origin).host)
      elsewhere.push(request.url());
  });
  await page.goto(`${origin}/notebooks/notebooks/${file}?token=${token}`);
  await page.waitForFunction(() => globalThis.Jupyter?.notebook?.kernel?.is_connected(), undefined, {
    timeout: startLimit_ms,
  });
  const kernel = await page.evaluate(() => Jupyter.notebook.kernel.name);
  check(`${file}: its kernel is chosen`, kernel === "tslab", kernel);
  const questions = await page.locator(".modal.in").count();
  check(`${file}: nothing is asked`, questions === 0, `${questions} dialogues`);

  await page.evaluate(() => Jupyter.notebook.execute_all_cells());
  const cells = await endOfCells(page);
  const bad = cells.filter(({ ended, errors }) => !ended || errors !== "");
  const words = bad.map(({ number, ended, errors }) => `cell ${number}: ${ended ? "" : "not run "}${errors}`);
  check(`${file}: every cell ends well`, bad.length === 0, words.join("\n  "));

  const [figures, drawn] = await figuresDrawn(page);
  check(`${file}: every figure is drawn`, figures === drawn, `${drawn} of ${figures}`);
  if (readFileSync(path.join(folder, "notebooks", file), "utf8").includes("show.showFigure(")) {
    check(`${file}: it has figures`, drawn > 0);
    check(`${file}: a figure answers the pointer`, await answersPointer(page));
  }
  const tables = await page.locator("div.resinwright > table").count();
  check(`${file}: it has tables`, tables > 0);
  const sides = await page.evaluate(() =>
    ["left", "right"].flatMap((side) =>
      [...document.querySelectorAll(`.resinwright td.${side}`)].map(
        (cell) => getComputedStyle(cell).textAlign === side,
      ),
    ),
  );
  check(`${file}: cells stand on their side`, sides.every(Boolean));
  const decided = await page.locator(".output strong", { hasText: "Decided." }).count();
  check(`${file}: it decides`, decided > 0);
  if (shots !== undefined) await picture(page, file);

  await page.evaluate(() => Jupyter.notebook.save_notebook());
  const saved = JSON.parse(readFileSync(path.join(folder, "notebooks", file), "utf8"));
  const outputs = saved.cells.flatMap((cell) => cell.outputs ?? []);
  check(`${file}: it is saved without outputs`, outputs.length === 0, `${outputs.length} outputs`);
  check(`${file}: no error in the console`, troubles.length === 0, troubles.join("\n  "));
  check(`${file}: nothing is asked of another host`, elsewhere.length === 0, elsewhere.join("\n  "));
  await context.close();
}

/** Waits until every code cell has ended, or one went wrong; says how each stands. */
async function endOfCells(page) {
  const standing = () =>
    page.evaluate(() =>
      Jupyter.notebook
        .get_cells()
        .filter((cell) => cell.cell_type === "code")
        .map(({ input_prompt_number, output_area }, i) => ({
          number: i + 1,
          ended: Number.isInteger(input_prompt_number),
          errors: output_area.outputs
            .filter(({ output_type, name }) => output_type === "error" || name === "stderr")
            .map(({ text, ename }) => text ?? ename)
            .join("\n"),
        })),
    );
  const done = (cells) => cells.every(({ ended }) => ended) || cells.some(({ errors }) => errors !== "");
  await until("the cells end", notebookLimit_ms, async () => done(await standing()));
  return await standing();
}

/** How many figures there are, and how many have marks on their axes, once they are as many or the time is up. */
async function figuresDrawn(page) {
  const count = () =>
    page.evaluate(() => {
      const figures = [...document.querySelectorAll("figure.resinwright")];
      const marks = ".overplot path, .overplot image";
      const drawn = figures.filter((figure) =>
        [...figure.querySelectorAll(marks)].some((mark) => mark.getBoundingClientRect().width > 1),
      );
      return [figures.length, drawn.length];
    });
  const all = async () => {
    const [figures, drawn] = await count();
    return figures === drawn;
  };
  await until("figures are drawn", 30_000, all).catch(() => undefined);
  return await count();
}

/** Whether a figure tells a value somewhere along its diagonal. */
async function answersPointer(page) {
  for (const area of await page.locator("figure.resinwright .nsewdrag").all()) {
    await area.scrollIntoViewIfNeeded();
    const { x, y, width, height } = await area.boundingBox();
    for (let part = 0.02; part < 1; part += 0.02) {
      await page.mouse.move(x + part * width, y + part * height);
      await page.waitForTimeout(60);
      if ((await page.locator("figure.resinwright .hoverlayer .hovertext").count()) > 0) return true;
    }
  }
  return false;
}

// The notebook scrolls within the page, so the window is made as high as the notebook.
async function picture(page, file) {
  mkdirSync(shots, { recursive: true });
  const height = await page.evaluate(() => document.getElementById("notebook-container").scrollHeight + 300);
  await page.setViewportSize({ width: 1280, height });
  await page.waitForTimeout(500);
  await page.screenshot({ path: path.join(shots, file.replace(".ipynb", ".png")) });
}

function checkRecords(files) {
  const names = readdirSync(path.join(folder, "records"));
  const records = names.map((name) => readFileSync(path.join(folder, "records", name), "utf8"));
  const decided = records.filter((text) => JSON.parse(text).kind === "decision");
  check("a decision for each notebook", decided.length === files.length, `${decided.length}`);
  check(
    "records of the brief that was named",
    records.every((text) => text.includes('"screen-housing"')),
  );
}

// The interrupt of a terminal goes to the whole group. Jupyter and its kernels show by the copy's path in their commands.
async function checkEnd() {
  const running = () =>
    readdirSync("/proc").filter((name) => /^\d+$/.test(name) && commandOf(name).includes(folder));
  check("Jupyter and kernels run before the end", running().length > 1);
  process.kill(-lab.child.pid, "SIGINT");
  await until("npm run lab ends", 30_000, lab.hasEnded);
  await until("all of it ends", 15_000, () => running().length === 0).catch(() => undefined);
  check("nothing outlives it", running().length === 0, running().map(commandOf).join("\n  "));
}

function commandOf(id) {
  try {
    return readFileSync(`/proc/${id}/cmdline`, "utf8");
  } catch {
    return "";
  }
}
