import { describe, expect, it } from "vitest";
import type { DeckFile, ElementFile } from "../../src/layout/schema.ts";
import { type Flown, flown } from "../support/flown.ts";
import { type DropFile, deckFile, dropFile, type LayoutParts } from "../support/layout-of.ts";

const deg = (rad: number): number => (rad * 180) / Math.PI;
const RATE = (3.6 * Math.PI) / 30;
const fly = (parts: LayoutParts, over: Partial<DropFile> & { from: DropFile["from"] }): Flown => flown(parts, dropFile(over));
const release = (speed: number, heading: number, elevation: number) => ({
	release: { speed_mps: speed, heading_deg: heading, elevation_deg: elevation },
});
/** Ring angle swept since the release, by following the state. */
function swept({ drop }: Flown): number {
	const s = new Float64Array(6);
	let before = Math.atan2(drop.position[1], drop.position[0]);
	let sum = 0;
	for (let i = 1; i <= 4000; i++) {
		drop.flight.path.stateAt((drop.flight.end * i) / 4000, s);
		const now = Math.atan2(s[1]!, s[0]!);
		sum += now - before - 2 * Math.PI * Math.round((now - before) / (2 * Math.PI));
		before = now;
	}
	return sum;
}
const centre = ({ drop }: Flown): [number, number, number] => [drop.flight.state[0]!, drop.flight.state[1]!, drop.flight.state[2]!];

describe("offsets in a curved bay", () => {
	const from = { deck: "lower", angle_deg: 170, axial_m: -1, height_m: 1.5 };
	const object = { mass_kg: 0.4, diameter_m: 0.2, drag_coefficient: 0.5 };

	it("on the floor: floor radius × angle swept", () => {
		const one = fly({}, { from, object, ...release(4, 30, 20) });
		expect(one.summary.struck).toBe("deck:lower");
		expect(one.drop.landing!.prograde).toBeCloseTo(34 * swept(one), 8);
		expect(one.drop.landing!.axial).toBeCloseTo(centre(one)[2] + 1, 12);
		expect(one.summary.landing_radius_m).toBe(34);
	});
	it("on the ceiling: its own radius × angle swept, angle of arrival above 90°", () => {
		const one = fly({}, { from, object, ...release(12, 200, 60) });
		expect(one.summary.struck).toBe("ceiling:lower");
		expect(one.drop.landing!.prograde).toBeCloseTo(31.6 * swept(one), 8);
		expect(one.summary.landing_radius_m).toBe(31.6);
		expect(one.summary.landing_angle_deg).toBeGreaterThan(90);
	});
	it("on an end: landing radius × angle swept, no axial", () => {
		const one = fly({}, { from, object, ...release(9, 75, 10) });
		expect(one.summary.struck).toBe("end-high:lower");
		const [x, y] = centre(one);
		expect(one.drop.landing!.prograde).toBeCloseTo(Math.hypot(x, y) * swept(one), 8);
		expect(one.summary.landing_radius_m).toBeCloseTo(Math.hypot(x, y), 7);
		expect(one.summary.landing_axial_m).toBeNull();
		expect(one.reasons.landing_axial_m).toContain("end bulkhead");
		expect(one.drop.landing!.point[2]).toBe(3);
	});
	it("on a side: axial only, at the radius of the point touched", () => {
		const one = fly({ decks: [deckFile({ from_deg: 160, to_deg: 175 })] }, { from, object, ...release(9, 20, 10) });
		expect(one.summary.struck).toBe("side-high:lower");
		expect(one.summary.landing_prograde_m).toBeNull();
		expect(one.reasons.landing_prograde_m).toContain("side bulkhead");
		expect(one.drop.landing!.axial).toBeCloseTo(centre(one)[2] + 1, 12);
		const [x, y] = centre(one);
		expect(one.drop.landing!.radius).toBeCloseTo(Math.sqrt(x * x + y * y - 0.01), 9);
	});
	it("counts whole turns", () => {
		/** Against spin at almost the speed of the ring: it falls slowly and goes round more than once. */
		const one = fly({}, { from: { ...from, height_m: 2.2 }, ...release(RATE * 31.8 * 0.99, 180, 0) });
		expect(one.summary.struck).toBe("deck:lower");
		expect(Math.abs(swept(one))).toBeGreaterThan(2 * Math.PI);
		expect(one.drop.landing!.prograde).toBeCloseTo(34 * swept(one), 6);
	});
	it("counts whole turns with drag", () => {
		const one = fly(
			{},
			{
				from: { ...from, height_m: 2.2 },
				object: { mass_kg: 50, diameter_m: 0.02, drag_coefficient: 0.1 },
				drag: true,
				...release(RATE * 31.8 * 0.99, 180, 0),
			},
		);
		expect(Math.abs(swept(one))).toBeGreaterThan(2 * Math.PI);
		expect(one.drop.landing!.prograde).toBeCloseTo(34 * swept(one), 5);
	});
});

describe("offsets on a flat deck run along its tangent", () => {
	const parts: LayoutParts = { decks: [deckFile({ floor: "flat", radius_m: 8, from_deg: 60, to_deg: 120 })] };
	/** Prograde of the deck, whose normal points along y: −x. */
	const along = (p: readonly number[]): number => -p[0]!;
	const from = { deck: "lower", angle_deg: 90 + deg(Math.atan(2 / 8)), axial_m: 0, height_m: 1.5 };
	const object = { mass_kg: 0.4, diameter_m: 0.1, drag_coefficient: 0.5 };
	const spin = { rate_rpm: 9 };

	it("and begin 2 m along it, straight above the floor point", () => {
		const { drop } = fly(parts, { from, object });
		expect([...drop.position].map((x) => Math.round(1e9 * x) / 1e9)).toEqual([-2, 6.5, 0]);
	});
	it.each([
		["deck", release(2, 100, 30)],
		["deck", {}],
		["ceiling", release(9, 20, 80)],
		["end-high", release(9, 80, 10)],
		["end-low", release(9, -80, 10)],
	] as const)("%s", (struck, over) => {
		const one = fly({ ...parts, spin }, { from, object, ...over });
		expect(one.drop.flight.struck.kind).toBe(struck);
		expect(one.drop.landing!.prograde).toBeCloseTo(along(centre(one)) - 2, 10);
		const depth = { deck: 8, ceiling: 5.6 }[struck as string];
		if (depth) expect(one.drop.landing!.radius).toBeCloseTo(Math.hypot(depth, along(centre(one))), 9);
	});
	it("tell the angle of arrival from the deck's normal, and beside it from r̂", () => {
		const one = fly({ ...parts, spin }, { from, object });
		const [x, y] = centre(one);
		const v = [one.drop.flight.state[3]!, one.drop.flight.state[4]!] as const;
		const speed = Math.hypot(...v);
		expect(one.drop.landing!.angle).toBeCloseTo(Math.acos(v[1] / speed), 9);
		expect(one.drop.landing!.angleFromRadial).toBeCloseTo(Math.acos((v[0] * x + v[1] * y) / (speed * Math.hypot(x, y))), 9);
		expect(Math.abs(one.drop.landing!.angle! - one.drop.landing!.angleFromRadial!)).toBeGreaterThan(0.1);
	});
});

const still = { rate_rpm: 0 };
const hatch = (over: Partial<ElementFile> = {}): ElementFile =>
	({
		id: "h",
		kind: "hatch",
		deck: "upper",
		angle_deg: 0,
		axial_m: 0,
		shape: "rectangle",
		along_m: 1.6,
		across_m: 1.6,
		...over,
	}) as ElementFile;
const stack = (upper: Partial<DeckFile>, lower: Partial<DeckFile>, spin = still): LayoutParts => ({
	spin,
	decks: [deckFile({ id: "lower", ...lower }), deckFile({ id: "upper", ...upper })],
	elements: [hatch()],
});

describe("offsets on another deck begin where the release deck's local-down line meets it", () => {
	it("curved to curved: the struck radius × angle swept", () => {
		const one = fly(stack({ radius_m: 30 }, { radius_m: 33 }, { rate_rpm: 4 }), {
			from: { deck: "upper", angle_deg: 0.3, axial_m: 0, height_m: 0.5 },
		});
		expect(one.summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		expect(one.drop.landing!.prograde).toBeCloseTo(33 * swept(one), 9);
	});

	/** A straight throw at zero spin from (29.5, 0.4) with 1 along prograde for 4 down. */
	const throwDown = { from: { deck: "upper", angle_deg: 0, axial_m: 0, height_m: 0.5 }, ...release(Math.sqrt(17), 0, -deg(Math.atan(4))) };

	it("curved to flat: along the tangent from the radial line", () => {
		const at = deg(Math.atan(0.4 / 29.5));
		const one = fly(stack({ radius_m: 30 }, { radius_m: 33, floor: "flat", from_deg: -20, to_deg: 20 }), {
			...throwDown,
			from: { ...throwDown.from, angle_deg: at },
		});
		expect(one.summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		expect(one.drop.landing!.prograde).toBeCloseTo(centre(one)[1] - 33 * Math.tan((at * Math.PI) / 180), 9);
	});
	it("flat to curved: the arc from the deck's own normal", () => {
		const y = 0.5;
		const one = fly(stack({ radius_m: 30, floor: "flat", from_deg: -20, to_deg: 20 }, { radius_m: 33 }), {
			...throwDown,
			from: { ...throwDown.from, angle_deg: deg(Math.atan(y / 30)) },
		});
		expect(one.summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		const [px, py] = one.drop.landing!.point;
		expect(one.drop.landing!.prograde).toBeCloseTo(33 * (Math.atan2(py, px) - Math.asin(y / 33)), 9);
	});
	it("flat to flat of another middle", () => {
		const one = fly(
			stack({ radius_m: 30, floor: "flat", from_deg: -20, to_deg: 20 }, { radius_m: 33, floor: "flat", from_deg: -16, to_deg: 24 }),
			{
				...throwDown,
				from: { ...throwDown.from, angle_deg: deg(Math.atan(0.3 / 30)) },
			},
		);
		expect(one.summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		/** The line y = 0.3 and the point touched, in the plane n·p = 33, n at 4°. */
		const [c, s] = [Math.cos((4 * Math.PI) / 180), Math.sin((4 * Math.PI) / 180)];
		const x = (33 - 0.3 * s) / c;
		const tangent = (px: number, py: number): number => c * py - s * px;
		const [px, py] = one.drop.landing!.point;
		expect(px * c + py * s).toBeCloseTo(33, 9);
		expect(one.drop.landing!.prograde).toBeCloseTo(tangent(px, py) - tangent(x, 0.3), 9);
	});
	it("on the end of another deck, the same line to its floor", () => {
		const parts = stack({ radius_m: 30 }, { radius_m: 33, floor: "flat", from_deg: -20, to_deg: 20, to_m: 2.2 });
		const at = deg(Math.atan(0.4 / 29.5));
		const one = fly(parts, { from: { ...throwDown.from, angle_deg: at }, ...release(6, 80, -56) });
		expect(one.summary).toMatchObject({ struck: "end-high:lower", passed: ["h"], landing_axial_m: null });
		expect(one.drop.landing!.prograde).toBeCloseTo(centre(one)[1] - 33 * Math.tan((at * Math.PI) / 180), 9);
	});
	it("is null, not NaN, where that line meets the struck deck nowhere", () => {
		/** From 4 m along a flat deck at 5 m up into a curved bay of 3 m and less. */
		const parts: LayoutParts = {
			spin: still,
			decks: [
				deckFile({ id: "lower", floor: "flat", radius_m: 5.6, from_deg: -60, to_deg: 60, headroom_m: 2.6 }),
				deckFile({ id: "upper", radius_m: 2.9, headroom_m: 2 }),
			],
			elements: [hatch()],
		};
		const at = { deck: "lower", angle_deg: deg(Math.atan(4 / 5.6)), axial_m: 0, height_m: 0.2 };
		/** Aimed at the hatch, 2.4 m up and 4 m back, then on to the bay's ceiling or beyond. */
		const { drop, summary } = fly(parts, { from: at, ...release(20, 180, deg(Math.atan(2.45 / 3.9))) });
		expect(summary.passed).toEqual(["h"]);
		expect(drop.landing).not.toBeNull();
		expect(summary.landing_prograde_m).toBeNull();
	});
});

describe("offsets of a coaming are told at its own floor's edge", () => {
	it("from above and from below", () => {
		const parts = stack({ radius_m: 30 }, { radius_m: 33 });
		const edge = 0.8 / 30;
		const above = fly(parts, {
			from: { deck: "upper", angle_deg: deg(0.79 / 30), axial_m: 0, height_m: 1 },
			object: { mass_kg: 1, diameter_m: 0.1, drag_coefficient: 1 },
			...release(2, 0, -90),
		});
		const below = fly(parts, {
			from: { deck: "lower", angle_deg: deg(0.79 / 30), axial_m: 0.3, height_m: 1 },
			object: { mass_kg: 1, diameter_m: 0.1, drag_coefficient: 1 },
			...release(2, 0, 90),
		});
		for (const one of [above, below]) {
			expect(one.summary).toMatchObject({ struck: "coaming:h", landing_radius_m: 30, landing_axial_m: 0 });
			expect(one.drop.landing!.prograde).toBeCloseTo(30 * (edge - 0.79 / 30), 9);
		}
	});
});

describe("offsets from the feet", () => {
	const feet = (angle: number, axial: number) => ({ feet: { angle_deg: angle, axial_m: axial, facing_deg: 0 } });

	it("differ by the floor between the feet and the point below the release", () => {
		const from = { deck: "lower", angle_deg: 10, axial_m: 0.25, height_m: 1.5 };
		for (const turn of [0, 360, -720]) {
			const one = fly({}, { from, ...feet(9.3 + turn, -0.1) });
			expect(one.drop.fromFeet!.prograde).toBeCloseTo(one.drop.landing!.prograde! + 34 * ((0.7 * Math.PI) / 180), 9);
			expect(one.drop.fromFeet!.axial).toBeCloseTo(0.35, 12);
			expect(one.summary.landing_from_feet_prograde_m).toBeCloseTo(one.drop.fromFeet!.prograde!, 8);
		}
	});
	it("reach across ±180°", () => {
		const one = fly({}, { from: { deck: "lower", angle_deg: 179.9, axial_m: 0, height_m: 1.5 }, ...feet(-179.8, 0) });
		expect(one.drop.fromFeet!.prograde).toBeCloseTo(one.drop.landing!.prograde! - 34 * ((0.3 * Math.PI) / 180), 9);
	});
	it("are at the ceiling's and the end's own radius there", () => {
		const from = { deck: "lower", angle_deg: 10, axial_m: 0, height_m: 1.5 };
		const up = fly({}, { from, ...feet(9, 0), ...release(12, 0, 80) });
		expect(up.summary.struck).toBe("ceiling:lower");
		expect(up.drop.fromFeet!.prograde! - up.drop.landing!.prograde!).toBeCloseTo((31.6 * Math.PI) / 180, 9);
		const end = fly({}, { from, ...feet(9, 0), ...release(12, 90, 0) });
		expect(end.summary.struck).toBe("end-high:lower");
		expect(end.drop.fromFeet!.prograde! - end.drop.landing!.prograde!).toBeCloseTo((end.drop.landing!.radius * Math.PI) / 180, 9);
		expect(end.summary.landing_from_feet_axial_m).toBeNull();
	});
	it("run along a flat deck", () => {
		const parts: LayoutParts = { decks: [deckFile({ floor: "flat", radius_m: 8, from_deg: -40, to_deg: 40 })] };
		const one = fly(parts, {
			from: { deck: "lower", angle_deg: deg(Math.atan(2 / 8)), axial_m: 0, height_m: 1.5 },
			...feet(deg(Math.atan(1.5 / 8)), 0.2),
		});
		expect(one.drop.fromFeet!.prograde! - one.drop.landing!.prograde!).toBeCloseTo(0.5, 9);
		expect(one.drop.fromFeet!.axial).toBeCloseTo(-0.2, 9);
	});
	it("are null with a reason where the layout does not place the person", () => {
		const { summary, reasons } = fly({}, { from: { deck: "lower", angle_deg: 0, axial_m: 0, height_m: 1.5 } });
		for (const key of ["landing_from_feet_prograde_m", "landing_from_feet_axial_m"]) {
			expect(summary[key]).toBeNull();
			expect(reasons[key]).toContain("does not say where the person stands");
		}
	});
});

describe("solid panes", () => {
	const window = (over: object): ElementFile =>
		({
			id: "w",
			kind: "window",
			deck: "lower",
			shape: "rectangle",
			along_m: 1,
			across_m: 0.6,
			solid: true,
			...over,
		}) as unknown as ElementFile;
	const object = { mass_kg: 0.4, diameter_m: 0.3, drag_coefficient: 0.5 };

	it("in the floor are landed on as the floor is", () => {
		const from = { deck: "lower", angle_deg: 0, axial_m: 0, height_m: 1.5 };
		const bare = fly({}, { from, object });
		const paned = fly({ elements: [window({ surface: "floor", angle_deg: 0, axial_m: 0 })] }, { from, object });
		expect(paned.summary).toEqual({ ...bare.summary, struck: "element:w" });
	});

	/** Straight throws at zero spin at points of each face, just inside and just outside the outline. */
	const curved = deckFile({ from_deg: -20, to_deg: 20 });
	const flatDeck = deckFile({ floor: "flat", radius_m: 8, from_deg: -30, to_deg: 30 });
	const struck = (
		deck: DeckFile,
		pane: object,
		from: { angle: number; axial: number; height: number },
		heading: number,
		elevation: number,
	) =>
		fly(
			{ spin: still, decks: [deck], elements: [window(pane)] },
			{
				from: { deck: "lower", angle_deg: from.angle, axial_m: from.axial, height_m: from.height },
				...release(5, heading, elevation),
			},
		).summary.struck;

	it.each([
		[
			"curved ceiling, along its own radius",
			curved,
			{ surface: "ceiling", angle_deg: 0, axial_m: 0 },
			(u: number, w: number) => ({ angle: deg(u / 31.6), axial: w, height: 1 }),
			0,
			90,
		],
		[
			"curved floor",
			curved,
			{ surface: "floor", angle_deg: 0, axial_m: 0 },
			(u: number, w: number) => ({ angle: deg(u / 34), axial: w, height: 1 }),
			0,
			-90,
		],
		[
			"curved end",
			curved,
			{ surface: "end-high", angle_deg: 2, height_m: 1.4 },
			(u: number, w: number) => ({ angle: 2 + deg(u / 32.6), axial: 0, height: 1.4 + w }),
			90,
			0,
		],
		[
			"flat floor",
			flatDeck,
			{ surface: "floor", angle_deg: deg(Math.atan(2 / 8)), axial_m: 0 },
			(u: number, w: number) => ({ angle: deg(Math.atan((2 + u) / 8)), axial: w, height: 1 }),
			0,
			-90,
		],
		[
			"flat ceiling, straight above the floor point of its angle",
			flatDeck,
			{ surface: "ceiling", angle_deg: deg(Math.atan(2 / 8)), axial_m: 0 },
			(u: number, w: number) => ({ angle: deg(Math.atan((2 + u) / 8)), axial: w, height: 1 }),
			0,
			90,
		],
		[
			"flat end, straight above the floor point of its angle",
			flatDeck,
			{ surface: "end-low", angle_deg: deg(Math.atan(2 / 8)), height_m: 1.4 },
			(u: number, w: number) => ({ angle: deg(Math.atan((2 + u) / 8)), axial: 0, height: 1.4 + w }),
			-90,
			0,
		],
	] as const)("%s", (_, deck, pane, place, heading, elevation) => {
		const at = (u: number, w: number) => struck(deck, pane, place(u, w), heading, elevation);
		for (const [u, w] of [
			[0.49, 0],
			[-0.49, 0],
			[0, 0.29],
			[0, -0.29],
		] as const)
			expect(at(u, w), `${u}, ${w}`).toBe("element:w");
		for (const [u, w] of [
			[0.51, 0],
			[-0.51, 0],
			[0, 0.31],
			[0, -0.31],
		] as const)
			expect(at(u, w), `${u}, ${w}`).toMatch(/:lower$/);
	});

	it("sides: along axial, across up the wall, on a flat deck up its slope", () => {
		const slope = Math.cos((30 * Math.PI) / 180);
		const side = (height: number) =>
			struck(flatDeck, { surface: "side-high", axial_m: 0, height_m: 1.2 }, { angle: 25, axial: 0, height }, 0, 0);
		expect(side(1.2 + 0.29 * slope)).toBe("element:w");
		expect(side(1.2 + 0.31 * slope)).toBe("side-high:lower");
		const low = (height: number) =>
			struck(flatDeck, { surface: "side-low", axial_m: 0, height_m: 1.2 }, { angle: -25, axial: 0, height }, 180, 0);
		expect([low(1.2 - 0.29 * slope), low(1.2 - 0.31 * slope)]).toEqual(["element:w", "side-low:lower"]);
		expect(struck(curved, { surface: "side-low", axial_m: 0.5, height_m: 1.2 }, { angle: -19.9, axial: 0.99, height: 1.21 }, 180, 0)).toBe(
			"element:w",
		);
		expect(struck(curved, { surface: "side-low", axial_m: 0.5, height_m: 1.2 }, { angle: -19.9, axial: 1.01, height: 1.21 }, 180, 0)).toBe(
			"side-low:lower",
		);
	});
});

describe("elements", () => {
	it("are touched at the point of the body nearest to the centre", () => {
		const one = fly(
			{ spin: still, elements: [{ id: "desk", kind: "workstation", deck: "lower", angle_deg: 0, axial_m: 0, facing_deg: 0, solid: true }] },
			{
				from: { deck: "lower", angle_deg: deg(0.5 / 34), axial_m: 0.55, height_m: 2 },
				object: { mass_kg: 1, diameter_m: 0.2, drag_coefficient: 1 },
				...release(2, 0, -90),
			},
		);
		expect(one.summary.struck).toBe("element:desk");
		/** The desk's top is 0.74 m above the floor. */
		expect(one.drop.landing!.radius).toBeCloseTo(34 - 0.74, 2);
		expect(Math.hypot(...centre(one).map((x, i) => x - one.drop.landing!.point[i]!))).toBeCloseTo(0.1, 9);
		expect(Math.abs(one.drop.landing!.prograde!)).toBeLessThan(1e-3);
	});
});
