// A spectrum as a spectrophotometer or a colleague exports it: two columns, the header saying which quantity to which base.

import { InputError } from "../door.js";
import { readNumberTable, separatorOf } from "./table.js";

/** A spectrum read from a file: absorbance and molar absorption are decadic, whatever the file held. */
export interface MeasuredSpectrum {
  readonly title: string;
  /** `absorbance`: decadic, of the whole path. `molarAbsorption_Lmolcm`: decadic. `relativePower`: power per nm, any scale. */
  readonly quantity: "absorbance" | "molarAbsorption_Lmolcm" | "relativePower";
  /** In rising order. */
  readonly wavelengths_nm: readonly number[];
  readonly values: readonly number[];
}

/** What the second column may hold, by the name it must have. */
export type SpectrumColumn =
  | "decadicAbsorbance"
  | "napierianAbsorbance"
  | "transmittedFraction"
  | "decadicMolarAbsorption_Lmolcm"
  | "napierianMolarAbsorption_Lmolcm"
  | "relativePower";

/**
 * Reads a spectrum from a CSV text with the columns `wavelength_nm` and one that states quantity and base.
 *
 * - `text`: with a header line; lines that begin with `#` are comments. Rising or falling wavelengths, none twice.
 * - `where`: names the file in errors. Columns are separated by tabs, semicolons or commas, as for {@link readNumberTable}.
 *
 * Columns: `decadicAbsorbance`, `napierianAbsorbance`, `transmittedFraction` (0 to 1), `decadicMolarAbsorption_Lmolcm`,
 * `napierianMolarAbsorption_Lmolcm`, `relativePower`. Napierian values are divided by ln 10, T becomes -log10 T.
 * @throws InputError with the row of what cannot be read; when no column states quantity and base; when the wavelengths do
 * not run one way; when a transmitted fraction is not above 0, or a molar absorption or power is negative.
 * @source Conversions: IUPAC Gold Book, entries B00626 and A00037.
 * @example
 * ```ts
 * import { readSpectrumTable } from "resinwright";
 * const text = "wavelength_nm,transmittedFraction\n410,0.1\n400,0.01\n";
 * const spectrum = readSpectrumTable({ text, where: "film.csv" });
 * spectrum.quantity; // → "absorbance"
 * spectrum.values[0]; // → 2
 * ```
 */
export function readSpectrumTable({ text, where }: { text: string; where: string }): MeasuredSpectrum {
  const column = columnOf(text, where);
  const { quantity, decadic } = columns[column];
  const table = readNumberTable({ text, where, columns: ["wavelength_nm", column] });
  return risingSpectrum(where, {
    title: where,
    quantity,
    wavelengths_nm: table.wavelength_nm,
    values: table[column].map((value, i) =>
      decadic(value, `${where}: ${column} at ${table.wavelength_nm[i]} nm`),
    ),
  });
}

/** -log10 T, refused where it has no value. @internal */
export function absorbanceOf(transmitted: number, place: string): number {
  if (transmitted > 0) return -Math.log10(transmitted);
  throw new InputError(
    `${place} is ${transmitted}; it must be above 0, for nothing can be said about light that is not there; leave it out or measure a thinner film`,
  );
}

/** The spectrum with its wavelengths in rising order. @internal */
export function risingSpectrum(where: string, spectrum: MeasuredSpectrum): MeasuredSpectrum {
  const { wavelengths_nm: nodes, values } = spectrum;
  if (nodes.length < 2) throw new InputError(`${where}: ${nodes.length} points; a spectrum has at least 2`);
  const falls = nodes[1]! < nodes[0]!;
  const stray = nodes.findIndex(
    (node, i) => i > 0 && (falls ? node >= nodes[i - 1]! : node <= nodes[i - 1]!),
  );
  if (stray > 0) {
    throw new InputError(
      `${where}: ${nodes[stray]} nm follows ${nodes[stray - 1]} nm; the wavelengths must all rise or all fall, without repeats`,
    );
  }
  return falls
    ? { ...spectrum, wavelengths_nm: [...nodes].reverse(), values: [...values].reverse() }
    : spectrum;
}

interface ColumnMeaning {
  readonly quantity: MeasuredSpectrum["quantity"];
  /** The value as the library keeps it; `place` begins the message of a refusal. */
  readonly decadic: (value: number, place: string) => number;
}

const columns: Readonly<Record<SpectrumColumn, ColumnMeaning>> = {
  decadicAbsorbance: { quantity: "absorbance", decadic: (A) => A },
  napierianAbsorbance: { quantity: "absorbance", decadic: (A) => A / Math.LN10 },
  transmittedFraction: { quantity: "absorbance", decadic: absorbanceOf },
  decadicMolarAbsorption_Lmolcm: { quantity: "molarAbsorption_Lmolcm", decadic: notNegative },
  napierianMolarAbsorption_Lmolcm: {
    quantity: "molarAbsorption_Lmolcm",
    decadic: (value, place) => notNegative(value, place) / Math.LN10,
  },
  relativePower: { quantity: "relativePower", decadic: notNegative },
};

function columnOf(text: string, where: string): SpectrumColumn {
  const lines = text.replace(/^\uFEFF/, "").split(/\r?\n/);
  const header = lines.find((line) => line.trim() !== "" && !line.startsWith("#")) ?? "";
  const names = header.split(separatorOf(header)).map((name) => name.trim());
  const found = names.filter((name) => name in columns);
  if (found.length === 1) return found[0] as SpectrumColumn;
  throw new InputError(
    `${where}, row ${lines.indexOf(header) + 1}: the header is ${JSON.stringify(header)}; it must name wavelength_nm and one ` +
      `column that states quantity and base: ${Object.keys(columns).join(", ")}`,
  );
}

function notNegative(value: number, place: string): number {
  if (value >= 0) return value;
  throw new InputError(`${place} is ${value}; it must be at least 0; take the baseline off or cut the range`);
}
