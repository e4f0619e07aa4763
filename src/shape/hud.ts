import type { Camera } from "./camera.ts";
import type { Part } from "./drawable.ts";
import { LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR, type ColourIndex } from "./palette.ts";
import { part, placeAlong } from "./part.ts";

/**
 * Small instruments that hang before the camera, in CSS px of the picture: panels, the axis cue, the
 * plumb. Directions stay those of the stage, projected by the same camera.
 */

/** Distance of the instruments before the camera, m. */
const DEPTH = 1;

/** CSS px to metres at the instruments' distance, for a picture `height` px high. */
export const metresPerPixel = (camera: Camera, height: number): number => (2 * DEPTH * Math.tan(camera.fovY / 2)) / height;

/** Writes the stage point that appears at (px, py), y down. */
export function hudPoint(camera: Camera, width: number, height: number, px: number, py: number, out: Float64Array): void {
	const s = metresPerPixel(camera, height);
	const u = (px - width / 2) * s;
	const v = (height / 2 - py) * s;
	const b = camera.basis;
	for (let k = 0; k < 3; k++)
		out[k] = (camera.position[k] as number) + u * (b[k] as number) + v * (b[3 + k] as number) + DEPTH * (b[6 + k] as number);
}

/** Faces a part that is built in px (x right, y up) to the camera at (px, py). */
function face(camera: Camera, width: number, height: number, px: number, py: number, matrix: Float32Array): void {
	const s = metresPerPixel(camera, height);
	hudPoint(camera, width, height, px, py, scratch);
	const b = camera.basis;
	for (let k = 0; k < 3; k++) {
		matrix[k] = (b[k] as number) * s;
		matrix[4 + k] = (b[3 + k] as number) * s;
		matrix[8 + k] = -(b[6 + k] as number) * s;
		matrix[12 + k] = scratch[k] as number;
	}
	matrix[3] = 0;
	matrix[7] = 0;
	matrix[11] = 0;
	matrix[15] = 1;
}

const scratch = new Float64Array(3);

/**
 * Writes how a stage direction is drawn at an instrument so that it looks as it would in the middle of
 * the picture: what points along the camera's view is drawn along the line of sight to the instrument.
 */
export function hudDirection(camera: Camera, at: ArrayLike<number>, dx: number, dy: number, dz: number, out: Float64Array): void {
	const b = camera.basis;
	const p = camera.position;
	const right = dx * (b[0] as number) + dy * (b[1] as number) + dz * (b[2] as number);
	const above = dx * (b[3] as number) + dy * (b[4] as number) + dz * (b[5] as number);
	const ahead = dx * (b[6] as number) + dy * (b[7] as number) + dz * (b[8] as number);
	const rx = (at[0] as number) - (p[0] as number);
	const ry = (at[1] as number) - (p[1] as number);
	const rz = (at[2] as number) - (p[2] as number);
	const l = Math.hypot(rx, ry, rz);
	out[0] = right * (b[0] as number) + above * (b[3] as number) + (ahead * rx) / l;
	out[1] = right * (b[1] as number) + above * (b[4] as number) + (ahead * ry) / l;
	out[2] = right * (b[2] as number) + above * (b[5] as number) + (ahead * rz) / l;
}

const drawn = new Float64Array(3);
/** `placeAlong` for an instrument: the direction as drawn there, its length kept in proportion. */
function placeDrawn(camera: Camera, matrix: Float32Array, at: Float64Array, dx: number, dy: number, dz: number, size: number): void {
	hudDirection(camera, at, dx, dy, dz, drawn);
	const x = drawn[0] as number;
	const y = drawn[1] as number;
	const z = drawn[2] as number;
	const l = Math.max(1e-6, Math.hypot(x, y, z));
	placeAlong(matrix, at[0] as number, at[1] as number, at[2] as number, x / l, y / l, z / l, l * size, size);
}

export interface HudPanel {
	readonly parts: readonly Part[];
	/** Puts its middle at (px, py), stretched. */
	set(camera: Camera, width: number, height: number, px: number, py: number, stretchX?: number, stretchY?: number): void;
}

/** A rounded sheet of paper `w` × `h` px with a hairline edge. */
export function createPanel(w: number, h: number): HudPanel {
	const sheet = part(rounded(w, h, 6, COLOUR.panel).build("panel", { lit: false, over: true, side: "both", opacity: 0.93 }));
	const edge = new LineBuilder();
	const outline = corners(w, h, 6);
	edge.run([...outline, ...outline.slice(0, 3)], COLOUR.line);
	const rim = part({ ...edge.build("panel edge", 1), depth: "over" });
	return {
		parts: [sheet, rim],
		set(camera, width, height, px, py, stretchX = 1, stretchY = 1) {
			face(camera, width, height, px, py, sheet.matrix);
			for (let k = 0; k < 3; k++) {
				sheet.matrix[k] = (sheet.matrix[k] as number) * stretchX;
				sheet.matrix[4 + k] = (sheet.matrix[4 + k] as number) * stretchY;
			}
			rim.matrix.set(sheet.matrix);
		},
	};
}

function corners(w: number, h: number, r: number): number[] {
	const out: number[] = [];
	for (const [sx, sy, from] of [
		[1, 1, 0],
		[-1, 1, 1],
		[-1, -1, 2],
		[1, -1, 3],
	] as const)
		for (let i = 0; i <= 5; i++) {
			const turn = ((from + i / 5) * Math.PI) / 2;
			out.push(sx * (w / 2 - r) + r * Math.cos(turn), sy * (h / 2 - r) + r * Math.sin(turn), 0);
		}
	return out;
}

function rounded(w: number, h: number, r: number, colour: ColourIndex): MeshBuilder {
	const mesh = new MeshBuilder();
	const middle = mesh.vertex(0, 0, 0, 0, 0, 1, colour);
	const points = corners(w, h, r);
	const rim: number[] = [];
	for (let i = 0; i < points.length; i += 3) rim.push(mesh.vertex(points[i] as number, points[i + 1] as number, 0, 0, 0, 1, colour));
	rim.forEach((v, i) => {
		mesh.triangle(middle, v, rim[(i + 1) % rim.length] as number);
	});
	return mesh;
}

/** The axis cue: prograde, up and axial as seen by the camera. */
export interface AxisCue {
	readonly parts: readonly Part[];
	/** Stage points of the three tips: prograde, up, axial. */
	readonly tips: readonly [Float64Array, Float64Array, Float64Array];
	/** Puts its origin at (px, py), arms `arm` px long. */
	set(camera: Camera, width: number, height: number, px: number, py: number, arm: number): void;
}

const AXES = [
	{ name: "prograde", d: [1, 0, 0] },
	{ name: "up", d: [0, 1, 0] },
	{ name: "axial", d: [0, 0, 1] },
] as const;

export function createAxisCue(): AxisCue {
	const lines = AXES.map(({ name }) => {
		const builder = new LineBuilder();
		builder.segment(0, 0, 0, 0, 1, 0, COLOUR.ink);
		for (const side of [-1, 1]) {
			builder.segment(side * 0.13, 0.74, 0, 0, 1, 0, COLOUR.ink);
			builder.segment(0, 0.74, side * 0.13, 0, 1, 0, COLOUR.ink);
		}
		return part({ ...builder.build(`axis ${name}`, 1.8), depth: "over" });
	});
	const tips = [new Float64Array(3), new Float64Array(3), new Float64Array(3)] as const;
	const origin = new Float64Array(3);
	return {
		parts: lines,
		tips,
		set(camera, width, height, px, py, arm) {
			hudPoint(camera, width, height, px, py, origin);
			const long = arm * metresPerPixel(camera, height);
			for (let i = 0; i < 3; i++) {
				const { d } = AXES[i] as (typeof AXES)[number];
				placeDrawn(camera, (lines[i] as Part).matrix, origin, d[0], d[1], d[2], long);
				const tip = tips[i] as Float64Array;
				for (let k = 0; k < 3; k++) tip[k] = (origin[k] as number) + (drawn[k] as number) * long * 1.12;
			}
		},
	};
}

/** A plumb: the string hangs along apparent gravity beside a dashed line along the deck's own down. */
export interface Plumb {
	readonly parts: readonly Part[];
	/** Hangs it from (px, py), `long` px; (gx, gy, gz) is the unit direction of apparent gravity in the stage, or none. */
	set(camera: Camera, width: number, height: number, px: number, py: number, long: number, gx: number, gy: number, gz: number): void;
	setVisible(visible: boolean): void;
}

export function createPlumb(): Plumb {
	const own = new LineBuilder();
	own.segment(0, 0, 0, 0, 1.12, 0, COLOUR.muted);
	const deckLine = part({ ...own.build("plumb own", 1.4), depth: "over", dash: [0.06, 0.05] });
	const beam = new LineBuilder();
	beam.segment(-0.22, 0, 0, 0.22, 0, 0, COLOUR.ink);
	beam.segment(0, 0, -0.22, 0, 0, 0.22, COLOUR.ink);
	const bracket = part({ ...beam.build("plumb bracket", 2), depth: "over" });
	const stringLine = new LineBuilder();
	stringLine.segment(0, 0, 0, 0, 0.86, 0, COLOUR.ink);
	const string = part({ ...stringLine.build("plumb string", 2), depth: "over" });
	const mesh = new MeshBuilder();
	spindle(mesh, 0.125, COLOUR.ink, 0.03);
	spindle(mesh, 0.1, COLOUR.ladder, 0);
	const bob = part(mesh.build("plumb bob", { lit: false, over: true, side: "both" }));
	const parts = [deckLine, bracket, string, bob];
	const origin = new Float64Array(3);
	return {
		parts,
		set(camera, width, height, px, py, long, gx, gy, gz) {
			hudPoint(camera, width, height, px, py, origin);
			const size = long * metresPerPixel(camera, height);
			placeDrawn(camera, deckLine.matrix, origin, 0, -1, 0, size);
			placeDrawn(camera, bracket.matrix, origin, 0, -1, 0, size);
			placeDrawn(camera, string.matrix, origin, gx, gy, gz, size);
			placeDrawn(camera, bob.matrix, origin, gx, gy, gz, size);
		},
		setVisible(visible) {
			for (const p of parts) p.visible = visible;
		},
	};
}

/** A bob about the string's lower end: a short drum with a point. */
function spindle(mesh: MeshBuilder, radius: number, colour: ColourIndex, grow: number): void {
	const n = 16;
	const rows = [
		[0.82 - grow, 0.02 + grow],
		[0.84 - grow, radius],
		[0.96 + grow * 0.4, radius],
		[1.1 + grow * 1.4, 0.001],
	] as const;
	const grid = rows.map(([y, r]) =>
		Array.from({ length: n }, (_, i) => {
			const turn = (2 * Math.PI * i) / n;
			return mesh.vertex(r * Math.cos(turn), y, r * Math.sin(turn), Math.cos(turn), 0, Math.sin(turn), colour);
		}),
	);
	for (let k = 0; k + 1 < rows.length; k++)
		for (let i = 0; i < n; i++) {
			const j = (i + 1) % n;
			const [a, b] = [grid[k] as number[], grid[k + 1] as number[]];
			mesh.quad(a[i] as number, a[j] as number, b[j] as number, b[i] as number);
		}
}
