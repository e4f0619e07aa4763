import { convertUnit, leadingUnit, UNITS, type Unit } from "./units.ts";

export type QuantityFault =
	| { readonly kind: "empty" }
	| { readonly kind: "not-a-number"; readonly text: string }
	| { readonly kind: "unknown-unit"; readonly unit: string; readonly known: readonly string[] }
	| { readonly kind: "unclear"; readonly text: string };

export type ReadQuantity = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly fault: QuantityFault };

const NUMBER = /^(?:\d+\.?\d*|\.\d+)(?:[eE][+\-−]?\d+)?/;

/**
 * Reads what a person typed, as a number of `unit`: a bare number is taken in that unit, another unit of its
 * dimension is converted, and falling units add up ("6 ft 2 in", "1 min 30 s", "4° 30′"). The sign stands before
 * the whole. A comma is refused, because it is a decimal sign to some readers and groups thousands for others.
 */
export function readQuantity(text: string, unit: Unit): ReadQuantity {
	const whole = text.trim();
	const fault = (f: QuantityFault): ReadQuantity => ({ ok: false, fault: f });
	if (whole === "") return fault({ kind: "empty" });
	const sign = /^[-−–]/.test(whole) ? -1 : 1;
	let rest = whole.replace(/^[-−–+]\s*/, "");
	let total = 0;
	let larger = Number.POSITIVE_INFINITY;
	for (let terms = 0; rest !== ""; terms++) {
		const digits = NUMBER.exec(rest)?.[0];
		if (digits === undefined) return fault({ kind: "not-a-number", text: whole });
		rest = rest.slice(digits.length).trimStart();
		const named = leadingUnit(unit.dimension, rest);
		if (!named && rest !== "" && !/^[\d.,]/.test(rest))
			return fault({ kind: "unknown-unit", unit: rest, known: UNITS.filter((u) => u.dimension === unit.dimension).map((u) => u.symbol) });
		const used = named?.unit ?? unit;
		rest = rest.slice(named?.length ?? 0).trimStart();
		const compound = terms > 0 || rest !== "";
		if (compound && (!named || used.offset !== 0 || used.factor >= larger)) return fault({ kind: "unclear", text: whole });
		total += convertUnit(sign * Number(digits.replace("−", "-")), used, unit);
		larger = used.factor;
	}
	return Number.isFinite(total) ? { ok: true, value: total === 0 ? 0 : total } : fault({ kind: "not-a-number", text: whole });
}
