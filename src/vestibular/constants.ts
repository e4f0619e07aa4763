/**
 * Time constants of one canal, s: H(s) = τ_c s / ((τ_c s + 1)(τ_s s + 1)) · [τ_a s / (τ_a s + 1)], from
 * angular velocity about its normal to what it reports (torsion pendulum: Steinhausen 1933; van Egmond,
 * Groen & Jongkees 1949).
 */
export interface CanalConstants {
	/** τ_c, of the cupula. */
	readonly cupula: number;
	/** τ_s, of the fluid. */
	readonly short: number;
	/** τ_a; null switches adaptation off. */
	readonly adaptation: number | null;
}

/** τ_c of Rader, Oman & Merfeld 2009, J. Neurophysiol. 102:2232–44, table 4; τ_s a textbook value. */
export const DEFAULT_CONSTANTS: CanalConstants = { cupula: 5.7, short: 0.005, adaptation: null };

/** Range of τ_c over which every modelled illusion is also given, s; its low end is of Dai et al. 1999, J. Vestib. Res. 9:293–301. */
export const CUPULA_BAND: readonly [number, number] = [4.2, 15];

export const sameConstants = (a: CanalConstants, b: CanalConstants): boolean =>
	a.cupula === b.cupula && a.short === b.short && a.adaptation === b.adaptation;

/** Throws RangeError on a constant that is not above 0 and finite. */
export function checkConstants({ cupula, short, adaptation }: CanalConstants): void {
	for (const [name, value] of Object.entries({ cupula, short, adaptation: adaptation ?? 1 }))
		if (!(value > 0 && Number.isFinite(value)))
			throw new RangeError(`a canal's ${name} time constant must be above 0 s and finite, got ${value}`);
}
