import { unitNamed } from "../quantity/print-quantity.ts";
import { convertUnit, leadingUnit } from "../quantity/units.ts";
import type { Quantity } from "./quantity.ts";

/**
 * A quantity in the unit its limit is written in (symbol or spelling of the table of units); an empty unit is the
 * quantity's own. No value where the two do not measure the same thing.
 */
export function inLimitUnit(quantity: Quantity, unit: string): Quantity {
	if (quantity.value === null || unit === "" || unit === quantity.unit) return quantity;
	const own = unitNamed(quantity.unit);
	const asked = own && leadingUnit(own.dimension, unit);
	if (own && asked?.length === unit.length) return { value: convertUnit(quantity.value, own, asked.unit), unit };
	return { value: null, reason: `the limit is in ${unit}, the quantity ${quantity.unit === "" ? "has no unit" : `in ${quantity.unit}`}` };
}
