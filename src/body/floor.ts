import type { Deck } from "../layout/habitat.ts";

/** Height of the floor at a stance point, over the plane that touches it at the stance origin, m. */
export type Floor = (forward: number, right: number) => number;
export const LEVEL: Floor = () => 0;

/** A deck's floor around a person facing heading `facing` (rad): a curved one rises before and behind along the ring. */
export function deckFloor(deck: Deck, facing: number): Floor {
	if (deck.floor === "flat") return LEVEL;
	const c = Math.cos(facing);
	const s = Math.sin(facing);
	return (forward, right) => deck.radius - Math.sqrt(Math.max(0, deck.radius ** 2 - (forward * c - right * s) ** 2));
}
