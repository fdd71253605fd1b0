// Checks the library package as it would be published: packs it, lints the tarball, resolves its types, and uses it from an
// empty folder, in Node and bundled into a page. Prints "N passed, N failed" and exits non-zero on any failure.

import { execFileSync, spawnSync } from "node:child_process";
import { cpSync, existsSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";
import { launchBrowser } from "../browser/launch.mjs";
import { build, preview } from "vite";
import { assessProgram } from "./assessProgram.mjs";

const folder = mkdtempSync(join(tmpdir(), "resinwright-package-"));
let passed = 0;
let failed = 0;

async function check(name, act) {
  try {
    await act();
    passed++;
    console.log(`ok   ${name}`);
  } catch (error) {
    failed++;
    console.log(`FAIL ${name}\n${error.stdout ?? ""}${error.stderr ?? ""}${error.message}`);
  }
}
const run = (command, words, cwd = folder) =>
  execFileSync(command, words, { cwd, encoding: "utf8", stdio: "pipe" });
const bin = (name) => resolve("node_modules/.bin", name);

run("npm", ["pack", "--silent", "--pack-destination", folder], resolve("lib"));
const tarball = join(
  folder,
  readdirSync(folder).find((name) => name.endsWith(".tgz")),
);
const user = join(folder, "user");

await check("publint", () => run(bin("publint"), ["run", "--strict", tarball]));
await check("types under each resolution mode", () => run(bin("attw"), [tarball, "--profile", "esm-only"]));
await check("installs into an empty folder", () => {
  run("mkdir", [user]);
  writeFileSync(join(user, "package.json"), JSON.stringify({ private: true, type: "module" }));
  run("npm", ["install", "--silent", "--no-audit", "--no-fund", tarball], user);
});
await check("is used from an ES module", () => {
  writeFileSync(
    join(user, "use.mjs"),
    `import { grunbergNissan } from "resinwright";
     import { readShelf } from "resinwright/files";
     const blend = { fractions: [0.5, 0.5], viscosities_mPas: [10, 1000], basis: "mass", interactions: [] };
     if (Math.abs(grunbergNissan(blend) - 100) > 1e-9) throw new Error("grunbergNissan");
     if (readShelf([${JSON.stringify(resolve("data"))}]).ingredients.size < 30) throw new Error("readShelf");`,
  );
  run("node", ["use.mjs"], user);
});
await check("is used by require, as the notebook kernel does", () => {
  const program = `const { cureDepth } = require("resinwright"); require("resinwright/files");
    if (cureDepth({ exposure_mJcm2: 5, penetrationDepth_um: 100, criticalExposure_mJcm2: 5 }) !== 0) throw new Error("cureDepth");`;
  run("node", ["--input-type=commonjs", "--eval", program], user);
});
await check("passes the kernel's own compiler, TypeScript 5.0 with the old resolution", () => {
  writeFileSync(
    join(user, "use.ts"),
    `import { assess } from "resinwright"; import { openBrief } from "resinwright/files";
     export const verdicts: string[] = assess(openBrief("b.json")).verdicts.map(({ outcome }) => outcome);`,
  );
  const compiler = resolve("node_modules/@tslab/typescript-for-tslab/bin/tsc");
  const options = ["--noEmit", "--strict", "--skipLibCheck", "--target", "es2022", "--module", "esnext"];
  run("node", [compiler, ...options, "--moduleResolution", "node", "use.ts"], user);
});
const data = resolve("data");
const { version } = JSON.parse(readFileSync("lib/package.json", "utf8"));
await check("its command assesses a brief of the user", () => {
  const told = run("npx", ["--no-install", "resinwright", "--version"], user).trim();
  if (told !== version) throw new Error(`--version says ${told}`);
  cpSync(data, join(user, "data"), { recursive: true });
  const words = [
    "--no-install",
    "resinwright",
    "assess",
    "data/briefs/flow-cell.json",
    "--draws",
    "100",
    "--json",
  ];
  const { format, verdicts } = JSON.parse(run("npx", words, user));
  if (format !== "resinwright assessment 1" || verdicts.length === 0) throw new Error("assess");
});
await check("its command says what notebooks need where that is missing", () => {
  const { status, stdout, stderr } = spawnSync("npx", ["--no-install", "resinwright", "render", "x.json"], {
    cwd: user,
    encoding: "utf8",
  });
  if (status !== 2 || stdout !== "" || !/^render: notebooks need .*tslab.*npm ci/.test(stderr))
    throw new Error(`${status} ${stdout} ${stderr}`);
});
await check("carries the script of the panel", () => {
  if (!existsSync(join(user, "node_modules/resinwright/dist/panel/panel.js"))) throw new Error("panel.js");
});
await check("computes in a page, bundled, what it computes in Node", async () => {
  writeFileSync(join(user, "assess.mjs"), assessProgram(resolve("data")));
  writeFileSync(join(user, "print.mjs"), `import { numbers } from "./assess.mjs"; console.log(numbers());`);
  writeFileSync(
    join(user, "index.html"),
    `<!doctype html><title>numbers</title><pre></pre>
     <script type="module">
       import { numbers } from "./assess.mjs";
       document.querySelector("pre").textContent = numbers();
     </script>`,
  );
  const quiet = { root: user, configFile: false, logLevel: "warn" };
  await build({ ...quiet, build: { target: "es2022", chunkSizeWarningLimit: 2000 } });
  const server = await preview({ ...quiet, preview: { host: "127.0.0.1", port: 4179 } });
  const browser = await launchBrowser();
  try {
    const page = await browser.newPage();
    await page.goto(server.resolvedUrls.local[0]);
    await page.locator("pre:not(:empty)").waitFor();
    const [inPage, inNode] = [await page.locator("pre").textContent(), run("node", ["print.mjs"], user)];
    if (inPage.trim() !== inNode.trim()) throw new Error(`in the page ${inPage}\nin Node ${inNode}`);
    if (JSON.parse(inPage).length !== 8) throw new Error(`eight properties were expected: ${inPage}`);
  } finally {
    await browser.close();
    await server.close();
  }
});

rmSync(folder, { recursive: true });
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
