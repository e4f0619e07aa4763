import { describe, expect, it } from "vitest";
import { assess } from "../../src/assess.ts";
import type { Finding } from "../../src/criteria/row.ts";
import type { DeckFile } from "../../src/layout/schema.ts";
import { deckFile, dropFile, type LayoutParts, layoutOf } from "../support/layout-of.ts";
import { rowOf } from "./row-of.ts";

const deg = (rad: number): number => (rad * 180) / Math.PI;
const STILL = { rate_rpm: 0 };
const down = { release: { speed_mps: 2, heading_deg: 0, elevation_deg: -90 } };
const object = { mass_kg: 0.4, diameter_m: 0.1, drag_coefficient: 0.47 };

/** A quantity of an object thrown straight down at a floor point, without spin. */
function held(quantity: string, deck: DeckFile, angle: number, axial: number, over: LayoutParts = {}, elevation = -90): Finding {
	const file = dropFile({
		from: { deck: deck.id, angle_deg: angle, axial_m: axial, height_m: 1 },
		object,
		release: { ...down.release, elevation_deg: elevation },
	});
	const layout = layoutOf({ spin: STILL, decks: [deck], use: ["test-set"], activities: [file], ...over });
	return assess(layout, [rowOf({ quantity, comparison: "at-least", limit: 0, unit: "" })]).findings[0]!;
}

describe("walkway clearance: from the sphere's rim to the nearest edge, negative inside", () => {
	const way = (id: string, from_deg: number, to_deg: number, from_m: number, to_m: number) => ({ id, from_deg, to_deg, from_m, to_m });
	/** 1 m of arc to each side of 10°, half a metre to each side of the middle. */
	const arc = deg(1 / 34);
	const curved = deckFile({ walkways: [way("a", 10 - arc, 10 + arc, -0.5, 0.5)] });
	const at = (along: number, axial: number): number => held("walkway_clearance_m", curved, 10 + deg(along / 34), axial).value!;

	it.each([
		["beside it", 0, 0.9, 0.4 - 0.05],
		["ahead of it", 1.3, 0, 0.3 - 0.05],
		["behind it", -1.3, 0.2, 0.3 - 0.05],
		["off a corner", 1.3, -0.9, 0.5 - 0.05],
		["within, nearest to its side", 0, 0.2, -0.3 - 0.05],
		["within, nearest to its end", 0.9, 0, -0.1 - 0.05],
		["on its edge", 0, 0.5, -0.05],
		["just clear of it", 0, 0.55 + 1e-6, 1e-6],
	])("%s", (_, along, axial, expected) => {
		expect(at(along, axial)).toBeCloseTo(expected, 8);
	});

	it("is to the nearest of several, and across ±180°", () => {
		const several = deckFile({ walkways: [way("a", 0, 10, -0.5, 0.5), way("b", 178, 182, 1, 2)] });
		expect(held("walkway_clearance_m", several, -178, 0.8).value).toBeCloseTo(0.2 - 0.05, 8);
		expect(held("walkway_clearance_m", several, -177, 1.5).value).toBeCloseTo((34 * Math.PI) / 180 - 0.05, 8);
	});

	it("runs along the tangent of a flat deck", () => {
		const flat = deckFile({
			floor: "flat",
			radius_m: 8,
			from_deg: -40,
			to_deg: 40,
			walkways: [way("a", 0, deg(Math.atan(2 / 8)), -0.5, 0.5)],
		});
		expect(held("walkway_clearance_m", flat, deg(Math.atan(2.6 / 8)), 0).value).toBeCloseTo(0.6 - 0.05, 8);
	});

	it("decides on the rim: touching the edge is clear of it", () => {
		expect(held("walkway_clearance_m", curved, 10, 0.55)).toMatchObject({ value: expect.closeTo(0, 9) });
		expect(held("walkway_clearance_m", curved, 10, 0.54).result).toBe("outside");
		expect(held("walkway_clearance_m", curved, 10, 0.56).result).toBe("within");
	});

	it("makes a landing on a walkway where it is negative", () => {
		const landings = (axial: number) => held("walkway_landings", curved, 10, axial).value;
		expect([0, 0.5, 0.5499, 0.5501, 2].map(landings)).toEqual([1, 1, 1, 0, 0]);
	});

	it("there is no such landing where there is no walkway or nothing comes down on a floor", () => {
		expect(held("walkway_landings", deckFile(), 0, 0)).toMatchObject({ value: 0, result: "within" });
		expect(held("walkway_landings", curved, 10, 0, {}, 90)).toMatchObject({ value: 0, result: "within" });
		expect(held("walkway_landings", curved, 10, 0)).toMatchObject({ value: 1 });
	});

	it("does not exist where there is no walkway or no floor is struck", () => {
		expect(held("walkway_clearance_m", deckFile(), 0, 0)).toMatchObject({ value: null, reason: 'deck "lower" has no walkway' });
		expect(held("walkway_clearance_m", curved, 0, 0, {}, 90)).toMatchObject({ value: null, reason: "it does not land on a deck" });
	});

	it("is asked of the deck landed on, not of the one it was dropped on", () => {
		const upper = deckFile({ id: "upper", radius_m: 31, walkways: [way("a", -5, 5, -2, 2)] });
		const lower = deckFile({ walkways: [way("b", -5, 5, 1, 2)] });
		const parts: LayoutParts = {
			decks: [lower, upper],
			elements: [{ id: "h", kind: "hatch", deck: "upper", angle_deg: 0, axial_m: 0, shape: "circle", diameter_m: 0.8 }],
		};
		expect(held("walkway_clearance_m", upper, 0, 0, parts).value).toBeCloseTo(1 - 0.05, 8);
		expect(held("hatches_passed", upper, 0, 0, parts).value).toBe(1);
		expect(held("coamings_struck", upper, 0, 0, parts).value).toBe(0);
		expect(held("hatches_passed", upper, 0, 0.39, parts).value).toBe(0);
		expect(held("coamings_struck", upper, 0, 0.39, parts).value).toBe(1);
	});
});
