import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { marginBar } from "../../src/drawing/margin.ts";

describe("marginBar", () => {
	test("a value well within an at-most limit", () => {
		const bar = marginBar(2.84, 40);
		expect([bar.low, bar.high]).toEqual([0, 50]);
		expect(bar.limitAt).toBeCloseTo(0.8, 12);
		expect(bar.valueAt).toBeCloseTo(0.0568, 4);
	});
	test("a limit of 0 and a value below it", () => {
		const bar = marginBar(-0.28, 0);
		expect(bar.low).toBeLessThan(-0.28);
		expect(bar.high).toBeGreaterThan(0);
		expect(bar.valueAt).toBeLessThan(bar.limitAt);
	});
	test("value and limit both 0", () => {
		const bar = marginBar(0, 0);
		expect(bar.valueAt).toBe(bar.limitAt);
		expect(bar.high).toBeGreaterThan(bar.low);
	});
	test("NaN throws", () => expect(() => marginBar(Number.NaN, 1)).toThrow("got NaN against 1"));
	test("both lie on the line, in order (property)", () => {
		const finite = fc.double({ min: -1e9, max: 1e9, noNaN: true });
		fc.assert(
			fc.property(finite, finite, (value, limit) => {
				const bar = marginBar(value, limit);
				for (const at of [bar.limitAt, bar.valueAt]) {
					expect(at).toBeGreaterThanOrEqual(-1e-9);
					expect(at).toBeLessThanOrEqual(1 + 1e-9);
				}
				expect(Math.sign(bar.valueAt - bar.limitAt) * Math.sign(value - limit)).toBeGreaterThanOrEqual(0);
			}),
			{ seed: 31 },
		);
	});
});
