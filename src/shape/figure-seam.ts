import { SEGMENTS, type SegmentSpec } from "../body/skeleton.ts";

/**
 * Rigid skins that pass into each other at the joints are shaded as one: where they cross in the erect
 * body both take the same normals, so that no change of light marks the joint.
 */
export interface Surface {
	/** m, in the segment's axes. */
	readonly position: ArrayLike<number>;
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

type Span = readonly [least: number, most: number];

/**
 * Blends `a` where it comes near to or inside `b`. The distance to `b` is that to the planes of the
 * triangles at its nearest vertex: exact enough on these convex, evenly meshed skins.
 */
function meet(a: Surface, b: Surface, faces: readonly number[][], shift: readonly number[], stature: number, out: Float32Array): void {
	const at = (v: ArrayLike<number>, i: number) => v[i] as number;
	const depth = DEPTH * stature;
	const far = 3 * depth;
	const box = [0, 1, 2].map((k) => {
		let [least, most] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
		for (let j = k; j < b.position.length; j += 3) {
			least = Math.min(least, at(b.position, j));
			most = Math.max(most, at(b.position, j));
		}
		return [least - far, most + far] as const;
	}) as unknown as readonly [Span, Span, Span];
	const within = (v: number, [least, most]: Span) => v >= least && v <= most;
	for (let i = 0; i < a.position.length; i += 3) {
		const x = at(a.position, i) + at(shift, 0);
		const y = at(a.position, i + 1) + at(shift, 1);
		const z = at(a.position, i + 2) + at(shift, 2);
		if (!within(x, box[0]) || !within(y, box[1]) || !within(z, box[2])) continue;
		let nearest = 0;
		let least = Number.POSITIVE_INFINITY;
		for (let j = 0; j < b.position.length; j += 3) {
			const dx = at(b.position, j) - x;
			const dy = at(b.position, j + 1) - y;
			const dz = at(b.position, j + 2) - z;
			const square = dx * dx + dy * dy + dz * dz;
			if (square < least) {
				least = square;
				nearest = j;
			}
		}
		if (least > far * far) continue;
		const planes = faces[nearest / 3] as number[];
		let outside = Number.NEGATIVE_INFINITY;
		for (let f = 0; f < planes.length; f += 3)
			outside = Math.max(
				outside,
				(x - at(b.position, nearest)) * at(planes, f) +
					(y - at(b.position, nearest + 1)) * at(planes, f + 1) +
					(z - at(b.position, nearest + 2)) * at(planes, f + 2),
			);
		const t = Math.min(1, Math.max(0, 0.5 - outside / (2 * depth)));
		const weight = t * t * (3 - 2 * t);
		for (let k = 0; k < 3; k++) out[i + k] = at(out, i + k) + weight * (at(b.normal, nearest + k) - at(a.normal, i + k));
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
			const shift = from.map((v, k) => v - (to[k] as number));
			meet(surfaces[i] as Surface, surfaces[j] as Surface, faces[j] as number[][], shift, stature, out[i] as Float32Array);
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
