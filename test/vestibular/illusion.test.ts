import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { constantSpin, profileSpin } from "../../src/frame/spin.ts";
import { degFromRad, radFromDeg, radpsFromRpm } from "../../src/quantity/convert.ts";
import { head, length, unit } from "../../src/vector/vec3.ts";
import { type CanalConstants, DEFAULT_CONSTANTS } from "../../src/vestibular/constants.ts";
import { headTurnCues } from "../../src/vestibular/cues.ts";
import { type HeadTurn, headRate, spinAxisInHead, spinInHead, TURN_AXES } from "../../src/vestibular/head-turn.ts";
import { crossCoupledIllusion, illusionBand, illusionPeak } from "../../src/vestibular/illusion.ts";
import { canalReport } from "../../src/vestibular/report.ts";
import { integrated, relativeError, solveODE } from "./integrate.ts";

const FOUR_RPM = constantSpin(radpsFromRpm(4));
const THRESHOLD = radFromDeg(2);
const LEFT: HeadTurn = { axis: TURN_AXES.yaw, angle: radFromDeg(90), duration: 0.8 };
const PROGRADE = spinAxisInHead(0);
const ADAPTING: CanalConstants = { ...DEFAULT_CONSTANTS, adaptation: 80 };

const spun: (t: number) => readonly number[] = headRate(LEFT, FOUR_RPM, PROGRADE);
const sizeAt = (v: ArrayLike<number>, i: number): number => Math.hypot(v[3 * i] as number, v[3 * i + 1] as number, v[3 * i + 2] as number);

describe("report of a head turn at 4 rpm", () => {
	const wanted = [...Array.from({ length: 17 }, (_, i) => i * 0.05), 1, 1.5, 2, 4, 8];
	const ours = (): number[] => {
		const report = canalReport(headRate(LEFT, FOUR_RPM, PROGRADE), { from: 0, step: 0.05, count: 161 }, DEFAULT_CONSTANTS, {
			breaks: [0, LEFT.duration],
		});
		return wanted.flatMap((t) => [...report.subarray(3 * Math.round(t / 0.05), 3 * Math.round(t / 0.05) + 3)]);
	};

	it("agrees with odex to 1e-8 of its peak", () => {
		expect(relativeError(ours(), integrated(spun, spun(0), DEFAULT_CONSTANTS, 0, wanted).flat())).toBeLessThan(1e-8);
	});

	it("agrees with mathjs' Runge–Kutta half-way through, in the forward part, where the illusion is", () => {
		const { cupula, short } = DEFAULT_CONSTANTS;
		const at = 8;
		const start = spun(0)[0] as number;
		const rates = (t: number, [z, w]: readonly number[]): number[] => [
			((spun(t)[0] as number) - (z as number)) / short,
			((z as number) - (w as number)) / cupula,
		];
		const [z, w] = solveODE(rates, [0, wanted[at] as number], [start, start], { method: "RK45", tol: 1e-9, maxStep: 0.02 }).y.at(-1) as [
			number,
			number,
		];
		expect(relativeError([ours()[3 * at] as number], [z - w])).toBeLessThan(1e-7);
	});
});

describe("cross-coupled illusion", () => {
	it("is the report in the spinning ring less that of the same turn at rest", () => {
		const samples = { from: 0, step: 1 / 120, count: 600 };
		const cues = headTurnCues(LEFT, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS, samples);
		const atRest = headTurnCues(LEFT, constantSpin(0), PROGRADE, DEFAULT_CONSTANTS, samples);
		expect(atRest.illusion.every((v) => v === 0)).toBe(true);
		for (let i = 0; i < cues.report.length; i++)
			expect(Math.abs((cues.report[i] as number) - (atRest.report[i] as number) - (cues.illusion[i] as number))).toBeLessThan(2e-8);
		for (let i = 0; i < samples.count; i++) {
			const apart = [0, 1, 2].map((k) => (cues.turn[3 * i + k] as number) - (cues.report[3 * i + k] as number));
			expect(cues.disagreement[i]).toBeCloseTo(Math.hypot(...apart), 14);
		}
		expect(() => headTurnCues(LEFT, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS, { ...samples, from: 0.1 })).toThrow(/not from 0.1 s/);
	});

	it("of a fast turn nearly reaches |Δω| = 2 Ω sin(a/2) and decays with τ_c: settling by the closed form", () => {
		const fast: HeadTurn = { ...LEFT, duration: 0.05 };
		const found = crossCoupledIllusion(fast, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS, THRESHOLD);
		expect(degFromRad(found.peak)).toBeGreaterThan(33.941 * 0.98);
		expect(degFromRad(found.peak)).toBeLessThan(33.941);
		const after = canalReport(spinInHead(fast, FOUR_RPM, PROGRADE), { from: 0, step: 1.05, count: 2 }, DEFAULT_CONSTANTS, {
			breaks: [0, 0.05],
		});
		expect(found.settle).toBeCloseTo(1 + 5.7 * Math.log(sizeAt(after, 1) / THRESHOLD), 7);
	});

	it.each([
		["default", LEFT, DEFAULT_CONSTANTS],
		["adaptation", LEFT, ADAPTING],
		["a turn of 10 ms, which peaks after its end", { ...LEFT, duration: 0.01 }, DEFAULT_CONSTANTS],
		["a slow turn back", { ...LEFT, angle: -1, duration: 12 }, ADAPTING],
	] as const)("peak, axis and settling are those of a dense odex run (%s)", (_, turn, constants) => {
		const found = crossCoupledIllusion(turn, FOUR_RPM, PROGRADE, constants, THRESHOLD);
		const input: (t: number) => readonly number[] = spinInHead(turn, FOUR_RPM, PROGRADE);
		const step = 0.0005;
		const start = Math.max(0, found.peakTime - 5 * step);
		const dense = Array.from({ length: 11 }, (_, i) => start + i * step);
		const times = [...new Set([...dense, turn.duration].sort((a, b) => a - b))];
		const reference = integrated(input, input(0), constants, 0, times);
		const sizes = dense.map((t) => Math.hypot(...(reference[times.indexOf(t)] as number[])));
		const top = sizes.indexOf(Math.max(...sizes));
		expect(Math.abs(found.peak / (sizes[top] as number) - 1)).toBeLessThan(turn.duration < 0.1 ? 2e-5 : 1e-7);
		expect(found.peak).toBeGreaterThanOrEqual((sizes[top] as number) * (1 - 1e-9));
		const vector = reference[times.indexOf(dense[top] as number)] as number[];
		expect(
			length(
				head(
					...((found.axis as readonly number[]).map((x, k) => x - (vector[k] as number) / (sizes[top] as number)) as [
						number,
						number,
						number,
					]),
				),
			),
		).toBeLessThan(2e-3);
		const end = turn.duration + found.settle;
		const [atEnd, later] = integrated(input, input(0), constants, 0, [...new Set([turn.duration, end, end + 1])]).slice(-2) as [
			number[],
			number[],
		];
		if (found.settle > 0) expect(Math.hypot(...atEnd)).toBeCloseTo(THRESHOLD, 8);
		expect(Math.hypot(...later)).toBeLessThan(THRESHOLD);
	});

	it("finds a peak after the end of a very short turn, and none of settling under a high threshold", () => {
		const blink: HeadTurn = { ...LEFT, duration: 0.01 };
		expect(illusionPeak(blink, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS).peakTime).toBeGreaterThan(0.012);
		expect(crossCoupledIllusion(LEFT, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS, 10).settle).toBe(0);
	});

	it("is none about the spin axis or without spin: peak 0, axis null, settling 0 (seed 111)", () => {
		const none = { peak: 0, peakTime: 0, axis: null, settle: 0 };
		fc.assert(
			fc.property(
				fc.tuple(...[0, 1, 2].map(() => fc.double({ min: -1, max: 1, noNaN: true }))).filter((v) => Math.hypot(...v) > 0.1),
				fc.double({ min: -3, max: 3, noNaN: true }),
				fc.constantFrom(DEFAULT_CONSTANTS, ADAPTING),
				(v, angle, constants) => {
					const axis = unit(head(...(v as [number, number, number])));
					const along: HeadTurn = { axis, angle, duration: 0.6 };
					expect(crossCoupledIllusion(along, constantSpin(6), axis, constants, THRESHOLD)).toEqual(none);
					expect(crossCoupledIllusion(along, constantSpin(0), PROGRADE, constants, THRESHOLD)).toEqual(none);
				},
			),
			{ seed: 111, numRuns: 25 },
		);
	});

	it("is linear in the spin, and mirrored for the opposite turn facing the other way", () => {
		const once = illusionPeak(LEFT, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS);
		const twice = illusionPeak(LEFT, constantSpin(2 * FOUR_RPM.rate(0)), PROGRADE, DEFAULT_CONSTANTS);
		expect(twice.peak / once.peak).toBeCloseTo(2, 9);
		/* In the median plane an angular velocity keeps y and turns x and z over: yaw right, spin axis as before. */
		const right = illusionPeak({ ...LEFT, angle: -LEFT.angle }, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS);
		expect(right.peak).toBeCloseTo(once.peak, 12);
		for (const [k, sign] of [-1, 1, -1].entries()) expect(right.axis?.[k]).toBeCloseTo(sign * (once.axis?.[k] as number), 9);
	});

	it("facing prograde at 4 rpm, a yaw to the left is felt as a roll of the left ear up at first", () => {
		const early = canalReport(spinInHead(LEFT, FOUR_RPM, PROGRADE), { from: 0, step: 0.2, count: 2 }, DEFAULT_CONSTANTS, {
			breaks: [0, 0.8],
		});
		expect(Math.abs(early[3] as number)).toBeGreaterThan(5 * Math.abs(early[4] as number));
		/* Spin axis on the right (−Y): Ω × ω_turn = −Y × Z = −X. */
		expect(early[3]).toBeLessThan(0);
	});

	it("band: the peak grows with τ_c, so 4.2 and 15 s bound all between", () => {
		for (const turn of [LEFT, { ...LEFT, duration: 8 }])
			for (const adaptation of [null, 80]) {
				const [low, high] = illusionBand(turn, FOUR_RPM, PROGRADE, { ...DEFAULT_CONSTANTS, adaptation });
				let before = low * (1 - 1e-12);
				for (const cupula of [4.2, 5, 5.7, 8, 12, 15]) {
					const { peak } = illusionPeak(turn, FOUR_RPM, PROGRADE, { ...DEFAULT_CONSTANTS, cupula, adaptation });
					expect(peak).toBeGreaterThanOrEqual(before);
					before = peak;
				}
				expect(before).toBeCloseTo(high, 12);
				expect(high).toBeGreaterThan(low);
			}
	});

	it("at a changing spin needs to know from when it holds, and then settles", () => {
		const down = profileSpin([
			{ t: 0, rate: 0.4 },
			{ t: 30, rate: 0.1 },
		]);
		expect(() => crossCoupledIllusion(LEFT, down, PROGRADE, DEFAULT_CONSTANTS, THRESHOLD)).toThrow(/time from which the spin is constant/);
		const found = crossCoupledIllusion(LEFT, down, PROGRADE, DEFAULT_CONSTANTS, THRESHOLD, 30);
		const samples = { from: 0, step: 0.1, count: 1001 };
		const after = headTurnCues(LEFT, down, PROGRADE, DEFAULT_CONSTANTS, samples).illusion;
		const last = Array.from({ length: samples.count }, (_, i) => sizeAt(after, i)).findLastIndex((s) => s > THRESHOLD);
		expect(Math.abs(LEFT.duration + found.settle - last * 0.1)).toBeLessThan(0.1);
		expect(() => crossCoupledIllusion(LEFT, FOUR_RPM, PROGRADE, DEFAULT_CONSTANTS, 0)).toThrow(/threshold above 0 rad\/s, got 0/);
	});
});
