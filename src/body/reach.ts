import { radFromDeg } from "../quantity/convert.ts";
import { type Floor, LEVEL } from "./floor.ts";
import { gazePivot, lookDirection, turnEyes, turnHead } from "./gaze.ts";
import { gripPoint, RELAXED_CURL, setHand } from "./hand.ts";
import { placeAll, pointAt } from "./kinematics.ts";
import { createPose, type Pose } from "./pose.ts";
import { LEFT, limb, outward, RIGHT, type Side } from "./skeleton.ts";
import { solveStanding, standingFeet } from "./stand.ts";

export type Hand = "right" | "left";
export const sideOf = (hand: Hand): Side => (hand === "right" ? RIGHT : LEFT);

/** A person standing at the origin of the stance frame, one hand out; points in that frame, m. */
export interface StandingReach {
	readonly stature: number;
	/** Where the middle of the held body (or of the empty palm's grip) is to be. */
	readonly handTarget: readonly [number, number, number];
	readonly gazeTarget: readonly [number, number, number];
	/** Diameter of what is held, m; null for an open hand. */
	readonly holding: number | null;
	readonly hand: Hand;
	/** Velocity the held body is about to leave with, m/s: the palm turns to let it go that way. Default none. */
	readonly velocity?: readonly [number, number, number];
	/** The eyes look at most this far below the horizon, rad. Default: as far as they go. */
	readonly lowestGaze?: number;
	readonly floor?: Floor;
}

/** Closer than this counts as reached, m. */
const REACHED = 2e-3;
const EMPTY = 0.05;
const WRIST = { deviation: radFromDeg(4), flexion: radFromDeg(-20) } as const;
const direction = new Float64Array(3);
const pivot = new Float64Array(3);

/**
 * Where the palm faces at a height (× stature): down and inward; overhead, forward and inward; turned
 * towards where a body is thrown, wholly so from 2 m/s on.
 */
export function palmDirection(height: number, side: Side, velocity: readonly [number, number, number] = [0, 0, 0]): Float64Array {
	const high = Math.min(1, Math.max(0, (height - 0.72) / 0.4));
	const blend = high * high * (3 - 2 * high);
	const throwing = 1 / Math.max(2, Math.hypot(...velocity));
	const rest = 1 - Math.min(1, Math.hypot(...velocity) / 2);
	const x = (-0.1 + 0.4 * blend) * rest + velocity[0] * throwing;
	const y = (-0.8 + 0.5 * blend) * rest + velocity[1] * throwing;
	const z = (-0.6 - 0.2 * blend) * outward(side) * rest + velocity[2] * throwing;
	const l = Math.hypot(x, y, z);
	return l > 1e-6 ? new Float64Array([x / l, y / l, z / l]) : new Float64Array([0, -1, 0]);
}

export function poseStandingReach(input: StandingReach): Pose {
	const { stature, handTarget, gazeTarget, holding } = input;
	for (const v of [...handTarget, ...gazeTarget]) if (!Number.isFinite(v)) throw new RangeError(`a target must be finite, got ${v}`);
	const pose = createPose(stature);
	const side = sideOf(input.hand);
	const diameter = holding ?? EMPTY;
	setHand(pose, side, diameter, holding === null ? 0 : 1);
	setHand(pose, side === RIGHT ? LEFT : RIGHT, EMPTY, RELAXED_CURL);
	pose.angle[3 * limb(side, "hand")] = WRIST.deviation;
	pose.angle[3 * limb(side, "hand") + 1] = WRIST.flexion;
	const grip = new Float64Array(3);
	gripPoint(stature, diameter, grip);
	const gap = solveStanding(pose, {
		feet: standingFeet(stature, side, input.floor ?? LEVEL),
		side,
		target: new Float64Array(handTarget),
		grip,
		palm: palmDirection(handTarget[1] / stature, side, input.velocity),
	});
	pose.reach = gap <= REACHED ? { kind: "reached" } : { kind: "short", gap };
	const lowest = input.lowestGaze ?? Math.PI / 2;
	gazePivot(pose, pivot);
	lookDirection(pivot, gazeTarget, lowest, direction);
	turnHead(pose, direction);
	turnEyes(pose, gazeTarget, lowest);
	placeAll(pose);
	return pose;
}

/** Writes the point where a held body's middle sits in the hand, m. */
export function palmPoint(pose: Pose, hand: Hand, diameter: number, out: Float64Array): void {
	const side = sideOf(hand);
	gripPoint(pose.stature, diameter, out);
	pointAt(pose, limb(side, "hand"), out[0] as number, out[1] as number, (out[2] as number) * outward(side), out);
}

/** Forward distance of a comfortably held thing by its height, both × stature. */
const COMFORT: readonly (readonly [number, number])[] = [
	[0.1, 0.25],
	[0.3, 0.215],
	[0.42, 0.14],
	[0.52, 0.15],
	[0.65, 0.22],
	[0.78, 0.255],
	[0.9, 0.24],
	[1.05, 0.19],
	[1.2, 0.15],
];
const ASIDE = 0.1;

/**
 * Where a hand at `handHeight` (m) is held with the elbow comfortably bent: its offset from the stance
 * origin, (forward, right) m, and the way from the point below the hand to the stance origin,
 * (prograde, axial) m, facing heading `facing` (rad).
 */
export function defaultFeet(
	handHeight: number,
	stature: number,
	facing: number,
	hand: Hand = "right",
): { readonly forward: number; readonly right: number; readonly prograde: number; readonly axial: number } {
	const u = handHeight / stature;
	const above = COMFORT.findIndex(([height]) => height >= u);
	const [h0, f0] = COMFORT[above < 0 ? COMFORT.length - 1 : Math.max(above - 1, 0)] as readonly [number, number];
	const [h1, f1] = COMFORT[above < 0 ? COMFORT.length - 1 : above] as readonly [number, number];
	const forward = stature * (h1 === h0 ? f0 : f0 + ((f1 - f0) * (u - h0)) / (h1 - h0));
	const right = outward(sideOf(hand)) * ASIDE * stature;
	return {
		forward,
		right,
		prograde: -(forward * Math.cos(facing) - right * Math.sin(facing)),
		axial: -(forward * Math.sin(facing) + right * Math.cos(facing)),
	};
}
