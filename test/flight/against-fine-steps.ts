import { expect } from "vitest";
import { elementBodies } from "../../src/layout/solid.ts";
import { fineSteps, matterOf, nearest, type Point } from "../support/brute-force.ts";
import { flown } from "../support/flown.ts";
import { layoutOf } from "../support/layout-of.ts";
import { randomBay } from "../support/random-bays.ts";

interface Agreement {
	readonly ours: { readonly struck: unknown; readonly passed: unknown; readonly time: number };
	readonly theirs: { readonly struck: string; readonly passed: readonly string[]; readonly time: number };
	/** Clear distance at our strike, m, by the oracle's geometry; null where nothing is struck. */
	readonly clear: number | null;
}

/** s; as long as a flight is followed at the rates of `randomBay`. */
const LONGEST = 600;

/** One random bay and toss by both; null where the object starts inside a solid element. */
function agreement(seed: number): Agreement | null {
	const { parts, file } = randomBay(seed);
	const { habitat, context, drop, summary } = flown(parts, file);
	const half = file.object.diameter_m / 2;
	const matter = matterOf(
		layoutOf(parts),
		elementBodies(habitat).filter((b) => b.solid),
	);
	const from = drop.position;
	if (nearest(matter, { bay: drop.deck.index }, from, half).clear <= 0) return null;
	const w = context.spin.rate(0);
	const u = [drop.velocity[0] - w * from[1], drop.velocity[1] + w * from[0], drop.velocity[2]] as const;
	const straight = (t: number): { p: Point; speed: number } => {
		const [x, y] = [from[0] + u[0] * t, from[1] + u[1] * t];
		const [c, s] = [Math.cos(w * t), Math.sin(w * t)];
		return { p: [c * x + s * y, c * y - s * x, from[2] + u[2] * t], speed: Math.hypot(...u) + w * Math.hypot(x, y) };
	};
	const state = new Float64Array(6);
	const own = (t: number): { p: Point; speed: number } => {
		drop.flight.path.stateAt(Math.min(t, drop.flight.path.known), state);
		return { p: [state[0]!, state[1]!, state[2]!], speed: Math.hypot(state[3]!, state[4]!, state[5]!) + 1 };
	};
	/** The straight line is written out once more; with drag or a changing rate it is ours, which other oracles hold. */
	const plain = !file.drag && !parts.spin?.profile;
	const theirs = fineSteps(
		matter,
		drop.deck.index,
		half,
		plain ? straight : own,
		plain ? LONGEST : Math.min(LONGEST, drop.flight.end + 0.05),
	);
	const struck = drop.flight.struck.kind !== "none" && drop.flight.struck.kind !== "outside";
	return {
		ours: { struck: summary.struck, passed: summary.passed, time: drop.flight.struck.kind === "none" ? theirs.time : drop.flight.end },
		theirs,
		clear:
			struck && theirs.place
				? nearest(matter, theirs.place, [drop.flight.state[0]!, drop.flight.state[1]!, drop.flight.state[2]!], half).clear
				: null,
	};
}

/** In every seed: same thing struck, same hatches passed, same time, and the sphere clear of everything by 0 there. */
export function holds(seed: number): string | null {
	const both = agreement(seed);
	if (!both) return null;
	const { ours, theirs, clear } = both;
	expect([ours.struck, ours.passed]).toEqual([theirs.struck, theirs.passed]);
	expect(Math.abs(ours.time - theirs.time)).toBeLessThan(1e-7);
	if (clear !== null) expect(Math.abs(clear)).toBeLessThan(1e-9);
	return theirs.struck;
}
