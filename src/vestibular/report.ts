import type { HeadVec } from "../vector/vec3.ts";
import { CANALS, canalComponents, excitation, leastSquaresHead } from "./canals.ts";
import type { CanalConstants } from "./constants.ts";
import { CanalFilter, type ChannelInput } from "./filter.ts";

/** Uniform sample times from + i · step, s. */
export interface Samples {
	readonly from: number;
	readonly step: number;
	readonly count: number;
}

/** One set of constants for all six canals, or one each in the order of `CANALS`. */
export type ConstantsOfCanals = CanalConstants | readonly CanalConstants[];

export interface InputOptions {
	/** Times where ω or one of its derivatives jumps. */
	readonly breaks?: readonly number[];
	/** The constant ω that the canals have adapted to before `from`; by default ω(from). */
	readonly adaptedTo?: HeadVec;
}

const isEach = (constants: ConstantsOfCanals): constants is readonly CanalConstants[] => Array.isArray(constants);

/** A filter on the three head axes: what six canals with equal constants report by least squares, since their planes cancel out of it. */
export function headAxesFilter(
	omegaHead: (t: number) => HeadVec,
	constants: CanalConstants,
	start: number,
	options: InputOptions = {},
): CanalFilter {
	const input: ChannelInput = (t, out, at) => {
		const v = omegaHead(t);
		out[at] = v[0];
		out[at + 1] = v[1];
		out[at + 2] = v[2];
	};
	return new CanalFilter(input, [constants, constants, constants], start, options.breaks, options.adaptedTo);
}

/** A filter on n · ω of the six planes, in the order of `CANALS`. */
function planesFilter(omegaHead: (t: number) => HeadVec, constants: ConstantsOfCanals, start: number, options: InputOptions): CanalFilter {
	const each = isEach(constants) ? constants : CANALS.map(() => constants);
	if (each.length !== CANALS.length) throw new RangeError(`six canals need six sets of time constants, got ${each.length}`);
	const input: ChannelInput = (t, out, at) => out.set(canalComponents(omegaHead(t)), at);
	return new CanalFilter(input, each, start, options.breaks, options.adaptedTo && canalComponents(options.adaptedTo));
}

/**
 * What each canal reports of the head's absolute angular velocity ω (head axes, rad/s) at the samples:
 * 6 a sample in the order of `CANALS`, rad/s, positive where the canal is excited.
 */
export function canalTraces(
	omegaHead: (t: number) => HeadVec,
	samples: Samples,
	constants: ConstantsOfCanals,
	options: InputOptions = {},
): Float64Array {
	const signs = CANALS.map(excitation);
	const out = planesFilter(omegaHead, constants, samples.from, options).sample(samples.step, samples.count);
	return out.map((value, i) => value * (signs[i % CANALS.length] as number));
}

/**
 * The canals' report of the head's absolute angular velocity ω (head axes, rad/s) at the samples: the
 * least-squares vector of the six, 3 a sample, head axes, rad/s. Good to 1e-8 of its peak.
 */
export function canalReport(
	omegaHead: (t: number) => HeadVec,
	samples: Samples,
	constants: ConstantsOfCanals,
	options: InputOptions = {},
): Float64Array {
	if (!isEach(constants)) return headAxesFilter(omegaHead, constants, samples.from, options).sample(samples.step, samples.count);
	const planes = planesFilter(omegaHead, constants, samples.from, options).sample(samples.step, samples.count);
	const out = new Float64Array(3 * samples.count);
	for (let i = 0; i < samples.count; i++) leastSquaresHead(planes, CANALS.length * i, out, 3 * i);
	return out;
}
