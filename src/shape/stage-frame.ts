import { deckTriad, type Deck, placeOnDeck } from "../layout/habitat.ts";
import type { Triad } from "../frame/place.ts";
import { dot, type RingVec, ring, sub } from "../vector/vec3.ts";

/**
 * Stage coordinates: metres from a floor point of the station, x prograde, y up (inboard), z axial
 * there. Right-handed, +y up as glTF and three have it. Keeps single precision good on a ring of any
 * radius.
 */
export interface StageFrame {
	readonly deck: Deck;
	/** Floor angle and axial place of the origin. */
	readonly angle: number;
	readonly axial: number;
	readonly origin: RingVec;
	readonly triad: Triad;
}

export function stageFrame(deck: Deck, angle: number, axial: number): StageFrame {
	return { deck, angle, axial, origin: placeOnDeck(deck, angle, axial, 0), triad: deckTriad(deck, angle) };
}

/** Writes the stage coordinates of a ring position into out[at…at+2]. */
export function toStage(frame: StageFrame, p: RingVec, out: Float32Array | Float64Array | number[], at = 0): void {
	const d = sub(p, frame.origin);
	out[at] = dot(d, frame.triad.prograde);
	out[at + 1] = dot(d, frame.triad.up);
	out[at + 2] = d[2];
}

/** Writes the stage components of a ring direction into out[at…at+2]. */
export function directionToStage(frame: StageFrame, v: RingVec, out: Float32Array | Float64Array | number[], at = 0): void {
	out[at] = dot(v, frame.triad.prograde);
	out[at + 1] = dot(v, frame.triad.up);
	out[at + 2] = v[2];
}

/** The ring position of stage coordinates. */
export function fromStage(frame: StageFrame, x: number, y: number, z: number): RingVec {
	const { origin, triad } = frame;
	return ring(
		origin[0] + x * triad.prograde[0] + y * triad.up[0],
		origin[1] + x * triad.prograde[1] + y * triad.up[1],
		origin[2] + z,
	);
}
