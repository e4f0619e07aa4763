import { minimumJerk, type Spin } from "../frame/spin.ts";
import { along, cross, dot, type HeadVec, head, length, scale, sub } from "../vector/vec3.ts";
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
export function seenByHead(turn: HeadTurn, v: HeadVec): (t: number) => HeadVec {
	const k = turn.axis;
	const kept = scale(k, dot(k, v));
	const across = sub(v, kept);
	const ahead = cross(k, v);
	const turned = (a: number): HeadVec => {
		const c = Math.cos(a);
		const s = Math.sin(a);
		return head(kept[0] + c * across[0] - s * ahead[0], kept[1] + c * across[1] - s * ahead[1], kept[2] + c * across[2] - s * ahead[2]);
	};
	const end = turned(turn.angle);
	return (t) => (t <= 0 ? v : t >= turn.duration ? end : turned(turnAngle(turn, t)));
}

/**
 * The part of the head's absolute angular velocity that the spin gives it, Rᵀ(t)Ω, rad/s. `spinAxis`:
 * unit, head axes at t = 0.
 */
export function spinInHead(turn: HeadTurn, spin: Spin, spinAxis: HeadVec): (t: number) => HeadVec {
	if (spin.constant) return seenByHead(turn, scale(spinAxis, spin.rate(0)));
	const axis = seenByHead(turn, spinAxis);
	return (t) => scale(axis(t), spin.rate(t));
}

/** ω(t) = Rᵀ(t)Ω + ω_turn, head axes, rad/s. */
export function headRate(turn: HeadTurn, spin: Spin, spinAxis: HeadVec): (t: number) => HeadVec {
	const fromSpin = spinInHead(turn, spin, spinAxis);
	return (t) => (t <= 0 || t >= turn.duration ? fromSpin(t) : along(fromSpin(t), turnRate(turn, t), turn.axis));
}

/** Cross-coupled angular acceleration Ω × ω_turn, head axes, rad/s²: the rate of change of Rᵀ(t)Ω at steady spin. */
export function crossCoupled(turn: HeadTurn, spin: Spin, spinAxis: HeadVec): (t: number) => HeadVec {
	const fromSpin = spinInHead(turn, spin, spinAxis);
	return (t) => cross(fromSpin(t), scale(turn.axis, turnRate(turn, t)));
}

/** Its greatest size over the turn, rad/s²: Ω · 1.875 |a| / T · sin γ at steady spin, else the greatest of Ω(t) ω_turn(t) sin γ. */
export function crossCoupledPeak(turn: HeadTurn, spin: Spin, spinAxis: HeadVec): number {
	const sine = length(cross(spinAxis, turn.axis));
	const { duration, angle } = turn;
	if (spin.constant) return (spin.rate(0) * minimumJerk.peakRate * Math.abs(angle) * sine) / duration;
	const sizes = Array.from({ length: 1025 }, (_, i) => {
		const t = (duration * i) / 1024;
		return spin.rate(t) * Math.abs(turnRate(turn, t)) * sine;
	});
	return peakOf(sizes).value;
}
