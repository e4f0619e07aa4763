import type { Part, Triangles } from "../shape/drawable.ts";
import type { Buffers } from "./buffers.ts";
import { fill, type Paint } from "./fill.ts";
import type { Prepared } from "./prepare.ts";
import { rim } from "./rim.ts";
import { RAMP } from "./tone.ts";
import { corner, cut, FRONT, lighten, look, mirrors, NEAR, transform, UNSEEN, type VertexScratch } from "./vertices.ts";
import type { View } from "./view.ts";

/** How many of `length` numbers, `each` a triangle or segment, a part has drawn. */
export const drawn = (length: number, each: number, part: Part | null): number =>
	part?.count === undefined ? length : Math.min(length, each * Math.max(0, Math.trunc(part.count)));

/**
 * Fills the triangles of a drawable, smooths its rims, or both one piece after the other: standing still where `part` is null, else of a part whose matrix is already in `view.part`. A rim is a side
 * across which nothing of the drawable is seen, or its other face; a seam one between two colours.
 */
export function drawTriangles(
	buffers: Buffers,
	view: View,
	drawable: Triangles,
	prepared: Prepared,
	part: Part | null,
	scratch: VertexScratch,
	paint: Paint,
	what: "fill" | "rim" | "both",
): void {
	const { index, colour } = drawable;
	if (!transform(view, part ? view.part : view.stage, drawable, scratch)) return;
	const mirrored = part !== null && mirrors(part.matrix);
	const end = drawn(index.length, 3, part);
	look(drawable, end, mirrored, scratch);
	const { seen } = scratch;
	const lit = drawable.lit && what !== "rim";
	if (part && lit) lighten(drawable, part.matrix, mirrored, scratch);
	const front = lit ? (part ? scratch.front : prepared.front) : scratch.unlit;
	const back = lit ? (part ? scratch.back : prepared.back) : scratch.unlit;
	for (let piece = 0, from = 0; from < end; piece++) {
		const to = Math.min(end, 3 * prepared.pieces[piece]!);
		if (what !== "rim")
			for (let k = from; k < to; k += 3) {
				const own = seen[k / 3]!;
				if (own === UNSEEN) continue;
				paint.base = RAMP * colour[index[k]!]!;
				fillTriangle(buffers, view, index, k, own === FRONT ? front : back, scratch, paint);
			}
		if (what !== "fill")
			for (let k = from; k < to; k++) {
				const t = Math.trunc(k / 3);
				const own = seen[t]!;
				if (own === UNSEEN) continue;
				const n = prepared.across[k]!;
				const other = n < 0 || 3 * n >= end ? UNSEEN : seen[n]!;
				const first = index[3 * t]!;
				if (other !== UNSEEN && n < t) continue;
				const seam = other === own;
				if (seam && colour[index[3 * n]!] === colour[first]) continue;
				const levels = own === FRONT ? front : back;
				if (place(view, index[k]!, index[k % 3 === 2 ? k - 2 : k + 1]!, levels, scratch))
					rim(
						buffers,
						scratch.corners,
						(own === FRONT) !== mirrored ? -1 : 1,
						paint,
						RAMP * colour[first]! + Math.trunc(levels[first]!),
						seam,
					);
			}
		from = to;
	}
}

/** Fills the triangle at k of the index, cut at the near plane. */
function fillTriangle(
	buffers: Buffers,
	view: View,
	index: Uint32Array,
	k: number,
	levels: Float32Array,
	scratch: VertexScratch,
	paint: Paint,
): void {
	const { screen, outside, corners, camera } = scratch;
	const a = index[k]!;
	const b = index[k + 1]!;
	const c = index[k + 2]!;
	const oa = outside[a]! & NEAR;
	const ob = outside[b]! & NEAR;
	const oc = outside[c]! & NEAR;
	if ((oa | ob | oc) === 0) {
		corner(corners, 0, screen, levels, a);
		corner(corners, 4, screen, levels, b);
		corner(corners, 8, screen, levels, c);
		fill(buffers, corners, 0, 1, 2, paint);
		return;
	}
	let n = 0;
	if (oa === 0) n = corner(corners, n, screen, levels, a);
	if (oa !== ob) n = cut(corners, n, view, camera, levels, a, b);
	if (ob === 0) n = corner(corners, n, screen, levels, b);
	if (ob !== oc) n = cut(corners, n, view, camera, levels, b, c);
	if (oc === 0) n = corner(corners, n, screen, levels, c);
	if (oc !== oa) n = cut(corners, n, view, camera, levels, c, a);
	fill(buffers, corners, 0, 1, 2, paint);
	if (n === 16) fill(buffers, corners, 0, 2, 3, paint);
}

/** Writes the side a–b as corners 0 and 1, cut at the near plane; returns whether any of it can be seen. */
function place(view: View, a: number, b: number, levels: Float32Array, scratch: VertexScratch): boolean {
	const { screen, outside, corners, camera } = scratch;
	if ((outside[a]! & outside[b]!) !== 0) return false;
	if ((outside[a]! & NEAR) === 0) corner(corners, 0, screen, levels, a);
	else cut(corners, 0, view, camera, levels, a, b);
	if ((outside[b]! & NEAR) === 0) corner(corners, 4, screen, levels, b);
	else cut(corners, 4, view, camera, levels, a, b);
	return true;
}
