import { describe, expect, it } from "vitest";
import { massCentre } from "../../src/body/balance.ts";
import { eyeMidpoint } from "../../src/body/gaze.ts";
import { placeAll, pointAt, pointInto, writeTransforms } from "../../src/body/kinematics.ts";
import { createPose } from "../../src/body/pose.ts";
import { JOINT } from "../../src/body/ranges.ts";
import { FRACTION, fraction, MASS } from "../../src/body/segments.ts";
import { LEFT, limb, RIGHT, SEGMENT_COUNT, SEGMENTS, SIDES, type Side, trunk } from "../../src/body/skeleton.ts";

const out = new Float64Array(3);
const erect = (stature: number) => {
	const pose = createPose(stature);
	pose.root[1] = fraction("hipHeight") * stature;
	placeAll(pose);
	return pose;
};

describe("segments", () => {
	it("have masses that add up to the body", () => {
		const sum = SEGMENTS.reduce((s, { mass }) => s + mass, 0);
		expect(sum).toBeCloseTo(1, 12);
		expect(MASS.thorax.value + MASS.abdomen.value + MASS.pelvis.value).toBeCloseTo(0.497, 12);
	});

	it("name a source each, and say which values are recalled", () => {
		for (const f of [...Object.values(FRACTION), ...Object.values(MASS)]) {
			expect(f.source.length).toBeGreaterThan(10);
			expect(f.value).toBeGreaterThan(0);
		}
		expect(FRACTION.eyeHeight.recalled).toBe(true);
		expect(MASS.thigh.recalled).toBe(false);
	});
});

describe.each([1.486, 1.7, 1.946])("the erect skeleton of %f m", (stature) => {
	const pose = erect(stature);
	const height = (segment: number, y = 0) => {
		pointAt(pose, segment, 0, y * stature, 0, out);
		return (out[1] as number) / stature;
	};

	it("has its landmarks at the reference heights", () => {
		for (const side of SIDES) {
			expect(height(limb(side, "upperArm"))).toBeCloseTo(0.818, 9);
			expect(height(limb(side, "forearm"))).toBeCloseTo(0.63, 9);
			expect(height(limb(side, "hand"))).toBeCloseTo(0.485, 9);
			expect(height(limb(side, "thigh"))).toBeCloseTo(0.53, 9);
			expect(height(limb(side, "shank"))).toBeCloseTo(0.285, 9);
			expect(height(limb(side, "foot"))).toBeCloseTo(0.039, 9);
		}
		eyeMidpoint(pose, out);
		expect((out[1] as number) / stature).toBeCloseTo(0.936, 9);
	});

	it("has its mass centre at 0.55–0.57 of stature, in the middle", () => {
		massCentre(pose, out);
		expect((out[1] as number) / stature).toBeGreaterThan(0.55);
		expect((out[1] as number) / stature).toBeLessThan(0.575);
		expect(out[2]).toBeCloseTo(0, 12);
	});
});

describe("joints", () => {
	const turn = (segment: number, axis: 0 | 1 | 2, probe: readonly [number, number, number]) => {
		const pose = erect(1);
		pointAt(pose, segment, ...probe, out);
		const before = out.slice();
		pose.angle[3 * segment + axis] = 0.3;
		placeAll(pose);
		pointAt(pose, segment, ...probe, out);
		return out.map((v, k) => v - (before[k] as number));
	};
	const down = [0, -0.2, 0] as const;
	const ahead = [0.2, 0, 0] as const;
	const up = [0, 0.2, 0] as const;

	it.each([
		["flexed trunk goes forward", trunk("thorax"), 0, up, [0, 1]],
		["trunk bends to the right", trunk("abdomen"), 1, up, [2, 1]],
		["head turns to the left", trunk("head"), 2, ahead, [2, -1]],
		["head nods down", trunk("head"), 0, ahead, [1, -1]],
	] as const)("%s", (_, segment, axis, probe, [component, sign]) => {
		expect(Math.sign(turn(segment, axis, probe)[component] as number)).toBe(sign);
	});

	it.each([
		["flexed shoulder lifts the arm forward", "upperArm", 0, down, 0, 1],
		["abducted arm goes outward", "upperArm", 1, down, 2, 1],
		["flexed elbow brings the forearm forward", "forearm", 0, down, 0, 1],
		["pronation turns the thumb inward", "forearm", 2, ahead, 2, -1],
		["flexed wrist brings the fingers to the palm's side", "hand", 1, down, 2, -1],
		["radial deviation goes to the thumb's side", "hand", 0, down, 0, 1],
		["flexed hip lifts the thigh forward", "thigh", 0, down, 0, 1],
		["abducted leg goes outward", "thigh", 1, down, 2, 1],
		["flexed knee brings the shank back", "shank", 0, down, 0, -1],
		["dorsiflexed foot lifts the toes", "foot", 0, ahead, 1, 1],
		["raised collar bone lifts the shoulder", "collar", 1, [0, 0, 0.2], 1, 1],
		["protracted collar bone brings the shoulder forward", "collar", 2, [0, 0, 0.2], 0, 1],
	] as const)("%s, on both sides", (_, name, axis, probe, component, sign) => {
		for (const side of SIDES) {
			const m = side === RIGHT ? 1 : -1;
			const p = [probe[0], probe[1], probe[2] * m] as const;
			const moved = (turn(limb(side, name), axis, p)[component] as number) * (component === 2 ? m : 1);
			expect(Math.sign(moved)).toBe(sign);
		}
	});

	it("all have a range that holds zero or is fixed there", () => {
		for (const joint of Object.values(JOINT))
			for (const axis of joint) {
				expect(axis.least).toBeLessThanOrEqual(0);
				expect(axis.most).toBeGreaterThanOrEqual(0);
				if (axis.basis === "fixed") expect([axis.least, axis.most]).toEqual([0, 0]);
			}
	});
});

describe("forward kinematics", () => {
	const pose = erect(1.8);
	/** A fixed scatter of angles, golden-ratio spaced. */
	pose.angle.forEach((_, i) => {
		pose.angle[i] = ((i * 0.618034) % 1) - 0.5;
	});
	placeAll(pose);

	it("keeps every segment's axes orthonormal and right-handed", () => {
		for (let i = 0; i < SEGMENT_COUNT; i++) {
			const column = (c: number) => pose.world.subarray(16 * i + 4 * c, 16 * i + 4 * c + 3);
			const dot = (a: Float64Array, b: Float64Array) => a.reduce((s, v, k) => s + v * (b[k] as number), 0);
			const [x, y, z] = [column(0), column(1), column(2)];
			expect(dot(x, x)).toBeCloseTo(1, 12);
			expect(dot(y, y)).toBeCloseTo(1, 12);
			expect(dot(x, y)).toBeCloseTo(0, 12);
			expect((x[0] as number) * (y[1] as number) - (x[1] as number) * (y[0] as number)).toBeCloseTo(z[2] as number, 12);
		}
	});

	it("keeps bone lengths, and takes a point out and back", () => {
		const lengthOf = (side: Side) => {
			pointInto(
				pose,
				limb(side, "upperArm"),
				...(pose.world.slice(16 * limb(side, "forearm") + 12, 16 * limb(side, "forearm") + 15) as unknown as [number, number, number]),
				out,
			);
			return Math.hypot(...out);
		};
		expect(lengthOf(RIGHT)).toBeCloseTo(0.188 * 1.8, 12);
		expect(lengthOf(LEFT)).toBeCloseTo(0.188 * 1.8, 12);
	});

	it("writes 16 numbers a segment, column by column", () => {
		const target = new Float32Array(16 * SEGMENT_COUNT);
		writeTransforms(pose, target);
		expect(target[15]).toBe(1);
		expect(target[16 * 3 + 12]).toBeCloseTo(pose.world[16 * 3 + 12] as number, 6);
	});

	it("refuses a stature that is no length", () => {
		expect(() => createPose(0)).toThrow(/stature/);
		expect(() => createPose(Number.NaN)).toThrow(/NaN/);
	});
});
