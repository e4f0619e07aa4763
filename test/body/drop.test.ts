import { describe, expect, it } from "vitest";
import { soleCorners, supportMargin } from "../../src/body/balance.ts";
import { createDropper, dropPose, poseFor } from "../../src/body/drop.ts";
import { eyeMidpoint, GAZE } from "../../src/body/gaze.ts";
import { copyPose, createPose, type Pose } from "../../src/body/pose.ts";
import { defaultFeet, type Hand, palmPoint } from "../../src/body/reach.ts";
import { SEGMENT_COUNT, trunk } from "../../src/body/skeleton.ts";
import { outOfRange, overlap, ringDrop, soleGap } from "./support.ts";

const STATURES = [1.486, 1.618, 1.759, 1.946];
const HEIGHTS = [0.3, 0.6, 0.9, 1.2, 1.5, 1.7, 1.9];
const FACINGS = [0, 2.4, 4.1];
const HANDS: readonly Hand[] = ["right", "left"];
const DIAMETER = 0.06;
/** Over this share of stature a palm cannot be lifted with the feet on the floor. */
const OVERHEAD = 1.22;
const out = new Float64Array(3);

const prepare = (stature: number, height: number, facing: number, hand: Hand) => {
	const feet = defaultFeet(height, stature, facing, hand);
	const scene = ringDrop(34, 0.377, facing, feet.forward, feet.right, height, DIAMETER);
	return { ...scene, person: createDropper({ stature, hand, diameter: DIAMETER, track: scene.track, floor: scene.floor }) };
};

const farthestMove = (a: Pose, b: Pose): number => {
	let most = 0;
	for (let i = 0; i < SEGMENT_COUNT; i++)
		most = Math.max(most, Math.hypot(...[12, 13, 14].map((k) => (a.world[16 * i + k] as number) - (b.world[16 * i + k] as number))));
	return most;
};

describe.each(STATURES)("a drop by a person of %f m", (stature) => {
	const cases = HEIGHTS.flatMap((height, i) => HANDS.map((hand) => ({ height, hand, facing: FACINGS[i % FACINGS.length] as number })));

	it.each(cases)(
		"from $height m, $hand hand, facing $facing: feet, palm, joints, balance, clearance, smoothness",
		({ height, hand, facing }) => {
			const { person, track, floor, landing } = prepare(stature, height, facing, hand);
			const reachable = height / stature < OVERHEAD;
			expect(person.held.reach.kind).toBe(reachable ? "reached" : "short");
			track(0, out);
			const [x, y, z] = out as unknown as [number, number, number];
			palmPoint(person.held, hand, DIAMETER, out);
			const miss = Math.hypot((out[0] as number) - x, (out[1] as number) - y, (out[2] as number) - z);
			if (person.held.reach.kind === "short") expect(miss).toBeCloseTo(person.held.reach.gap, 6);
			else expect(miss).toBeLessThan(0.01);

			const pose = poseFor(person);
			const before = createPose(stature);
			const step = 1 / 120;
			const count = Math.ceil((landing + 0.8) / step);
			for (let i = -12; i <= count; i++) {
				dropPose(person, i * step, pose);
				expect(pose.world.every(Number.isFinite)).toBe(true);
				if (i > -12) {
					expect(farthestMove(pose, before), `at ${i * step} s`).toBeLessThan(0.008);
					// a body that falls close past the face is followed at up to 600°/s
					const cosine = pose.gaze.reduce((s, v, k) => s + v * (before.gaze[k] as number), 0);
					expect(Math.acos(Math.min(1, cosine)), `gaze at ${i * step} s`).toBeLessThan(0.09);
				}
				copyPose(pose, before);
				if (i % 8 !== 0) continue;
				expect(outOfRange(pose), `at ${i * step} s`).toEqual([]);
				expect(soleGap(pose, floor)).toBeLessThan(0.02);
				expect(supportMargin(pose)).toBeGreaterThan(0.02);
				const { depth, pair } = overlap(pose);
				expect(depth, `${pair} at ${i * step} s`).toBeLessThan(0);
			}
		},
	);
});

describe("a drop", () => {
	const { person, landing, track } = prepare(1.946, 1.5, 0, "right");
	const pose = poseFor(person);
	const below = () => Math.asin(-(pose.gaze[1] as number));
	const headDown = () => Math.asin(-(pose.world[16 * trunk("head") + 1] as number));

	it("holds still before release", () => {
		dropPose(person, -1, pose);
		const then = pose.world.slice();
		dropPose(person, 0, pose);
		expect(pose.world).toEqual(then);
	});

	it("looks at most 45° down until release, however low the hand is", () => {
		const low = prepare(1.946, 1.1, 0, "right");
		const at = poseFor(low.person);
		dropPose(low.person, 0, at);
		expect(Math.asin(-(at.gaze[1] as number))).toBeLessThan((45.01 * Math.PI) / 180);
		dropPose(low.person, low.landing, at);
		expect(Math.asin(-(at.gaze[1] as number))).toBeGreaterThan((60 * Math.PI) / 180);
	});

	it("looks at where the body lies a moment after it landed, the head at most 50° down", () => {
		for (let t = 0; t < landing + 0.6; t += 0.02) {
			dropPose(person, t, pose);
			expect(headDown()).toBeLessThan(GAZE.headDown + 1e-9);
		}
		track(landing, out);
		const spot = out.slice();
		eyeMidpoint(pose, out);
		const to = spot.map((v, k) => v - (out[k] as number));
		const cosine = to.reduce((s, v, k) => s + v * (pose.gaze[k] as number), 0) / Math.hypot(...to);
		expect(Math.acos(Math.min(1, cosine))).toBeLessThan(0.01);
		expect(below()).toBeGreaterThan(0.9);
	});

	it("opens the hand and lets the arm down a little, the feet as they were", () => {
		dropPose(person, 0, pose);
		const feet = soleCorners(pose);
		palmPoint(pose, "right", DIAMETER, out);
		const high = out[1] as number;
		dropPose(person, 2, pose);
		palmPoint(pose, "right", DIAMETER, out);
		expect(high - (out[1] as number)).toBeGreaterThan(0.05);
		expect(high - (out[1] as number)).toBeLessThan(0.25);
		expect(soleCorners(pose)).toEqual(feet);
	});

	it("is a function of time alone, whatever was asked before", () => {
		dropPose(person, 0.31, pose);
		const then = pose.world.slice();
		dropPose(person, 5, pose);
		dropPose(person, 0.31, pose);
		expect(pose.world).toEqual(then);
	});
});
