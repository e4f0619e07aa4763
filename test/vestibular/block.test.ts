import { expm, type Matrix, matrix } from "mathjs";
import { describe, expect, it } from "vitest";
import { block, READS, ROW } from "../../src/vestibular/block.ts";
import type { CanalConstants } from "../../src/vestibular/constants.ts";
import { ANALYSIS, HIGHEST, NODES, ORDER } from "../../src/vestibular/legendre.ts";

const rowOf = (m: Float64Array, row: number): number[] => Array.from(m.subarray(ROW * row, ROW * (row + 1)));

describe("nodes", () => {
	it("integrate every polynomial up to degree 15", () => {
		const weight = (j: number): number => ANALYSIS[j] as number;
		for (let d = 0; d <= 15; d++) expect(NODES.reduce((sum, x, j) => sum + weight(j) * x ** d, 0)).toBeCloseTo(1 / (d + 1), 14);
		expect(NODES.reduce((sum, x, j) => sum + weight(j) * x ** 16, 0)).not.toBeCloseTo(1 / 17, 12);
	});

	it("see nothing of degree 7 in a polynomial of degree 6, and the whole of it in P₇", () => {
		const seen = (f: (x: number) => number): number => NODES.reduce((sum, x, j) => sum + (HIGHEST[j] as number) * f(2 * x - 1), 0);
		for (let d = 0; d < 7; d++) expect(seen((x) => x ** d)).toBeCloseTo(0, 13);
		expect(seen((x) => (429 * x ** 7 - 693 * x ** 5 + 315 * x ** 3 - 35 * x) / 16)).toBeCloseTo(1, 13);
	});
});

describe("block", () => {
	const constants: CanalConstants[] = [
		{ cupula: 5.7, short: 0.005, adaptation: null },
		{ cupula: 5.7, short: 0.005, adaptation: 80 },
		{ cupula: 4.2, short: 0.0001, adaptation: 30 },
		{ cupula: 1, short: 1, adaptation: 1 },
	];
	const cases = constants.flatMap((c) => [1e-6, 0.004, 8 / 120, 0.9].map((h) => [c, h] as const));

	it.each(cases)("%o over %d s carries the states as mathjs' matrix exponential does", (c, h) => {
		const a = c.adaptation === null ? 0 : 1 / c.adaptation;
		const rates = [
			[-a, -a, a],
			[0, -1 / c.cupula, 1 / c.cupula],
			[0, 0, -1 / c.short],
		];
		const { report, end } = block(c, h);
		const whole = (expm(matrix(rates.map((r) => r.map((x) => x * h)))) as Matrix).toArray() as number[][];
		for (let i = 0; i < 3; i++)
			for (let j = 0; j < 3; j++) expect(Math.abs((rowOf(end, i)[j] as number) - (whole[i]?.[j] as number))).toBeLessThan(1e-10);
		for (let r = 1; r <= READS; r++) {
			const part = (expm(matrix(rates.map((row) => row.map((x) => (x * h * r) / READS)))) as Matrix).toArray() as number[][];
			for (let j = 0; j < 3; j++) {
				const expected = (part[2]?.[j] as number) - (part[1]?.[j] as number) - (part[0]?.[j] as number);
				expect(Math.abs((rowOf(report, r - 1)[j] as number) - expected)).toBeLessThan(1e-10);
			}
		}
	});

	it.each(cases)("%o over %d s leaves a canal in equilibrium with a constant input where it was", (c, h) => {
		const { report, end } = block(c, h);
		const atRest = [0, 1, 1, ...new Array<number>(ORDER).fill(1)];
		const times = (row: number[]): number => row.reduce((sum, x, i) => sum + x * (atRest[i] as number), 0);
		for (let r = 0; r < READS; r++) expect(Math.abs(times(rowOf(report, r)))).toBeLessThan(1e-10);
		for (let i = 0; i < 3; i++) expect(Math.abs(times(rowOf(end, i)) - (atRest[i] as number))).toBeLessThan(1e-10);
	});
});
