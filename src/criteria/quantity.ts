import type { Drop } from "../activity/drop.ts";
import { SUMMARY_KEYS } from "../activity/keys.ts";
import type { CaseSummary } from "../activity/result.ts";
import { angleNear, type Deck, floorAlong } from "../layout/habitat.ts";
import type { ActivityKind } from "../layout/schema.ts";
import { STANDARD_GRAVITY } from "../quantity/constants.ts";
import { rpmFromRadps } from "../quantity/convert.ts";

/** A quantity as a criterion asks for it: a value in its unit, or why there is none. */
export type Quantity = { readonly value: number; readonly unit: string } | { readonly value: null; readonly reason: string };

/** The standing quantities of a deck at one place of its floor, by the radius (m) there, at one spin rate (rad/s) for a stature (m). */
export const DECK_QUANTITIES: Readonly<
	Record<string, { readonly unit: string; readonly needsCrew: boolean; of(radius: number, rate: number, stature: number): number }>
> = {
	spin_rate_rpm: { unit: "rpm", needsCrew: false, of: (_radius, rate) => rpmFromRadps(rate) },
	floor_level_g: { unit: "g", needsCrew: false, of: (radius, rate) => (rate * rate * radius) / STANDARD_GRAVITY },
	rim_speed_mps: { unit: "m/s", needsCrew: false, of: (radius, rate) => rate * radius },
	/** Head-to-foot difference as a share of the level at the feet: h/R. */
	head_to_foot_percent: { unit: "%", needsCrew: true, of: (radius, _rate, stature) => (100 * stature) / radius },
	/** The same over a fixed 2 m. */
	gradient_per_2m_percent: { unit: "%", needsCrew: false, of: (radius) => 200 / radius },
	/** Ω², in g a metre. */
	gradient_g_per_m: { unit: "g/m", needsCrew: false, of: (_radius, rate) => (rate * rate) / STANDARD_GRAVITY },
};

/** Quantities of a drop that are not summary keys. */
export const DROP_QUANTITIES: Readonly<Record<string, (drop: Drop, decks: readonly Deck[]) => Quantity>> = {
	/** From the struck sphere's rim to the nearest walkway's edge on the struck floor; negative inside. */
	walkway_clearance_m: walkwayClearance,
	/** 1 where the sphere's rim comes down inside a walkway, else 0: also where no walkway is there or nothing comes down on a floor. */
	walkway_landings: (drop, decks) => {
		const { value } = walkwayClearance(drop, decks);
		return count(value !== null && value < 0 ? 1 : 0);
	},
	hatches_passed: (drop) => count(drop.flight.passed.length),
	coamings_struck: (drop) => count(drop.flight.struck.kind === "coaming" ? 1 : 0),
};

const count = (value: number): Quantity => ({ value, unit: "" });

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
	return { value: least - drop.object.diameter / 2, unit: "m" };
}

/** The entry of a free name; not what every object inherits. */
export const named = <T>(record: Readonly<Record<string, T>>, name: string): T | undefined =>
	Object.hasOwn(record, name) ? record[name] : undefined;

/** A summary key as a quantity. */
export function summaryQuantity(found: CaseSummary, key: string, kind: ActivityKind): Quantity {
	const unit = named(SUMMARY_KEYS[kind], key);
	if (unit === undefined) return { value: null, reason: `"${key}" is not a quantity of a ${kind}` };
	const value = found.summary[key];
	if (typeof value === "number") return { value, unit };
	return { value: null, reason: value == null ? (found.reasons[key] ?? "it does not exist") : `"${key}" is not a number` };
}
