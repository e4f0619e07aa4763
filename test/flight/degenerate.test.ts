import { describe, expect, it } from "vitest";
import type { Flown } from "../support/flown.ts";
import { flown } from "../support/flown.ts";
import { deckFile, dropFile, type LayoutParts } from "../support/layout-of.ts";

const R = 34;
const HEADROOM = 2.4;
interface Thrown {
	readonly parts?: LayoutParts;
	readonly height?: number;
	readonly angle?: number;
	readonly axial?: number;
	readonly diameter?: number;
	readonly drag?: boolean;
	readonly speed?: number;
	readonly heading?: number;
	readonly elevation?: number;
}
const thrown = (t: Thrown): Flown =>
	flown(
		t.parts ?? {},
		dropFile({
			from: { deck: "lower", angle_deg: t.angle ?? 3, axial_m: t.axial ?? 0.5, height_m: t.height ?? 1.5 },
			object: { mass_kg: 0.4, diameter_m: t.diameter ?? 0.06, drag_coefficient: 0.47 },
			drag: t.drag ?? false,
			...(t.speed === undefined ? {} : { release: { speed_mps: t.speed, heading_deg: t.heading ?? 0, elevation_deg: t.elevation ?? 0 } }),
		}),
	);
const flat: LayoutParts = { decks: [deckFile({ floor: "flat", from_deg: -20, to_deg: 20 })] };
const still: LayoutParts = { spin: { rate_rpm: 0 } };
const LANDING = Object.keys(thrown({}).summary).filter((key) => key !== "struck" && key !== "passed");

function nothing({ summary, reasons }: Flown, struck: string): void {
	expect(summary.struck).toBe(struck);
	for (const key of LANDING) {
		expect(summary[key], key).toBeNull();
		expect(reasons[key], key).toBeTruthy();
	}
}

describe.each([
	["curved floor, no drag", {}, false],
	["curved floor, drag", {}, true],
	["flat floor, no drag", flat, false],
	["flat floor, drag", flat, true],
] as const)("%s", (_, parts: LayoutParts, drag) => {
	const cases = { parts, drag };

	describe("let go touching the floor", () => {
		const touching = { ...cases, height: 0.03 };
		it("at rest strikes at once, at speed 0: no angle, and a reason", () => {
			const { summary, reasons } = thrown(touching);
			expect(summary).toMatchObject({
				struck: "deck:lower",
				flight_time_s: 0,
				landing_prograde_m: 0,
				landing_axial_m: 0,
				landing_speed_mps: 0,
				landing_angle_deg: null,
				impact_energy_J: 0,
				equal_earth_drop_m: 0,
			});
			expect(reasons.landing_angle_deg).toBe("it touches at rest");
		});
		it("at rest strikes at once at a ten-millionth of a g, too", () => {
			expect(thrown({ ...touching, parts: { ...parts, spin: { rate_rpm: 0.0005 } } }).summary).toMatchObject({
				struck: "deck:lower",
				flight_time_s: 0,
			});
		});
		it.each([-90, -45, -1e-6])("tossed down at %d° strikes at once with the speed it was given", (elevation) => {
			const { summary } = thrown({ ...touching, speed: 2, elevation });
			expect(summary).toMatchObject({ struck: "deck:lower", flight_time_s: 0, landing_speed_mps: 2 });
			expect(summary.landing_angle_deg).toBeCloseTo(90 + elevation, 5);
		});
		it("tossed along the floor strikes at once, at 90°", () => {
			expect(thrown({ ...touching, speed: 2 }).summary).toMatchObject({ struck: "deck:lower", flight_time_s: 0, landing_angle_deg: 90 });
		});
		it.each([3, 0.1, 1e-3, 1e-5])("tossed up at %d m/s rises, and comes back to it", (speed) => {
			const { drop, summary } = thrown({ ...touching, speed, elevation: 90 });
			expect(summary.struck).toBe("deck:lower");
			const level = ((3.6 * Math.PI) / 30) ** 2 * 33.97;
			/** 2v/g, but for the rise of the level, drag and Coriolis, which grow with v. */
			expect(Math.abs(drop.flight.end / ((2 * speed) / level) - 1)).toBeLessThan(0.003 + 0.12 * speed);
		});
	});

	it("tossed up by less than the rounding of its place, it is back at once", () => {
		const { drop } = thrown({ ...cases, height: 0.03, speed: 1e-7, elevation: 90 });
		expect(drop.flight.struck.kind).toBe("deck");
		expect(drop.flight.end).toBeLessThan(1e-6);
	});

	describe("let go touching the ceiling", () => {
		const touching = { ...cases, height: HEADROOM - 0.03 };
		it("at rest falls to the floor", () => {
			expect(thrown(touching).summary).toMatchObject({ struck: "deck:lower" });
			expect(thrown(touching).drop.flight.end).toBeGreaterThan(0.9);
		});
		it("tossed up strikes at once", () => {
			expect(thrown({ ...touching, speed: 1, elevation: 90 }).summary).toMatchObject({
				struck: "ceiling:lower",
				flight_time_s: 0,
				landing_angle_deg: 180,
				landing_speed_mps: 1,
			});
		});
		it("tossed down falls to the floor", () => {
			expect(thrown({ ...touching, speed: 1, elevation: -90 }).summary).toMatchObject({ struck: "deck:lower" });
		});
	});

	describe("let go touching an end", () => {
		const touching = { ...cases, axial: 3 - 0.03 };
		it.each([0, 1])("falls along it, tossed away from it or not (%d m/s)", (speed) => {
			expect(thrown({ ...touching, speed, heading: 270 }).summary.struck).toBe("deck:lower");
		});
		it("tossed at it strikes at once", () => {
			expect(thrown({ ...touching, speed: 1, heading: 90 }).summary).toMatchObject({
				struck: "end-high:lower",
				flight_time_s: 0,
				landing_axial_m: null,
			});
		});
	});
});

describe("without spin", () => {
	it.each([true, false])("what is let go stays (drag %s)", (drag) => {
		nothing(thrown({ parts: still, drag }), "none");
		nothing(thrown({ parts: still, drag, height: 0.03 }), "none");
		nothing(thrown({ parts: { ...flat, ...still }, drag }), "none");
	});
	it("what is tossed flies straight", () => {
		const { drop, summary } = thrown({ parts: still, speed: 2, elevation: -90 });
		expect(summary).toMatchObject({
			struck: "deck:lower",
			landing_prograde_m: 0,
			landing_axial_m: 0,
			landing_angle_deg: 0,
			landing_speed_mps: 2,
		});
		expect(drop.flight.end).toBeCloseTo((1.5 - 0.03) / 2, 12);
		const level = thrown({ parts: still, speed: 2, heading: 90 });
		expect(level.summary).toMatchObject({ struck: "end-high:lower", landing_angle_deg: 90, landing_radius_m: 32.5 });
		expect(level.drop.flight.end).toBeCloseTo((3 - 0.03 - 0.5) / 2, 12);
	});
	it("what is tossed along a chord comes to the floor where the chord does", () => {
		const { drop } = thrown({ parts: still, speed: 2, diameter: 0 });
		const chord = Math.sqrt(R * R - 32.5 * 32.5);
		expect(drop.flight.end).toBeCloseTo(chord / 2, 12);
		expect(drop.landing!.prograde).toBeCloseTo(R * Math.acos(32.5 / R), 12);
	});
});

describe("a toss that cancels the speed of the ring", () => {
	const rim = ((3.6 * Math.PI) / 30) * 32.5;
	it("strikes nothing in a bay that closes on itself, and is followed for 600 s", () => {
		const one = thrown({ speed: rim, heading: 180 });
		nothing(one, "none");
		expect(one.drop.flight.end).toBe(600);
	});
	it("is followed for ten turns where they take longer", () => {
		const slow = thrown({ parts: { spin: { rate_rpm: 0.5 } }, speed: (0.5 * Math.PI * 32.5) / 30, heading: 180 });
		nothing(slow, "none");
		expect(slow.drop.flight.end).toBeCloseTo(10 * 120, 9);
	});
	it("counts its turns at the rate of the release", () => {
		const parts: LayoutParts = {
			spin: {
				rate_rpm: 0.5,
				profile: [
					{ t_s: 0, rate_rpm: 0.5 },
					{ t_s: 60, rate_rpm: 30 },
				],
			},
		};
		expect(thrown({ parts, speed: (0.5 * Math.PI * 32.5) / 30, heading: 180 }).drop.flight.end).toBeCloseTo(1200, 9);
	});
	it("strikes the side that comes round to it in a bay that does not", () => {
		const { drop, summary } = thrown({ parts: { decks: [deckFile({ from_deg: -15, to_deg: 15 })] }, angle: 0, speed: rim, heading: 180 });
		expect(summary).toMatchObject({ struck: "side-low:lower", landing_prograde_m: null, landing_axial_m: 0 });
		expect(drop.flight.end).toBeCloseTo(((15 * Math.PI) / 180 - Math.asin(0.03 / 32.5)) / ((3.6 * Math.PI) / 30), 9);
		expect(drop.landing!.speed).toBeCloseTo(rim, 9);
	});
	it("meets a solid ladder on its way round", () => {
		const parts: LayoutParts = {
			elements: [
				{
					id: "ladder",
					kind: "ladder",
					angle_deg: -90,
					axial_m: 0.5,
					foot_radius_m: R,
					head_radius_m: 31,
					facing_deg: 0,
					width_m: 0.45,
					rung_spacing_m: 0.3,
					toe_clearance_m: 0.2,
					traffic: "both",
					solid: true,
				},
			],
		};
		const { drop, summary } = thrown({ parts, speed: rim, heading: 180 });
		expect(summary.struck).toBe("element:ladder");
		expect(drop.flight.end).toBeCloseTo(93 / 360 / (3.6 / 60), 1);
	});
	it("is blown along by the air and lands", () => {
		expect(thrown({ speed: rim, heading: 180, drag: true }).summary.struck).toBe("deck:lower");
	});
});

describe("sides of bays of any span", () => {
	const span = (half: number): LayoutParts => ({ decks: [deckFile({ from_deg: -half, to_deg: half })] });
	it.each([20, 90, 135, 136, 170, 179, 179.99])("±%d°: a drop lands on the floor everywhere clear of them", (half) => {
		for (const share of [-1, -0.7, -0.3, 0, 0.3, 0.7, 1]) {
			const angle = share * (half - (share < 0 ? 2.2 : 0.06) - 0.001);
			if (Math.abs(angle) > half || (half > 179.9 && Math.abs(share) === 1)) continue;
			for (const drag of [false, true])
				expect(thrown({ parts: span(half), angle, drag }).summary.struck, `${angle}°, drag ${drag}`).toBe("deck:lower");
		}
	});
	it.each([20, 90, 135, 136, 170, 179])("±%d°: a toss at either strikes it from the bay", (half) => {
		const low = thrown({ parts: span(half), angle: -half + 1, speed: 20, heading: 180 });
		const high = thrown({ parts: span(half), angle: half - 1, speed: 20, heading: 0 });
		expect([low.summary.struck, high.summary.struck]).toEqual(["side-low:lower", "side-high:lower"]);
		for (const { drop } of [low, high]) {
			expect(drop.flight.end).toBeLessThan(0.1);
			expect(drop.landing!.prograde).toBeNull();
		}
	});
	it("a bay of 360° has none", () => {
		const whole = thrown({ parts: span(180), angle: 179.9, speed: 10, heading: 0 });
		expect(whole.summary.struck).toBe("deck:lower");
	});
	it("on a flat deck they stand at constant angle", () => {
		const { drop } = thrown({ parts: flat, angle: 19, speed: 20, heading: 0, diameter: 0.2 });
		expect(drop.flight.struck).toMatchObject({ kind: "side-high" });
		const [x, y] = [drop.flight.state[0]!, drop.flight.state[1]!];
		const wall = (20 * Math.PI) / 180;
		expect(x * Math.sin(wall) - y * Math.cos(wall)).toBeCloseTo(0.1, 9);
		expect(Math.atan2(drop.landing!.point[1], drop.landing!.point[0])).toBeCloseTo(wall, 12);
	});
});

it("a release within a solid element strikes it there and then", () => {
	const parts: LayoutParts = {
		elements: [{ id: "desk", kind: "workstation", deck: "lower", angle_deg: 0, axial_m: 0, facing_deg: 0, solid: true }],
	};
	expect(thrown({ parts, angle: (0.4 / R) * 57.3, axial: 0, height: 0.72, diameter: 0.1 }).summary).toMatchObject({
		struck: "element:desk",
		flight_time_s: 0,
	});
});
