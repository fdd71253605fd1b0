// What is reported of an exposed layer, from a fine and a coarse run of it.
import type { LayerReading } from "./layerReading.js";
import type { LayerRun } from "./layerRun.js";

/** An exposed layer. */
export interface LayerExposure {
  /** Whether any of it is gelled at the end. */
  readonly outcome: "gels" | "stays-liquid";
  readonly gapThickness_um: number;
  /** Oxygen in the resin at the start. */
  readonly startOxygen_molm3: number;
  /** When conversion first reaches `conversionLevel`, and the gel conversion, anywhere; undefined if it does not. */
  readonly inductionTime_s: number | undefined;
  readonly gelTime_s: number | undefined;
  /** The column at the end of the schedule, and at `times_s`. */
  readonly end: LayerReading;
  readonly readings: readonly LayerReading[];
  /** Oxygen that came in through the lowest face, and that radicals used up, over the gap. */
  readonly oxygenTakenUp_molm3: number;
  readonly oxygenUsed_molm3: number;
  /** Part of the oxygen handled that the balance does not explain: rounding, if all is well. */
  readonly oxygenImbalance: number;
  /**
   * How far the end moves with half the cells and ten times the tolerance, plus the tolerance: more than the error left, where
   * the grid resolves the fronts.
   */
  readonly errorEstimate: {
    readonly meanConversion: number;
    readonly meanOxygen_molm3: number;
    /** Of `deadZone.byGel_um`; undefined where one of the two runs has none. */
    readonly deadZone_um: number | undefined;
  };
  readonly steps: { readonly accepted: number; readonly rejected: number };
}

/** Puts the report together; the coarse run has half the cells and ten times the tolerance. */
export function exposureOf(fine: LayerRun, coarse: LayerRun, tolerance: number): LayerExposure {
  const { end } = fine;
  const handled =
    fine.startOxygen_molm3 + Math.abs(fine.oxygenTakenUp_molm3) + Math.abs(fine.oxygenUsed_molm3);
  const [gel, coarseGel] = [end.deadZone.byGel_um, coarse.end.deadZone.byGel_um];
  const moved = (field: "meanConversion" | "meanOxygen_molm3"): number =>
    Math.abs(end[field] - coarse.end[field]);
  return {
    outcome: end.deadZone.byGel_um === undefined ? "stays-liquid" : "gels",
    gapThickness_um: fine.gapThickness_um,
    startOxygen_molm3: fine.startOxygen_molm3,
    inductionTime_s: fine.inductionTime_s,
    gelTime_s: fine.gelTime_s,
    end,
    readings: fine.readings,
    oxygenTakenUp_molm3: fine.oxygenTakenUp_molm3,
    oxygenUsed_molm3: fine.oxygenUsed_molm3,
    oxygenImbalance: Math.abs(fine.oxygenUnexplained_molm3) / (handled > 0 ? handled : 1),
    errorEstimate: {
      meanConversion: moved("meanConversion") + tolerance,
      meanOxygen_molm3: moved("meanOxygen_molm3") + tolerance * fine.oxygenScale_molm3,
      deadZone_um: gel === undefined || coarseGel === undefined ? undefined : Math.abs(gel - coarseGel),
    },
    steps: { accepted: fine.accepted, rejected: fine.rejected },
  };
}
