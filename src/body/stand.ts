import { radFromDeg } from "../quantity/convert.ts";
import { massCentre } from "./balance.ts";
import { place, placeAll, pointAt } from "./kinematics.ts";
import { leastSquares } from "./least-squares.ts";
import { type Foothold, solveArm, solveLeg } from "./limb.ts";
import type { Pose } from "./pose.ts";
import { fraction } from "./segments.ts";
import { LENGTH, limb, outward, SIDES, type Side, trunk } from "./skeleton.ts";

/** Height of the floor under a stance point, m. */
export type Floor = (forward: number, right: number) => number;
export const LEVEL: Floor = () => 0;

/** What a standing person does with one hand; vectors in the stance frame. */
export interface StandingTask {
	/** Right, left. */
	readonly feet: readonly [Foothold, Foothold];
	readonly side: Side;
	/** Where the grip point goes, m. */
	readonly target: Float64Array;
	/** The grip point in a right hand's axes, m. */
	readonly grip: Float64Array;
	/** Unit, where the palm should face. */
	readonly palm: Float64Array;
}

const TURN_OUT = radFromDeg(7);
const HALF_WIDTH = 0.056;
const STAGGER = 0.014;

/** Feet a little apart and turned out, the one on the hand's side a little ahead; flat on the floor. */
export function standingFeet(stature: number, side: Side, floor: Floor): readonly [Foothold, Foothold] {
	const ankle = fraction("ankleHeight") * stature;
	const back = fraction("heel") * stature;
	const front = (fraction("footLength") - fraction("heel")) * stature;
	const half = (front - back) / 2;
	return SIDES.map((s) => {
		const m = outward(s);
		const x = (s === side ? 1 : -1) * STAGGER * stature - half * Math.cos(TURN_OUT);
		const z = m * HALF_WIDTH * stature;
		const heel = floor(x - back * Math.cos(TURN_OUT), z - m * back * Math.sin(TURN_OUT));
		const toe = floor(x + front * Math.cos(TURN_OUT), z + m * front * Math.sin(TURN_OUT));
		const pitch = Math.atan2(toe - heel, front + back);
		const under = heel + ((toe - heel) * back) / (front + back);
		return { ankle: new Float64Array([x - ankle * Math.sin(pitch), under + ankle * Math.cos(pitch), z]), outward: TURN_OUT, pitch };
	}) as unknown as readonly [Foothold, Foothold];
}

/** The posture the body returns to: a slight contrapposto, weight on the leg away from the hand. rad, × stature. */
const BASE = {
	tilt: radFromDeg(1),
	drop: radFromDeg(2.2),
	bend: radFromDeg(-3.4),
	flexion: radFromDeg(1.5),
	weightAside: 0.013,
	weightAhead: 0.002,
	/** Leg length over its straight length: soft knees. */
	straightness: 0.9968,
	/** Shoulders hang a little below the skeleton's erect landmark. */
	shoulders: radFromDeg(-8),
} as const;

/** Parameters of the search: metres are × stature; one row each: name, ease (what costs as much as one residual). */
const PARAMETER = ["ahead", "aside", "crouch", "tilt", "drop", "turn", "flexion", "bend", "twist", "protract", "elevate"] as const;
const EASE = [0.1, 0.02, 0.035, 0.3, 0.05, 0.12, 0.35, 0.1, 0.2, 0.14, 0.12] as const;
/** How far each angle goes however hard it is pulled, rad; the joints' ranges hold within it. */
const MOST = {
	tilt: [-0.2, 1.2],
	drop: 0.2,
	turn: 0.6,
	flexion: [-0.22, 1.05],
	bend: 0.4,
	twist: 0.55,
	protract: [-0.2, 0.36],
	elevate: [-0.03, 0.6],
} as const;
const RESIDUALS = PARAMETER.length + 11;

/** The identity near zero, levelling off at both ends. */
const held = (x: number, least: number, most: number): number => (x < 0 ? least * Math.tanh(x / least) : most * Math.tanh(x / most));
const soft = (x: number): number => (x > 30 ? x : Math.log1p(Math.exp(x)));
const shoulder = new Float64Array(3);
const centre = new Float64Array(3);

/** What both legs were short of the floor at the last `take`, m. */
let lift = 0;

/** Sets every angle of the body for the parameters `p` and places all of it; returns what the hand is short of, m. */
function take(pose: Pose, task: StandingTask, p: ArrayLike<number>): number {
	const H = pose.stature;
	const { angle, root } = pose;
	const m = outward(task.side);
	const [ahead, aside, crouch, tilt, drop, turn, flexion, bend, twist, protract, elevate] = p as unknown as number[] as [
		number,
		number,
		number,
		number,
		number,
		number,
		number,
		number,
		number,
		number,
		number,
	];
	const set = (segment: number, z: number, x: number, y: number) => {
		angle[3 * segment] = z;
		angle[3 * segment + 1] = x;
		angle[3 * segment + 2] = y;
	};
	const tip = BASE.tilt + held(tilt, ...MOST.tilt);
	set(trunk("pelvis"), tip, m * (BASE.drop + held(drop, -MOST.drop, MOST.drop)), m * held(turn, -MOST.turn, MOST.turn));
	const flex = BASE.flexion + held(flexion, ...MOST.flexion);
	const lean = m * (BASE.bend + held(bend, -MOST.bend, MOST.bend));
	const turned = m * held(twist, -MOST.twist, MOST.twist);
	set(trunk("abdomen"), flex * 0.45, lean * 0.5, turned * 0.2);
	set(trunk("thorax"), flex * 0.55, lean * 0.5, turned * 0.8);
	set(limb(task.side, "collar"), 0, BASE.shoulders + held(elevate, ...MOST.elevate), held(protract, ...MOST.protract));
	root[0] = ahead * H;
	root[1] = 0;
	root[2] = m * aside * H;
	place(pose, trunk("pelvis"));
	root[1] = hipHeight(pose, task.feet) - crouch * H;
	hangArm(pose, task.side === 0 ? 1 : 0, flex + tip, -m * (lean + (angle[3 * trunk("pelvis") + 1] as number)), crouch);
	placeAll(pose);
	lift = 0;
	for (const side of SIDES) lift += solveLeg(pose, side, task.feet[side]);
	return solveArm(pose, task.side, task.target, task.grip, task.palm);
}

/** Height of the pelvis over straight but soft legs; the shorter way decides, smoothly. */
function hipHeight(pose: Pose, feet: readonly [Foothold, Foothold]): number {
	const H = pose.stature;
	const long = BASE.straightness * (LENGTH.thigh + LENGTH.shank) * H;
	const rise = (side: Side): number => {
		pointAt(pose, trunk("pelvis"), 0, 0, outward(side) * fraction("hipHalf") * H, shoulder);
		const { ankle } = feet[side];
		const dx = (shoulder[0] as number) - (ankle[0] as number);
		const dz = (shoulder[2] as number) - (ankle[2] as number);
		return (ankle[1] as number) - (shoulder[1] as number) + Math.sqrt(Math.max(long * long - dx * dx - dz * dz, 0.01 * long * long));
	};
	const a = rise(0);
	const b = rise(1);
	const sharp = 0.002 * H;
	return Math.min(a, b) - sharp * Math.log1p(Math.exp(-Math.abs(a - b) / sharp));
}

/** The free arm hangs by its own weight however the chest pitches forward or leans to its side; elbow soft. */
function hangArm(pose: Pose, side: Side, pitch: number, aside: number, crouch: number): void {
	const { angle } = pose;
	const upperArm = 3 * limb(side, "upperArm");
	angle[upperArm] = radFromDeg(-3) + 0.85 * pitch;
	angle[upperArm + 1] = radFromDeg(9.5) + aside + 0.9 * crouch;
	angle[upperArm + 2] = radFromDeg(4);
	const forearm = 3 * limb(side, "forearm");
	angle[forearm] = radFromDeg(20);
	angle[forearm + 2] = radFromDeg(12);
	const hand = 3 * limb(side, "hand");
	angle[hand] = radFromDeg(-2);
	angle[hand + 1] = radFromDeg(6);
	angle[3 * limb(side, "collar") + 1] = BASE.shoulders;
	angle[3 * limb(side, "collar") + 2] = radFromDeg(2);
}

/**
 * Stands and brings the grip to the target with arm, collar bone, trunk, pelvis and knees, each giving
 * way by its ease, the mass centre held over the feet. Returns what the hand is short of, m; where the
 * target is out of reach the pose is the nearest this search finds.
 */
export function solveStanding(pose: Pose, task: StandingTask): number {
	const H = pose.stature;
	const m = outward(task.side);
	const reach = (LENGTH.upperArm + LENGTH.forearm + 0.036) * H;
	const { angle } = pose;
	const p = new Float64Array(PARAMETER.length);
	const residuals = (q: Float64Array, r: Float64Array): void => {
		const gap = take(pose, task, q);
		massCentre(pose, centre);
		let i = 0;
		for (; i < PARAMETER.length; i++) r[i] = (q[i] as number) / (EASE[i] as number);
		// a straight leg does not lengthen, a standing person does not lean back or bend backwards to reach
		if ((q[2] as number) < 0) r[2] = (q[2] as number) / 0.002;
		if ((q[3] as number) < 0) r[3] = (q[3] as number) / 0.05;
		if ((q[6] as number) < 0) r[6] = (q[6] as number) / 0.1;
		if ((q[10] as number) < 0) r[10] = (q[10] as number) / 0.03;
		r[i++] = ((centre[0] as number) / H - BASE.weightAhead) / 0.008;
		r[i++] = ((m * (centre[2] as number)) / H + BASE.weightAside) / 0.008;
		pointAt(pose, limb(task.side, "upperArm"), 0, 0, 0, shoulder);
		const dx = (task.target[0] as number) - (shoulder[0] as number);
		const dy = (task.target[1] as number) - (shoulder[1] as number);
		const dz = (task.target[2] as number) - (shoulder[2] as number);
		const far = (Math.hypot(dx, dy, dz) / reach - 0.945) / 0.018;
		r[i++] = 0.9 * soft(far) + (100 * gap) / H;
		// a hand that goes across the chest or behind it turns the body
		r[i++] = 0.6 * soft((-m * dz - 0.35 * dx) / (0.05 * H)) + 0.6 * soft(-dx / (0.05 * H));
		r[i++] = (500 * lift) / H;
		for (const side of SIDES) r[i++] = soft(((angle[3 * limb(side, "foot")] as number) - radFromDeg(27)) / radFromDeg(2));
		for (const side of SIDES) {
			r[i++] = soft(((angle[3 * limb(side, "thigh")] as number) - radFromDeg(108)) / radFromDeg(3));
			r[i++] = soft(((angle[3 * limb(side, "shank")] as number) - radFromDeg(125)) / radFromDeg(3));
		}
	};
	leastSquares(residuals, p, RESIDUALS, 60);
	const gap = take(pose, task, p);
	placeAll(pose);
	return gap;
}
