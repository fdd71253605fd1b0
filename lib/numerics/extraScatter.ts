// Does a model leave more scatter than there has to be? Its sum of squares against a smaller one that is part of it: that of
// repeats, or that of a model with more terms.
import { varianceRatioProbability } from "./varianceRatio.js";

/** A sum of squares with its degrees of freedom. */
export interface Scatter {
  readonly sum: number;
  readonly degrees: number;
}

/** What a scatter has beyond the part of it that has to be there. */
export interface ExtraScatter {
  /** Variance of what lies beyond the part, over the variance of the part. */
  readonly ratio: number;
  /** Chance of such a ratio, 0 to 1, if both were chance alone. */
  readonly probability: number;
  /** Of the part. */
  readonly standardDeviation: number;
}

/**
 * Weighs `whole` against `part`, which has fewer degrees of freedom, at least one, and a sum above 0.
 *
 * F = [(S - S_part) / (n - n_part)] / (S_part / n_part), S the sums of squares and n their degrees of freedom.
 */
export function extraScatter(whole: Scatter, part: Scatter): ExtraScatter {
  const degreesAbove = whole.degrees - part.degrees;
  const variance = part.sum / part.degrees;
  const ratio = Math.max(0, whole.sum - part.sum) / degreesAbove / variance;
  return {
    ratio,
    probability: varianceRatioProbability({ ratio, degreesAbove, degreesBelow: part.degrees }),
    standardDeviation: Math.sqrt(variance),
  };
}
