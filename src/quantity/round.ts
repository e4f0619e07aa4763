/**
 * A written number: 9 significant figures, minus zero as zero. Engines differ in the last bits of
 * sin, cos and their kin; every tie and threshold is decided on this value.
 * Throws RangeError on a value that is not finite: a written number never is.
 */
export function written(value: number): number {
	if (!Number.isFinite(value)) throw new RangeError(`a written number must be finite, got ${value}`);
	const rounded = Number(value.toPrecision(9));
	return rounded === 0 ? 0 : rounded;
}
