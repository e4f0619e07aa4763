import { createDropper, type Dropper } from "../body/drop.ts";
import { deckFloor } from "../body/floor.ts";
import { localFromRing, type Triad } from "../frame/place.ts";
import { deckTriad } from "../layout/habitat.ts";
import type { Drop } from "./drop.ts";

/** Distance the gaze keeps ahead for each metre the object is below the eyes, cot 68°: straight down would turn the view over. */
const LEAST_AHEAD = 0.4;
/** The gaze takes that distance within this time of the release, s. */
const COME_AHEAD = 0.3;
const EYE_SHARE = 0.93;

/** The person of a drop, ready to be posed at any time: stands, holds, lets go, follows with head and eyes. */
export function personOf(drop: Drop, stature: number): Dropper {
	const { deck, stance } = drop;
	const track = gazeTrack(drop, deckTriad(deck, stance.angle), stature);
	const release = new Float64Array(3);
	track(0, release);
	return createDropper({
		stature,
		diameter: drop.object.diameter,
		hand: (release[2] as number) >= -0.02 ? "right" : "left",
		track,
		velocity: stanceVector(drop, deckTriad(deck, stance.angle)),
		floor: deckFloor(deck, stance.facing),
	});
}

/** The release velocity in the stance frame (forward, up, right), m/s. */
function stanceVector(drop: Drop, triad: Triad): readonly [number, number, number] {
	const [x, y, z] = localFromRing(triad, drop.velocity);
	const c = Math.cos(drop.stance.facing);
	const s = Math.sin(drop.stance.facing);
	return [c * x + s * z, y, c * z - s * x];
}

/** Where the person looks for the object: its place in the stance frame (forward, up, right; m), kept ahead of the feet. */
function gazeTrack(drop: Drop, triad: Triad, stature: number): (t: number, out: Float64Array) => void {
	const state = new Float64Array(6);
	const { facing, position } = drop.stance;
	const c = Math.cos(facing);
	const s = Math.sin(facing);
	return (t, out) => {
		drop.flight.path.stateAt(Math.min(t, drop.flight.end), state);
		const dx = (state[0] as number) - position[0];
		const dy = (state[1] as number) - position[1];
		const x = dx * triad.prograde[0] + dy * triad.prograde[1];
		const y = dx * triad.up[0] + dy * triad.up[1];
		const z = (state[2] as number) - position[2];
		const forward = c * x + s * z;
		const least = 0.1 + LEAST_AHEAD * Math.max(0, EYE_SHARE * stature - y);
		out[0] = forward + Math.max(0, least - forward) * Math.min(1, Math.max(0, t / COME_AHEAD));
		out[1] = y;
		out[2] = -s * x + c * z;
	};
}
