// A mass as people read it off the balance.

import type { Balance } from "../lab/batch.js";

/** A mass as the balance shows it, without its unit: as many decimals as its last digit has. */
export function massText(mass_g: number, { readability_g }: Balance): string {
  const shown = (decimals: number) => Number(readability_g.toFixed(decimals));
  let decimals = 0;
  while (decimals < 9 && Math.abs(shown(decimals) - readability_g) > 1e-9 * readability_g) decimals++;
  return mass_g.toFixed(decimals);
}
