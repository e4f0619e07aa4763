import type { Triad } from "../frame/place.ts";
import { type Deck, deckTriad, placeOnDeck } from "../layout/habitat.ts";
import { type RingVec, ring } from "../vector/vec3.ts";

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

type Out = Float32Array | Float64Array | number[];

/** Writes the stage coordinates of a ring position into out[at…at+2]. */
export const toStage = (frame: StageFrame, p: RingVec, out: Out, at = 0): void => putOnStage(frame, p[0], p[1], p[2], out, at);

/** The same from coordinates, for what must not allocate. */
export function putOnStage(frame: StageFrame, x: number, y: number, z: number, out: Out, at = 0): void {
	const { origin } = frame;
	putDirection(frame, x - origin[0], y - origin[1], z - origin[2], out, at);
}

/** Writes the stage components of a ring direction into out[at…at+2]. */
export const directionToStage = (frame: StageFrame, v: RingVec, out: Out, at = 0): void => putDirection(frame, v[0], v[1], v[2], out, at);

export function putDirection(frame: StageFrame, x: number, y: number, z: number, out: Out, at = 0): void {
	const { prograde, up } = frame.triad;
	out[at] = x * prograde[0] + y * prograde[1];
	out[at + 1] = x * up[0] + y * up[1];
	out[at + 2] = z;
}

/** The ring position of stage coordinates. */
export function fromStage(frame: StageFrame, x: number, y: number, z: number): RingVec {
	const { origin, triad } = frame;
	return ring(origin[0] + x * triad.prograde[0] + y * triad.up[0], origin[1] + x * triad.prograde[1] + y * triad.up[1], origin[2] + z);
}
