import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { StraightPath } from "../../src/flight/path.ts";
import { apparentParts } from "../../src/frame/apparent.ts";
import { localFromRing, triadAt } from "../../src/frame/place.ts";
import { constantSpin, profileSpin } from "../../src/frame/spin.ts";
import { length, type RingVec, ring } from "../../src/vector/vec3.ts";
import { within } from "../support/arbitrary.ts";
import { apparentByDifferences } from "../truth/inertial.ts";

const vector = (size: number): fc.Arbitrary<RingVec> =>
	fc.tuple(within(-size, size), within(-size, size), within(-size, size)).map(([x, y, z]) => ring(x, y, z));
const STILL = ring(0, 0, 0);
/** [prograde, up, axial] of the parts for a body at angle 0. */
const parts = (rate: number, velocity: RingVec, rateDot = 0) => {
	const spin = { ...constantSpin(rate), rateDot: () => rateDot };
	const found = apparentParts(spin, 0, ring(30, 0, 0), velocity, STILL);
	const at = triadAt(0);
	return {
		centrifugal: localFromRing(at, found.centrifugal),
		coriolis: localFromRing(at, found.coriolis),
		euler: localFromRing(at, found.euler),
	};
};

describe("signs", () => {
	const rate = 0.4;
	it("press outward at rest", () => {
		expect([...parts(rate, STILL).centrifugal]).toEqual([0, -rate * rate * 30, 0]);
	});
	it("push with spin on the way in, against spin on the way out", () => {
		expect(parts(rate, ring(-1, 0, 0)).coriolis[0]).toBeCloseTo(2 * rate, 15);
		expect(parts(rate, ring(1, 0, 0)).coriolis[0]).toBeCloseTo(-2 * rate, 15);
	});
	it("make who runs with spin heavier and who runs against it lighter", () => {
		expect(parts(rate, ring(0, 2, 0)).coriolis[1]).toBeCloseTo(-2 * rate * 2, 15);
		expect(parts(rate, ring(0, -2, 0)).coriolis[1]).toBeCloseTo(2 * rate * 2, 15);
	});
	it("do nothing along the axis", () => {
		expect(length(apparentParts(constantSpin(rate), 0, ring(30, 0, 5), ring(0, 0, 3), STILL).coriolis)).toBe(0);
	});
	it("throw forward, with spin, while the spin slows", () => {
		expect(parts(rate, STILL, -0.01).euler[0]).toBeCloseTo(0.3, 15);
		expect(parts(rate, STILL, 0.01).euler[0]).toBeCloseTo(-0.3, 15);
	});
});

describe("apparent gravity", () => {
	it("closes: G = C + K + E + A", () => {
		fc.assert(
			fc.property(within(0, 6), within(0.1, 30), vector(100), vector(20), vector(20), (rate, t, p, v, a) => {
				const spin = profileSpin([
					{ t: 0, rate },
					{ t: 40, rate: rate / 2 },
				]);
				const { centrifugal, coriolis, euler, own, sum } = apparentParts(spin, t, p, v, a);
				for (let i = 0; i < 3; i++) expect(sum[i]).toBeCloseTo(centrifugal[i]! + coriolis[i]! + euler[i]! + own[i]!, 9);
			}),
			{ seed: 21, numRuns: 200 },
		);
	});

	it("is nothing on a free body, while the spin changes too", () => {
		fc.assert(
			fc.property(within(0, 2), within(1, 30), vector(100), vector(20), (rate, t, p, v) => {
				const spin = profileSpin([
					{ t: 0, rate },
					{ t: 40, rate: rate / 3 },
				]);
				const path = new StraightPath(spin, p, v);
				const h = 1e-4;
				const [before, now, after] = [t - h, t, t + h].map((at) => {
					const s = new Float64Array(6);
					path.stateAt(at, s);
					return s;
				}) as [Float64Array, Float64Array, Float64Array];
				const own = ring((after[3]! - before[3]!) / (2 * h), (after[4]! - before[4]!) / (2 * h), 0);
				const { sum } = apparentParts(spin, t, ring(now[0]!, now[1]!, now[2]!), ring(now[3]!, now[4]!, now[5]!), own);
				/** What a central difference leaves: h²/6 of the third derivative of the velocity, about rate³ × speed. */
				const pace = Math.hypot(now[3]!, now[4]!) + rate * Math.hypot(now[0]!, now[1]!);
				expect(length(sum)).toBeLessThanOrEqual(h * h * 3 * (rate + 0.1) ** 3 * pace + 1e-10 * pace + 1e-9);
			}),
			{ seed: 22, numRuns: 200 },
		);
	});

	it("is what the second differences of the inertial path give, whichever way the body moves", () => {
		fc.assert(
			fc.property(within(0.05, 1.5), within(3, 200), vector(5), vector(5), (rate, r, v, a) => {
				const path = (t: number): [number, number, number] => [
					r + v[0] * t + (a[0] * t * t) / 2,
					v[1] * t + (a[1] * t * t) / 2,
					v[2] * t + (a[2] * t * t) / 2,
				];
				const ours = apparentParts(constantSpin(rate), 0, ring(r, 0, 0), v, a).sum;
				const theirs = apparentByDifferences(rate, path);
				/** Rounding of the differences: 1e-16 of the radius over h². */
				for (let i = 0; i < 3; i++) expect(Math.abs(ours[i]! - theirs[i]!)).toBeLessThan(1e-6);
			}),
			{ seed: 23, numRuns: 200 },
		);
	});
});
