// What a result was computed from, as one number: a hash over the data a case uses, so that a colleague can see whether theirs
// is the same.

import { createHash } from "node:crypto";
import type { Case } from "../assess/case.js";
import { InputError } from "../door.js";
import type { Formulation } from "../recipe/formulation.js";
import type { MeasuredParts } from "../recipe/measuredParts.js";
import type { Shelf } from "../recipe/shelf.js";

/**
 * SHA-256, as 64 hex digits, over the data that a case uses.
 *
 * In it: the formulation with its ingredients as they stand in the case (lots and calibration included), their spectra and that
 * of the light engine, the film, the class constants, interactions between its liquids, readings that name one of them,
 * cure depths and readings on the window of these ingredients, what calibration made of them, and the brief. Not in it: what
 * else stands on the shelf, where files lie, prices and safety rules. The same hash, library version, draws and seed give the
 * same assessment. Of a formulation alone, as a batch is weighed out from, it is the hash of the formulation with its
 * ingredients.
 *
 * The data is written as JSON without spaces, keys in the order of their UTF-16 code units, absent fields left out, numbers as
 * ECMAScript writes them; the order of parts and lists counts.
 * @param work - A case, or a formulation alone.
 * @throws InputError naming a number that is not finite.
 * @source SHA-256: FIPS 180-4, 2015. Form of the JSON: RFC 8785, 2020 (both from memory).
 * @example
 * ```ts
 * import { withRatio } from "resinwright";
 * import { dataHashOf, openBrief } from "resinwright/files";
 * const work = openBrief("data/briefs/flow-cell.json");
 * const hash = dataHashOf(work);
 * hash.length; // → 64
 * const thinner = withRatio(work.formulation, { id: "UDMA", against: "IBOA", share: 0.6 });
 * dataHashOf({ ...work, formulation: thinner }) === hash; // → false
 * dataHashOf({ ...work, shelf: { ...work.shelf, ingredients: new Map() } }) === hash; // → true
 * ```
 */
export function dataHashOf(work: Case | { readonly formulation: Formulation }): string {
  return createHash("sha256")
    .update(canonicalJson(dataUsedBy(work), "dataHashOf"))
    .digest("hex");
}

function dataUsedBy(work: Case | { readonly formulation: Formulation }): object {
  const { id, title, components } = work.formulation;
  const formulation = { id, title, components };
  if (!("brief" in work)) return { formulation };
  const { brief, shelf, oxygenCorrection } = work;
  const inIt = new Set(components.map(({ ingredient }) => ingredient.id));
  const spectra = new Set([...components.map(({ ingredient }) => ingredient.spectrum), brief.light.spectrum]);
  return {
    formulation,
    // Where the files lie says nothing of what is in them.
    brief: { ...brief, formulation: undefined, shelf: undefined },
    spectra: [...spectra].flatMap((name) => shelf.spectra.get(name ?? "") ?? []),
    film: shelf.films.get(brief.window.film),
    constants: shelf.constants,
    interactions: shelf.interactions.filter(({ pair }) => pair.every((one) => inIt.has(one))),
    readings: readingsOf(shelf, inIt),
    ofLots: components.flatMap(({ ingredient: { id, lot } }) => typicalViscosity(shelf, id, lot)),
    cureDepths: shelf.cureDepths.filter((series) => ofThisResin(series, inIt)),
    workingCurves: shelf.workingCurves.filter(({ series }) => ofThisResin(series, inIt)),
    windowReadings: shelf.windowReadings.filter((readings) => ofThisResin(readings, inIt)),
    oxygenCorrection: oxygenCorrection && {
      ...oxygenCorrection,
      takenOn: dataUsedBy(oxygenCorrection.takenOn),
    },
  };
}

/** What was measured on a resin counts for the same ingredients, in whatever amounts. */
function ofThisResin({ parts }: { readonly parts: MeasuredParts }, inIt: ReadonlySet<string>): boolean {
  return parts.every(({ ingredient }) => inIt.has(ingredient));
}

/** Readings of a liquid correct its own viscosity too, whatever it was blended with. */
function readingsOf({ readings }: Shelf, inIt: ReadonlySet<string>): Shelf["readings"] {
  return readings.filter(({ pair }) => pair.some((one) => inIt.has(one)));
}

/** What a lot's measured viscosity is held against. */
function typicalViscosity(
  { ingredients }: Shelf,
  id: string,
  lot: Formulation["components"][number]["ingredient"]["lot"],
): object[] {
  const typical = ingredients.get(id);
  if (typical === undefined || !lot?.measured.includes("viscosity_mPas")) return [];
  const { viscosity_mPas, viscosityActivation_K } = typical;
  return [{ id, viscosity_mPas, viscosityActivation_K }];
}

function canonicalJson(value: unknown, where: string): string {
  if (typeof value === "number" && !Number.isFinite(value))
    throw new InputError(`${where} is ${value}; a hash is taken of finite numbers and text`);
  if (Array.isArray(value))
    return `[${value.map((one, i) => canonicalJson(one, `${where}[${i}]`)).join(",")}]`;
  if (typeof value !== "object" || value === null) return JSON.stringify(value);
  const members = Object.entries(value)
    .filter(([, one]) => one !== undefined)
    .sort(([a], [b]) => (a < b ? -1 : 1))
    .map(([key, one]) => `${JSON.stringify(key)}:${canonicalJson(one, `${where}.${key}`)}`);
  return `{${members.join(",")}}`;
}
