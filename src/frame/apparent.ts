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

/**
 * Writes C, K and E (x and y of each; none has a z) into out[0…5], ring frame, m/s²: position (x, y) m,
 * velocity (vx, vy) m/s relative to the ring, at time t (s). Allocates nothing.
 */
export function writeApparent(spin: Spin, t: number, x: number, y: number, vx: number, vy: number, out: Float64Array): void {
	const w = spin.rate(t);
	const wDot = spin.rateDot(t);
	out[0] = w * w * x;
	out[1] = w * w * y;
	out[2] = 2 * w * vy;
	out[3] = -2 * w * vx;
	out[4] = wDot * y;
	out[5] = -wDot * x;
}

/** Position m, velocity m/s and acceleration m/s² relative to the ring, at time t (s). */
export function apparentParts(spin: Spin, t: number, position: RingVec, velocity: RingVec, acceleration: RingVec): ApparentParts {
	const p = new Float64Array(6);
	writeApparent(spin, t, position[0], position[1], velocity[0], velocity[1], p);
	const [cx, cy, kx, ky, ex, ey] = p as unknown as [number, number, number, number, number, number];
	const centrifugal = ring(cx, cy, 0);
	const coriolis = ring(kx, ky, 0);
	const euler = ring(ex, ey, 0);
	const own = scale(acceleration, -1);
	return { centrifugal, coriolis, euler, own, sum: add(add(centrifugal, coriolis), add(euler, own)) };
}
