/** The greatest of samples of a smooth curve, and where: at sample `index` + `offset` (−½…½), by the parabola through it and its neighbours. */
export interface Peak {
	readonly value: number;
	readonly index: number;
	readonly offset: number;
}

/** Throws RangeError on no samples or one that is not finite. */
export function peakOf(samples: ArrayLike<number>): Peak {
	let index = 0;
	for (let i = 0; i < samples.length; i++) {
		if (!Number.isFinite(samples[i])) throw new RangeError(`sample ${i} is ${samples[i]}, not a finite number`);
		if ((samples[i] as number) > (samples[index] as number)) index = i;
	}
	const here = samples[index];
	if (here === undefined) throw new RangeError("no samples have no peak");
	const before = samples[index - 1];
	const after = samples[index + 1];
	if (before === undefined || after === undefined) return { value: here, index, offset: 0 };
	const bend = before - 2 * here + after;
	const slope = (after - before) / 2;
	return bend < 0 ? { value: here - (slope * slope) / (2 * bend), index, offset: -slope / bend } : { value: here, index, offset: 0 };
}

/** The vector at a peak of the sizes of sampled vectors, 3 numbers a sample: quadratic through the neighbours. */
export function vectorAt(vectors: Float64Array, { index, offset }: Peak): number[] {
	return [0, 1, 2].map((k) => {
		const here = vectors[3 * index + k] as number;
		if (offset === 0) return here;
		const before = vectors[3 * index - 3 + k] as number;
		const after = vectors[3 * index + 3 + k] as number;
		return here + (offset * (after - before)) / 2 + (offset * offset * (before - 2 * here + after)) / 2;
	});
}
