import { expect, it } from "vitest";
import { holds } from "./against-fine-steps.ts";

it.each(Array.from({ length: 40 }, (_, i) => 1000 + 100 * i))("fine steps agree, seeds from %i on, a hundred", (first) => {
	for (let seed = first; seed < first + 100; seed++) expect(() => holds(seed), `seed ${seed}`).not.toThrow();
});
