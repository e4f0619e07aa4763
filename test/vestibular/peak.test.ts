import { describe, expect, it } from "vitest";
import { peakOf, vectorAt } from "../../src/vestibular/peak.ts";

describe("peak of samples", () => {
	it("is exact for a parabola between its samples", () => {
		const peak = peakOf([0, 1, 2, 3, 4].map((x) => 7 - 2 * (x - 2.3) ** 2));
		expect(peak.index + peak.offset).toBeCloseTo(2.3, 14);
		expect(peak.value).toBeCloseTo(7, 14);
	});

	it("is the sample itself at either end and on a plateau", () => {
		expect(peakOf([3, 2, 1])).toEqual({ value: 3, index: 0, offset: 0 });
		expect(peakOf([1, 2, 3])).toEqual({ value: 3, index: 2, offset: 0 });
		expect(peakOf([5, 5, 5])).toEqual({ value: 5, index: 0, offset: 0 });
	});

	it("gives the vector there", () => {
		const samples = Float64Array.from([0, 1, 2].flatMap((x) => [x, x * x, 3]));
		const [a, b, c] = vectorAt(samples, { value: 0, index: 1, offset: 0.25 }) as [number, number, number];
		expect([a, c]).toEqual([1.25, 3]);
		expect(b).toBeCloseTo(1.5625, 15);
		expect(vectorAt(samples, { value: 0, index: 2, offset: 0 })).toEqual([2, 4, 3]);
	});

	it.each([[[]], [[1, Number.NaN]], [[Number.POSITIVE_INFINITY]]])("refuses %j", (samples) => {
		expect(() => peakOf(samples)).toThrow(RangeError);
	});
});
