// How much solid particles thicken a resin: relative viscosity from the volume they take up.
// Multiply by the viscosity of the liquid; all of it holds for particles that do not stick to each other.
import { checkNumber, checkNumbers, fraction, InputError, notNegative, positive } from "../../door.js";
import type { Warning } from "../../result.js";
import { density } from "../ranges.js";

/** Einstein's intrinsic viscosity of hard spheres, exact at vanishing volume fraction. */
export const sphereIntrinsicViscosity = 2.5;

/**
 * Volume fraction at which hard spheres of one size stop flowing, at low and at high shear rate, with its standard
 * uncertainty.
 * @source C. G. de Kruif, E. M. F. van Iersel, A. Vrij, W. B. Russel, J. Chem. Phys. 83 (1985) 4717-4725, doi
 * 10.1063/1.448997, abstract (0.70 to 0.71 at high shear).
 */
export const hardSpherePacking = {
  lowShear: { value: 0.63, u: 0.02 },
  highShear: { value: 0.71, u: 0.02 },
} as const;

const packing = { min: 0, above: true, max: 1 } as const;

/**
 * Relative viscosity of a suspension, by Krieger and Dougherty.
 *
 * - `solidFraction`: phi, volume of solid over volume of all, 0 to below `packingLimit`.
 * - `packingLimit`: phi_m, above 0 and at most 1; 0.63 at low and 0.71 at high shear for spheres of one size.
 * - `intrinsicViscosity`: [eta], above 0; 2.5 for spheres, more for plates and needles.
 *
 * eta_r = (1 - phi / phi_m)^(-[eta] phi_m); at small phi, 1 + [eta] phi.
 *
 * Assumes particles that do not stick to each other and are large enough for Brownian motion not to matter, or a
 * `packingLimit` found for these particles at the shear rate of use: it is a property of the filler, 0.2 to 0.8.
 * @throws InputError when an argument is out of range, or phi reaches the packing limit: it does not flow there.
 * @source I. M. Krieger, T. J. Dougherty, Trans. Soc. Rheol. 3 (1959) 137-152, doi 10.1122/1.548848 (from memory).
 * @example
 * ```ts
 * import { kriegerDougherty } from "resinwright";
 * kriegerDougherty({ solidFraction: 0.3, packingLimit: 0.63, intrinsicViscosity: 2.5 }); // → 2.7689
 * ```
 */
export function kriegerDougherty(input: {
  readonly solidFraction: number;
  readonly packingLimit: number;
  readonly intrinsicViscosity: number;
}): number {
  const where = "kriegerDougherty";
  checkNumbers(where, input, {
    solidFraction: fraction,
    packingLimit: packing,
    intrinsicViscosity: positive,
  });
  const { packingLimit, intrinsicViscosity } = input;
  return relative(where, input, intrinsicViscosity * packingLimit);
}

/**
 * Relative viscosity of a suspension, by the rule with the exponent 2 of Maron and Pierce, also found by Quemada.
 *
 * - `solidFraction`: phi, volume of solid over volume of all, 0 to below `packingLimit`.
 * - `packingLimit`: phi_m, above 0 and at most 1; 0.63 at low and 0.71 at high shear for spheres of one size.
 *
 * eta_r = (1 - phi / phi_m)^-2.
 *
 * Assumes a concentrated suspension of particles that do not stick to each other. At small phi it grows by 2 / phi_m, too
 * steep by a quarter for spheres.
 * @throws InputError when an argument is out of range, or phi reaches the packing limit: it does not flow there.
 * @source S. H. Maron, P. E. Pierce, J. Colloid Sci. 11 (1956) 80-95, doi 10.1016/0095-8522(56)90023-X; D. Quemada,
 * Rheologica Acta 16 (1977) 82-94, doi 10.1007/BF01516932 (both from memory).
 * @example
 * ```ts
 * import { maronPierce } from "resinwright";
 * maronPierce({ solidFraction: 0.3, packingLimit: 0.63 }); // → 3.6446
 * ```
 */
export function maronPierce(input: {
  readonly solidFraction: number;
  readonly packingLimit: number;
}): number {
  const where = "maronPierce";
  checkNumbers(where, input, { solidFraction: fraction, packingLimit: packing });
  return relative(where, input, 2);
}

/**
 * Relative viscosity of hard spheres as measured on silica spheres, up to a volume fraction of 0.35: a reference.
 *
 * - `solidFraction`: phi, 0 or more; above 0.35 the warning `beyond-measured` is given.
 * - `shear`: `low` (at rest) or `high` (all Brownian motion overcome).
 *
 * eta_r = 1 + 2.5 phi + 4 phi^2 + 42 phi^3 at low and 25 phi^3 at high shear; u from the errors quoted, +-2 of the second
 * coefficient, +-10 and +-7 of the third, taken as standard uncertainties and independent.
 * @throws InputError when the fraction is not from 0 to 1, or the shear is neither `low` nor `high`.
 * @source C. G. de Kruif, E. M. F. van Iersel, A. Vrij, W. B. Russel, J. Chem. Phys. 83 (1985) 4717-4725, doi
 * 10.1063/1.448997, abstract.
 * @example
 * ```ts
 * import { hardSphereViscosity } from "resinwright";
 * hardSphereViscosity({ solidFraction: 0.2, shear: "low" }).value; // → 1.996
 * hardSphereViscosity({ solidFraction: 0.2, shear: "low" }).u; // → 0.113
 * ```
 */
export function hardSphereViscosity(input: {
  readonly solidFraction: number;
  readonly shear: "low" | "high";
}): {
  readonly value: number;
  readonly u: number;
  readonly warnings: readonly Warning[];
} {
  const { solidFraction: phi, shear } = input;
  checkNumbers("hardSphereViscosity", { solidFraction: phi }, { solidFraction: fraction });
  if (shear !== "low" && shear !== "high") {
    throw new InputError(`hardSphereViscosity: shear is "${String(shear)}"; it must be "low" or "high"`);
  }
  const [cubic, u] = shear === "low" ? [42, 10] : [25, 7];
  const beyond: Warning = {
    code: "beyond-measured",
    message: `a volume fraction of ${phi} is above the 0.35 the polynomial was measured to; use kriegerDougherty or maronPierce`,
  };
  return {
    value: 1 + 2.5 * phi + 4 * phi ** 2 + cubic * phi ** 3,
    u: Math.hypot(2 * phi ** 2, u * phi ** 3),
    warnings: phi > 0.35 ? [beyond] : [],
  };
}

/**
 * Volume fraction of solid in a resin from its mass fraction.
 *
 * - `solidMassFraction`: w, mass of solid over mass of all, 0 to 1.
 * - `solidDensity_gcm3`: of the solid itself, not its bulk density, 0.1 to 25 g/cm3.
 * - `liquidDensity_gcm3`: of the liquid without solid, 0.1 to 25 g/cm3.
 *
 * phi = (w / rho_s) / (w / rho_s + (1 - w) / rho_l).
 *
 * Assumes particles without pores and volumes that add up.
 * @throws InputError when an argument is out of range.
 * @source Identity; volume fraction as IUPAC Green Book, 3rd ed. 2007, section 2.10 (from memory).
 * @example
 * ```ts
 * import { solidVolumeFraction } from "resinwright";
 * solidVolumeFraction({ solidMassFraction: 0.75, solidDensity_gcm3: 6, liquidDensity_gcm3: 1.1 }); // → 0.3548
 * ```
 */
export function solidVolumeFraction(input: {
  readonly solidMassFraction: number;
  readonly solidDensity_gcm3: number;
  readonly liquidDensity_gcm3: number;
}): number {
  const { solidMassFraction: w, solidDensity_gcm3, liquidDensity_gcm3 } = input;
  checkNumbers("solidVolumeFraction", input, {
    solidMassFraction: fraction,
    solidDensity_gcm3: density,
    liquidDensity_gcm3: density,
  });
  const solid = w / solidDensity_gcm3;
  return solid / (solid + (1 - w) / liquidDensity_gcm3);
}

/**
 * Volume fraction that particles take up together with the layer adsorbed or grafted on them.
 *
 * - `solidFraction`: phi of the bare particles, 0 to 1.
 * - `particleRadius_nm`: a, above 0, nm.
 * - `adsorbedLayer_nm`: delta, thickness of the layer, 0 or more, nm.
 *
 * phi_eff = phi (1 + delta / a)^3.
 *
 * Assumes spheres of one size with a layer that liquid does not flow through. It matters for particles below a micrometre:
 * 5 nm on 50 nm already add a third.
 * @throws InputError when an argument is out of range, or particle and layer would fill more than all the volume.
 * @source Geometry.
 * @example
 * ```ts
 * import { effectiveSolidFraction } from "resinwright";
 * effectiveSolidFraction({ solidFraction: 0.2, particleRadius_nm: 50, adsorbedLayer_nm: 5 }); // → 0.2662
 * ```
 */
export function effectiveSolidFraction(input: {
  readonly solidFraction: number;
  readonly particleRadius_nm: number;
  readonly adsorbedLayer_nm: number;
}): number {
  const where = "effectiveSolidFraction";
  const { solidFraction, particleRadius_nm, adsorbedLayer_nm } = input;
  checkNumbers(where, input, {
    solidFraction: fraction,
    particleRadius_nm: positive,
    adsorbedLayer_nm: notNegative,
  });
  return checkNumber(solidFraction * (1 + adsorbedLayer_nm / particleRadius_nm) ** 3, {
    where,
    field: "the volume fraction with the layer",
    ...fraction,
    advice: "the layers of so many particles overlap; take fewer, larger or barer ones",
  });
}

/** (1 - phi / phi_m)^-exponent, below the packing limit only. */
function relative(
  where: string,
  { solidFraction, packingLimit }: { readonly solidFraction: number; readonly packingLimit: number },
  exponent: number,
): number {
  if (solidFraction >= packingLimit) {
    throw new InputError(
      `${where}: solidFraction is ${solidFraction}, at or above the packing limit of ${packingLimit}; ` +
        "the particles touch and the paste does not flow, so take less solid or particles of several sizes",
    );
  }
  return checkNumber((1 - solidFraction / packingLimit) ** -exponent, {
    where,
    field: "the relative viscosity",
    ...positive,
    advice: "the solid is a hair below its packing limit; take less of it",
  });
}
