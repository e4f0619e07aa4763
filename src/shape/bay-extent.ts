import { angleNear, type Deck, floorAlong, type Habitat } from "../layout/habitat.ts";
import type { StageFrame } from "./stage-frame.ts";

/** A built range of a deck's angles, rad, `from` < `to`, and whether a side bulkhead stands at either end. */
interface Range {
	readonly deck: Deck;
	readonly from: number;
	readonly to: number;
	readonly sideLow: boolean;
	readonly sideHigh: boolean;
}

/** The part of a deck that is built, and the angles within it at which what bends is split: rising, none on a flat deck. */
export interface Extent extends Range {
	readonly cuts: readonly number[];
}

/** Largest gap between a chord and its arc, m; largest turn of a chord, rad; and its largest length, m. */
const SAGITTA = 0.002;
const TURN = Math.PI / 180;
const CHORD = 0.5;
/** Above so many columns chords lengthen, as far as the sagitta allows. */
const COLUMNS = 600;
/** Room left about an opening for its frame, m. */
const FRAME_ROOM = 0.2;
/** A deck no longer than this is built whole, m. */
const WHOLE = 250;
const SAME = 1e-9;

/** Its middle angle, near which its openings are measured. */
export const middleOf = (r: { readonly from: number; readonly to: number }): number => (r.from + r.to) / 2;

/** Length of a split, m of floor: a whole part or multiple of 1 m, so that the 1 m grid lies on splits. */
function step(deck: Deck, length: number): number {
	const limit = Math.min(CHORD, TURN * deck.radius, Math.sqrt(8 * SAGITTA * deck.radius));
	let s = 1 / Math.ceil(1 / limit);
	while (length / s > COLUMNS && (2 * s) ** 2 < 8 * SAGITTA * deck.radius && 2 * s < TURN * deck.radius) s *= 2;
	return s;
}

function splits(r: Range): number[] {
	const { deck, from, to } = r;
	if (deck.floor === "flat") return [];
	const s = step(deck, (to - from) * deck.radius);
	const first = Math.ceil(floorAlong(deck, from) / s + 1e-6);
	const last = Math.floor(floorAlong(deck, to) / s - 1e-6);
	return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => deck.middle + ((first + i) * s) / deck.radius);
}

/**
 * What of a deck can be seen from a place on it at `angle`: on a long curved one, until the ceiling hides
 * the floor from any height (two tangents' worth of arc); all of any other.
 */
function sight(deck: Deck, angle: number): Range {
	const whole = { deck, from: deck.from, to: deck.to, sideLow: !deck.closed, sideHigh: !deck.closed };
	const half = 2 * Math.acos(Math.max(-1, 1 - deck.headroom / deck.radius));
	if (deck.floor === "flat" || (deck.to - deck.from) * deck.radius <= WHOLE || (deck.closed && half >= Math.PI)) return whole;
	const near = angleNear(angle, deck.middle);
	if (deck.closed) return { ...whole, from: near - half, to: near + half };
	const centre = Math.min(deck.to, Math.max(deck.from, near));
	const from = Math.max(deck.from, centre - half);
	const to = Math.min(deck.to, centre + half);
	return { deck, from, to, sideLow: from === deck.from, sideHigh: to === deck.to };
}

/** Angles that the openings of a deck and their frames take up, near `near`. */
function taken(habitat: Habitat, deck: Deck, near: number): (readonly [number, number])[] {
	const span = (angle: number, along: number, radius: number): readonly [number, number] => {
		const a = angleNear(angle, near);
		const half = (along / 2 + FRAME_ROOM) / Math.max(radius, along / 2 + FRAME_ROOM);
		return [a - half, a + half];
	};
	return [
		...habitat.hatches
			.filter((h) => h.deck === deck.index || h.below === deck.index)
			.map((h) => span(h.angle, h.along, (habitat.decks[h.deck] as Deck).radius)),
		...habitat.windows
			.filter((w) => w.deck === deck.index && w.surface !== "side-low" && w.surface !== "side-high")
			.map((w) => span(w.angle, w.along, deck.radius - deck.headroom)),
	];
}

/** Moves the open ends of a range so that no opening crosses one; a whole turn keeps its length. */
function clear(habitat: Habitat, r: Range): Range {
	const turn = r.deck.closed && r.to - r.from > 2 * Math.PI - SAME;
	let { from, to } = r;
	for (let again = true, rounds = 0; again && rounds < 100; rounds++) {
		again = false;
		for (const [a, b] of taken(habitat, r.deck, from))
			if (!r.sideLow && a < from - SAME && b > from + SAME) {
				from = turn ? b : a;
				again = true;
			}
		if (turn) to = from + 2 * Math.PI;
		else
			for (const [a, b] of taken(habitat, r.deck, to))
				if (!r.sideHigh && a < to - SAME && b > to + SAME) {
					to = b;
					again = true;
				}
	}
	return { ...r, from, to };
}

function union(x: Range, y: Range): Range {
	const from = angleNear(y.from, x.from);
	const r = {
		deck: x.deck,
		from: Math.min(x.from, from),
		to: Math.max(x.to, from + y.to - y.from),
		sideLow: x.sideLow || y.sideLow,
		sideHigh: x.sideHigh || y.sideHigh,
	};
	return r.to - r.from < 2 * Math.PI ? r : { ...r, to: r.from + 2 * Math.PI };
}

/** The ranges built for a station, deck by deck: its own, then whatever hatches in a built range lead to. */
function ranges(habitat: Habitat, frame: StageFrame): Map<Deck, Range> {
	const built = new Map([[frame.deck, clear(habitat, sight(frame.deck, frame.angle))]]);
	for (let edge = [...built.keys()]; edge.length > 0; ) {
		const found = new Map<Deck, Range>();
		for (const deck of edge)
			for (const hatch of habitat.hatches) {
				const other = habitat.decks[(hatch.deck === deck.index ? hatch.below : hatch.below === deck.index ? hatch.deck : null) ?? -1];
				if (!other || built.has(other) || !within(built.get(deck) as Range, hatch.angle)) continue;
				const seen = sight(other, hatch.angle);
				const before = found.get(other);
				found.set(other, before ? union(before, seen) : seen);
			}
		for (const [deck, r] of found) built.set(deck, clear(habitat, r));
		edge = [...found.keys()];
	}
	return built;
}

/** Whether a ring angle lies in a range. */
export const within = (r: { readonly from: number; readonly to: number }, angle: number): boolean =>
	Math.abs(angleNear(angle, middleOf(r)) - middleOf(r)) <= (r.to - r.from) / 2;

/**
 * What is built for a station, by deck: of its own what can be seen along it, of decks joined by hatches
 * what can be seen from there. Decks share their splits at a hatch, so that its shaft meets both without a crack.
 */
export function extents(habitat: Habitat, frame: StageFrame): Map<Deck, Extent> {
	const built = ranges(habitat, frame);
	const own = new Map([...built].map(([deck, r]) => [deck, splits(r)]));
	return new Map(
		[...built].map(([deck, r]) => {
			const cuts = [...(own.get(deck) as number[])];
			if (deck.floor === "curved")
				for (const h of habitat.hatches) {
					const other = habitat.decks[(h.deck === deck.index ? h.below : h.below === deck.index ? h.deck : null) ?? -1];
					if (!other) continue;
					const half = (h.along / 2 + FRAME_ROOM) / (habitat.decks[h.deck] as Deck).radius;
					const centre = angleNear(h.angle, middleOf(r));
					for (const c of own.get(other) ?? []) {
						const near = angleNear(c, centre);
						if (Math.abs(near - centre) < half && near > r.from + SAME && near < r.to - SAME) cuts.push(near);
					}
				}
			cuts.sort((a, b) => a - b);
			return [deck, { ...r, cuts: cuts.filter((c, i) => i === 0 || c - (cuts[i - 1] as number) > SAME) }];
		}),
	);
}
