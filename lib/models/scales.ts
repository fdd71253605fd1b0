// Scales between units that more than one model needs, the zero of Celsius and the gas constant.
// A length over `um_per_cm` goes from um to cm; factors that a single formula needs stay in that formula.

export const um_per_cm = 1e4;

export const um_per_m = 1e6;

/** Not 1 / um_per_m: a product with it differs from that quotient in the last bit. */
export const m_per_um = 1e-6;

export const cm_per_m = 100;

/** 0 degrees Celsius on the absolute scale. */
export const zeroCelsius_K = 273.15;

/** Absolute temperature, K. */
export const kelvin = (temperature_C: number): number => temperature_C + zeroCelsius_K;

/** Molar gas constant, exact since the SI of 2019. */
export const gasConstant_JmolK = 8.31446261815324;
