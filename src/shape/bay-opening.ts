import {
	angleNear,
	type Deck,
	floorAlong,
	floorAngle,
	type Habitat,
	type Hatch,
	type Outline,
	type WindowOpening,
} from "../layout/habitat.ts";
import { type Extent, middleOf, within } from "./bay-extent.ts";
import { type Surface, slant } from "./bay-surface.ts";

/**
 * A hole in a face. Its outline lives in its own plane coordinates (a, c), m from its centre: a along,
 * c across, on the face that carries it (a hatch seen in the ceiling below keeps those of its own floor).
 */
export interface Opening {
	readonly id: string;
	readonly kind: "hatch" | "window";
	readonly outline: Outline;
	/** Face coordinates of a point of the opening's plane. */
	uv(a: number, c: number): readonly [number, number];
	/** Its outline as runs in order round it, the last meeting the first, split where the face, or the face at the far end, is. */
	readonly runs: readonly Run[];
}

/** A smooth stretch of an outline: points, the offset that carries them outward by 1 m, and the outward normal; a, c pairs. */
export interface Run {
	readonly point: readonly number[];
	readonly offset: readonly number[];
	readonly normal: readonly number[];
	/** Whether the end joins the start. */
	readonly closed: boolean;
}

/** Chords of a whole circle; a multiple of 4. */
export const ROUND = 72;
const SAME = 1e-9;

/** The runs of an outline split at these a. */
function runs(outline: Outline, at: readonly number[]): Run[] {
	const splits = at.filter((a) => Math.abs(a) < outline.along / 2);
	if (outline.shape === "circle") {
		const r = outline.along / 2;
		const corner = (i: number): [number, number] => {
			const t = (2 * Math.PI * (i % ROUND)) / ROUND;
			return [r * Math.cos(t), r * Math.sin(t)];
		};
		const point: number[] = [];
		for (let i = 0; i < ROUND; i++) point.push(...chord(corner(i), corner(i + 1), splits));
		point.push(r, 0);
		const normal = point.map((x, i) => x / Math.hypot(point[i & ~1] as number, point[i | 1] as number));
		return [{ point, offset: normal, normal, closed: true }];
	}
	const a = outline.along / 2;
	const c = outline.across / 2;
	const corners: [number, number][] = [
		[a, -c],
		[a, c],
		[-a, c],
		[-a, -c],
	];
	return corners.map((p, i) => {
		const q = corners[(i + 1) % 4] as [number, number];
		const point = [...chord(p, q, splits), ...q];
		const n = [i === 0 ? 1 : i === 2 ? -1 : 0, i === 1 ? 1 : i === 3 ? -1 : 0];
		const normal = point.map((_, k) => n[k % 2] as number);
		const offset = [...normal];
		for (const [k, end] of [
			[0, p],
			[point.length - 2, q],
		] as const) {
			offset[k] = Math.sign(end[0]);
			offset[k + 1] = Math.sign(end[1]);
		}
		return { point, offset, normal, closed: false };
	});
}

/** p and the splits strictly between p and q, in order, without q. Where it crosses is reckoned from the lower end, whichever way it runs. */
function chord(p: readonly [number, number], q: readonly [number, number], splits: readonly number[]): number[] {
	const [low, high] = p[0] <= q[0] ? [p, q] : [q, p];
	const between = splits.filter((a) => a > low[0] + SAME && a < high[0] - SAME);
	if (between.length === 0) return [...p];
	if (low === q) between.reverse();
	return [...p, ...between.flatMap((a) => [a, low[1] + ((high[1] - low[1]) * (a - low[0])) / (high[0] - low[0])])];
}

/** The outline as one polygon in face coordinates, u, v pairs, carried outward by `offset` m. */
export function hole(opening: Opening, offset = 0): number[] {
	const out: number[] = [];
	for (const run of opening.runs)
		for (let i = 0; i + 2 < run.point.length; i += 2) {
			const a = (run.point[i] as number) + offset * (run.offset[i] as number);
			const c = (run.point[i + 1] as number) + offset * (run.offset[i + 1] as number);
			out.push(...opening.uv(a, c));
		}
	return out;
}

function windowOpening(extent: Extent, surface: Surface, w: WindowOpening): Opening {
	const { deck } = extent;
	const base = { id: w.id, kind: "window" as const, outline: w };
	const angle = angleNear(w.angle, middleOf(extent));
	const placed = (u: number, v: number, stretch: number): Opening => ({
		...base,
		uv: (a, c) => [u + a * stretch, v + c],
		runs: runs(
			w,
			surface.cuts.map((cut) => (cut - u) / stretch),
		),
	});
	switch (w.surface) {
		case "floor":
			return placed(floorAlong(deck, angle), w.axial, 1);
		case "ceiling":
			return placed(floorAlong({ ...deck, radius: deck.radius - deck.headroom }, angle), w.axial, 1);
		case "end-low":
		case "end-high":
			return placed(floorAlong(deck, angle), w.height, deck.floor === "curved" ? deck.radius / (deck.radius - w.height) : 1);
		default:
			return placed(w.axial, w.height * slant(deck, w.surface === "side-low" ? deck.from : deck.to), 1);
	}
}

/** A hatch as it opens the floor of its deck or, `extent` being the deck below, the ceiling there. */
export function hatchOpening(habitat: Habitat, built: ReadonlyMap<Deck, Extent>, extent: Extent, hatch: Hatch): Opening {
	const own = habitat.decks[hatch.deck] as Deck;
	const below = hatch.below === null ? undefined : habitat.decks[hatch.below];
	const centre = floorAlong(own, angleNear(hatch.angle, own.middle));
	const splits = [built.get(own), below && built.get(below)]
		.flatMap((e) => e?.cuts ?? [])
		.map((cut) => angleNear(cut, hatch.angle) - hatch.angle)
		.filter((turn) => Math.abs(turn) * own.radius < hatch.along)
		.map((turn) => floorAlong(own, angleNear(hatch.angle, own.middle) + turn) - centre)
		.sort((a, b) => a - b)
		.filter((a, i, all) => i === 0 || a - (all[i - 1] as number) > SAME);
	const base = { id: hatch.id, kind: "hatch" as const, outline: hatch, runs: runs(hatch, splits) };
	if (extent.deck === own) {
		const u = floorAlong(own, angleNear(hatch.angle, middleOf(extent)));
		return { ...base, uv: (a, c) => [u + a, hatch.axial + c] };
	}
	const { deck } = extent;
	const ceiling = { ...deck, radius: deck.radius - deck.headroom };
	const inside = 1e-3;
	const low = floorAlong(ceiling, extent.from) + inside;
	const high = floorAlong(ceiling, extent.to) - inside;
	return {
		...base,
		uv: (a, c) => {
			const u = floorAlong(ceiling, angleNear(floorAngle(own, centre + a), middleOf(extent)));
			const v = hatch.axial + c;
			return [Math.min(high, Math.max(low, u)), Math.min(deck.axialTo - inside, Math.max(deck.axialFrom + inside, v))];
		},
	};
}

/** The openings of one face that lie in what is built. */
export function openings(habitat: Habitat, built: ReadonlyMap<Deck, Extent>, extent: Extent, surface: Surface): Opening[] {
	const { deck } = extent;
	const windows = habitat.windows
		.filter((w) => w.deck === deck.index && w.surface === surface.name)
		.filter((w) => w.surface.startsWith("side") || within(extent, w.angle))
		.map((w) => windowOpening(extent, surface, w));
	const through = habitat.hatches.filter(
		(h) => (surface.name === "floor" ? h.deck : surface.name === "ceiling" ? h.below : null) === deck.index,
	);
	return [...windows, ...through.filter((h) => within(extent, h.angle)).map((h) => hatchOpening(habitat, built, extent, h))];
}
