/** Numbers in [0, 1) that depend on the seed alone (mulberry32). */
export function seeded(seed: number): () => number {
	let a = seed >>> 0;
	return () => {
		a = (a + 0x6d2b79f5) >>> 0;
		let t = Math.imul(a ^ (a >>> 15), a | 1);
		t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
		return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
	};
}

export interface Draw {
	/** Uniform between the two. */
	between(low: number, high: number): number;
	/** One of them. */
	of<T>(...choices: T[]): T;
	/** True with the given chance. */
	chance(share: number): boolean;
}

export function draw(seed: number): Draw {
	const next = seeded(seed);
	return {
		between: (low, high) => low + (high - low) * next(),
		of: (...choices) => choices[Math.floor(next() * choices.length)]!,
		chance: (share) => next() < share,
	};
}
