import type { Air } from "../layout/habitat.ts";
import { GAS_CONSTANT, MOLAR_MASS_NITROGEN, MOLAR_MASS_OXYGEN } from "../quantity/constants.ts";

/** Density of a dry O2/N2 mix as an ideal gas, kg/m³: ρ = p M / (R_u T). The rise of pressure towards the rim is left out (0.6 % at 100 m and 1 g). */
export function airDensity(air: Air): number {
	const molarMass = air.oxygenFraction * MOLAR_MASS_OXYGEN + (1 - air.oxygenFraction) * MOLAR_MASS_NITROGEN;
	return (air.pressure * molarMass) / (GAS_CONSTANT * air.temperature);
}
