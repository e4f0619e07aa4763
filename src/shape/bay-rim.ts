import type { Opening, Run } from "./bay-opening.ts";
import type { Surface } from "./bay-surface.ts";
import type { LineBuilder, MeshBuilder } from "./mesh.ts";
import type { ColourIndex } from "./palette.ts";
import { COLOUR } from "./palette.ts";

/** A step of a rim's section, from outside inward: offset outward from the outline, lift into the bay, m; colour up to the next. */
type Section = readonly (readonly [number, number, ColourIndex])[];

/** Frames stand up where nobody treads; depth of a window's reveal and of a hatch that opens to nothing. */
const REVEAL = 0.12;
const windowSection = (lift: number): Section => [
	[0.06, 0, COLOUR.windowFrame],
	[0.055, lift, COLOUR.windowFrame],
	[0.026, lift, COLOUR.coamingLip],
	[0.006, lift, COLOUR.coamingLip],
	[0, 0, COLOUR.coaming],
	[0, -REVEAL, COLOUR.coaming],
];
const hatchSection = (lift: number): Section => [
	[0.09, 0, COLOUR.coaming],
	[0.086, lift, COLOUR.coaming],
	[0.03, lift, COLOUR.coamingLip],
	[0.005, lift, COLOUR.coamingLip],
	[0, 0, COLOUR.coaming],
];
const FLUSH = 0.004;
const PROUD = 0.016;

/** Section of the frame about an opening; a hatch's shaft is apart. */
function section(surface: Surface, opening: Opening): Section {
	const lift = surface.name === "floor" || opening.kind === "hatch" ? FLUSH : PROUD;
	return opening.kind === "window" ? windowSection(lift) : hatchSection(lift);
}

/** How far the frame of an opening reaches over its face, m. */
export const frameReach = (opening: Opening): number => (opening.kind === "window" ? 0.06 : 0.09);

const count = (run: Run): number => run.point.length / 2;

/** Face coordinates of point i of a run, carried outward by `offset` m. */
function carried(opening: Opening, run: Run, i: number, offset: number): readonly [number, number] {
	return opening.uv(
		(run.point[2 * i] as number) + offset * (run.offset[2 * i] as number),
		(run.point[2 * i + 1] as number) + offset * (run.offset[2 * i + 1] as number),
	);
}

/** The frame of an opening. */
export function rim(mesh: MeshBuilder, surface: Surface, opening: Opening): void {
	const steps = section(surface, opening);
	const p = [0, 0, 0];
	const b = new Array<number>(9).fill(0);
	for (const run of opening.runs)
		for (let k = 0; k + 1 < steps.length; k++) {
			const [o0, l0, colour] = steps[k] as Section[number];
			const [o1, l1] = steps[k + 1] as Section[number];
			const rise = Math.hypot(o1 - o0, l1 - l0);
			const outward = (l1 - l0) / rise;
			const inward = (o0 - o1) / rise;
			let before: readonly [number, number] | null = null;
			for (let i = 0; i < count(run); i++) {
				const na = run.normal[2 * i] as number;
				const nc = run.normal[2 * i + 1] as number;
				const pair = ([o0, o1] as const).map((o, end) => {
					const [u, v] = carried(opening, run, i, o);
					surface.put(u, v, end === 0 ? l0 : l1, p);
					surface.basis(u, v, b);
					const n = (j: number): number => outward * (na * (b[j] as number) + nc * (b[3 + j] as number)) + inward * (b[6 + j] as number);
					return mesh.vertex(p[0] as number, p[1] as number, p[2] as number, n(0), n(1), n(2), colour);
				}) as [number, number];
				if (before) mesh.quad(before[0], before[1], pair[1], pair[0]);
				before = pair;
			}
		}
}

/** A closed line round an opening. */
export function rimLine(lines: LineBuilder, surface: Surface, opening: Opening, offset: number, lift: number, colour: ColourIndex): void {
	for (const run of opening.runs) {
		const points: number[] = [];
		for (let i = 0; i < count(run); i++) surface.put(...carried(opening, run, i, offset), lift, points, 3 * i);
		lines.run(points, colour);
	}
}

/** The ink lines of an opening's frame: its outer edge, and inside a window the far edge and the corners. */
export function rimLines(lines: LineBuilder, surface: Surface, opening: Opening): void {
	const steps = section(surface, opening);
	const [reach] = steps[0] as Section[number];
	rimLine(lines, surface, opening, reach, 0.002, COLOUR.ink);
	if (opening.kind === "window") {
		rimLine(lines, surface, opening, -0.001, -REVEAL, COLOUR.ink);
		corners(
			lines,
			opening,
			(a, c, out) => surface.put(...opening.uv(a, c), 0, out),
			(a, c, out) => surface.put(...opening.uv(a, c), -REVEAL, out),
		);
	}
}

type Place = (a: number, c: number, out: number[]) => void;

/** Lines down the corners of a rectangular opening, between two depths. */
function corners(lines: LineBuilder, opening: Opening, near: Place, far: Place): void {
	if (opening.outline.shape === "circle") return;
	const p = [0, 0, 0];
	const q = [0, 0, 0];
	const a = opening.outline.along / 2 - 0.001;
	const c = opening.outline.across / 2 - 0.001;
	for (const [x, y] of [
		[a, c],
		[-a, c],
		[-a, -c],
		[a, -c],
	] as const) {
		near(x, y, p);
		far(x, y, q);
		lines.run([...p, ...q], COLOUR.muted);
	}
}

/** The far end of a shaft: a face below and the hatch as it opens there. */
export interface FarEnd {
	readonly surface: Surface;
	readonly opening: Opening;
}

/** The walls of a hatch's shaft, on the radii through its outline, to the ceiling below or a reveal deep. */
export function shaft(mesh: MeshBuilder, lines: LineBuilder, surface: Surface, opening: Opening, far: FarEnd | null): void {
	const b = new Array<number>(9).fill(0);
	const end: Place = (x, y, out) =>
		far ? far.surface.put(...far.opening.uv(x, y), 0, out) : surface.put(...opening.uv(x, y), -REVEAL, out);
	const p = [0, 0, 0];
	const q = [0, 0, 0];
	for (const run of opening.runs) {
		let before: readonly [number, number] | null = null;
		for (let i = 0; i < count(run); i++) {
			const x = run.point[2 * i] as number;
			const y = run.point[2 * i + 1] as number;
			const [u, v] = opening.uv(x, y);
			surface.put(u, v, 0, p);
			end(x, y, q);
			surface.basis(u, v, b);
			const na = -(run.normal[2 * i] as number);
			const nc = -(run.normal[2 * i + 1] as number);
			const pair = [p, q].map((at) =>
				mesh.vertex(
					at[0] as number,
					at[1] as number,
					at[2] as number,
					na * (b[0] as number) + nc * (b[3] as number),
					na * (b[1] as number) + nc * (b[4] as number),
					na * (b[2] as number) + nc * (b[5] as number),
					COLOUR.coaming,
				),
			) as [number, number];
			if (before) mesh.quad(before[0], before[1], pair[1], pair[0]);
			before = pair;
		}
	}
	corners(lines, opening, (x, y, out) => surface.put(...opening.uv(x, y), 0, out), end);
	if (!far) rimLine(lines, surface, opening, -0.001, -REVEAL, COLOUR.ink);
}
