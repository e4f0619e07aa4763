import type { Triangles } from "../shape/drawable.ts";
import type { Buffers } from "./buffers.ts";
import type { Corners } from "./fill.ts";
import { corner, cut, mirrors, NEAR, transform, turnBehind, turnOnScreen, type VertexScratch } from "./triangles.ts";
import type { View } from "./view.ts";

/** The pixel inside a rim shows the surface that ends there where its depth is the rim's to this share: the surface bends away from it. */
const BULGE = 0.06;
/** The pixel outside lies behind: farther than the rim by this share. */
const BEHIND = 1e-3;

/**
 * The triangle across each side (corner k to the next) of each triangle, −1 where there is none or
 * more than one. Corners at equal places are one.
 */
export function neighbours({ position, index }: Triangles): Int32Array {
	const places = new Map<string, number>();
	const place = Int32Array.from({ length: position.length / 3 }, (_, v) => {
		const key = `${position[3 * v]} ${position[3 * v + 1]} ${position[3 * v + 2]}`;
		const known = places.get(key);
		if (known !== undefined) return known;
		places.set(key, v);
		return v;
	});
	const out = new Int32Array(index.length).fill(-1);
	/** First side seen between two places, or −1 once two have met there. */
	const open = new Map<number, number>();
	for (let k = 0; k < index.length; k++) {
		const a = place[index[k]!]!;
		const b = place[index[k % 3 === 2 ? k - 2 : k + 1]!]!;
		const key = Math.min(a, b) * place.length + Math.max(a, b);
		const other = open.get(key);
		if (other === undefined) open.set(key, k);
		else if (other >= 0 && out[other] === -1) {
			out[other] = Math.floor(k / 3);
			out[k] = Math.floor(other / 3);
		} else if (other >= 0) {
			out[3 * out[other]! + sideOf(out, out[other]!, Math.floor(other / 3))] = -1;
			out[other] = -1;
			open.set(key, -1);
		}
	}
	return out;
}

/** Which side of triangle t has the neighbour n. */
function sideOf(out: Int32Array, t: number, n: number): number {
	return out[3 * t] === n ? 0 : out[3 * t + 1] === n ? 1 : 2;
}

/** How a triangle was seen: not at all, from the front, from behind. */
const FRONT = 1;
const BACK = 2;

/**
 * Smooths the rims of a drawable once all opaque triangles are filled: along each side that has
 * nothing drawn beyond it, the pixel it passes through becomes a mix of both sides by the share of the
 * pixel on each.
 */
export function drawRims(
	buffers: Buffers,
	view: View,
	drawable: Triangles,
	across: Int32Array,
	matrix: Float32Array | null,
	scratch: VertexScratch,
): void {
	const { index, side } = drawable;
	if (!transform(view, matrix ? view.part : view.stage, drawable, scratch)) return;
	const { screen, outside, corners, camera, seen, unlit } = scratch;
	const mirrored = matrix !== null && mirrors(matrix);
	for (let t = 0, k = 0; k < index.length; t++, k += 3) {
		const a = index[k]!;
		const b = index[k + 1]!;
		const c = index[k + 2]!;
		const near = ((outside[a]! | outside[b]! | outside[c]!) & NEAR) !== 0;
		const turn = near ? turnBehind(camera, 3 * a, 3 * b, 3 * c) : turnOnScreen(screen, 3 * a, 3 * b, 3 * c);
		const front = turn < 0 !== mirrored;
		seen[t] = turn === 0 || (side !== "both" && front !== (side === "front")) ? 0 : front ? FRONT : BACK;
	}
	for (let k = 0; k < index.length; k++) {
		const t = (k / 3) | 0;
		const own = seen[t]!;
		if (own === 0) continue;
		const n = across[k]!;
		const other = n < 0 ? 0 : seen[n]!;
		if (other === own || (other !== 0 && n < t)) continue;
		const a = index[k]!;
		const b = index[k % 3 === 2 ? k - 2 : k + 1]!;
		const oa = outside[a]!;
		const ob = outside[b]!;
		if ((oa & ob) !== 0) continue;
		if ((oa & NEAR) === 0) corner(corners, 0, screen, unlit, a);
		else cut(corners, 0, view, camera, unlit, a, b);
		if ((ob & NEAR) === 0) corner(corners, 4, screen, unlit, b);
		else cut(corners, 4, view, camera, unlit, a, b);
		rim(buffers, corners, (own === FRONT) !== mirrored ? -1 : 1);
	}
}

/** Smooths along corners 0 and 1; `turn` below 0 where the triangle runs counter-clockwise as seen. */
function rim(buffers: Buffers, corners: Corners, turn: -1 | 1): void {
	const { width, height, depth, pixels } = buffers;
	const ax = corners[0]!;
	const ay = corners[1]!;
	const wa = corners[2]!;
	const dx = corners[4]! - ax;
	const dy = corners[5]! - ay;
	/** Steps along u, the axis the rim runs along most; v is the other, `out` the way along v that leaves the triangle. */
	const steep = Math.abs(dy) > Math.abs(dx);
	const du = steep ? dy : dx;
	if (du === 0) return;
	const au = steep ? ay : ax;
	const av = steep ? ax : ay;
	const slope = (steep ? dx : dy) / du;
	const rise = (corners[6]! - wa) / du;
	const out = turn * du < 0 === steep ? -1 : 1;
	const endV = steep ? width : height;
	const stepU = steep ? width : 1;
	const stepV = steep ? 1 : width;
	const first = Math.max(0, Math.ceil(Math.min(au, au + du) - 0.5));
	const last = Math.min(steep ? height : width, Math.ceil(Math.max(au, au + du) - 0.5));
	for (let u = first; u < last; u++) {
		const pu = u + 0.5 - au;
		const edge = av + pu * slope;
		const v = out > 0 ? Math.ceil(edge - 0.5) - 1 : Math.floor(edge - 0.5) + 1;
		if (!(v >= 0 && v < endV && v + out >= 0 && v + out < endV)) continue;
		const inside = u * stepU + v * stepV;
		const beyond = inside + out * stepV;
		const w = wa + pu * rise;
		const at = depth[inside]!;
		if (at < w * (1 - BULGE) || at > w * (1 + BULGE) || depth[beyond]! > w * (1 - BEHIND)) continue;
		/** How far the rim runs beyond the border of the two pixels: below 0 through the one inside. */
		const past = Math.abs(edge - v - 0.5) - 0.5;
		const to = 4 * (past < 0 ? inside : beyond);
		const from = 4 * (past < 0 ? beyond : inside);
		const part = Math.min(0.5, Math.abs(past));
		for (let c = 0; c < 3; c++) {
			const old = pixels[to + c]!;
			pixels[to + c] = old + (pixels[from + c]! - old) * part;
		}
	}
}
