import type { Finding } from "../../src/criteria/row.ts";

let count = 0;

/** A finding within its limit, each with a criterion of its own, unless said otherwise. */
export const findingOf = (over: Partial<Finding> = {}): Finding => ({
	criterion: `criterion-${++count}`,
	title: "Something",
	force: "should",
	subject: "drop",
	crew: "one",
	phase: "nominal",
	quantity: "impact_energy_J",
	value: 1,
	unit: "J",
	limit: 2,
	comparison: "at-most",
	margin: 0.5,
	at: {},
	result: "within",
	basis: "standard",
	source: "A standard",
	note: "",
	...over,
});
