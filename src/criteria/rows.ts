import type { CriterionOwn, LayoutFile } from "../layout/schema.ts";
import type { CriterionRow } from "./row.ts";

/** The set whose rows hold for every layout. */
export const ALWAYS = "always";

/** What a layout is held against, and what of its criteria leads nowhere. */
export interface Rows {
	readonly rows: readonly CriterionRow[];
	/** Sets named that no shipped row belongs to. */
	readonly missing: readonly string[];
	/** Tailoring of a criterion that is not among `rows`, and why. */
	readonly untailored: readonly { readonly criterion: string; readonly reason: string }[];
}

/** Shipped rows of the sets a layout uses, but those that a row of its own replaces; its own rows; its tailoring. */
export function rowsFor(layout: LayoutFile, shipped: readonly CriterionRow[]): Rows {
	const { use, own = [], tailor = [] } = layout.criteria;
	const inUse = shipped.filter((row) => row.set === ALWAYS || use.includes(row.set));
	const shippedIds = new Set(inUse.map((row) => row.id));
	const ownIds = new Set(own.map((o) => o.id));
	const rows = [
		...inUse.filter((row) => !ownIds.has(row.id)),
		...own.map((o) => ownRow(o, shippedIds.has(o.id) ? `${o.note} Replaces the shipped criterion of this id.`.trim() : o.note)),
	];
	const tailored = new Map(tailor.map((t) => [t.criterion, t]));
	const held = new Set(rows.map((row) => row.id));
	const sets = new Set(shipped.map((row) => row.set));
	return {
		rows: rows.map((row) => {
			const change = tailored.get(row.id);
			if (!change) return row;
			return {
				...row,
				limit: change.limit,
				note: `${row.note} Tailored from ${`${row.limit} ${row.unit}`.trim()}: ${change.reason}`.trim(),
			};
		}),
		missing: use.filter((set) => !sets.has(set)),
		untailored: tailor
			.filter((t) => !held.has(t.criterion))
			.map(({ criterion }) => {
				const set = shipped.find((row) => row.id === criterion)?.set;
				return { criterion, reason: set === undefined ? "no criterion has this id" : `the layout does not use its set "${set}"` };
			}),
	};
}

const ownRow = (own: CriterionOwn, note: string): CriterionRow => ({
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
	note,
});
