import { describe, expect, test } from "vitest";
import { changed } from "../layout/support.ts";
import { type DropFile, deckFile, type LayoutParts } from "../support/layout-of.ts";
import { documentOf, type Entry, entryOf } from "./support.ts";

const NUMBERS =
	"flight_time_s landing_prograde_m landing_axial_m landing_radius_m landing_speed_mps landing_angle_deg landing_from_feet_prograde_m landing_from_feet_axial_m impact_energy_J equal_earth_drop_m".split(
		" ",
	);
const words = ({ summary, reasons }: Entry): object => ({
	struck: summary.struck,
	passed: summary.passed,
	open: NUMBERS.filter((key) => summary[key] === null && reasons[key]).length,
});

describe("the demo's hatch", () => {
	/** The demo with nothing but a drop from its crew deck, and what it is held against for dropped things. */
	const through = (over: Partial<DropFile>) => {
		const layout = changed((l) => {
			const [driver] = l.activities;
			l.activities = [{ ...driver, feet: { angle_deg: 3, axial_m: 0.8, facing_deg: 0 }, ...over }];
			l.criteria.use = ["dropped-objects"];
		});
		const { activities, findings } = documentOf(layout, true);
		const verdicts = Object.fromEntries(findings.map((f) => [f.criterion, [f.value, f.result]]));
		return { entry: activities[0] as Entry, verdicts };
	};
	const above = (angle_deg: number): DropFile["from"] => ({ deck: "upper", angle_deg, axial_m: 0.8, height_m: 1 });

	test("over its middle: passed, then the deck below, offsets along the struck floor", () => {
		const { entry, verdicts } = through({ from: above(4.3) });
		expect(words(entry)).toEqual({ struck: "deck:lower", passed: ["hatch-a"], open: 0 });
		// No table of its own: from r₀ = 30.2 m to R_c = 33.97 m, cos φ = r₀/R_c, s = −R (tan φ − φ), R = 34 m.
		const phi = Math.acos(30.2 / 33.97);
		expect(entry.summary.landing_prograde_m).toBeCloseTo(-34 * (Math.tan(phi) - phi), 7);
		expect(entry.summary.flight_time_s).toBeCloseTo(Math.tan(phi) / ((3.6 * Math.PI) / 30), 7);
		expect(entry.summary.landing_radius_m).toBe(34);
		const times = entry.series?.events.map((e) => e.t_s) as number[];
		expect(entry.series?.events.map((e) => e.name)).toEqual(["release", "passes hatch-a", "lands"]);
		// Passed when the centre is d/2 beyond the far end of the shaft: the ceiling below, r = 34 − 2.4 m.
		expect(times[1]).toBeCloseTo(Math.tan(Math.acos(30.2 / 31.63)) / ((3.6 * Math.PI) / 30), 7);
		expect(verdicts).toMatchObject({ "dropped-hatch": [1, "outside"], "dropped-coaming": [0, "within"] });
	});

	test("over its edge: the coaming, nothing passed", () => {
		const { entry, verdicts } = through({ from: above(3.6) });
		expect(words(entry)).toEqual({ struck: "coaming:hatch-a", passed: [], open: 0 });
		expect(verdicts).toMatchObject({ "dropped-hatch": [0, "within"], "dropped-coaming": [1, "outside"] });
	});

	test("beside it: the floor, nothing passed", () => {
		const { entry, verdicts } = through({ from: above(2) });
		expect(words(entry)).toEqual({ struck: "deck:upper", passed: [], open: 0 });
		expect(verdicts).toMatchObject({ "dropped-hatch": [0, "within"], "dropped-coaming": [0, "within"] });
	});

	test("thrown up through it from below", () => {
		const release = { speed_mps: 9, heading_deg: 0, elevation_deg: 88 };
		const { entry, verdicts } = through({ from: { deck: "lower", angle_deg: 3.7, axial_m: 0.8, height_m: 1.5 }, release });
		expect(words(entry)).toMatchObject({ passed: ["hatch-a"], open: 0 });
		expect(entry.summary.struck).toMatch(/:upper$/);
		expect(verdicts).toMatchObject({ "dropped-hatch": [1, "outside"] });
	});
});

const hatch = { id: "drain", kind: "hatch", deck: "lower", angle_deg: 0, axial_m: 0, shape: "circle", diameter_m: 1.5 } as const;

test("through a hatch with no deck below: outside, passed, every landing number null with the reason", () => {
	const entry = entryOf({ elements: [hatch] }, { feet: { angle_deg: -1, axial_m: 0, facing_deg: 0 } });
	expect(words(entry)).toEqual({ struck: "outside", passed: ["drain"], open: NUMBERS.length });
	for (const key of NUMBERS) expect(entry.reasons[key]).toMatch(/left|outside/);
	expect(entry.series.events.map((e) => e.name)).toEqual(["release", "passes drain", "leaves the bay"]);
});

test.each<[string, LayoutParts, Partial<DropFile>, number]>([
	["at rest where nothing turns", { spin: { rate_rpm: 0 } }, {}, 600],
	["left behind by the spin", {}, { release: { speed_mps: (3.6 * Math.PI * 32.5) / 30, heading_deg: 180, elevation_deg: 0 } }, 600],
	[
		"left behind for ten turns, longer than 600 s",
		{ spin: { rate_rpm: 0.5 } },
		{ release: { speed_mps: (0.5 * Math.PI * 32.5) / 30, heading_deg: 180, elevation_deg: 0 } },
		1200,
	],
])("never struck, %s: none, nothing passed, every landing number null with the reason", (_, parts, drop, until) => {
	const entry = entryOf({ decks: [deckFile()], ...parts }, { ...drop, feet: { angle_deg: 1, axial_m: 0, facing_deg: 180 } });
	expect(words(entry)).toEqual({ struck: "none", passed: [], open: NUMBERS.length });
	for (const key of NUMBERS) expect(entry.reasons[key]).toMatch(/struck/);
	expect(entry.series.events.at(-1)).toEqual({ t_s: until, name: "is no longer followed" });
});
