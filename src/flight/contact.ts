import type { Spin } from "../frame/spin.ts";
import { type Bounds, type Path, ringBounds, type State } from "./path.ts";
import type { Surface } from "./surface.ts";

/** A gap this small (m) is contact: a body that starts there starts touching. */
export const TOUCHING = 1e-9;
/** A first root is polished to this, s. */
const ROOT = 1e-12;

export interface Contact {
	readonly surface: Surface;
	readonly t: number;
}

/** The stretch of a path that a search may use, with what bounds its motion in the inertial frame. */
export interface Stretch {
	readonly path: Path;
	readonly spin: Spin;
	readonly inertialSpeed: number;
	readonly inertialAcceleration: number;
}

const state = new Float64Array(6);
const bounds: Bounds = { radius: 0, speed: 0, acceleration: 0 };

/**
 * The first time in [from, to] at which a surface's gap closes, or null. Conservative advancement:
 * from each instant it steps only as far as no gap can close, given a bound on how fast the gap's
 * rate may fall, which converges quadratically on a simple root and cannot tunnel.
 * A surface in `leaving` is touched already; it counts again once its gap has opened.
 */
export function firstContact(stretch: Stretch, surfaces: readonly Surface[], from: number, to: number, leaving: Set<Surface>): Contact | null {
	const { path, spin } = stretch;
	let t = from;
	for (let guard = 0; guard < 1_000_000; guard++) {
		path.stateAt(t, state);
		const radius = Math.hypot(state[0] as number, state[1] as number);
		const pace = stretch.inertialSpeed + spin.greatestRate * radius;
		const horizon = Math.min(to - t, pace > 0 ? (0.25 * Math.max(radius, 0.1)) / pace : Number.POSITIVE_INFINITY);
		ringBounds(spin, radius, stretch.inertialSpeed, stretch.inertialAcceleration, Number.isFinite(horizon) ? horizon : 0, bounds);
		let step = horizon;
		let nearest: Surface | null = null;
		for (let i = 0; i < surfaces.length; i++) {
			const surface = surfaces[i] as Surface;
			const gap = surface.gap(state);
			if (leaving.size > 0 && leaving.has(surface)) {
				if (gap > TOUCHING) leaving.delete(surface);
				else {
					step = Math.min(step, 1e-3);
					continue;
				}
			}
			const rate = surface.rate(state);
			if (gap <= 0) {
				if (rate < 0 || gap < -TOUCHING) return { surface, t };
			}
			const safe = timeToClose(Math.max(gap, 0), rate, surface.bend(bounds));
			if (safe < step) {
				step = safe;
				nearest = surface;
			}
		}
		if (nearest && step <= ROOT * Math.max(1, t)) return t + step <= to ? { surface: nearest, t: t + step } : null;
		t += step;
		if (t >= to || horizon <= 0) return null;
	}
	throw new RangeError(`the search for a contact did not end (t = ${t} s of ${to} s)`);
}

/** The least t > 0 at which gap + rate t − bend t²/2 = 0. */
export function timeToClose(gap: number, rate: number, bend: number): number {
	if (!(bend > 0)) return rate < 0 ? gap / -rate : Number.POSITIVE_INFINITY;
	const root = Math.sqrt(rate * rate + 2 * bend * gap);
	return rate < 0 ? (2 * gap) / (root - rate) : (rate + root) / bend;
}
