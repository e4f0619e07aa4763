import { radFromDeg } from "../quantity/convert.ts";
import { massCentre } from "./balance.ts";
import type { Floor } from "./floor.ts";
import { place, placeAll, pointAt } from "./kinematics.ts";
import { leastSquares } from "./least-squares.ts";
import { type Foothold, solveArm, solveLeg } from "./limb.ts";
import type { Pose } from "./pose.ts";
import { fraction } from "./segments.ts";
import { LEFT, LENGTH, limb, outward, RIGHT, SIDES, type Side, trunk } from "./skeleton.ts";

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

/**
 * What the search moves. `ease` is what costs as much as one residual, `back` the same below zero;
 * `least` and `most` are where an angle levels off, within the joints' ranges.
 */
interface Parameter {
	readonly ease: number;
	readonly back?: number;
	readonly least: number;
	readonly most: number;
}
const PARAMETER = {
	/** The pelvis, × stature: forward, towards the hand's side, down. A straight leg does not lengthen. */
	ahead: { ease: 0.1, least: -1, most: 1 },
	aside: { ease: 0.02, least: -1, most: 1 },
	crouch: { ease: 0.035, back: 0.002, least: -1, most: 1 },
	/** rad: pelvis; chest (lumbar and thoracic together); collar bone. Nobody leans back to reach. */
	tilt: { ease: 0.3, back: 0.05, least: -0.2, most: 1.2 },
	drop: { ease: 0.05, least: -0.2, most: 0.2 },
	turn: { ease: 0.12, least: -0.6, most: 0.6 },
	flexion: { ease: 0.35, back: 0.1, least: -0.22, most: 1.05 },
	bend: { ease: 0.1, least: -0.4, most: 0.4 },
	twist: { ease: 0.2, least: -0.55, most: 0.55 },
	protract: { ease: 0.14, least: -0.2, most: 0.36 },
	elevate: { ease: 0.12, back: 0.03, least: -0.03, most: 0.6 },
} as const satisfies Record<string, Parameter>;
type ParameterName = keyof typeof PARAMETER;
const NAMES = Object.keys(PARAMETER) as ParameterName[];
const ROWS: readonly Parameter[] = Object.values(PARAMETER);
const RESIDUALS = NAMES.length + 11;

/** A parameter's value: itself near zero, levelling off at both ends. */
function levelOf(p: Float64Array, name: ParameterName): number {
	const { least, most } = PARAMETER[name];
	const x = p[NAMES.indexOf(name)] as number;
	return x < 0 ? least * Math.tanh(x / least) : most * Math.tanh(x / most);
}

/** Grows from zero in proportion once x is positive; smooth. */
const soft = (x: number): number => (x > 30 ? x : Math.log1p(Math.exp(x)));
const shoulder = new Float64Array(3);
const centre = new Float64Array(3);

/** What hand and feet are short of, m. */
interface Shortfall {
	hand: number;
	feet: number;
}

/** Sets every angle of the body for the parameters `p` and places all of it. */
function take(pose: Pose, task: StandingTask, p: Float64Array, short: Shortfall): void {
	const H = pose.stature;
	const { angle, root } = pose;
	const m = outward(task.side);
	const set = (segment: number, z: number, x: number, y: number) => {
		angle[3 * segment] = z;
		angle[3 * segment + 1] = x;
		angle[3 * segment + 2] = y;
	};
	const tilt = BASE.tilt + levelOf(p, "tilt");
	const drop = m * (BASE.drop + levelOf(p, "drop"));
	const flexion = BASE.flexion + levelOf(p, "flexion");
	const bend = m * (BASE.bend + levelOf(p, "bend"));
	const twist = m * levelOf(p, "twist");
	const crouch = levelOf(p, "crouch");
	set(trunk("pelvis"), tilt, drop, m * levelOf(p, "turn"));
	set(trunk("abdomen"), flexion * 0.45, bend * 0.5, twist * 0.2);
	set(trunk("thorax"), flexion * 0.55, bend * 0.5, twist * 0.8);
	set(limb(task.side, "collar"), 0, BASE.shoulders + levelOf(p, "elevate"), levelOf(p, "protract"));
	hangArm(pose, task.side === RIGHT ? LEFT : RIGHT, flexion + tilt, -m * (bend + drop), crouch);
	root[0] = levelOf(p, "ahead") * H;
	root[1] = 0;
	root[2] = m * levelOf(p, "aside") * H;
	place(pose, trunk("pelvis"));
	root[1] = hipHeight(pose, task.feet) - crouch * H;
	placeAll(pose);
	short.feet = 0;
	for (const side of SIDES) short.feet += solveLeg(pose, side, task.feet[side]);
	short.hand = solveArm(pose, task.side, task.target, task.grip, task.palm);
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
	const short: Shortfall = { hand: 0, feet: 0 };
	const over = (side: Side, name: "thigh" | "shank" | "foot", limitDeg: number, easeDeg: number): number =>
		soft(((angle[3 * limb(side, name)] as number) - radFromDeg(limitDeg)) / radFromDeg(easeDeg));
	const residuals = (q: Float64Array, r: Float64Array): void => {
		take(pose, task, q, short);
		ROWS.forEach(({ ease, back = ease }, i) => {
			const x = q[i] as number;
			r[i] = x / (x < 0 ? back : ease);
		});
		let i = ROWS.length;
		massCentre(pose, centre);
		r[i++] = ((centre[0] as number) / H - BASE.weightAhead) / 0.008;
		r[i++] = ((m * (centre[2] as number)) / H + BASE.weightAside) / 0.008;
		pointAt(pose, limb(task.side, "upperArm"), 0, 0, 0, shoulder);
		const dx = (task.target[0] as number) - (shoulder[0] as number);
		const dy = (task.target[1] as number) - (shoulder[1] as number);
		const dz = (task.target[2] as number) - (shoulder[2] as number);
		r[i++] = 0.9 * soft((Math.hypot(dx, dy, dz) / reach - 0.945) / 0.018) + (100 * short.hand) / H;
		// a hand that goes across the chest or behind it turns the body
		r[i++] = 0.6 * soft((-m * dz - 0.35 * dx) / (0.05 * H)) + 0.6 * soft(-dx / (0.05 * H));
		r[i++] = (500 * short.feet) / H;
		for (const side of SIDES) {
			r[i++] = over(side, "thigh", 108, 3);
			r[i++] = over(side, "shank", 125, 3);
			r[i++] = over(side, "foot", 27, 2);
		}
	};
	const p = new Float64Array(ROWS.length);
	leastSquares(residuals, p, RESIDUALS, 60);
	take(pose, task, p, short);
	placeAll(pose);
	return short.hand;
}
