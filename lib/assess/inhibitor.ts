// The inhibitors of a formulation, as far as the shelf knows how fast they catch peroxyl radicals: how much oxygen a radical uses up
// beside them.

import { inhibitedOxygenPerRadical } from "../models/oxygen.js";
import { composition } from "../recipe/formulation.js";
import type { Ingredient } from "../recipe/ingredient.js";
import type { Warning } from "../result.js";
import { componentsIn, constantOf, figureOf, figureReader, type Case } from "./case.js";
import type { Read } from "./doubt.js";

/** Oxygen used per radical in this formulation, from what it is without inhibitor. */
export function inhibitorModel({ formulation, shelf }: Case) {
  const constant = (name: "oxygenPerRadical" | "peroxylTermination_m3mols" | "oxygenReturned") =>
    constantOf(shelf.constants, name);
  const counted = componentsIn(formulation, ["inhibitor"])
    .filter(({ ingredient }) => isKnown(ingredient))
    .map(({ ingredient }) => ({
      ingredient,
      capture: figureOf(ingredient, "peroxylCapture_m3mols")!,
      caught: figureOf(ingredient, "radicalsCaught")!,
    }));
  return (read: Read, radicalGeneration_molm3s: number): number => {
    const oxygenPerRadical = read(constant("oxygenPerRadical"));
    if (counted.length === 0) return oxygenPerRadical;
    const { rows } = composition(formulation, figureReader(read));
    const concentration_molm3 = (one: Ingredient): number =>
      1000 * rows.find(({ ingredient }) => ingredient === one)!.concentration_molL!;
    return inhibitedOxygenPerRadical({
      oxygenPerRadical,
      radicalGeneration_molm3s,
      selfTermination_m3mols: read(constant("peroxylTermination_m3mols")),
      oxygenReturned: read(constant("oxygenReturned")),
      inhibitors: counted.map(({ ingredient, capture, caught }) => ({
        peroxylCapture_m3mols: read(capture),
        radicalsCaught: read(caught),
        concentration_molm3: concentration_molm3(ingredient),
      })),
    }).oxygenPerRadical;
  };
}

/** Names the inhibitors that the models cannot count. */
export function inhibitorWarnings({ formulation }: Case): Warning[] {
  const unknown = componentsIn(formulation, ["inhibitor"]).filter(({ ingredient }) => !isKnown(ingredient));
  if (unknown.length === 0) return [];
  const names = unknown.map(({ ingredient }) => ingredient.id).join(", ");
  return [
    {
      code: "inhibitor-not-counted",
      message: `What ${names} does to induction time and dead zone is not counted: the shelf lacks its molar mass, peroxylCapture_m3mols or radicalsCaught. Measure an induction time with it.`,
    },
  ];
}

const isKnown = (inhibitor: Ingredient): boolean =>
  inhibitor.peroxylCapture_m3mols !== undefined &&
  inhibitor.radicalsCaught !== undefined &&
  inhibitor.molarMass_gmol !== undefined;
