import type { Triangles } from "../shape/drawable.ts";
import { lambert } from "../shape/light.ts";
import type { Corners } from "./fill.ts";
import { level } from "./tone.ts";
import type { View } from "./view.ts";

/** Room for the vertices of one drawable; grows to the largest seen. */
export interface VertexScratch {
	/** Camera coordinates, 3 a vertex. */
	camera: Float64Array;
	/** x, y (px) and 1/z, 3 a vertex; meaningless before the near plane. */
	screen: Float64Array;
	/** A bit for each plane of the view that the vertex lies outside of. */
	outside: Uint8Array;
	/** How each triangle is seen: UNSEEN, FRONT or BACK. */
	seen: Uint8Array;
	/** Levels of a part that moves, and of what is not lit. */
	front: Float32Array;
	back: Float32Array;
	unlit: Float32Array;
	readonly corners: Corners;
}

export const createVertexScratch = (): VertexScratch => ({
	camera: new Float64Array(0),
	screen: new Float64Array(0),
	outside: new Uint8Array(0),
	seen: new Uint8Array(0),
	front: new Float32Array(0),
	back: new Float32Array(0),
	unlit: new Float32Array(0),
	corners: new Float64Array(16),
});

export const NEAR = 1;

export const UNSEEN = 0;
export const FRONT = 1;
const BACK = 2;

/** Writes for the first `end` / 3 triangles whether and from which side they are seen. Throws RangeError on one that is not finite. */
export function look(drawable: Triangles, end: number, mirrored: boolean, scratch: VertexScratch): void {
	const { index, side } = drawable;
	const { screen, outside, camera, seen } = scratch;
	for (let t = 0, k = 0; k < end; t++, k += 3) {
		const a = index[k]!;
		const b = index[k + 1]!;
		const c = index[k + 2]!;
		seen[t] = UNSEEN;
		if ((outside[a]! & outside[b]! & outside[c]!) !== 0) continue;
		const near = ((outside[a]! | outside[b]! | outside[c]!) & NEAR) !== 0;
		const turn = near ? turnBehind(camera, 3 * a, 3 * b, 3 * c) : turnOnScreen(screen, 3 * a, 3 * b, 3 * c);
		if (turn === LOST) throw new RangeError(`triangle ${t} of "${drawable.name}" has a corner that is not finite`);
		const front = turn < 0 !== mirrored;
		if (turn !== 0 && (side === "both" || front === (side === "front"))) seen[t] = front ? FRONT : BACK;
	}
}

/** A turn of what is not finite. */
const LOST = 2;
const signOf = (x: number): number => (x < 0 ? -1 : x > 0 ? 1 : x === 0 ? 0 : LOST);

/** −1 where the vertices at a, b, c run counter-clockwise as seen, 1 clockwise, 0 without area, else LOST. */
function turnOnScreen(screen: Float64Array, a: number, b: number, c: number): number {
	const x = screen[a]!;
	const y = screen[a + 1]!;
	return signOf((screen[b]! - x) * (screen[c + 1]! - y) - (screen[b + 1]! - y) * (screen[c]! - x));
}

/** The same of a triangle that reaches behind the camera: the sign of −a · (b × c). */
function turnBehind(p: Float64Array, a: number, b: number, c: number): number {
	const bx = p[b]!;
	const by = p[b + 1]!;
	const bz = p[b + 2]!;
	const cx = p[c]!;
	const cy = p[c + 1]!;
	const cz = p[c + 2]!;
	return signOf(-(p[a]! * (by * cz - bz * cy) + p[a + 1]! * (bz * cx - bx * cz) + p[a + 2]! * (bx * cy - by * cx)));
}

/** Writes vertex v as a corner; returns the next place. */
export function corner(corners: Corners, at: number, screen: Float64Array, levels: Float32Array, v: number): number {
	corners[at] = screen[3 * v]!;
	corners[at + 1] = screen[3 * v + 1]!;
	corners[at + 2] = screen[3 * v + 2]!;
	corners[at + 3] = levels[v]!;
	return at + 4;
}

/** Writes where the side a–b meets the near plane: always reckoned from the end beyond it, so that neighbours agree. */
export function cut(corners: Corners, at: number, view: View, camera: Float64Array, levels: Float32Array, a: number, b: number): number {
	const far = camera[3 * a + 2]! > camera[3 * b + 2]! ? a : b;
	const close = far === a ? b : a;
	const x = camera[3 * far]!;
	const y = camera[3 * far + 1]!;
	const z = camera[3 * far + 2]!;
	const t = (z - view.near) / (z - camera[3 * close + 2]!);
	const f = view.focal / view.near;
	corners[at] = view.width / 2 + f * (x + t * (camera[3 * close]! - x));
	corners[at + 1] = view.height / 2 - f * (y + t * (camera[3 * close + 1]! - y));
	corners[at + 2] = 1 / view.near;
	corners[at + 3] = levels[far]! + t * (levels[close]! - levels[far]!);
	return at + 4;
}

/** Fills the scratch for all vertices; returns whether any can be seen. */
export function transform(view: View, m: Float64Array, drawable: Triangles, scratch: VertexScratch): boolean {
	const { position } = drawable;
	const count = position.length / 3;
	if (scratch.outside.length < count) {
		const room = 2 ** Math.ceil(Math.log2(count));
		scratch.camera = new Float64Array(3 * room);
		scratch.screen = new Float64Array(3 * room);
		scratch.outside = new Uint8Array(room);
		scratch.unlit = new Float32Array(room).fill(level(1));
	}
	if (scratch.seen.length < drawable.index.length / 3) scratch.seen = new Uint8Array(2 ** Math.ceil(Math.log2(drawable.index.length / 3)));
	const { camera, screen, outside } = scratch;
	const { focal, near } = view;
	const halfX = view.width / 2;
	const halfY = view.height / 2;
	const m0 = m[0]!;
	const m1 = m[1]!;
	const m2 = m[2]!;
	const m3 = m[3]!;
	const m4 = m[4]!;
	const m5 = m[5]!;
	const m6 = m[6]!;
	const m7 = m[7]!;
	const m8 = m[8]!;
	const m9 = m[9]!;
	const m10 = m[10]!;
	const m11 = m[11]!;
	let all = 31;
	for (let v = 0, i = 0; v < count; v++, i += 3) {
		const px = position[i]!;
		const py = position[i + 1]!;
		const pz = position[i + 2]!;
		const x = m0 * px + m1 * py + m2 * pz + m3;
		const y = m4 * px + m5 * py + m6 * pz + m7;
		const z = m8 * px + m9 * py + m10 * pz + m11;
		camera[i] = x;
		camera[i + 1] = y;
		camera[i + 2] = z;
		const fx = focal * x;
		const fy = focal * y;
		const w = 1 / z;
		screen[i] = halfX + fx * w;
		screen[i + 1] = halfY - fy * w;
		screen[i + 2] = w;
		const bx = halfX * z;
		const by = halfY * z;
		const bits = (z < near ? NEAR : 0) | (fx < -bx ? 2 : 0) | (fx > bx ? 4 : 0) | (fy < -by ? 8 : 0) | (fy > by ? 16 : 0);
		outside[v] = bits;
		all &= bits;
	}
	return all === 0 && count > 0;
}

/** Whether a column-major 4 × 4 turns right hands into left ones. */
export function mirrors(m: Float32Array): boolean {
	const x = m[5]! * m[10]! - m[6]! * m[9]!;
	const y = m[6]! * m[8]! - m[4]! * m[10]!;
	const z = m[4]! * m[9]! - m[5]! * m[8]!;
	return m[0]! * x + m[1]! * y + m[2]! * z < 0;
}

/** Writes the levels of a part as its matrix has it turned: normals go by the inverse transpose. */
export function lighten(drawable: Triangles, m: Float32Array, mirrored: boolean, scratch: VertexScratch): void {
	const a = m[0]!;
	const b = m[1]!;
	const c = m[2]!;
	const d = m[4]!;
	const e = m[5]!;
	const f = m[6]!;
	const g = m[8]!;
	const h = m[9]!;
	const i = m[10]!;
	const { normal, side } = drawable;
	const count = normal.length / 3;
	if (scratch.front.length < count) {
		const room = 2 ** Math.ceil(Math.log2(count));
		scratch.front = new Float32Array(room);
		scratch.back = new Float32Array(room);
	}
	const { front, back } = scratch;
	const sign = mirrored ? -1 : 1;
	for (let v = 0, k = 0; v < count; v++, k += 3) {
		const x = normal[k]!;
		const y = normal[k + 1]!;
		const z = normal[k + 2]!;
		const nx = x * (e * i - f * h) + y * (h * c - i * b) + z * (b * f - c * e);
		const ny = x * (f * g - d * i) + y * (i * a - g * c) + z * (c * d - a * f);
		const nz = x * (d * h - e * g) + y * (g * b - h * a) + z * (a * e - b * d);
		const size = sign * Math.sqrt(nx * nx + ny * ny + nz * nz);
		const scale = size === 0 ? 0 : 1 / size;
		if (side !== "back") front[v] = level(lambert(scale * nx, scale * ny, scale * nz));
		if (side !== "front") back[v] = level(lambert(-scale * nx, -scale * ny, -scale * nz));
	}
}
