import type { Drop } from "../activity/drop.ts";
import type { CaseSummary } from "../activity/result.ts";
import { angleNear, type Deck, floorAlong } from "../layout/habitat.ts";
import { STANDARD_GRAVITY } from "../quantity/constants.ts";
import { rpmFromRadps } from "../quantity/convert.ts";

/** A quantity as a criterion asks for it: a value, or why there is none. */
export type Quantity = { readonly value: number } | { readonly value: null; readonly reason: string };

/** The standing quantities of a deck at one spin rate (rad/s) for a stature (m). */
export const DECK_QUANTITIES: Readonly<
	Record<string, { readonly unit: string; readonly needsCrew: boolean; of(deck: Deck, rate: number, stature: number): number }>
> = {
	spin_rate_rpm: { unit: "rpm", needsCrew: false, of: (_deck, rate) => rpmFromRadps(rate) },
	floor_level_g: { unit: "g", needsCrew: false, of: (deck, rate) => (rate * rate * deck.radius) / STANDARD_GRAVITY },
	rim_speed_mps: { unit: "m/s", needsCrew: false, of: (deck, rate) => rate * deck.radius },
	/** Head-to-foot difference as a share of the level at the feet: h/R. */
	head_to_foot_percent: { unit: "%", needsCrew: true, of: (deck, _rate, stature) => (100 * stature) / deck.radius },
	/** The same over a fixed 2 m. */
	gradient_per_2m_percent: { unit: "%", needsCrew: false, of: (deck) => 200 / deck.radius },
	/** Ω², in g a metre. */
	gradient_g_per_m: { unit: "g/m", needsCrew: false, of: (_deck, rate) => (rate * rate) / STANDARD_GRAVITY },
};

/** Quantities of a drop that are not summary keys. */
export const DROP_QUANTITIES: Readonly<Record<string, { readonly unit: string; of(drop: Drop, decks: readonly Deck[]): Quantity }>> = {
	/** From the struck sphere's rim to the nearest walkway's edge on the struck floor; negative inside. */
	walkway_clearance_m: { unit: "m", of: walkwayClearance },
	/** 1 where the sphere's rim comes down inside a walkway, else 0. */
	walkway_landings: {
		unit: "",
		of: (drop, decks) => {
			const clearance = walkwayClearance(drop, decks);
			return clearance.value === null ? clearance : { value: clearance.value < 0 ? 1 : 0 };
		},
	},
	hatches_passed: { unit: "", of: (drop) => ({ value: drop.flight.passed.length }) },
	coamings_struck: { unit: "", of: (drop) => ({ value: drop.flight.struck.kind === "coaming" ? 1 : 0 }) },
};

function walkwayClearance(drop: Drop, decks: readonly Deck[]): Quantity {
	const { struck } = drop.flight;
	if (struck.kind !== "deck" || !drop.landing) return { value: null, reason: "it does not land on a deck" };
	const deck = decks[struck.deck] as Deck;
	if (deck.walkways.length === 0) return { value: null, reason: `deck "${deck.id}" has no walkway` };
	const { point } = drop.landing;
	const angle = Math.atan2(point[1], point[0]);
	let least = Number.POSITIVE_INFINITY;
	for (const way of deck.walkways) {
		const middle = (way.from + way.to) / 2;
		const at = angleNear(angle, middle);
		const along = floorAlong(deck, at);
		const beyondAlong = Math.max(floorAlong(deck, way.from) - along, along - floorAlong(deck, way.to));
		const beyondAxial = Math.max(way.axialFrom - point[2], point[2] - way.axialTo);
		const outside = Math.hypot(Math.max(0, beyondAlong), Math.max(0, beyondAxial));
		least = Math.min(least, outside > 0 ? outside : Math.max(beyondAlong, beyondAxial));
	}
	return { value: least - drop.object.diameter / 2 };
}

/** A summary key as a quantity. */
export function summaryQuantity(found: CaseSummary, key: string, kind: string): Quantity {
	if (!(key in found.summary)) return { value: null, reason: `"${key}" is not a quantity of a ${kind}` };
	const value = found.summary[key];
	if (typeof value === "number") return { value };
	return { value: null, reason: value === null ? (found.reasons[key] ?? "it does not exist") : `"${key}" is not a number` };
}
