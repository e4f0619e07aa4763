import type { Drop } from "../activity/drop.ts";
import { ring } from "../vector/vec3.ts";
import type { Part } from "./drawable.ts";
import { LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR, type ColourIndex } from "./palette.ts";
import { part } from "./part.ts";
import { type StageFrame, toStage } from "./stage-frame.ts";

/** A path as drawn: a fine line and a dot each 0.1 s, both shown as far as the time given. */
export interface Trail {
	readonly parts: readonly Part[];
	/** Shows the path up to t, s. */
	show(t: number): void;
}

export const DOT_EVERY = 0.1;
/** Segments a second; a long flight is drawn coarser. */
const FINE = 120;
const MOST_SEGMENTS = 2400;
const DOT_STACKS = 6;
const DOT_SLICES = 12;

interface TrailLook {
	readonly name: string;
	readonly colour: ColourIndex;
	readonly width: number;
	readonly dotRadius: number;
	readonly dash: readonly [number, number] | null;
	readonly opacity: number;
}

/** The trail of a path from 0 to `end` (s), in stage coordinates. */
export function trailOf(frame: StageFrame, path: Drop["flight"]["path"], end: number, look: TrailLook): Trail {
	const n = Math.max(1, Math.min(MOST_SEGMENTS, Math.ceil(end * FINE)));
	const state = new Float64Array(6);
	const p = [0, 0, 0];
	const at = (t: number): void => {
		path.stateAt(t, state);
		toStage(frame, ring(state[0] as number, state[1] as number, state[2] as number), p);
	};
	const points: number[] = [];
	for (let i = 0; i <= n; i++) {
		at((end * i) / n);
		points.push(...p);
	}
	const lines = new LineBuilder();
	lines.run(points, look.colour);
	const line = part({ ...lines.build(`${look.name}:line`, look.width, look.opacity), dash: look.dash });
	const dots = new MeshBuilder();
	const count = Math.min(MOST_SEGMENTS, Math.floor(end / DOT_EVERY + 1e-9));
	for (let i = 0; i <= count; i++) {
		at(i * DOT_EVERY);
		dot(dots, p, look.dotRadius, look.colour);
	}
	const dotPart = part(dots.build(`${look.name}:dots`, { lit: false, opacity: look.opacity }));
	const perDot = dotPart.drawable.kind === "triangles" ? dotPart.drawable.index.length / 3 / (count + 1) : 0;
	return {
		parts: [line, dotPart],
		show(t) {
			line.count = end > 0 ? Math.max(0, Math.min(n, Math.round((n * t) / end))) : n;
			dotPart.count = t < 0 ? 0 : perDot * (Math.min(count, Math.floor(t / DOT_EVERY + 1e-6)) + 1);
		},
	};
}

function dot(mesh: MeshBuilder, centre: readonly number[], radius: number, colour: ColourIndex): void {
	const [x, y, z] = centre as [number, number, number];
	const ringOf: number[][] = [];
	for (let i = 0; i <= DOT_STACKS; i++) {
		const polar = (Math.PI * i) / DOT_STACKS;
		const row: number[] = [];
		for (let j = 0; j < DOT_SLICES; j++) {
			const turn = (2 * Math.PI * j) / DOT_SLICES;
			const nx = Math.sin(polar) * Math.cos(turn);
			const ny = Math.cos(polar);
			const nz = Math.sin(polar) * Math.sin(turn);
			row.push(mesh.vertex(x + radius * nx, y + radius * ny, z + radius * nz, nx, ny, nz, colour));
		}
		ringOf.push(row);
	}
	for (let i = 0; i < DOT_STACKS; i++)
		for (let j = 0; j < DOT_SLICES; j++) {
			const k = (j + 1) % DOT_SLICES;
			const [a, b] = [ringOf[i] as number[], ringOf[i + 1] as number[]];
			if (i > 0) mesh.triangle(a[j] as number, a[k] as number, b[j] as number);
			if (i < DOT_STACKS - 1) mesh.triangle(a[k] as number, b[k] as number, b[j] as number);
		}
}

export const OBJECT_TRAIL: TrailLook = { name: "trail", colour: COLOUR.ink, width: 2.2, dotRadius: 0.0085, dash: null, opacity: 1 };
export const GHOST_TRAIL: TrailLook = {
	name: "ghost",
	colour: COLOUR.muted,
	width: 1.6,
	dotRadius: 0.006,
	dash: [0.035, 0.03],
	opacity: 0.6,
};
