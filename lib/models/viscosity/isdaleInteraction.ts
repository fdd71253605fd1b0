// An estimate of the interaction of two small molecules from the groups they are made of, before anything is measured.
// The table covers hydrocarbons, alcohols, ketones, acids and halides: no ester, no ether, no double bond, so no acrylate.
import { checkNumbers, InputError, nearestName, show } from "../../door.js";
import type { SourceStatus } from "../../result.js";

/** The groups the table covers. */
export type IsdaleGroup = keyof typeof contributions;

/** A molecule as the method counts it. */
export interface IsdaleMolecule {
  /** Carbon atoms in the whole molecule, those of all groups included. */
  readonly carbons: number;
  /** Hydrogen atoms in the whole molecule. */
  readonly hydrogens: number;
  /** How often each group occurs. */
  readonly groups: Readonly<Partial<Record<IsdaleGroup, number>>>;
}

/** An interaction estimated from groups: a first guess until one is measured. */
export interface IsdaleEstimate {
  /** Dimensionless, at 298 K. */
  readonly G: number;
  readonly basis: "mole";
  /** 298 K in degrees Celsius, for {@link isdaleTemperatureLaw}. */
  readonly temperature_C: number;
  readonly status: SourceStatus;
}

/** At 298 K; `undefined` where the contribution depends on the molecule or on its partner. All from memory. */
const contributions = {
  methyl: -0.1,
  methylene: 0.096,
  methine: 0.204,
  quaternaryCarbon: 0.433,
  benzeneRing: 0.766,
  orthoPair: 0.174,
  metaPair: 0,
  paraPair: 0.154,
  cyclohexaneRing: 0.887,
  ketone: 1.046,
  chlorine: 0.653 - 0.161,
  bromine: -0.116,
  hydroxyl: undefined,
  carboxyl: undefined,
} as const;

/**
 * Interaction of two liquids estimated from their groups, at 298 K on the mole basis.
 *
 * - `molecules`: two; `carbons` and `hydrogens` are whole numbers, `groups` how often each group occurs.
 *
 * G = sum(contributions of i) - sum(contributions of j) + W, W = 0.3161 (Ni - Nj)^2 / (Ni + Nj) - 0.1188 (Ni - Nj), N the
 * carbon atoms; W counts between two hydrocarbons only. i is the alcohol, else the acid, else the molecule with more
 * carbon, else with more hydrogen, else with more methyl groups; where none of these decides, G = 0. A hydroxyl
 * counts by its alcohol (methanol, ethanol, higher), a carboxyl by its partner: a ketone, or a liquid without groups that
 * associate.
 *
 * Every contribution is from memory: a first guess, to be replaced by a measured G. It was made for small molecules.
 * @throws InputError on a group the table does not cover, a count that is not a whole number, an acid with a partner the
 * table does not cover, or more than one chlorine.
 * @source J. D. Isdale, Symposium on Transport Properties of Fluids and Fluid Mixtures, NEL, East Kilbride 1979, as quoted
 * by B. E. Poling, J. M. Prausnitz, J. P. O'Connell, The Properties of Gases and Liquids, 5th ed. 2001, chapter 9 (both
 * from memory).
 * @example
 * ```ts
 * import { isdaleInteraction } from "resinwright";
 * const acid = { carbons: 2, hydrogens: 4, groups: { methyl: 1, carboxyl: 1 } };
 * const ketone = { carbons: 3, hydrogens: 6, groups: { methyl: 2, ketone: 1 } };
 * isdaleInteraction({ molecules: [acid, ketone] }).G; // → 0.184
 * ```
 */
export function isdaleInteraction({
  molecules,
}: {
  readonly molecules: readonly [IsdaleMolecule, IsdaleMolecule];
}): IsdaleEstimate {
  molecules.forEach(checkMolecule);
  const estimate = { basis: "mole", temperature_C: 24.85, status: "from memory" } as const;
  const [i, j] = inOrder(molecules);
  if (i === undefined || j === undefined) return { G: 0, ...estimate };
  const W = isHydrocarbon(i) && isHydrocarbon(j) ? sizeTerm(i.carbons, j.carbons) : 0;
  return { G: sumOf(i, j) - sumOf(j, i) + W, ...estimate };
}

const where = "isdaleInteraction";
const count = { min: 0, max: 200 } as const;

const sizeTerm = (Ni: number, Nj: number): number =>
  (0.3161 * (Ni - Nj) ** 2) / (Ni + Nj) - 0.1188 * (Ni - Nj);

const has = ({ groups }: IsdaleMolecule, group: IsdaleGroup): boolean => (groups[group] ?? 0) > 0;

const isHydrocarbon = (molecule: IsdaleMolecule): boolean =>
  !(["hydroxyl", "carboxyl", "ketone", "chlorine", "bromine"] as const).some((group) => has(molecule, group));

/** i before j by the first rule that tells them apart; empty where none does. */
function inOrder([a, b]: readonly [IsdaleMolecule, IsdaleMolecule]): readonly IsdaleMolecule[] {
  const rules: readonly ((molecule: IsdaleMolecule) => number)[] = [
    (molecule) => Number(has(molecule, "hydroxyl")),
    (molecule) => Number(has(molecule, "carboxyl")),
    ({ carbons }) => carbons,
    ({ hydrogens }) => hydrogens,
    ({ groups }) => groups.methyl ?? 0,
  ];
  const rule = rules.find((rank) => rank(a) !== rank(b));
  if (rule === undefined) return [];
  return rule(a) > rule(b) ? [a, b] : [b, a];
}

function sumOf(molecule: IsdaleMolecule, partner: IsdaleMolecule): number {
  const counted = Object.entries(molecule.groups) as [IsdaleGroup, number][];
  return counted
    .filter(([, times]) => times > 0)
    .reduce((sum, [group, times]) => sum + times * contributionOf(group, molecule, partner), 0);
}

function contributionOf(group: IsdaleGroup, { carbons }: IsdaleMolecule, partner: IsdaleMolecule): number {
  if (group === "hydroxyl") return carbons === 1 ? 0.887 : carbons === 2 ? -0.023 : -0.443;
  if (group === "carboxyl") {
    if (has(partner, "ketone")) return carbons === 1 ? 0.167 : 1.13;
    if (!has(partner, "hydroxyl") && !has(partner, "carboxyl")) return -0.411 + 0.06074 * carbons;
    throw new InputError(
      `${where}: an acid with an alcohol or another acid is not in the table; measure five blends and fit G`,
    );
  }
  return contributions[group];
}

function checkMolecule(molecule: IsdaleMolecule, k: number): void {
  const which = `${where}: molecules[${k}]`;
  const { carbons, hydrogens, groups } = molecule;
  checkNumbers(which, { carbons, hydrogens }, { carbons: { ...count, min: 1 }, hydrogens: count });
  const known = Object.keys(contributions);
  for (const [group, times] of Object.entries({ carbons, hydrogens, ...groups })) {
    if (!["carbons", "hydrogens", ...known].includes(group))
      throw new InputError(uncovered(which, group, known));
    if (!Number.isInteger(times) || times < 0) {
      throw new InputError(`${which}: ${group} is ${show(times)}; it must be a whole number, 0 or more`);
    }
  }
  if ((groups.chlorine ?? 0) > 1) {
    throw new InputError(
      `${which}: more than one chlorine is not in the table as it is known here; measure five blends and fit G`,
    );
  }
}

function uncovered(which: string, group: string, known: readonly string[]): string {
  const near = nearestName(group, known);
  const hint =
    near === undefined
      ? "esters, ethers, urethanes and double bonds are not in the table, so no acrylate is; measure five blends and fit G"
      : `did you mean "${near}"?`;
  return `${which}: unknown group ${show(group)}; ${hint}`;
}
