import { SEGMENTS, type SegmentSpec } from "../body/skeleton.ts";

/**
 * Rigid skins that pass into each other at the joints are shaded as one: where they cross in the erect
 * body both take the same normals, so that no change of light marks the joint.
 */
export interface Surface {
	/** m, in the segment's axes. */
	readonly position: Float32Array;
	readonly index: ArrayLike<number>;
	readonly normal: Float32Array;
}

/** Neighbours whose skins meet without a seam. */
const MEETING: readonly (readonly [string, string])[] = [
	["pelvis", "abdomen"],
	["abdomen", "thorax"],
	["thorax", "collar"],
	["collar", "upperArm"],
	["thorax", "upperArm"],
	["upperArm", "forearm"],
	["pelvis", "thigh"],
	["thigh", "shank"],
	["foot", "toes"],
];
/** How deep (× stature) the normals run into each other. */
const DEPTH = 0.008;

/** The joint of a segment in the erect body, m. */
function erectOrigin(segment: number, stature: number): [number, number, number] {
	const out: [number, number, number] = [0, 0, 0];
	for (let i = segment; i >= 0; i = (SEGMENTS[i] as SegmentSpec).parent)
		for (let k = 0; k < 3; k++) out[k as 0] += ((SEGMENTS[i] as SegmentSpec).offset[k] as number) * stature;
	return out;
}

/** Unit normals of the triangles at each vertex, one flat list a vertex. */
function facesAt({ position, index }: Surface): number[][] {
	const out: number[][] = Array.from({ length: position.length / 3 }, () => []);
	const at = (i: number, k: number) => position[3 * i + k] as number;
	for (let t = 0; t < index.length; t += 3) {
		const [a, b, c] = [index[t] as number, index[t + 1] as number, index[t + 2] as number];
		const [ux, uy, uz] = [at(b, 0) - at(a, 0), at(b, 1) - at(a, 1), at(b, 2) - at(a, 2)];
		const [vx, vy, vz] = [at(c, 0) - at(a, 0), at(c, 1) - at(a, 1), at(c, 2) - at(a, 2)];
		const [nx, ny, nz] = [uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx];
		const l = Math.hypot(nx, ny, nz);
		if (l > 0) for (const i of [a, b, c]) (out[i] as number[]).push(nx / l, ny / l, nz / l);
	}
	return out;
}

/** The vertices of `b` near enough to any of `a` to matter, as offsets into its position. */
function candidates(a: Float32Array, b: Float32Array, shift: readonly [number, number, number], far: number): Uint32Array {
	const least = [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
	const most = [Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY, Number.NEGATIVE_INFINITY];
	for (let i = 0; i < a.length; i++) {
		const v = (a[i] as number) + shift[(i % 3) as 0 | 1 | 2];
		least[i % 3] = Math.min(least[i % 3] as number, v - far);
		most[i % 3] = Math.max(most[i % 3] as number, v + far);
	}
	const out: number[] = [];
	for (let j = 0; j < b.length; j += 3)
		if ([0, 1, 2].every((k) => (b[j + k] as number) >= (least[k] as number) && (b[j + k] as number) <= (most[k] as number))) out.push(j);
	return new Uint32Array(out);
}

/**
 * Blends `a` where it comes near to or inside `b`. The distance to `b` is that to the planes of the
 * triangles at its nearest vertex: exact enough on these convex, evenly meshed skins.
 */
function meet(
	a: Surface,
	b: Surface,
	faces: readonly number[][],
	shift: readonly [number, number, number],
	depth: number,
	out: Float32Array,
): void {
	const [p, q] = [a.position, b.position];
	const far = 3 * depth;
	const near = candidates(p, q, shift, far);
	for (let i = 0; i < p.length; i += 3) {
		const x = (p[i] as number) + shift[0];
		const y = (p[i + 1] as number) + shift[1];
		const z = (p[i + 2] as number) + shift[2];
		let nearest = -1;
		let least = far * far;
		for (const j of near) {
			const dx = (q[j] as number) - x;
			const dy = (q[j + 1] as number) - y;
			const dz = (q[j + 2] as number) - z;
			const square = dx * dx + dy * dy + dz * dz;
			if (square < least) {
				least = square;
				nearest = j;
			}
		}
		if (nearest < 0) continue;
		const planes = faces[nearest / 3] as number[];
		const [dx, dy, dz] = [x - (q[nearest] as number), y - (q[nearest + 1] as number), z - (q[nearest + 2] as number)];
		let outside = Number.NEGATIVE_INFINITY;
		for (let f = 0; f < planes.length; f += 3)
			outside = Math.max(outside, dx * (planes[f] as number) + dy * (planes[f + 1] as number) + dz * (planes[f + 2] as number));
		const t = Math.min(1, Math.max(0, 0.5 - outside / (2 * depth)));
		const weight = t * t * (3 - 2 * t);
		for (let k = 0; k < 3; k++)
			out[i + k] = (out[i + k] as number) + weight * ((b.normal[nearest + k] as number) - (a.normal[i + k] as number));
	}
}

/** Shading normals of one surface a segment, in the order of SEGMENTS. A normal that blends to nothing stays the skin's own. */
export function blendedNormals(surfaces: readonly Surface[], stature: number): Float32Array[] {
	const out = surfaces.map((s) => s.normal.slice());
	const faces = surfaces.map(facesAt);
	SEGMENTS.forEach((p, i) => {
		SEGMENTS.forEach((q, j) => {
			const neighbours = MEETING.some(([a, b]) => (p.name === a && q.name === b) || (p.name === b && q.name === a));
			if (!neighbours || (p.side !== null && q.side !== null && p.side !== q.side)) return;
			const [from, to] = [erectOrigin(i, stature), erectOrigin(j, stature)];
			const shift = [from[0] - to[0], from[1] - to[1], from[2] - to[2]] as const;
			meet(surfaces[i] as Surface, surfaces[j] as Surface, faces[j] as number[][], shift, DEPTH * stature, out[i] as Float32Array);
		});
	});
	out.forEach((normal, i) => {
		const own = (surfaces[i] as Surface).normal;
		for (let v = 0; v < normal.length; v += 3) {
			const l = Math.hypot(normal[v] as number, normal[v + 1] as number, normal[v + 2] as number);
			for (let k = 0; k < 3; k++) normal[v + k] = l > 0.05 ? (normal[v + k] as number) / l : (own[v + k] as number);
		}
	});
	return out;
}
