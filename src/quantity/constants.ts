/** Standard gravity, m/s² (exact; CGPM 1901, NIST SP 811). */
export const STANDARD_GRAVITY = 9.80665;
/** Molar gas constant, J/(mol K) (exact since the 2019 SI). */
export const GAS_CONSTANT = 8.314462618;
/** Molar mass of O2, kg/mol. */
export const MOLAR_MASS_OXYGEN = 0.0319988;
/** Molar mass of N2, kg/mol. */
export const MOLAR_MASS_NITROGEN = 0.0280134;
export const TAU = 2 * Math.PI;
