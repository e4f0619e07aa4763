import type { Spin } from "../frame/spin.ts";
import type { RingVec } from "../vector/vec3.ts";

/** Ring position m [0…2] and velocity relative to the ring m/s [3…5]. */
export type State = Float64Array;

/** The way a body's centre goes, from its release at t = 0 (s). */
export interface Path {
	/** Writes the state at t, 0 ≤ t ≤ known. */
	stateAt(t: number, out: State): void;
	/** The angle about the axis swept in the ring from the release to t, unwrapped, rad (+ prograde). */
	sweptAt(t: number): number;
	/** The path is known up to here, s. */
	readonly known: number;
}

/** Bounds over a stretch of a path: distance from the axis m, speed in the ring m/s, acceleration in the ring m/s². */
export interface Bounds {
	radius: number;
	speed: number;
	acceleration: number;
}

/**
 * Bounds in the ring, for `horizon` s, for a body now at `radius` and at `speed` in the ring whose inertial speed and
 * acceleration stay below the given ones. The Coriolis part turns the velocity without adding to it, so the speed grows
 * by the other parts alone.
 */
export function ringBounds(
	spin: Spin,
	radius: number,
	speed: number,
	inertialSpeed: number,
	inertialAcceleration: number,
	horizon: number,
	out: Bounds,
): void {
	const w = spin.greatestRate;
	const r = radius + inertialSpeed * horizon;
	const push = inertialAcceleration + (w * w + spin.greatestRateDot) * r;
	out.radius = r;
	out.speed = Math.min(inertialSpeed + w * r, speed + push * horizon);
	out.acceleration = push + 2 * w * out.speed;
}

/**
 * Free flight without drag: a straight line at constant speed in the inertial frame (which equals the
 * ring frame at release), mapped back by −ψ(t). Newton's first law; closed form.
 */
export class StraightPath implements Path {
	readonly known = Number.POSITIVE_INFINITY;
	readonly spin: Spin;
	/** Inertial position and velocity at release. */
	readonly px: number;
	readonly py: number;
	readonly pz: number;
	readonly ux: number;
	readonly uy: number;
	readonly uz: number;
	readonly inertialSpeed: number;

	constructor(spin: Spin, position: RingVec, velocity: RingVec) {
		const w = spin.rate(0);
		this.spin = spin;
		this.px = position[0];
		this.py = position[1];
		this.pz = position[2];
		this.ux = velocity[0] - w * position[1];
		this.uy = velocity[1] + w * position[0];
		this.uz = velocity[2];
		this.inertialSpeed = Math.sqrt(this.ux * this.ux + this.uy * this.uy + this.uz * this.uz);
	}

	stateAt(t: number, out: State): void {
		const psi = this.spin.angle(t);
		const w = this.spin.rate(t);
		const c = Math.cos(psi);
		const s = Math.sin(psi);
		const x = this.px + this.ux * t;
		const y = this.py + this.uy * t;
		const rx = c * x + s * y;
		const ry = c * y - s * x;
		out[0] = rx;
		out[1] = ry;
		out[2] = this.pz + this.uz * t;
		out[3] = c * this.ux + s * this.uy + w * ry;
		out[4] = c * this.uy - s * this.ux - w * rx;
		out[5] = this.uz;
	}

	sweptAt(t: number): number {
		const x = this.px + this.ux * t;
		const y = this.py + this.uy * t;
		return Math.atan2(this.px * y - this.py * x, this.px * x + this.py * y) - this.spin.angle(t);
	}
}
