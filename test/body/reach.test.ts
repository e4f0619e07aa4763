import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { soleCorners, supportMargin } from "../../src/body/balance.ts";
import { deckFloor } from "../../src/body/floor.ts";
import { eyeMidpoint } from "../../src/body/gaze.ts";
import { gripPoint } from "../../src/body/hand.ts";
import { placeAll } from "../../src/body/kinematics.ts";
import { leastSquares } from "../../src/body/least-squares.ts";
import { solveArm, solveLeg } from "../../src/body/limb.ts";
import { createPose, type Pose } from "../../src/body/pose.ts";
import { JOINT } from "../../src/body/ranges.ts";
import { defaultFeet, palmPoint, poseStandingReach } from "../../src/body/reach.ts";
import { fraction } from "../../src/body/segments.ts";
import { LEFT, limb, outward, RIGHT, SEGMENT_COUNT, SIDES } from "../../src/body/skeleton.ts";
import type { Deck } from "../../src/layout/habitat.ts";
import { outOfRange, overlap } from "./support.ts";

const SEED = 20240611;
const out = new Float64Array(3);
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe("the arm", () => {
	it("brings the grip to any point before the shoulder it can reach, either side (seed 20240611)", () => {
		const point = fc.tuple(between(0.19, 0.3), between(-0.2, 0.2), between(-0.05, 0.15), fc.constantFrom(RIGHT, LEFT), between(0.02, 0.12));
		fc.assert(
			fc.property(point, ([x, y, z, side, diameter]) => {
				const pose = createPose(1.75);
				placeAll(pose);
				const shoulder = pose.world.subarray(16 * limb(side, "upperArm") + 12);
				const target = [
					x * 1.75 + (shoulder[0] as number),
					y * 1.75 + (shoulder[1] as number),
					z * 1.75 * outward(side) + (shoulder[2] as number),
				];
				gripPoint(1.75, diameter, out);
				fc.pre(Math.hypot(x, y, z) < 0.355);
				expect(solveArm(pose, side, target, out.slice(), [0, -1, 0])).toBeLessThan(1e-9);
				expect(outOfRange(pose)).toEqual([]);
			}),
			{ seed: SEED, numRuns: 400 },
		);
	});

	it("points straight at what is too far and says how far it stays away", () => {
		const pose = createPose(1.75);
		placeAll(pose);
		const gap = solveArm(pose, RIGHT, [3, 0.3, 0.2], [0, -0.08, -0.03], [0, -1, 0]);
		expect(gap).toBeGreaterThan(2);
		expect(pose.angle[3 * limb(RIGHT, "forearm")]).toBeLessThan(0.25);
	});
});

describe("the leg", () => {
	const place = fc.tuple(between(-0.12, 0.2), between(-0.47, -0.36), between(-0.02, 0.1), between(-0.1, 0.3), fc.constantFrom(RIGHT, LEFT));
	it("puts the ankle where it should be, the sole level, unless a joint is at its end or the leg too short (seed 20240611)", () => {
		fc.assert(
			fc.property(place, ([x, y, z, turn, side]) => {
				const pose = createPose(1.75);
				placeAll(pose);
				const ankle = new Float64Array([x * 1.75, y * 1.75, (0.05 + z) * 1.75 * outward(side)]);
				const gap = solveLeg(pose, side, { ankle, outward: turn, pitch: 0 });
				const flexion = (name: "thigh" | "foot") => (pose.angle[3 * limb(side, name)] as number) - JOINT[name][0].most;
				fc.pre(flexion("thigh") < -1e-6 && flexion("foot") < -1e-6 && Math.hypot(x, y, z) < 0.489);
				expect(gap).toBeLessThan(1e-9);
				const o = 16 * limb(side, "foot");
				for (let k = 0; k < 3; k++) expect(pose.world[o + 12 + k]).toBeCloseTo(ankle[k] as number, 8);
				expect(pose.world[o + 5]).toBeCloseTo(1, 9);
				expect(Math.atan2((pose.world[o + 2] as number) * outward(side), pose.world[o] as number)).toBeCloseTo(turn, 8);
			}),
			{ seed: SEED, numRuns: 400 },
		);
	});
});

describe("standing and reaching", () => {
	const standing = (stature: number, x: number, y: number, z: number, hand: "right" | "left" = "right"): Pose =>
		poseStandingReach({ stature, handTarget: [x, y, z], gazeTarget: [20, fraction("eyeHeight") * stature, 0], holding: 0.06, hand });

	it.each([1.486, 1.6, 1.75, 1.946])("stands with the eyes at 0.936 of %f m within 1 %", (stature) => {
		const { forward, right } = defaultFeet(0.62 * stature, stature, 0);
		eyeMidpoint(standing(stature, forward, 0.62 * stature, right), out);
		expect(Math.abs((out[1] as number) / (0.936 * stature) - 1)).toBeLessThan(0.01);
	});

	it("is mirrored by the other hand", () => {
		const right = standing(1.7, 0.4, 1.25, 0.2, "right");
		const left = standing(1.7, 0.4, 1.25, -0.2, "left");
		const swap = (i: number) => {
			for (const [a, b] of [[RIGHT, LEFT] as const, [LEFT, RIGHT] as const]) {
				const first = limb(a, "collar");
				if (i >= first && i <= limb(a, "toes")) return limb(b, "collar") + i - first;
			}
			return i;
		};
		for (let i = 0; i < SEGMENT_COUNT; i++)
			for (let c = 0; c < 4; c++)
				for (let r = 0; r < 3; r++) {
					const sign = (c === 2 ? -1 : 1) * (r === 2 ? -1 : 1);
					expect(left.world[16 * swap(i) + 4 * c + r]).toBeCloseTo(sign * (right.world[16 * i + 4 * c + r] as number), 5);
				}
	});

	it("keeps joints, balance and feet wherever the hand is sent (seed 20240611)", () => {
		const input = fc.tuple(
			between(1.486, 1.946),
			between(-0.3, 0.9),
			between(0, 2.3),
			between(-0.8, 0.8),
			fc.constantFrom("right" as const, "left" as const),
		);
		fc.assert(
			fc.property(input, ([stature, x, y, z, hand]) => {
				const pose = standing(stature, x, y, z, hand);
				expect(outOfRange(pose)).toEqual([]);
				expect(supportMargin(pose)).toBeGreaterThan(-0.01);
				for (const side of SIDES) expect(pose.world[16 * limb(side, "foot") + 13]).toBeCloseTo(fraction("ankleHeight") * stature, 1);
				palmPoint(pose, hand, 0.06, out);
				const miss = Math.hypot((out[0] as number) - x, (out[1] as number) - y, (out[2] as number) - z);
				if (pose.reach.kind === "reached") expect(miss).toBeLessThan(0.002);
				else expect(pose.reach).toEqual({ kind: "short", gap: expect.closeTo(miss, 9) });
			}),
			{ seed: SEED, numRuns: 60 },
		);
	});

	it("goes down for a low point and does not run into itself", () => {
		for (const y of [0.25, 0.45, 0.65]) {
			const pose = standing(1.946, 0.42, y, 0.18);
			expect(pose.reach.kind).toBe("reached");
			expect(overlap(pose).depth).toBeLessThan(0);
		}
	});

	it("moves little when its target moves little", () => {
		let before: Pose | null = null;
		for (let y = 0.3; y < 2; y += 0.01) {
			const pose = standing(1.75, 0.36, y, 0.18);
			if (before !== null && pose.reach.kind === "reached") {
				const moved = pose.world.reduce((m, v, i) => Math.max(m, i % 16 > 11 ? Math.abs(v - ((before as Pose).world[i] as number)) : 0), 0);
				expect(moved, `at ${y} m`).toBeLessThan(0.05);
			}
			before = pose;
		}
	});

	it("stands on the floor it is given", () => {
		const slope = (forward: number) => 0.05 * forward;
		const pose = poseStandingReach({
			stature: 1.7,
			handTarget: [0.4, 1.2, 0.2],
			gazeTarget: [3, 1.5, 0],
			holding: null,
			hand: "right",
			floor: slope,
		});
		for (const [x] of soleCorners(pose)) expect(Number.isFinite(x)).toBe(true);
		const o = 16 * limb(RIGHT, "foot");
		expect((pose.world[o + 1] as number) / (pose.world[o] as number)).toBeCloseTo(0.05, 2);
	});

	it("finds the floor of a curved deck risen before and behind along the ring, of a flat one level", () => {
		const deck = { floor: "curved", radius: 10 } as Deck;
		expect(deckFloor(deck, 0)(1, 5)).toBeCloseTo(10 - Math.sqrt(99), 12);
		expect(deckFloor(deck, Math.PI / 2)(5, -1)).toBeCloseTo(10 - Math.sqrt(99), 12);
		expect(deckFloor({ ...deck, floor: "flat" }, 0)(1, 5)).toBe(0);
	});

	it("turns the palm up to throw upward and down to let go", () => {
		const palmUp = (velocity: readonly [number, number, number]) => {
			const pose = poseStandingReach({
				stature: 1.75,
				handTarget: [0.4, 1.15, 0.2],
				gazeTarget: [3, 1.5, 0],
				holding: 0.06,
				hand: "right",
				velocity,
			});
			return -(pose.world[16 * limb(RIGHT, "hand") + 9] as number);
		};
		expect(palmUp([0, 0, 0])).toBeLessThan(-0.5);
		expect(palmUp([1, 3, 0])).toBeGreaterThan(0.5);
	});

	it("refuses a target that is not finite", () => {
		expect(() => standing(1.7, Number.NaN, 1, 0)).toThrow(/NaN/);
	});
});

describe("default feet", () => {
	it("put the stance behind the hand for the facing", () => {
		const f = defaultFeet(1.4, 1.75, 0);
		expect(f.prograde).toBeCloseTo(-f.forward, 12);
		expect(f.axial).toBeCloseTo(-f.right, 12);
		const turned = defaultFeet(1.4, 1.75, Math.PI / 2);
		expect(turned.axial).toBeCloseTo(-turned.forward, 12);
		expect(turned.prograde).toBeCloseTo(turned.right, 12);
		expect(defaultFeet(1.4, 1.75, 0, "left").right).toBe(-f.right);
	});

	it("leave the elbow bent at every height from the hip to over the head", () => {
		for (let u = 0.55; u < 1.1; u += 0.05) {
			const { forward, right } = defaultFeet(u * 1.7, 1.7, 0);
			const pose = poseStandingReach({
				stature: 1.7,
				handTarget: [forward, u * 1.7, right],
				gazeTarget: [3, 1.5, 0],
				holding: 0.06,
				hand: "right",
			});
			const elbow = ((pose.angle[3 * limb(RIGHT, "forearm")] as number) * 180) / Math.PI;
			expect(elbow).toBeGreaterThan(40);
			expect(elbow).toBeLessThan(125);
		}
	});
});

describe("least squares", () => {
	it("finds Rosenbrock's valley floor", () => {
		const p = new Float64Array([-1.2, 1]);
		const rest = leastSquares(
			(q, r) => {
				r[0] = 10 * ((q[1] as number) - (q[0] as number) ** 2);
				r[1] = 1 - (q[0] as number);
			},
			p,
			2,
			200,
		);
		expect(rest).toBeLessThan(1e-12);
		expect(p[0]).toBeCloseTo(1, 5);
		expect(p[1]).toBeCloseTo(1, 5);
	});
});
