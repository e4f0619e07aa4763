import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { cross, dot, head, length, scale } from "../../src/vector/vec3.ts";
import { CANAL_NORMALS, CANALS, canalComponents, excitation, leastSquaresHead } from "../../src/vestibular/canals.ts";

const component = fc.double({ min: -20, max: 20, noNaN: true });

describe("canals", () => {
	it("have six unit normals, to the five decimals of the table", () => {
		for (const id of CANALS) expect(Math.abs(length(CANAL_NORMALS[id]) - 1), id).toBeLessThan(1e-5);
	});

	it("are near mirror images, left and right, with opposite senses", () => {
		for (const plane of ["A", "H", "P"] as const) {
			const left = CANAL_NORMALS[`L${plane}`];
			const right = CANAL_NORMALS[`R${plane}`];
			expect(length(cross(left, head(right[0], -right[1], right[2])))).toBeLessThan(0.03);
			expect([excitation(`L${plane}`), excitation(`R${plane}`)]).toEqual([1, -1]);
		}
	});

	it("give back the head vector that they saw (seed 81)", () => {
		const out = new Float64Array(3);
		fc.assert(
			fc.property(component, component, component, (x, y, z) => {
				leastSquaresHead(canalComponents(head(x, y, z)), 0, out, 0);
				for (const [k, v] of [x, y, z].entries()) expect(Math.abs((out[k] as number) - v)).toBeLessThan(1e-12);
			}),
			{ seed: 81 },
		);
	});

	it("that disagree are reconciled with the least squared error: what is left is at right angles to every head vector (seed 82)", () => {
		fc.assert(
			fc.property(fc.array(component, { minLength: 6, maxLength: 6 }), (seen) => {
				const out = new Float64Array(5);
				leastSquaresHead([9, 9, ...seen], 2, out, 2);
				const fitted = canalComponents(head(out[2] as number, out[3] as number, out[4] as number));
				const left = CANALS.map((id, i) => scale(CANAL_NORMALS[id], (seen[i] as number) - (fitted[i] as number)));
				for (const axis of [head(1, 0, 0), head(0, 1, 0), head(0, 0, 1)])
					expect(Math.abs(left.reduce((sum, v) => sum + dot(v, axis), 0))).toBeLessThan(1e-12);
				expect([out[0], out[1]]).toEqual([0, 0]);
			}),
			{ seed: 82 },
		);
	});
});
