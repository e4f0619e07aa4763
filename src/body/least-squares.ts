/**
 * Levenberg–Marquardt with forward differences for a few parameters (Nocedal & Wright, Numerical
 * Optimization, §10.3). Moves `p` in place to a local minimum of Σ r²; returns the sum there.
 * `residuals(p, r)` fills r. Deterministic; stops when a step no longer moves any parameter by 1e-7 or lowers the sum by
 * 1e-10 of itself.
 */
export function leastSquares(
	residuals: (p: Float64Array, r: Float64Array) => void,
	p: Float64Array,
	count: number,
	rounds: number,
): number {
	const n = p.length;
	const r = new Float64Array(count);
	const moved = new Float64Array(count);
	const jacobian = new Float64Array(n * count);
	const normal = new Float64Array(n * n);
	const step = new Float64Array(n);
	const trial = new Float64Array(n);
	let damping = 1e-3;
	residuals(p, r);
	let best = squares(r);
	if (!Number.isFinite(best)) throw new RangeError(`least squares began at a sum of ${best}`);
	for (let round = 0; round < rounds; round++) {
		for (let j = 0; j < n; j++) {
			const value = p[j] as number;
			p[j] = value + 1e-6;
			residuals(p, moved);
			p[j] = value;
			for (let i = 0; i < count; i++) jacobian[j * count + i] = ((moved[i] as number) - (r[i] as number)) / 1e-6;
		}
		let taken = false;
		const before = best;
		for (let attempt = 0; attempt < 8 && !taken; attempt++) {
			for (let j = 0; j < n; j++) {
				for (let k = 0; k <= j; k++) normal[j * n + k] = dotRows(jacobian, j, jacobian, k, count);
				normal[j * n + j] = (normal[j * n + j] as number) * (1 + damping) + 1e-12;
				step[j] = -dotRows(jacobian, j, r, 0, count);
			}
			solveSymmetric(normal, step, n);
			for (let j = 0; j < n; j++) trial[j] = (p[j] as number) + (step[j] as number);
			residuals(trial, moved);
			const sum = squares(moved);
			if (sum <= best) {
				p.set(trial);
				r.set(moved);
				best = sum;
				damping = Math.max(damping / 5, 1e-9);
				taken = true;
			} else damping *= 6;
		}
		if (!taken || before - best < 1e-10 * before || step.every((s) => Math.abs(s) < 1e-7)) break;
	}
	return best;
}

function squares(r: Float64Array): number {
	let sum = 0;
	for (const v of r) sum += v * v;
	return sum;
}

function dotRows(a: Float64Array, j: number, b: Float64Array, k: number, count: number): number {
	let sum = 0;
	for (let i = 0; i < count; i++) sum += (a[j * count + i] as number) * (b[k * count + i] as number);
	return sum;
}

/** Cholesky on the lower triangle of `m`, overwritten; `b` becomes the solution. */
function solveSymmetric(m: Float64Array, b: Float64Array, n: number): void {
	for (let j = 0; j < n; j++) {
		for (let k = 0; k <= j; k++) {
			let sum = m[j * n + k] as number;
			for (let i = 0; i < k; i++) sum -= (m[j * n + i] as number) * (m[k * n + i] as number);
			m[j * n + k] = j === k ? Math.sqrt(Math.max(sum, 1e-18)) : sum / (m[k * n + k] as number);
		}
	}
	for (let j = 0; j < n; j++) {
		let sum = b[j] as number;
		for (let i = 0; i < j; i++) sum -= (m[j * n + i] as number) * (b[i] as number);
		b[j] = sum / (m[j * n + j] as number);
	}
	for (let j = n - 1; j >= 0; j--) {
		let sum = b[j] as number;
		for (let i = j + 1; i < n; i++) sum -= (m[i * n + j] as number) * (b[i] as number);
		b[j] = sum / (m[j * n + j] as number);
	}
}
