import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { directionFromRaDec, raDecFromDirection } from "../../src/sky/direction.ts";
import { icrs, length } from "../../src/vector/vec3.ts";

describe("directions in the sky", () => {
	it.each([
		[0, 0, [1, 0, 0]],
		[Math.PI / 2, 0, [0, 1, 0]],
		[1.234, Math.PI / 2, [0, 0, 1]],
		[0, -Math.PI / 6, [Math.sqrt(0.75), 0, -0.5]],
		[(3 * Math.PI) / 2, 0, [0, -1, 0]],
	])("right ascension %d, declination %d rad", (ra, dec, expected) => {
		const v = directionFromRaDec(ra, dec);
		for (const k of [0, 1, 2] as const) expect(v[k]).toBeCloseTo(expected[k] as number, 15);
	});

	it("come back from a vector of any length (seed 61)", () => {
		fc.assert(
			fc.property(
				fc.double({ min: 0, max: 2 * Math.PI, maxExcluded: true, noNaN: true }),
				fc.double({ min: -1.57, max: 1.57, noNaN: true }),
				fc.double({ min: 1e-6, max: 1e6, noNaN: true }),
				(ra, dec, size) => {
					const v = directionFromRaDec(ra, dec);
					expect(length(v)).toBeCloseTo(1, 14);
					const back = raDecFromDirection(icrs(v[0] * size, v[1] * size, v[2] * size));
					expect(back.declination).toBeCloseTo(dec, 12);
					const turn = Math.abs((back.rightAscension as number) - ra);
					expect(Math.min(turn, 2 * Math.PI - turn)).toBeLessThan(1e-11);
					expect(back.rightAscension).toBeGreaterThanOrEqual(0);
					expect(back.rightAscension).toBeLessThan(2 * Math.PI);
				},
			),
			{ seed: 61 },
		);
	});

	it("have no right ascension within 1e-9 rad of a pole", () => {
		for (const sign of [1, -1]) {
			expect(raDecFromDirection(icrs(0, 0, 3 * sign))).toEqual({ rightAscension: null, declination: (sign * Math.PI) / 2 });
			expect(raDecFromDirection(icrs(0.9e-9, 0, sign)).rightAscension).toBeNull();
			expect(raDecFromDirection(icrs(0, -1.1e-9, sign)).rightAscension).toBeCloseTo((3 * Math.PI) / 2, 12);
		}
		expect(raDecFromDirection(icrs(1, -1e-30, 0)).rightAscension).toBe(0);
	});

	it.each([[0, 0, 0] as const, [Number.NaN, 0, 1] as const, [Number.POSITIVE_INFINITY, 0, 0] as const])(
		"refuse (%d, %d, %d)",
		(x, y, z) => {
			expect(() => raDecFromDirection(icrs(x, y, z))).toThrow(/no direction/);
		},
	);
});
