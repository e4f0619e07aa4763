import { directionInto, place, pointAt, pointInto } from "./kinematics.ts";
import type { Pose } from "./pose.ts";
import { JOINT } from "./ranges.ts";
import { LENGTH, limb, outward, SEGMENTS, type SegmentSpec, type Side } from "./skeleton.ts";

/**
 * Closed-form two-bone limbs: hinge elbow and knee, ball shoulder and hip. A left limb is solved as its
 * mirror image, so both sides share every line. Both solvers read the parent's transform (collar,
 * pelvis) and write angles and transforms down to the hand or the foot.
 */

const clamp = (x: number, least: number, most: number): number => Math.min(most, Math.max(least, x));
const target = new Float64Array(3);
const facing = new Float64Array(3);
/** Never quite straight: a locked elbow or knee is neither natural nor smooth in time. */
const ELBOW_LEAST = 0.06;
const KNEE_LEAST = 0.05;
const PRONATION = JOINT.forearm[2];
const ROUNDS = 6;

/** A rotation given by columns, decomposed as Rz(a) Rx(b) Ry(c) into the segment's anatomical angles, kept in their ranges. */
function setAngles(
	pose: Pose,
	segment: number,
	sign: readonly [number, number, number],
	yx: number,
	yy: number,
	yz: number,
	xz: number,
	zz: number,
): void {
	const [first, second, third] = JOINT[(SEGMENTS[segment] as SegmentSpec).name];
	pose.angle[3 * segment] = clamp(Math.atan2(-yx, yy) * sign[0], first.least, first.most);
	pose.angle[3 * segment + 1] = clamp(Math.asin(clamp(yz, -1, 1)) * sign[1], second.least, second.most);
	pose.angle[3 * segment + 2] = clamp(Math.atan2(-xz, zz) * sign[2], third.least, third.most);
}

/** The elbow points down and a little outward; this much outward and down, against one along the reach. */
export interface Swivel {
	readonly out: number;
	readonly down: number;
}
export const NATURAL_SWIVEL: Swivel = { out: 0.2, down: 0.25 };

/**
 * Puts the point `grip` of the hand (m, in a right hand's axes: −y along the fingers, −z out of the palm)
 * at the stance point (tx, ty, tz), the palm turned as near to the stance direction (px, py, pz) as the
 * forearm turns. The hand's own angles stay as they are in the pose. Returns the distance left, m: not zero
 * where the point is too far, too near, or beyond a joint's range.
 */
export function solveArm(
	pose: Pose,
	side: Side,
	t: ArrayLike<number>,
	grip: ArrayLike<number>,
	palm: ArrayLike<number>,
	swivel: Swivel = NATURAL_SWIVEL,
): number {
	const H = pose.stature;
	const m = outward(side);
	const collar = limb(side, "collar");
	const upperArm = limb(side, "upperArm");
	const forearm = limb(side, "forearm");
	const hand = limb(side, "hand");
	const offset = (SEGMENTS[upperArm] as SegmentSpec).offset;
	const Lu = LENGTH.upperArm * H;

	pointInto(pose, collar, t[0] as number, t[1] as number, t[2] as number, target);
	const tx = (target[0] as number) - offset[0] * H;
	const ty = (target[1] as number) - offset[1] * H;
	const tz = ((target[2] as number) - offset[2] * H) * m;
	directionInto(pose, collar, palm[0] as number, palm[1] as number, palm[2] as number, facing);
	const gx = facing[0] as number;
	const gy = facing[1] as number;
	const gz = (facing[2] as number) * m;
	const D = Math.max(Math.hypot(tx, ty, tz), 1e-6);
	const t1x = tx / D;
	const t1y = ty / D;
	const t1z = tz / D;

	// the hinge's world direction: where the elbow points × along the reach
	const hx = t1y;
	const hy = -t1x - swivel.down;
	const hz = swivel.out;
	let t3x = hy * t1z - hz * t1y;
	let t3y = hz * t1x - hx * t1z;
	let t3z = hx * t1y - hy * t1x;
	const l3 = Math.hypot(t3x, t3y, t3z);
	t3x /= l3;
	t3y /= l3;
	t3z /= l3;
	const t2x = t3y * t1z - t3z * t1y;
	const t2y = t3z * t1x - t3x * t1z;
	const t2z = t3x * t1y - t3y * t1x;

	// the grip in the forearm before pronation, and the palm's direction there
	const deviation = pose.angle[3 * hand] as number;
	const flexion = pose.angle[3 * hand + 1] as number;
	const cd = Math.cos(deviation);
	const sd = Math.sin(deviation);
	const cw = Math.cos(flexion);
	const sw = Math.sin(flexion);
	const ux = grip[0] as number;
	const uy = cw * (grip[1] as number) - sw * (grip[2] as number);
	const uz = sw * (grip[1] as number) + cw * (grip[2] as number);
	const qx = cd * ux - sd * uy;
	const qy = sd * ux + cd * uy - LENGTH.forearm * H;
	const qz = uz;
	const wx = -sd * sw;
	const wz = -cw;
	const q2 = qx * qx + qy * qy + qz * qz;

	let pronation = clamp(pose.angle[3 * forearm + 2] as number, PRONATION.least, PRONATION.most);
	let bend = 0;
	let yx = 0;
	let yy = 0;
	let yz = 0;
	let xz = 0;
	let zz = 0;
	for (let round = 0; ; round++) {
		const cp = Math.cos(pronation);
		const sp = Math.sin(pronation);
		const px = cp * qx + sp * qz;
		const pz = cp * qz - sp * qx;
		const rho = Math.hypot(px, qy);
		const beta = Math.atan2(px, qy);
		const cosine = (Lu * Lu + q2 - D * D) / (2 * Lu * rho);
		bend = clamp((beta < 0 ? beta + 2 * Math.PI : beta) - Math.acos(clamp(cosine, -1, 1)), ELBOW_LEAST, JOINT.forearm[0].most);
		const cb = Math.cos(bend);
		const sb = Math.sin(bend);
		const vx = cb * px - sb * qy;
		const vy = sb * px + cb * qy - Lu;
		const vz = pz;
		const reach = Math.hypot(vx, vy, vz);
		const e1x = vx / reach;
		const e1y = vy / reach;
		const e1z = vz / reach;
		const w = Math.hypot(e1x, e1y);
		// e3 = the hinge (0, 0, 1) made perpendicular to e1; e2 = e3 × e1 lies in its plane
		const e3x = (-e1z * e1x) / w;
		const e3y = (-e1z * e1y) / w;
		const e3z = w;
		const e2x = e3y * e1z - e3z * e1y;
		const e2y = e3z * e1x - e3x * e1z;
		const e2z = e3x * e1y - e3y * e1x;
		yx = t1x * e1y + t2x * e2y + t3x * e3y;
		yy = t1y * e1y + t2y * e2y + t3y * e3y;
		yz = t1z * e1y + t2z * e2y + t3z * e3y;
		const xx = t1x * e1x + t2x * e2x + t3x * e3x;
		const xy = t1y * e1x + t2y * e2x + t3y * e3x;
		xz = t1z * e1x + t2z * e2x + t3z * e3x;
		const zx = t1x * e1z + t2x * e2z + t3x * e3z;
		const zy = t1y * e1z + t2y * e2z + t3y * e3z;
		zz = t1z * e1z + t2z * e2z + t3z * e3z;
		if (round === ROUNDS) break;
		// the palm's wish in the bent, not yet turned forearm
		const ax = gx * xx + gy * xy + gz * xz;
		const ay = gx * yx + gy * yy + gz * yz;
		const az = gx * zx + gy * zy + gz * zz;
		const fx = cb * ax + sb * ay;
		pronation = clamp(Math.atan2(wz * fx - wx * az, wx * fx + wz * az), PRONATION.least, PRONATION.most);
	}
	setAngles(pose, upperArm, [1, -1, 1], yx, yy, yz, xz, zz);
	pose.angle[3 * forearm] = bend;
	pose.angle[3 * forearm + 1] = 0;
	pose.angle[3 * forearm + 2] = pronation;
	place(pose, upperArm);
	place(pose, forearm);
	place(pose, hand);
	pointAt(pose, hand, grip[0] as number, grip[1] as number, (grip[2] as number) * m, target);
	return Math.hypot(
		(target[0] as number) - (t[0] as number),
		(target[1] as number) - (t[1] as number),
		(target[2] as number) - (t[2] as number),
	);
}

/** Where a foot stands: its ankle axis (stance, m), how far its toes turn outward and point up, rad. */
export interface Foothold {
	readonly ankle: Float64Array;
	outward: number;
	pitch: number;
}

/** Puts the foot there, the knee bending along it. Returns how far its ankle stays away, m. */
export function solveLeg(pose: Pose, side: Side, foot: Foothold): number {
	const H = pose.stature;
	const m = outward(side);
	const thigh = limb(side, "thigh");
	const shank = limb(side, "shank");
	const ankle = limb(side, "foot");
	const L1 = LENGTH.thigh * H;
	const L2 = LENGTH.shank * H;
	const offset = (SEGMENTS[thigh] as SegmentSpec).offset;

	pointInto(pose, 0, foot.ankle[0] as number, foot.ankle[1] as number, foot.ankle[2] as number, target);
	const tx = (target[0] as number) - offset[0] * H;
	const ty = (target[1] as number) - offset[1] * H;
	const tz = ((target[2] as number) - offset[2] * H) * m;
	const distance = Math.max(Math.hypot(tx, ty, tz), 1e-6);
	const longest = Math.sqrt(L1 * L1 + L2 * L2 + 2 * L1 * L2 * Math.cos(KNEE_LEAST));
	const shortest = Math.sqrt(L1 * L1 + L2 * L2 + 2 * L1 * L2 * Math.cos(JOINT.shank[0].most));
	const D = clamp(distance, shortest, longest);
	// up the leg, its hinge to the right, and where the knee points
	const yx = -tx / distance;
	const yy = -ty / distance;
	const yz = -tz / distance;
	const co = Math.cos(foot.outward);
	const so = Math.sin(foot.outward);
	directionInto(pose, 0, co, 0, so * m, facing);
	const fx = facing[0] as number;
	const fy = facing[1] as number;
	const fz = (facing[2] as number) * m;
	let zx = fy * yz - fz * yy;
	let zy = fz * yx - fx * yz;
	let zz = fx * yy - fy * yx;
	const lz = Math.hypot(zx, zy, zz);
	zx /= lz;
	zy /= lz;
	zz /= lz;
	const xx = yy * zz - yz * zy;
	const xy = yz * zx - yx * zz;
	const xz = yx * zy - yy * zx;
	const alpha = Math.acos(clamp((L1 * L1 + D * D - L2 * L2) / (2 * L1 * D), -1, 1));
	const knee = Math.PI - Math.acos(clamp((L1 * L1 + L2 * L2 - D * D) / (2 * L1 * L2), -1, 1));
	const ca = Math.cos(alpha);
	const sa = Math.sin(alpha);
	// the thigh leans forward of the hip-ankle line by alpha: about z, x turns towards y
	setAngles(pose, thigh, [1, -1, 1], ca * yx - sa * xx, ca * yy - sa * xy, ca * yz - sa * xz, ca * xz + sa * yz, zz);
	pose.angle[3 * shank] = knee;
	pose.angle[3 * shank + 1] = 0;
	pose.angle[3 * shank + 2] = 0;
	place(pose, thigh);
	place(pose, shank);

	// the foot's fixed axes in the shank
	const cp = Math.cos(foot.pitch);
	const sp = Math.sin(foot.pitch);
	directionInto(pose, shank, co * cp, sp, so * cp * m, facing);
	const axz = (facing[2] as number) * m;
	directionInto(pose, shank, -co * sp, cp, -so * sp * m, facing);
	const ayx = facing[0] as number;
	const ayy = facing[1] as number;
	const ayz = (facing[2] as number) * m;
	directionInto(pose, shank, -so, 0, co * m, facing);
	setAngles(pose, ankle, [1, -1, 1], ayx, ayy, ayz, axz, (facing[2] as number) * m);
	place(pose, ankle);
	place(pose, limb(side, "toes"));
	const o = 16 * ankle + 12;
	const { world } = pose;
	return Math.hypot(
		(world[o] as number) - (foot.ankle[0] as number),
		(world[o + 1] as number) - (foot.ankle[1] as number),
		(world[o + 2] as number) - (foot.ankle[2] as number),
	);
}
