import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DragPath } from "../../src/flight/drag-path.ts";
import { StraightPath } from "../../src/flight/path.ts";
import { constantSpin, profileSpin } from "../../src/frame/spin.ts";
import { type RingVec, ring } from "../../src/vector/vec3.ts";
import { toss, within } from "../support/arbitrary.ts";
import { flown } from "../support/flown.ts";

const vector = (size: number): fc.Arbitrary<RingVec> =>
	fc.tuple(within(-size, size), within(-size, size), within(-size, size)).map(([x, y, z]) => ring(x, y, z));
const NO_FIELD = ring(0, 0, 0);
const advanced = (path: DragPath, until: number): DragPath => {
	while (path.known < until) path.advance(until - path.known + 1e-9);
	return path;
};
const read = (path: DragPath | StraightPath, t: number): Float64Array => {
	const s = new Float64Array(6);
	path.stateAt(t, s);
	return s;
};

describe("the integrator", () => {
	it("without drag reproduces the closed form, state and angle swept, at constant and changing spin", () => {
		fc.assert(
			fc.property(within(0, 2), within(0, 2), vector(100), vector(20), within(0.1, 20), within(0, 1), (a, b, p, v, until, share) => {
				const spin = profileSpin([
					{ t: 0, rate: a },
					{ t: until / 2, rate: b },
				]);
				const ours = advanced(new DragPath(spin, p, v, 0, NO_FIELD), until);
				const closed = new StraightPath(spin, p, v);
				const t = share * until;
				const [s, c] = [read(ours, t), read(closed, t)];
				const size = 100 + (20 + 100 * a) * t;
				for (let i = 0; i < 6; i++) expect(Math.abs(s[i]! - c[i]!)).toBeLessThan(1e-9 * size * (1 + a + b));
				if (Math.hypot(closed.px * closed.uy - closed.py * closed.ux) > 1) expect(ours.sweptAt(t)).toBeCloseTo(closed.sweptAt(t), 7);
			}),
			{ seed: 61, numRuns: 150 },
		);
	});

	it("slows a body in still air as 1 / (1 + k v₀ t), gone ln(1 + k v₀ t) / k", () => {
		fc.assert(
			fc.property(within(0.001, 20), within(0.1, 50), within(0.01, 20), (k, v, until) => {
				const s = read(advanced(new DragPath(constantSpin(0), ring(30, 0, 0), ring(0, 0, v), k, NO_FIELD), until), until);
				expect(s[5]! * (1 + k * v * until)).toBeCloseTo(v, 6);
				expect(Math.abs(s[2]! - Math.log1p(k * v * until) / k)).toBeLessThan(1e-8 * (1 + s[2]!));
			}),
			{ seed: 62, numRuns: 150 },
		);
	});

	it("lets a body fall as ln cosh(√(gk) t) / k in a uniform field", () => {
		fc.assert(
			fc.property(within(0.001, 20), within(0.5, 12), within(0.01, 5), (k, g, until) => {
				const s = read(advanced(new DragPath(constantSpin(0), ring(30, 0, 0), ring(0, 0, 0), k, ring(0, 0, -g)), until), until);
				const x = Math.sqrt(g * k) * until;
				/** ln cosh x = x − ln 2 + ln(1 + e^(−2x)). */
				expect(Math.abs(-s[2]! - (x - Math.LN2 + Math.log1p(Math.exp(-2 * x))) / k)).toBeLessThan(1e-8 * (1 + g * until * until));
				expect(-s[5]!).toBeCloseTo(Math.sqrt(g / k) * Math.tanh(x), 7);
			}),
			{ seed: 63, numRuns: 150 },
		);
	});

	it("carries a body that is still in the inertial frame along with the air, never faster than it", () => {
		const rate = 0.4;
		const path = advanced(new DragPath(constantSpin(rate), ring(30, 0, 0), ring(0, -rate * 30, 0), 1, NO_FIELD), 3);
		for (let t = 0.1; t <= 3; t += 0.1) {
			const s = read(path, t);
			const against = -(s[0]! * s[4]! - s[1]! * s[3]!) / Math.hypot(s[0]!, s[1]!);
			expect(against).toBeGreaterThan(0);
			expect(against).toBeLessThan(rate * 30);
		}
	});

	it.each([-1e-9, Number.NaN, Number.POSITIVE_INFINITY])("refuses a drag factor of %d", (k) => {
		expect(() => new DragPath(constantSpin(0.1), ring(1, 0, 0), NO_FIELD, k, NO_FIELD)).toThrow(RangeError);
	});
});

describe("a toss in air", () => {
	it("tends to the closed form as the drag goes to nothing, in proportion to it", () => {
		fc.assert(
			fc.property(toss({ drag: true }), ({ parts, file }) => {
				const light = (coefficient: number) =>
					flown(parts, {
						...file,
						object: { ...file.object, diameter_m: Math.max(0.02, file.object.diameter_m), drag_coefficient: coefficient },
					}).drop;
				const [none, tiny] = [light(0), light(1e-9)];
				expect(tiny.flight.struck).toEqual(none.flight.struck);
				expect(tiny.drag).toBeGreaterThan(0);
				expect(none.flight.path).toBeInstanceOf(StraightPath);
				expect(tiny.flight.path).toBeInstanceOf(DragPath);
				if (!none.landing || !tiny.landing) return;
				expect(Math.abs(tiny.flight.end - none.flight.end)).toBeLessThan(1e-7);
				for (const key of ["prograde", "axial", "speed"] as const)
					expect(Math.abs((tiny.landing[key] ?? 0) - (none.landing[key] ?? 0)), key).toBeLessThan(1e-6);
			}),
			{ seed: 64, numRuns: 120 },
		);
	});

	it("is of a point without area where the diameter is 0: no drag at all", () => {
		fc.assert(
			fc.property(toss({ drag: true }), ({ parts, file }) => {
				const point = { ...file, object: { ...file.object, diameter_m: 0 }, from: { ...file.from } };
				expect(flown(parts, point).drop.flight.path).toBeInstanceOf(StraightPath);
			}),
			{ seed: 65, numRuns: 20 },
		);
	});

	it("survives the heaviest drag of a bottle cap of foil: 0.1 g, 0.3 m, in bounded time", () => {
		const { drop } = flown(
			{},
			{
				id: "foil",
				kind: "drop",
				crew: "one",
				from: { deck: "lower", angle_deg: 0, axial_m: 0, height_m: 1.5 },
				release: { speed_mps: 50, heading_deg: 20, elevation_deg: 10 },
				object: { mass_kg: 1e-4, diameter_m: 0.3, drag_coefficient: 1.2 },
				drag: true,
			},
		);
		expect(drop.flight.struck).toMatchObject({ kind: "deck" });
		/** At the end it falls at its terminal speed √(a/k), k = ½ρC_dA/m. */
		const level = (3.6 * Math.PI) / 30;
		expect(drop.landing!.speed / Math.sqrt((level * level * 33.85) / drop.drag)).toBeCloseTo(1, 2);
	});
});
