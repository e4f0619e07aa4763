import { createRequire } from "node:module";
import type { CanalConstants } from "../../src/vestibular/constants.ts";

interface OdexSolver {
	relativeTolerance: number;
	absoluteTolerance: number;
	maxSteps: number;
	stabilityCheckCount: number;
	solve(f: (t: number, y: number[]) => number[], from: number, y0: number[], to: number): { y: number[]; outcome: number };
}
const load = createRequire(import.meta.url);
const { Solver, Outcome } = load("odex") as { Solver: new (n: number) => OdexSolver; Outcome: { Converged: number } };

/** mathjs' solver, which its types leave out. */
export const { solveODE } = load("mathjs") as {
	solveODE(
		rates: (t: number, y: readonly number[]) => number[],
		span: readonly [number, number],
		start: readonly number[],
		options: { method: "RK45" | "RK23"; tol: number; maxStep: number },
	): { t: number[]; y: number[][] };
};

/**
 * Canal reports by odex (Gragg–Bulirsch–Stoer, tolerance 1e-13), at each of `times`, one number a
 * channel: the transfer function as differential equations of its own, in other states than the filter's
 * (p = cupula, r = dp/dt of the second-order pendulum, a = the slow part that adaptation takes away).
 * Restarts at every time, so give jumps of the input as times too.
 */
export function integrated(
	input: (t: number) => readonly number[],
	adaptedTo: readonly number[],
	constants: CanalConstants,
	start: number,
	times: readonly number[],
): number[][] {
	const n = adaptedTo.length;
	const { cupula, short, adaptation } = constants;
	/* With v = ∫p: τ_c τ_s p'' + (τ_c + τ_s) p' + p = τ_c u'. Written without u': p' = r + u/τ_s. */
	const f = (t: number, y: number[]): number[] => {
		const u = input(t);
		const out = new Array<number>(3 * n);
		for (let i = 0; i < n; i++) {
			const [p, r, a] = [y[3 * i], y[3 * i + 1], y[3 * i + 2]] as [number, number, number];
			const drive = (u[i] as number) - (adaptedTo[i] as number);
			const b = (cupula + short) / (cupula * short);
			out[3 * i] = r + drive / short - b * p;
			out[3 * i + 1] = -p / (cupula * short);
			out[3 * i + 2] = adaptation === null ? 0 : (p - a) / adaptation;
		}
		return out;
	};
	let y: number[] = new Array<number>(3 * n).fill(0);
	let now = start;
	return times.map((t) => {
		if (t > now) {
			const solver = new Solver(3 * n);
			solver.relativeTolerance = 1e-13;
			solver.absoluteTolerance = 1e-13;
			solver.maxSteps = 100_000;
			const result = solver.solve(f, now, y, t);
			if (result.outcome !== Outcome.Converged) throw new Error(`odex did not reach ${t} s: outcome ${result.outcome}`);
			y = result.y;
			now = t;
		}
		return Array.from({ length: n }, (_, i) => (y[3 * i] as number) - (y[3 * i + 2] as number));
	});
}

/** Largest difference as a share of the largest reference. */
export function relativeError(ours: ArrayLike<number>, reference: readonly number[]): number {
	if (ours.length !== reference.length || ours.length === 0) throw new Error(`${ours.length} numbers against ${reference.length}`);
	const peak = reference.reduce((most, r) => Math.max(most, Math.abs(r)), 0);
	const worst = reference.reduce((most, r, i) => Math.max(most, Math.abs((ours[i] as number) - r)), 0);
	if (!Number.isFinite(worst / peak)) throw new Error(`an error of ${worst} against a peak of ${peak}`);
	return worst / peak;
}
