import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { ruler, sampleAt, tinyPath, trace } from "../../src/drawing/trace.ts";

const inset = { top: 8, right: 12, bottom: 20, left: 40 };
const base = { width: 320, height: 100, inset, xTicks: 4, yTicks: 3 };
const points = (path: string): number[][] =>
	path
		.slice(1)
		.split("L")
		.map((p) => p.split(",").map(Number));

describe("trace", () => {
	test("the path runs from the plot's left to its right, through each sample", () => {
		const t = trace({ ...base, x: [0, 1, 2], y: [0, 1, 0.5] });
		const path = points(t.path);
		expect(path[0]).toEqual([40, t.yOf(0)]);
		expect(path[2]?.[0]).toBe(308);
		expect(path).toHaveLength(3);
		expect(t.yOf(1)).toBeLessThan(t.yOf(0));
	});

	test("the axis covers the data and what else it must reach, and ends on ticks", () => {
		const t = trace({ ...base, x: [0, 1], y: [-0.302, 0], yCover: [0.2] });
		expect(t.yTicks[0]?.at).toBeCloseTo(t.bottom, 9);
		expect(t.yTicks.at(-1)?.at).toBeCloseTo(t.top, 9);
		expect(t.yTicks.map((k) => k.label)).toEqual(["−0.4", "−0.2", "0.0", "0.2"]);
	});

	test("the time axis is kept as given", () => {
		const t = trace({ ...base, x: [0, 0.815], y: [1.5, 0], xDomain: [0, 1] });
		expect(t.xOf(1)).toBe(t.right);
		expect(points(t.path).at(-1)?.[0]).toBeCloseTo(40 + 0.815 * 268, 2);
	});

	test("a steady value lies inside the plot", () => {
		const t = trace({ ...base, x: [0, 1], y: [0, 0] });
		expect(t.yOf(0)).toBeGreaterThan(t.top);
		expect(t.yOf(0)).toBeLessThan(t.bottom);
	});

	test.each([
		["one sample", [0], [1]],
		["unlike lengths", [0, 1], [1]],
		["NaN", [0, 1], [1, Number.NaN]],
		["time that stands", [0, 0], [1, 2]],
	])("%s throws", (_, x, y) => {
		expect(() => trace({ ...base, x, y })).toThrow(RangeError);
	});

	test("every point lies in the plot (property)", () => {
		fc.assert(
			fc.property(fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 2, maxLength: 50 }), (y) => {
				const t = trace({ ...base, x: y.map((_, i) => i), y });
				for (const [px, py] of points(t.path) as [number, number][]) {
					expect(px).toBeGreaterThanOrEqual(t.left - 0.01);
					expect(px).toBeLessThanOrEqual(t.right + 0.01);
					expect(py).toBeGreaterThanOrEqual(t.top - 0.01);
					expect(py).toBeLessThanOrEqual(t.bottom + 0.01);
				}
			}),
			{ seed: 30 },
		);
	});
});

describe("tinyPath", () => {
	test("one scale for both, y up, centred", () => {
		expect(points(tinyPath([0, 1], [0, 2], 100, 48, 4))).toEqual([
			[40, 44],
			[60, 4],
		]);
	});
	test("a motion straight down stays in the box", () => {
		expect(points(tinyPath([1, 1], [2, 0], 40, 40, 4))).toEqual([
			[20, 4],
			[20, 36],
		]);
	});
});

describe("ruler", () => {
	test("majors at round times, minors between, none past the end", () => {
		const r = ruler(0.815, 815, 100);
		expect(r.major.map((t) => t.label)).toEqual(["0.0", "0.1", "0.2", "0.3", "0.4", "0.5", "0.6", "0.7", "0.8"]);
		expect(r.minor.every((at) => at > 0 && at < 815)).toBe(true);
		expect(r.minor).toHaveLength(32);
	});
	test("no end throws", () => expect(() => ruler(0, 100, 50)).toThrow("got 0"));
});

describe("sampleAt", () => {
	test("between, at and beyond samples", () => {
		const x = [0, 1, 3];
		const y = [0, 10, 30];
		expect([-1, 0, 0.5, 1, 2, 3, 9].map((t) => sampleAt(x, y, t))).toEqual([0, 0, 5, 10, 20, 30, 30]);
	});
});
