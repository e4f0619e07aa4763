import { degFromRad, radFromDeg } from "../../quantity/convert.ts";
import { SLACK } from "../deck.ts";
import { angleNear, type Deck, floorAngle } from "../habitat.ts";
import { below, type Problem, valueText } from "../problem.ts";

/** Problems one after the other: none is worked out that is not asked for. */
export type Problems = Generator<Problem>;

/** Bounds of a number, both included, in the unit of what they bound. */
export interface Bounds {
	readonly from: number;
	readonly to: number;
}

export const problem = (path: string, value: unknown, expected: string, nearest?: string): Problem => ({
	path,
	value: valueText(value),
	expected,
	...(nearest === undefined ? {} : { nearest }),
});

/** A number as it is told to people: no more digits than tell a millimetre in ten kilometres. */
export const told = (value: number): string => String(Number(value.toPrecision(7)));

export const isWithin = (value: number, bounds: Bounds): boolean => value >= bounds.from - SLACK && value <= bounds.to + SLACK;

/** Nothing, or the one problem that a number lies outside its bounds. */
export function* within(path: string, value: number, bounds: Bounds, unit: string, why: string, shown: number = value): Problems {
	if (isWithin(value, bounds)) return;
	if (bounds.from > bounds.to + SLACK) yield problem(path, shown, `room for it, and there is none (${why})`);
	else yield problem(path, shown, `from ${told(bounds.from)} to ${told(bounds.to)} ${unit} (${why})`);
}

/**
 * The floor angles (rad) over which a ball of radius `clearance` (m), its centre `height` (m) above the floor, is clear of
 * the bay's angular ends; null in a bay that has none. The walls stand at constant angle, so a flat bay narrows upward.
 */
export function clearAngles(deck: Deck, height: number, clearance: number): Bounds | null {
	if (deck.closed) return null;
	const half = (deck.to - deck.from) / 2;
	if (deck.floor === "curved") {
		const inset = Math.asin(Math.min(1, clearance / (deck.radius - height)));
		return { from: deck.from + inset, to: deck.to - inset };
	}
	return alongAngles(deck, (deck.radius - height) * Math.tan(half) - clearance / Math.cos(half));
}

/** The floor angles whose floor points lie within `reach` (m) of the middle of a flat deck. */
export const alongAngles = (deck: Deck, reach: number): Bounds => ({ from: floorAngle(deck, -reach), to: floorAngle(deck, reach) });

/** An angle of the file (deg), equal modulo 360°, against bounds in rad; null bounds hold any angle. */
export function* angleWithin(path: string, deg: number, deck: Deck, bounds: Bounds | null, why: string): Problems {
	if (bounds === null) return;
	const angle = degFromRad(angleNear(radFromDeg(deg), deck.middle));
	yield* within(path, angle, { from: degFromRad(bounds.from), to: degFromRad(bounds.to) }, "deg", why, deg);
}

/** A place on or above a deck: `path` is the object that holds `angle_deg` and `axial_m`. */
export function* placeWithin(path: string, place: { angle_deg: number; axial_m: number }, deck: Deck, height = 0, clearance = 0): Problems {
	const why = clearance > 0 ? `clear of the walls of deck ${deck.id}` : `on deck ${deck.id}`;
	yield* angleWithin(below(path, "angle_deg"), place.angle_deg, deck, clearAngles(deck, height, clearance), why);
	const axial = { from: deck.axialFrom + clearance, to: deck.axialTo - clearance };
	yield* within(below(path, "axial_m"), place.axial_m, axial, "m", why);
}
