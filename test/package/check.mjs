// Checks the library package as it would be published: packs it, lints the tarball, resolves its types, and uses it from an
// empty folder. Prints "N passed, N failed" and exits non-zero on any failure.

import { execFileSync, spawnSync } from "node:child_process";
import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";

const folder = mkdtempSync(join(tmpdir(), "resinwright-package-"));
let passed = 0;
let failed = 0;

function check(name, act) {
  try {
    act();
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

check("publint", () => run(bin("publint"), ["run", "--strict", tarball]));
check("types under each resolution mode", () => run(bin("attw"), [tarball, "--profile", "esm-only"]));
check("installs into an empty folder", () => {
  run("mkdir", [user]);
  writeFileSync(join(user, "package.json"), JSON.stringify({ private: true, type: "module" }));
  run("npm", ["install", "--silent", "--no-audit", "--no-fund", tarball], user);
});
check("is used from an ES module", () => {
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
check("is used by require, as the notebook kernel does", () => {
  const program = `const { cureDepth } = require("resinwright"); require("resinwright/files");
    if (cureDepth({ exposure_mJcm2: 5, penetrationDepth_um: 100, criticalExposure_mJcm2: 5 }) !== 0) throw new Error("cureDepth");`;
  run("node", ["--input-type=commonjs", "--eval", program], user);
});
check("passes the kernel's own compiler, TypeScript 5.0 with the old resolution", () => {
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
check("its command assesses a brief of the user", () => {
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
check("its command says what notebooks need where that is missing", () => {
  const { status, stdout, stderr } = spawnSync("npx", ["--no-install", "resinwright", "render", "x.json"], {
    cwd: user,
    encoding: "utf8",
  });
  if (status !== 2 || stdout !== "" || !/^render: notebooks need .*tslab.*npm ci/.test(stderr))
    throw new Error(`${status} ${stdout} ${stderr}`);
});

rmSync(folder, { recursive: true });
console.log(`${passed} passed, ${failed} failed`);
process.exit(failed === 0 ? 0 : 1);
