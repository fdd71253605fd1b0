// Runs one layer, or layers in a row, on a given grid: what a layer starts from, and what it hands on to the next.
import { m_per_um } from "../scales.js";
import { contentOf, type ColumnBalance } from "./balance.js";
import { layerDefaults, type LayerConditions } from "./layerInput.js";
import { readLayer, type DeadZoneLevels, type LayerReading } from "./layerReading.js";
import { durationOf, followSchedule, type ExposureStep } from "./schedule.js";

/** What carries over from layer to layer: the film's oxygen as it stands, and the liquid left at the window, mixed. */
export interface Leftover {
  readonly film: Float64Array;
  /** Uncured thickness at the window, um. */
  readonly liquid_um: number;
  /** Means over the liquid: oxygen, mol/m3, and Q. */
  readonly oxygen: number;
  readonly growth: number;
  /** Mean initiator over that at the start; 1 where it is not followed. */
  readonly initiator: number;
}

/** What a layer of resin is at its start, the same at every depth. */
export interface StartState {
  readonly oxygen: number;
  readonly growth: number;
  readonly initiator: number;
  /** Oxygen in the film's cells, or one number for all of them. */
  readonly film: Float64Array | number;
}

/** What a run needs besides the balance. */
export interface LayerRunInput {
  readonly where: string;
  readonly schedule: readonly ExposureStep[];
  readonly saturation_molm3: number;
  readonly times_s: readonly number[];
  readonly levels: Required<DeadZoneLevels>;
  readonly oxygenScale_molm3: number;
  readonly stepLimit: number;
}

/** One layer as it went. */
export interface LayerRun {
  readonly gapThickness_um: number;
  readonly startOxygen_molm3: number;
  readonly oxygenScale_molm3: number;
  readonly end: LayerReading;
  readonly readings: readonly LayerReading[];
  readonly inductionTime_s: number | undefined;
  readonly gelTime_s: number | undefined;
  /** Oxygen that came in and was used up, and what neither explains, over the gap, mol/m3. */
  readonly oxygenTakenUp_molm3: number;
  readonly oxygenUsed_molm3: number;
  readonly oxygenUnexplained_molm3: number;
  readonly accepted: number;
  readonly rejected: number;
  readonly leftover: Leftover;
}

/** What a run takes from the layer as given. */
export function runInput(where: string, input: LayerConditions): LayerRunInput {
  const { oxygen_molm3: fresh, saturation_molm3, schedule } = input;
  const { times_s, stepLimit, ...given } = { ...layerDefaults, ...input };
  return {
    where,
    schedule,
    saturation_molm3,
    times_s: [...times_s].sort((a, b) => a - b),
    levels: given,
    oxygenScale_molm3: fresh > 0 ? fresh : saturation_molm3 > 0 ? saturation_molm3 : 1,
    stepLimit,
  };
}

/** Fresh resin over a film in equilibrium with the gas, or with as much oxygen as given. */
export const freshStart = (input: LayerConditions): StartState => ({
  oxygen: input.oxygen_molm3,
  growth: 0,
  initiator: 1,
  film: input.filmOxygen_molm3 ?? input.saturation_molm3,
});

/** Sets a new balance to the start and follows it through the schedule. */
export function runLayer(balance: ColumnBalance, from: StartState, input: LayerRunInput): LayerRun {
  begin(balance, from);
  const before = contentOf(balance);
  const readings: LayerReading[] = [];
  const read = (time_s: number): LayerReading =>
    readLayer(balance, time_s, input.levels, input.oxygenScale_molm3);
  const report = followSchedule(balance, {
    ...input,
    conversions: [input.levels.conversionLevel, input.levels.gelConversion],
    read: (time_s) => readings.push(read(time_s)),
  });
  const end = read(durationOf(input.schedule));
  const gap_m = balance.column.faces_m.at(-1)!;
  const [takenUp, used] = [balance.ledger[0]!, balance.ledger[1]!];
  return {
    gapThickness_um: balance.column.gapThickness_um,
    startOxygen_molm3: from.oxygen,
    oxygenScale_molm3: input.oxygenScale_molm3,
    end,
    readings,
    inductionTime_s: report.firstTimes_s[0],
    gelTime_s: report.firstTimes_s[1],
    oxygenTakenUp_molm3: takenUp / gap_m,
    oxygenUsed_molm3: used / gap_m,
    oxygenUnexplained_molm3: (contentOf(balance) - before - takenUp + used) / gap_m,
    accepted: report.accepted,
    rejected: report.rejected,
    leftover: leftoverOf(balance, end),
  };
}

function begin(balance: ColumnBalance, { oxygen, growth, initiator, film }: StartState): void {
  const { filmCells } = balance.column;
  if (typeof film === "number") balance.oxygen.fill(film, 0, filmCells);
  else balance.oxygen.set(film);
  balance.oxygen.fill(oxygen, filmCells);
  balance.growth.fill(growth);
  balance.initiator?.fill(initiator);
}

function leftoverOf({ column, oxygen, growth, initiator }: ColumnBalance, end: LayerReading): Leftover {
  const gap_um = end.depths_um.at(-1)!;
  const liquid_um = end.deadZone.byGel_um ?? gap_um;
  const mean = (values: Float64Array): number => {
    let [sum, all] = [0, 0];
    for (let i = 0; i < values.length; i++) {
      const upper = Math.min(column.faces_m[i + 1]!, m_per_um * liquid_um);
      const share = Math.max(upper - column.faces_m[i]!, 0);
      sum += share * values[i]!;
      all += share;
    }
    return all > 0 ? sum / all : 0;
  };
  return {
    film: oxygen.slice(0, column.filmCells),
    liquid_um,
    oxygen: mean(oxygen.subarray(column.filmCells)),
    growth: mean(growth),
    initiator: initiator === undefined ? 1 : mean(initiator),
  };
}
