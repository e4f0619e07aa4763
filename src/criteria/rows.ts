import type { LayoutFile } from "../layout/schema.ts";
import type { CriterionRow } from "./row.ts";

/** The set whose rows hold for every layout. */
export const ALWAYS = "always";

/** The rows a layout is held against: shipped rows of the sets it uses, its own rows, and its tailoring; with the sets it names that no row belongs to. */
export function rowsFor(layout: LayoutFile, shipped: readonly CriterionRow[]): { rows: CriterionRow[]; missing: string[] } {
	const use = layout.criteria.use;
	const rows = shipped.filter((row) => row.set === ALWAYS || use.includes(row.set));
	for (const own of layout.criteria.own ?? []) {
		rows.push({
			id: own.id,
			title: own.title,
			set: "own",
			appliesTo: Array.isArray(own.applies_to) ? own.applies_to : [own.applies_to as string],
			quantity: own.quantity,
			comparison: own.comparison,
			limit: own.limit,
			unit: own.unit,
			force: own.force,
			basis: own.basis,
			source: own.source,
			clause: "",
			exposure: "any",
			note: own.note,
		});
	}
	const tailored = new Map((layout.criteria.tailor ?? []).map((t) => [t.criterion, t]));
	const known = new Set(shipped.map((row) => row.set));
	return {
		rows: rows.map((row) => {
			const change = tailored.get(row.id);
			return change
				? { ...row, limit: change.limit, note: `${row.note} Tailored from ${row.limit} ${row.unit}: ${change.reason}`.trim() }
				: row;
		}),
		missing: use.filter((set) => !known.has(set)),
	};
}
