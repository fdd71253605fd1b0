// Who takes the light: the share that each component of a resin absorbs, and the share that goes through.
import { checkNumber, notNegative } from "../../door.js";
import { checkList, checkSameLength, type NumberList } from "../../numerics/lists.js";
import { um_per_cm } from "../scales.js";
import type { LightEngine } from "./engine.js";

/** One component of a resin and its Napierian absorption at each node of the engine, 1/cm. */
export interface AbsorbingComponent {
  readonly name: string;
  readonly napierianAbsorptions_percm: NumberList;
}

/** Where the light of an engine goes; all shares together are 1. */
export interface AbsorbedShares {
  readonly components: readonly { readonly name: string; readonly share: number }[];
  readonly transmitted: { readonly share: number };
}

/**
 * Share of the light that each component absorbs between the window and a depth, and the share that goes through.
 *
 * - `engine`: made by `lightEngine`.
 * - `components`: each with `name` and `napierianAbsorptions_percm` at the nodes, at least 0, 1/cm; the resin itself is one.
 * - `depth_um`: at least 0, um; the layer thickness, say.
 *
 * share_i = integral(S (alpha_i / alpha) (1 - exp(-alpha z))) / integral(S), alpha the sum of all alpha_i.
 *
 * Only the initiator's share starts radicals; what the absorber takes is lost. Shares count what the engine's spectrum
 * counts: energy for power per nm, photons for power x wavelength.
 * @throws InputError when an argument is out of range or the lists differ in length.
 * @source Beer-Lambert law at each wavelength (IUPAC Gold Book B00626), derived for this library.
 * @example
 * ```ts
 * import { absorbedShares, lightEngine } from "resinwright";
 * const engine = lightEngine({ wavelengths_nm: [400, 410], spectrum: [1, 1] });
 * const { components } = absorbedShares({
 *   engine,
 *   components: [
 *     { name: "initiator", napierianAbsorptions_percm: [30, 20] },
 *     { name: "absorber", napierianAbsorptions_percm: [90, 60] },
 *   ],
 *   depth_um: 100,
 * });
 * components[0]?.share; // → 0.1562
 * ```
 */
export function absorbedShares(input: {
  readonly engine: LightEngine;
  readonly components: readonly AbsorbingComponent[];
  readonly depth_um: number;
}): AbsorbedShares {
  const where = "absorbedShares";
  const { engine, components, depth_um } = input;
  components.forEach(({ name, napierianAbsorptions_percm }) => {
    const field = `napierianAbsorptions_percm of "${name}"`;
    checkList(where, field, napierianAbsorptions_percm, notNegative);
    checkSameLength(where, { "engine.shares": engine.shares, [field]: napierianAbsorptions_percm });
  });
  checkNumber(depth_um, { where, field: "depth_um", ...notNegative });
  const z = depth_um / um_per_cm;
  const alpha = engine.shares.map((_, k) =>
    components.reduce((sum, { napierianAbsorptions_percm }) => sum + napierianAbsorptions_percm[k]!, 0),
  );
  const taken = alpha.map((a, k) => (a === 0 ? 0 : (engine.shares[k]! * -Math.expm1(-a * z)) / a));
  return {
    components: components.map(({ name, napierianAbsorptions_percm }) => ({
      name,
      share: taken.reduce((sum, t, k) => sum + t * napierianAbsorptions_percm[k]!, 0),
    })),
    transmitted: { share: alpha.reduce((sum, a, k) => sum + engine.shares[k]! * Math.exp(-a * z), 0) },
  };
}
