import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { toss, within } from "../support/arbitrary.ts";
import { flown } from "../support/flown.ts";
import { deckFile, dropFile } from "../support/layout-of.ts";

const rest = (radius: number, height: number, diameter: number, rpm: number) =>
	flown(
		{ spin: { rate_rpm: rpm }, decks: [deckFile({ radius_m: radius, headroom_m: Math.min(100, height + diameter + 0.5) })] },
		dropFile({
			from: { deck: "lower", angle_deg: 40, axial_m: 0.5, height_m: height },
			object: { mass_kg: 0.4, diameter_m: diameter, drag_coefficient: 0.5 },
		}),
	).drop;

describe("a drop from rest above a curved floor", () => {
	it("lands R (tan φ − φ) against spin after tan φ / Ω, cos φ = (R − h) / (R − d/2)", () => {
		fc.assert(
			fc.property(within(3, 3000), within(0.3, 2.5), within(0, 0.4), within(0.5, 20), (radius, height, diameter, rpm) => {
				const { flight, landing } = rest(radius, height, diameter, rpm);
				const rate = (rpm * Math.PI) / 30;
				const [r0, reach] = [radius - height, radius - diameter / 2];
				const phi = Math.acos(r0 / reach);
				expect(flight.struck).toMatchObject({ kind: "deck" });
				/** acos loses half its digits where φ is small. */
				expect(Math.abs(flight.end * rate - Math.tan(phi))).toBeLessThan(1e-10);
				expect(Math.abs((landing!.prograde ?? Number.NaN) + radius * (Math.tan(phi) - phi))).toBeLessThan(1e-12 * radius + 1e-10);
				expect(landing!.axial).toBe(0);
				expect(landing!.radius).toBeCloseTo(radius, 9);
				const down = rate * r0 * Math.sin(phi);
				const against = rate * (reach - r0 * Math.cos(phi));
				expect(landing!.speed).toBeCloseTo(Math.hypot(down, against), 8);
				expect(landing!.angle).toBeCloseTo(Math.atan2(against, down), 8);
				/** Against spin: the velocity's prograde part is negative. */
				const s = flight.state;
				expect((s[0]! * s[4]! - s[1]! * s[3]!) / reach).toBeCloseTo(-against, 8);
			}),
			{ seed: 41, numRuns: 200 },
		);
	});

	it("is exact at the 3-4-5 triangle and at 60°", () => {
		expect(-rest(5, 1, 0, 13).landing!.prograde!).toBeCloseTo(5 * (0.75 - Math.atan(0.75)), 13);
		expect(-rest(100, 50, 0, 3).landing!.prograde!).toBeCloseTo(100 * (Math.sqrt(3) - Math.PI / 3), 11);
	});

	it("lands in the same place at any rate, 1/Ω as late and Ω as fast", () => {
		fc.assert(
			fc.property(toss(), within(0.1, 0.9), ({ parts, file }, k) => {
				const quick = { spin: { rate_rpm: parts.spin!.rate_rpm * k }, decks: parts.decks! };
				const release = file.release && { ...file.release, speed_mps: file.release.speed_mps * k };
				const [a, b] = [flown(parts, file).drop, flown(quick, { ...file, ...(release ? { release } : {}) }).drop];
				expect(b.flight.struck).toEqual(a.flight.struck);
				if (!a.landing || !b.landing) return;
				expect(Math.abs(b.flight.end * k - a.flight.end)).toBeLessThan(1e-8);
				for (const key of ["prograde", "axial", "radius"] as const)
					expect(Math.abs((b.landing[key] ?? 0) - (a.landing[key] ?? 0)), key).toBeLessThan(1e-7);
				expect(b.landing.speed).toBeCloseTo(k * a.landing.speed, 6);
			}),
			{ seed: 42, numRuns: 150 },
		);
	});
});

describe("on a ring of 10 km a toss is a parabola", () => {
	/** Coriolis shifts it by 2Ωv · t²/2 and Ω g t³/3, and changes the level by 2Ωv, so the time by Ωv/g of itself; the 1e-3 is for h/R. */
	it("but for Ω v t² + Ω g t³ / 3 + Ω v² t / g", () => {
		fc.assert(
			fc.property(within(0.5, 1.5), within(0, 5), within(0, 360), within(-80, 80), (height, speed, heading, elevation) => {
				const radius = 10_000;
				const g = 9.80665;
				const rate = Math.sqrt(g / radius);
				const { flight, landing } = flown(
					{ spin: { rate_rpm: (rate * 30) / Math.PI }, decks: [deckFile({ radius_m: radius, headroom_m: 10, from_m: -50, to_m: 50 })] },
					dropFile({
						from: { deck: "lower", angle_deg: -70, axial_m: 0, height_m: height },
						release: { speed_mps: speed, heading_deg: heading, elevation_deg: elevation },
					}),
				).drop;
				const [h, e] = [(heading * Math.PI) / 180, (elevation * Math.PI) / 180];
				const rise = speed * Math.sin(e);
				const t = (rise + Math.sqrt(rise * rise + 2 * g * height)) / g;
				const bound = 1.1 * rate * (speed * t * t + (g * t ** 3) / 3 + (speed * speed * t) / g) + 1e-3;
				expect(Math.abs(landing!.prograde! - speed * Math.cos(e) * Math.cos(h) * t)).toBeLessThan(bound);
				expect(Math.abs(landing!.axial! - speed * Math.cos(e) * Math.sin(h) * t)).toBeLessThan(bound);
				expect(Math.abs(flight.end - t) / t).toBeLessThan((2.2 * rate * speed) / g + 1e-3);
			}),
			{ seed: 43, numRuns: 150 },
		);
	});
});
