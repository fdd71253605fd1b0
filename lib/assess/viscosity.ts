// Viscosity of a formulation at print temperature: each liquid by its own temperature law, then the Grunberg–Nissan rule.

import { InputError } from "../door.js";
import {
  andradeFromReference,
  andradeViscosity,
  grunbergNissan,
  kriegerDougherty,
  type MixingBasis,
} from "../models/viscosity.js";
import { composition, isLiquid, type Component, type FigureReader } from "../recipe/formulation.js";
import type { Ingredient } from "../recipe/ingredient.js";
import { interactionsOn } from "../recipe/shelf.js";
import type { Warning } from "../result.js";
import { interactionAt } from "./interaction.js";
import { componentsIn, constantOf, figureOf, figureReader, uncertain, type Case } from "./case.js";
import { viscosityContradictions } from "./contradiction.js";
import { startDraws, type DrawOptions, type Read, type Uncertain } from "./doubt.js";
import { drawProperty, type Drawn, type Property } from "./property.js";

/** Below this share of the mass, what is dissolved in the liquid is taken not to change its viscosity. */
const SOLUTES_LEFT_OUT = 0.05;
/** What is dispersed in the liquid as particles. */
const DISPERSED = ["pigment", "filler"] as const;
/** Further than this from the temperature a viscosity was measured at, the two-constant law is an extrapolation. */
const TEMPERATURE_REACH_K = 30;

/**
 * Viscosity of the formulation at the brief's temperature, mPa s.
 *
 * Diluents and oligomers mix by Grunberg–Nissan; initiator, absorber and other solutes take no part; pigment and filler
 * thicken the mixture by Krieger–Dougherty. A pair with a measured
 * interaction uses it, on its own basis, brought to print temperature. A pair without one carries G = 0 with the spread published for fitted G. Where no
 * pair is measured the basis itself is in doubt: fractions run from mass to mole (w / M^k, k from 0 to 1).
 * @throws InputError when there is no liquid, a liquid has no viscosity or activation, or interactions of two bases meet.
 * @source Models: {@link grunbergNissan}, {@link andradeViscosity}. Propagation: JCGM 101:2008.
 * @example
 * ```ts
 * import { viscosityOf } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const viscosity = viscosityOf(openBrief("data/briefs/flow-cell.json"));
 * viscosity.unit; // → "mPa s"
 * viscosity.low < viscosity.value && viscosity.value < viscosity.high; // → true
 * viscosity.warnings[0].code; // → "interaction-unmeasured"
 * ```
 */
export function viscosityOf(input: Case & DrawOptions): Property {
  return drawViscosity(input, startDraws(input)).property;
}

/** @internal */
export function drawViscosity(input: Case, draws: ReturnType<typeof startDraws>): Drawn {
  return drawProperty("viscosity_mPas", viscosityModel(input), viscosityWarnings(input), draws);
}

/** The viscosity as a function of what the draws read; other properties build on it. @internal */
export function viscosityModel({ formulation, brief, shelf }: Case): (read: Read) => number {
  const where = `formulation "${formulation.id}"`;
  const liquids = formulation.components.filter(isLiquid);
  if (liquids.length === 0)
    throw new InputError(`${where}: no diluent and no oligomer in it; a resin needs a liquid`);
  const laws = liquids.map(({ ingredient }) => ({
    viscosity: required(where, ingredient.id, "viscosity_mPas", figureOf(ingredient, "viscosity_mPas")),
    activation: required(
      where,
      ingredient.id,
      "viscosityActivation_K",
      figureOf(ingredient, "viscosityActivation_K"),
    ),
    referenceTemperature_C: ingredient.viscosity_mPas!.temperature_C,
  }));
  const { basis, pairs } = interactionsOf(where, liquids, { shelf, brief });
  const fractionsOf = mixingFractions(formulation, liquids, basis);
  const thickening = solidsFactor(where, { formulation, brief, shelf });
  return (read) => {
    const viscosities_mPas = laws.map(({ viscosity, activation, referenceTemperature_C }) =>
      andradeViscosity({
        ...andradeFromReference({
          viscosity_mPas: read(viscosity),
          referenceTemperature_C,
          activation_K: read(activation),
        }),
        temperature_C: brief.temperature_C,
      }),
    );
    const mixingBasis = basis ?? "mass";
    const interactions = pairs.map(({ first, second, G }) => ({
      first,
      second,
      G: read(G),
      basis: mixingBasis,
    }));
    const fractions = fractionsOf(read);
    return (
      thickening(read) * grunbergNissan({ fractions, viscosities_mPas, basis: mixingBasis, interactions })
    );
  };
}

/** Pigment and filler thicken the liquid by Krieger–Dougherty; 1 where there are none. */
function solidsFactor(where: string, { formulation, shelf }: Case): (read: Read) => number {
  const solids = componentsIn(formulation, DISPERSED).map(({ ingredient }) => ingredient);
  if (massOf(componentsIn(formulation, DISPERSED)) === 0) return () => 1;
  const limit = constantOf(shelf.constants, "packingLimit");
  const intrinsic = constantOf(shelf.constants, "intrinsicViscosity");
  const stated = solidFraction(formulation, solids);
  const trusted = limit.value - 4 * limit.u;
  if (stated > trusted) {
    throw new InputError(
      `${where}: ${solids.map(({ id }) => id).join(", ")} fill ${stated.toPrecision(2)} of the volume; up to ${trusted.toPrecision(2)} can be assessed (four u below the packing limit ${limit.value}); measure the viscosity of this suspension`,
    );
  }
  return (read) =>
    kriegerDougherty({
      solidFraction: solidFraction(formulation, solids, figureReader(read)),
      packingLimit: read(limit),
      intrinsicViscosity: read(intrinsic),
    });
}

function solidFraction(
  formulation: Case["formulation"],
  solids: readonly Ingredient[],
  read?: FigureReader,
): number {
  const { rows } = composition(formulation, read);
  return rows
    .filter(({ ingredient }) => solids.includes(ingredient))
    .reduce((sum, row) => sum + row.volumeFraction, 0);
}

interface Pair {
  readonly first: number;
  readonly second: number;
  readonly G: Uncertain;
  readonly measured: boolean;
  readonly warnings: readonly Warning[];
}

function interactionsOf(
  where: string,
  liquids: readonly Component[],
  { shelf, brief }: Pick<Case, "shelf" | "brief">,
): { basis?: MixingBasis; pairs: Pair[] } {
  const pairs: Pair[] = [];
  let basis: MixingBasis | undefined;
  liquids.forEach(({ ingredient: { id: a } }, first) => {
    liquids.slice(first + 1).forEach(({ ingredient: { id: b } }, offset) => {
      const second = first + 1 + offset;
      const known = interactionsOn(shelf, a, b);
      if (known.length === 0) {
        const G = uncertain(
          `unmeasured interaction of ${a} and ${b}`,
          shelf.constants.unmeasuredInteraction,
          "signed",
        );
        pairs.push({ first, second, G, measured: false, warnings: [] });
        return;
      }
      const here = interactionAt({ known, temperature_C: brief.temperature_C });
      if (basis !== undefined && basis !== here.basis) {
        throw new InputError(
          `${where}: the interaction of ${a} and ${b} is on a ${here.basis} basis, others on a ${basis} basis; fit all of them on one basis`,
        );
      }
      basis = here.basis;
      const G = uncertain(`interaction of ${a} and ${b}`, here.G, "signed");
      pairs.push({ first, second, G, measured: true, warnings: here.warnings });
    });
  });
  return { basis, pairs };
}

/** Fractions of the liquids on the basis of the interactions; between mass and mole where nothing has settled the basis. */
function mixingFractions(
  formulation: Case["formulation"],
  liquids: readonly Component[],
  basis: MixingBasis | undefined,
) {
  const masses = liquids.map(({ massFraction }) => massFraction);
  if (basis === "mass" || liquids.length === 1) return () => toUnitSum(masses);
  if (basis === "volume" || basis === "mole") {
    const where = `formulation "${formulation.id}"`;
    if (basis === "mole")
      liquids.forEach(({ ingredient }) =>
        required(where, ingredient.id, "molarMass_gmol", figureOf(ingredient, "molarMass_gmol")),
      );
    const share = basis === "volume" ? "volumeFraction" : "moleFraction";
    const liquid = { ...formulation, components: liquids };
    return (read: Read) => toUnitSum(composition(liquid, figureReader(read)).rows.map((row) => row[share]!));
  }
  const molarMasses = liquids.map(({ ingredient }) => figureOf(ingredient, "molarMass_gmol"));
  if (molarMasses.includes(undefined)) return () => toUnitSum(masses);
  return (read: Read) => {
    const k = read(basisExponent);
    return toUnitSum(masses.map((mass, i) => mass / read(molarMasses[i]!) ** k));
  };
}

const basisExponent = uncertain(
  "mixing basis, from mass (0) to mole fraction (1)",
  {
    value: 0.5,
    u: 0.5 / Math.sqrt(3),
    source: "neither basis fits all systems; any exponent from 0 to 1 taken as equally likely",
    status: "common practice",
  },
  "flat",
);

function viscosityWarnings({ formulation, brief, shelf }: Case): Warning[] {
  const liquids = formulation.components.filter(isLiquid);
  const { basis, pairs } = interactionsOf(`formulation "${formulation.id}"`, liquids, { shelf, brief });
  const named = (pair: Pair) =>
    `${liquids[pair.first]!.ingredient.id}–${liquids[pair.second]!.ingredient.id}`;
  const warnings: Warning[] = [];
  const unmeasured = pairs.filter(({ measured }) => !measured).map(named);
  if (unmeasured.length > 0) {
    const basisDoubt = basis === undefined ? ", and the mixing basis (mass or mole) is open too" : "";
    warnings.push({
      code: "interaction-unmeasured",
      message: `No measured interaction for ${unmeasured.join(", ")}: G = 0 with the published spread${basisDoubt}. Five viscosities across the ratio settle it.`,
    });
  }
  warnings.push(...pairs.flatMap((pair) => pair.warnings), ...readingWarnings(liquids, shelf));
  const far = liquids.filter(({ ingredient }) => {
    const at = ingredient.viscosity_mPas?.temperature_C;
    return at !== undefined && Math.abs(at - brief.temperature_C) > TEMPERATURE_REACH_K;
  });
  if (far.length > 0) {
    warnings.push({
      code: "viscosity-extrapolated",
      message: `${brief.temperature_C} °C is more than ${TEMPERATURE_REACH_K} K from the temperature at which ${far.map(({ ingredient }) => ingredient.id).join(", ")} was measured; the two-constant law errs there.`,
    });
  }
  const solutes = massOf(componentsIn(formulation, ["photoinitiator", "synergist", "absorber", "inhibitor"]));
  if (solutes > SOLUTES_LEFT_OUT) {
    warnings.push({
      code: "solutes-left-out",
      message: `Initiator, absorber and other solutes are ${(100 * solutes).toPrecision(2)} % of the mass; above ${100 * SOLUTES_LEFT_OUT} % their effect on viscosity is no longer small, and it is not in this number.`,
    });
  }
  const dispersed = componentsIn(formulation, DISPERSED);
  if (dispersed.length > 0) {
    warnings.push({
      code: "solids-estimated",
      message: `${dispersed.map(({ ingredient }) => ingredient.id).join(", ")} thickens the resin as hard particles would. Clusters, an adsorbed layer and shear thinning are not in this number; measure it at 10 to 50 per second.`,
    });
  }
  return warnings;
}

/** What contradicts what is known of the liquids: readings of their blends, and a lot's own figure. */
function readingWarnings(liquids: readonly Component[], shelf: Case["shelf"]): Warning[] {
  const ids = liquids.map(({ ingredient }) => ingredient.id);
  const blends = shelf.interactions.filter(({ pair }) => pair.some((id) => ids.includes(id)));
  return [
    ...blends.flatMap(({ warnings = [] }) => warnings),
    ...liquids.flatMap(({ ingredient: { id, lot, viscosity_mPas } }) => {
      const expected = shelf.ingredients.get(id);
      // Once blends of it were read, the shelf's figure is theirs, and they have been held against the lot already.
      const isRead = shelf.readings.some(({ pair }) => pair.includes(id));
      if (!lot?.measured.includes("viscosity_mPas") || expected === undefined || isRead) return [];
      const check = `the unit of viscosity_mPas in the file of lot ${lot.id}`;
      return viscosityContradictions({ reading: `lot ${lot.id}`, read: viscosity_mPas!, expected, check });
    }),
  ];
}

function required(where: string, id: string, field: string, input: Uncertain | undefined): Uncertain {
  if (input !== undefined) return input;
  throw new InputError(
    `${where}: ${id} has no ${field}; add it to the ingredient with its source and u, or measure a lot`,
  );
}

function massOf(components: readonly Component[]): number {
  return components.reduce((sum, { massFraction }) => sum + massFraction, 0);
}

function toUnitSum(parts: readonly number[]): number[] {
  const total = parts.reduce((sum, part) => sum + part, 0);
  return parts.map((part) => part / total);
}
