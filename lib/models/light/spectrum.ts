// A light engine is not one wavelength: means over its spectrum, and values between the nodes of a measured one.
import { checkNumber, InputError, notNegative } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";

/**
 * Mean of a quantity over the spectrum of a light source, in the unit of the quantity.
 *
 * - `wavelengths_nm`: 2 or more nodes in rising order, nm.
 * - `spectrum`: of the source at the nodes, at least 0, not all 0, in any unit.
 * - `values`: of the quantity at the same nodes (absorption, transmission, yield).
 *
 * mean = integral(S v) / integral(S), both by the trapezoid rule on the nodes.
 *
 * The mean of the absorption holds at the window only: deeper down the spectrum is filtered and the mean falls. For a
 * depth, take the mean of exp(-alpha z).
 * @throws InputError when the nodes do not rise, the lists differ in length, the spectrum is negative or all zero.
 * @source Definition; trapezoid rule. That a broad source bends the working curve: abstract of B. W. Caplins et al.,
 * "Influence of spectral bandwidth on the working curve in vat photopolymerization".
 * @example
 * ```ts
 * import { spectrumMean } from "resinwright";
 * spectrumMean({ wavelengths_nm: [400, 405, 410], spectrum: [0, 1, 0], values: [9, 5, 2] }); // → 5
 * ```
 */
export function spectrumMean(input: {
  readonly wavelengths_nm: NumberList;
  readonly spectrum: NumberList;
  readonly values: NumberList;
}): number {
  const { wavelengths_nm, spectrum: S, values: v } = input;
  checkNodes("spectrumMean", "wavelengths_nm", wavelengths_nm, 2);
  checkList("spectrumMean", "spectrum", S, notNegative);
  checkList("spectrumMean", "values", v);
  checkSameLength("spectrumMean", { wavelengths_nm, spectrum: S, values: v });
  const area = trapezoid(wavelengths_nm, (k) => S[k]!);
  if (area === 0) {
    throw new InputError(
      "spectrumMean: spectrum is 0 at every node; a source must emit somewhere on the nodes",
    );
  }
  return checkNumber(trapezoid(wavelengths_nm, (k) => S[k]! * v[k]!) / area, {
    where: "spectrumMean",
    field: "the mean",
    advice: "scale the spectrum to values near 1",
  });
}

/**
 * Value of a tabulated spectrum at a wavelength, by a straight line between the nodes around it.
 *
 * - `nodes_nm`: in rising order, nm.
 * - `values`: one per node.
 * - `wavelength_nm`: from the first node to the last; nothing is guessed beyond them.
 * - `where`: names the table in an error, for example `spectrum "sudan-1 in ethanol"`.
 * @throws InputError when the wavelength is not covered (the message gives the range that is), the nodes do not rise
 * or the lists differ in length.
 * @source Linear interpolation.
 * @example
 * ```ts
 * import { interpolateSpectrum } from "resinwright";
 * interpolateSpectrum({ nodes_nm: [400, 410], values: [8, 6], wavelength_nm: 405, where: "example" }); // → 7
 * ```
 */
export function interpolateSpectrum(input: {
  readonly nodes_nm: NumberList;
  readonly values: NumberList;
  readonly wavelength_nm: number;
  readonly where: string;
}): number {
  const { nodes_nm: nodes, values, wavelength_nm, where } = input;
  checkNodes(where, "nodes_nm", nodes, 1);
  checkList(where, "values", values);
  checkSameLength(where, { nodes_nm: nodes, values });
  const last = nodes.length - 1;
  checkNumber(wavelength_nm, {
    where,
    field: "wavelength_nm",
    min: nodes[0]!,
    max: nodes[last]!,
    advice: "the spectrum is not known beyond that, and nothing is guessed",
  });
  let above = 0;
  while (nodes[above]! < wavelength_nm) above++;
  if (nodes[above] === wavelength_nm) return values[above]!;
  const share = (wavelength_nm - nodes[above - 1]!) / (nodes[above]! - nodes[above - 1]!);
  return (1 - share) * values[above - 1]! + share * values[above]!;
}

/** Refuses nodes that do not rise. @internal */
export function checkNodes(where: string, field: string, nodes: NumberList, atLeast: number): void {
  checkList(where, field, nodes, { atLeast });
  for (let k = 1; k < nodes.length; k++) {
    if (nodes[k]! <= nodes[k - 1]!) {
      throw new InputError(
        `${where}: ${field}[${k}] is ${nodes[k]}, after ${nodes[k - 1]}; the wavelengths must rise, without repeats`,
      );
    }
  }
}

function trapezoid(x: NumberList, y: (k: number) => number): number {
  let area = 0;
  for (let k = 1; k < x.length; k++) area += ((x[k]! - x[k - 1]!) * (y(k) + y(k - 1))) / 2;
  return area;
}
