import { describe, expect, it } from "vitest";
import { inkHull, LineBuilder, MeshBuilder } from "../../src/shape/mesh.ts";
import { COLOUR } from "../../src/shape/palette.ts";

describe("mesh builder", () => {
	it("winds a triangle to agree with its normal, whichever way it is given", () => {
		const mesh = new MeshBuilder();
		const v = [
			[0, 0],
			[1, 0],
			[0, 1],
		].map(([x, y]) => mesh.vertex(x as number, y as number, 0, 0, 0, 1, COLOUR.deck)) as [number, number, number];
		mesh.triangle(v[0], v[1], v[2]);
		mesh.triangle(v[0], v[2], v[1]);
		expect([...mesh.build("m").index]).toEqual([0, 1, 2, 0, 1, 2]);
	});

	it("keeps every vertex past its first capacity", () => {
		const mesh = new MeshBuilder();
		for (let i = 0; i < 1000; i++) mesh.vertex(i, -i, 2 * i, 0, 1, 0, i % 7);
		const { position, normal, colour } = mesh.build("m");
		expect([position.length, normal.length, colour.length]).toEqual([3000, 3000, 1000]);
		expect([...position.slice(2997)]).toEqual([999, -999, 1998]);
		expect(colour[999]).toBe(999 % 7);
	});

	it("a hull is the body pushed out along its normals, seen from behind", () => {
		const mesh = new MeshBuilder();
		mesh.vertex(1, 2, 3, 0, 1, 0, COLOUR.ladder);
		const hull = inkHull(mesh.build("m"), 0.25, COLOUR.ink);
		expect([...hull.position]).toEqual([1, 2.25, 3]);
		expect([hull.side, hull.lit, hull.colour[0]]).toEqual(["back", false, COLOUR.ink]);
	});

	it("joins the points of a run in order", () => {
		const lines = new LineBuilder();
		lines.run([0, 0, 0, 1, 0, 0, 1, 1, 0], COLOUR.ink);
		const { position, colour } = lines.build("l", 1.2);
		expect([...position]).toEqual([0, 0, 0, 1, 0, 0, 1, 0, 0, 1, 1, 0]);
		expect(colour).toHaveLength(2);
	});
});
