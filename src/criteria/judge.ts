import { written } from "../quantity/round.ts";
import { inLimitUnit } from "./limit-unit.ts";
import type { Quantity } from "./quantity.ts";
import type { CriterionRow, Finding, FindingPlace } from "./row.ts";

/** Who and where a row is held against. */
export interface Subject {
	readonly subject: string;
	readonly crew: string | null;
	readonly phase: string;
	readonly at: FindingPlace;
}

/** Relative margin to a limit; for a limit of 0 the difference. Equality is 0, which is within. */
export function marginOf(comparison: "at-most" | "at-least", value: number, limit: number): number {
	const room = comparison === "at-most" ? limit - value : value - limit;
	return written(limit === 0 ? room : room / Math.abs(limit));
}

/** Holds one row against one quantity: the only place where a result is decided, on the written values in the unit of the limit. */
export function judge(row: CriterionRow, who: Subject, found: Quantity, exposure: "sustained" | "transient"): Finding {
	const quantity = inLimitUnit(found, row.unit);
	const base = {
		criterion: row.id,
		title: row.title,
		force: row.force,
		...who,
		quantity: row.quantity,
		unit: quantity.value === null ? row.unit : quantity.unit,
		limit: row.limit,
		comparison: row.comparison,
		basis: row.basis,
		source: row.clause ? `${row.source}, ${row.clause}` : row.source,
		note: row.note,
	};
	if (quantity.value === null) return { ...base, value: null, margin: null, result: "not-assessed", reason: quantity.reason };
	const value = written(quantity.value);
	if (row.exposure !== "any" && row.exposure !== exposure)
		return { ...base, value, margin: null, result: "not-assessed", reason: `a ${exposure} value against a ${row.exposure} limit` };
	const margin = marginOf(row.comparison, value, row.limit);
	return { ...base, value, margin, result: margin >= 0 ? "within" : "outside" };
}
