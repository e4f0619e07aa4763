import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { END, eventsOfDrop, GAP } from "../../src/activity/drop.ts";
import { FORMULAS } from "../../src/activity/formula.ts";
import { SUMMARY_KEYS } from "../../src/activity/keys.ts";
import type { Derivation } from "../../src/activity/result.ts";
import { assess } from "../../src/assess.ts";
import { RELATIVE_TOLERANCE } from "../../src/flight/drag-path.ts";
import { toss } from "../support/arbitrary.ts";
import { flown } from "../support/flown.ts";
import { deckFile, dropFile, type LayoutParts, layoutOf } from "../support/layout-of.ts";

const KEYS = Object.keys(SUMMARY_KEYS.drop);
const nine = (x: number): number => Number(x.toPrecision(9));

/** The inputs are the formula's terms in their order, with its units; none where the flight needed none. */
function follows(derivation: Derivation, key: string): void {
	const { terms } = FORMULAS[derivation.formula];
	expect(
		derivation.inputs.map((i) => [i.symbol, i.unit]),
		key,
	).toEqual(terms.map((t) => [t.symbol, t.unit]));
	for (const { value } of derivation.inputs) if (typeof value === "number") expect(Number.isFinite(value), key).toBe(true);
}

describe("the summary of a drop", () => {
	it("has every key of the contract in its order; every number written to 9 figures, finite, with its derivation; every null with a reason", () => {
		fc.assert(
			fc.property(toss(), fc.boolean(), fc.boolean(), ({ parts, file }, drag, feet) => {
				const given = { ...file, drag, ...(feet ? { feet: { angle_deg: file.from.angle_deg, axial_m: 0, facing_deg: 0 } } : {}) };
				const { cases } = assess(layoutOf({ ...parts, activities: [given] }), []);
				const { summary, reasons, derivations } = cases[0]!;
				expect(Object.keys(summary)).toEqual(KEYS);
				for (const [key, value] of Object.entries(summary)) {
					if (value === null) {
						expect(reasons[key], key).toBeTruthy();
						continue;
					}
					expect(reasons[key], key).toBeUndefined();
					if (typeof value === "number") {
						expect(Number.isFinite(value), key).toBe(true);
						expect(value, key).toBe(nine(value));
						expect(Object.is(value, -0), key).toBe(false);
					}
					follows(derivations[key]!, key);
				}
			}),
			{ seed: 81, numRuns: 120 },
		);
	});

	it("can be reckoned again from its derivations", () => {
		fc.assert(
			fc.property(toss({ floor: "curved", atRest: true }), ({ parts, file }) => {
				const { cases } = assess(layoutOf({ ...parts, activities: [file] }), []);
				const { summary, derivations } = cases[0]!;
				const put = (key: string): Record<string, number> =>
					Object.fromEntries((derivations[key]?.inputs ?? []).map((i) => [i.symbol, Number(i.value)]));
				const close = (key: string, value: number): void =>
					expect(Math.abs((summary[key] as number) - value), key).toBeLessThan(1e-5 * (1 + Math.abs(value)));
				const rest = put("landing_prograde_m");
				const phi = (rest.φ! * Math.PI) / 180;
				close("landing_prograde_m", -rest.R! * (Math.tan(phi) - phi));
				close("flight_time_s", Math.tan(phi) / ((rest.Ω! * Math.PI) / 30));
				const v = put("landing_speed_mps");
				close("landing_speed_mps", Math.hypot(v.v_down!, v.v_pro!, v.v_axial!));
				const a = put("landing_angle_deg");
				close("landing_angle_deg", (Math.acos(Math.min(1, a.v_down! / a.v!)) * 180) / Math.PI);
				const e = put("impact_energy_J");
				close("impact_energy_J", 0.5 * e.m! * e.v! ** 2);
				const h = put("equal_earth_drop_m");
				close("equal_earth_drop_m", h.v! ** 2 / (2 * 9.80665));
			}),
			{ seed: 82, numRuns: 100 },
		);
	});
});

describe("a derivation stands beside the summary", () => {
	const derived = (parts: LayoutParts, file: ReturnType<typeof dropFile>) =>
		assess(layoutOf({ ...parts, activities: [file] }), []).cases[0]!;
	const put = (d: Derivation): Record<string, number> => Object.fromEntries(d.inputs.map((i) => [i.symbol, Number(i.value)]));

	it("of the gap, with its axial part", () => {
		const object = { mass_kg: 0.2, diameter_m: 0.12, drag_coefficient: 1 };
		const release = { speed_mps: 3, heading_deg: 40, elevation_deg: 50 };
		for (const drag of [false, true]) {
			const { derivations, motion, summary } = derived({}, dropFile({ object, release, drag }));
			const { gap } = motion!;
			const v = put(derivations[GAP]!);
			follows(derivations[GAP]!, GAP);
			expect(v.s).toBe(summary.landing_prograde_m);
			expect(v.s_z).toBe(summary.landing_axial_m);
			expect(v.s! - v["s₀"]!).toBeCloseTo(gap!.prograde, 7);
			expect(v.s_z! - v["s_z₀"]!).toBeCloseTo(gap!.axial, 7);
			expect(Math.abs(gap!.axial)).toBeGreaterThan(0.01);
		}
	});

	it("of the time, where nothing is struck: that it was followed for", () => {
		const drain = { id: "drain", kind: "hatch", deck: "lower", angle_deg: 0, axial_m: 0, shape: "circle", diameter_m: 1.5 } as const;
		const still = derived({ spin: { rate_rpm: 0 } }, dropFile());
		expect(put(still.derivations[END]!).t).toBe(600);
		expect(still.derivations[END]!.assumptions.join(" ")).toMatch(/10 turns.*600 s/);
		const out = derived({ elements: [drain] }, dropFile());
		expect(put(out.derivations[END]!).t).toBeCloseTo(out.motion!.flight.end, 7);
		expect(out.derivations[END]!.assumptions.join(" ")).toMatch(/out of the hatch/);
		for (const c of [still, out]) follows(c.derivations[END]!, END);
		expect(derived({}, dropFile()).derivations[END]).toBeUndefined();
	});

	it("and the tolerance it names is the one that is kept", () => {
		expect(FORMULAS["drag-flight"].source).toContain(`relative tolerance ${RELATIVE_TOLERANCE}`);
	});
});

describe("an offset that does not exist says why", () => {
	const feet = { angle_deg: 0, axial_m: 0, facing_deg: 0 };
	const thrown = (parts: LayoutParts, from: object, release: object, feet_deg = 0) =>
		flown(
			{ spin: { rate_rpm: 0 }, ...parts },
			dropFile({
				from: { deck: "lower", angle_deg: 0, axial_m: 0, height_m: 1, ...from },
				release: { speed_mps: 5, heading_deg: 0, elevation_deg: 0, ...release },
				feet: { ...feet, angle_deg: feet_deg },
			}),
		);

	it("on a side bulkhead and on an end bulkhead", () => {
		const wedge = deckFile({ from_deg: -4, to_deg: 4 });
		const side = thrown({ decks: [wedge] }, { height_m: 2 }, {});
		expect(side.summary.struck).toBe("side-high:lower");
		for (const key of ["landing_prograde_m", "landing_from_feet_prograde_m"])
			expect(side.reasons[key]).toBe("a side bulkhead has no prograde direction of its own");
		expect(side.summary.landing_axial_m).toBe(0);
		const end = thrown({ decks: [wedge] }, {}, { heading_deg: 90 });
		expect(end.summary.struck).toBe("end-high:lower");
		for (const key of ["landing_axial_m", "landing_from_feet_axial_m"])
			expect(end.reasons[key]).toBe("an end bulkhead has no axial direction of its own");
		expect(end.summary.landing_prograde_m).toBe(0);
	});

	it("where straight down from the release the struck deck is not", () => {
		/** From 7 m along a flat deck up through a wide hatch in a deck of radius 6 m, and on to its floor. */
		const parts: LayoutParts = {
			decks: [
				deckFile({ floor: "flat", radius_m: 10, from_deg: -50, to_deg: 50 }),
				deckFile({ id: "inner", radius_m: 6, headroom_m: 2.4 }),
			],
			elements: [{ id: "h", kind: "hatch", deck: "inner", angle_deg: 0, axial_m: 0, shape: "rectangle", along_m: 5, across_m: 2 }],
		};
		const away = (7 / 10) * (180 / Math.PI);
		const release = { heading_deg: 180, elevation_deg: (Math.atan(2.3 / 4) * 180) / Math.PI };
		const found = (feet_deg: number) => thrown(parts, { angle_deg: (Math.atan(7 / 10) * 180) / Math.PI, height_m: 0.1 }, release, feet_deg);
		const { summary, reasons } = found(away);
		expect([summary.struck, summary.passed]).toEqual(["deck:inner", ["h"]]);
		expect(reasons.landing_prograde_m).toBe('the line straight down from the release does not meet deck "inner"');
		expect(reasons.landing_from_feet_prograde_m).toBe('the line straight down from the feet does not meet deck "inner"');
		expect(found(0).reasons.landing_from_feet_prograde_m).toBeUndefined();
	});
});

describe("when", () => {
	const profile = [
		{ t_s: 0, rate_rpm: 2 },
		{ t_s: 100, rate_rpm: 6 },
	];
	it("start_s says where on the profile it begins, and another phase is at its own constant rate", () => {
		const spin = { rate_rpm: 2, profile };
		const time = (over: object): number =>
			flown({ spin, phases: [{ id: "slow", rate_rpm: 1 }] }, dropFile(over)).summary.flight_time_s as number;
		const rest = (rpm: number): number => (Math.tan(Math.acos(32.5 / 34)) * 30) / (rpm * Math.PI);
		expect(time({ start_s: 1000 })).toBeCloseTo(rest(6), 7);
		expect(time({ phase: "slow", start_s: 1000 })).toBeCloseTo(rest(1), 7);
		/** At the middle of the ramp 4 rpm, rising: what turns faster comes up to meet it. */
		expect(time({ start_s: 50 })).toBeCloseTo(rest(4), 7);
		expect(time({})).toBeCloseTo(rest(2), 3);
	});
	it("changing spin alters where it lands, not when: the fall is straight in the inertial frame", () => {
		const at = (spin: LayoutParts["spin"], start_s: number) => flown({ spin: spin! }, dropFile({ start_s })).summary;
		const changing = at({ rate_rpm: 2, profile }, 50);
		const constant = at({ rate_rpm: 4 }, 0);
		expect(changing.flight_time_s).toBeCloseTo(constant.flight_time_s as number, 8);
		expect(changing.landing_prograde_m).toBeLessThan((constant.landing_prograde_m as number) - 0.01);
	});
	it("every crew member and phase is a case of its own", () => {
		const crew = [
			{ id: "one", stature_m: 1.9, mass_kg: 90 },
			{ id: "two", stature_m: 1.5, mass_kg: 50 },
		];
		const file = dropFile({ crew: ["one", "two"], phase: ["nominal", "slow"] });
		const { cases } = assess(layoutOf({ crew, phases: [{ id: "slow", rate_rpm: 2 }], activities: [file] }), []);
		expect(cases.map((c) => [c.crew, c.phase])).toEqual([
			["one", "nominal"],
			["one", "slow"],
			["two", "nominal"],
			["two", "slow"],
		]);
		expect(cases[0]!.summary.flight_time_s).toBe(cases[2]!.summary.flight_time_s);
		expect(cases[1]!.summary.flight_time_s).toBeCloseTo((cases[0]!.summary.flight_time_s as number) * 1.8, 7);
		expect(cases[1]!.summary.landing_prograde_m).toBeCloseTo(cases[0]!.summary.landing_prograde_m as number, 7);
	});
});

describe("the release", () => {
	const at = { deck: "lower", angle_deg: 90, axial_m: 0.5, height_m: 1.5 };
	it.each([
		["prograde", 0, 0, [-2, 0, 0]],
		["axial", 90, 0, [0, 0, 2]],
		["retrograde", 180, 0, [2, 0, 0]],
		["against the axis", 270, 0, [0, 0, -2]],
		["up", 0, 90, [0, -2, 0]],
		["down", 0, -90, [0, 2, 0]],
	] as const)("%s at 90° on a curved deck", (_, heading_deg, elevation_deg, expected) => {
		const { position, velocity } = flown({}, dropFile({ from: at, release: { speed_mps: 2, heading_deg, elevation_deg } })).drop;
		for (const [i, value] of [0, 32.5, 0.5].entries()) expect(position[i]).toBeCloseTo(value, 12);
		for (const [i, value] of expected.entries()) expect(velocity[i]).toBeCloseTo(value, 12);
	});
	it("on a flat deck goes by the deck's own directions", () => {
		const parts: LayoutParts = { decks: [deckFile({ floor: "flat", radius_m: 20, from_deg: 60, to_deg: 120 })] };
		const { position, velocity } = flown(
			parts,
			dropFile({
				from: { ...at, angle_deg: 90 + (Math.atan(3 / 20) * 180) / Math.PI },
				release: { speed_mps: 2, heading_deg: 0, elevation_deg: 30 },
			}),
		).drop;
		for (const [i, value] of [-3, 18.5, 0.5].entries()) expect(position[i]).toBeCloseTo(value, 12);
		for (const [i, value] of [-Math.sqrt(3), -1, 0].entries()) expect(velocity[i]).toBeCloseTo(value, 12);
	});
});

describe("events", () => {
	it("tell the release, each hatch passed at its time, and the end, in order", () => {
		const parts: LayoutParts = {
			spin: { rate_rpm: 0 },
			decks: [deckFile({ radius_m: 33 }), deckFile({ id: "upper", radius_m: 30 })],
			elements: [{ id: "h", kind: "hatch", deck: "upper", angle_deg: 0, axial_m: 0, shape: "circle", diameter_m: 0.8 }],
		};
		const { drop } = flown(
			parts,
			dropFile({
				from: { deck: "upper", angle_deg: 0, axial_m: 0, height_m: 1 },
				release: { speed_mps: 2, heading_deg: 0, elevation_deg: -90 },
			}),
		);
		const events = eventsOfDrop(drop);
		expect(events.map((e) => e.name)).toEqual(["release", "passes h", "lands"]);
		for (const [i, t] of [0, 0.8, 2].entries()) expect(events[i]!.t).toBeCloseTo(t, 10);
	});
});
