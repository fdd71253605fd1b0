// A case as plain data that survives JSON, with no more of the shelf than this formulation and this brief name.

import type { Case } from "../../assess/case.js";
import type { OxygenCorrection } from "../../assess/windowCorrection.js";
import type { Brief } from "../../recipe/brief.js";
import type { MeasuredWorkingCurve } from "../../recipe/cureDepths.js";
import type { Film } from "../../recipe/film.js";
import type { Formulation } from "../../recipe/formulation.js";
import type { Ingredient } from "../../recipe/ingredient.js";
import type { Interaction } from "../../recipe/interaction.js";
import type { ResinConstants } from "../../recipe/constants.js";
import type { Spectrum } from "../../recipe/spectrum.js";

/** What an assessment reads of a case, in objects and lists only. */
export interface PlainCase {
  readonly formulation: Formulation;
  readonly brief: Brief;
  /** Ingredients that the brief names to avoid. */
  readonly avoided: readonly Ingredient[];
  readonly spectra: readonly Spectrum[];
  readonly films: readonly Film[];
  readonly interactions: readonly Interaction[];
  readonly workingCurves: readonly MeasuredWorkingCurve[];
  readonly constants: ResinConstants;
  readonly oxygenCorrection?: Omit<OxygenCorrection, "takenOn"> & { readonly takenOn: PlainCase };
}

/** A case as plain data. Where its files lie stays behind: a page says nothing of the machine it was made on. */
export function plainCase({ formulation, brief, shelf, oxygenCorrection }: Case): PlainCase {
  const ids = formulation.components.map(({ ingredient }) => ingredient.id);
  const spectra = [
    brief.light.spectrum,
    ...formulation.components.map(({ ingredient }) => ingredient.spectrum),
  ];
  return {
    formulation,
    brief: { ...brief, formulation: "", shelf: [] },
    avoided: brief.avoid.flatMap(({ ingredient }) => shelf.ingredients.get(ingredient ?? "") ?? []),
    spectra: [...shelf.spectra.values()].filter(({ id }) => spectra.includes(id)),
    films: [...shelf.films.values()].filter(({ id }) => id === brief.window.film),
    interactions: shelf.interactions.filter(({ pair }) => pair.every((id) => ids.includes(id))),
    workingCurves: shelf.workingCurves,
    constants: shelf.constants,
    ...(oxygenCorrection && {
      oxygenCorrection: { ...oxygenCorrection, takenOn: plainCase(oxygenCorrection.takenOn) },
    }),
  };
}

/** The case again. Its shelf holds what the formulation and the brief name and nothing else. */
export function caseOf({ formulation, brief, oxygenCorrection, ...plain }: PlainCase): Case {
  const byId = <T extends { readonly id: string }>(list: readonly T[]) =>
    new Map(list.map((one) => [one.id, one]));
  return {
    formulation,
    brief,
    shelf: {
      ingredients: byId([...plain.avoided, ...formulation.components.map(({ ingredient }) => ingredient)]),
      lots: new Map(),
      spectra: byId(plain.spectra),
      films: byId(plain.films),
      interactions: plain.interactions,
      readings: [],
      windowReadings: [],
      cureDepths: [],
      workingCurves: plain.workingCurves,
      constants: plain.constants,
    },
    ...(oxygenCorrection && {
      oxygenCorrection: { ...oxygenCorrection, takenOn: caseOf(oxygenCorrection.takenOn) },
    }),
  };
}
