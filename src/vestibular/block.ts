import type { CanalConstants } from "./constants.ts";
import { ANALYSIS, ORDER } from "./legendre.ts";

/** Equally spaced places in a block where the report can be read. */
export const READS = 8;
const STATES = 3;
/** Numbers in a row of a map: 3 states at the start, then the input at 8 nodes. */
export const ROW = STATES + ORDER;

/**
 * What a canal does over a block of time, exact for an input that is a polynomial of degree 7 over it.
 * States (q, w, z): τ_s z' = u − z, τ_c w' = z − w, τ_a q' = z − w − q; the report is z − w − q.
 */
export interface Block {
	/** Report at 1/8, 2/8 … 8/8 of the block: 8 rows of `ROW`. */
	readonly report: Float64Array;
	/** States at its end: 3 rows of `ROW`. */
	readonly end: Float64Array;
}

/** out = a b for upper triangular matrices of ROW × ROW; out is neither. */
function multiply(a: Float64Array, b: Float64Array, out: Float64Array): void {
	out.fill(0);
	for (let i = 0; i < ROW; i++)
		for (let k = i; k < ROW; k++) {
			const f = a[ROW * i + k] as number;
			for (let j = k; j < ROW; j++) out[ROW * i + j] = (out[ROW * i + j] as number) + f * (b[ROW * k + j] as number);
		}
}

/** e^m of an upper triangular matrix: Taylor series to degree 14 of m/2^s, row sums at most 1/2, squared s times. */
function exponential(m: Float64Array): Float64Array {
	let norm = 0;
	for (let i = 0; i < ROW; i++) {
		let sum = 0;
		for (let j = i; j < ROW; j++) sum += Math.abs(m[ROW * i + j] as number);
		norm = Math.max(norm, sum);
	}
	const squarings = Math.max(0, Math.ceil(Math.log2(norm)) + 1);
	const small = new Float64Array(m.length);
	for (let i = 0; i < m.length; i++) small[i] = (m[i] as number) / 2 ** squarings;
	let sum = new Float64Array(m.length);
	let next = new Float64Array(m.length);
	for (let i = 0; i < ROW; i++) sum[(ROW + 1) * i] = 1;
	for (let k = 14; k > 0; k--) {
		multiply(small, sum, next);
		for (let i = 0; i < next.length; i++) next[i] = (next[i] as number) / k;
		for (let i = 0; i < ROW; i++) next[(ROW + 1) * i] = (next[(ROW + 1) * i] as number) + 1;
		[sum, next] = [next, sum];
	}
	for (let k = 0; k < squarings; k++) {
		multiply(sum, sum, next);
		[sum, next] = [next, sum];
	}
	return sum;
}

/** Writes rows × ROW numbers of `from` into `to`, the input's Legendre coefficients exchanged for its values at the nodes. */
function atNodes(from: Float64Array, row: number, to: Float64Array, at: number): void {
	for (let j = 0; j < STATES; j++) to[at + j] = from[ROW * row + j] as number;
	for (let j = 0; j < ORDER; j++) {
		let sum = 0;
		for (let n = 0; n < ORDER; n++) sum += (from[ROW * row + STATES + n] as number) * (ANALYSIS[ORDER * n + j] as number);
		to[at + STATES + j] = sum;
	}
}

/**
 * The block of length `h` s, from one matrix exponential of the states together with the input's
 * Legendre coefficients, which a shift in time carries into those of the shifted polynomial (after Van
 * Loan 1978, IEEE Trans. Autom. Control 23:395–404).
 */
export function block(constants: CanalConstants, h: number): Block {
	const share = h / READS;
	const a = constants.adaptation === null ? 0 : share / constants.adaptation;
	const c = share / constants.cupula;
	const s = share / constants.short;
	const m = new Float64Array(ROW * ROW);
	m.set([-a, -a, a], 0);
	m.set([-c, c], ROW + 1);
	m[2 * ROW + 2] = -s;
	for (let n = 0; n < ORDER; n++) {
		m[2 * ROW + STATES + n] = n % 2 === 0 ? s : -s;
		for (let k = n + 1; k < ORDER; k += 2) m[ROW * (STATES + n) + STATES + k] = (2 / READS) * (2 * n + 1);
	}
	const once = exponential(m);
	const report = new Float64Array(READS * ROW);
	const end = new Float64Array(STATES * ROW);
	const row = new Float64Array(ROW);
	let power = once.slice();
	let next = new Float64Array(m.length);
	for (let k = 0; k < READS; k++) {
		for (let j = 0; j < ROW; j++) row[j] = (power[2 * ROW + j] as number) - (power[ROW + j] as number) - (power[j] as number);
		atNodes(row, 0, report, ROW * k);
		if (k === READS - 1) for (let i = 0; i < STATES; i++) atNodes(power, i, end, ROW * i);
		multiply(once, power, next);
		[power, next] = [next, power];
	}
	return { report, end };
}
