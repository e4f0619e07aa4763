import { minimumJerk } from "../frame/spin.ts";
import { radFromDeg } from "../quantity/convert.ts";
import type { Floor } from "./floor.ts";
import { chestBow, gazePivot, lookDirection, turnEyes, turnHead } from "./gaze.ts";
import { gripPoint, setHand } from "./hand.ts";
import { placeAll, placeFromChest } from "./kinematics.ts";
import { solveArm } from "./limb.ts";
import { copyPose, createPose, type Pose } from "./pose.ts";
import { type Hand, palmDirection, palmPoint, poseStandingReach, sideOf } from "./reach.ts";
import { limb, type Side, trunk } from "./skeleton.ts";

/** Writes the middle of the released body at t ≥ 0 s after release, stance frame, m. */
export type Track = (t: number, out: Float64Array) => void;

export interface Drop {
	readonly stature: number;
	readonly hand: Hand;
	/** Diameter of the body, m. */
	readonly diameter: number;
	/** At t = 0 the release point: there the hand holds it before. */
	readonly track: Track;
	/** At release, m/s. Default none: it is let go. */
	readonly velocity?: readonly [number, number, number];
	readonly floor?: Floor;
}

/** A person ready to let go: the posture before, and the arm it eases to after. */
export interface Dropper {
	readonly side: Side;
	readonly diameter: number;
	readonly track: Track;
	readonly held: Pose;
	/** The same posture with the hand a little lower. */
	readonly eased: Pose;
	/** Of the gaze, m; it stays through the drop. */
	readonly pivot: Float64Array;
	/** The chest's bow at release, rad. */
	readonly bow: number;
}

/** Seconds: fingers open, arm eases, gaze comes free of its first limit, head and eyes lag behind the body. */
const OPEN = 0.16;
const EASE = 0.6;
const FREE = 0.5;
const HEAD_LAG = 0.3;
const EYE_LAG = 0.1;
/** The eyes look at most this far down until release. */
const HELD_GAZE = radFromDeg(45);
const FREE_GAZE = Math.PI / 2;
const LAG_SAMPLES = 8;
/** How far back and down the hand goes once it is empty, and how much further from over the head, × stature. */
const SINK = { back: 0.02, down: 0.05, more: 0.1 } as const;

/** Minimum jerk from 0 to 1, held beyond its ends. */
const smooth = (tau: number): number => minimumJerk.share(Math.min(1, Math.max(0, tau)));

const target = new Float64Array(3);
const sample = new Float64Array(3);
const direction = new Float64Array(3);

/** Writes the body's place averaged over the last `lag` seconds, the middle of them weighing most. */
function pursued(track: Track, t: number, lag: number, out: Float64Array): void {
	out.fill(0);
	let total = 0;
	for (let k = 0; k < LAG_SAMPLES; k++) {
		const share = (k + 0.5) / LAG_SAMPLES;
		const weight = share * (1 - share);
		track(Math.max(0, t - lag * share), sample);
		total += weight;
		for (let i = 0; i < 3; i++) out[i] = (out[i] as number) + weight * (sample[i] as number);
	}
	for (let i = 0; i < 3; i++) out[i] = (out[i] as number) / total;
}

export function createDropper(drop: Drop): Dropper {
	const { stature, diameter, hand, track, velocity = [0, 0, 0] } = drop;
	const side = sideOf(hand);
	track(0, target);
	const at = [target[0] as number, target[1] as number, target[2] as number] as const;
	const held = poseStandingReach({
		stature,
		handTarget: at,
		gazeTarget: at,
		holding: diameter,
		hand,
		lowestGaze: HELD_GAZE,
		velocity,
		...(drop.floor === undefined ? {} : { floor: drop.floor }),
	});
	const pivot = new Float64Array(3);
	gazePivot(held, pivot);
	lookDirection(pivot, at, HELD_GAZE, direction);
	const eased = createPose(stature);
	copyPose(held, eased);
	const wrist = 3 * limb(side, "hand") + 1;
	eased.angle[wrist] = (eased.angle[wrist] as number) * 0.4;
	const grip = new Float64Array(3);
	gripPoint(stature, diameter, grip);
	palmPoint(held, hand, diameter, target);
	// the hand sinks, and follows what it throws a little
	const follow = Math.min(0.05, (0.07 * stature) / Math.max(Math.hypot(...velocity), 1e-9));
	for (let k = 0; k < 3; k++) target[k] = (target[k] as number) + follow * (velocity[k] as number);
	target[0] = (target[0] as number) - SINK.back * stature;
	target[1] = (target[1] as number) - (SINK.down + SINK.more * smooth((at[1] / stature - 0.75) / 0.35)) * stature;
	solveArm(eased, side, target, grip, palmDirection(at[1] / stature, side, velocity));
	return { side, diameter, track, held, eased, pivot, bow: chestBow(direction) };
}

/** Writes the posture at t s after release (negative: before it) into `out`; allocates nothing. */
export function dropPose(person: Dropper, t: number, out: Pose): void {
	const { held, eased, side, track, pivot } = person;
	copyPose(held, out);
	const ease = smooth(t / EASE);
	for (let i = 3 * limb(side, "upperArm"); i < 3 * limb(side, "fingers"); i++)
		out.angle[i] = (held.angle[i] as number) + ease * ((eased.angle[i] as number) - (held.angle[i] as number));
	setHand(out, side, person.diameter, 1 - smooth(t / OPEN));
	const lowest = HELD_GAZE + (FREE_GAZE - HELD_GAZE) * smooth(t / FREE);
	pursued(track, t, HEAD_LAG, target);
	lookDirection(pivot, target, lowest, direction);
	const thorax = 3 * trunk("thorax");
	out.angle[thorax] = (held.angle[thorax] as number) + chestBow(direction) - person.bow;
	placeFromChest(out);
	turnHead(out, direction);
	pursued(track, t, EYE_LAG, target);
	turnEyes(out, target, lowest);
}

/** A pose of the person's stature to write into. */
export function poseFor(person: Dropper): Pose {
	const pose = createPose(person.held.stature);
	copyPose(person.held, pose);
	placeAll(pose);
	return pose;
}
