import { describe, expect, it } from "vitest";
import { holds } from "./against-fine-steps.ts";

const SEEDS = Array.from({ length: 150 }, (_, i) => i + 1);
const seen = new Map<string, number>();

describe("tosses up to 50 m/s in random bays strike what fine steps strike, when fine steps strike it", () => {
	it.each(SEEDS)("seed %i", (seed) => {
		const struck = holds(seed)?.replace(/:.*/, "") ?? "inside";
		seen.set(struck, (seen.get(struck) ?? 0) + 1);
	});

	it("with the hard cases among them", () => {
		for (const kind of ["deck", "ceiling", "end-low", "end-high", "coaming", "element", "outside", "none"])
			expect(seen.get(kind) ?? 0, kind).toBeGreaterThan(0);
		expect((seen.get("side-low") ?? 0) + (seen.get("side-high") ?? 0)).toBeGreaterThan(0);
		expect(seen.get("inside") ?? 0).toBeLessThan(5);
	});
});
