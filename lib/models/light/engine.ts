// A light engine as the models of a broad source see it: nodes, and the share of the light that each node stands for.
// Made once, so that a map of thousands of resins does not weigh the same spectrum again and again.
import { InputError, notNegative } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { checkNodes } from "./spectrum.js";

/** A light engine on stated wavelengths. */
export interface LightEngine {
  /** In rising order, nm. */
  readonly wavelengths_nm: readonly number[];
  /** Share of the light at each node; they add up to 1. */
  readonly shares: readonly number[];
}

/**
 * Prepares the spectrum of a light engine for the functions that follow it into the resin.
 *
 * - `wavelengths_nm`: 2 or more nodes in rising order, nm.
 * - `spectrum`: of the engine at the nodes, at least 0, not all 0, in any unit.
 *
 * share_k = S_k h_k / sum_j S_j h_j, h the weights of the trapezoid rule on the nodes.
 *
 * Give the power per nm and the shares count energy. To count what starts the cure instead, give power x wavelength x
 * absorption of the initiator: the shares are then those of the started radicals at the window.
 * @throws InputError when the nodes do not rise, the lists differ in length, the spectrum is negative or all zero.
 * @source Definition; trapezoid rule.
 * @example
 * ```ts
 * import { lightEngine } from "resinwright";
 * lightEngine({ wavelengths_nm: [400, 405, 410], spectrum: [1, 2, 1] }).shares[1]; // → 0.6667
 * ```
 */
export function lightEngine(input: {
  readonly wavelengths_nm: NumberList;
  readonly spectrum: NumberList;
}): LightEngine {
  const where = "lightEngine";
  const { wavelengths_nm: nodes, spectrum: S } = input;
  checkNodes(where, "wavelengths_nm", nodes, 2);
  checkList(where, "spectrum", S, notNegative);
  checkSameLength(where, { wavelengths_nm: nodes, spectrum: S });
  const last = nodes.length - 1;
  const parts = Array.from(
    S,
    (s, k) => (s * (nodes[Math.min(k + 1, last)]! - nodes[Math.max(k - 1, 0)]!)) / 2,
  );
  const total = parts.reduce((sum, part) => sum + part, 0);
  if (total === 0)
    throw new InputError(`${where}: spectrum is 0 at every node; a source must emit somewhere on the nodes`);
  const shares = parts.map((part) => part / total);
  checkList(where, "shares", shares, { advice: "scale the spectrum to values near 1" });
  return { wavelengths_nm: Array.from(nodes), shares };
}
