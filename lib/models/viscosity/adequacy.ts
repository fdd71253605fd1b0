// Is the model good enough for these readings? The verdict in words, and what it rests on.
import { extraScatter, type Scatter } from "../../numerics/extraScatter.js";
import { runsTest, type RunsTest } from "../../numerics/runs.js";
import { percent } from "../percent.js";

/** What the residuals say about the model. */
export type AdequacyVerdict =
  | "adequate"
  | "systematic misfit: add a term"
  | "systematic misfit: fit a narrower range"
  | "too few readings to tell";

/** The scatter about the fit against the scatter of repeats. */
export interface LackOfFit {
  /** Variance about the fit beyond that of repeats, over the variance of repeats. */
  readonly ratio: number;
  /** Chance of such a ratio, 0 to 1, if the model were right. */
  readonly probability: number;
  /** Standard deviation of repeats, of ln(viscosity). */
  readonly repeatability: number;
}

/** What further terms would bring. */
export interface TermGain {
  readonly terms: number;
  /** Residual standard deviation with so many terms. */
  readonly residualStandardDeviation: number;
  /** Chance of such a gain, 0 to 1, if the terms were not needed. */
  readonly probability: number;
}

/** The verdict with its grounds. */
export interface Adequacy {
  readonly verdict: AdequacyVerdict;
  readonly reason: string;
  /** Of the residuals in the order of composition, repeats averaged. */
  readonly runs: RunsTest;
  /** Only where blends were measured more than once. */
  readonly lackOfFit?: LackOfFit;
  /** The most telling of the models with more terms, where the readings are enough for one. */
  readonly gain?: TermGain;
}

/** What the verdict is made from. */
export interface AdequacyEvidence {
  /** In the order of composition, one per composition. */
  readonly residuals: readonly number[];
  /** About the fit. */
  readonly scatter: Scatter;
  /** Within repeats; absent without repeats. */
  readonly repeats?: Scatter;
  /** About the fits with more terms than this one, as far as the readings are enough. */
  readonly moreTerms: readonly (Scatter & { readonly terms: number })[];
  /** The residuals are no larger than the stated uncertainty of the readings. */
  readonly withinStatedDoubt: boolean;
  /** The model has all the terms it can have. */
  readonly fullModel: boolean;
}

/** A chance below this counts as a misfit; for further terms, of which two are tried, a smaller one. */
const SIGNIFICANT = 0.05;
const SIGNIFICANT_GAIN = 0.01;
/** A comparison with fewer degrees of freedom below the line hardly ever finds anything. */
const ENOUGH_DEGREES = 3;

/** Weighs the runs of the residuals, the lack of fit beyond repeats and what further terms would bring. @internal */
export function judge(evidence: AdequacyEvidence): Adequacy {
  const grounds = {
    runs: runsTest(evidence.residuals),
    lackOfFit: lackOfFitOf(evidence),
    gain: gainOf(evidence),
  };
  const { runs, lackOfFit, gain } = grounds;
  return { ...verdictOf(evidence, grounds), runs, ...(lackOfFit && { lackOfFit }), ...(gain && { gain }) };
}

interface Grounds {
  readonly runs: RunsTest;
  readonly lackOfFit: LackOfFit | undefined;
  readonly gain: TermGain | undefined;
}

function verdictOf(
  evidence: AdequacyEvidence,
  { runs, lackOfFit, gain }: Grounds,
): Pick<Adequacy, "verdict" | "reason"> {
  const misfit = evidence.fullModel
    ? "systematic misfit: fit a narrower range"
    : "systematic misfit: add a term";
  if (lackOfFit !== undefined && lackOfFit.probability <= SIGNIFICANT) {
    const reason = `the readings lie further from the fit than repeats from each other (chance ${percent(lackOfFit.probability)})`;
    return { verdict: misfit, reason };
  }
  if (evidence.withinStatedDoubt) {
    return {
      verdict: "adequate",
      reason: "the residuals are no larger than the stated uncertainty of the readings",
    };
  }
  if (gain !== undefined && gain.probability <= SIGNIFICANT_GAIN) {
    const s = Math.sqrt(evidence.scatter.sum / evidence.scatter.degrees);
    const times = (s / gain.residualStandardDeviation).toPrecision(2);
    const reason = `with ${gain.terms} terms the scatter is ${times} times smaller (chance ${percent(gain.probability)})`;
    return { verdict: misfit, reason };
  }
  const counted = `${runs.runs} runs of sign in ${runs.positive + runs.negative} residuals`;
  if (runs.probability <= SIGNIFICANT) {
    return { verdict: misfit, reason: `${counted} (chance ${percent(runs.probability)})` };
  }
  if (runs.leastProbability > SIGNIFICANT && lackOfFit === undefined && gain === undefined) {
    return {
      verdict: "too few readings to tell",
      reason: `${counted}: so few that no order of them could show a misfit; measure more blends, or some of them again`,
    };
  }
  return { verdict: "adequate", reason: `${counted} (chance ${percent(runs.probability)})` };
}

function gainOf({ scatter, moreTerms }: AdequacyEvidence): TermGain | undefined {
  const gains = moreTerms
    .filter(({ sum, degrees }) => degrees >= ENOUGH_DEGREES && sum > 0)
    .map(({ terms, ...left }) => {
      const { probability, standardDeviation } = extraScatter(scatter, left);
      return { terms, residualStandardDeviation: standardDeviation, probability };
    });
  return gains.sort((a, b) => a.probability - b.probability)[0];
}

function lackOfFitOf({ scatter, repeats }: AdequacyEvidence): LackOfFit | undefined {
  if (repeats === undefined) return undefined;
  if (repeats.degrees < 1 || repeats.degrees >= scatter.degrees || repeats.sum === 0) return undefined;
  const { ratio, probability, standardDeviation } = extraScatter(scatter, repeats);
  return { ratio, probability, repeatability: standardDeviation };
}
