import type { Triangles, WideLines } from "./drawable.ts";
import { inkHull, LineBuilder, MeshBuilder } from "./mesh.ts";
import { COLOUR } from "./palette.ts";

const SECTORS = 20;
const BELTS = 10;

/** The sphere of diameter `diameter` (m) that flies, about its own centre: its ink edge, body, and equator. */
export function objectShape(diameter: number): readonly [Triangles, Triangles, WideLines] {
	const r = diameter / 2;
	const mesh = new MeshBuilder();
	const grid = Array.from({ length: BELTS + 1 }, (_, i) =>
		Array.from({ length: SECTORS }, (_, j) => {
			const polar = (Math.PI * i) / BELTS;
			const turn = (2 * Math.PI * j) / SECTORS;
			const n = [Math.sin(polar) * Math.cos(turn), Math.cos(polar), Math.sin(polar) * Math.sin(turn)] as const;
			return mesh.vertex(r * n[0], r * n[1], r * n[2], ...n, COLOUR.paper);
		}),
	);
	for (let i = 0; i < BELTS; i++)
		for (let j = 0; j < SECTORS; j++) {
			const [a, b, c, d] = [grid[i]?.[j], grid[i]?.[(j + 1) % SECTORS], grid[i + 1]?.[(j + 1) % SECTORS], grid[i + 1]?.[j]] as [
				number,
				number,
				number,
				number,
			];
			if (i > 0) mesh.triangle(a, b, c);
			if (i < BELTS - 1) mesh.triangle(a, c, d);
		}
	const body = mesh.build("object");
	const equator = new LineBuilder();
	const belt = Array.from({ length: 2 * SECTORS + 1 }, (_, j) => {
		const turn = (Math.PI * j) / SECTORS;
		return [1.01 * r * Math.cos(turn), 0, 1.01 * r * Math.sin(turn)];
	});
	equator.run(belt.flat(), COLOUR.ink);
	return [inkHull(body, Math.min(0.004, 0.12 * diameter), COLOUR.ink), body, equator.build("object:equator", 1.2)];
}
