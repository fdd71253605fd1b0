// What a reader can move in the panel of a page, and the case that comes of it: the same functions a notebook would call.

import { checkNumber } from "../../door.js";
import type { Case } from "../../assess/case.js";
import type { Brief } from "../../recipe/brief.js";
import {
  isLiquid,
  largestOf,
  mainPair,
  massFractionOf,
  withMassFractions,
  withRatio,
  type Formulation,
} from "../../recipe/formulation.js";
import type { Role } from "../../recipe/ingredient.js";
import { unitLabel } from "../../recipe/units.js";

/** Where the controls stand; a control the formulation has no use for is absent. */
export interface Settings {
  /** Share of the thicker of the two main liquids in what the two weigh together. */
  readonly share_pct?: number;
  readonly initiator_pct?: number;
  readonly absorber_pct?: number;
  readonly irradiance_mWcm2?: number;
  readonly temperature_C?: number;
}

/** One control: which setting it moves, what it is called, where the brief has it and how far it goes. */
export interface Control {
  readonly field: keyof Settings;
  readonly label: string;
  readonly unit: string;
  readonly start: number;
  readonly min: number;
  readonly max: number;
  readonly step: number;
}

/** The controls that make sense for a case, each starting where the brief and its formulation have it. */
export function controlsOf({ formulation, brief }: Case): Control[] {
  const irradiance = brief.light.irradiance_mWcm2.value;
  return [
    ...ratioControl(formulation),
    ...levelControl(formulation, "initiator_pct", "photoinitiator", { least: 0.01, reach: 2 }),
    ...levelControl(formulation, "absorber_pct", "absorber", { least: 0, reach: 0.2 }),
    control("irradiance_mWcm2", "irradiance at the window", irradiance, [irradiance / 20, 5 * irradiance]),
    control("temperature_C", "resin temperature", brief.temperature_C, [10, 60], 0.5),
  ];
}

/**
 * The case with the settings in place; what stands where it started is left exactly as it was. The two levels are those of the
 * whole formulation, and the other ingredients keep their proportions. Irradiance keeps its relative uncertainty.
 * @throws InputError naming the control that is out of its range.
 */
export function withSettings(work: Case, settings: Settings): Case {
  const moved = new Map<keyof Settings, number>();
  for (const { field, label, start, min, max } of controlsOf(work)) {
    const value = checkNumber(settings[field], { where: "panel", field: label, min, max });
    if (value !== start) moved.set(field, value);
  }
  return {
    ...work,
    formulation: withLevels(withShare(work.formulation, moved), moved),
    brief: withConditions(work.brief, moved),
  };
}

type Moved = ReadonlyMap<keyof Settings, number>;

function withShare(formulation: Formulation, moved: Moved): Formulation {
  const share_pct = moved.get("share_pct");
  if (share_pct === undefined) return formulation;
  const [thick, thin] = mainPair(formulation);
  return withRatio(formulation, { id: thick.id, against: thin.id, share: share_pct / 100 });
}

function withLevels(formulation: Formulation, moved: Moved): Formulation {
  const levels = [
    ["initiator_pct", "photoinitiator"],
    ["absorber_pct", "absorber"],
  ] as const;
  if (!levels.some(([field]) => moved.has(field))) return formulation;
  const held = levels.flatMap(([field, role]) => {
    if (!holds(formulation, role)) return [];
    const { id } = largestOf(formulation, role);
    const level_pct = moved.get(field);
    return [[id, level_pct === undefined ? massFractionOf(formulation, id) : level_pct / 100] as const];
  });
  return withMassFractions(formulation, Object.fromEntries(held));
}

function withConditions(brief: Brief, moved: Moved): Brief {
  const { value, u, ...stated } = brief.light.irradiance_mWcm2;
  const irradiance = moved.get("irradiance_mWcm2");
  return {
    ...brief,
    temperature_C: moved.get("temperature_C") ?? brief.temperature_C,
    light:
      irradiance === undefined
        ? brief.light
        : {
            ...brief.light,
            irradiance_mWcm2: { ...stated, value: irradiance, u: (u * irradiance) / value },
          },
  };
}

function ratioControl(formulation: Formulation): Control[] {
  if (formulation.components.filter(isLiquid).length < 2) return [];
  const [thick, thin] = mainPair(formulation).map(({ id }) => id) as [string, string];
  const ofThick = massFractionOf(formulation, thick);
  const start = (100 * ofThick) / (ofThick + massFractionOf(formulation, thin));
  return [control("share_pct", `share of ${thick} in ${thick} + ${thin}`, start, [0, 100], 0.5)];
}

function levelControl(
  formulation: Formulation,
  field: keyof Settings,
  role: Role,
  { least, reach }: { least: number; reach: number },
): Control[] {
  if (!holds(formulation, role)) return [];
  const { id } = largestOf(formulation, role);
  const start = 100 * massFractionOf(formulation, id);
  return [control(field, `${role} ${id}`, start, [least, Math.max(reach, 3 * start)])];
}

function holds({ components }: Formulation, role: Role): boolean {
  return components.some(({ ingredient }) => ingredient.role === role);
}

/** A control that reaches `from` to `to` in round numbers and never less far than its start. */
function control(
  field: keyof Settings,
  label: string,
  start: number,
  [from, to]: readonly [number, number],
  step = roundNumber((to - from) / 200),
): Control {
  const min = Math.min(roundNumber(from), start);
  const max = Math.max(roundNumber(to), start);
  return { field, label, unit: unitLabel(field), start, min, max, step };
}

function roundNumber(value: number): number {
  return Number(value.toPrecision(1));
}
