// Layers on layers: each exposure also reaches the layers already there, and the resin left liquid behind an overhang.
// From the window upwards: a new layer of thickness L lies at the window, the older ones behind it.
import {
  checkNumber,
  checkNumbers,
  checkWhole,
  fraction,
  InputError,
  notNegative,
  positive,
  show,
} from "../../door.js";
import { conversionAfterExposure } from "./conversion.js";
import { cureDepth, type WorkingCurve } from "./workingCurve.js";

/** A layer printed over and over at the same exposure. */
export interface RepeatedLayer {
  /** D0: at the window, for each layer, above 0, mJ/cm2. */
  readonly layerExposure_mJcm2: number;
  /** L: above 0, um. */
  readonly layerThickness_um: number;
  /** How many layers are printed, the first counted, whole, 1 or more; without it, the limit of very many. */
  readonly layers?: number;
}

/**
 * Exposure that a layer has collected once it and the layers after it are printed, at its two sides, mJ/cm2.
 *
 * - `layerExposure_mJcm2` D0, `layerThickness_um` L, `layers` N (the layer itself and N - 1 after it; without it, very many).
 * - `opticalDepth_um`: 1 over the absorption, above 0, um; not the slope of a working curve.
 *
 * With zeta = L / depth: window side D0 (1 - e^(-N zeta)) / (1 - e^-zeta), far side e^-zeta times that.
 *
 * Assumes that cured resin absorbs as liquid does, and no bleaching.
 * @throws InputError when an argument is out of range or `layers` is not whole.
 * @source Beer-Lambert law and a geometric series, derived for this library.
 * @example
 * ```ts
 * import { stackedExposure } from "resinwright";
 * const layer = { layerExposure_mJcm2: 10, layerThickness_um: 50, opticalDepth_um: 100 };
 * stackedExposure(layer).windowSide_mJcm2; // → 25.415
 * stackedExposure({ ...layer, layers: 2 }).farSide_mJcm2; // → 9.744
 * ```
 */
export function stackedExposure(input: RepeatedLayer & { readonly opticalDepth_um: number }): {
  readonly windowSide_mJcm2: number;
  readonly farSide_mJcm2: number;
} {
  const where = "stackedExposure";
  checkLayers(where, input);
  checkNumbers(where, input, { opticalDepth_um: positive });
  const zeta = input.layerThickness_um / input.opticalDepth_um;
  const windowSide_mJcm2 = checkNumber(input.layerExposure_mJcm2 * sumOfLayers(zeta, input.layers), {
    where,
    field: "the exposure in mJ/cm2",
  });
  return { windowSide_mJcm2, farSide_mJcm2: windowSide_mJcm2 * Math.exp(-zeta) };
}

/**
 * Cure depth of a layer over its thickness: above 1 the layer reaches into the one before it.
 *
 * - `layerExposure_mJcm2`, `layerThickness_um`, `penetrationDepth_um`, `criticalExposure_mJcm2`: each above 0.
 *
 * ratio = Dp ln(D0 / Ec) / L; 0 where nothing cures. 1.2 to 2 is usual in bottom-up printing (from memory).
 * @throws InputError when an argument is out of range.
 * @source P. F. Jacobs, Rapid Prototyping and Manufacturing, SME 1992, chapter 4 (from memory).
 * @example
 * ```ts
 * import { overcureRatio } from "resinwright";
 * overcureRatio({
 *   layerExposure_mJcm2: 12,
 *   layerThickness_um: 50,
 *   penetrationDepth_um: 100,
 *   criticalExposure_mJcm2: 5,
 * }); // → 1.751
 * ```
 */
export function overcureRatio(input: Omit<RepeatedLayer, "layers"> & WorkingCurve): number {
  checkLayers("overcureRatio", input);
  return cureDepth({ ...input, exposure_mJcm2: input.layerExposure_mJcm2 }) / input.layerThickness_um;
}

/** How far the light of layers over a void cures into it. */
export interface PrintThrough {
  /** Cured into the void once all layers are printed, at least 0, um. */
  readonly printThrough_um: number;
  /** Of that, what the layers after the first add: the roof drifts by this much while they are printed, um. */
  readonly drift_um: number;
}

/**
 * How far the layers over a void cure into the liquid behind them: the error of a roof or a down-facing hole.
 *
 * - `layerExposure_mJcm2` D0, `layerThickness_um` L, `layers` N over the void (without it, very many).
 * - `penetrationDepth_um` Dp, `criticalExposure_mJcm2` Ec: of the working curve, above 0.
 *
 * (Cd - L) + Dp ln((1 - e^(-N zeta)) / (1 - e^-zeta)), Cd = Dp ln(D0 / Ec), zeta = L / Dp; 0 where that is below 0. The drift is
 * what is more than after the first layer.
 *
 * Assumes that exposures add up in the liquid (no fresh oxygen, no flow between layers), so it is an upper bound; cured resin
 * absorbs as liquid does.
 * @throws InputError when an argument is out of range or `layers` is not whole.
 * @source Beer-Lambert law and a geometric series, derived for this library.
 * @example
 * ```ts
 * import { printThrough } from "resinwright";
 * const roof = {
 *   layerExposure_mJcm2: 12,
 *   layerThickness_um: 50,
 *   penetrationDepth_um: 100,
 *   criticalExposure_mJcm2: 5,
 * };
 * printThrough({ ...roof, layers: 1 }).printThrough_um; // → 37.55
 * printThrough(roof).drift_um; // → 93.28
 * ```
 */
export function printThrough(input: RepeatedLayer & WorkingCurve): PrintThrough {
  const where = "printThrough";
  checkLayers(where, input);
  checkNumbers(where, input, { penetrationDepth_um: positive, criticalExposure_mJcm2: positive });
  const { layerExposure_mJcm2: D0, layerThickness_um: L } = input;
  const { penetrationDepth_um: Dp, criticalExposure_mJcm2: Ec } = input;
  const first = Dp * (Math.log(D0) - Math.log(Ec)) - L;
  const all = first + Dp * Math.log(sumOfLayers(L / Dp, input.layers));
  checkNumber(all, { where, field: "the print-through in um" });
  return { printThrough_um: Math.max(all, 0), drift_um: Math.max(all, 0) - Math.max(first, 0) };
}

/**
 * What is left open of a channel once its roof is printed, or the finding that it closes.
 *
 * - `channelHeight_um`: as drawn, above 0, um; the other fields as for `printThrough`, `layers` those of the roof.
 *
 * open height = drawn height - print-through of the roof. The smallest channel that stays open is as high as the print-through.
 *
 * Assumes what `printThrough` does, and liquid that drains out; resin near the gel point clogs sooner.
 * @throws InputError when an argument is out of range or `layers` is not whole.
 * @source As `printThrough`; see `channelHeightRule` for what was found in practice.
 * @example
 * ```ts
 * import { openChannel } from "resinwright";
 * const channel = openChannel({
 *   channelHeight_um: 200,
 *   layerExposure_mJcm2: 12,
 *   layerThickness_um: 50,
 *   penetrationDepth_um: 100,
 *   criticalExposure_mJcm2: 5,
 * });
 * channel.outcome === "open" && channel.openHeight_um; // → 69.2
 * ```
 */
export function openChannel(
  input: RepeatedLayer & WorkingCurve & { readonly channelHeight_um: number },
):
  | { readonly outcome: "open"; readonly openHeight_um: number }
  | { readonly outcome: "closed"; readonly smallestHeight_um: number } {
  checkNumbers("openChannel", input, { channelHeight_um: positive });
  const { printThrough_um } = printThrough(input);
  const openHeight_um = input.channelHeight_um - printThrough_um;
  return openHeight_um > 0
    ? { outcome: "open", openHeight_um }
    : { outcome: "closed", smallestHeight_um: printThrough_um };
}

/**
 * Height below which channels were found to clog in practice, as a range in um.
 *
 * - `opticalDepth_um`: 1 over the absorption of the resin, above 0, um.
 *
 * 3.5 to 5.5 optical depths; layers were 0.3 to 1.0 optical depths thick.
 *
 * Assumes a resin and exposure much like those of the study: a diacrylate with a bisacylphosphine oxide and a dye. `openChannel`
 * takes your exposure into account.
 * @throws InputError when the depth is not above 0.
 * @source H. Gong, M. Beauchamp, S. Perry, A. T. Woolley, G. P. Nordin, RSC Adv. 5 (2015) 106621, doi 10.1039/C5RA23855B
 * (abstract).
 * @example
 * ```ts
 * import { channelHeightRule } from "resinwright";
 * channelHeightRule({ opticalDepth_um: 20 }).high_um; // → 110
 * ```
 */
export function channelHeightRule(input: { readonly opticalDepth_um: number }): {
  readonly low_um: number;
  readonly high_um: number;
} {
  checkNumbers("channelHeightRule", input, { opticalDepth_um: positive });
  const [low_um, high_um] = [3.5 * input.opticalDepth_um, 5.5 * input.opticalDepth_um];
  checkNumber(high_um, { where: "channelHeightRule", field: "the height in um" });
  return { low_um, high_um };
}

/** One side of the plane where a layer meets the one before it. */
export interface InterfaceSide {
  readonly exposure_mJcm2: number;
  readonly conversion: number;
  readonly gelled: boolean;
}

/**
 * Conversion on both sides of the plane where a new layer meets the one before it, when the new layer is peeled off the window.
 *
 * - `layerExposure_mJcm2` D0, `layerThickness_um` L; `opticalDepth_um`: 1 over the absorption, above 0, um.
 * - `criticalExposure_mJcm2`: above 0; `gelConversion`: above 0, below 1; `inductionExposure_mJcm2`: as for
 *   `conversionAfterExposure`, 0 unless given.
 *
 * New side: D0 e^-zeta, zeta = L / depth; old side: D0 (1 + e^-zeta), for it was the window side of the layer before. Conversion
 * from exposure as `conversionAfterExposure`. The new side is the weaker: it sets the green strength of the bond.
 *
 * Assumes what `conversionAfterExposure` does.
 * @throws InputError when an argument is out of range.
 * @source Beer-Lambert law, derived for this library; conversion as `conversionAfterExposure`.
 * @example
 * ```ts
 * import { interfaceConversion } from "resinwright";
 * const bond = interfaceConversion({
 *   layerExposure_mJcm2: 12,
 *   layerThickness_um: 50,
 *   opticalDepth_um: 100,
 *   criticalExposure_mJcm2: 5,
 *   gelConversion: 0.1,
 * });
 * bond.newSide.conversion; // → 0.1422
 * bond.oldSide.conversion; // → 0.3338
 * ```
 */
export function interfaceConversion(
  input: Omit<RepeatedLayer, "layers"> & {
    readonly opticalDepth_um: number;
    readonly criticalExposure_mJcm2: number;
    readonly gelConversion: number;
    readonly inductionExposure_mJcm2?: number;
  },
): { readonly newSide: InterfaceSide; readonly oldSide: InterfaceSide } {
  const where = "interfaceConversion";
  checkLayers(where, input);
  checkNumbers(where, input, {
    opticalDepth_um: positive,
    criticalExposure_mJcm2: positive,
    gelConversion: { ...fraction, above: true },
  });
  const { layerExposure_mJcm2: D0, layerThickness_um, opticalDepth_um, criticalExposure_mJcm2 } = input;
  const left = Math.exp(-layerThickness_um / opticalDepth_um);
  const side = (exposure_mJcm2: number): InterfaceSide => ({
    exposure_mJcm2: checkNumber(exposure_mJcm2, { where, field: "exposure_mJcm2", ...notNegative }),
    conversion: conversionAfterExposure({ ...input, exposure_mJcm2 }),
    gelled: exposure_mJcm2 >= criticalExposure_mJcm2,
  });
  return { newSide: side(D0 * left), oldSide: side(D0 * (1 + left)) };
}

/** A place in a printed stack, counted from the window. */
export interface StackPoint {
  /** 1 is the newest layer, at the window. */
  readonly layer: number;
  readonly depth_um: number;
  /** Collected so far. */
  readonly exposure_mJcm2: number;
  readonly conversion: number;
}

/**
 * Exposure and conversion through a stack of layers just after the last exposure, from the window on.
 *
 * - the fields of `interfaceConversion`, and `layers`: of the stack, whole, 1 to 10000.
 * - `pointsPerLayer`: whole, 2 to 1000, both sides of each layer included.
 *
 * In layer n at x from its window side: D0 sum of e^(-(x + k L) / depth) for k from 0 to n - 1. At the plane between two layers
 * the exposure jumps by D0, because the newer one was not there yet: both sides are given.
 *
 * Assumes what `stackedExposure` and `conversionAfterExposure` do.
 * @throws InputError when an argument is out of range or a count is not whole.
 * @source Beer-Lambert law and a geometric series, derived for this library; conversion as `conversionAfterExposure`.
 * @example
 * ```ts
 * import { stackProfile } from "resinwright";
 * const profile = stackProfile({
 *   layerExposure_mJcm2: 12,
 *   layerThickness_um: 50,
 *   opticalDepth_um: 100,
 *   criticalExposure_mJcm2: 5,
 *   gelConversion: 0.1,
 *   layers: 3,
 *   pointsPerLayer: 2,
 * });
 * profile.map(({ depth_um }) => depth_um).join(); // → "0,50,50,100,100,150"
 * profile[5]?.conversion; // → 0.2613
 * ```
 */
export function stackProfile(
  input: RepeatedLayer & {
    readonly layers: number;
    readonly opticalDepth_um: number;
    readonly criticalExposure_mJcm2: number;
    readonly gelConversion: number;
    readonly inductionExposure_mJcm2?: number;
    readonly pointsPerLayer: number;
  },
): StackPoint[] {
  const where = "stackProfile";
  checkLayers(where, input);
  checkNumbers(where, input, { layers: { min: 1, max: 10_000 } });
  checkWhole(input.pointsPerLayer, { where, field: "pointsPerLayer", min: 2, max: 1000 });
  const { layers, pointsPerLayer, layerThickness_um: L, opticalDepth_um } = input;
  return Array.from({ length: layers * pointsPerLayer }, (_, i) => {
    const layer = Math.floor(i / pointsPerLayer) + 1;
    const x = ((i % pointsPerLayer) * L) / (pointsPerLayer - 1);
    const { windowSide_mJcm2 } = stackedExposure({ ...input, layers: layer });
    const exposure_mJcm2 = windowSide_mJcm2 * Math.exp(-x / opticalDepth_um);
    const conversion = conversionAfterExposure({ ...input, exposure_mJcm2 });
    return { layer, depth_um: (layer - 1) * L + x, exposure_mJcm2, conversion };
  });
}

function checkLayers(where: string, input: RepeatedLayer): void {
  checkNumbers(where, input, { layerExposure_mJcm2: positive, layerThickness_um: positive });
  const { layers } = input;
  if (layers === undefined) return;
  checkNumber(layers, { where, field: "layers", min: 1 });
  if (!Number.isInteger(layers))
    throw new InputError(
      `${where}: layers is ${show(layers)}; it must be a whole number, or left out for very many`,
    );
}

/** sum of e^(-k zeta) for k from 0 to N - 1; written with expm1 so that thin layers keep their digits. */
const sumOfLayers = (zeta: number, layers: number | undefined): number =>
  (layers === undefined ? 1 : -Math.expm1(-layers * zeta)) / -Math.expm1(-zeta);
