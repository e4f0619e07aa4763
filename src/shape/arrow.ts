import type { Part } from "./drawable.ts";
import { LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR, type ColourIndex } from "./palette.ts";
import { part, placeAlong } from "./part.ts";

/** The parts of apparent gravity and their sum; the same letter, colour and stroke everywhere. */
export const ARROWS = {
	G: { name: "apparent gravity", colour: COLOUR.ink, width: 5, stroke: "solid" },
	C: { name: "centrifugal", colour: COLOUR.centrifugal, width: 3.6, stroke: "solid" },
	K: { name: "Coriolis", colour: COLOUR.coriolis, width: 3.6, stroke: "dashed" },
	E: { name: "Euler", colour: COLOUR.euler, width: 3.6, stroke: "dotted" },
	A: { name: "minus own acceleration", colour: COLOUR.own, width: 4.4, stroke: "double" },
} as const;
export type ArrowLetter = keyof typeof ARROWS;

/** Along an arrow of length 1. */
const DASH = { solid: null, dashed: [0.13, 0.07], dotted: [0.025, 0.06], double: null } as const;
const EDGE = 3;
const HALO = 7;

/** An arrow whose head keeps its size while its shaft follows the vector. */
export interface Arrow {
	readonly letter: ArrowLetter;
	readonly parts: readonly Part[];
	/** Stage coordinates of the tip of the last `set`. */
	readonly tip: Float64Array;
	visible: boolean;
	/** Shows it from a stage point along a unit direction, `length` m long, its head `head` m; hidden where it is too short to read. */
	set(x: number, y: number, z: number, dx: number, dy: number, dz: number, length: number, head: number): void;
	hide(): void;
}

export function createArrow(letter: ArrowLetter): Arrow {
	const look = ARROWS[letter];
	const shaft = (colour: ColourIndex, width: number, dash: readonly [number, number] | null): Part => {
		const lines = new LineBuilder();
		lines.segment(0, 0, 0, 0, 1, 0, colour);
		return part({ ...lines.build(`arrow ${letter}`, width), depth: "over", dash });
	};
	const shafts = [shaft(COLOUR.halo, look.width + HALO, null), shaft(COLOUR.ink, look.width + EDGE, null)];
	if (look.stroke === "dashed" || look.stroke === "dotted") shafts.push(shaft(COLOUR.halo, look.width, null));
	shafts.push(shaft(look.colour, look.width, DASH[look.stroke]));
	if (look.stroke === "double") shafts.push(shaft(COLOUR.halo, look.width / 3, null));
	const heads = [
		part(cone(`head ${letter} halo`, COLOUR.halo, 1.3, 0.62, -0.14)),
		part(cone(`head ${letter} edge`, COLOUR.ink, 1.16, 0.5, -0.06)),
		part(cone(`head ${letter}`, look.colour, 1, 0.38, 0)),
	];
	const parts = [...shafts.slice(0, 1), heads[0] as Part, ...shafts.slice(1), ...heads.slice(1)];
	const arrow: Arrow = {
		letter,
		parts,
		tip: new Float64Array(3),
		visible: true,
		set(x, y, z, dx, dy, dz, length, head) {
			const shown = length > head * 0.5;
			arrow.visible = shown;
			for (const p of parts) p.visible = shown;
			if (!shown) return;
			const size = Math.min(head, length * 0.6);
			const stem = length - size * 0.8;
			for (const p of shafts) placeAlong(p.matrix, x, y, z, dx, dy, dz, stem, 1);
			for (const p of heads)
				placeAlong(p.matrix, x + dx * (length - size), y + dy * (length - size), z + dz * (length - size), dx, dy, dz, size, size);
			arrow.tip[0] = x + dx * length;
			arrow.tip[1] = y + dy * length;
			arrow.tip[2] = z + dz * length;
		},
		hide() {
			arrow.visible = false;
			for (const p of parts) p.visible = false;
		},
	};
	return arrow;
}

/** A closed cone along +y from `from` to `from` + `long`, drawn over everything. */
function cone(name: string, colour: ColourIndex, long: number, radius: number, from: number) {
	const mesh = new MeshBuilder();
	const n = 18;
	const tip = mesh.vertex(0, from + long, 0, 0, 1, 0, colour);
	const base = mesh.vertex(0, from, 0, 0, -1, 0, colour);
	const rim: number[] = [];
	const under: number[] = [];
	for (let i = 0; i < n; i++) {
		const turn = (2 * Math.PI * i) / n;
		const c = Math.cos(turn);
		const s = Math.sin(turn);
		rim.push(mesh.vertex(radius * c, from, radius * s, c, 0, s, colour));
		under.push(mesh.vertex(radius * c, from, radius * s, 0, -1, 0, colour));
	}
	for (let i = 0; i < n; i++) {
		const k = (i + 1) % n;
		mesh.triangle(rim[i] as number, tip, rim[k] as number);
		mesh.triangle(base, under[k] as number, under[i] as number);
	}
	return mesh.build(name, { lit: false, over: true, side: "both" });
}
