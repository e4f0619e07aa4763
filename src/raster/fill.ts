import type { Buffers } from "./buffers.ts";
import { RAMP, type Tones } from "./tone.ts";

export type DepthUse = "write" | "test" | "ignore";

/** How the triangles of one drawable are laid on. */
export interface Paint {
	readonly tones: Tones;
	/** First place of the colour in `tones.words`. */
	base: number;
	/** Opaque writes depth; otherwise it is painted over what stands, by `opacity`, where that is not nearer or everywhere. */
	depth: DepthUse;
	opacity: number;
	/** Painted as if nearer by a little: `relative` of its own depth and `slope` pixels along its own plane. */
	relative: number;
	slope: number;
}

/** Screen corners, 4 numbers each: x, y (px, y down), 1/z, ramp level. */
export type Corners = Float64Array;

/** A triangle whose levels differ by less is drawn in one. */
const FLAT = 0.75;

/**
 * Fills the triangle of corners i, j, k: a pixel belongs to it where its centre does, one on an edge
 * to the triangle right of or below that edge. 1/z is linear on the screen; so is level/z.
 */
export function fill(buffers: Buffers, corners: Corners, i: number, j: number, k: number, paint: Paint): void {
	let a = 4 * i;
	let b = 4 * j;
	let c = 4 * k;
	if (corners[b + 1]! < corners[a + 1]!) [a, b] = [b, a];
	if (corners[c + 1]! < corners[a + 1]!) [a, c] = [c, a];
	if (corners[c + 1]! < corners[b + 1]!) [b, c] = [c, b];
	const { width, height, depth, words, pixels } = buffers;
	const ay = corners[a + 1]!;
	const by = corners[b + 1]!;
	const cy = corners[c + 1]!;
	const top = Math.max(0, Math.ceil(ay - 0.5));
	const end = Math.min(height, Math.ceil(cy - 0.5));
	if (!(top < end)) return;
	const ax = corners[a]!;
	const bx = corners[b]!;
	const cx = corners[c]!;
	const abx = bx - ax;
	const aby = by - ay;
	const acx = cx - ax;
	const acy = cy - ay;
	/** Twice the area; above 0 where b lies right of the edge a–c. */
	const area = abx * acy - aby * acx;
	if (area > -1e-7 && area < 1e-7) return;
	const w0 = corners[a + 2]!;
	const wb = corners[b + 2]! - w0;
	const wc = corners[c + 2]! - w0;
	const wx = (wb * acy - wc * aby) / area;
	const wy = (wc * abx - wb * acx) / area;
	const la = corners[a + 3]!;
	const lb = corners[b + 3]!;
	const lc = corners[c + 3]!;
	const flat = (area < 1 && area > -1) || (Math.abs(lb - la) < FLAT && Math.abs(lc - la) < FLAT);
	const base = paint.base;
	const tone = base + (((la + lb + lc) / 3) | 0);
	const s0 = la * w0;
	const sb = lb * corners[b + 2]! - s0;
	const sc = lc * corners[c + 2]! - s0;
	const sx = (sb * acy - sc * aby) / area;
	const sy = (sc * abx - sb * acx) / area;
	const { opacity } = paint;
	const opaque = paint.depth === "write";
	const over = paint.depth === "ignore";
	const { words: ramp, bytes } = paint.tones;
	const nearer = 1 + paint.relative;
	const lift = paint.slope * (Math.abs(wx) + Math.abs(wy));
	const word = ramp[tone]!;
	const long = acx / acy;
	const middle = Math.ceil(by - 0.5);
	for (let y = top; y < end; y++) {
		const yc = y + 0.5;
		const onLong = ax + (yc - ay) * long;
		const onShort = y < middle ? ax + (yc - ay) * (abx / aby) : bx + (yc - by) * ((cx - bx) / (cy - by));
		const left = area > 0 ? onLong : onShort;
		const right = area > 0 ? onShort : onLong;
		const from = left > 0.5 ? Math.ceil(left - 0.5) : 0;
		const to = right < width ? Math.ceil(right - 0.5) : width;
		if (from >= to) continue;
		let w = w0 + wx * (from + 0.5 - ax) + wy * (yc - ay);
		let at = y * width + from;
		const stop = y * width + to;
		if (!opaque) {
			let s = s0 + sx * (from + 0.5 - ax) + sy * (yc - ay);
			for (; at < stop; at++) {
				if (over || w * nearer + lift > depth[at]!) {
					const t = 4 * (flat ? tone : base + Math.min(RAMP - 1, (s / w) | 0));
					for (let n = 0, p = 4 * at; n < 3; n++, p++) {
						const under = pixels[p]!;
						pixels[p] = under + (bytes[t + n]! - under) * opacity;
					}
				}
				w += wx;
				s += sx;
			}
		} else if (flat)
			for (; at < stop; at++) {
				if (w > depth[at]!) {
					depth[at] = w;
					words[at] = word;
				}
				w += wx;
			}
		else {
			let s = s0 + sx * (from + 0.5 - ax) + sy * (yc - ay);
			for (; at < stop; at++) {
				if (w > depth[at]!) {
					depth[at] = w;
					words[at] = ramp[base + ((s / w) | 0)]!;
				}
				w += wx;
				s += sx;
			}
		}
	}
}
