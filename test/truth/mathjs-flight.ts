import * as mathjs from "mathjs";
import { clearances, type Outcome, outcome, ringDerivative, start, type Throw } from "./ring-equations.ts";

/** Its types leave solveODE out. */
const { solveODE } = mathjs as unknown as {
	solveODE(
		f: (t: number, y: number[]) => number[],
		span: [number, number],
		y: number[],
		options: { method: "RK45"; tol: number; firstStep: number; maxStep: number; maxIter: number },
	): { t: number[]; y: number[][] };
};

/**
 * The oracle "mathjs": its solveODE, Dormand & Prince 5(4) with fixed absolute tolerance, on the equations of the turning
 * frame. The first step to end outside is solved again up to the instant of contact, which Newton's rule finds.
 * Throws RangeError where nothing is struck before `until`.
 */
export function mathjsFlight(thrown: Throw, tolerance = 1e-10, until = 10): Outcome {
	const f = ringDerivative(thrown);
	const solve = (y: number[], from: number, to: number) =>
		solveODE(f, [from, to], y, { method: "RK45", tol: tolerance, firstStep: Math.min(0.01, to - from), maxStep: 0.05, maxIter: 100_000 });
	const least = (y: number[]) => Object.entries(clearances(thrown, y)).reduce((a, b) => (b[1] < a[1] ? b : a));
	let from = 0;
	let y = start(thrown);
	while (from < until) {
		const path = solve(y, from, from + 0.25);
		const out = path.y.findIndex((state) => least(state)[1] <= 0);
		if (out < 0) {
			from = path.t.at(-1)!;
			y = path.y.at(-1)!;
			continue;
		}
		const [struck] = least(path.y[out]!);
		const before = path.t[out - 1]!;
		let t = path.t[out]!;
		let state = path.y[out]!;
		for (let i = 0; i < 8; i++) {
			const gap = clearances(thrown, state)[struck]!;
			const tiny = 1e-7;
			const rates = f(t, state);
			const rate =
				(clearances(
					thrown,
					state.map((value, k) => value + tiny * rates[k]!),
				)[struck]! -
					gap) /
				tiny;
			const next = Math.max(before + 1e-12, t - gap / rate);
			if (Math.abs(next - t) < 1e-13) break;
			t = next;
			state = solve(path.y[out - 1]!, before, t).y.at(-1)!;
		}
		return outcome(thrown, struck, t, state);
	}
	throw new RangeError(`mathjs found nothing struck in ${until} s`);
}
