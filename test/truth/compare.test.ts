import { describe, expect, it } from "vitest";
import { compare, meter, type TruthRow } from "./compare.ts";

const row = (over: Partial<TruthRow>): TruthRow => ({
	group: "g",
	check: "c",
	ours: 1,
	reference: 1,
	tolerance: 0.01,
	kind: "absolute",
	unit: "m",
	source: "s",
	flag: "C",
	...over,
});

describe("compare", () => {
	it("takes an error equal to the tolerance as within, a larger one as not", () => {
		expect(compare(row({ ours: 1.5, tolerance: 0.5 }))).toEqual({ error: 0.5, within: true });
		expect(compare(row({ ours: 1.5, tolerance: 0.49 })).within).toBe(false);
		expect(compare(row({ ours: -3, reference: -2, kind: "relative", tolerance: 0.5 }))).toEqual({ error: 0.5, within: true });
	});

	it.each([Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])("refuses %d wherever it stands", (bad) => {
		for (const key of ["ours", "reference", "tolerance"]) expect(() => compare(row({ [key]: bad }))).toThrow(/not a finite number/);
	});

	it("refuses what no number could meet", () => {
		expect(() => compare(row({ tolerance: -1 }))).toThrow(/-1/);
		expect(() => compare(row({ reference: 0, kind: "relative" }))).toThrow(/relative to a reference of 0/);
	});
});

describe("meter", () => {
	it("gives n, mean and nearest-rank percentiles of each group", () => {
		const ten = Array.from({ length: 10 }, (_, i) => row({ check: `${i}`, ours: 1 + (10 - i), tolerance: 20 }));
		expect(meter([...ten, row({ group: "h", ours: 3, reference: 2, kind: "relative", tolerance: 1 })])).toEqual([
			{ group: "g", unit: "m", n: 10, mean: 5.5, p50: 5, p90: 9, max: 10, allowed: [20, 20], sources: ["s"] },
			{ group: "h", unit: "relative", n: 1, mean: 0.5, p50: 0.5, p90: 0.5, max: 0.5, allowed: [1, 1], sources: ["s"] },
		]);
	});

	it("gives the range of tolerances of a group", () => {
		expect(meter([row({ tolerance: 0.3 }), row({ tolerance: 0.1 })]).map((l) => l.allowed)).toEqual([[0.1, 0.3]]);
	});

	it("keeps kinds and units apart and throws on a number that is not finite", () => {
		expect(meter([row({}), row({ unit: "s" })]).map((l) => l.unit)).toEqual(["m", "s"]);
		expect(() => meter([row({ ours: Number.NaN })])).toThrow(/not a finite number/);
	});
});
