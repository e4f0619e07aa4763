/** A number measured in one run, as a ratio to something outside ("×") where there is one. */
export interface Measured {
	readonly ratio?: number;
	readonly value?: number;
	readonly unit?: string;
	readonly detail: string;
}

export interface Bench {
	readonly name: string;
	/** "≤ 2.5 ×": sign, number, unit. */
	readonly goal: string;
	run(): Promise<Measured> | Measured;
}

/** Whether a measured number keeps a goal; a number that is not finite keeps none. */
export function keeps(measured: number, goal: string): boolean {
	const [, sign, limit] = /^([≤≥])\s*([\d.,]+)/.exec(goal) ?? [];
	if (limit === undefined) throw new Error(`a goal reads "≤ 2.5 ×" or "≥ 200 ×", not "${goal}"`);
	if (!Number.isFinite(measured)) return false;
	return sign === "≤" ? measured <= Number(limit.replaceAll(",", "")) : measured >= Number(limit.replaceAll(",", ""));
}

/** Middle of the sorted values; of an even number the upper one. */
export const median = (values: readonly number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1] ?? Number.NaN;

/** Lower quartile: of times that other work on the machine can only lengthen, one that it did not. */
export const undisturbed = (times: readonly number[]): number => [...times].sort((a, b) => a - b)[times.length >> 2] ?? Number.NaN;
