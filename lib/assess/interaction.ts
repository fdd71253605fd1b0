// The interaction of two liquids at print temperature, from what was measured at others.

import { InputError } from "../door.js";
import { interactionAtTemperature, isdaleTemperatureLaw } from "../models/viscosity.js";
import type { Interaction } from "../recipe/interaction.js";
import type { SourcedValue, Warning } from "../result.js";

/** An interaction brought to a temperature, with what to know of the way there. */
export interface InteractionAt {
  readonly basis: Interaction["basis"];
  readonly G: SourcedValue;
  readonly warnings: readonly Warning[];
}

/** Nearer than this the temperature is taken to be the same. */
const SAME_TEMPERATURE_K = 0.5;
/** Further than this the way there is told to the reader. */
const NEAR_K = 5;

/**
 * Brings the measured interactions of a pair to a temperature.
 *
 * Measured at two temperatures: G linear in 1/T between the two nearest. At one: Isdale's law, whose change is doubted as much as
 * it is large, since hydrogen-bonded liquids have shown up to three times it. Without a temperature: as it is.
 * @throws InputError when interactions of one pair stand on two bases.
 */
export function interactionAt({
  known,
  temperature_C,
}: {
  known: readonly Interaction[];
  temperature_C: number;
}): InteractionAt {
  const [nearest, next] = [...known].sort((a, b) => distance(a, temperature_C) - distance(b, temperature_C));
  const { basis, G, pair, temperature_C: at } = nearest!;
  if (at === undefined || Math.abs(at - temperature_C) < SAME_TEMPERATURE_K)
    return { basis, G, warnings: [] };
  if (next?.temperature_C === undefined) return byLaw({ basis, G, pair, at, temperature_C });
  if (next.basis !== basis) {
    throw new InputError(
      `interaction of ${pair.join(" and ")}: a ${basis} basis at ${at} °C and a ${next.basis} basis at ${next.temperature_C} °C; fit both on one basis`,
    );
  }
  const measured = [
    { G: G.value, u: G.u, basis, temperature_C: at },
    { G: next.G.value, u: next.G.u, basis, temperature_C: next.temperature_C },
  ] as const;
  const { G: value, u, warnings } = interactionAtTemperature({ measured, temperature_C });
  const source = `between ${at} °C (${G.source}) and ${next.temperature_C} °C (${next.G.source}), linear in 1/T`;
  return { basis, G: { value, u, source, status: G.status }, warnings };
}

function byLaw({
  basis,
  G,
  pair,
  at,
  temperature_C,
}: Pick<Interaction, "basis" | "G" | "pair"> & { at: number; temperature_C: number }): InteractionAt {
  const law = isdaleTemperatureLaw({ G: G.value, basis, referenceTemperature_C: at, temperature_C });
  const u = Math.hypot(G.u, law.G - G.value);
  const source = `${G.source}; from ${at} to ${temperature_C} °C by Isdale's law, its change doubted as much as it is large`;
  const far = Math.abs(at - temperature_C) > NEAR_K;
  const told: Warning = {
    code: "interaction-other-temperature",
    message: `The interaction of ${pair.join(" and ")} was measured at ${at} °C and is carried to ${temperature_C} °C by a law: ${law.warnings.map(({ message }) => message).join("; ") || "measure it at a second temperature"}.`,
  };
  return { basis, G: { ...G, value: law.G, u, source }, warnings: far ? [told] : [] };
}

function distance({ temperature_C: at }: Interaction, temperature_C: number): number {
  return at === undefined ? Infinity : Math.abs(at - temperature_C);
}
