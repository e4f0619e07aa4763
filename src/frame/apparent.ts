import { add, type RingVec, ring, scale } from "../vector/vec3.ts";
import type { Spin } from "./spin.ts";

/**
 * The parts of apparent gravity on one body, ring frame, m/s²: G = C + K + E + A.
 * C centrifugal Ω²r outward, K Coriolis −2Ω×v, E Euler −Ω̇×r, A = minus the body's own acceleration
 * relative to the ring. (Any mechanics text: e.g. OpenStax University Physics vol. 1 §6.)
 */
export interface ApparentParts {
	readonly centrifugal: RingVec;
	readonly coriolis: RingVec;
	readonly euler: RingVec;
	readonly own: RingVec;
	readonly sum: RingVec;
}

/** Position m, velocity m/s and acceleration m/s² relative to the ring, at time t (s). */
export function apparentParts(spin: Spin, t: number, position: RingVec, velocity: RingVec, acceleration: RingVec): ApparentParts {
	const w = spin.rate(t);
	const wDot = spin.rateDot(t);
	const centrifugal = ring(w * w * position[0], w * w * position[1], 0);
	const coriolis = ring(2 * w * velocity[1], -2 * w * velocity[0], 0);
	const euler = ring(wDot * position[1], -wDot * position[0], 0);
	const own = scale(acceleration, -1);
	return { centrifugal, coriolis, euler, own, sum: add(add(centrifugal, coriolis), add(euler, own)) };
}

/** Acceleration of a free body relative to the ring: C + K + E (+ what drag adds), m/s². */
export function freeAcceleration(spin: Spin, t: number, position: RingVec, velocity: RingVec): RingVec {
	const w = spin.rate(t);
	const wDot = spin.rateDot(t);
	return ring(
		w * w * position[0] + 2 * w * velocity[1] + wDot * position[1],
		w * w * position[1] - 2 * w * velocity[0] - wDot * position[0],
		0,
	);
}
