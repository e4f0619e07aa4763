import { createRequire } from "node:module";
import { clearances, type Outcome, outcome, ringDerivative, start, type Throw } from "./ring-equations.ts";

/** What is used of odex 2.0.4, whose own types do not pass a strict compiler. */
interface Odex {
	denseOutput: boolean;
	absoluteTolerance: number;
	relativeTolerance: number;
	maxStepSize: number;
	maxSteps: number;
	solve(
		f: (t: number, y: number[]) => number[],
		from: number,
		y: readonly number[],
		to: number,
		each: (n: number, before: number, now: number, y: number[], dense?: (component: number, t: number) => number) => boolean | undefined,
	): { outcome: number };
}
const require = createRequire(import.meta.url);
const { Solver } = require("odex") as { Solver: new (n: number) => Odex };

/**
 * The oracle "odex": Hairer and Wanner's extrapolation code (port of ODEX.F), here on the equations of the turning frame,
 * with its dense output; the first clearance to change sign within a step is found by bisection on the dense output.
 * Throws RangeError where nothing is struck before `until`.
 */
export function odexFlight(thrown: Throw, tolerance = 1e-13, until = 60): Outcome {
	const solver = new Solver(7);
	solver.denseOutput = true;
	solver.absoluteTolerance = solver.relativeTolerance = tolerance;
	solver.maxStepSize = 0.1;
	let found: Outcome | null = null;
	solver.solve(ringDerivative(thrown), 0, start(thrown), until, (_n, before, now, _y, dense) => {
		if (!dense) return undefined;
		const at = (t: number): number[] => [0, 1, 2, 3, 4, 5, 6].map((i) => dense(i, t));
		const inside = (t: number): boolean => Object.values(clearances(thrown, at(t))).every((gap) => gap > 0);
		const parts = 16;
		for (let i = 1; i <= parts; i++) {
			let high = before + ((now - before) * i) / parts;
			if (inside(high)) continue;
			let low = before + ((now - before) * (i - 1)) / parts;
			for (let k = 0; k < 60 && high - low > 0; k++) {
				const middle = (low + high) / 2;
				if (inside(middle)) low = middle;
				else high = middle;
			}
			const y = at(high);
			const [struck] = Object.entries(clearances(thrown, y)).reduce((least, one) => (one[1] < least[1] ? one : least));
			found = outcome(thrown, struck, high, y);
			return false;
		}
		return undefined;
	});
	if (!found) throw new RangeError(`odex found nothing struck in ${until} s`);
	return found;
}
