import { scaleLinear } from "d3-scale";

/** A value against its limit on one line, for a bar from the limit: all places are shares 0…1 of the line. */
export interface MarginBar {
	/** The values at both ends of the line. */
	readonly low: number;
	readonly high: number;
	readonly limitAt: number;
	readonly valueAt: number;
}

/** The line reaches from 0 (or below) over value and limit to round ends. Throws RangeError on a number that is not finite. */
export function marginBar(value: number, limit: number): MarginBar {
	if (!Number.isFinite(value) || !Number.isFinite(limit))
		throw new RangeError(`a margin needs finite numbers, got ${value} against ${limit}`);
	const low = Math.min(0, value, limit);
	const high = Math.max(0, value, limit);
	const room = 0.15 * (high - low || 1);
	const scale = scaleLinear([low < 0 ? low - room : 0, high > 0 || low === 0 ? high + room : room], [0, 1]).nice(4);
	const [from, to] = scale.domain() as [number, number];
	return { low: from, high: to, limitAt: scale(limit), valueAt: scale(value) };
}
