import { angleNear, floorAlong } from "../layout/habitat.ts";
import { type Extent, middleOf } from "./bay-extent.ts";
import type { Opening } from "./bay-opening.ts";
import { frameReach } from "./bay-rim.ts";
import type { Surface } from "./bay-surface.ts";
import type { LineBuilder } from "./mesh.ts";
import { COLOUR, type ColourIndex } from "./palette.ts";
import type { StageFrame } from "./stage-frame.ts";

/** Lines stand off their face by so much, m. */
const LIFT = 0.002;
/** A segment is no longer than this, m: one that runs from far before the eye to behind it loses its width to rounding. */
const LONGEST = 2;
const SAME = 1e-6;

type Interval = readonly [number, number];

/** Where the line u = `at` (axis 0) or v = `at` (axis 1) runs on a face: an interval of the other coordinate. */
function run(surface: Surface, axis: 0 | 1, at: number): Interval | null {
	const { outline } = surface;
	const met: number[] = [];
	for (let i = 0; i < outline.length; i += 2) {
		const j = (i + 2) % outline.length;
		const p = outline[i + axis] as number;
		const q = outline[j + axis] as number;
		if (p === q || (at - p) * (at - q) > 0) continue;
		const other = outline[i + 1 - axis] as number;
		met.push(other + (((outline[j + 1 - axis] as number) - other) * (at - p)) / (q - p));
	}
	return met.length < 2 ? null : [Math.min(...met), Math.max(...met)];
}

/** What an opening with its frame takes from that line. */
function taken(opening: Opening, axis: 0 | 1, at: number): Interval | null {
	const reach = frameReach(opening);
	const a = opening.outline.along / 2 + reach;
	const c = opening.outline.across / 2 + reach;
	const sides: readonly [Interval, Interval] = [
		[opening.uv(-a, 0)[0], opening.uv(a, 0)[0]],
		[opening.uv(0, -c)[1], opening.uv(0, c)[1]],
	];
	const [m0, m1] = sides[axis];
	const [n0, n1] = sides[1 - axis] as Interval;
	const x = (2 * at - m0 - m1) / (m1 - m0);
	if (Math.abs(x) >= 1) return null;
	const k = opening.outline.shape === "circle" ? Math.sqrt(1 - x * x) : 1;
	return [(n0 + n1 - k * (n1 - n0)) / 2, (n0 + n1 + k * (n1 - n0)) / 2];
}

/** A line over a face along u = `at` (axis 0) or v = `at` (axis 1), within `within`, left out where openings are. */
export function faceLine(
	lines: LineBuilder,
	surface: Surface,
	openings: readonly Opening[],
	axis: 0 | 1,
	at: number,
	colour: ColourIndex,
	within: Interval = [Number.NEGATIVE_INFINITY, Number.POSITIVE_INFINITY],
): void {
	const whole = run(surface, axis, at);
	if (!whole) return;
	let free: Interval[] = [[Math.max(whole[0], within[0]), Math.min(whole[1], within[1])]];
	for (const opening of openings) {
		const gap = taken(opening, axis, at);
		if (gap)
			free = free.flatMap(([a, b]): Interval[] => [
				[a, Math.min(b, gap[0])],
				[Math.max(a, gap[1]), b],
			]);
	}
	for (const [a, b] of free) {
		if (b - a < SAME) continue;
		const points: number[] = [];
		for (const [i, s] of stops(surface, axis, a, b).entries()) surface.put(axis === 0 ? at : s, axis === 0 ? s : at, LIFT, points, 3 * i);
		lines.run(points, colour);
	}
}

/** Stops from a to b: on an arc at splits that keep a chord within half the lift of it, on a straight at even steps. */
function stops(surface: Surface, axis: 0 | 1, a: number, b: number): number[] {
	if (axis === 0 || surface.cuts.length === 0) {
		const n = Math.ceil((b - a) / LONGEST);
		return Array.from({ length: n + 1 }, (_, i) => a + ((b - a) * i) / n);
	}
	const longest = Math.min(LONGEST, Math.sqrt(4 * LIFT * surface.bend));
	const out = [a];
	let next = a;
	for (const c of [...surface.cuts.filter((x) => x > a + SAME && x < b - SAME), b]) {
		if (c - (out.at(-1) as number) > longest + SAME && next > (out.at(-1) as number)) out.push(next);
		next = c;
	}
	out.push(b);
	return out;
}

/** Whole multiples of `pitch` strictly between two bounds. */
export function multiples(pitch: number, from: number, to: number): number[] {
	const first = Math.ceil(from / pitch + SAME);
	const last = Math.floor(to / pitch - SAME);
	return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => (first + i) * pitch);
}

/** Beyond this distance along the floor only every fifth metre is ruled: more would merge into a tone. m */
const RULED = 30;

/**
 * The metre grid of a floor: whole metres of arc from the deck's middle, whole metres axial; every fifth
 * goes to `strong`.
 */
export function grid(
	fine: LineBuilder,
	strong: LineBuilder,
	floor: Surface,
	openings: readonly Opening[],
	extent: Extent,
	frame: StageFrame,
): void {
	const { deck } = extent;
	const here = floorAlong(deck, angleNear(frame.angle, middleOf(extent)));
	const fifth = (m: number): boolean => m % 5 === 0;
	for (const u of multiples(1, floor.from[0], floor.to[0]))
		if (fifth(u) || Math.abs(u - here) <= RULED) faceLine(fifth(u) ? strong : fine, floor, openings, 0, u, COLOUR.deckLine);
	for (const v of multiples(1, floor.from[1], floor.to[1])) faceLine(fifth(v) ? strong : fine, floor, openings, 1, v, COLOUR.deckLine);
}

/** Panel joints of a wall or ceiling, every `pitch` m, from v = `foot` on. */
export function joints(lines: LineBuilder, surface: Surface, openings: readonly Opening[], pitch: number, foot: number): void {
	for (const u of multiples(pitch, surface.from[0], surface.to[0]))
		faceLine(lines, surface, openings, 0, u, COLOUR.deskEdge, [foot, Number.POSITIVE_INFINITY]);
}

/** The corners of a bay along a wall: at its foot, its head and, of a side, its upright edges. */
export function corners(foot: LineBuilder, head: LineBuilder, wall: Surface): void {
	faceLine(foot, wall, [], 1, wall.from[1] + LIFT, COLOUR.ink);
	faceLine(head, wall, [], 1, wall.to[1] - LIFT, COLOUR.ink);
	if (wall.name === "end-low" || wall.name === "end-high") return;
	faceLine(head, wall, [], 0, wall.from[0] + LIFT, COLOUR.ink);
	faceLine(head, wall, [], 0, wall.to[0] - LIFT, COLOUR.ink);
}
