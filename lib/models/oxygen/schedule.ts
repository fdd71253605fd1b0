// Follows a column through a schedule of light, dark and gas, and notes when a conversion is first reached anywhere.
import { checkNumber, InputError, notNegative, positive, show } from "../../door.js";
import { extrapolatedEuler } from "../../numerics/extrapolation.js";
import { um_per_m } from "../scales.js";
import type { ColumnBalance } from "./balance.js";

/** One stretch of a schedule with steady light and gas. */
export interface ExposureStep {
  /** Above 0, s. */
  readonly duration_s: number;
  /** Irradiance over the one `radicalGeneration_molm3s` is stated for, at least 0; 0 is dark. */
  readonly relativeIrradiance: number;
  /** C* of the gas below the window during this step, at least 0, mol/m3; the layer's own unless given. */
  readonly saturation_molm3?: number;
  /** True while the supply is cut: nothing passes the lowest face of the column, film included. */
  readonly supplyCut?: boolean;
}

/** How to follow a schedule. */
export interface ScheduleRun {
  readonly where: string;
  readonly schedule: readonly ExposureStep[];
  readonly saturation_molm3: number;
  /** Moments at which `read` is called, s since the start, rising. */
  readonly times_s: readonly number[];
  readonly read: (time_s: number) => void;
  /** Conversions whose first time is wanted. */
  readonly conversions: readonly number[];
  readonly stepLimit: number;
}

/** What came of it; a first time is undefined for a conversion that no depth reached. */
export interface ScheduleReport {
  readonly firstTimes_s: readonly (number | undefined)[];
  readonly accepted: number;
  readonly rejected: number;
}

/** Refuses a schedule that is empty or holds a step out of range. */
export function checkSchedule(where: string, schedule: readonly ExposureStep[]): void {
  if (!Array.isArray(schedule) || schedule.length === 0) {
    throw new InputError(
      `${where}: schedule is ${Array.isArray(schedule) ? "empty" : show(schedule)}; it must list at least one step, ` +
        "such as { duration_s: 5, relativeIrradiance: 1 }",
    );
  }
  schedule.forEach((step: ExposureStep, i) => {
    const at = (field: string): string => `schedule[${i}].${field}`;
    checkNumber(step.duration_s, { where, field: at("duration_s"), ...positive, max: 1e7 });
    checkNumber(step.relativeIrradiance, { where, field: at("relativeIrradiance"), ...notNegative });
    if (step.supplyCut !== undefined && typeof step.supplyCut !== "boolean")
      throw new InputError(
        `${where}: ${at("supplyCut")} is ${show(step.supplyCut)}; it must be true or false`,
      );
    if (step.saturation_molm3 !== undefined)
      checkNumber(step.saturation_molm3, { where, field: at("saturation_molm3"), ...notNegative });
  });
}

/** The whole time of a schedule, s. */
export const durationOf = (schedule: readonly ExposureStep[]): number =>
  schedule.reduce((sum, { duration_s }) => sum + duration_s, 0);

/**
 * Follows `balance` through the schedule.
 * @throws InputError when the steps run out or become too short, saying when, where in the column, and what to do.
 */
export function followSchedule(balance: ColumnBalance, run: ScheduleRun): ScheduleReport {
  const { schedule, times_s, stepLimit } = run;
  const follow = extrapolatedEuler(balance);
  const firsts = firstTimes(balance, run.conversions);
  let [accepted, rejected, start, asked] = [0, 0, 0, 0];
  schedule.forEach((step, k) => {
    const end = start + step.duration_s;
    balance.setConditions({ saturation_molm3: run.saturation_molm3, supplyCut: false, ...step });
    let now = start;
    let firstStep = 1e-4 * step.duration_s;
    while (now < end) {
      const isAsked = asked < times_s.length && times_s[asked]! <= end;
      const until = isAsked ? times_s[asked]! : end;
      const from = now;
      if (until > from) {
        const report = follow({
          duration: until - from,
          firstStep,
          stepLimit: stepLimit - accepted - rejected,
          afterStep: (time) => firsts.after(from + time),
        });
        accepted += report.accepted;
        rejected += report.rejected;
        if (report.outcome !== "reached")
          refuse(balance, run, { ...report, time: from + report.time, step: k });
        firstStep = report.nextStep;
      }
      now = until;
      if (isAsked) run.read(times_s[asked++]!);
    }
    start = end;
  });
  while (asked < times_s.length) run.read(times_s[asked++]!);
  return { firstTimes_s: firsts.found, accepted, rejected };
}

/** Watches the greatest Q of the column, taken to grow evenly within a step. */
function firstTimes(balance: ColumnBalance, conversions: readonly number[]) {
  const found = conversions.map((): number | undefined => undefined);
  const wanted = conversions.map((X) => -Math.log1p(-X));
  let [before, timeBefore] = [greatest(balance.growth), 0];
  return {
    found,
    after(time: number): void {
      const Q = greatest(balance.growth);
      wanted.forEach((level, k) => {
        if (found[k] !== undefined || Q < level) return;
        const part = before >= level ? 0 : (level - before) / (Q - before);
        found[k] = timeBefore + part * (time - timeBefore);
      });
      [before, timeBefore] = [Q, time];
    },
  };
}

function greatest(values: Float64Array): number {
  let most = 0;
  for (let i = 0; i < values.length; i++) if (values[i]! > most) most = values[i]!;
  return most;
}

function refuse(
  balance: ColumnBalance,
  { where, schedule, stepLimit }: ScheduleRun,
  { outcome, time, step }: { outcome: string; time: number; step: number },
): never {
  const reached = `${Number(time.toPrecision(4))} s of ${Number(durationOf(schedule).toPrecision(4))} s (schedule[${step}])`;
  const front = `radicals change most at ${Number(steepest(balance).toPrecision(3))} um`;
  throw new InputError(
    outcome === "too-many-steps"
      ? `${where}: stopped at ${reached} after ${stepLimit} steps, ${front}; raise stepLimit or tolerance, or use fewer cells`
      : `${where}: no step is short enough at ${reached}, ${front}; raise tolerance, or check that the rates are in mol, m3 and s`,
  );
}

/** Depth in um at which radicals change most from cell to cell. */
function steepest(balance: ColumnBalance): number {
  const { depths_m } = balance.column;
  const R = new Float64Array(depths_m.length);
  balance.radicalsOf(R);
  let at = 1;
  for (let i = 2; i < R.length; i++) {
    if (Math.abs(R[i]! - R[i - 1]!) > Math.abs(R[at]! - R[at - 1]!)) at = i;
  }
  return um_per_m * depths_m[at]!;
}
