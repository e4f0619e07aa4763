import { angleNear, floorAlong } from "../layout/habitat.ts";
import { clip, type FlatMesh } from "./bay-cut.ts";
import { type Extent, middleOf } from "./bay-extent.ts";
import { faceLine } from "./bay-line.ts";
import type { Opening } from "./bay-opening.ts";
import type { Surface } from "./bay-surface.ts";
import type { LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR, type ColourIndex } from "./palette.ts";

/** Paint lies so much over its face, under the lines, m. */
const COAT = 0.001;

/** Bends a flat mesh onto its face, `lift` m into the bay. */
export function bend(mesh: MeshBuilder, surface: Surface, flat: FlatMesh, lift: number, colour: ColourIndex): void {
	const p = [0, 0, 0];
	const b = new Array<number>(9).fill(0);
	for (const polygon of flat) {
		const at: number[] = [];
		for (let i = 0; i < polygon.length; i += 2) {
			const u = polygon[i] as number;
			const v = polygon[i + 1] as number;
			surface.put(u, v, lift, p);
			surface.basis(u, v, b);
			at.push(mesh.vertex(p[0] as number, p[1] as number, p[2] as number, b[6] as number, b[7] as number, b[8] as number, colour));
		}
		for (let i = 2; i < at.length; i++) mesh.triangle(at[0] as number, at[i - 1] as number, at[i] as number);
	}
}

/** Ambient shade gathers at the foot of the walls: nested bands, narrowest first, of widths up to SHADE_WIDTH m, SHADE dark where all lie. */
const SHADE_WIDTH = 0.5;
const SHADE = 0.14;
/** So many triangles at most, and so many bands. */
const SHADE_TRIANGLES = 4000;
const SHADE_BANDS = 8;

/** The shade on a floor along its walls; returns the opacity of one band. */
export function shade(mesh: MeshBuilder, floor: Surface, flat: FlatMesh, extent: Extent): number {
	const bands = Math.max(2, Math.min(SHADE_BANDS, Math.floor(SHADE_TRIANGLES / (4 * floor.cuts.length + 4))));
	const [u0, v0] = floor.from;
	const [u1, v1] = floor.to;
	const sides = [
		[u0, v0, u1, v0 + SHADE_WIDTH],
		[u0, v1 - SHADE_WIDTH, u1, v1],
		...(extent.sideLow ? [[u0, v0, u0 + SHADE_WIDTH, v1]] : []),
		...(extent.sideHigh ? [[u1 - SHADE_WIDTH, v0, u1, v1]] : []),
	] as [number, number, number, number][];
	for (const [i, [west, south, east, north]] of sides.entries()) {
		let band = clip(flat, west, south, east, north);
		for (let k = bands; k >= 1; k--) {
			const cut = SHADE_WIDTH * (1 - (k / bands) ** 1.4);
			band = clip(band, west + (i === 3 ? cut : 0), south + (i === 1 ? cut : 0), east - (i === 2 ? cut : 0), north - (i === 0 ? cut : 0));
			bend(mesh, floor, band, COAT, COLOUR.shadow);
		}
	}
	return SHADE / bands;
}

export const WALKWAY_OPACITY = 0.26;

/** The walkways of a deck: a paler band, and its edge lines. */
export function walkways(
	mesh: MeshBuilder,
	lines: LineBuilder,
	floor: Surface,
	flat: FlatMesh,
	openings: readonly Opening[],
	extent: Extent,
): void {
	const { deck } = extent;
	for (const w of deck.walkways) {
		const middle = (w.from + w.to) / 2;
		const turn = angleNear(middle, middleOf(extent)) - middle;
		const u0 = Math.max(floor.from[0], floorAlong(deck, w.from + turn));
		const u1 = Math.min(floor.to[0], floorAlong(deck, w.to + turn));
		bend(mesh, floor, clip(flat, u0, w.axialFrom, u1, w.axialTo), COAT, COLOUR.halo);
		for (const v of [w.axialFrom, w.axialTo]) faceLine(lines, floor, openings, 1, v, COLOUR.muted, [u0, u1]);
		for (const u of [u0, u1])
			if (u > floor.from[0] && u < floor.to[0]) faceLine(lines, floor, openings, 0, u, COLOUR.muted, [w.axialFrom, w.axialTo]);
	}
}

/** Height of the skirting along a wall's foot, m. */
export const SKIRTING = 0.1;

export function skirting(mesh: MeshBuilder, wall: Surface, flat: FlatMesh): void {
	bend(mesh, wall, clip(flat, wall.from[0], 0, wall.to[0], SKIRTING), COAT, COLOUR.line);
}

/** Thickness of a floor where its cut edge is seen from outside the bay, m. */
const SLAB = 0.12;

/** The cut edge of a floor, facing outward along its four sides. */
export function slab(mesh: MeshBuilder, floor: Surface): void {
	const [u0, v0] = floor.from;
	const [u1, v1] = floor.to;
	const us = [u0, ...floor.cuts, u1];
	const p = [0, 0, 0];
	const b = new Array<number>(9).fill(0);
	/** Along `points`, facing `sign` times direction `axis` (0 along u, 1 along v). */
	const side = (points: readonly (readonly [number, number])[], axis: 0 | 1, sign: 1 | -1): void => {
		let before: readonly [number, number] | null = null;
		for (const [u, v] of points) {
			floor.basis(u, v, b);
			const n = [0, 1, 2].map((x) => sign * (b[3 * axis + x] as number)) as [number, number, number];
			const pair = [0, -SLAB].map((lift) => {
				floor.put(u, v, lift, p);
				return mesh.vertex(p[0] as number, p[1] as number, p[2] as number, ...n, COLOUR.windowFrame);
			}) as [number, number];
			if (before) mesh.quad(before[0], before[1], pair[1], pair[0]);
			before = pair;
		}
	};
	side(
		us.map((u) => [u, v0] as const),
		1,
		-1,
	);
	side(
		us.map((u) => [u, v1] as const),
		1,
		1,
	);
	side(
		[
			[u0, v0],
			[u0, v1],
		],
		0,
		-1,
	);
	side(
		[
			[u1, v0],
			[u1, v1],
		],
		0,
		1,
	);
}
