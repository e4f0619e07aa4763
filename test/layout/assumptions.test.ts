import { expect, test } from "vitest";
import { ASSUMPTIONS, assumptionsOf } from "../../src/layout/assumptions.ts";
import { assumptions } from "../../src/layout/schema.ts";
import { changed } from "./support.ts";

test("the defaults are those of the mechanics", () => {
	expect(assumptionsOf(changed(() => {}))).toEqual({
		values: {
			settle_threshold_degps: 2,
			canal_tau_s: 5.7,
			canal_tau_short_s: 0.005,
			adaptation_tau_s: null,
			standoff_m: 0.3,
			mass_centre_fraction: 0.56,
			hand_fraction: 0.82,
			leg_fraction: 0.53,
		},
		overridden: [],
	});
});

test("what the layout overrides is used and listed with what it replaces", () => {
	const layout = changed((l) => Object.assign(l, { assumptions: { canal_tau_s: 4.2, adaptation_tau_s: 80 } }));
	const { values, overridden } = assumptionsOf(layout);
	expect(values).toMatchObject({ canal_tau_s: 4.2, adaptation_tau_s: 80, standoff_m: 0.3 });
	expect(overridden.map((o) => [o.key, o.value, o.used])).toEqual([
		["canal_tau_s", 5.7, 4.2],
		["adaptation_tau_s", null, 80],
	]);
});

test("every key of the file has its default, basis and source", () => {
	expect(ASSUMPTIONS.map((a) => a.key)).toEqual(Object.keys(assumptions.shape));
	for (const a of ASSUMPTIONS) expect(a.source.length).toBeGreaterThan(10);
});
