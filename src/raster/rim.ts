import type { Buffers } from "./buffers.ts";
import type { Corners, Paint } from "./fill.ts";

/** The pixel inside a rim shows the surface that ends there where its depth is the rim's to this share: the surface bends away from it. */
const BULGE = 0.06;
/** The pixel outside lies behind: farther than the rim by this share. */
const BEHIND = 1e-3;
/** Of a painted rim: what stands nearer than it by this share covers it. */
const COVERED = 0.02;
/** Up to this opacity paint can be taken off again, so that a thin coat is smoothed by what it adds and what lies under it stays sharp. */
const THIN = 0.8;

/**
 * Smooths the rim or seam of a triangle along corners 0 and 1: each pixel that it passes through becomes a mix of
 * both sides by the share of the pixel on each. `turn` is below 0 where the triangle runs
 * counter-clockwise as seen; `tone` is its place in the ramps.
 */
export function rim(buffers: Buffers, corners: Corners, turn: -1 | 1, paint: Paint, tone: number, seam: boolean): void {
	const use = paint.depth;
	const { opacity } = paint;
	const { bytes } = paint.tones;
	if (seam && use === "test" && opacity < 1) return;
	const thin = use === "test" && opacity <= THIN;
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
		if (use === "write") {
			if (depth[inside]! < w * (1 - BULGE) || depth[inside]! > w * (1 + BULGE)) continue;
			if (seam ? depth[beyond]! < w * (1 - BULGE) || depth[beyond]! > w * (1 + BULGE) : depth[beyond]! > w * (1 - BEHIND)) continue;
		}
		if (use === "test" && (depth[inside]! > w * (1 + COVERED) || depth[beyond]! > w * (1 + COVERED))) continue;
		/** How far the rim runs beyond the border of the two pixels: below 0 through the one inside. */
		const past = Math.abs(edge - v - 0.5) - 0.5;
		const to = 4 * (past < 0 ? inside : beyond);
		const from = 4 * (past < 0 ? beyond : inside);
		const part = Math.min(0.5, Math.abs(past));
		if (thin) {
			const more = opacity * (past < 0 ? -part / (1 - opacity) : part);
			for (let c = 0; c < 3; c++) {
				const old = pixels[to + c]!;
				pixels[to + c] = old + (bytes[4 * tone + c]! - old) * more;
			}
			continue;
		}
		for (let c = 0; c < 3; c++) {
			const old = pixels[to + c]!;
			pixels[to + c] = old + (pixels[from + c]! - old) * part;
		}
	}
}
