import { describe, expect, it } from "vitest";
import { neighbours, pieces } from "../../src/raster/neighbours.ts";
import type { Triangles } from "../../src/shape/drawable.ts";
import { COLOUR } from "../../src/shape/palette.ts";
import { ball, box, triangles } from "./scene.ts";

const strip = (index: readonly number[]): Triangles => ({
	...triangles([], COLOUR.deck),
	position: new Float32Array([0, 0, 0, 1, 0, 0, 1, 1, 0, 0, 1, 0, 2, 0, 0, 0, 0, 5]),
	index: new Uint32Array(index),
});

describe("neighbours", () => {
	it("meet across a side between the same two places, whether the corner is shared or doubled", () => {
		expect([...neighbours(strip([0, 1, 2, 0, 2, 3]))]).toEqual([-1, -1, 1, 0, -1, -1]);
		const doubled = triangles(
			[
				[
					[0, 0, 0],
					[1, 0, 0],
					[1, 1, 0],
				],
				[
					[0, 0, 0],
					[1, 1, 0],
					[0, 1, 0],
				],
			],
			COLOUR.deck,
		);
		expect([...neighbours(doubled)]).toEqual([-1, -1, 1, 0, -1, -1]);
	});

	it("are none where three or four triangles meet, and none of a triangle without area", () => {
		expect([...neighbours(strip([0, 1, 2, 1, 0, 3, 0, 1, 4]))].filter((n) => n >= 0)).toEqual([]);
		expect([...neighbours(strip([0, 1, 2, 1, 0, 3, 0, 1, 4, 1, 0, 5]))].filter((n) => n >= 0)).toEqual([]);
		expect([...neighbours(strip([0, 1, 2, 0, 2, 2, 0, 2, 3]))]).toEqual([-1, -1, 2, -1, -1, -1, 0, -1, -1]);
	});

	it("close a box and a ball, each side once from either", () => {
		for (const closed of [box([0, 0, 0], [1, 2, 3], COLOUR.desk)[0], ball(1, 6, 8, COLOUR.suit)]) {
			const across = neighbours(closed);
			let open = 0;
			for (let k = 0; k < across.length; k++) {
				const n = across[k] as number;
				if (n < 0) open++;
				else expect([...across.subarray(3 * n, 3 * n + 3)]).toContain(Math.floor(k / 3));
			}
			/** The ball's poles are triangles without area: all three sides of 16 of them. */
			expect(open).toBe(closed.name === "ball" ? 48 : 0);
		}
	});
});

describe("pieces", () => {
	it("end where what comes later hangs on nothing before", () => {
		expect([...pieces(new Int32Array(0))]).toEqual([]);
		expect([...pieces(neighbours(strip([0, 1, 2, 0, 2, 3, 1, 4, 5])))]).toEqual([2, 3]);
		expect([...pieces(neighbours(strip([0, 1, 2, 1, 4, 5, 0, 2, 3])))]).toEqual([3]);
	});
});
