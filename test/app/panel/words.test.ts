import { describe, expect, test } from "vitest";
import {
	findingWords,
	fromFeetWords,
	headingWords,
	headline,
	headlineWords,
	inWords,
	nameOf,
	quantityWords,
	sourceWords,
	standing,
} from "../../../app/panel/words.ts";
import { type AssessedCase, assessLayout, type LayoutFile } from "../../../app/store/core.ts";
import { printer } from "../../../app/store/print.ts";
import { GAP } from "../../../src/activity/drop.ts";
import { findingOf } from "../../support/finding-of.ts";
import { deckFile, dropFile, layoutOf } from "../../support/layout-of.ts";

const si = printer("si");
const plain = (s: string): string => s.replace(/[\u00A0\u202F]/g, " ");
const only = (layout: LayoutFile): AssessedCase => {
	const [c] = assessLayout(layout).cases;
	if (!c) throw new Error("the layout has no case");
	return c;
};
const dropped = (over: Parameters<typeof dropFile>[0] = {}): AssessedCase => only(layoutOf({ activities: [dropFile(over)] }));

describe("the headline", () => {
	test("a drop: the gap, against spin of the hand", () => {
		const h = headline(dropped(), si);
		// Closed form: s = R (tan φ − φ), cos φ = (R − h)/R, R 34 m, h 1.5 m.
		const phi = Math.acos(32.5 / 34);
		expect(h?.value).toBeCloseTo(34 * (Math.tan(phi) - phi), 7);
		expect(h).toMatchObject({ lead: "Lands", tail: "against spin of your hand", key: "landing_prograde_m", also: "" });
	});
	test("a toss is held against the landing without turning", () => {
		const h = headline(dropped({ release: { speed_mps: 2, heading_deg: 0, elevation_deg: 30 } }), si);
		expect(h?.tail).toMatch(/^(with|against) spin of where it would land without turning$/);
		expect(h?.key).toBe(GAP);
		expect(h?.also).toMatch(/with spin of your hand\.$/);
	});
	test("nothing turns: nothing is struck", () => {
		const c = only(layoutOf({ spin: { rate_rpm: 0 }, activities: [dropFile()] }));
		expect(plain(headlineWords(c, si))).toBe("Has struck nothing after 600 s of flight.");
		expect(c.derivations[headline(c, si)?.key ?? ""]?.formula).toBe("free-flight");
		expect(standing(c)).toEqual({ level: 0, tilt: 0 });
	});
});

describe("from the feet", () => {
	// The object is let go 0.6 m with spin of the feet and 0.2 m axial of them, and lands 0.302 m against spin of the hand.
	const at = (facing_deg: number): string =>
		plain(
			fromFeetWords(
				dropped({
					from: { deck: "lower", angle_deg: 0, axial_m: 0.2, height_m: 1.5 },
					feet: { angle_deg: -((0.6 / 34) * 180) / Math.PI, axial_m: 0, facing_deg },
				}),
				si,
			),
		);
	test.each([
		[0, "0.29 m in front of your feet and 0.20 m to the right"],
		[90, "0.20 m in front of your feet and 0.29 m to the left"],
		[180, "0.29 m behind your feet and 0.20 m to the left"],
		[270, "0.20 m behind your feet and 0.29 m to the right"],
	])("facing %d°: %s", (facing, words) => expect(at(facing)).toBe(words));
	test("unsaid where the layout does not place the person", () => expect(fromFeetWords(dropped(), si)).toBe(""));
});

describe("in words", () => {
	test("who, where, what gravity, what happens, with units", () => {
		const layout = layoutOf({ activities: [dropFile({ feet: { angle_deg: 0, axial_m: 0, facing_deg: 180 } })] });
		const said = plain(inWords(only(layout), layout, si).join(" "));
		expect(said).toContain("Crew member one, 1.75 m tall, stands on the Deck, facing against spin.");
		expect(said).toContain(
			"The spin rate is 3.60 rpm (phase nominal). Apparent gravity at the feet is 0.493 g, straight down to the deck.",
		);
		expect(said).toContain("Drop from 1.50 m, an object of 0.400 kg, without air drag.");
		expect(said).toContain("bounce and roll are not modelled");
	});
	test("a flat deck away from its middle tilts the vertical", () => {
		const deck = deckFile({ floor: "flat", from_deg: -20, to_deg: 20 });
		const layout = layoutOf({ decks: [deck], activities: [dropFile({ feet: { angle_deg: 10, axial_m: 0, facing_deg: 0 } })] });
		expect(standing(only(layout))?.tilt).toBeCloseTo((10 * Math.PI) / 180, 9);
		expect(plain(inWords(only(layout), layout, si).join(" "))).toContain("tilted 10.0° from the deck’s own down");
	});
});

test.each([
	[0, "with spin"],
	[360, "with spin"],
	[-180, "against spin"],
	[90, "along the axis (+axial)"],
	[-90, "along the axis (−axial)"],
	[33.33, "at heading 33.3°"],
])("heading %d is %s", (deg, words) => expect(headingWords(deg)).toBe(words));

test("ids and quantities as words", () => {
	expect([nameOf("drop-driver"), nameOf("x"), nameOf("a_b")]).toEqual(["Drop driver", "X", "A b"]);
	expect(quantityWords(findingOf({ quantity: "walkway_clearance_m" }))).toBe("walkway clearance");
	expect(sourceWords(findingOf({ source: "Stone 1973, somewhere" }))).toBe("Stone 1973");
	expect(sourceWords(findingOf({ source: "Common practice, no source" }))).toBe("");
});

test("a finding says its word, force, value, limit, and that it is unverified", () => {
	expect(plain(findingWords(findingOf({ result: "outside", value: 3, basis: "unverified", title: "Energy" }), si))).toBe(
		"Outside (should, unverified, confirm): Energy: impact energy 3.00 J, at most 2.00 J.",
	);
	expect(findingWords(findingOf({ result: "not-assessed", value: null, margin: null, reason: "not built", title: "Grip" }), si)).toBe(
		"Not assessed (should): Grip: not built.",
	);
});
