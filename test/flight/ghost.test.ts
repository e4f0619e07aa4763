import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { toss } from "../support/arbitrary.ts";
import { flown } from "../support/flown.ts";
import { dropFile } from "../support/layout-of.ts";

describe("the comparison without turning", () => {
	it("is a parabola in the level of the floor, down as it is at the release, to the same floor", () => {
		let landed = 0;
		fc.assert(
			fc.property(toss(), ({ parts, file, rate }) => {
				const { ghost, position, velocity, deck } = flown(parts, file).drop;
				const field = rate * rate * deck.radius;
				expect(ghost.field).toBeCloseTo(field, 9);
				if (ghost.end === null) throw new Error("it came to nothing");
				/** Something else than the floor comes first. */
				if (!ghost.point) return;
				landed++;
				const at = deck.floor === "curved" ? Math.atan2(position[1], position[0]) : deck.middle;
				const down = [Math.cos(at), Math.sin(at), 0];
				const t = ghost.end;
				const p = [0, 1, 2].map((i) => position[i]! + velocity[i]! * t + (field * down[i]! * t * t) / 2);
				const depth = deck.floor === "curved" ? Math.hypot(p[0]!, p[1]!) : p[0]! * down[0]! + p[1]! * down[1]!;
				const reach = deck.radius - file.object.diameter_m / 2;
				expect(Math.abs(depth - reach)).toBeLessThan(1e-7);
				/** The point of the floor below the centre it has then. */
				const apart = Math.hypot(...[0, 1, 2].map((i) => p[i]! - ghost.point![i]!));
				expect(apart).toBeCloseTo(file.object.diameter_m / 2, 7);
				expect(
					deck.floor === "curved" ? Math.hypot(ghost.point[0], ghost.point[1]) : ghost.point[0] * down[0]! + ghost.point[1] * down[1]!,
				).toBeCloseTo(deck.radius, 9);
				/** Nothing lower before. */
				for (let k = 1; k < 50; k++) {
					const s = (t * k) / 50;
					const q = [0, 1].map((i) => position[i]! + velocity[i]! * s + (field * down[i]! * s * s) / 2) as [number, number];
					expect(deck.floor === "curved" ? Math.hypot(...q) : q[0] * down[0]! + q[1] * down[1]!).toBeLessThan(reach + 1e-9);
				}
			}),
			{ seed: 71, numRuns: 120 },
		);
		expect(landed).toBeGreaterThan(60);
	});

	it("of a drop from rest lands straight below it", () => {
		const { ghost } = flown({}, dropFile({ from: { deck: "lower", angle_deg: 25, axial_m: -0.4, height_m: 1.5 } })).drop;
		const rate = (3.6 * Math.PI) / 30;
		expect(ghost.end).toBeCloseTo(Math.sqrt(3 / (rate * rate * 34)), 9);
		expect(Math.atan2(ghost.point![1], ghost.point![0])).toBeCloseTo((25 * Math.PI) / 180, 12);
		expect(ghost.point![2]).toBeCloseTo(-0.4, 12);
	});

	it("falls as slowly in the same air: ln cosh(√(gk) t) / k", () => {
		const file = dropFile({ object: { mass_kg: 0.01, diameter_m: 0.2, drag_coefficient: 1 }, drag: true });
		const { ghost, drag } = flown({}, file).drop;
		const x = Math.sqrt(ghost.field * drag) * ghost.end!;
		expect((x - Math.LN2 + Math.log1p(Math.exp(-2 * x))) / drag).toBeCloseTo(1.4, 8);
	});

	it("comes down nowhere without spin, unless thrown at the floor", () => {
		const still = { spin: { rate_rpm: 0 } };
		expect(flown(still, dropFile()).drop.ghost).toMatchObject({ end: null, point: null, field: 0 });
		const thrown = dropFile({ release: { speed_mps: 3, heading_deg: 0, elevation_deg: -90 } });
		expect(flown(still, thrown).drop.ghost.end).toBeCloseTo(0.5, 9);
	});

	it("that starts on the floor is there at once", () => {
		const file = dropFile({
			from: { deck: "lower", angle_deg: 0, axial_m: 0, height_m: 0.1 },
			object: { mass_kg: 1, diameter_m: 0.2, drag_coefficient: 1 },
		});
		expect(flown({}, file).drop.ghost.end).toBe(0);
	});
});
