import type { Spin } from "../frame/spin.ts";
import { type Bounds, type Path, ringBounds } from "./path.ts";
import type { Surface } from "./surface.ts";

/** A gap this small (m) is contact: a body that starts there starts touching. */
export const TOUCHING = 1e-9;
/** A first root is polished to this, s. */
const ROOT = 1e-12;
/** A step that was aimed at a surface and ends this near to it (m) has met it, on whichever side it ends. */
const MET = 1e-10;

/** A gap's rate this small (m/s) is none: rounding, for a body whose pace in the ring is bounded by `pace`. */
export const stillness = (pace: number): number => 1e-12 + 2e-15 * pace;

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
export function firstContact(
	stretch: Stretch,
	surfaces: readonly Surface[],
	from: number,
	to: number,
	leaving: Set<Surface>,
): Contact | null {
	const { path, spin } = stretch;
	let t = from;
	let before = from;
	let aimed: Surface | null = null;
	for (let guard = 0; guard < 1_000_000; guard++) {
		path.stateAt(t, state);
		const radius = Math.sqrt(state[0]! * state[0]! + state[1]! * state[1]!);
		const pace = stretch.inertialSpeed + spin.greatestRate * radius;
		const horizon = Math.min(to - t, pace > 0 ? Math.max(radius, 0.1) / pace : Number.POSITIVE_INFINITY);
		const speed = Math.sqrt(state[3]! * state[3]! + state[4]! * state[4]! + state[5]! * state[5]!);
		ringBounds(spin, radius, speed, stretch.inertialSpeed, stretch.inertialAcceleration, Number.isFinite(horizon) ? horizon : 0, bounds);
		let step = horizon;
		let nearest: Surface | null = null;
		for (let i = 0; i < surfaces.length; i++) {
			const surface = surfaces[i] as Surface;
			const gap = surface.gap(state);
			const rate = surface.rate(state);
			if (leaving.size > 0 && leaving.has(surface)) {
				const back = rate < -stillness(pace);
				if (gap > TOUCHING || (back && gap >= 0)) leaving.delete(surface);
				else if (back) return { surface, t: turnedBack(path, surface, before, t) };
				else {
					step = Math.min(step, Math.max(1e-6, t - from));
					continue;
				}
			}
			if (gap <= 0 && (rate < 0 || gap < -TOUCHING)) return { surface, t };
			if (surface === aimed && rate >= 0 && gap <= MET) return { surface, t };
			const safe = timeToClose(Math.max(gap, 0), rate, surface.bend(bounds));
			if (safe < step) {
				step = safe;
				nearest = surface;
			}
		}
		if (nearest && step <= ROOT * Math.max(1, t)) return t + step <= to ? { surface: nearest, t: t + step } : null;
		before = t;
		aimed = nearest;
		t += step;
		if (t >= to || horizon <= 0) return null;
	}
	throw new RangeError(`the search for a contact did not end (t = ${t} s of ${to} s)`);
}

/** When a body that had left a surface by less than `TOUCHING` is back at it: between a time before it turned and one after. */
function turnedBack(path: Path, surface: Surface, before: number, after: number): number {
	let low = before;
	let high = after;
	for (let i = 0; i < 60; i++) {
		const middle = (low + high) / 2;
		path.stateAt(middle, state);
		if (surface.gap(state) < 0 && surface.rate(state) < 0) high = middle;
		else low = middle;
	}
	return high;
}

/** The least t > 0 at which gap + rate t − bend t²/2 = 0. */
export function timeToClose(gap: number, rate: number, bend: number): number {
	if (!(bend > 0)) return rate < 0 ? gap / -rate : Number.POSITIVE_INFINITY;
	const root = Math.sqrt(rate * rate + 2 * bend * gap);
	return rate < 0 ? (2 * gap) / (root - rate) : (rate + root) / bend;
}
