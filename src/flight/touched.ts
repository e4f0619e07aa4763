import type { Deck } from "../layout/habitat.ts";
import { type RingVec, ring } from "../vector/vec3.ts";
import type { State } from "./path.ts";

/** Faces of a bay. */
export type Face = "deck" | "ceiling" | "end-low" | "end-high" | "side-low" | "side-high";

/** Coordinate of a ring point along a flat deck's own prograde tangent, from its middle, m. */
export const tangentOf = (deck: Deck, p: RingVec): number => p[1] * Math.cos(deck.middle) - p[0] * Math.sin(deck.middle);

/** The point of a bay's face nearest to a centre. */
export function pointTouched(deck: Deck, face: Face, s: State): RingVec {
	const [x, y, z] = [s[0]!, s[1]!, s[2]!];
	switch (face) {
		case "deck":
			return onFace(deck, deck.radius, x, y, z);
		case "ceiling":
			return onFace(deck, deck.radius - deck.headroom, x, y, z);
		case "end-low":
			return ring(x, y, deck.axialFrom);
		case "end-high":
			return ring(x, y, deck.axialTo);
		default: {
			const at = face === "side-low" ? deck.from : deck.to;
			const q = x * Math.cos(at) + y * Math.sin(at);
			return ring(q * Math.cos(at), q * Math.sin(at), z);
		}
	}
}

/** The nearest point at `depth` from the axis, or of a flat deck in the plane at that distance. */
function onFace(deck: Deck, depth: number, x: number, y: number, z: number): RingVec {
	if (deck.floor === "curved") {
		const k = depth / Math.sqrt(x * x + y * y);
		return ring(x * k, y * k, z);
	}
	const c = Math.cos(deck.middle);
	const n = Math.sin(deck.middle);
	const k = depth - (x * c + y * n);
	return ring(x + k * c, y + k * n, z);
}
