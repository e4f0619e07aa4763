import { constantSpin } from "../frame/spin.ts";
import type { Deck } from "../layout/habitat.ts";
import { deckTriad } from "../layout/habitat.ts";
import { type RingVec, ring, scale } from "../vector/vec3.ts";
import { TOUCHING } from "./contact.ts";
import { DragPath } from "./drag-path.ts";
import { firstDragContact, longestFlight } from "./fly.ts";
import type { Path } from "./path.ts";
import { ceilingSurface, floorSurface, wallSurfaces } from "./surface.ts";
import type { World } from "./world.ts";

/** Where the same release would go in a room that does not turn. */
export interface Ghost {
	readonly path: Path;
	/** Of its first contact; null where it meets nothing. */
	readonly end: number | null;
	/** The uniform field, m/s². */
	readonly field: number;
	/** The floor point touched, ring coordinates; null where something else comes first, or the floor is open there. */
	readonly point: RingVec | null;
}

/**
 * The comparison of the picture: the same release, the same air, the same bay, but no turning and a
 * uniform field along the release's local down of the size that the ring gives at its floor, Ω²R.
 * Elements are left out.
 */
export function ghostOf(
	world: World,
	deck: Deck,
	rate: number,
	position: RingVec,
	velocity: RingVec,
	diameter: number,
	drag: number,
): Ghost {
	const field = rate * rate * deck.radius;
	const up = deckTriad(deck, Math.atan2(position[1], position[0])).up;
	const path = new DragPath(constantSpin(0), position, velocity, drag, scale(up, -field));
	const floor = floorSurface(deck, diameter / 2);
	const bay = [floor, ceilingSurface(deck, diameter / 2), ...wallSurfaces(deck, diameter / 2)];
	path.advance(0.01);
	const s = new Float64Array(6);
	path.stateAt(0, s);
	const resting = floor.gap(s) <= 0 && floor.rate(s) <= 0;
	const touching = new Set(bay.filter((surface) => surface.gap(s) <= TOUCHING && surface.rate(s) >= 0));
	const contact = resting ? { t: 0, surface: floor } : firstDragContact(path, bay, 0, longestFlight(rate), touching);
	if (!contact) return { path, end: null, field, point: null };
	path.exactStateAt(contact.t, s);
	const centre = ring(s[0] as number, s[1] as number, s[2] as number);
	const point = onFloor(deck, centre);
	const open = world.ways.some((w) => w.hatch.deck === deck.index && !w.hatch.solid && w.admits(Math.atan2(point[1], point[0]), point[2]));
	return { path, end: contact.t, field, point: contact.surface === floor && !open ? point : null };
}

function onFloor(deck: Deck, p: RingVec): RingVec {
	if (deck.floor === "curved") {
		const k = deck.radius / Math.hypot(p[0], p[1]);
		return ring(p[0] * k, p[1] * k, p[2]);
	}
	const c = Math.cos(deck.middle);
	const s = Math.sin(deck.middle);
	const k = deck.radius - (p[0] * c + p[1] * s);
	return ring(p[0] + k * c, p[1] + k * s, p[2]);
}
