// What a reader of a blend fit has to look at again: readings far off, ends exchanged, shear rates mixed, liquids not reached.
import type { Warning } from "../../result.js";
import { findRise } from "./andrade.js";
import { compositionKey, groupsOf, sampleKey, type BlendReading } from "./blendReadings.js";
import { unmeasuredPairs, type BlendShape } from "./blendDesign.js";
import { SMALLEST_SWAP, SWAP_GAIN } from "./fitRedlichKister.js";
import { shearThinning } from "./shearThinning.js";

/** What the warnings are made from. */
export interface BlendEvidence {
  readonly readings: readonly BlendReading[];
  readonly fit: {
    readonly shape: BlendShape;
    readonly scores: readonly number[];
    readonly outliers: readonly number[];
    readonly residualStandardDeviation: number;
    readonly readingStandardDeviation: number;
    readonly degreesOfFreedom: number;
  };
  /** The residual standard deviation of the fit with the neat readings counted for the other liquid. */
  readonly swapped: () => number;
}

/** All warnings of a fit, the most pressing first. @internal */
export function blendWarnings(evidence: BlendEvidence): Warning[] {
  return [
    ...outlierWarnings(evidence),
    ...swapWarnings(evidence),
    ...riseWarnings(evidence),
    ...shearWarnings(evidence),
    ...temperatureWarnings(evidence),
    ...reachWarnings(evidence),
    ...degreeWarnings(evidence),
  ];
}

function outlierWarnings({ readings, fit }: BlendEvidence): Warning[] {
  return fit.outliers.map((i) => {
    const { fractions, temperature_C, viscosity_mPas } = readings[i]!;
    const blend = Array.from(fractions, (x) => +x.toFixed(4)).join(" / ");
    return {
      code: "outlier",
      message:
        `reading ${i} (${blend} at ${temperature_C} °C, ${viscosity_mPas} mPas) lies ${Math.abs(fit.scores[i]!).toPrecision(2)} ` +
        "robust standard deviations off the others; measure it again, or leave it out and say so",
    };
  });
}

function swapWarnings({ readings, fit, swapped }: BlendEvidence): Warning[] {
  const neat = readings.some(({ fractions: x }) => x[0] === 0 || x[1] === 0);
  const { residualStandardDeviation: s, readingStandardDeviation } = fit;
  if (fit.shape.liquids !== 2 || !neat || readingStandardDeviation < SMALLEST_SWAP) return [];
  if (swapped() * SWAP_GAIN >= s) return [];
  const message =
    `with the neat readings counted for the other liquid the scatter falls by more than ${SWAP_GAIN} times; ` +
    "check which liquid the fractions count and which neat reading is whose";
  return [{ code: "ends-swapped", message }];
}

function riseWarnings({ readings }: BlendEvidence): Warning[] {
  return groupsOf(readings, compositionKey).flatMap((places) => {
    const rise = findRise(
      places.map((i) => Math.round(readings[i]!.temperature_C)),
      places.map((i) => readings[i]!.viscosity_mPas),
    );
    if (rise === undefined) return [];
    const named = rise.replace(/reading (\d+)/g, (_, k) => `reading ${places[Number(k)]!}`);
    return [{ code: "not-falling", message: `${named}; check both, or leave out the one that is wrong` }];
  });
}

/** Blends read at several shear rates say whether the liquid thins; without any, mixed rates are a doubt. */
function shearWarnings({ readings, fit }: BlendEvidence): Warning[] {
  const rates = readings.flatMap(({ shearRate_pers: rate }) => (rate === undefined ? [] : [rate]));
  const [slowest, fastest] = [Math.min(...rates), Math.max(...rates)];
  if (rates.length === 0 || fastest < 2 * slowest) return [];
  const compared = groupsOf(readings, sampleKey)
    .map((places) =>
      places.map((i) => readings[i]!).filter(({ shearRate_pers }) => shearRate_pers !== undefined),
    )
    .filter((rows) => new Set(rows.map(({ shearRate_pers }) => shearRate_pers)).size > 1);
  if (compared.length === 0) {
    const message =
      `shear rates run from ${slowest} to ${fastest} 1/s and no blend was read at two of them; ` +
      "read one blend at both ends to see whether it thins";
    return [{ code: "mixed-shear-rates", message }];
  }
  const found = compared.flatMap((rows) => {
    const { warnings } = shearThinning({
      shearRates_pers: rows.map(({ shearRate_pers }) => shearRate_pers!),
      viscosities_mPas: rows.map(({ viscosity_mPas }) => viscosity_mPas),
      relativeU: Math.min(Math.max(rows[0]!.relativeU ?? fit.readingStandardDeviation, 1e-3), 0.5),
      printShearRate_pers: rows[0]!.shearRate_pers!,
    });
    return warnings.filter(({ code }) => code !== "other-shear-rate");
  });
  return found.slice(0, 1);
}

function temperatureWarnings({ readings, fit: { shape } }: BlendEvidence): Warning[] {
  const temperatures = readings.map(({ temperature_C }) => temperature_C);
  const [coldest, warmest] = [Math.min(...temperatures), Math.max(...temperatures)];
  if (shape.severalTemperatures || warmest - coldest <= 0.2) return [];
  const message =
    `readings from ${coldest} to ${warmest} °C are taken as one temperature; 1 K changes a resin by 3 to 6 %, ` +
    "so hold it within 0.1 K or measure at temperatures 10 K apart";
  return [{ code: "temperatures-differ", message }];
}

function reachWarnings({ readings, fit: { shape } }: BlendEvidence): Warning[] {
  const warnings: Warning[] = [];
  for (let i = 0; i < shape.liquids; i++) {
    const most = Math.max(...readings.map(({ fractions }) => fractions[i]!));
    if (most >= 0.8) continue;
    warnings.push({
      code: "neat-extrapolated",
      message: `no reading holds more than ${+most.toFixed(4)} of liquid ${i}; its neat viscosity is an extrapolation, good for blends only`,
    });
  }
  for (const [i, j] of unmeasuredPairs(shape)) {
    warnings.push({
      code: "pair-not-measured",
      message: `no reading holds both liquid ${i} and liquid ${j}; the pair counts as ideal`,
    });
  }
  return warnings;
}

function degreeWarnings({ fit: { degreesOfFreedom } }: BlendEvidence): Warning[] {
  if (degreesOfFreedom >= 3) return [];
  const readings = degreesOfFreedom === 1 ? "1 reading" : `${degreesOfFreedom} readings`;
  const message = `${readings} more than coefficients; with fewer than 3 more the intervals are very wide`;
  return [{ code: "few-degrees", message }];
}
