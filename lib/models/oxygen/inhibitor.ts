// What an inhibitor that catches peroxyl radicals does to the use of oxygen. Phenols hardly touch chain radicals: they end the
// peroxyls that oxygen makes of them, before these take up more oxygen through the resin or give some back in pairs.
import { checkNumber, checkNumbers, fraction, notNegative, positive } from "../../door.js";

/** An inhibitor in the resin. */
export interface PeroxylInhibitor {
  /** k of peroxyl + inhibitor, at least 0, m3/(mol s). */
  readonly peroxylCapture_m3mols: number;
  /** Radicals that one molecule ends, n, above 0, at most 10; 2 for a simple phenol. */
  readonly radicalsCaught: number;
  /** At least 0, mol/m3. */
  readonly concentration_molm3: number;
}

/**
 * Oxygen molecules used up per radical started, beside inhibitors that catch peroxyl radicals.
 *
 * - `oxygenPerRadical` s0: without inhibitor, above 0; `radicalGeneration_molm3s` Ri: above 0, mol/(m3 s).
 * - `selfTermination_m3mols` kxx with d[X]/dt = -2 kxx [X]^2 of two peroxyls, above 0, m3/(mol s); `oxygenReturned` rho per such
 *   pair, 0 to 1.
 * - `inhibitors`: each with its rate constant k, what it catches n, and its concentration c.
 *
 * With g = sum(n k c) / sqrt(2 kxx Ri) the peroxyls stand at q = 2 / (g + sqrt(g^2 + 4)) of what they would be without inhibitor, and
 *
 * s = 1 + (s0 - 1) q + rho (q - q^2) / 2.
 *
 * Much inhibitor leaves s = 1: each radical takes one oxygen, and that is the end of it. `caughtShare`, 1 - q^2, is the share of the
 * radicals that the inhibitors end.
 *
 * Assumes oxygen enough that every chain radical meets it before anything else, peroxyls that adjust at once, and inhibitor that
 * is not used up: it lasts for n c / Ri and more. Inhibitors that also catch chain radicals, such as phenothiazine, do more.
 * @throws InputError when an argument is out of range.
 * @source Balance of peroxyl radicals, derived for this library. That phenols act as antioxidants, and lengthen the induction by
 * keeping oxygen from being used too fast: abstract of R. G. Caldwell, J. L. Ihrig, J. Am. Chem. Soc. 84 (1962) 2878-2886 (authors,
 * year and pages from memory).
 * @example
 * ```ts
 * import { inhibitedOxygenPerRadical } from "resinwright";
 * const { oxygenPerRadical, caughtShare } = inhibitedOxygenPerRadical({
 *   oxygenPerRadical: 1.3,
 *   radicalGeneration_molm3s: 0.5,
 *   selfTermination_m3mols: 500,
 *   oxygenReturned: 0.5,
 *   inhibitors: [{ peroxylCapture_m3mols: 30, radicalsCaught: 2, concentration_molm3: 0.5 }],
 * });
 * oxygenPerRadical; // → 1.2222
 * caughtShare; // → 0.7155
 * ```
 */
export function inhibitedOxygenPerRadical(input: {
  readonly oxygenPerRadical: number;
  readonly radicalGeneration_molm3s: number;
  readonly selfTermination_m3mols: number;
  readonly oxygenReturned: number;
  readonly inhibitors: readonly PeroxylInhibitor[];
}): { readonly oxygenPerRadical: number; readonly caughtShare: number } {
  const where = "inhibitedOxygenPerRadical";
  const { oxygenPerRadical: s0, radicalGeneration_molm3s: Ri, selfTermination_m3mols: kxx } = input;
  const { oxygenReturned: rho, inhibitors } = input;
  checkNumbers(
    where,
    { oxygenPerRadical: s0, radicalGeneration_molm3s: Ri, selfTermination_m3mols: kxx, oxygenReturned: rho },
    {
      oxygenPerRadical: positive,
      radicalGeneration_molm3s: positive,
      selfTermination_m3mols: positive,
      oxygenReturned: fraction,
    },
  );
  let caught_pers = 0;
  inhibitors.forEach((one, i) => {
    checkNumbers(`${where}: inhibitor ${i + 1}`, one, {
      peroxylCapture_m3mols: notNegative,
      radicalsCaught: { ...positive, max: 10 },
      concentration_molm3: notNegative,
    });
    caught_pers += one.radicalsCaught * one.peroxylCapture_m3mols * one.concentration_molm3;
  });
  const g = caught_pers / Math.sqrt(2 * kxx * Ri);
  const q = 2 / (g + Math.hypot(g, 2));
  return {
    oxygenPerRadical: checkNumber(1 + (s0 - 1) * q + (rho * (q - q * q)) / 2, {
      where,
      field: "the oxygen per radical",
    }),
    caughtShare: 1 - q * q,
  };
}
