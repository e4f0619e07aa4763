/** Below this a number is rounding noise of sums that cancel: no quantity of this field is meant so small. */
const NOISE = 1e-12;

/**
 * A written number: 9 significant figures, minus zero and noise below 1e-12 as zero. Engines differ in
 * the last bits of sin, cos and their kin; every tie and threshold is decided on this value.
 * Throws RangeError on a value that is not finite: a written number never is.
 */
export function written(value: number): number {
	if (!Number.isFinite(value)) throw new RangeError(`a written number must be finite, got ${value}`);
	return Math.abs(value) < NOISE ? 0 : Number(value.toPrecision(9));
}
