import { expect, test } from "vitest";
import { keeps, median, undisturbed } from "./bench.ts";

test.each([
	[2.5, "≤ 2.5 ×", true],
	[2.51, "≤ 2.5 ×", false],
	[200, "≥ 200 ×", true],
	[199, "≥ 200 ×", false],
	[150_000, "≥ 150,000 releases", true],
	[Number.NaN, "≤ 2.5 ×", false],
	[Number.POSITIVE_INFINITY, "≥ 200 ×", false],
])("%d against %s: %s", (measured, goal, kept) => {
	expect(keeps(measured, goal)).toBe(kept);
});

test("a goal without a number is no goal", () => {
	expect(() => keeps(1, "fast")).toThrow('not "fast"');
});

test("the median is the middle one", () => {
	expect([median([3, 1, 2]), median([4, 1, 3, 2]), median([])]).toEqual([2, 3, Number.NaN]);
});

test("the undisturbed time is the lower quartile", () => {
	expect([undisturbed([8, 1, 2, 9, 3, 7, 4, 6]), undisturbed([5]), undisturbed([])]).toEqual([3, 5, Number.NaN]);
});
