import type { Pose } from "./pose.ts";
import { limb, SEGMENT_COUNT, SEGMENTS, type SegmentSpec, SIDES, trunk } from "./skeleton.ts";

type Out = Float64Array;

/** Writes the world transform of one segment from its parent's and its own angles. */
export function place(pose: Pose, segment: number): void {
	const { world, angle, root, stature } = pose;
	const { parent, offset, sign } = SEGMENTS[segment] as SegmentSpec;
	const a = (angle[3 * segment] as number) * sign[0];
	const b = (angle[3 * segment + 1] as number) * sign[1];
	const c = (angle[3 * segment + 2] as number) * sign[2];
	const ca = Math.cos(a);
	const sa = Math.sin(a);
	const cb = Math.cos(b);
	const sb = Math.sin(b);
	const cc = Math.cos(c);
	const sc = Math.sin(c);
	// Rz(a) Rx(b) Ry(c), columns x, y, z
	const xx = cc * ca - sc * sa * sb;
	const xy = cc * sa + sc * ca * sb;
	const xz = -sc * cb;
	const yx = -sa * cb;
	const yy = ca * cb;
	const yz = sb;
	const zx = sc * ca + cc * sa * sb;
	const zy = sc * sa - cc * ca * sb;
	const zz = cc * cb;
	const o = 16 * segment;
	if (parent < 0) {
		put(world, o, xx, xy, xz);
		put(world, o + 4, yx, yy, yz);
		put(world, o + 8, zx, zy, zz);
		put(world, o + 12, root[0] as number, root[1] as number, root[2] as number);
	} else {
		const p = 16 * parent;
		turned(world, p, o, xx, xy, xz);
		turned(world, p, o + 4, yx, yy, yz);
		turned(world, p, o + 8, zx, zy, zz);
		turned(world, p, o + 12, offset[0] * stature, offset[1] * stature, offset[2] * stature);
		world[o + 12] = (world[o + 12] as number) + (world[p + 12] as number);
		world[o + 13] = (world[o + 13] as number) + (world[p + 13] as number);
		world[o + 14] = (world[o + 14] as number) + (world[p + 14] as number);
	}
	world[o + 3] = 0;
	world[o + 7] = 0;
	world[o + 11] = 0;
	world[o + 15] = 1;
}

/** Forward kinematics of the whole body. */
export function placeAll(pose: Pose): void {
	for (let i = 0; i < SEGMENT_COUNT; i++) place(pose, i);
}

/** The same from the chest up: chest, neck, head and both arms. */
export function placeFromChest(pose: Pose): void {
	for (let i = trunk("thorax"); i <= trunk("head"); i++) place(pose, i);
	for (const side of SIDES) for (let i = limb(side, "collar"); i <= limb(side, "thumbTip"); i++) place(pose, i);
}

function put(m: Out, at: number, x: number, y: number, z: number): void {
	m[at] = x;
	m[at + 1] = y;
	m[at + 2] = z;
}

function turned(m: Out, p: number, at: number, x: number, y: number, z: number): void {
	for (let k = 0; k < 3; k++) m[at + k] = (m[p + k] as number) * x + (m[p + 4 + k] as number) * y + (m[p + 8 + k] as number) * z;
}

/** Writes where a point of a segment (its own axes, m) lies in the stance frame. */
export function pointAt(pose: Pose, segment: number, x: number, y: number, z: number, out: Out): void {
	const { world } = pose;
	const o = 16 * segment;
	for (let k = 0; k < 3; k++)
		out[k] =
			(world[o + k] as number) * x + (world[o + 4 + k] as number) * y + (world[o + 8 + k] as number) * z + (world[o + 12 + k] as number);
}

/** Writes the components of a stance direction along a segment's axes. */
export function directionInto(pose: Pose, segment: number, x: number, y: number, z: number, out: Out): void {
	const { world } = pose;
	const o = 16 * segment;
	for (let k = 0; k < 3; k++)
		out[k] = (world[o + 4 * k] as number) * x + (world[o + 4 * k + 1] as number) * y + (world[o + 4 * k + 2] as number) * z;
}

/** Writes the coordinates of a stance point in a segment's axes. */
export function pointInto(pose: Pose, segment: number, x: number, y: number, z: number, out: Out): void {
	const { world } = pose;
	const o = 16 * segment + 12;
	directionInto(pose, segment, x - (world[o] as number), y - (world[o + 1] as number), z - (world[o + 2] as number), out);
}

/** Writes the segment transforms, column-major, 16 numbers a segment, as a renderer wants them. */
export function writeTransforms(pose: Pose, out: Float32Array): void {
	out.set(pose.world);
}
