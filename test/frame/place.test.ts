import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { cylindricalFromRing, directionOf, localFromRing, ringFromCylindrical, ringFromLocal, triadAt } from "../../src/frame/place.ts";
import { cross, dot, local, ring, sub } from "../../src/vector/vec3.ts";
import { within } from "../support/arbitrary.ts";

const angle = within(-7, 7);

describe("local directions", () => {
	it("are right-handed unit vectors: prograde × up = axial", () => {
		fc.assert(
			fc.property(angle, (a) => {
				const { prograde, up, axial } = triadAt(a);
				for (const u of [prograde, up, axial]) expect(dot(u, u)).toBeCloseTo(1, 14);
				const z = cross(prograde, up);
				for (let i = 0; i < 3; i++) expect(z[i]).toBeCloseTo(axial[i]!, 14);
			}),
			{ seed: 31 },
		);
	});

	it("point with the floor (Ω × r) and towards the axis", () => {
		fc.assert(
			fc.property(angle, within(0.5, 1000), (a, r) => {
				const p = ringFromCylindrical({ radius: r, angle: a, axial: 3 });
				const moves = cross(ring(0, 0, 1), p);
				const { prograde, up } = triadAt(a);
				expect(dot(moves, prograde) / r).toBeCloseTo(1, 12);
				expect(dot(p, up) / r).toBeCloseTo(-1, 12);
			}),
			{ seed: 32 },
		);
	});

	it("carry a vector there and back", () => {
		fc.assert(
			fc.property(angle, within(-9, 9), within(-9, 9), within(-9, 9), (a, x, y, z) => {
				const back = localFromRing(triadAt(a), ringFromLocal(triadAt(a), local(x, y, z)));
				for (const [i, value] of [x, y, z].entries()) expect(back[i]).toBeCloseTo(value, 12);
			}),
			{ seed: 33 },
		);
	});
});

describe("headings", () => {
	it.each([
		[0, 0, [1, 0, 0]],
		[90, 0, [0, 0, 1]],
		[180, 0, [-1, 0, 0]],
		[270, 0, [0, 0, -1]],
		[45, 90, [0, 1, 0]],
		[0, -90, [0, -1, 0]],
		[360 + 90, 0, [0, 0, 1]],
	] as const)("%i°, elevation %i°", (heading, elevation, [prograde, up, axial]) => {
		const u = directionOf((heading * Math.PI) / 180, (elevation * Math.PI) / 180);
		expect(u[0]).toBeCloseTo(prograde, 15);
		expect(u[1]).toBeCloseTo(up, 15);
		expect(u[2]).toBeCloseTo(axial, 15);
	});

	it("run clockwise as seen from above", () => {
		const [a, b] = [directionOf(0.3, 0), directionOf(0.4, 0)];
		/** Seen from inboard, up points at the eye: a clockwise turn is against it. */
		const at = triadAt(1);
		expect(dot(cross(ringFromLocal(at, a), ringFromLocal(at, b)), at.up)).toBeLessThan(0);
	});
});

it("cylindrical coordinates there and back, angle in (−π, π]", () => {
	fc.assert(
		fc.property(within(0.5, 1e4), angle, within(-100, 100), (radius, a, axial) => {
			const p = ringFromCylindrical({ radius, angle: a, axial });
			const c = cylindricalFromRing(p);
			expect(c.angle).toBeGreaterThan(-Math.PI - 1e-15);
			expect(c.angle).toBeLessThanOrEqual(Math.PI);
			const apart = sub(ringFromCylindrical(c), p);
			expect(Math.hypot(...apart)).toBeLessThan(1e-11 * radius + 1e-12);
		}),
		{ seed: 34 },
	);
});
