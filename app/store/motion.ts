import { eventsOfDrop, type MotionEvent } from "../../src/activity/drop.ts";
import { type Deck, deckTriad, heightAbove } from "../../src/layout/habitat.ts";
import { dot, type RingVec, ring, sub } from "../../src/vector/vec3.ts";
import type { AssessedCase } from "./core.ts";

export type { MotionEvent };

/** Events of a motion in order, the release first; empty where the kind is not built. */
export const eventsOf = (c: AssessedCase): readonly MotionEvent[] => (c.motion ? eventsOfDrop(c.motion) : []);

/** WCAG 2.2, success criterion 2.3.1: nothing flashes more than three times in any second. */
const MOST_FLASHES = 3;

/** Playback speed at which the layout's windows, passing a place that does not turn at N Ω / 2π, flash no more than that. */
export function fastestPlayback(c: AssessedCase): number {
	const flashes = (c.context.habitat.windows.length * c.context.spin.greatestRate) / (2 * Math.PI);
	return flashes > 0 ? MOST_FLASHES / flashes : Number.POSITIVE_INFINITY;
}

/** Length of the case's clock, s; 0 where the kind is not built. */
export const durationOf = (c: AssessedCase): number => c.motion?.flight.end ?? 0;

/** The object's centre against time, from the release: above the floor, and along it from below the release. */
export interface DropTrace {
	/** s */
	readonly t: readonly number[];
	/** Height above the floor of the deck it was released on, m. */
	readonly height: readonly number[];
	/** Along that floor, + with spin, m. */
	readonly along: readonly number[];
}

const SAMPLES = 120;
const traces = new WeakMap<AssessedCase, DropTrace>();

/** Computed once for each case. Null where the kind is not built, or nothing moves. */
export function dropTrace(c: AssessedCase): DropTrace | null {
	if (!c.motion || !(durationOf(c) > 0)) return null;
	const found = traces.get(c);
	if (found) return found;
	const { flight, deck, position } = c.motion;
	const state = new Float64Array(6);
	const t: number[] = [];
	const height: number[] = [];
	const along: number[] = [];
	for (let i = 0; i <= SAMPLES; i++) {
		const at = (flight.end * i) / SAMPLES;
		flight.path.stateAt(at, state);
		const p = ring(state[0] as number, state[1] as number, state[2] as number);
		t.push(at);
		height.push(heightAbove(deck, p));
		along.push(deck.floor === "curved" ? deck.radius * flight.path.sweptAt(at) : alongFlat(deck, position, p));
	}
	const trace = { t, height, along };
	traces.set(c, trace);
	return trace;
}

const alongFlat = (deck: Deck, from: RingVec, p: RingVec): number => dot(sub(p, from), deckTriad(deck, deck.middle).prograde);
