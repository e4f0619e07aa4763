import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { timeToClose } from "../../src/flight/contact.ts";
import type { Hatchway } from "../../src/flight/hatchway.ts";
import { type Bounds, ringBounds, StraightPath } from "../../src/flight/path.ts";
import { ceilingSurface, floorSurface, type Surface, wallSurfaces } from "../../src/flight/surface.ts";
import { bodySurfaces, prepareWorld } from "../../src/flight/world.ts";
import { constantSpin, profileSpin } from "../../src/frame/spin.ts";
import { resolveHabitat } from "../../src/layout/resolve.ts";
import { ring } from "../../src/vector/vec3.ts";
import { within } from "../support/arbitrary.ts";
import { layoutOf } from "../support/layout-of.ts";
import { randomBay } from "../support/random-bays.ts";

/** Nothing so small that its square is nothing. */
const physical = (min: number, max: number): fc.Arbitrary<number> => within(min, max).map((x) => (Math.abs(x) < 1e-12 ? 0 : x));

/** Every surface that a sphere can meet in the bay of a seed. */
function surfacesOf(seed: number, half: number): Surface[] {
	const habitat = resolveHabitat(layoutOf(randomBay(seed).parts));
	const { ways, bodies } = prepareWorld(habitat);
	return [
		...habitat.decks.flatMap((deck) => [floorSurface(deck, half), ceilingSurface(deck, half), ...wallSurfaces(deck, half)]),
		...ways.flatMap((way: Hatchway) => [...way.coaming(half), way.innerEnd(half, "near-end"), way.outerEnd(half, "far-end")]),
		...bodySurfaces(bodies, half),
	];
}

describe("what the search for contacts relies on", () => {
	it("no gap closes faster than gap + rate τ − bend τ² / 2, on any surface, near and far, at any spin", () => {
		const seen = new Set<string>();
		fc.assert(
			fc.property(
				fc.integer({ min: 1, max: 400 }),
				within(0, 0.6),
				fc.record({ rate: within(0, 1.5), ramp: within(0.5, 1.5), along: within(-3, 3), height: within(-0.7, 2.5), axial: within(-3, 3) }),
				fc.record({ speed: within(0.1, 50), heading: within(0, 7), elevation: within(-1.5, 1.5), horizon: within(0.001, 0.3) }),
				(seed, half, place, toss) => {
					const habitat = resolveHabitat(layoutOf(randomBay(seed).parts));
					const spin =
						place.ramp > 1
							? constantSpin(place.rate)
							: profileSpin([
									{ t: 0, rate: place.rate },
									{ t: 1, rate: place.rate * place.ramp },
								]);
					/** About a hatch where there is one, else about the middle of the outer deck. */
					const hatch = habitat.hatches[0];
					const deck = habitat.decks[hatch?.deck ?? 0]!;
					const angle = (hatch?.angle ?? deck.middle) + place.along / deck.radius;
					const r = deck.radius / (deck.floor === "flat" ? Math.cos(angle - deck.middle) : 1) - place.height;
					const [c, s] = [Math.cos(angle), Math.sin(angle)];
					const level = toss.speed * Math.cos(toss.elevation);
					const [p, u] = [level * Math.cos(toss.heading), toss.speed * Math.sin(toss.elevation)];
					const path = new StraightPath(
						spin,
						ring(r * c, r * s, (hatch?.axial ?? 0) + place.axial / 3),
						ring(-p * s - u * c, p * c - u * s, level * Math.sin(toss.heading)),
					);
					const state = new Float64Array(6);
					const bounds: Bounds = { radius: 0, speed: 0, acceleration: 0 };
					for (const surface of surfacesOf(seed, half)) {
						path.stateAt(0, state);
						const gap = surface.gap(state);
						if (gap < 0) continue;
						const rate = surface.rate(state);
						ringBounds(spin, r, Math.hypot(state[3]!, state[4]!, state[5]!), path.inertialSpeed, 0, toss.horizon, bounds);
						const bend = surface.bend(bounds);
						const safe = Math.min(toss.horizon, timeToClose(gap, rate, bend));
						seen.add(surface.constructor.name);
						for (let i = 1; i <= 20; i++) {
							const tau = (safe * i) / 20;
							path.stateAt(tau, state);
							const least = gap + rate * tau - (bend * tau * tau) / 2;
							/** Rounding of a radius of a hundred metres. */
							if (surface.gap(state) < least - 1e-9)
								throw new Error(`${surface.constructor.name} ${surface.kind}: ${surface.gap(state)} < ${least}`);
						}
					}
				},
			),
			{ seed: 91, numRuns: 300 },
		);
		for (const name of [
			"CylinderFromWithin",
			"CylinderFromWithout",
			"Plane",
			"HalfPlane",
			"Capsule",
			"Box",
			"RadialCoaming",
			"AxialCoaming",
			"RoundCoaming",
		])
			expect([...seen], name).toContain(name);
	});

	it("the time to close is the first root, or never", () => {
		fc.assert(
			fc.property(physical(0, 10), physical(-20, 20), physical(0, 100), (gap, rate, bend) => {
				const t = timeToClose(gap, rate, bend);
				const at = (x: number): number => gap + rate * x - (bend * x * x) / 2;
				if (t === Number.POSITIVE_INFINITY) {
					for (const x of [0, 1, 10, 1000]) expect(at(x)).toBeGreaterThanOrEqual(0);
					return;
				}
				expect(Math.abs(at(t))).toBeLessThan(1e-9 * (1 + gap + Math.abs(rate) * t + bend * t * t));
				for (let i = 0; i < 20; i++) expect(at((t * i) / 20)).toBeGreaterThanOrEqual(-1e-9);
			}),
			{ seed: 92 },
		);
	});
});
