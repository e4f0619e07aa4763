import { describe, expect, it } from "vitest";
import type { DeckFile, HatchFile } from "../../src/layout/schema.ts";
import { type Flown, flown } from "../support/flown.ts";
import { deckFile, dropFile, type LayoutParts } from "../support/layout-of.ts";

/** Without spin things fly straight, so that every number here is geometry: upper floor 30 m, ceiling below 30.6 m, lower floor 33 m. */
const STILL = { rate_rpm: 0 };
const decks = (upper: Partial<DeckFile> = {}, lower: Partial<DeckFile> = {}): DeckFile[] => [
	deckFile({ id: "lower", radius_m: 33, headroom_m: 2.4, ...lower }),
	deckFile({ id: "upper", radius_m: 30, headroom_m: 2.4, ...upper }),
];
const square = (over: Partial<HatchFile> = {}): HatchFile =>
	({
		id: "h",
		kind: "hatch",
		deck: "upper",
		angle_deg: 0,
		axial_m: 0,
		shape: "rectangle",
		along_m: 0.8,
		across_m: 0.8,
		...over,
	}) as HatchFile;
const round = (over: Partial<HatchFile> = {}): HatchFile =>
	({ id: "h", kind: "hatch", deck: "upper", angle_deg: 0, axial_m: 0, shape: "circle", diameter_m: 0.8, ...over }) as HatchFile;
const bay = (hatch: HatchFile, over: LayoutParts = {}): LayoutParts => ({ spin: STILL, decks: decks(), elements: [hatch], ...over });

interface Thrown {
	readonly deck?: string;
	readonly angle?: number;
	readonly axial?: number;
	readonly height?: number;
	readonly diameter?: number;
	readonly speed?: number;
	readonly heading?: number;
	readonly elevation?: number;
	readonly drag?: boolean;
}
const thrown = (parts: LayoutParts, t: Thrown): Flown =>
	flown(
		parts,
		dropFile({
			from: { deck: t.deck ?? "upper", angle_deg: t.angle ?? 0, axial_m: t.axial ?? 0, height_m: t.height ?? 1 },
			object: { mass_kg: 0.4, diameter_m: t.diameter ?? 0.1, drag_coefficient: 1e-9 },
			release: { speed_mps: t.speed ?? 2, heading_deg: t.heading ?? 90, elevation_deg: t.elevation ?? -90 },
			drag: t.drag ?? false,
		}),
	);

describe.each([
	["rectangle", square()],
	["circle", round()],
])("a %s hatch", (_, hatch) => {
	it("is gone through downward: passed when the centre is d/2 beyond the far end", () => {
		const { drop, summary } = thrown(bay(hatch), {});
		expect(summary).toMatchObject({ struck: "deck:lower", passed: ["h"], landing_prograde_m: 0, landing_axial_m: 0, landing_radius_m: 33 });
		expect(drop.flight.passedAt[0]).toBeCloseTo((30.6 + 0.05 - 29) / 2, 10);
		expect(drop.flight.end).toBeCloseTo((33 - 0.05 - 29) / 2, 10);
	});

	it("is gone through upward", () => {
		const { drop, summary } = thrown(bay(hatch), { deck: "lower", elevation: 90 });
		expect(summary).toMatchObject({ struck: "ceiling:upper", passed: ["h"], landing_radius_m: 27.6 });
		expect(drop.flight.passedAt[0]).toBeCloseTo((32 - (30 - 0.05)) / 2, 10);
		expect(drop.flight.end).toBeCloseTo((32 - (27.6 + 0.05)) / 2, 10);
	});

	it.each([true, false])(
		"lets a point through two nanometres inside its edge (one counts as contact) and not outside it, drag %s",
		(drag) => {
			const at = (axial: number) => thrown(bay(hatch), { axial, diameter: drag ? 1e-12 : 0, drag }).summary;
			expect(at(0.4 - 2e-9)).toMatchObject({ struck: "deck:lower", passed: ["h"] });
			expect(at(0.4 + 2e-9)).toMatchObject({ struck: "deck:upper", passed: [] });
		},
	);

	it("has its edge struck by a sphere that overlaps it, when the centre is d/2 from the edge", () => {
		const inside = 1e-3;
		const { drop, summary } = thrown(bay(hatch), { axial: 0.4 - inside });
		expect(summary).toMatchObject({ struck: "coaming:h", passed: [], landing_radius_m: 30 });
		expect(drop.landing!.axial).toBeCloseTo(inside, 9);
		expect(drop.landing!.prograde).toBeCloseTo(0, 9);
		expect(drop.flight.end).toBeCloseTo((30 - Math.sqrt(0.05 ** 2 - inside ** 2) - 29) / 2, 9);
	});

	it("stops what is larger than itself at its edge", () => {
		const { drop, summary } = thrown(bay(hatch), { axial: 0.05, diameter: 1 });
		expect(summary).toMatchObject({ struck: "coaming:h", passed: [], landing_radius_m: 30 });
		expect(drop.landing!.axial).toBeCloseTo(0.35, 8);
		expect(drop.flight.end).toBeCloseTo((30 - Math.sqrt(0.5 ** 2 - 0.35 ** 2) - 29) / 2, 9);
	});

	it("lets through what just fits, centred, and stops what just does not", () => {
		expect(thrown(bay(hatch), { diameter: 0.8 - 1e-3 }).summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		expect(thrown(bay(hatch), { diameter: 0.8 + 1e-3 }).summary).toMatchObject({ struck: "coaming:h", passed: [] });
	});

	it("has its wall struck at depth, and the offset told at its own floor edge", () => {
		/** 45° down: through the floor at 0.3 m, at the wall 0.1 m deeper. */
		const { drop, summary } = thrown(bay(hatch), { height: 0.3, diameter: 0, speed: 2, heading: 90, elevation: -45 });
		expect(summary).toMatchObject({ struck: "coaming:h", passed: [], landing_radius_m: 30 });
		expect(drop.landing!.axial).toBeCloseTo(0.4, 9);
		expect(drop.flight.end).toBeCloseTo(0.4 / (2 * Math.SQRT1_2), 9);
		expect(Math.hypot(drop.flight.state[0]!, drop.flight.state[1]!)).toBeCloseTo(30.1, 9);
	});

	it("has its lower edge struck from below, told at the floor edge of its own deck", () => {
		const { drop, summary } = thrown(bay(hatch), { deck: "lower", elevation: 90, axial: 0.39 });
		expect(summary).toMatchObject({ struck: "coaming:h", passed: [], landing_radius_m: 30 });
		expect(drop.landing!.axial).toBeCloseTo(0.01, 8);
		expect(drop.flight.end).toBeCloseTo((32 - 30.6 - Math.sqrt(0.05 ** 2 - 0.01 ** 2)) / 2, 9);
	});

	it("strikes the ceiling beside it from below", () => {
		expect(thrown(bay(hatch), { deck: "lower", elevation: 90, axial: 0.42 }).summary).toMatchObject({
			struck: "ceiling:lower",
			passed: [],
		});
	});

	it("opens outside where no deck lies below: nothing is landed on and every number says why", () => {
		const { drop, summary, reasons } = thrown(bay(hatch, { decks: [decks()[1]!] }), {});
		expect(summary.struck).toBe("outside");
		expect(summary.passed).toEqual(["h"]);
		expect(drop.flight.end).toBeCloseTo((30 + 0.05 - 29) / 2, 10);
		expect(drop.landing).toBeNull();
		for (const [key, value] of Object.entries(summary)) {
			if (key === "struck" || key === "passed") continue;
			expect(value, key).toBeNull();
			expect(reasons[key], key).toBeTruthy();
		}
	});

	it("is the same hatch at 360° more and less, and at the seam of a deck from 0° to 360°", () => {
		const turned = (angle: number, deck: Partial<DeckFile>) =>
			thrown(bay({ ...hatch, angle_deg: angle }, { decks: decks(deck, deck) }), { angle: 0.5, axial: 0.1 }).summary;
		const plain = turned(0, {});
		expect(plain).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		for (const angle of [360, -360, 720]) expect(turned(angle, {})).toEqual(plain);
		for (const angle of [0, 360]) expect(turned(angle, { from_deg: 0, to_deg: 360 })).toEqual(plain);
	});

	it("may lie flush with the end of both bays", () => {
		const flush = bay({ ...hatch, axial_m: 3 - 0.4 });
		expect(thrown(flush, { axial: 2.6 }).summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		expect(thrown(flush, { axial: 2.6, heading: 90, elevation: -60, height: 0.3, diameter: 0.02 }).summary).toMatchObject({
			struck: "coaming:h",
		});
		/** Down along the bulkhead, a micrometre clear of it. */
		const along = thrown(flush, { axial: 3 - 0.05 - 1e-6, diameter: 0.1 }).summary;
		expect(along).toMatchObject({ struck: "deck:lower", passed: ["h"] });
	});

	it("does not hide the end of the bay below from what is half through it", () => {
		/** Up 0.75 m and 0.1 m towards the end: there it is met 0.15 m short of the ceiling, before the wall flush with it. */
		const flush = bay({ ...hatch, axial_m: 3 - 0.4 });
		const { drop, summary } = thrown(flush, {
			deck: "lower",
			height: 1.5,
			axial: 2.6,
			diameter: 0.6,
			elevation: (Math.atan(7.5) * 180) / Math.PI,
			heading: 90,
		});
		expect(summary).toMatchObject({ struck: "end-high:lower", passed: [], landing_axial_m: null });
		expect(Math.hypot(drop.flight.state[0]!, drop.flight.state[1]!)).toBeCloseTo(30.75, 9);
	});

	it("has no length where ceiling and floor are one", () => {
		const one = bay(hatch, { decks: decks({}, { headroom_m: 3 }) });
		expect(thrown(one, {}).summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		expect(thrown(one, { diameter: 0 }).summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
		expect(thrown(one, { deck: "lower", elevation: 90 }).summary).toMatchObject({ struck: "ceiling:upper", passed: ["h"] });
		expect(thrown(one, { axial: 0.399 }).summary).toMatchObject({ struck: "coaming:h" });
	});

	it("strikes the bulkhead of a bay below that ends under it", () => {
		const short = bay(hatch, { decks: decks({}, { to_m: 0.2 }) });
		expect(thrown(short, { axial: 0.3 }).summary).toMatchObject({ struck: "end-high:lower", landing_prograde_m: 0, landing_axial_m: null });
		expect(thrown(short, { axial: 0.1 }).summary).toMatchObject({ struck: "deck:lower", passed: ["h"] });
	});

	it("closed by a solid cover, is struck as an element on the floor and on the ceiling below", () => {
		const cover = bay({ ...hatch, solid: true });
		expect(thrown(cover, {}).summary).toMatchObject({ struck: "element:h", passed: [], landing_radius_m: 30, flight_time_s: 0.475 });
		expect(thrown(cover, { deck: "lower", elevation: 90 }).summary).toMatchObject({ struck: "element:h", landing_radius_m: 30.6 });
	});
});

describe("a hatch in a spinning ring", () => {
	const spinning = bay(square(), { spin: { rate_rpm: 4 } });

	it("is not passed by what rises into it and falls back", () => {
		/** Tossed up from the lower deck to an apex between the ceiling and the upper floor. */
		const { drop, summary } = thrown(spinning, { deck: "lower", elevation: 90, height: 2.2, diameter: 0, speed: 2.1 });
		expect(summary).toMatchObject({ struck: "deck:lower", passed: [] });
		let highest = Number.POSITIVE_INFINITY;
		const s = new Float64Array(6);
		for (let t = 0; t < drop.flight.end; t += 1e-3) {
			drop.flight.path.stateAt(t, s);
			highest = Math.min(highest, Math.hypot(s[0]!, s[1]!));
		}
		expect(highest).toBeLessThan(30.6);
		expect(highest).toBeGreaterThan(30);
	});

	it("swallows what is dropped as far prograde of it as the drop is carried against spin", () => {
		const drift = 30 * (Math.tan(Math.acos(29 / 30)) - Math.acos(29 / 30));
		const over = (metres: number) => thrown(spinning, { angle: ((metres / 30) * 180) / Math.PI, speed: 0, diameter: 0 }).summary;
		expect(over(drift)).toMatchObject({ passed: ["h"] });
		expect(over(drift + 0.4 + 1e-3)).toMatchObject({ struck: "deck:upper" });
		/** Just inside the prograde edge it moves away from the wall, just inside the other towards it. */
		expect(over(drift + 0.4 - 1e-3)).toMatchObject({ passed: ["h"] });
		expect(over(drift - 0.4 + 1e-3)).toMatchObject({ struck: "coaming:h" });
		expect(over(drift - 0.4 - 1e-3)).toMatchObject({ struck: "deck:upper" });
	});
});

describe("a hatch in a flat floor", () => {
	/** Plane at 6 m; the hatch's middle 2 m along, so that the radii through its edges lean. */
	const flat = (hatch: Partial<HatchFile> = {}): LayoutParts => ({
		spin: STILL,
		decks: [
			deckFile({ id: "lower", floor: "flat", radius_m: 9, from_deg: -50, to_deg: 50, headroom_m: 2.4 }),
			deckFile({ id: "upper", floor: "flat", radius_m: 6, from_deg: -50, to_deg: 50, headroom_m: 2.4 }),
		],
		elements: [square({ angle_deg: (Math.atan(2 / 6) * 180) / Math.PI, ...hatch })],
	});
	const over = (y: number, diameter = 0.4, deck = "upper", elevation = -90) =>
		thrown(flat(), { deck, angle: (Math.atan(y / (deck === "upper" ? 6 : 9)) * 180) / Math.PI, diameter, elevation });

	it("is open where the point below the centre lies in it, however its walls lean", () => {
		expect(over(2.401).summary.struck).toBe("deck:upper");
		for (const y of [2.399, 2.35, 2.3]) expect(over(y).summary.struck, `${y}`).toBe("coaming:h");
		expect(over(1.599).summary.struck).toBe("deck:upper");
		expect(over(1.61).summary.struck).toBe("coaming:h");
	});

	it("has its leaning wall struck below the edge", () => {
		/** Straight down at y = 1.9: the wall through the inner edge (6, 1.6) reaches y = 1.76 at the ceiling below. */
		const { drop, summary } = over(1.9, 0.3);
		expect(summary.struck).toBe("coaming:h");
		const [x, y] = [drop.flight.state[0]!, drop.flight.state[1]!];
		expect(x).toBeGreaterThan(6);
		const lean = Math.atan(1.6 / 6);
		expect(Math.abs(y * Math.cos(lean) - x * Math.sin(lean))).toBeCloseTo(0.15, 9);
		/** Told at the edge of the floor. */
		expect(drop.landing!.prograde).toBeCloseTo(1.6 - 1.9, 9);
		expect(summary.landing_radius_m).toBeCloseTo(Math.hypot(6, 1.6), 8);
	});

	it("opens the ceiling below along its radii", () => {
		/** On the ceiling at 6.6 m the outline runs from 1.76 to 2.64 m. */
		expect(over(2.63, 0, "lower", 90).summary.struck).toBe("coaming:h");
		expect(over(2.65, 0, "lower", 90).summary.struck).toBe("ceiling:lower");
		expect(over(1.77, 0, "lower", 90).summary).toMatchObject({ struck: "ceiling:upper", passed: ["h"] });
		expect(over(1.75, 0, "lower", 90).summary.struck).toBe("ceiling:lower");
	});
});
