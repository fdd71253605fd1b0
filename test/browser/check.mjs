// Counts what a check in a browser finds; only what fails is told on the way.

let passed = 0;
let failed = 0;

export function check(what, met, found = "") {
  if (met) return void passed++;
  failed++;
  console.log(`FAILED ${what} ${found}`.trim());
}

/** Tells the counts, and lets the process end with 1 if anything failed. */
export function tellCounts() {
  console.log(`${passed} passed, ${failed} failed`);
  process.exitCode = failed === 0 ? 0 : 1;
}
