import { pointAt } from "../../src/body/kinematics.ts";
import type { Pose } from "../../src/body/pose.ts";
import { JOINT } from "../../src/body/ranges.ts";
import { fraction } from "../../src/body/segments.ts";
import { limb, SEGMENTS, SIDES, trunk } from "../../src/body/skeleton.ts";

/** A drop in a ring of radius R turning at `rate` (rad/s): inertial straight line, mapped back; it stays where it lands. */
export function ringDrop(radius: number, rate: number, facing: number, forward: number, right: number, height: number, diameter: number) {
	const [c, s] = [Math.cos(facing), Math.sin(facing)];
	const prograde = forward * c - right * s;
	const axial = forward * s + right * c;
	const r0 = Math.hypot(prograde, radius - height);
	const angle0 = Math.atan2(prograde, radius - height);
	const landing = Math.sqrt(((radius - diameter / 2) / r0) ** 2 - 1) / rate;
	const track = (t: number, out: Float64Array): void => {
		const turn = rate * Math.min(t, landing);
		const r = r0 * Math.hypot(1, turn);
		const angle = angle0 + Math.atan(turn) - turn;
		out[0] = r * Math.sin(angle) * c + axial * s;
		out[1] = radius - r * Math.cos(angle);
		out[2] = -r * Math.sin(angle) * s + axial * c;
	};
	const floor = (f: number, q: number): number => radius - Math.sqrt(radius * radius - (f * c - q * s) ** 2);
	return { landing, track, floor };
}

/** Every joint angle outside its range, in words. */
export function outOfRange(pose: Pose): string[] {
	return SEGMENTS.flatMap(({ name, side }, i) =>
		JOINT[name].flatMap((axis, k) => {
			const angle = pose.angle[3 * i + k] as number;
			return angle >= axis.least - 1e-9 && angle <= axis.most + 1e-9 ? [] : [`${name} ${side} ${axis.name} ${(angle * 180) / Math.PI}°`];
		}),
	);
}

/** Largest distance of the sole's corners from the floor, m. */
export function soleGap(pose: Pose, floor: (forward: number, right: number) => number): number {
	const out = new Float64Array(3);
	let worst = 0;
	for (const side of SIDES)
		for (const x of [-fraction("heel"), 0, fraction("ball")])
			for (const z of [-0.5, 0.5]) {
				pointAt(
					pose,
					limb(side, "foot"),
					x * pose.stature,
					-fraction("ankleHeight") * pose.stature,
					z * fraction("footBreadth") * pose.stature,
					out,
				);
				worst = Math.max(worst, Math.abs((out[1] as number) - floor(out[0] as number, out[2] as number)));
			}
	return worst;
}

type Point = readonly [number, number, number];
interface Capsule {
	readonly name: string;
	readonly segment: number;
	readonly from: Point;
	readonly to: Point;
	/** × stature, as the points. */
	readonly radius: number;
}
const capsule = (name: string, segment: number, from: Point, to: Point, radius: number): Capsule => ({ name, segment, from, to, radius });

const TORSO = [
	capsule("chest", trunk("thorax"), [0, 0.08, -0.032], [0, 0.08, 0.032], 0.056),
	capsule("waist", trunk("abdomen"), [0.005, 0.035, -0.026], [0.005, 0.035, 0.026], 0.046),
	capsule("pelvis", trunk("pelvis"), [0, 0, -0.036], [0, 0, 0.036], 0.05),
];
const HEAD = capsule("head", trunk("head"), [0, 0.01, 0], [0, 0.05, 0], 0.042);
const arm = (side: 0 | 1) => [
	capsule(`hand ${side}`, limb(side, "hand"), [0, -0.015, 0], [0, -0.05, 0], 0.016),
	capsule(`forearm ${side}`, limb(side, "forearm"), [0, -0.02, 0], [0, -0.13, 0], 0.017),
	capsule(`elbow ${side}`, limb(side, "upperArm"), [0, -0.14, 0], [0, -0.18, 0], 0.022),
];
const leg = (side: 0 | 1) => [
	capsule(`thigh ${side}`, limb(side, "thigh"), [0, -0.1, 0], [0, -0.24, 0], 0.034),
	capsule(`shank ${side}`, limb(side, "shank"), [0, -0.02, 0], [0, -0.22, 0], 0.025),
	capsule(`foot ${side}`, limb(side, "foot"), [-0.015, -0.02, 0], [0.08, -0.022, 0], 0.02),
];
const pairs = (a: readonly Capsule[], b: readonly Capsule[]) => a.flatMap((x) => b.map((y) => [x, y] as const));
const PAIRS = [
	...pairs([...arm(0), ...arm(1)], [...TORSO, HEAD]),
	...pairs([...arm(0), ...arm(1)], [...leg(0), ...leg(1)]),
	...pairs(arm(0), arm(1)),
	...pairs(leg(0), leg(1)),
];

/** The deepest overlap of the body's proxy capsules, m (negative: the least gap), and whose. */
export function overlap(pose: Pose): { readonly depth: number; readonly pair: string } {
	let depth = Number.NEGATIVE_INFINITY;
	let pair = "";
	for (const [a, b] of PAIRS) {
		const d = (a.radius + b.radius) * pose.stature - segmentDistance(end(pose, a, 0), end(pose, a, 1), end(pose, b, 0), end(pose, b, 1));
		if (d > depth) {
			depth = d;
			pair = `${a.name} in ${b.name}`;
		}
	}
	return { depth, pair };
}

function end(pose: Pose, c: Capsule, which: 0 | 1): Float64Array {
	const out = new Float64Array(3);
	const [x, y, z] = which === 0 ? c.from : c.to;
	pointAt(pose, c.segment, x * pose.stature, y * pose.stature, z * pose.stature, out);
	return out;
}

/** Between two segments: each end of one is brought to its nearest point on the other in turn, which converges for convex sets. */
function segmentDistance(p: Float64Array, p2: Float64Array, q: Float64Array, q2: Float64Array): number {
	const a = p.slice();
	const b = q.slice();
	for (let round = 0; round < 12; round++) {
		nearestOn(q, q2, a, b);
		nearestOn(p, p2, b, a);
	}
	return Math.hypot((a[0] as number) - (b[0] as number), (a[1] as number) - (b[1] as number), (a[2] as number) - (b[2] as number));
}

function nearestOn(a: Float64Array, b: Float64Array, x: Float64Array, out: Float64Array): void {
	let [num, den] = [0, 0];
	for (let k = 0; k < 3; k++) {
		const d = (b[k] as number) - (a[k] as number);
		num += d * ((x[k] as number) - (a[k] as number));
		den += d * d;
	}
	const t = Math.min(1, Math.max(0, num / den));
	for (let k = 0; k < 3; k++) out[k] = (a[k] as number) + t * ((b[k] as number) - (a[k] as number));
}
