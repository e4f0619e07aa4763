import type { Part, WideLines } from "../shape/drawable.ts";
import type { Buffers } from "./buffers.ts";
import { plain, type Tones } from "./tone.ts";
import { drawn } from "./triangles.ts";
import type { View } from "./view.ts";

/**
 * The pixels that the lines of one drawable touch, each once with its greatest coverage, so that
 * joints and crossings of translucent lines are no darker than the lines. Grows to the most seen.
 */
export interface LineScratch {
	count: number;
	pixel: Int32Array;
	/** 0…1 */
	cover: Float32Array;
	/** 1/z of the line there. */
	depth: Float32Array;
	colour: Uint8Array;
	/** Ends of the segment in hand: x, y (px), 1/z, run (m), 4 each; then half its width, px. */
	readonly ends: Float64Array;
}

export const createLineScratch = (): LineScratch => ({
	count: 0,
	pixel: new Int32Array(0),
	cover: new Float32Array(0),
	depth: new Float32Array(0),
	colour: new Uint8Array(0),
	ends: new Float64Array(9),
});

/** A line counts as nearer by this share of its distance, so that one lying on a surface is seen. */
const NEARER = 1e-3;
/** … and the surface may lie farther by this many pixels along its own slope. */
const SLACK = 0.35;

export function drawLines(
	buffers: Buffers,
	view: View,
	drawable: WideLines,
	part: Part | null,
	pixelRatio: number,
	scratch: LineScratch,
	tones: Tones,
): void {
	const { position, dash, depth } = drawable;
	const { ends } = scratch;
	ends[8] = (drawable.width * pixelRatio) / 2;
	scratch.count = 0;
	let run = 0;
	const m = part ? view.part : view.stage;
	const end = drawn(position.length, 6, part);
	for (let k = 0; k < end; k += 6) {
		if (dash) {
			if (k === 0 || position[k] !== position[k - 3] || position[k + 1] !== position[k - 2] || position[k + 2] !== position[k - 1]) run = 0;
			ends[3] = run;
			const dx = position[k + 3]! - position[k]!;
			const dy = position[k + 4]! - position[k + 1]!;
			const dz = position[k + 5]! - position[k + 2]!;
			run += Math.sqrt(dx * dx + dy * dy + dz * dz);
			ends[7] = run;
		}
		if (!place(view, m, position, k, ends)) continue;
		const span = Math.abs(ends[0]! - ends[4]!) + Math.abs(ends[1]! - ends[5]!);
		if (!(span < Number.POSITIVE_INFINITY)) throw new RangeError(`line ${k / 6} of "${drawable.name}" has an end that is not finite`);
		gather(buffers, scratch, drawable.colour[k / 6]!, depth === "tested", dash);
	}
	composite(buffers, drawable, scratch, tones);
}

/** Projects the segment at k into `ends`, cut at the near plane; returns whether any of it lies beyond that. */
function place(view: View, m: Float64Array, position: Float32Array, k: number, ends: Float64Array): boolean {
	const { near, focal } = view;
	const px = position[k]!;
	const py = position[k + 1]!;
	const pz = position[k + 2]!;
	const qx = position[k + 3]!;
	const qy = position[k + 4]!;
	const qz = position[k + 5]!;
	let ax = m[0]! * px + m[1]! * py + m[2]! * pz + m[3]!;
	let ay = m[4]! * px + m[5]! * py + m[6]! * pz + m[7]!;
	let az = m[8]! * px + m[9]! * py + m[10]! * pz + m[11]!;
	let bx = m[0]! * qx + m[1]! * qy + m[2]! * qz + m[3]!;
	let by = m[4]! * qx + m[5]! * qy + m[6]! * qz + m[7]!;
	let bz = m[8]! * qx + m[9]! * qy + m[10]! * qz + m[11]!;
	if (az < near && bz < near) return false;
	if (az < near || bz < near) {
		const t = (near - az) / (bz - az);
		const x = ax + t * (bx - ax);
		const y = ay + t * (by - ay);
		const run = ends[3]! + t * (ends[7]! - ends[3]!);
		if (az < near) {
			ax = x;
			ay = y;
			az = near;
			ends[3] = run;
		} else {
			bx = x;
			by = y;
			bz = near;
			ends[7] = run;
		}
	}
	ends[0] = view.width / 2 + (focal * ax) / az;
	ends[1] = view.height / 2 - (focal * ay) / az;
	ends[2] = 1 / az;
	ends[4] = view.width / 2 + (focal * bx) / bz;
	ends[5] = view.height / 2 - (focal * by) / bz;
	ends[6] = 1 / bz;
	return true;
}

/** Gathers the pixels of the segment in `ends`, round at its ends. */
function gather(buffers: Buffers, scratch: LineScratch, colour: number, tested: boolean, dash: readonly [number, number] | null): void {
	const { width, height, depth } = buffers;
	const { ends } = scratch;
	const ax = ends[0]!;
	const ay = ends[1]!;
	const dx = ends[4]! - ax;
	const dy = ends[5]! - ay;
	const length = Math.sqrt(dx * dx + dy * dy);
	const half = ends[8]!;
	const reach = half + 0.5;
	/** u is the axis the segment runs along most, v the other. */
	const wide = Math.abs(dx) >= Math.abs(dy);
	const au = wide ? ax : ay;
	const av = wide ? ay : ax;
	const du = wide ? dx : dy;
	const dv = wide ? dy : dx;
	const stepU = wide ? 1 : width;
	const stepV = wide ? width : 1;
	const endU = wide ? width : height;
	const endV = wide ? height : width;
	const dirU = length > 1e-9 ? du / length : 1;
	const dirV = length > 1e-9 ? dv / length : 0;
	const slope = du === 0 ? 0 : dv / du;
	const spread = reach / Math.abs(dirU);
	const firstU = Math.max(0, Math.ceil(Math.min(au, au + du) - reach - 0.5));
	const lastU = Math.min(endU - 1, Math.floor(Math.max(au, au + du) + reach - 0.5));
	const low = Math.min(av, av + dv);
	const high = Math.max(av, av + dv);
	const wa = ends[2]!;
	const rise = length > 1e-9 ? (ends[6]! - wa) / length : 0;
	for (let u = firstU; u <= lastU; u++) {
		const pu = u + 0.5 - au;
		const on = Math.min(high, Math.max(low, av + pu * slope));
		const firstV = Math.max(0, Math.ceil(on - spread - 0.5));
		const lastV = Math.min(endV - 1, Math.floor(on + spread - 0.5));
		for (let v = firstV; v <= lastV; v++) {
			const pv = v + 0.5 - av;
			const along = Math.min(length, Math.max(0, pu * dirU + pv * dirV));
			/** From the pixel's centre to the nearest point of the segment. */
			const footU = along * dirU - pu;
			const footV = along * dirV - pv;
			const off = Math.sqrt(footU * footU + footV * footV);
			let cover = Math.min(off + half, 0.5) - Math.max(off - half, -0.5);
			if (!(cover > 0.004)) continue;
			const at = u * stepU + v * stepV;
			const w = wa + rise * along;
			if (tested && w * (1 + NEARER) < depth[at]!) {
				/** The surface seen here, carried on in its own plane to the foot; its slope taken on the side away from the line. */
				const here = depth[at]!;
				const backU = footU > 0 ? (u > 0 ? -stepU : 0) : u < endU - 1 ? stepU : 0;
				const backV = footV > 0 ? (v > 0 ? -stepV : 0) : v < endV - 1 ? stepV : 0;
				const fallU = here - depth[at + backU]!;
				const fallV = here - depth[at + backV]!;
				const there = here + fallU * Math.abs(footU) + fallV * Math.abs(footV) - SLACK * (Math.abs(fallU) + Math.abs(fallV));
				if (w * (1 + NEARER) < there) continue;
			}
			if (dash) cover *= stroke(ends, dash, along, length, w);
			const slot = buffers.touched[at]! - 1;
			if (slot < 0) {
				const n = scratch.count++;
				if (n === scratch.pixel.length) grow(scratch);
				scratch.pixel[n] = at;
				scratch.cover[n] = cover;
				scratch.depth[n] = w;
				scratch.colour[n] = colour;
				buffers.touched[at] = n + 1;
			} else if (cover > scratch.cover[slot]!) {
				scratch.cover[slot] = cover;
				scratch.depth[slot] = w;
				scratch.colour[slot] = colour;
			}
		}
	}
}

/** Share of a dashed line present about `along` px from its first end: over one pixel's length of the run. */
function stroke(ends: Float64Array, dash: readonly [number, number], along: number, length: number, w: number): number {
	const period = dash[0] + dash[1];
	const from = ends[3]! * ends[2]!;
	const gain = ends[7]! * ends[6]! - from;
	const run = length > 0 ? (from + (gain * along) / length) / w : ends[3]!;
	const pixel = length > 0 ? Math.abs(gain - run * (ends[6]! - ends[2]!)) / (length * w) : period;
	if (pixel * 2 > period) return dash[0] / period;
	const phase = run - period * Math.floor(run / period);
	const inside = phase < dash[0] ? Math.min(phase, dash[0] - phase) : -Math.min(phase - dash[0], period - phase);
	return Math.min(1, Math.max(0, 0.5 + inside / pixel));
}

function grow(scratch: LineScratch): void {
	const room = Math.max(4096, 2 * scratch.pixel.length);
	const pixel = new Int32Array(room);
	const cover = new Float32Array(room);
	const depth = new Float32Array(room);
	const colour = new Uint8Array(room);
	pixel.set(scratch.pixel);
	cover.set(scratch.cover);
	depth.set(scratch.depth);
	colour.set(scratch.colour);
	Object.assign(scratch, { pixel, cover, depth, colour });
}

/** Lays the gathered pixels on. A line without translucence hides what is drawn later behind it. */
function composite(buffers: Buffers, drawable: WideLines, scratch: LineScratch, tones: Tones): void {
	const { pixels, depth, touched } = buffers;
	const { bytes } = tones;
	const solid = drawable.opacity === 1 && drawable.depth === "tested";
	for (let n = 0; n < scratch.count; n++) {
		const at = scratch.pixel[n]!;
		const cover = scratch.cover[n]!;
		const opacity = cover * drawable.opacity;
		const tone = 4 * plain(scratch.colour[n]!);
		for (let c = 0, p = 4 * at; c < 3; c++, p++) {
			const under = pixels[p]!;
			pixels[p] = under + (bytes[tone + c]! - under) * opacity;
		}
		touched[at] = 0;
		if (solid && cover > 0.5 && scratch.depth[n]! > depth[at]!) depth[at] = scratch.depth[n]!;
	}
}
