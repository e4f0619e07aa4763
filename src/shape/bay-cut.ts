import earcut, { refine } from "earcut";
import type { Surface } from "./bay-surface.ts";

/** Convex polygons in face coordinates, each u, v pairs in order round it. */
export type FlatMesh = readonly (readonly number[])[];

const SAME = 1e-9;

/** Least and greatest of the u (`axis` 0) or v (1) of a polygon. */
function span(polygon: readonly number[], axis: 0 | 1): readonly [number, number] {
	let low = Number.POSITIVE_INFINITY;
	let high = Number.NEGATIVE_INFINITY;
	for (let i: number = axis; i < polygon.length; i += 2) {
		const x = polygon[i] as number;
		if (x < low) low = x;
		if (x > high) high = x;
	}
	return [low, high];
}

/**
 * A face without its holes, no polygon crossing a split. Neighbouring polygons share whole edges:
 * where a split meets an edge is reckoned from the edge's lower end, whichever polygon asks.
 */
export function cut(surface: Surface, holes: readonly (readonly number[])[]): FlatMesh {
	const out: number[][] = [];
	if (surface.cuts.length === 0) {
		add(out, surface.outline, holes, surface.cuts);
		return out;
	}
	const [u0, v0] = surface.from;
	const [u1, v1] = surface.to;
	const lines = [u0, ...surface.cuts, u1];
	const spans = holes.map((h) => span(h, 0));
	/** A column joins its neighbour where a hole touches the split between them. */
	const joined = (u: number): boolean => spans.some(([a, b]) => a <= u + SAME && b >= u - SAME);
	for (let i = 0; i + 1 < lines.length; ) {
		let j = i + 1;
		while (j + 1 < lines.length && joined(lines[j] as number)) j++;
		const a = lines[i] as number;
		const b = lines[j] as number;
		const column = [a, v0, b, v0, b, v1, a, v1];
		const inside = spans.length === 0 ? [] : holes.filter((_, k) => (spans[k]?.[0] as number) > a && (spans[k]?.[1] as number) < b);
		if (inside.length === 0) out.push(column);
		else add(out, column, inside, lines.slice(i + 1, j));
		i = j;
	}
	return out;
}

function add(out: number[][], outline: readonly number[], holes: readonly (readonly number[])[], cuts: readonly number[]): void {
	const uv = [...outline, ...holes.flat()];
	const starts: number[] = [];
	let n = outline.length / 2;
	for (const h of holes) {
		starts.push(n);
		n += h.length / 2;
	}
	const index = earcut(uv, starts);
	refine(index, uv);
	for (let t = 0; t < index.length; t += 3) {
		const triangle: number[] = [];
		for (let k = 0; k < 3; k++) {
			const i = 2 * (index[t + k] as number);
			triangle.push(uv[i] as number, uv[i + 1] as number);
		}
		const [low, high] = span(triangle, 0);
		let from = Number.NEGATIVE_INFINITY;
		for (const c of cuts) {
			if (c <= low + SAME || c >= high - SAME) continue;
			keep(out, slab(triangle, from, c, 0));
			from = c;
		}
		keep(out, from === Number.NEGATIVE_INFINITY ? triangle : slab(triangle, from, Number.POSITIVE_INFINITY, 0));
	}
}

/** Adds a polygon unless it has no area. */
function keep(out: number[][], polygon: number[]): void {
	let twice = 0;
	for (let i = 0, j = polygon.length - 2; i < polygon.length; j = i, i += 2)
		twice += (polygon[j] as number) * (polygon[i + 1] as number) - (polygon[i] as number) * (polygon[j + 1] as number);
	if (Math.abs(twice) > SAME * SAME) out.push(polygon);
}

/** The part of a convex polygon whose u (`axis` 0) or v (1) lies in [low, high]. */
function slab(polygon: readonly number[], low: number, high: number, axis: 0 | 1): number[] {
	const out: number[] = [];
	const n = polygon.length;
	/** Adds where the edge p → q crosses x = c, if it does inside. */
	const cross = (i: number, j: number, c: number): void => {
		const p = polygon[i + axis] as number;
		const q = polygon[j + axis] as number;
		const [a, b] = p <= q ? [i, j] : [j, i];
		const x0 = polygon[a + axis] as number;
		const x1 = polygon[b + axis] as number;
		if (!(x0 < c - SAME && x1 > c + SAME)) return;
		const y0 = polygon[a + 1 - axis] as number;
		const y = y0 + (((polygon[b + 1 - axis] as number) - y0) * (c - x0)) / (x1 - x0);
		if (axis === 0) out.push(c, y);
		else out.push(y, c);
	};
	for (let i = 0; i < n; i += 2) {
		const j = (i + 2) % n;
		const p = polygon[i + axis] as number;
		if (p >= low - SAME && p <= high + SAME) out.push(polygon[i] as number, polygon[i + 1] as number);
		const rising = p <= (polygon[j + axis] as number);
		cross(i, j, rising ? low : high);
		cross(i, j, rising ? high : low);
	}
	return out;
}

/** The part of a mesh inside a rectangle of face coordinates. */
export function clip(mesh: FlatMesh, u0: number, v0: number, u1: number, v1: number): FlatMesh {
	const out: number[][] = [];
	for (const polygon of mesh) {
		const [west, east] = span(polygon, 0);
		const [south, north] = span(polygon, 1);
		if (west >= u1 - SAME || east <= u0 + SAME || south >= v1 - SAME || north <= v0 + SAME) continue;
		const narrowed = west < u0 || east > u1 ? slab(polygon, u0, u1, 0) : polygon;
		keep(out, south < v0 || north > v1 ? slab(narrowed, v0, v1, 1) : [...narrowed]);
	}
	return out;
}
