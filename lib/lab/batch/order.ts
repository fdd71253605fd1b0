// In which order a resin goes together, and why: what dissolves goes into thin liquid, what starts the reaction waits for
// amber light, what is thick comes warm, what settles comes last.

import { isLiquid, type Component, type Formulation } from "../../recipe/formulation.js";
import type { Role } from "../../recipe/ingredient.js";

/** One step of putting a resin together. */
export interface Addition extends Component {
  readonly reason: string;
  /** Under amber light from this step on: an initiator is in the vessel. */
  readonly amberLight: boolean;
}

/**
 * The ingredients of a formulation in the order to add them, each with its reason.
 *
 * The thinnest liquid first; inhibitor, absorber and initiator into it; the other diluents, thinnest first; oligomers, warmed;
 * pigment and filler last. What has no share is left out. Whether a solid dissolves is not known here: see that the liquid
 * is clear before going on.
 * @example
 * ```ts
 * import { orderOfAddition } from "resinwright";
 * import { openBrief } from "resinwright/files";
 * const { formulation } = openBrief("data/briefs/flow-cell.json");
 * orderOfAddition(formulation).map(({ ingredient }) => ingredient.id); // → ["IBOA", "MEHQ", "BBOT", "BAPO", "TEGDMA", "UDMA"]
 * ```
 */
export function orderOfAddition({ components }: Formulation): Addition[] {
  const present = components.filter(({ massFraction }) => massFraction > 0);
  const [base] = present.filter(isLiquid).sort(thinnestFirst);
  const rest = present
    .filter((one) => one !== base)
    .sort((a, b) => stepOf(a) - stepOf(b) || thinnestFirst(a, b));
  let amberLight = false;
  return [...(base === undefined ? [] : [base]), ...rest].map((one) => {
    amberLight ||= one.ingredient.role === "photoinitiator";
    return { ...one, reason: one === base ? baseReason : reasonOf(one), amberLight };
  });
}

const baseReason = "the thinnest liquid first: solids dissolve fastest in it";

const steps: readonly (readonly Role[])[] = [
  ["inhibitor"],
  ["absorber"],
  ["photoinitiator", "synergist"],
  ["diluent"],
  ["oligomer"],
  ["pigment", "filler"],
];

function stepOf({ ingredient }: Component): number {
  return steps.findIndex((roles) => roles.includes(ingredient.role));
}

function thinnestFirst(a: Component, b: Component): number {
  const viscosity = ({ ingredient }: Component) => ingredient.viscosity_mPas?.value ?? Number.MAX_VALUE;
  return viscosity(a) - viscosity(b);
}

const reasons: Readonly<Record<Role, string>> = {
  inhibitor: "before anything that can start the reaction; it works only with air dissolved in the resin",
  absorber: "into the thin liquid, and before the initiator",
  photoinitiator: "into the thin liquid; from here on under amber light, vessel covered",
  synergist: "with the initiator; under amber light, vessel covered",
  diluent: "before the thick ones: it thins what follows",
  oligomer:
    "warmed until it pours, no warmer than its safety data sheet allows; stir until no streak is left",
  pigment: "last, little by little under shear; it settles, so stir again before every pour",
  filler: "last, little by little under shear; it settles, so stir again before every pour",
};

function reasonOf({ ingredient }: Component): string {
  const dissolves = ingredient.state === "solid" && !["pigment", "filler"].includes(ingredient.role);
  return `${reasons[ingredient.role]}${dissolves ? "; stir until clear, no grain against the light" : ""}`;
}
