// The unit of a number is the ending of its field's name. The list of those endings stands here, once.

/** What a field-name ending means: the unit as people write it in tables, and as mathjs reads it. */
export interface FieldUnit {
  readonly label: string;
  readonly mathjs: string;
}

/** The endings of field names and the unit each stands for. `layerThickness_um` ends in `um`: micrometres. */
export const fieldUnits: Readonly<Record<string, FieldUnit>> = {
  mPas: { label: "mPa s", mathjs: "mPa s" },
  C: { label: "°C", mathjs: "degC" },
  K: { label: "K", mathjs: "K" },
  nm: { label: "nm", mathjs: "nm" },
  um: { label: "µm", mathjs: "um" },
  mm: { label: "mm", mathjs: "mm" },
  mm2: { label: "mm²", mathjs: "mm^2" },
  s: { label: "s", mathjs: "s" },
  pers: { label: "s⁻¹", mathjs: "s^-1" },
  g: { label: "g", mathjs: "g" },
  gcm3: { label: "g/cm³", mathjs: "g cm^-3" },
  perkg: { label: "kg⁻¹", mathjs: "kg^-1" },
  Jg: { label: "J/g", mathjs: "J g^-1" },
  JgK: { label: "J/(g K)", mathjs: "J g^-1 K^-1" },
  cm3mol: { label: "cm³/mol", mathjs: "cm^3 mol^-1" },
  gmol: { label: "g/mol", mathjs: "g mol^-1" },
  molL: { label: "mol/L", mathjs: "mol L^-1" },
  molm3: { label: "mol/m³", mathjs: "mol m^-3" },
  molm3s: { label: "mol/(m³ s)", mathjs: "mol m^-3 s^-1" },
  molm2s: { label: "mol/(m² s)", mathjs: "mol m^-2 s^-1" },
  molm3Pa: { label: "mol/(m³ Pa)", mathjs: "mol m^-3 Pa^-1" },
  molm2sPa: { label: "mol/(m² s Pa)", mathjs: "mol m^-2 s^-1 Pa^-1" },
  molmm2sPa: { label: "mol m/(m² s Pa)", mathjs: "mol m^-1 s^-1 Pa^-1" },
  m3mols: { label: "m³/(mol s)", mathjs: "m^3 mol^-1 s^-1" },
  Lmolcm: { label: "L/(mol cm)", mathjs: "L mol^-1 cm^-1" },
  mLgcm: { label: "mL/(g cm)", mathjs: "mL g^-1 cm^-1" },
  dLgcm: { label: "dL/(g cm)", mathjs: "dL g^-1 cm^-1" },
  percm: { label: "cm⁻¹", mathjs: "cm^-1" },
  m2s: { label: "m²/s", mathjs: "m^2 s^-1" },
  mms: { label: "mm/s", mathjs: "mm s^-1" },
  ms: { label: "m/s", mathjs: "m s^-1" },
  umsqrts: { label: "µm/√s", mathjs: "um s^-0.5" },
  mWcm2: { label: "mW/cm²", mathjs: "mW cm^-2" },
  mJcm2: { label: "mJ/cm²", mathjs: "mJ cm^-2" },
  Jmol: { label: "J/mol", mathjs: "J mol^-1" },
  barrer: { label: "barrer", mathjs: "barrer" },
  Pa: { label: "Pa", mathjs: "Pa" },
  MPa: { label: "MPa", mathjs: "MPa" },
  N: { label: "N", mathjs: "N" },
  pct: { label: "%", mathjs: "percent" },
};

/** The ending of a field name (`"um"` of `layerThickness_um`), or undefined where the name carries no unit. */
export function unitEndingOf(field: string): string | undefined {
  const ending = field.slice(field.lastIndexOf("_") + 1);
  return field.includes("_") && ending in fieldUnits ? ending : undefined;
}

/**
 * The unit of a field as tables and figures show it: `"µm"` for `layerThickness_um`, `""` for a field without unit.
 * @example
 * ```ts
 * import { unitLabel } from "resinwright";
 * unitLabel("layerThickness_um"); // → "µm"
 * unitLabel("massFraction"); // → ""
 * ```
 */
export function unitLabel(field: string): string {
  const ending = unitEndingOf(field);
  return ending === undefined ? "" : fieldUnits[ending]!.label;
}
