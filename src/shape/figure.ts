import type { Pose } from "../body/pose.ts";
import { LEFT, SEGMENTS } from "../body/skeleton.ts";
import { deckTriad, placeOnDeck } from "../layout/habitat.ts";
import { add, scale } from "../vector/vec3.ts";
import type { Part, Triangles } from "./drawable.ts";
import { addLoft, normalsOf, type Skin } from "./figure-loft.ts";
import { BUILD } from "./figure-profile.ts";
import { blendedNormals } from "./figure-seam.ts";
import { COLOUR } from "./palette.ts";
import { directionToStage, type StageFrame, toStage } from "./stage-frame.ts";

/** How far the ink hull stands out from the skin, m: its width as a silhouette line. */
const INK = 0.0035;

/** So near to one's own eyes that an ink edge of that width would be a bar. */
const NEAR: ReadonlySet<string> = new Set(["thorax", "abdomen", "collar", "upperArm"]);

/** The crew figure as rigid skinned segments, each with an inverted hull that draws its ink edge. */
export interface Figure {
	readonly stature: number;
	/** Skins first, then hulls; a segment's skin and hull share one matrix. */
	readonly parts: readonly Part[];
	/** Of `parts`: what is left out of the view through the person's own eyes: head, neck, and the ink of the trunk. */
	readonly hiddenInFirstPerson: readonly Part[];
	/** One matrix a segment, in the order of SEGMENTS. */
	readonly matrices: readonly Float32Array[];
}

export function createFigure(stature: number): Figure {
	const matrices = SEGMENTS.map(() => new Float32Array(16));
	const skins: Part[] = [];
	const hulls: Part[] = [];
	const hidden: Part[] = [];
	const built = SEGMENTS.map(({ name, side }) => {
		const skin: Skin = { position: [], colour: [], index: [], inked: [] };
		for (const loft of BUILD[name]) addLoft(skin, loft, stature, side === LEFT);
		const position = new Float32Array(skin.position);
		return { ...skin, position, normal: normalsOf(position, skin.index) };
	});
	const shading = blendedNormals(built, stature);
	SEGMENTS.forEach(({ name, side }, i) => {
		const skin = built[i] as (typeof built)[number];
		const label = side === null ? name : `${side === LEFT ? "left" : "right"}-${name}`;
		const index = new Uint32Array(skin.index);
		const common = { kind: "triangles", index, opacity: 1, decal: false } as const;
		const body: Triangles = {
			...common,
			name: `crew-${label}`,
			position: skin.position,
			normal: shading[i] as Float32Array,
			colour: new Uint8Array(skin.colour),
			side: "front",
			lit: true,
		};
		const hull: Triangles = {
			...common,
			name: `crew-${label}-ink`,
			normal: skin.normal,
			position: body.position.map((v, k) => v + INK * (skin.inked[Math.floor(k / 3)] as number) * (skin.normal[k] as number)),
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
		else if (NEAR.has(name)) hidden.push(pair[1] as Part);
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

/** Writes the stance-to-stage transform of a person at stage point (x, y, z), upright there, facing heading χ (rad). */
export function stanceToStage(x: number, y: number, z: number, facing: number, out: Float32Array): void {
	const c = Math.cos(facing);
	const s = Math.sin(facing);
	out.set([c, 0, s, 0, 0, 1, 0, 0, -s, 0, c, 0, x, y, z, 1]);
}

/** The same for a person on the frame's deck at floor angle `angle` (rad) and `axial` (m): upright where they stand. */
export function standOnDeck(frame: StageFrame, angle: number, axial: number, facing: number, out: Float32Array): void {
	const { prograde, up, axial: along } = deckTriad(frame.deck, angle);
	const c = Math.cos(facing);
	const s = Math.sin(facing);
	out.fill(0);
	directionToStage(frame, add(scale(prograde, c), scale(along, s)), out, 0);
	directionToStage(frame, up, out, 4);
	directionToStage(frame, add(scale(prograde, -s), scale(along, c)), out, 8);
	toStage(frame, placeOnDeck(frame.deck, angle, axial, 0), out, 12);
	out[15] = 1;
}

/** Writes the stance coordinates of a stage point, the inverse of a stance-to-stage transform. */
export function stageToStance(m: ArrayLike<number>, x: number, y: number, z: number, out: Float64Array): void {
	const dx = x - (m[12] as number);
	const dy = y - (m[13] as number);
	const dz = z - (m[14] as number);
	for (let c = 0; c < 3; c++) out[c] = (m[4 * c] as number) * dx + (m[4 * c + 1] as number) * dy + (m[4 * c + 2] as number) * dz;
}
