import { createRequire } from "node:module";
import { type Flight, fly, type Release } from "../../src/flight/fly.ts";
import { landing } from "../../src/flight/landing.ts";
import { prepareWorld } from "../../src/flight/world.ts";
import { resolveHabitat, spinOf } from "../../src/layout/resolve.ts";
import { ring } from "../../src/vector/vec3.ts";
import { deckFile, type LayoutParts, layoutOf } from "../support/layout-of.ts";
import type { Measured } from "./bench.ts";

export const name = "flight with its surfaces and landing against odex with dense output and events at 1e-9";
export const goal = "≥ 200 ×";

const RADIUS = 34;
const HALF = 0.03;
/** s; at 50 m/s, the fastest toss there is, 5 cm. */
const WATCH = 1e-3;
const bay: LayoutParts = {
	decks: [deckFile({ from_deg: -15, to_deg: 15 }), deckFile({ id: "upper", radius_m: 31.2, from_deg: -15, to_deg: 15, headroom_m: 2.3 })],
	elements: [{ id: "hatch", kind: "hatch", deck: "upper", angle_deg: 4, axial_m: 0.8, shape: "rectangle", along_m: 0.9, across_m: 0.9 }],
};

/** The toss that both fly: 1.5 m above the lower deck, 2 m/s up and along. */
const toss = (drag: number): Release => ({
	deck: 0,
	position: ring(RADIUS - 1.5, 0, 0),
	velocity: ring(-1.2, 1.2, 1),
	diameter: 2 * HALF,
	drag,
});
/** Let go above the middle of the hatch. */
const through: Release = {
	deck: 1,
	position: ring(29.9 * Math.cos(0.07), 29.9 * Math.sin(0.07), 0.8),
	velocity: ring(0, 0, 0),
	diameter: 2 * HALF,
	drag: 0,
};

interface Solver {
	denseOutput: boolean;
	absoluteTolerance: number;
	relativeTolerance: number;
	solve(
		f: (t: number, y: number[]) => number[],
		from: number,
		y: number[],
		to: number,
		each: (n: number, before: number, now: number, y: number[], dense?: (component: number, t: number) => number) => boolean | undefined,
	): unknown;
}
const { Solver } = createRequire(import.meta.url)("odex") as { Solver: new (n: number) => Solver };

/**
 * The same toss by odex, with floor, ceiling and bulkheads as events: looked for on the dense output every `watch`
 * seconds, since what happens between two looks is not seen, then bisected.
 */
function byOdex(rate: number, { position, velocity }: Release, watch: number): number {
	const solver = new Solver(6);
	solver.denseOutput = true;
	solver.relativeTolerance = solver.absoluteTolerance = 1e-9;
	const low = Math.sin((-15 * Math.PI) / 180);
	const cos = Math.cos((15 * Math.PI) / 180);
	const clear = (x: number, y: number, z: number): number => {
		const r = Math.hypot(x, y);
		return Math.min(
			RADIUS - HALF - r,
			r - RADIUS + 2.4 - HALF,
			3 - HALF - Math.abs(z),
			cos * y - low * x - HALF,
			-cos * y - low * x - HALF,
		);
	};
	let end = Number.NaN;
	solver.solve(
		(_t, y) => [y[3]!, y[4]!, y[5]!, rate * rate * y[0]! + 2 * rate * y[4]!, rate * rate * y[1]! - 2 * rate * y[3]!, 0],
		0,
		[...position, ...velocity],
		10,
		(_n, before, now, _y, dense) => {
			if (!dense) return undefined;
			const inside = (t: number): boolean => clear(dense(0, t), dense(1, t), dense(2, t)) > 0;
			for (let a = before; a < now; a += watch) {
				let b = Math.min(now, a + watch);
				if (inside(b)) continue;
				while (b - a > 1e-10) {
					const m = (a + b) / 2;
					if (inside(m)) a = m;
					else b = m;
				}
				end = b;
				return false;
			}
			return undefined;
		},
	);
	return end;
}

/** Microseconds a call: the quickest of short rounds, taken in turn, so that what else the machine does falls on none of them. */
function micros(calls: (() => unknown)[], rounds: number, each: number[]): number[] {
	const times = calls.map((): number[] => []);
	for (let r = 0; r < rounds; r++)
		calls.forEach((call, i) => {
			const begin = performance.now();
			for (let k = 0; k < each[i]!; k++) call();
			times[i]!.push((1000 * (performance.now() - begin)) / each[i]!);
		});
	return times.map((list) => Math.min(...list));
}

export function run(): Measured {
	const layout = layoutOf(bay);
	const habitat = resolveHabitat(layout);
	const world = prepareWorld(habitat);
	const spin = spinOf(layout, "nominal");
	const rate = spin.rate(0);
	const flown = (release: Release): Flight => {
		const flight = fly(world, spin, release);
		const found = landing(habitat, flight, habitat.decks[release.deck]!, release.position);
		if (!found) throw new Error(`the benchmark's flight struck ${flight.struck.kind}`);
		return flight;
	};
	const apart = Math.abs(flown(toss(0)).end - byOdex(rate, toss(0), WATCH));
	if (!(apart < 1e-7)) throw new Error(`ours and odex end ${apart} s apart`);
	if (flown(through).passed.length !== 1) throw new Error("the benchmark's drop does not pass the hatch");
	const calls = [
		() => byOdex(rate, toss(0), WATCH),
		() => byOdex(rate, toss(0), 1),
		() => flown(toss(0)),
		() => flown(toss(0.002)),
		() => flown(through),
	];
	micros(calls, 30, [4, 10, 1000, 50, 300]);
	const [odex, blind, free, dragged, hatch] = micros(calls, 200, [2, 4, 300, 20, 80]) as [number, number, number, number, number];
	const perSecond = (us: number): string => `${Math.round(1e6 / us).toLocaleString("en")}/s`;
	return {
		ratio: odex / free,
		detail: `${odex.toFixed(0)} µs against ${free.toFixed(2)} µs (odex that looks for events once a step: ${blind.toFixed(0)} µs); flights ${perSecond(free)}, with drag ${perSecond(dragged)}, through a hatch ${perSecond(hatch)}`,
	};
}
