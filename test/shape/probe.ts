import { readFileSync } from "node:fs";
import type { Habitat } from "../../src/layout/habitat.ts";
import { parseLayout } from "../../src/layout/parse.ts";
import { resolveHabitat } from "../../src/layout/resolve.ts";
import type { Drawable, Triangles, WideLines } from "../../src/shape/drawable.ts";
import { fromStage, type StageFrame } from "../../src/shape/stage-frame.ts";
import type { RingVec } from "../../src/vector/vec3.ts";

export type Point = readonly [number, number, number];

/** A shipped layout as the mechanics reads it. */
export function shipped(name: string): Habitat {
	const parsed = parseLayout(readFileSync(`assets/layout/${name}.layout.json`, "utf8"));
	if (!parsed.ok) throw new Error(`${name}: ${JSON.stringify(parsed.problems)}`);
	return resolveHabitat(parsed.layout);
}

export const meshes = (list: readonly Drawable[]): Triangles[] => list.filter((d) => d.kind === "triangles");
export const lines = (list: readonly Drawable[]): WideLines[] => list.filter((d) => d.kind === "lines");

export function named<T extends { readonly name: string }>(list: readonly T[], name: string): T {
	const found = list.find((d) => d.name === name);
	if (!found) throw new Error(`no drawable ${name} among ${list.map((d) => d.name).join(", ")}`);
	return found;
}

const triple = (a: Float32Array, i: number): Point => [a[3 * i] as number, a[3 * i + 1] as number, a[3 * i + 2] as number];
export const vertexCount = (m: Triangles): number => m.position.length / 3;
export const positionAt = (m: Triangles, i: number): Point => triple(m.position, i);
export const normalAt = (m: Triangles, i: number): Point => triple(m.normal, i);
export const ringAt = (frame: StageFrame, m: Triangles, i: number): RingVec => fromStage(frame, ...positionAt(m, i));

export const minus = (a: Point, b: Point): Point => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];
export const plus = (a: Point, k: number, b: Point): Point => [a[0] + k * b[0], a[1] + k * b[1], a[2] + k * b[2]];
export const dotted = (a: Point, b: Point): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
export const crossed = (a: Point, b: Point): Point => [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
export const size = (a: Point): number => Math.hypot(...a);

/** Corner positions of each triangle. */
export function* triangles(m: Triangles): Generator<readonly [Point, Point, Point, number, number, number]> {
	for (let t = 0; t < m.index.length; t += 3) {
		const [a, b, c] = [m.index[t] as number, m.index[t + 1] as number, m.index[t + 2] as number];
		yield [positionAt(m, a), positionAt(m, b), positionAt(m, c), a, b, c];
	}
}

export function area(m: Triangles): number {
	let sum = 0;
	for (const [a, b, c] of triangles(m)) sum += size(crossed(minus(b, a), minus(c, a))) / 2;
	return sum;
}

/** Distance along `direction` from `from` to the nearest triangle of either side, at most `reach`; null where none (Möller, Trumbore 1997). */
export function cast(
	list: readonly Triangles[],
	from: Point,
	direction: Point,
	reach: number,
): { readonly distance: number; readonly name: string } | null {
	let best: { distance: number; name: string } | null = null;
	const [dx, dy, dz] = direction;
	for (const m of list) {
		const p = m.position;
		for (let t = 0; t < m.index.length; t += 3) {
			const a = 3 * (m.index[t] as number);
			const b = 3 * (m.index[t + 1] as number);
			const c = 3 * (m.index[t + 2] as number);
			const ax = p[a] as number;
			const ay = p[a + 1] as number;
			const az = p[a + 2] as number;
			const ux = (p[b] as number) - ax;
			const uy = (p[b + 1] as number) - ay;
			const uz = (p[b + 2] as number) - az;
			const vx = (p[c] as number) - ax;
			const vy = (p[c + 1] as number) - ay;
			const vz = (p[c + 2] as number) - az;
			const hx = dy * vz - dz * vy;
			const hy = dz * vx - dx * vz;
			const hz = dx * vy - dy * vx;
			const det = ux * hx + uy * hy + uz * hz;
			if (Math.abs(det) < 1e-14) continue;
			const sx = from[0] - ax;
			const sy = from[1] - ay;
			const sz = from[2] - az;
			const u = (sx * hx + sy * hy + sz * hz) / det;
			if (u < 0 || u > 1) continue;
			const qx = sy * uz - sz * uy;
			const qy = sz * ux - sx * uz;
			const qz = sx * uy - sy * ux;
			const v = (dx * qx + dy * qy + dz * qz) / det;
			if (v < 0 || u + v > 1) continue;
			const distance = (vx * qx + vy * qy + vz * qz) / det;
			if (distance > 1e-6 && distance <= (best?.distance ?? reach)) best = { distance, name: m.name };
		}
	}
	return best;
}
