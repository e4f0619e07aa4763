import type { CriterionRow } from "../../src/criteria/row.ts";

/** A row on the impact energy of a drop, at most 2 J, unless said otherwise. */
export const rowOf = (over: Partial<CriterionRow> = {}): CriterionRow => ({
	id: "row",
	title: "Energy at the first impact",
	set: "test-set",
	appliesTo: ["drop"],
	quantity: "impact_energy_J",
	comparison: "at-most",
	limit: 2,
	unit: "J",
	force: "should",
	basis: "standard",
	source: "A standard",
	clause: "",
	exposure: "any",
	note: "",
	...over,
});
