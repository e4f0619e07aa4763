import fc from "fast-check";
import { expect, it } from "vitest";
import { DragPath } from "../../src/flight/drag-path.ts";
import { type Bounds, ringBounds, StraightPath } from "../../src/flight/path.ts";
import { apparentParts } from "../../src/frame/apparent.ts";
import { profileSpin } from "../../src/frame/spin.ts";
import { length, type RingVec, ring } from "../../src/vector/vec3.ts";
import { within } from "../support/arbitrary.ts";

const vector = (size: number): fc.Arbitrary<RingVec> =>
	fc.tuple(within(-size, size), within(-size, size), within(-size, size)).map(([x, y, z]) => ring(x, y, z));
const STILL = ring(0, 0, 0);

it("bounds hold over their horizon: distance from the axis, speed and acceleration in the ring, with drag and changing spin", () => {
	fc.assert(
		fc.property(
			within(0, 2),
			within(0, 2),
			vector(100),
			vector(30),
			fc.oneof(fc.constant(0), within(0.001, 0.5)),
			within(0.01, 1),
			(a, b, p, v, drag, horizon) => {
				const spin = profileSpin([
					{ t: 0, rate: a },
					{ t: 1, rate: b },
				]);
				const straight = new StraightPath(spin, p, v);
				/** Inertial speed and acceleration are at their greatest bounded by the fastest air there is. */
				const air = straight.inertialSpeed + spin.greatestRate * (Math.hypot(p[0], p[1]) + 300);
				const path = drag > 0 ? new DragPath(spin, p, v, drag, STILL) : straight;
				while (path instanceof DragPath && path.known < horizon) path.advance(horizon - path.known + 1e-9);
				const bounds: Bounds = { radius: 0, speed: 0, acceleration: 0 };
				ringBounds(spin, Math.hypot(p[0], p[1]), length(v), drag > 0 ? air : straight.inertialSpeed, drag * air * air, horizon, bounds);
				const s = new Float64Array(6);
				for (let i = 0; i <= 40; i++) {
					const t = (horizon * i) / 40;
					path.stateAt(t, s);
					const velocity = ring(s[3]!, s[4]!, s[5]!);
					const pushed = apparentParts(spin, t, ring(s[0]!, s[1]!, s[2]!), velocity, STILL).sum;
					const acceleration = Math.hypot(...[0, 1, 2].map((k) => pushed[k]! - drag * length(velocity) * velocity[k]!));
					for (const [value, bound] of [
						[Math.hypot(s[0]!, s[1]!), bounds.radius],
						[length(velocity), bounds.speed],
						[acceleration, bounds.acceleration],
					] as const)
						expect(value).toBeLessThanOrEqual(bound * (1 + 1e-9) + 1e-9);
				}
			},
		),
		{ seed: 95, numRuns: 300 },
	);
});
