import { type Deck, floorAlong, type WindowSurface } from "../layout/habitat.ts";
import { dot } from "../vector/vec3.ts";
import type { Extent } from "./bay-extent.ts";
import type { StageFrame } from "./stage-frame.ts";

type Numbers = number[] | Float32Array;

/**
 * One face of a bay in its own plane coordinates (u, v), m, and how it bends into the stage.
 * Floor: u along the floor from the deck's middle, v axial. Ceiling: the same, along the ceiling. Ends:
 * u along the floor, v height. Sides: u axial, v distance up the wall. `lift` is into the bay.
 */
export interface Surface {
	readonly name: WindowSurface;
	/** u, v pairs in order round it; a rectangle unless it is the end of a flat deck. */
	readonly outline: readonly number[];
	readonly from: readonly [number, number];
	readonly to: readonly [number, number];
	/** u of the splits, strictly inside; none where it is plane and need not meet splits. */
	readonly cuts: readonly number[];
	/** Of the arcs it bends into, m; infinite where it is plane. */
	readonly bend: number;
	/** Writes the stage position of (u, v) into out[at…at+2]. */
	put(u: number, v: number, lift: number, out: Numbers, at?: number): void;
	/** Writes the unit stage directions of u, v and into the bay there: 9 numbers. */
	basis(u: number, v: number, out: Numbers): void;
}

/** Stage positions and directions straight from ring polar coordinates. */
export interface Polar {
	put(radius: number, angle: number, axial: number, out: Numbers, at: number): void;
	/** Writes the stage directions prograde and up at a ring angle: their x and y are (c, s) and (−s, c). */
	turn(angle: number): readonly [number, number];
}

export function polar(frame: StageFrame): Polar {
	const zero = frame.deck.floor === "curved" ? frame.angle : frame.deck.middle;
	const x0 = dot(frame.origin, frame.triad.prograde);
	const y0 = dot(frame.origin, frame.triad.up);
	return {
		put(radius, angle, axial, out, at) {
			out[at] = radius * Math.sin(angle - zero) - x0;
			out[at + 1] = -radius * Math.cos(angle - zero) - y0;
			out[at + 2] = axial - frame.axial;
		},
		turn: (angle) => [Math.cos(angle - zero), Math.sin(angle - zero)],
	};
}

const rectangle = (u0: number, v0: number, u1: number, v1: number): number[] => [u0, v0, u1, v0, u1, v1, u0, v1];

/** Signs that make the normal of a face point into the bay. */
const INTO = { floor: 1, ceiling: -1, "end-low": 1, "end-high": -1, "side-low": 1, "side-high": -1 } as const;

/** Floor (`height` 0) or ceiling (`height` = headroom). */
function levelSurface(extent: Extent, p: Polar, name: "floor" | "ceiling"): Surface {
	const { deck } = extent;
	const height = name === "floor" ? 0 : deck.headroom;
	const into = INTO[name];
	const r = deck.radius - height;
	const level = { ...deck, radius: r };
	const from = [floorAlong(level, extent.from), deck.axialFrom] as const;
	const to = [floorAlong(level, extent.to), deck.axialTo] as const;
	const curved = deck.floor === "curved";
	return {
		name,
		outline: rectangle(...from, ...to),
		from,
		to,
		cuts: extent.cuts.map((c) => floorAlong(level, c)),
		bend: curved ? r : Number.POSITIVE_INFINITY,
		put(u, v, lift, out, at = 0) {
			const n = r - into * lift;
			if (curved) p.put(n, deck.middle + u / r, v, out, at);
			else p.put(Math.hypot(n, u), deck.middle + Math.atan2(u, n), v, out, at);
		},
		basis(u, _v, out) {
			const [c, s] = p.turn(curved ? deck.middle + u / r : deck.middle);
			write(out, c, s, 0, 0, 0, 1, -into * s, into * c, 0);
		},
	};
}

function endSurface(extent: Extent, p: Polar, name: "end-low" | "end-high"): Surface {
	const { deck } = extent;
	const curved = deck.floor === "curved";
	const into = INTO[name];
	const z = name === "end-low" ? deck.axialFrom : deck.axialTo;
	const h = deck.headroom;
	const low = floorAlong(deck, extent.from);
	const high = floorAlong(deck, extent.to);
	const narrowing = curved ? 1 : (deck.radius - h) / deck.radius;
	return {
		name,
		outline: [low, 0, high, 0, high * narrowing, h, low * narrowing, h],
		from: [low, 0],
		to: [high, h],
		cuts: extent.cuts.map((c) => floorAlong(deck, c)),
		bend: curved ? deck.radius : Number.POSITIVE_INFINITY,
		put(u, v, lift, out, at = 0) {
			const n = deck.radius - v;
			if (curved) p.put(n, deck.middle + u / deck.radius, z + into * lift, out, at);
			else p.put(Math.hypot(n, u), deck.middle + Math.atan2(u, n), z + into * lift, out, at);
		},
		basis(u, _v, out) {
			const [c, s] = p.turn(curved ? deck.middle + u / deck.radius : deck.middle);
			write(out, c, s, 0, -s, c, 0, 0, 0, into);
		},
	};
}

/** Length of a radius from the floor at a deck's end, over its height on the deck's normal. */
export const slant = (deck: Deck, angle: number): number => (deck.floor === "curved" ? 1 : 1 / Math.cos(angle - deck.middle));

function sideSurface(extent: Extent, p: Polar, name: "side-low" | "side-high"): Surface {
	const { deck } = extent;
	const angle = name === "side-low" ? extent.from : extent.to;
	const into = INTO[name];
	const [c, s] = p.turn(angle);
	const k = slant(deck, angle);
	const from = [deck.axialFrom, 0] as const;
	const to = [deck.axialTo, deck.headroom * k] as const;
	return {
		name,
		outline: rectangle(...from, ...to),
		from,
		to,
		cuts: [],
		bend: Number.POSITIVE_INFINITY,
		put(u, v, lift, out, at = 0) {
			p.put(deck.radius * k - v, angle, u, out, at);
			out[at] = (out[at] as number) + into * lift * c;
			out[at + 1] = (out[at + 1] as number) + into * lift * s;
		},
		basis(_u, _v, out) {
			write(out, 0, 0, 1, -s, c, 0, into * c, into * s, 0);
		},
	};
}

function write(out: Numbers, ...values: number[]): void {
	for (let i = 0; i < values.length; i++) out[i] = values[i] as number;
}

/** The faces of a bay that are there. */
export function surfaces(extent: Extent, frame: StageFrame): Surface[] {
	const p = polar(frame);
	return [
		levelSurface(extent, p, "floor"),
		levelSurface(extent, p, "ceiling"),
		endSurface(extent, p, "end-low"),
		endSurface(extent, p, "end-high"),
		...(extent.sideLow ? [sideSurface(extent, p, "side-low")] : []),
		...(extent.sideHigh ? [sideSurface(extent, p, "side-high")] : []),
	];
}
