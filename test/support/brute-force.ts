import type { DeckFile, HatchFile, LayoutFile } from "../../src/layout/schema.ts";
import type { Primitive } from "../../src/layout/solid.ts";

/**
 * The oracle "fine steps": where a sphere first touches solid matter, by its clear distance from everything around it,
 * followed along the path in steps no longer than half that distance. The geometry is written out once more from the
 * layout file: what is not inside a bay or a hatch's shaft is solid. Only the bodies of ladders and workstations are
 * taken over.
 */
export interface Matter {
	readonly layout: LayoutFile;
	readonly shafts: readonly Shaft[];
	readonly bodies: readonly Body[];
}
type Body = { readonly id: string; readonly primitives: readonly Primitive[] };

export const matterOf = (layout: LayoutFile, bodies: readonly Body[]): Matter => ({ layout, shafts: shaftsOf(layout), bodies });

export type Point = readonly [number, number, number];
interface Near {
	/** Clear distance, m; 0 or less in contact. */
	readonly clear: number;
	readonly what: string;
}
/** The bay (index) or hatch (index among the hatches) that the centre is in. */
type Within = { readonly bay: number } | { readonly hatch: number } | null;

const rad = (deg: number): number => (deg / 180) * Math.PI;
const round = (x: number, near: number): number => x - 2 * Math.PI * Math.round((x - near) / (2 * Math.PI));
const middle = (d: DeckFile): number => rad((d.from_deg + d.to_deg) / 2);
const closed = (d: DeckFile): boolean => d.to_deg - d.from_deg >= 360;
/** Depth of a place: distance from the axis, or of a flat deck along its normal. */
const depthOf = (d: DeckFile, p: Point): number =>
	d.floor === "curved" ? Math.hypot(p[0], p[1]) : p[0] * Math.cos(middle(d)) + p[1] * Math.sin(middle(d));
/** Radius at which the ray at `angle` meets the surface `height` above a deck's floor. */
const radiusAt = (d: DeckFile, height: number, angle: number): number =>
	d.floor === "curved" ? d.radius_m - height : (d.radius_m - height) / Math.cos(angle - middle(d));
const covers = (d: DeckFile, angle: number, axial: number): boolean => {
	const a = round(angle, middle(d));
	return (closed(d) || (a >= rad(d.from_deg) && a <= rad(d.to_deg))) && axial >= d.from_m && axial <= d.to_m;
};

const hatchesOf = (layout: LayoutFile): HatchFile[] => (layout.elements ?? []).filter((e): e is HatchFile => e.kind === "hatch");

/** Index of the deck below a hatch, or −1. */
function below(layout: LayoutFile, h: HatchFile): number {
	const decks = layout.habitat.decks;
	const own = decks.find((d) => d.id === h.deck)!;
	let found = -1;
	decks.forEach((d, i) => {
		if (d === own || !covers(d, rad(h.angle_deg), h.axial_m)) return;
		const r = radiusAt(d, 0, rad(h.angle_deg));
		if (r <= radiusAt(own, 0, rad(h.angle_deg))) return;
		if (found < 0 || r < radiusAt(decks[found]!, 0, rad(h.angle_deg))) found = i;
	});
	return found;
}

interface Shaft {
	readonly hatch: HatchFile;
	readonly own: DeckFile;
	readonly below: DeckFile | null;
	readonly belowIndex: number;
	readonly ownIndex: number;
}

function shaftsOf(layout: LayoutFile): Shaft[] {
	const decks = layout.habitat.decks;
	return hatchesOf(layout).map((hatch) => {
		const belowIndex = below(layout, hatch);
		const ownIndex = decks.findIndex((d) => d.id === hatch.deck);
		return { hatch, own: decks[ownIndex]!, below: decks[belowIndex] ?? null, belowIndex, ownIndex };
	});
}

const along = (d: DeckFile, angle: number): number =>
	d.floor === "curved" ? d.radius_m * angle : d.radius_m * Math.tan(angle - middle(d));
const angleOf = (d: DeckFile, u: number): number => (d.floor === "curved" ? u / d.radius_m : middle(d) + Math.atan(u / d.radius_m));

function admits(s: Shaft, p: Point): boolean {
	const centre = round(rad(s.hatch.angle_deg), middle(s.own));
	const u = along(s.own, round(Math.atan2(p[1], p[0]), centre)) - along(s.own, centre);
	const w = p[2] - s.hatch.axial_m;
	if (s.hatch.shape === "circle") return Math.hypot(u, w) <= s.hatch.diameter_m / 2;
	return Math.abs(u) <= s.hatch.along_m / 2 && Math.abs(w) <= s.hatch.across_m / 2;
}

const top = (s: Shaft, angle: number): number => radiusAt(s.own, 0, angle);
const bottom = (s: Shaft, angle: number): number =>
	s.below ? Math.max(top(s, angle), radiusAt(s.below, s.below.headroom_m, angle)) : top(s, angle);

/** Outline point by a parameter in 0…4 (a side each) or 0…4 round a circle: floor coordinate from the centre, and axial. */
function edge(h: HatchFile, parameter: number): readonly [number, number] {
	if (h.shape === "circle") {
		const t = (Math.PI / 2) * parameter;
		return [(h.diameter_m / 2) * Math.cos(t), (h.diameter_m / 2) * Math.sin(t)];
	}
	const side = Math.floor(parameter) % 4;
	const x = 2 * (parameter - Math.floor(parameter)) - 1;
	const [a, c] = [h.along_m / 2, h.across_m / 2];
	return (
		[
			[a, x * c],
			[-x * a, c],
			[-a, -x * c],
			[x * a, -c],
		] as const
	)[side as 0];
}

/** Distance from p to the wall of a shaft: the radii through the outline, from the floor to the ceiling below. */
function wallDistance(s: Shaft, p: Point): number {
	const centre = round(rad(s.hatch.angle_deg), middle(s.own));
	const at = (parameter: number): number => {
		const [u, w] = edge(s.hatch, parameter);
		const angle = angleOf(s.own, along(s.own, centre) + u);
		const [c, n] = [Math.cos(angle), Math.sin(angle)];
		const r = Math.min(bottom(s, angle), Math.max(top(s, angle), p[0] * c + p[1] * n));
		return Math.hypot(p[0] - r * c, p[1] - r * n, p[2] - s.hatch.axial_m - w);
	};
	const parts = 12;
	const end = 1 - 1e-15;
	const bests = [0, 1, 2, 3].map((side) => {
		let best = 0;
		let least = at(side);
		for (let i = 1; i <= parts; i++) {
			const here = at(side + (i / parts) * end);
			if (here < least) [best, least] = [i, here];
		}
		return { side, best, least };
	});
	const nearestOf = Math.min(...bests.map((b) => b.least));
	const apart = (s.hatch.shape === "circle" ? s.hatch.diameter_m : Math.max(s.hatch.along_m, s.hatch.across_m)) / parts;
	let least = Number.POSITIVE_INFINITY;
	for (const { side, best, least: coarse } of bests) {
		if (coarse > nearestOf + apart) continue;
		let low = side + (Math.max(0, best - 1) / parts) * end;
		let high = side + (Math.min(parts, best + 1) / parts) * end;
		for (let k = 0; k < 45; k++) {
			const a = low + (high - low) / 3;
			const b = high - (high - low) / 3;
			if (at(a) < at(b)) high = b;
			else low = a;
		}
		least = Math.min(least, at((low + high) / 2));
	}
	return least;
}

function bodyDistance(primitive: Primitive, p: Point): number {
	if (primitive.kind === "capsule") {
		const d = [0, 1, 2].map((i) => primitive.b[i]! - primitive.a[i]!);
		const v = [0, 1, 2].map((i) => p[i]! - primitive.a[i]!);
		const dot = (a: number[], b: number[]): number => a.reduce((sum, x, i) => sum + x * b[i]!, 0);
		const k = Math.min(1, Math.max(0, dot(v, d) / dot(d, d)));
		return Math.hypot(...v.map((x, i) => x - k * d[i]!)) - primitive.radius;
	}
	const over = primitive.axes.map((axis, i) => {
		const x = [0, 1, 2].reduce((sum, k) => sum + (p[k]! - primitive.centre[k]!) * axis[k]!, 0);
		return Math.abs(x) - primitive.half[i]!;
	});
	return Math.hypot(...over.map((x) => Math.max(0, x))) + Math.min(0, Math.max(...over));
}

/** Which bay or hatch the centre is in, coming from `before`: bays are left through hatches only. Null in solid matter. */
function within(matter: Matter, p: Point, before: NonNullable<Within>): Within {
	const { layout, shafts } = matter;
	const inBay = (i: number): boolean => {
		const d = layout.habitat.decks[i];
		if (!d) return false;
		const depth = depthOf(d, p);
		return depth <= d.radius_m && depth >= d.radius_m - d.headroom_m && covers(d, Math.atan2(p[1], p[0]), p[2]);
	};
	if ("bay" in before && inBay(before.bay)) return before;
	for (const [i, s] of shafts.entries()) {
		const near = "bay" in before ? s.ownIndex === before.bay || s.belowIndex === before.bay : before.hatch === i;
		if (!near || !admits(s, p)) continue;
		const r = Math.hypot(p[0], p[1]);
		const angle = Math.atan2(p[1], p[0]);
		if (r >= top(s, angle) && (!s.below || r <= bottom(s, angle))) return { hatch: i };
		const beyond = r < top(s, angle) ? s.ownIndex : s.belowIndex;
		if (inBay(beyond)) return { bay: beyond };
	}
	return null;
}

/** What is nearest to a sphere about p, among what the place lets it meet. */
export function nearest(matter: Matter, place: NonNullable<Within>, p: Point, half: number): Near {
	const { layout, bodies, shafts } = matter;
	const found: Near[] = [];
	if ("bay" in place) {
		const d = layout.habitat.decks[place.bay]!;
		const depth = depthOf(d, p);
		const foot = (surface: number): Point => {
			if (d.floor === "curved") return [(p[0] / depth) * surface, (p[1] / depth) * surface, p[2]];
			const k = surface - depth;
			return [p[0] + k * Math.cos(middle(d)), p[1] + k * Math.sin(middle(d)), p[2]];
		};
		const openFloor = shafts.find((s) => s.ownIndex === place.bay && admits(s, foot(d.radius_m)));
		const openCeiling = shafts.find((s) => s.belowIndex === place.bay && admits(s, foot(d.radius_m - d.headroom_m)));
		found.push(
			openFloor
				? { clear: wallDistance(openFloor, p) - half, what: `coaming:${openFloor.hatch.id}` }
				: { clear: d.radius_m - depth - half, what: `deck:${d.id}` },
		);
		found.push(
			openCeiling
				? { clear: wallDistance(openCeiling, p) - half, what: `coaming:${openCeiling.hatch.id}` }
				: { clear: depth - (d.radius_m - d.headroom_m) - half, what: `ceiling:${d.id}` },
		);
		found.push({ clear: p[2] - d.from_m - half, what: `end-low:${d.id}` }, { clear: d.to_m - p[2] - half, what: `end-high:${d.id}` });
		if (!closed(d)) {
			const angle = round(Math.atan2(p[1], p[0]), middle(d));
			const r = Math.hypot(p[0], p[1]);
			const wall = (turn: number): number => (turn > Math.PI / 2 ? r : r * Math.sin(turn)) - half;
			found.push(
				{ clear: wall(angle - rad(d.from_deg)), what: `side-low:${d.id}` },
				{ clear: wall(rad(d.to_deg) - angle), what: `side-high:${d.id}` },
			);
		}
	} else {
		const s = shafts[place.hatch]!;
		found.push({ clear: wallDistance(s, p) - half, what: `coaming:${s.hatch.id}` });
	}
	for (const body of bodies)
		for (const primitive of body.primitives) found.push({ clear: bodyDistance(primitive, p) - half, what: `element:${body.id}` });
	return found.reduce((a, b) => (b.clear < a.clear ? b : a));
}

export interface Found {
	readonly struck: string;
	readonly time: number;
	readonly passed: readonly string[];
	/** Where the centre was just before a contact; null without one. */
	readonly place: Within;
}

/** Follows `path` (position in the ring and a bound on the speed at t) from bay `deck` to the first contact in fine steps, then bisects. */
export function fineSteps(
	matter: Matter,
	deck: number,
	half: number,
	path: (t: number) => { readonly p: Point; readonly speed: number },
	until: number,
): Found {
	const passed: string[] = [];
	let place: NonNullable<Within> = { bay: deck };
	let before = 0;
	let beforeClear = nearest(matter, place, path(0).p, half);
	/** The hatch being gone through, and whether outward. */
	let going: { readonly shaft: Shaft; readonly outward: boolean } | null = null;
	for (let t = 0; t < until; ) {
		const { p, speed } = path(t);
		const now = within(matter, p, place);
		const near = now ? nearest(matter, now, p, half) : null;
		if (t > 0 && (!near || near.clear <= 0)) {
			let [low, high] = [before, t];
			let what = near?.what ?? beforeClear.what;
			for (let k = 0; k < 60; k++) {
				const m = (low + high) / 2;
				const q = path(m).p;
				const there = within(matter, q, place);
				const n = there ? nearest(matter, there, q, half) : null;
				if (n && n.clear > 0) low = m;
				else {
					high = m;
					if (n) what = n.what;
				}
			}
			return { struck: what, time: high, passed, place: within(matter, path(low).p, place) };
		}
		const left: NonNullable<Within> = place;
		place = now ?? place;
		const over = matter.shafts.find((s, i) =>
			"hatch" in place ? place.hatch === i : crossing(s, place, p, half) || joins(s, left, place),
		);
		if (over && !going) going = { shaft: over, outward: "bay" in left && left.bay === over.ownIndex };
		if (going) {
			const { shaft, outward } = going;
			const far = (s: number): boolean => {
				const q = path(s).p;
				return outward ? outerDepth(shaft, q) >= half : shaft.own.radius_m - depthOf(shaft.own, q) >= half;
			};
			const back = outward ? shaft.own.radius_m - depthOf(shaft.own, p) >= half : outerDepth(shaft, p) >= half;
			if (far(t)) {
				passed.push(shaft.hatch.id);
				going = null;
				if (outward && !shaft.below) {
					let [low, high] = [before, t];
					for (let k = 0; k < 60; k++) {
						const m = (low + high) / 2;
						if (far(m)) high = m;
						else low = m;
					}
					return { struck: "outside", time: high, passed, place: null };
				}
			} else if (back) going = null;
		}
		before = t;
		beforeClear = near ?? beforeClear;
		t += Math.min(0.2, Math.max(1e-5, (0.4 * beforeClear.clear) / Math.max(speed * 1.2, 1e-3)));
	}
	return { struck: "none", time: until, passed, place: null };
}

/** Whether a shaft of no length was gone through from one bay to the other in one step. */
const joins = (s: Shaft, a: NonNullable<Within>, b: NonNullable<Within>): boolean =>
	"bay" in a && "bay" in b && ((a.bay === s.ownIndex && b.bay === s.belowIndex) || (b.bay === s.ownIndex && a.bay === s.belowIndex));

/** How far beyond the outer end of a shaft, m. */
const outerDepth = (s: Shaft, p: Point): number =>
	s.below ? depthOf(s.below, p) - (s.below.radius_m - s.below.headroom_m) : depthOf(s.own, p) - s.own.radius_m;

/** Whether a sphere in a bay reaches into a shaft's end. */
function crossing(s: Shaft, place: NonNullable<Within>, p: Point, half: number): boolean {
	if (!("bay" in place)) return false;
	if (place.bay === s.ownIndex) return s.own.radius_m - depthOf(s.own, p) < half && admits(s, p);
	return place.bay === s.belowIndex && outerDepth(s, p) < half && admits(s, p);
}
