import { radFromDeg } from "../quantity/convert.ts";
import { angleNear, type Deck, deckCovers, type Walkway } from "./habitat.ts";
import type { DeckFile } from "./schema.ts";

/** How far the foot of a ladder may be from the floor of its deck, m. */
export const LADDER_FOOT = 0.05;
/** Rounding of written numbers, deg and m: below it two places are one. */
export const SLACK = 1e-9;

function walkwaysOf(file: DeckFile, middle: number): Walkway[] {
	return (file.walkways ?? []).map((w) => {
		const own = radFromDeg((w.from_deg + w.to_deg) / 2);
		const turn = angleNear(own, middle) - own;
		return { id: w.id, from: radFromDeg(w.from_deg) + turn, to: radFromDeg(w.to_deg) + turn, axialFrom: w.from_m, axialTo: w.to_m };
	});
}

/** A deck of the file in SI and radians; its walkways by whole turns nearest to its middle. */
export function resolveDeck(file: DeckFile, index: number): Deck {
	const middle = radFromDeg((file.from_deg + file.to_deg) / 2);
	return {
		index,
		id: file.id,
		name: file.name,
		floor: file.floor,
		radius: file.radius_m,
		from: radFromDeg(file.from_deg),
		to: radFromDeg(file.to_deg),
		axialFrom: file.from_m,
		axialTo: file.to_m,
		headroom: file.headroom_m,
		middle,
		closed: file.to_deg - file.from_deg >= 360 - SLACK,
		walkways: walkwaysOf(file, middle),
	};
}

/** Distance of the floor from the spin axis at a ring angle, m: of a flat floor it grows away from the middle. */
export const floorRadius = (deck: Deck, angle: number): number =>
	deck.floor === "curved" ? deck.radius : deck.radius / Math.cos(angleNear(angle, deck.middle) - deck.middle);

/** The deck whose floor is nearest to a ladder's foot, at its angle and axial place and within `LADDER_FOOT`; null where none is. */
export function ladderDeck(decks: readonly Deck[], angle: number, axial: number, footRadius: number): Deck | null {
	let found: Deck | null = null;
	let least = LADDER_FOOT + SLACK;
	for (const deck of decks) {
		if (!deckCovers(deck, { angle, axial })) continue;
		const gap = Math.abs(floorRadius(deck, angle) - footRadius);
		if (gap < least) {
			found = deck;
			least = gap;
		}
	}
	return found;
}
