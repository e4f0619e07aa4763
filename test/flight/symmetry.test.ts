import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { StraightPath } from "../../src/flight/path.ts";
import { constantSpin, profileSpin, type Spin } from "../../src/frame/spin.ts";
import { type RingVec, ring } from "../../src/vector/vec3.ts";
import { toss, within } from "../support/arbitrary.ts";
import { flown } from "../support/flown.ts";

const vector = (size: number): fc.Arbitrary<RingVec> =>
	fc.tuple(within(-size, size), within(-size, size), within(-size, size)).map(([x, y, z]) => ring(x, y, z));
const at = (path: StraightPath, t: number): Float64Array => {
	const s = new Float64Array(6);
	path.stateAt(t, s);
	return s;
};

describe("free flight", () => {
	it("keeps ½v² − ½Ω²r² at constant spin without drag", () => {
		fc.assert(
			fc.property(within(0, 6), vector(200), vector(50), within(0, 100), (rate, p, v, t) => {
				const path = new StraightPath(constantSpin(rate), p, v);
				const energy = (s: Float64Array): number =>
					0.5 * (s[3]! ** 2 + s[4]! ** 2 + s[5]! ** 2) - 0.5 * rate * rate * (s[0]! ** 2 + s[1]! ** 2);
				const s = at(path, t);
				const size = 1 + s[3]! ** 2 + s[4]! ** 2 + s[5]! ** 2 + rate * rate * (s[0]! ** 2 + s[1]! ** 2);
				expect(Math.abs(energy(s) - energy(at(path, 0)))).toBeLessThan(1e-12 * size);
			}),
			{ seed: 51, numRuns: 300 },
		);
	});

	it("goes back the way it came: reversed and mirrored across θ = 0, the spin run backwards", () => {
		fc.assert(
			fc.property(within(0, 3), within(0, 3), vector(100), vector(20), within(0.1, 20), (a, b, p, v, t) => {
				const spin = (from: number, to: number): Spin =>
					profileSpin([
						{ t: 0, rate: from },
						{ t, rate: to },
					]);
				const end = at(new StraightPath(spin(a, b), p, v), t);
				const back = new StraightPath(spin(b, a), ring(end[0]!, -end[1]!, end[2]!), ring(-end[3]!, end[4]!, -end[5]!));
				const start = at(back, t);
				const size = 1e-12 * (100 + 20 * t + (a + b) * (100 + 20 * t) * t);
				const expected = [p[0], -p[1], p[2], -v[0], v[1], -v[2]];
				for (const [i, value] of expected.entries()) expect(Math.abs(start[i]! - value)).toBeLessThan(size * (i < 3 ? 1 : 1 + a + b));
			}),
			{ seed: 52, numRuns: 200 },
		);
	});

	it("sweeps the angle its state turns through, over whole turns too", () => {
		fc.assert(
			fc.property(within(0.05, 3), vector(100), vector(20), within(0, 60), (rate, p, v, end) => {
				const path = new StraightPath(constantSpin(rate), p, v);
				if (Math.hypot(path.px * path.uy - path.py * path.ux) < 1) return;
				let swept = 0;
				let before = Math.atan2(p[1], p[0]);
				const steps = 6000;
				for (let i = 1; i <= steps; i++) {
					const s = at(path, (end * i) / steps);
					const now = Math.atan2(s[1]!, s[0]!);
					const turn = now - before;
					swept += turn - 2 * Math.PI * Math.round(turn / (2 * Math.PI));
					before = now;
				}
				expect(path.sweptAt(end)).toBeCloseTo(swept, 8);
			}),
			{ seed: 53, numRuns: 60 },
		);
	});

	it("mirrors along the axis: z → −z swaps the ends and the sign of the axial offset, nothing else", () => {
		fc.assert(
			fc.property(toss(), fc.boolean(), ({ parts, file }, drag) => {
				const mirrored = {
					...file,
					drag,
					from: { ...file.from, axial_m: -file.from.axial_m },
					...(file.release ? { release: { ...file.release, heading_deg: -file.release.heading_deg } } : {}),
				};
				const [a, b] = [flown(parts, { ...file, drag }).drop, flown(parts, mirrored).drop];
				const swap: Record<string, string> = { "end-low": "end-high", "end-high": "end-low" };
				expect(b.flight.struck.kind).toBe(swap[a.flight.struck.kind] ?? a.flight.struck.kind);
				expect(b.flight.end).toBeCloseTo(a.flight.end, 9);
				if (!a.landing || !b.landing) return;
				expect(b.landing.prograde ?? 0).toBeCloseTo(a.landing.prograde ?? 0, 8);
				expect(b.landing.axial ?? 0).toBeCloseTo(-(a.landing.axial ?? 0), 8);
				expect(b.landing.speed).toBeCloseTo(a.landing.speed, 8);
			}),
			{ seed: 54, numRuns: 150 },
		);
	});

	it("does not depend on where the angles begin: 359° on −15…15 is −1°", () => {
		fc.assert(
			fc.property(toss(), fc.constantFrom(-720, -360, 360, 3600), ({ parts, file }, turn) => {
				const turned = { ...file, from: { ...file.from, angle_deg: file.from.angle_deg + turn } };
				const [a, b] = [flown(parts, file).drop, flown(parts, turned).drop];
				expect(b.flight.struck).toEqual(a.flight.struck);
				expect(b.flight.end).toBeCloseTo(a.flight.end, 9);
				expect(b.landing?.prograde ?? 0).toBeCloseTo(a.landing?.prograde ?? 0, 8);
			}),
			{ seed: 55, numRuns: 60 },
		);
	});
});
