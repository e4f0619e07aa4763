import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { constantSpin, profileSpin } from "../../src/frame/spin.ts";
import { degFromRad, radFromDeg, radpsFromRpm } from "../../src/quantity/convert.ts";
import { aboutX, aboutY, aboutZ, inverse, type Rotation, rotate } from "../../src/vector/rotation.ts";
import { cross, dot, type HeadVec, head, length, scale, sub, unit } from "../../src/vector/vec3.ts";
import {
	crossCoupled,
	crossCoupledPeak,
	type HeadTurn,
	headRate,
	seenByHead,
	spinAxisInHead,
	spinInHead,
	TURN_AXES,
	turnAngle,
	turnRate,
} from "../../src/vestibular/head-turn.ts";

const spin = constantSpin(radpsFromRpm(4));
const component = fc.double({ min: -1, max: 1, noNaN: true });
const direction = fc
	.tuple(component, component, component)
	.filter(([x, y, z]) => Math.hypot(x, y, z) > 0.1)
	.map(([x, y, z]) => unit(head(x, y, z)));
const turns = fc
	.tuple(direction, fc.double({ min: -3, max: 3, noNaN: true }), fc.double({ min: 0.05, max: 5, noNaN: true }))
	.map(([axis, angle, duration]): HeadTurn => ({ axis, angle, duration }));

describe("head axes", () => {
	it.each([
		[0, [0, -1, 0], "on the right"],
		[90, [1, 0, 0], "ahead"],
		[180, [0, 1, 0], "on the left"],
		[270, [-1, 0, 0], "behind"],
	])("facing %d° the spin axis lies at %j, %s", (deg, expected) => {
		const v = spinAxisInHead(radFromDeg(deg));
		for (const k of [0, 1, 2] as const) expect(v[k]).toBeCloseTo(expected[k] as number, 15);
	});

	it("yaw is to the left, pitch nose down, roll right ear down", () => {
		const nose = head(1, 0, 0);
		const rightEar = head(0, -1, 0);
		expect(cross(TURN_AXES.yaw, nose)[1]).toBe(1);
		expect(cross(TURN_AXES.pitch, nose)[2]).toBe(-1);
		expect(cross(TURN_AXES.roll, rightEar)[2]).toBe(-1);
	});
});

describe("head turn", () => {
	it("starts and ends at rest and turns through its angle; the rate is its derivative", () => {
		const turn: HeadTurn = { axis: TURN_AXES.yaw, angle: radFromDeg(90), duration: 0.8 };
		expect([-1, 0, 0.8, 5].map((t) => turnRate(turn, t))).toEqual([0, 0, 0, 0]);
		expect([-1, 0, 0.8, 5].map((t) => turnAngle(turn, t))).toEqual([0, 0, turn.angle, turn.angle]);
		for (const t of [0.05, 0.3, 0.4, 0.75])
			expect((turnAngle(turn, t + 1e-6) - turnAngle(turn, t - 1e-6)) / 2e-6).toBeCloseTo(turnRate(turn, t), 7);
		expect(degFromRad(turnRate(turn, 0.4))).toBeCloseTo((1.875 * 90) / 0.8, 10);
	});

	it.each([
		["yaw", aboutZ],
		["pitch", aboutY],
		["roll", aboutX],
	] as const)("%s sees a still vector turned backwards", (name, about) => {
		const turn: HeadTurn = { axis: TURN_AXES[name], angle: 1.1, duration: 2 };
		const v = head(0.3, -0.8, 0.5);
		const back = rotate(inverse(about(turnAngle(turn, 1.3)) as Rotation<"head", "head">), v);
		for (const k of [0, 1, 2] as const) expect(seenByHead(turn, v)(1.3)[k]).toBeCloseTo(back[k], 14);
	});

	it("changes the spin it sees by 2 Ω sin γ sin(a/2) (seed 101)", () => {
		fc.assert(
			fc.property(turns, direction, (turn, axis) => {
				const change = sub(spinInHead(turn, spin, axis)(turn.duration), spinInHead(turn, spin, axis)(0));
				const sine = length(cross(axis, turn.axis));
				expect(length(change)).toBeCloseTo(2 * spin.rate(0) * sine * Math.abs(Math.sin(turn.angle / 2)), 12);
			}),
			{ seed: 101 },
		);
	});

	it("cross-coupled acceleration is the rate at which that changes, at right angles to the turn (seed 102)", () => {
		fc.assert(
			fc.property(turns, direction, fc.double({ min: 0.05, max: 0.95, noNaN: true }), (turn, axis, x) => {
				const t = x * turn.duration;
				const d = 1e-5 * turn.duration;
				const change = scale(sub(spinInHead(turn, spin, axis)(t + d), spinInHead(turn, spin, axis)(t - d)), 1 / (2 * d));
				const said = crossCoupled(turn, spin, axis)(t);
				expect(length(sub(said, change))).toBeLessThan(1e-6 * (1 + length(said)));
				expect(Math.abs(dot(said, turn.axis))).toBeLessThan(1e-12 * (1 + length(said)));
				expect(length(said)).toBeLessThanOrEqual(crossCoupledPeak(turn, spin, axis) * (1 + 1e-12) + 1e-15);
			}),
			{ seed: 102 },
		);
	});

	it("its peak is at mid-turn at steady spin, none about the spin axis, and follows a changing spin", () => {
		const turn: HeadTurn = { axis: TURN_AXES.yaw, angle: -1.2, duration: 0.7 };
		expect(crossCoupledPeak(turn, spin, head(1, 0, 0))).toBeCloseTo(length(crossCoupled(turn, spin, head(1, 0, 0))(0.35)), 13);
		expect(crossCoupledPeak(turn, spin, head(0, 0, 1))).toBe(0);
		const level = profileSpin([
			{ t: 0, rate: spin.rate(0) },
			{ t: 0.7, rate: spin.rate(0) * (1 + 1e-12) },
		]);
		expect(level.constant).toBe(false);
		expect(crossCoupledPeak(turn, level, head(1, 0, 0))).toBeCloseTo(crossCoupledPeak(turn, spin, head(1, 0, 0)), 9);
		const falling = profileSpin([
			{ t: 0, rate: 0.5 },
			{ t: 0.7, rate: 0 },
		]);
		let brute = 0;
		for (let t = 0; t <= 0.7; t += 1e-5) brute = Math.max(brute, length(crossCoupled(turn, falling, head(1, 0, 0))(t)));
		expect(crossCoupledPeak(turn, falling, head(1, 0, 0))).toBeCloseTo(brute, 8);
	});

	it("the absolute rate is that of the product of both turns (seed 103)", () => {
		/** Head to inertial: spin about the axis by Ωt, then the turn in the ring. */
		const attitude = (turn: HeadTurn, axis: HeadVec, t: number, v: HeadVec): HeadVec =>
			seenByHead({ axis, angle: -spin.angle(t), duration: 1 }, seenByHead({ ...turn, angle: -turn.angle }, v)(t))(1);
		fc.assert(
			fc.property(turns, direction, fc.double({ min: 0.1, max: 0.9, noNaN: true }), (turn, axis, x) => {
				const t = x * turn.duration;
				const d = 1e-5 * turn.duration;
				const omega = headRate(turn, spin, axis)(t);
				for (const v of [head(1, 0, 0), head(0, 1, 0), head(0, 0, 1)]) {
					const moved = scale(sub(attitude(turn, axis, t + d, v), attitude(turn, axis, t - d, v)), 1 / (2 * d));
					const said = attitude(turn, axis, t, cross(omega, v));
					expect(length(sub(moved, said))).toBeLessThan(1e-6 * (1 + length(omega)));
				}
			}),
			{ seed: 103 },
		);
	});
});
