// Times the two calls of the viscosity models that others make in bulk: a prepared blend, and the fit of a table of readings.
// Run after a build: node test/bench/viscosity.mjs
import { fitBlend, grunbergNissan, prepareBlend } from "resinwright";

const BLENDS = 1_000_000;
const LIQUIDS = 6;

const viscosities_mPas = [24000, 1100, 110, 14, 8, 10];
const interactions = viscosities_mPas.flatMap((_, first) =>
  viscosities_mPas
    .slice(first + 1)
    .map((_, k) => ({ first, second: first + 1 + k, G: -0.4 * (k + 1), basis: "mass" })),
);
const liquids = { viscosities_mPas, basis: "mass", interactions };

/** Fractions that add up to 1, the same in every run. */
function fillFractions(x, i) {
  let total = 0;
  for (let k = 0; k < LIQUIDS; k++) total += x[k] = 1 + ((i * (2 * k + 3)) % 97);
  for (let k = 0; k < LIQUIDS; k++) x[k] /= total;
}

/** The best of five runs, in ms: the others were disturbed. */
function best(run) {
  let least = Infinity;
  for (let k = 0; k < 5; k++) {
    const start = performance.now();
    run();
    least = Math.min(least, performance.now() - start);
  }
  return least;
}

const viscosity = prepareBlend(liquids);
const x = new Float64Array(LIQUIDS);
let sum = 0;
const filling = best(() => {
  for (let i = 0; i < BLENDS; i++) fillFractions(x, i);
});
const together = best(() => {
  sum = 0;
  for (let i = 0; i < BLENDS; i++) {
    fillFractions(x, i);
    sum += Math.log(viscosity(x));
  }
});
const plain = best(() => {
  for (let i = 0; i < BLENDS / 100; i++) {
    fillFractions(x, i);
    grunbergNissan({ ...liquids, fractions: x });
  }
});

const readings = Array.from({ length: 15 }, (_, i) => {
  const oligomer = i / 14;
  const lnEta = oligomer * Math.log(2400) + (1 - oligomer) * Math.log(10) - oligomer * (1 - oligomer);
  const viscosity_mPas = Math.exp(lnEta + 0.02 * Math.sin(37 * i));
  return { fractions: [oligomer, 1 - oligomer], temperature_C: 25, viscosity_mPas };
});
const table = { readings, basis: "mass", terms: 1, level: 0.95 };
const fits = 1000;
const fitting = best(() => {
  for (let i = 0; i < fits; i++) fitBlend(table);
});
const cold = performance.now();
fitBlend({ ...table, terms: 2 });
const first = performance.now() - cold;

console.log(
  `${together - filling > 250 ? "FAIL" : "ok  "} prepareBlend: ${BLENDS} blends of ${LIQUIDS} liquids: ${(together - filling).toFixed(0)} ms (limit 250),`,
);
console.log(
  `               ${filling.toFixed(0)} ms more to make the fractions; mean ln eta ${(sum / BLENDS).toFixed(4)}`,
);
console.log(`grunbergNissan ${BLENDS / 100} of the same: ${plain.toFixed(0)} ms`);
console.log(
  `${fitting / fits > 2 ? "FAIL" : "ok  "} fitBlend: 15 readings: ${(fitting / fits).toFixed(3)} ms each, ${first.toFixed(2)} ms for one alone (limit 2)`,
);
