import { radFromDeg } from "../quantity/convert.ts";
import { directionInto, place, pointAt } from "./kinematics.ts";
import type { Pose } from "./pose.ts";
import { type Axis, JOINT } from "./ranges.ts";
import { fraction } from "./segments.ts";
import { trunk } from "./skeleton.ts";

/** How far head and eyes go, rad. The head's share of a gaze shift saturates smoothly; the eyes take the rest. */
export const GAZE = {
	/** Of the head below and above the horizon, and to either side of the chest. */
	headDown: radFromDeg(50),
	headUp: radFromDeg(40),
	headSide: radFromDeg(70),
	/** Of the eyes in the head: clinical ranges of ductions, recalled from memory. */
	eyeSide: radFromDeg(42),
	eyeUp: radFromDeg(32),
	eyeDown: radFromDeg(45),
	share: 0.72,
	/** The chest's share of looking down, and its most. */
	chest: 0.12,
	chestMost: radFromDeg(9),
} as const;

/** The identity near zero, levelling off at ±most; the cube keeps it straight for longer than a tanh. */
const saturate = (x: number, most: number): number => x / Math.cbrt(1 + Math.abs(x / most) ** 3);
const v = new Float64Array(3);
const w = new Float64Array(3);

/** Writes the point about which a gaze turns, before neck and head do: above the base of the neck, m. */
export function gazePivot(pose: Pose, out: Float64Array): void {
	pointAt(pose, trunk("neck"), 0.014 * pose.stature, (fraction("headHeight") - fraction("neckHeight")) * pose.stature, 0, out);
}

/** Writes the unit direction from `pivot` to a point, held above −`lowest` rad of elevation. */
export function lookDirection(pivot: Float64Array, target: ArrayLike<number>, lowest: number, out: Float64Array): void {
	const dx = (target[0] as number) - (pivot[0] as number);
	const dy = (target[1] as number) - (pivot[1] as number);
	const dz = (target[2] as number) - (pivot[2] as number);
	unitAbove(dx, dy, dz, lowest, out);
}

/** The unit direction of (x, y, z), its elevation raised to at least −lowest (rad). */
function unitAbove(x: number, y: number, z: number, lowest: number, out: Float64Array): void {
	const level = Math.max(Math.hypot(x, z), 1e-6);
	const elevation = Math.max(Math.atan2(y, level), -lowest);
	out[0] = (Math.cos(elevation) * x) / level;
	out[1] = Math.sin(elevation);
	out[2] = (Math.cos(elevation) * z) / level;
}

/** How far below the horizon a unit direction points, rad; a point behind counts as at the feet. */
const downOf = (d: ArrayLike<number>): number => {
	const ahead = d[0] as number;
	const level = 0.5 * (ahead + Math.hypot(ahead, 0.2));
	return Math.atan2(-(d[1] as number), Math.hypot(level, d[2] as number));
};

/** The chest's own bow when looking along a unit stance direction, rad. */
export const chestBow = (direction: ArrayLike<number>): number => {
	const down = downOf(direction);
	return saturate(Math.max(down, 0) * GAZE.chest, GAZE.chestMost);
};

/** Turns neck and head towards a unit stance direction; the chest stays where it is. */
export function turnHead(pose: Pose, direction: ArrayLike<number>): void {
	const thorax = trunk("thorax");
	const neck = trunk("neck");
	const head = trunk("head");
	directionInto(pose, thorax, direction[0] as number, 0, direction[2] as number, v);
	// behind the chest the turn keeps growing only towards the side: no flip at the back or over the feet
	const ahead = 0.5 * ((v[0] as number) + Math.hypot(v[0] as number, 0.35));
	const turn = saturate(-Math.atan2(v[2] as number, ahead) * GAZE.share, GAZE.headSide);
	const down = downOf(direction);
	const nod = saturate(down * (down > 0 ? 0.86 : GAZE.share), down > 0 ? GAZE.headDown : GAZE.headUp);
	const { world, angle } = pose;
	const o = 16 * thorax;
	const chest = Math.atan2(-(world[o + 1] as number), world[o + 5] as number);
	const flexion = nod - chest;
	share(angle, neck, head, 0, flexion, 0.52);
	share(angle, neck, head, 2, turn, 0.45);
	// the head stays level sideways while the chest leans
	const lean = Math.asin(Math.max(-1, Math.min(1, world[o + 6] as number)));
	share(angle, neck, head, 1, -0.9 * lean, 0.65);
	place(pose, neck);
	place(pose, head);
}

/** Divides an angle between neck and head, each levelling off at the end of its range. */
function share(angle: Float64Array, neck: number, head: number, axis: 0 | 1 | 2, whole: number, part: number): void {
	angle[3 * neck + axis] = levelled(whole * part, JOINT.neck[axis]);
	angle[3 * head + axis] = levelled(whole * (1 - part), JOINT.head[axis]);
}

const levelled = (x: number, { least, most }: Axis): number => saturateRange(x, least, most, 0.8);

/** Points the eyes at a stance point within their range in the head, and above −lowest (rad) of elevation. */
export function turnEyes(pose: Pose, target: ArrayLike<number>, lowest: number): void {
	const head = trunk("head");
	eyeMidpoint(pose, v);
	unitAbove(
		(target[0] as number) - (v[0] as number),
		(target[1] as number) - (v[1] as number),
		(target[2] as number) - (v[2] as number),
		lowest,
		w,
	);
	directionInto(pose, head, w[0] as number, w[1] as number, w[2] as number, v);
	const ahead = (v[0] as number) > 0.2 ? (v[0] as number) : 0.2 * Math.exp(5 * (v[0] as number) - 1);
	const side = saturateRange(Math.atan2(v[2] as number, ahead), -GAZE.eyeSide, GAZE.eyeSide, 0.93);
	const up = saturateRange(Math.atan2(v[1] as number, Math.hypot(ahead, v[2] as number)), -GAZE.eyeDown, GAZE.eyeUp, 0.93);
	const x = Math.cos(up) * Math.cos(side);
	const y = Math.sin(up);
	const z = Math.cos(up) * Math.sin(side);
	const o = 16 * head;
	const { world, gaze } = pose;
	for (let k = 0; k < 3; k++) gaze[k] = (world[o + k] as number) * x + (world[o + 4 + k] as number) * y + (world[o + 8 + k] as number) * z;
}

/** The identity up to `part` of the range, then a smooth approach to its end. */
function saturateRange(x: number, least: number, most: number, part: number): number {
	const end = x < 0 ? -least : most;
	const knee = part * end;
	const size = Math.abs(x);
	if (size <= knee) return x;
	return Math.sign(x) * (knee + (end - knee) * Math.tanh((size - knee) / (end - knee)));
}

/** Writes the point midway between the eyes, m. */
export function eyeMidpoint(pose: Pose, out: Float64Array): void {
	const H = pose.stature;
	pointAt(pose, trunk("head"), fraction("eyeForward") * H, (fraction("eyeHeight") - fraction("headHeight")) * H, 0, out);
}

/** Where Eyepoint looks from: stance frame, all unit but `position` (m). */
export interface EyePoint {
	readonly position: Float64Array;
	readonly gaze: Float64Array;
	/** The head's own forward and up, for a camera that keeps the head's roll. */
	readonly forward: Float64Array;
	readonly up: Float64Array;
}
export const createEyePoint = (): EyePoint => ({
	position: new Float64Array(3),
	gaze: new Float64Array(3),
	forward: new Float64Array(3),
	up: new Float64Array(3),
});

export function eyePoint(pose: Pose, out: EyePoint): void {
	eyeMidpoint(pose, out.position);
	out.gaze.set(pose.gaze);
	const o = 16 * trunk("head");
	for (let k = 0; k < 3; k++) {
		out.forward[k] = pose.world[o + k] as number;
		out.up[k] = pose.world[o + 4 + k] as number;
	}
}

/** Writes the middle of the head, m. */
export function headCentre(pose: Pose, out: Float64Array): void {
	pointAt(pose, trunk("head"), 0, 0.03 * pose.stature, 0, out);
}
