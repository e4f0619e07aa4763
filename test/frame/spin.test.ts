import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { constantSpin, minimumJerk, profileSpin, type SpinPoint } from "../../src/frame/spin.ts";
import { within } from "../support/arbitrary.ts";

const points: fc.Arbitrary<SpinPoint[]> = fc
	.array(fc.record({ wait: within(0.01, 100), rate: within(0, 6) }), { minLength: 1, maxLength: 6 })
	.map((list) => {
		let t = -5;
		return list.map(({ wait, rate }) => {
			t += wait;
			return { t, rate };
		});
	});

describe("a constant spin", () => {
	it("turns by rate × time", () => {
		const spin = constantSpin(0.4);
		expect([spin.rate(7), spin.rateDot(7), spin.angle(5), spin.constant]).toEqual([0.4, 0, 2, true]);
	});
	it.each([-1e-9, Number.NaN, Number.POSITIVE_INFINITY])("is refused at %d rad/s", (rate) => {
		expect(() => constantSpin(rate)).toThrow(RangeError);
	});
});

describe("minimum jerk (Flash & Hogan 1985)", () => {
	it("goes from 0 to 1 at rest and unaccelerated at both ends, half way at half time, peak 1.875 there", () => {
		for (const [x, share] of [
			[0, 0],
			[0.5, 0.5],
			[1, 1],
		] as const)
			expect(minimumJerk.share(x)).toBeCloseTo(share, 15);
		for (const end of [0, 1]) expect([minimumJerk.rate(end), Math.abs(minimumJerk.bend(end))]).toEqual([0, 0]);
		expect(minimumJerk.rate(0.5)).toBe(minimumJerk.peakRate);
		expect(minimumJerk.integral(1)).toBe(0.5);
	});
	it("has its derivatives as such", () => {
		for (let x = 0.05; x < 1; x += 0.05) {
			const h = 1e-5;
			expect((minimumJerk.integral(x + h) - minimumJerk.integral(x - h)) / (2 * h)).toBeCloseTo(minimumJerk.share(x), 9);
			expect((minimumJerk.share(x + h) - minimumJerk.share(x - h)) / (2 * h)).toBeCloseTo(minimumJerk.rate(x), 8);
			expect((minimumJerk.rate(x + h) - minimumJerk.rate(x - h)) / (2 * h)).toBeCloseTo(minimumJerk.bend(x), 7);
		}
	});
});

describe("a profile", () => {
	it("passes its points, holds the rate beyond them, and starts where it is told", () => {
		const spin = profileSpin(
			[
				{ t: 0, rate: 0.2 },
				{ t: 10, rate: 0.6 },
				{ t: 14, rate: 0 },
			],
			4,
		);
		expect([spin.rate(-100), spin.rate(-4), spin.rate(6), spin.rate(10), spin.rate(1e6)]).toEqual([0.2, 0.2, 0.6, 0, 0]);
		expect([spin.rateDot(-5), spin.rateDot(11)]).toEqual([0, 0]);
		expect(spin.angle(0)).toBe(0);
		/** From 4 s to 10 s by the integral of the ramp, then the mean rate of the ramp down. */
		const x = 0.4;
		const before = 10 * (0.2 * x + 0.4 * (2.5 * x ** 4 - 3 * x ** 5 + x ** 6));
		expect(spin.angle(20)).toBeCloseTo(10 * 0.4 + 4 * 0.3 - before, 12);
	});

	it("has ψ as the integral of Ω and Ω̇ as its derivative", () => {
		fc.assert(
			fc.property(points, within(0, 50), within(-20, 300), (list, start, t) => {
				const spin = profileSpin(list, start);
				const h = 1e-3;
				const slope = (spin.angle(t + h) - spin.angle(t - h)) / (2 * h);
				/** A ramp of 10 ms changes within h: the bound is what Ω̇ allows. */
				expect(Math.abs(slope - spin.rate(t))).toBeLessThanOrEqual(spin.greatestRateDot * h + 1e-9);
				const tiny = 1e-6;
				const bend = (spin.rate(t + tiny) - spin.rate(t - tiny)) / (2 * tiny);
				const sharpest = Math.max(0, ...list.slice(1).map((p, i) => (6 * Math.abs(p.rate - list[i]!.rate)) / (p.t - list[i]!.t) ** 2));
				expect(Math.abs(bend - spin.rateDot(t))).toBeLessThanOrEqual(sharpest * tiny + 1e-6);
				expect(spin.rate(t)).toBeGreaterThanOrEqual(0);
				expect(spin.rate(t)).toBeLessThanOrEqual(spin.greatestRate);
				expect(Math.abs(spin.rateDot(t))).toBeLessThanOrEqual(spin.greatestRateDot);
			}),
			{ seed: 11, numRuns: 300 },
		);
	});

	it("integrates like Simpson's rule over many ramps", () => {
		fc.assert(
			fc.property(points, (list) => {
				const spin = profileSpin(list);
				const n = 20_000;
				const end = list.at(-1)!.t + 3;
				const h = end / n;
				let sum = spin.rate(0) + spin.rate(end);
				for (let i = 1; i < n; i++) sum += (i % 2 ? 4 : 2) * spin.rate(i * h);
				expect(Math.abs((sum * h) / 3 - spin.angle(end))).toBeLessThan(1e-4);
			}),
			{ seed: 12, numRuns: 20 },
		);
	});

	it("has its peak change 1.875 ΔΩ / T in the middle of a ramp", () => {
		const spin = profileSpin([
			{ t: 0, rate: 0.377 },
			{ t: 120, rate: 0 },
		]);
		expect(spin.rateDot(60)).toBeCloseTo((-1.875 * 0.377) / 120, 15);
		expect(spin.greatestRateDot).toBeCloseTo((1.875 * 0.377) / 120, 15);
	});

	it.each([
		["no point", [], /no point|point/],
		[
			"times that do not rise",
			[
				{ t: 1, rate: 1 },
				{ t: 1, rate: 2 },
			],
			/does not come after/,
		],
		["a negative rate", [{ t: 0, rate: -0.1 }], /at least 0/],
		["a rate that is no number", [{ t: 0, rate: Number.NaN }], /finite/],
	] as const)("is refused with %s", (_, list, words) => {
		expect(() => profileSpin(list)).toThrow(words);
	});
});
