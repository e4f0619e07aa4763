import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { type HeadVec, head } from "../../src/vector/vec3.ts";
import { CANAL_NORMALS, CANALS } from "../../src/vestibular/canals.ts";
import { type CanalConstants, DEFAULT_CONSTANTS } from "../../src/vestibular/constants.ts";
import { CanalFilter } from "../../src/vestibular/filter.ts";
import { canalReport, canalTraces } from "../../src/vestibular/report.ts";
import { integrated, relativeError } from "./integrate.ts";

const ADAPTING: CanalConstants = { ...DEFAULT_CONSTANTS, adaptation: 80 };
const still = head(0, 0, 0);
const times = (step: number, count: number): number[] => Array.from({ length: count }, (_, i) => i * step);
const column = (report: Float64Array, k: number): Float64Array => report.filter((_, i) => i % 3 === k);

describe("step of rotation", () => {
	const step = (constants: CanalConstants, dt: number, count: number): Float64Array =>
		column(
			canalReport(() => head(1, 0, 0), { from: 0, step: dt, count }, constants, { adaptedTo: still }),
			0,
		);

	it.each([0.001, 1 / 120, 0.25])("decays as the two exponentials of the torsion pendulum, sampled every %d s", (dt) => {
		const { cupula, short } = DEFAULT_CONSTANTS;
		const exact = times(dt, 200).map((t) => (cupula / (cupula - short)) * (Math.exp(-t / cupula) - Math.exp(-t / short)));
		expect(relativeError(step(DEFAULT_CONSTANTS, dt, 200), exact)).toBeLessThan(1e-11);
	});

	it("undershoots with adaptation, as the partial fractions say", () => {
		const [c, s, a] = [5.7, 0.005, 80];
		const poles = [-1 / c, -1 / s, -1 / a];
		/** τ_c τ_a s / ((τ_c s + 1)(τ_s s + 1)(τ_a s + 1)): H times 1/s. */
		const exact = times(0.5, 400).map((t) =>
			poles.reduce((sum, p, i) => {
				const others = poles.reduce((product, o, j) => (i === j ? product : product * (p - o)), 1);
				return sum + ((p / s) * Math.exp(p * t)) / others;
			}, 0),
		);
		const ours = step(ADAPTING, 0.5, 400);
		expect(Math.min(...exact)).toBeLessThan(-0.045);
		expect(relativeError(ours, exact)).toBeLessThan(1e-11);
	});

	it("is t/τ e^(−t/τ) where both constants are equal, which partial fractions cannot say", () => {
		const ours = step({ cupula: 2, short: 2, adaptation: null }, 0.1, 200);
		expect(
			relativeError(
				ours,
				times(0.1, 200).map((t) => (t / 2) * Math.exp(-t / 2)),
			),
		).toBeLessThan(1e-12);
	});
});

describe("steady sine", () => {
	it.each([0.01, 0.1, 1, 5, 20])("at %d Hz has the gain and phase of the transfer function once the start has died out", (hertz) => {
		const w = 2 * Math.PI * hertz;
		const { cupula, short } = DEFAULT_CONSTANTS;
		const dt = 1 / 120;
		const ours = column(
			canalReport((t) => head(Math.sin(w * t), 0, 0), { from: 0, step: dt, count: 18_001 }, DEFAULT_CONSTANTS),
			0,
		);
		/** H(jω) = jωτ_c / ((1 − ω²τ_cτ_s) + jω(τ_c + τ_s)). */
		const [re, im] = [1 - w * w * cupula * short, w * (cupula + short)];
		const gain = (w * cupula) / Math.hypot(re, im);
		const phase = Math.PI / 2 - Math.atan2(im, re);
		const exact = times(dt, 18_001).map((t) => gain * Math.sin(w * t + phase));
		expect(relativeError(ours.subarray(14_400), exact.slice(14_400))).toBeLessThan(1e-8);
	});
});

describe("against odex", () => {
	const wobble = (t: number): HeadVec => head(Math.sin(6 * t) + 0.4, 0.3 * Math.cos(3 * t), Math.exp(-t) * Math.sin(11 * t));

	it.each([
		["default", DEFAULT_CONSTANTS],
		["adaptation 80 s", ADAPTING],
		["τ_c 15 s, τ_s 3 ms", { cupula: 15, short: 0.003, adaptation: null }],
	] as const)("a wobbling head is right to 1e-8 of the peak (%s)", (_, constants) => {
		const reference = integrated(wobble, [...wobble(0)], constants, 0, times(0.05, 41)).flat();
		expect(relativeError(canalReport(wobble, { from: 0, step: 0.05, count: 41 }, constants), reference)).toBeLessThan(1e-8);
	});

	it("a jump announced as a break, off the samples, is right to 1e-8", () => {
		const at = 0.537;
		const jump = (t: number): HeadVec => head(t < at ? 0.1 : -0.4, 0, t < at ? 0 : t - at);
		const wanted = [0, 0.25, 0.5, 0.75, 1];
		const before = integrated((t) => jump(Math.min(t, at - 1e-12)), [...jump(0)], DEFAULT_CONSTANTS, 0, [0, 0.25, 0.5]);
		const after = integrated((t) => [-0.4, 0, t - at], [-0.4, 0, 0], DEFAULT_CONSTANTS, at, [0.75, 1]);
		/* The jump itself is a step of −0.5 in x, of closed form. */
		const { cupula, short } = DEFAULT_CONSTANTS;
		const reference = wanted.flatMap((t, i) =>
			t < at
				? (before[i] as number[])
				: (after[i - 3] as number[]).map(
						(v, k) => v + (k === 0 ? (-0.5 * cupula * (Math.exp(-(t - at) / cupula) - Math.exp(-(t - at) / short))) / (cupula - short) : 0),
					),
		);
		expect(
			relativeError(canalReport(jump, { from: 0, step: 0.25, count: 5 }, DEFAULT_CONSTANTS, { breaks: [at] }), reference),
		).toBeLessThan(1e-8);
	});

	it("a jump that nobody announced is still found to a microsecond", () => {
		const jump = (t: number): HeadVec => head(t < 0.537 ? 0 : 1, 0, 0);
		const samples = { from: 0, step: 1 / 120, count: 121 };
		const reference = [...canalReport(jump, samples, DEFAULT_CONSTANTS, { breaks: [0.537] })];
		expect(relativeError(canalReport(jump, samples, DEFAULT_CONSTANTS), reference)).toBeLessThan(5e-4);
	});
});

describe("properties", () => {
	const amplitudes = fc.array(fc.double({ min: -5, max: 5, noNaN: true }), { minLength: 3, maxLength: 3 });
	const motion =
		([a, b, c]: readonly number[], mirror = 1) =>
		(t: number): HeadVec =>
			head(mirror * (a as number) * Math.sin(5 * t), (b as number) * t * Math.exp(-t), mirror * (c as number) * Math.cos(2 * t));
	const samples = { from: 0, step: 0.02, count: 60 };

	it("linear: the report of a sum is the sum of reports (seed 91)", () => {
		fc.assert(
			fc.property(amplitudes, amplitudes, (a, b) => {
				const sum = a.map((x, i) => x + (b[i] as number));
				const [ra, rb, rs] = [a, b, sum].map((x) => canalReport(motion(x), samples, ADAPTING)) as [
					Float64Array,
					Float64Array,
					Float64Array,
				];
				for (let i = 0; i < rs.length; i++) expect(Math.abs((rs[i] as number) - (ra[i] as number) - (rb[i] as number))).toBeLessThan(1e-7);
			}),
			{ seed: 91, numRuns: 40 },
		);
	});

	it("mirror: rotation mirrored in the median plane is reported mirrored, through six equal planes too (seed 92)", () => {
		fc.assert(
			fc.property(amplitudes, (a) => {
				const there = canalReport(motion(a), samples, DEFAULT_CONSTANTS);
				const mirrored = canalReport(motion(a, -1), samples, DEFAULT_CONSTANTS);
				const planes = canalReport(
					motion(a),
					samples,
					CANALS.map(() => DEFAULT_CONSTANTS),
				);
				for (let i = 0; i < there.length; i++) {
					expect(Math.abs((mirrored[i] as number) - (i % 3 === 1 ? 1 : -1) * (there[i] as number))).toBeLessThan(1e-12);
					expect(Math.abs((planes[i] as number) - (there[i] as number))).toBeLessThan(1e-7);
				}
			}),
			{ seed: 92, numRuns: 40 },
		);
	});

	it("the sampling step does not matter", () => {
		const coarse = canalReport(motion([1, 2, 3]), { from: 0, step: 0.9, count: 9 }, DEFAULT_CONSTANTS);
		const fine = canalReport(motion([1, 2, 3]), { from: 0, step: 0.009, count: 801 }, DEFAULT_CONSTANTS);
		for (let i = 0; i < 9; i++)
			for (const k of [0, 1, 2]) expect(Math.abs((coarse[3 * i + k] as number) - (fine[300 * i + k] as number))).toBeLessThan(1e-8);
	});

	it("canals with constants of their own pull the report off the axis of the turn", () => {
		const each = CANALS.map((_, i) => ({ ...DEFAULT_CONSTANTS, cupula: 4 + i }));
		const yaw = (): HeadVec => head(0, 0, 1);
		const reference = CANALS.map(
			(id, i) => integrated(() => [CANAL_NORMALS[id][2]], [0], each[i] as CanalConstants, 0, [1])[0]?.[0] as number,
		);
		const traces = canalTraces(yaw, { from: 0, step: 1, count: 2 }, each, { adaptedTo: still });
		for (let i = 0; i < 6; i++) expect(traces[6 + i]).toBeCloseTo((i < 3 ? 1 : -1) * (reference[i] as number), 9);
		const report = canalReport(yaw, { from: 0, step: 1, count: 2 }, each, { adaptedTo: still });
		expect(Math.hypot(report[3] as number, report[4] as number)).toBeGreaterThan(1e-3);
	});

	it("a turn to the left excites the left horizontal canal and inhibits the right one", () => {
		const traces = canalTraces(() => head(0, 0, 1), { from: 0, step: 0.1, count: 2 }, DEFAULT_CONSTANTS, { adaptedTo: still });
		expect(traces[6 + CANALS.indexOf("LH")]).toBeGreaterThan(0.9);
		expect(traces[6 + CANALS.indexOf("RH")]).toBeLessThan(-0.9);
	});

	it("a constant rotation that it has adapted to is reported as exactly nothing", () => {
		const report = canalReport(() => head(0.3, -0.4, 0.1), { from: 5, step: 0.3, count: 500 }, ADAPTING);
		expect(report.every((v) => v === 0)).toBe(true);
	});
});

describe("bad calls are refused in a sentence", () => {
	const samples = { from: 0, step: 0.1, count: 5 };
	it.each([
		[
			"an input that is not a number",
			() => canalReport((t) => head(t > 0.2 ? Number.NaN : 0, 0, 0), samples, DEFAULT_CONSTANTS),
			/not finite near/,
		],
		[
			"an infinite input at the start",
			() => canalReport(() => head(0, Number.POSITIVE_INFINITY, 0), samples, DEFAULT_CONSTANTS),
			/adapted to Infinity/,
		],
		["τ_c 0", () => canalReport(() => still, samples, { ...DEFAULT_CONSTANTS, cupula: 0 }), /cupula time constant .* got 0/],
		["τ_s NaN", () => canalReport(() => still, samples, { ...DEFAULT_CONSTANTS, short: Number.NaN }), /short time constant/],
		["τ_a −1", () => canalReport(() => still, samples, { ...DEFAULT_CONSTANTS, adaptation: -1 }), /adaptation time constant/],
		[
			"five canals",
			() =>
				canalReport(
					() => still,
					samples,
					[1, 2, 3, 4, 5].map(() => DEFAULT_CONSTANTS),
				),
			/six canals .* got 5/,
		],
		["no samples", () => canalReport(() => still, { ...samples, count: 0 }, DEFAULT_CONSTANTS), /sampled 0 times/],
		["a step of 0", () => canalReport(() => still, { ...samples, step: 0 }, DEFAULT_CONSTANTS), /every 0 s/],
		["time backwards", () => new CanalFilter(() => {}, [DEFAULT_CONSTANTS], 1).advanceTo(0), /at 1 s cannot go to 0 s/],
	])("%s", (_, call, message) => {
		expect(call).toThrow(message);
	});
});
