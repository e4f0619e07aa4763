import type { Spin } from "../frame/spin.ts";
import { radFromDeg } from "../quantity/convert.ts";
import { type HeadVec, head, unit } from "../vector/vec3.ts";
import { type CanalConstants, CUPULA_BAND } from "./constants.ts";
import type { CanalFilter, FilterState } from "./filter.ts";
import { type HeadTurn, spinInHead } from "./head-turn.ts";
import { peakOf, vectorAt } from "./peak.ts";
import { headAxesFilter } from "./report.ts";

/** A peak below this is none, rad/s (1e-9 °/s). */
const NONE = radFromDeg(1e-9);

/**
 * The cross-coupled illusion (modelled): what the canals report of a head turn in the spinning ring less
 * what they report of the same turn at rest. The canals are linear, so it is their report of Rᵀ(t)Ω. It
 * starts adapted to the spin. Not a prediction of sickness.
 */
export interface Illusion {
	/** Greatest size, rad/s; 0 where there is none. */
	readonly peak: number;
	/** When, s. */
	readonly peakTime: number;
	/** Unit vector at the peak, head axes; null where there is none. */
	readonly axis: HeadVec | null;
	/** From the end of the turn until it stays below the threshold, s; 0 if never above it after the turn. */
	readonly settle: number;
}

const illusionFilter = (turn: HeadTurn, spin: Spin, spinAxis: HeadVec, constants: CanalConstants): CanalFilter =>
	headAxesFilter(spinInHead(turn, spin, spinAxis), constants, 0, { breaks: [0, turn.duration] });

/** Lengths of 3 numbers each. */
const sizes = (v: Float64Array): Float64Array =>
	Float64Array.from({ length: v.length / 3 }, (_, i) => Math.hypot(v[3 * i] as number, v[3 * i + 1] as number, v[3 * i + 2] as number));

/** `spinAxis`: unit, head axes at t = 0; `threshold`: rad/s, above 0; from `steadyFrom` (s) on the spin is constant. */
export function crossCoupledIllusion(
	turn: HeadTurn,
	spin: Spin,
	spinAxis: HeadVec,
	constants: CanalConstants,
	threshold: number,
	steadyFrom = 0,
): Illusion {
	if (!(threshold > 0)) throw new RangeError(`an illusion settles below a threshold above 0 rad/s, got ${threshold}`);
	if (!spin.constant && steadyFrom === 0)
		throw new RangeError("at a changing spin the illusion needs the time from which the spin is constant");
	const found = illusionPeak(turn, spin, spinAxis, constants);
	if (found.peak === 0) return { ...found, settle: 0 };
	const filter = illusionFilter(turn, spin, spinAxis, constants);
	filter.advanceTo(turn.duration);
	const last = lastAbove(filter, afterTurn(turn, spin, constants, threshold, steadyFrom), threshold);
	return { ...found, settle: last === null ? 0 : last - turn.duration };
}

/** Peak, its time and its axis: over the turn and the 40 τ_s after it, within which a very short turn still builds up. */
export function illusionPeak(turn: HeadTurn, spin: Spin, spinAxis: HeadVec, constants: CanalConstants): Omit<Illusion, "settle"> {
	const filter = illusionFilter(turn, spin, spinAxis, constants);
	let best: { peak: number; peakTime: number; at: readonly number[] } = { peak: 0, peakTime: 0, at: [] };
	for (const { step, count } of [{ step: turn.duration / 256, count: 257 }, shortTail(constants)]) {
		const start = filter.save();
		const { index } = peakOf(sizes(filter.sample(step, count)));
		const end = filter.save();
		filter.restore(start);
		filter.advanceTo(start.time + Math.max(0, index - 1) * step);
		const from = filter.time;
		const near = filter.sample(step / 32, 32 * (Math.min(count - 1, index + 1) - Math.max(0, index - 1)) + 1);
		const top = peakOf(sizes(near));
		if (top.value > best.peak) best = { peak: top.value, peakTime: from + ((top.index + top.offset) * step) / 32, at: vectorAt(near, top) };
		filter.restore(end);
	}
	if (best.peak < NONE) return { peak: 0, peakTime: 0, axis: null };
	return { peak: best.peak, peakTime: best.peakTime, axis: unit(head(...(best.at as [number, number, number]))) };
}

/** Least and greatest peak over τ_c of 4.2 to 15 s, rad/s: it grows with τ_c, so those of the two ends. */
export function illusionBand(
	turn: HeadTurn,
	spin: Spin,
	spinAxis: HeadVec,
	constants: CanalConstants,
): readonly [low: number, high: number] {
	const [low, high] = CUPULA_BAND.map((cupula) => illusionPeak(turn, spin, spinAxis, { ...constants, cupula }).peak) as [number, number];
	return [low, high];
}

interface Grid {
	readonly step: number;
	readonly count: number;
}

/** 40 τ_s, after which e^(−t/τ_s) is nothing. */
const shortTail = (constants: CanalConstants): Grid => ({ step: constants.short / 8, count: 321 });

/**
 * Grids on which the illusion is followed from the end of the turn: until the spin is steady, 40 τ_s, and
 * on until it must be below the threshold. There it is at most 8 Ω (1 + t/τ_a) e^(−t/τ), τ the longest.
 */
function afterTurn(turn: HeadTurn, spin: Spin, constants: CanalConstants, threshold: number, steadyFrom: number): Grid[] {
	const taus = [constants.cupula, constants.adaptation ?? constants.cupula];
	const horizon = 2 * Math.max(2, Math.log((8 * spin.greatestRate) / threshold)) * ((taus[0] as number) + (taus[1] as number));
	const count = Math.min(100_000, Math.ceil((16 * horizon) / Math.min(...taus)));
	const wait = steadyFrom - turn.duration;
	return [...(wait > 0 ? [{ step: wait / 1024, count: 1025 }] : []), shortTail(constants), { step: horizon / count, count: count + 1 }];
}

/** The last time at which the filter's report is above the threshold, or null; the filter is at the start of the first grid. */
function lastAbove(filter: CanalFilter, grids: readonly Grid[], threshold: number): number | null {
	let found: { state: FilterState; index: number; step: number } | null = null;
	for (const { step, count } of grids) {
		const state = filter.save();
		const index = sizes(filter.sample(step, count)).findLastIndex((s) => s > threshold);
		if (index >= 0) found = { state, index, step };
	}
	if (!found) return null;
	let { state, index, step } = found;
	for (let level = 0; level < 4; level++) {
		filter.restore(state);
		filter.advanceTo(state.time + index * step);
		state = filter.save();
		step /= 32;
		index = sizes(filter.sample(step, 33)).findLastIndex((s) => s > threshold);
	}
	filter.restore(state);
	const fine = sizes(filter.sample(step, 33));
	const [above, below] = [fine[index] as number, fine[index + 1] ?? threshold];
	return state.time + (index + (above > below ? (above - threshold) / (above - below) : 1)) * step;
}
