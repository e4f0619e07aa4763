import type { Pose } from "../body/pose.ts";
import { LEFT, SEGMENTS, type SegmentSpec } from "../body/skeleton.ts";
import type { Part, Triangles } from "./drawable.ts";
import { addLoft, normalsOf, type Skin } from "./figure-loft.ts";
import { BUILD } from "./figure-profile.ts";
import { COLOUR } from "./palette.ts";

/** How far the ink hull stands out from the skin, m: its width as a silhouette line. */
const INK = 0.0035;

/** The crew figure as rigid skinned segments, each with an inverted hull that draws its ink edge. */
export interface Figure {
	readonly stature: number;
	/** Skins first, then hulls; a segment's skin and hull share one matrix. */
	readonly parts: readonly Part[];
	/** Of `parts`: what the person does not see of themselves through their own eyes. */
	readonly hiddenInFirstPerson: readonly Part[];
	/** One matrix a segment, in the order of SEGMENTS. */
	readonly matrices: readonly Float32Array[];
}

/** Neighbours whose skins meet without a seam, and how deep (× stature) their shading runs into each other. */
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
const DEPTH = 0.008;

/** The joint of a segment in the erect body, m, by the figure's stature. */
function erectOrigin(segment: number, stature: number): [number, number, number] {
	const out: [number, number, number] = [0, 0, 0];
	for (let i = segment; i >= 0; i = (SEGMENTS[i] as SegmentSpec).parent)
		for (let k = 0; k < 3; k++) out[k as 0] += ((SEGMENTS[i] as SegmentSpec).offset[k] as number) * stature;
	return out;
}

interface Surface {
	readonly position: ArrayLike<number>;
	readonly normal: Float32Array;
	readonly origin: readonly [number, number, number];
}

/**
 * Normals of `a` turned towards those of the surface `b` it passes into: half way where they cross, wholly
 * inside it. Both sides do the same, so the shading has no seam though the skins are separate.
 */
function turnTowards(a: Surface, b: Surface, depth: number, out: Float32Array): void {
	const shift = a.origin.map((v, k) => v - (b.origin[k] as number));
	const at = (v: ArrayLike<number>, i: number, k: number) => v[i + k] as number;
	for (let i = 0; i < a.position.length; i += 3) {
		const p = [0, 1, 2].map((k) => at(a.position, i, k) + (shift[k] as number));
		let nearest = 0;
		let least = Number.POSITIVE_INFINITY;
		for (let j = 0; j < b.position.length; j += 3) {
			const dx = at(b.position, j, 0) - (p[0] as number);
			const dy = at(b.position, j, 1) - (p[1] as number);
			const dz = at(b.position, j, 2) - (p[2] as number);
			const square = dx * dx + dy * dy + dz * dz;
			if (square < least) {
				least = square;
				nearest = j;
			}
		}
		if (least > 9 * depth * depth) continue;
		let outside = 0;
		for (let k = 0; k < 3; k++) outside += ((p[k] as number) - at(b.position, nearest, k)) * at(b.normal, nearest, k);
		const t = Math.min(1, Math.max(0, 0.5 - outside / (2 * depth)));
		const weight = t * t * (3 - 2 * t);
		for (let k = 0; k < 3; k++) out[i + k] = at(out, i, k) + weight * (at(b.normal, nearest, k) - at(a.normal, i, k));
	}
}

/** Shading normals of all skins, the meeting ones blended; a normal that blends to nothing stays its own. */
function shadingNormals(surfaces: readonly Surface[], stature: number): Float32Array[] {
	const out = surfaces.map((s) => s.normal.slice());
	SEGMENTS.forEach((p, i) => {
		SEGMENTS.forEach((q, j) => {
			const meet = MEETING.some(([a, b]) => (p.name === a && q.name === b) || (p.name === b && q.name === a));
			if (!meet || (p.side !== null && q.side !== null && p.side !== q.side)) return;
			turnTowards(surfaces[i] as Surface, surfaces[j] as Surface, DEPTH * stature, out[i] as Float32Array);
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

export function createFigure(stature: number): Figure {
	const matrices = SEGMENTS.map(() => new Float32Array(16));
	const skins: Part[] = [];
	const hulls: Part[] = [];
	const hidden: Part[] = [];
	const built = SEGMENTS.map(({ name, side }, i) => {
		const skin: Skin = { position: [], colour: [], index: [] };
		for (const loft of BUILD[name]) addLoft(skin, loft, stature, side === LEFT);
		return { skin, position: skin.position, normal: normalsOf(skin.position, skin.index), origin: erectOrigin(i, stature) };
	});
	const shading = shadingNormals(built, stature);
	SEGMENTS.forEach(({ name, side }, i) => {
		const { skin, normal } = built[i] as (typeof built)[number];
		const label = side === null ? name : `${side === LEFT ? "left" : "right"}-${name}`;
		const index = new Uint32Array(skin.index);
		const common = { kind: "triangles", index, opacity: 1, decal: false } as const;
		const body: Triangles = {
			...common,
			name: `crew-${label}`,
			position: new Float32Array(skin.position),
			normal: shading[i] as Float32Array,
			colour: new Uint8Array(skin.colour),
			side: "front",
			lit: true,
		};
		const hull: Triangles = {
			...common,
			name: `crew-${label}-ink`,
			normal,
			position: body.position.map((v, k) => v + INK * (normal[k] as number)),
			colour: new Uint8Array(skin.colour.length).fill(COLOUR.ink),
			side: "back",
			lit: false,
		};
		const matrix = matrices[i] as Float32Array;
		const pair: Part[] = [
			{ drawable: body, matrix },
			{ drawable: hull, matrix },
		];
		skins.push(pair[0] as Part);
		hulls.push(pair[1] as Part);
		if (name === "head" || name === "neck") hidden.push(...pair);
	});
	return { stature, parts: [...skins, ...hulls], hiddenInFirstPerson: hidden, matrices };
}

/** Moves every part to the pose; `stanceToStage` is a rigid column-major 4 × 4. */
export function updateFigure(figure: Figure, pose: Pose, stanceToStage: ArrayLike<number>): void {
	if (pose.stature !== figure.stature) throw new RangeError(`a figure of ${figure.stature} m cannot take a pose of ${pose.stature} m`);
	const { world } = pose;
	for (let i = 0; i < figure.matrices.length; i++) {
		const out = figure.matrices[i] as Float32Array;
		for (let c = 0; c < 4; c++) {
			const at = 16 * i + 4 * c;
			for (let r = 0; r < 4; r++) {
				let sum = 0;
				for (let k = 0; k < 4; k++) sum += (stanceToStage[4 * k + r] as number) * (world[at + k] as number);
				out[4 * c + r] = sum;
			}
		}
	}
}

/** Writes the stance-to-stage transform of a person at stage point (x, y, z) facing heading χ (rad). */
export function stanceToStage(x: number, y: number, z: number, facing: number, out: Float32Array): void {
	const c = Math.cos(facing);
	const s = Math.sin(facing);
	out.fill(0);
	out[0] = c;
	out[2] = s;
	out[5] = 1;
	out[8] = -s;
	out[10] = c;
	out[12] = x;
	out[13] = y;
	out[14] = z;
	out[15] = 1;
}
