import type { RasterScene } from "../../src/raster/raster.ts";
import type { Drawable, Part, Stars, Triangles, WideLines } from "../../src/shape/drawable.ts";
import { COLOUR } from "../../src/shape/palette.ts";

type Point = readonly [number, number, number];

/** Triangles as given, three corners each, every vertex with its face's normal. */
export function triangles(faces: readonly (readonly [Point, Point, Point])[], colour: number, over: Partial<Triangles> = {}): Triangles {
	const position = new Float32Array(faces.flat(2));
	const normal = new Float32Array(position.length);
	for (const [t, [a, b, c]] of faces.entries()) {
		const u = [b[0] - a[0], b[1] - a[1], b[2] - a[2]] as const;
		const v = [c[0] - a[0], c[1] - a[1], c[2] - a[2]] as const;
		const n = [u[1] * v[2] - u[2] * v[1], u[2] * v[0] - u[0] * v[2], u[0] * v[1] - u[1] * v[0]] as const;
		const size = Math.hypot(...n) || 1;
		for (let k = 0; k < 9; k++) normal[9 * t + k] = (n[(k % 3) as 0 | 1 | 2] ?? 0) / size;
	}
	const count = position.length / 3;
	return {
		kind: "triangles",
		name: "faces",
		position,
		normal,
		colour: new Uint8Array(count).fill(colour),
		index: Uint32Array.from({ length: count }, (_, i) => i),
		side: "front",
		lit: true,
		opacity: 1,
		decal: false,
		...over,
	};
}

/** A plane quadrilateral a, b, c, d, counter-clockwise from the front. */
export const quad = (a: Point, b: Point, c: Point, d: Point, colour: number, over: Partial<Triangles> = {}): Triangles =>
	triangles(
		[
			[a, b, c],
			[a, c, d],
		],
		colour,
		over,
	);

export function lines(points: readonly Point[], colour: number, over: Partial<WideLines> = {}): WideLines {
	const position = new Float32Array(points.slice(1).flatMap((p, i) => [...(points[i] as Point), ...p]));
	return {
		kind: "lines",
		name: "line",
		position,
		colour: new Uint8Array(position.length / 6).fill(colour),
		width: 1.3,
		dash: null,
		depth: "tested",
		opacity: 1,
		...over,
	};
}

/** A box on the floor and its twelve edges. */
export function box(low: Point, high: Point, colour: number): [Triangles, WideLines[]] {
	const p = (i: number): Point => [i & 1 ? high[0] : low[0], i & 2 ? high[1] : low[1], i & 4 ? high[2] : low[2]];
	const sides = [
		[0, 2, 3, 1],
		[4, 5, 7, 6],
		[0, 4, 6, 2],
		[1, 3, 7, 5],
		[0, 1, 5, 4],
		[2, 6, 7, 3],
	];
	const faces = sides.flatMap((s) => {
		const [a, b, c, d] = s.map(p) as [Point, Point, Point, Point];
		return [[a, b, c] as const, [a, c, d] as const];
	});
	const edges = [0, 1, 2, 3, 4, 5, 6, 7].flatMap((i) =>
		[1, 2, 4].filter((bit) => !(i & bit)).map((bit) => lines([p(i), p(i | bit)], COLOUR.ink)),
	);
	return [triangles(faces, colour, { name: "box" }), edges];
}

const join = (name: string, all: readonly WideLines[]): WideLines => ({
	...(all[0] as WideLines),
	name,
	position: new Float32Array(all.flatMap((l) => [...l.position])),
	colour: new Uint8Array(all.flatMap((l) => [...l.colour])),
});

/** The bent grid of a curved surface about an axis `radius` above the origin: `turn` rad to each side, `half` m along z, at `height`. */
export function bent(
	radius: number,
	turn: number,
	half: number,
	height: number,
	m: number,
	n: number,
	colour: number,
	up: 1 | -1,
): Triangles {
	const position: number[] = [];
	const normal: number[] = [];
	const index: number[] = [];
	const r = radius - height;
	for (let i = 0; i <= m; i++)
		for (let j = 0; j <= n; j++) {
			const a = turn * ((2 * i) / m - 1);
			position.push(r * Math.sin(a), radius - r * Math.cos(a), half * ((2 * j) / n - 1));
			normal.push(-up * Math.sin(a), up * Math.cos(a), 0);
			if (i === m || j === n) continue;
			const k = i * (n + 1) + j;
			const faces = [k, k + 1, k + n + 2, k, k + n + 2, k + n + 1];
			index.push(...(up > 0 ? faces : faces.reverse()));
		}
	return {
		kind: "triangles",
		name: up > 0 ? "deck" : "ceiling",
		position: new Float32Array(position),
		normal: new Float32Array(normal),
		colour: new Uint8Array(position.length / 3).fill(colour),
		index: new Uint32Array(index),
		side: "front",
		lit: true,
		opacity: 1,
		decal: false,
	};
}

/** A ball of 2 · m · n triangles about the origin. */
export function ball(radius: number, m: number, n: number, colour: number): Triangles {
	const position: number[] = [];
	const normal: number[] = [];
	const index: number[] = [];
	for (let i = 0; i <= m; i++)
		for (let j = 0; j <= n; j++) {
			const a = (Math.PI * i) / m;
			const b = (2 * Math.PI * j) / n;
			const p = [Math.sin(a) * Math.cos(b), Math.cos(a), Math.sin(a) * Math.sin(b)] as const;
			position.push(...p.map((x) => x * radius));
			normal.push(...p);
			if (i === m || j === n) continue;
			const k = i * (n + 1) + j;
			index.push(k, k + 1, k + n + 2, k, k + n + 2, k + n + 1);
		}
	return {
		...bent(1, 1, 1, 0, 1, 1, colour, 1),
		name: "ball",
		position: new Float32Array(position),
		normal: new Float32Array(normal),
		colour: new Uint8Array(position.length / 3).fill(colour),
		index: new Uint32Array(index),
	};
}

export const at = (x: number, y: number, z: number): Float32Array => new Float32Array([1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0, x, y, z, 1]);

export const IDENTITY = new Float64Array([1, 0, 0, 0, 1, 0, 0, 0, 1]);

export const scene = (still: readonly Drawable[], parts: readonly Part[] = [], over: Partial<RasterScene> = {}): RasterScene => ({
	still,
	parts,
	skyRotation: IDENTITY,
	pixelRatio: 1,
	background: COLOUR.sky,
	...over,
});

/** A deterministic sequence of numbers 0…1 (a 32-bit linear congruence). */
export function numbers(seed: number): () => number {
	let x = seed >>> 0;
	return () => {
		x = (Math.imul(x, 1664525) + 1013904223) >>> 0;
		return x / 4294967296;
	};
}

export function starField(count: number, seed: number): Stars {
	const next = numbers(seed);
	const direction = new Float32Array(3 * count);
	for (let i = 0; i < count; i++) {
		const z = 2 * next() - 1;
		const a = 2 * Math.PI * next();
		direction.set([Math.sqrt(1 - z * z) * Math.cos(a), Math.sqrt(1 - z * z) * Math.sin(a), z], 3 * i);
	}
	const size = Float32Array.from({ length: count }, () => 1 + 2 * next() ** 4);
	return { kind: "stars", name: "stars", direction, size, light: Float32Array.from({ length: 3 * count }, () => 0.2 + 0.8 * next()) };
}

/** A bay of one deck with bulkheads, boxes, grid, stars and a figure of balls: about 24,000 triangles. */
export function sampleBay(): RasterScene {
	const R = 34;
	const turn = (15 * Math.PI) / 180;
	const deck = bent(R, turn, 3, 0, 120, 30, COLOUR.deck, 1);
	const ceiling = bent(R, turn, 3, 2.4, 60, 10, COLOUR.ceiling, -1);
	const wall = (z: number, colour: number): Triangles => {
		const faces: [Point, Point, Point][] = [];
		for (let i = 0; i < 60; i++) {
			if (z < 0 && i % 20 > 11 && i % 20 < 15) continue;
			const [a, b] = [i, i + 1].map((k) => turn * (k / 30 - 1)) as [number, number];
			const p = (t: number, h: number): Point => [(R - h) * Math.sin(t), R - (R - h) * Math.cos(t), z];
			const [p0, p1, p2, p3] = [p(a, 0), p(b, 0), p(b, 2.4), p(a, 2.4)];
			if (z < 0) faces.push([p0, p1, p2], [p0, p2, p3]);
			else faces.push([p0, p2, p1], [p0, p3, p2]);
		}
		return triangles(faces, colour, { name: "bulkhead" });
	};
	const point = (t: number, h: number, z: number): Point => [(R - h) * Math.sin(t), R - (R - h) * Math.cos(t), z];
	const arcs = (h: number, z: number): WideLines =>
		lines(
			Array.from({ length: 61 }, (_, i) => point(turn * (i / 30 - 1), h, z)),
			COLOUR.ink,
		);
	const grid = join("grid", [
		...[-3, -2, -1, 0, 1, 2, 3].map((z) => arcs(0, z)),
		...Array.from({ length: 17 }, (_, i) => (i - 8) / R).map((t) => lines([point(t, 0, -3), point(t, 0, 3)], COLOUR.ink)),
	]);
	const corners = [arcs(0, -3), arcs(0, 3), arcs(2.4, -3), arcs(2.4, 3)];
	const boxes = [
		box([1.5, 0.05, -2.9], [2.9, 0.8, -2.1], COLOUR.desk),
		box([-2, 0.02, -1.5], [-1.4, 1.1, -0.9], COLOUR.desk),
		box([0.3, 0.4, -1.7], [0.34, 2.2, -1.66], COLOUR.ladder),
		box([0.8, 0.4, -1.7], [0.84, 2.2, -1.66], COLOUR.ladder),
	];
	const zone = triangles(
		Array.from(
			{ length: 40 },
			(_, i) =>
				[
					[0, 0.003, 0],
					[0.6 * Math.cos((i + 1) * (Math.PI / 20)), 0.003, 0.6 * Math.sin((i + 1) * (Math.PI / 20))],
					[0.6 * Math.cos(i * (Math.PI / 20)), 0.003, 0.6 * Math.sin(i * (Math.PI / 20))],
				] as const,
		),
		COLOUR.coriolis,
		{ name: "zone", decal: true, opacity: 0.25 },
	);
	const trail = lines(
		Array.from({ length: 30 }, (_, i) => [-0.3 * (i / 29) ** 2, 1.5 - 1.5 * (i / 29) ** 2, 0.2]),
		COLOUR.ink,
		{ name: "trail", width: 2 },
	);
	const force = lines(
		[
			[0, 1.5, 0.2],
			[0.6, 1.5, 0.2],
			[0.6, 1, 0.2],
		],
		COLOUR.coriolis,
		{ name: "force", width: 4, dash: [0.06, 0.04], depth: "over" },
	);
	const body = ball(0.16, 24, 32, COLOUR.suit);
	const hull: Triangles = { ...ball(0.166, 24, 32, COLOUR.ink), side: "back", lit: false, name: "hull" };
	const parts = [0, 1, 2, 3, 4].flatMap((k): Part[] => [
		{ drawable: body, matrix: at(-0.5, 0.3 + 0.3 * k, -0.4) },
		{ drawable: hull, matrix: at(-0.5, 0.3 + 0.3 * k, -0.4) },
	]);
	return scene(
		[
			starField(5000, 7),
			deck,
			ceiling,
			wall(-3, COLOUR.bulkhead),
			wall(3, COLOUR.bulkhead),
			...boxes.map(([t]) => t),
			{ ...grid, opacity: 0.2, width: 1 },
			join("edges", [...boxes.flatMap(([, e]) => e), ...corners]),
			zone,
			trail,
			force,
		],
		parts,
	);
}
