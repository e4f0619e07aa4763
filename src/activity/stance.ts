import { defaultFeet } from "../body/reach.ts";
import { angleNear, type Deck, floorAlong, floorAngle, heightAbove, placeOnDeck } from "../layout/habitat.ts";
import type { RingVec } from "../vector/vec3.ts";

/** Where and how a person stands: feet at a floor place, facing a heading (rad). */
export interface Stance {
	readonly angle: number;
	readonly axial: number;
	readonly facing: number;
	/** Ring position of the floor point between the feet. */
	readonly position: RingVec;
	/** Whether the layout says so; otherwise the hand decides. */
	readonly given: boolean;
}

/** Nearer than this to a bulkhead nobody stands, m. */
const CLEAR = 0.3;

export const givenStance = (deck: Deck, angle: number, axial: number, facing: number): Stance => ({
	angle,
	axial,
	facing,
	position: placeOnDeck(deck, angle, axial, 0),
	given: true,
});

/** The stance that puts a hand at a ring position with the elbow comfortably bent, as far as the bay has room. */
export function stanceAtHand(deck: Deck, hand: RingVec, stature: number, facing: number): Stance {
	const offset = defaultFeet(heightAbove(deck, hand), stature, facing);
	const within = (value: number, from: number, to: number): number =>
		to - from < 2 * CLEAR ? (from + to) / 2 : Math.min(Math.max(value, from + CLEAR), to - CLEAR);
	let along = floorAlong(deck, angleNear(Math.atan2(hand[1], hand[0]), deck.middle)) + offset.prograde;
	if (!deck.closed) along = within(along, floorAlong(deck, deck.from), floorAlong(deck, deck.to));
	const axial = within(hand[2] + offset.axial, deck.axialFrom, deck.axialTo);
	return { ...givenStance(deck, floorAngle(deck, along), axial, facing), given: false };
}
