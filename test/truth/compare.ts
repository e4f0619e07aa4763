/** One number of ours held against an outside one. */
export interface TruthRow {
	/** What the meter gathers into one line, e.g. "named stars". */
	readonly group: string;
	readonly check: string;
	readonly ours: number;
	readonly reference: number;
	/** Largest error allowed, of the given kind. */
	readonly tolerance: number;
	readonly kind: "relative" | "absolute";
	/** Unit of ours and reference. */
	readonly unit: string;
	readonly source: string;
	/** How well the reference is known: R, R2, M-h, C … as the reference sheet says. */
	readonly flag: string;
}

export interface Comparison {
	/** In the row's unit, or a share of the reference when relative. */
	readonly error: number;
	readonly within: boolean;
}

/** Throws RangeError on a number that is not finite, a negative tolerance, or a relative row whose reference is 0. */
export function compare(row: TruthRow): Comparison {
	for (const key of ["ours", "reference", "tolerance"] as const)
		if (!Number.isFinite(row[key])) throw new RangeError(`${row.group}, ${row.check}: ${key} is ${row[key]}, not a finite number`);
	if (row.tolerance < 0) throw new RangeError(`${row.group}, ${row.check}: a tolerance of ${row.tolerance} cannot be met`);
	const apart = Math.abs(row.ours - row.reference);
	if (row.kind === "relative" && row.reference === 0)
		throw new RangeError(`${row.group}, ${row.check}: no error is relative to a reference of 0`);
	const error = row.kind === "relative" ? apart / Math.abs(row.reference) : apart;
	return { error, within: error <= row.tolerance };
}

/** Errors of one group, of one kind and unit. */
export interface MeterLine {
	readonly group: string;
	/** "relative", or the unit of an absolute error. */
	readonly unit: string;
	readonly n: number;
	readonly mean: number;
	readonly p50: number;
	readonly p90: number;
	readonly max: number;
	/** Least and greatest error allowed in it. */
	readonly allowed: readonly [number, number];
	readonly sources: readonly string[];
}

/** Nearest rank. */
const percentile = (sorted: readonly number[], share: number): number =>
	sorted[Math.max(0, Math.ceil(share * sorted.length) - 1)] as number;

/** Lines in the order in which their groups first appear. */
export function meter(rows: readonly TruthRow[]): MeterLine[] {
	const gathered = new Map<string, TruthRow[]>();
	for (const row of rows) {
		const key = JSON.stringify([row.group, row.kind, row.kind === "relative" ? "" : row.unit]);
		const list = gathered.get(key);
		if (list) list.push(row);
		else gathered.set(key, [row]);
	}
	return [...gathered.values()].map((list) => {
		const { group, kind, unit } = list[0] as TruthRow;
		const tolerances = list.map((row) => row.tolerance);
		const errors = list.map((row) => compare(row).error).sort((a, b) => a - b);
		return {
			group,
			unit: kind === "relative" ? "relative" : unit,
			n: errors.length,
			mean: errors.reduce((sum, e) => sum + e, 0) / errors.length,
			p50: percentile(errors, 0.5),
			p90: percentile(errors, 0.9),
			max: percentile(errors, 1),
			allowed: [Math.min(...tolerances), Math.max(...tolerances)] as const,
			sources: [...new Set(list.map((row) => row.source))],
		};
	});
}
