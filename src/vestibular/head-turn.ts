import { minimumJerk, type Spin } from "../frame/spin.ts";
import { cross, dot, type HeadVec, head, length, scale } from "../vector/vec3.ts";
import { peakOf } from "./peak.ts";

export type TurnAxis = "yaw" | "pitch" | "roll";

/** Unit axes in head axes; positive yaw is to the left, pitch nose down, roll right ear down. */
export const TURN_AXES: Readonly<Record<TurnAxis, HeadVec>> = { yaw: head(0, 0, 1), pitch: head(0, 1, 0), roll: head(1, 0, 0) };

/** A minimum-jerk turn of the head from t = 0 about an axis fixed in the head. */
export interface HeadTurn {
	/** Unit, head axes. */
	readonly axis: HeadVec;
	/** rad, right-handed about the axis. */
	readonly angle: number;
	/** s */
	readonly duration: number;
}

/** The spin axis, unit, in head axes of a person upright on either kind of floor who looks along heading `facing` (rad). */
export const spinAxisInHead = (facing: number): HeadVec => head(Math.sin(facing), -Math.cos(facing), 0);

const share = (turn: HeadTurn, t: number): number => Math.min(1, Math.max(0, t / turn.duration));

/** Angle turned by time t, rad. */
export const turnAngle = (turn: HeadTurn, t: number): number => turn.angle * minimumJerk.share(share(turn, t));

/** ω_turn, rad/s, about the axis. */
export const turnRate = (turn: HeadTurn, t: number): number => (turn.angle / turn.duration) * minimumJerk.rate(share(turn, t));

/** Rᵀ(t) v: a vector that stands still in the ring, as the turning head sees it; v in head axes at t = 0. */
export function seenByHead(turn: HeadTurn, t: number, v: HeadVec): HeadVec {
	const a = turnAngle(turn, t);
	if (a === 0) return v;
	const k = turn.axis;
	const c = Math.cos(a);
	const s = Math.sin(a);
	const p = dot(k, v) * (1 - c);
	const kv = cross(k, v);
	return head(v[0] * c - kv[0] * s + k[0] * p, v[1] * c - kv[1] * s + k[1] * p, v[2] * c - kv[2] * s + k[2] * p);
}

/** The part of the head's absolute angular velocity that the spin gives it, Rᵀ(t)Ω, rad/s. `spinAxis`: unit, head axes at t = 0. */
export const spinInHead = (turn: HeadTurn, spin: Spin, spinAxis: HeadVec, t: number): HeadVec =>
	scale(seenByHead(turn, t, spinAxis), spin.rate(t));

/** ω(t) = Rᵀ(t)Ω + ω_turn, head axes, rad/s. */
export function headRate(turn: HeadTurn, spin: Spin, spinAxis: HeadVec, t: number): HeadVec {
	const s = spinInHead(turn, spin, spinAxis, t);
	const w = turnRate(turn, t);
	return head(s[0] + w * turn.axis[0], s[1] + w * turn.axis[1], s[2] + w * turn.axis[2]);
}

/** Cross-coupled angular acceleration Ω × ω_turn, head axes, rad/s²: the rate of change of Rᵀ(t)Ω at steady spin. */
export function crossCoupled(turn: HeadTurn, spin: Spin, spinAxis: HeadVec, t: number): HeadVec {
	return cross(spinInHead(turn, spin, spinAxis, t), scale(turn.axis, turnRate(turn, t)));
}

/** Its greatest size over the turn, rad/s²: Ω · 1.875 |a| / T · sin γ at steady spin, else the greatest of Ω(t) ω_turn(t) sin γ. */
export function crossCoupledPeak(turn: HeadTurn, spin: Spin, spinAxis: HeadVec): number {
	const sine = length(cross(spinAxis, turn.axis));
	const { duration, angle } = turn;
	if (spin.constant) return (spin.rate(0) * minimumJerk.peakRate * Math.abs(angle) * sine) / duration;
	const size = (t: number): number => spin.rate(t) * Math.abs(turnRate(turn, t)) * sine;
	const sizes = Array.from({ length: 1025 }, (_, i) => size((duration * i) / 1024));
	return peakOf(sizes).value;
}
