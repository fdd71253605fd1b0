// Follows a stiff balance through time: implicit Euler steps of two, three, ... parts, extrapolated to parts of no length.
// The model supplies one part-step; the length of the steps is chosen here from the error it makes.

/** A balance to be followed. The functions may keep work arrays of their own; nothing is allocated between steps here. */
export interface EulerProblem {
  /** Where the balance stands; advanced in place. */
  readonly state: Float64Array;
  /** Called with a state from which part-steps are about to start. */
  readonly start: (state: Float64Array) => void;
  /** Advances `state` in place by one linearly implicit Euler step; follows `start` or another part-step. */
  readonly partStep: (state: Float64Array, length: number) => void;
  /** Size of the difference of two states, in the unit of `tolerance`. */
  readonly difference: (better: Float64Array, worse: Float64Array) => number;
  /** Difference allowed in one step, above 0. */
  readonly tolerance: number;
}

/** One stretch of time without a jump in the conditions. */
export interface Stretch {
  readonly duration: number;
  /** Length tried first. */
  readonly firstStep: number;
  /** Steps allowed, accepted and rejected together. */
  readonly stepLimit: number;
  /** Called after each accepted step with the time since the start of the stretch. */
  readonly afterStep: (time: number) => void;
}

/** How a stretch went. `time` is where it stopped: the whole duration if it was reached. */
export interface StretchReport {
  readonly outcome: "reached" | "too-many-steps" | "step-too-small";
  readonly time: number;
  readonly accepted: number;
  readonly rejected: number;
  /** Length the next step would have had: the first to try if the conditions go on unchanged. */
  readonly nextStep: number;
}

/**
 * Sets up the integrator of a balance and returns the function that follows it through one stretch of time.
 *
 * A step of length H is done with H/2, H/3, ... in 2, 3, ... part-steps; Aitken-Neville extrapolation of the results to parts of
 * no length raises the order by one with each. The difference of the last two columns is held below `tolerance`. The number of
 * columns follows from the tolerance: 2 down to 1e-4, one more for each power of ten below, 7 at most. Two are best for fronts that
 * pass from cell to cell, where nothing is smooth enough for a high order.
 *
 * What the part-step conserves, the extrapolated step conserves: it is a weighted sum with weights that add up to 1.
 * @source P. Deuflhard, SIAM Review 27 (1985) 505-535, doi 10.1137/1027140; E. Hairer, G. Wanner, Solving Ordinary Differential
 * Equations II, 2nd ed. 1996, section IV.9 (both from memory).
 */
export function extrapolatedEuler(problem: EulerProblem): (stretch: Stretch) => StretchReport {
  const { state, start, partStep, difference, tolerance } = problem;
  const columns = columnsFor(tolerance);
  const rows = Array.from({ length: columns }, () => new Float64Array(state.length));
  const best = rows[columns - 1]!;
  const shrink = 1 / columns;

  function tryStep(length: number): number {
    for (let j = 0; j < columns; j++) {
      const row = rows[j]!;
      row.set(state);
      start(row);
      for (let part = 0; part < j + 2; part++) partStep(row, length / (j + 2));
    }
    for (let k = 1; k < columns - 1; k++) raiseOrder(rows, k);
    const weight = neville(columns - 1, columns - 1);
    const before = rows[columns - 2]!;
    const error = weight * difference(best, before);
    raiseOrder(rows, columns - 1);
    return error;
  }

  return ({ duration, firstStep, stepLimit, afterStep }) => {
    let [time, accepted, rejected] = [0, 0, 0];
    let length = Math.min(firstStep, duration);
    let growth = maxGrowth;
    const report = (outcome: StretchReport["outcome"]): StretchReport => ({
      outcome,
      time,
      accepted,
      rejected,
      nextStep: length,
    });
    while (time < duration) {
      if (accepted + rejected >= stepLimit) return report("too-many-steps");
      const left = duration - time;
      const last = length >= left * (1 - 1e-12);
      // A last step that would leave a crumb is halved instead.
      const taken = last ? left : Math.min(length, Math.max(left / 2, length / 2));
      const error = tryStep(taken);
      const factor = 0.8 * Math.pow(tolerance / Math.max(error, 1e-300), shrink);
      if (!(error <= tolerance)) {
        rejected++;
        growth = 1;
        length = taken * (factor > 0.1 ? Math.min(factor, 0.9) : 0.1);
        if (length < 1e-14 * duration) return report("step-too-small");
        continue;
      }
      accepted++;
      time = last ? duration : time + taken;
      state.set(best);
      afterStep(time);
      length = Math.max(taken * Math.min(Math.max(factor, 0.2), growth), last ? length : 0);
      growth = maxGrowth;
    }
    return report("reached");
  };
}

/** How much longer than the last a step may be; not at all after one that was rejected. */
const maxGrowth = 4;

const columnsFor = (tolerance: number): number =>
  Math.min(Math.max(Math.round(-Math.log10(tolerance)) - 2, 2), 7);

/** Weight of the difference that lifts row j from column k - 1 to column k: 1 / (n_j / n_(j-k) - 1), n_j = j + 2. */
const neville = (j: number, k: number): number => (j - k + 2) / k;

function raiseOrder(rows: readonly Float64Array[], k: number): void {
  for (let j = rows.length - 1; j >= k; j--) {
    const row = rows[j]!;
    const before = rows[j - 1]!;
    const weight = neville(j, k);
    for (let i = 0; i < row.length; i++) row[i]! += weight * (row[i]! - before[i]!);
  }
}
