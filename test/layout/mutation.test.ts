import { afterAll, describe, expect, test } from "vitest";
import { writeLayout } from "../../src/layout/canonical.ts";
import { decodeLayout, type ParseResult, parseLayout } from "../../src/layout/parse.ts";
import { cases, resolveHabitat, spinOf } from "../../src/layout/resolve.ts";
import { mutated, mutatedBytes, pick, type Random, seeded } from "./mutate.ts";
import { shipped } from "./support.ts";

const STRUCTURES_EACH = 13_500;
const BYTES_EACH = 1_800;
/** Layouts of a few activities and elements each, which between them hold all: a small file is judged faster. */
const THINNED = 40;
/** Far above what one parse takes on a slow and busy machine. */
const HANG_MS = 2_000;

const untouched = Object.getOwnPropertyNames(Object.prototype).sort().join();

/** Either whole, and then usable to the last detail, or with reasons. Fails with the sentence returned, else null. */
function fault(result: ParseResult): string | null {
	if (!result.ok) {
		if (result.problems.length === 0) return "refused without a problem";
		const empty = result.problems.find((p) => p.path === "" || p.expected === "" || p.value === "");
		return empty ? `an empty problem: ${JSON.stringify(empty)}` : null;
	}
	const { layout } = result;
	const written = writeLayout(layout);
	const again = parseLayout(written);
	if (!again.ok) return `the written layout is refused: ${JSON.stringify(again.problems)}`;
	if (JSON.stringify(again.layout) !== JSON.stringify(layout)) return "the written layout reads back as another";
	const habitat = resolveHabitat(layout);
	if (habitat.decks.length !== layout.habitat.decks.length) return "a deck is lost";
	for (const c of cases(layout)) {
		const spin = spinOf(layout, c.phase, c.activity.start_s);
		if (!Number.isFinite(spin.rate(1)) || !Number.isFinite(spin.angle(1))) return `a spin that is not finite in phase ${c.phase}`;
	}
	const wrong = numbersOf(habitat).find((n) => !Number.isFinite(n));
	return wrong === undefined ? null : `a number of the habitat is ${wrong}`;
}

function numbersOf(value: unknown): number[] {
	if (typeof value === "number") return [value];
	return typeof value === "object" && value !== null ? Object.values(value).flatMap(numbersOf) : [];
}

function judge(make: () => ParseResult, source: () => string): boolean {
	const start = performance.now();
	const result = make();
	const ms = performance.now() - start;
	const found = fault(result) ?? (ms > HANG_MS ? `took ${ms} ms` : null);
	if (found !== null) throw new Error(`${found}\n${source()}`);
	return result.ok;
}

/** The layout with three of its activities, and of its elements those that they need and two more. */
function thinned(random: Random, text: string): string {
	const layout = JSON.parse(text);
	const some = <T>(all: readonly T[], count: number): T[] => [...all].sort(() => random() - 0.5).slice(0, count);
	layout.activities = some(layout.activities, 3);
	const needed = new Set(layout.activities.flatMap((a: { ladder?: string; window?: string }) => [a.ladder, a.window]));
	const others = some(layout.elements, 2);
	layout.elements = layout.elements.filter((e: { id: string }) => needed.has(e.id) || others.includes(e));
	if (!parseLayout(JSON.stringify(layout)).ok) throw new Error(`a thinned layout is refused: ${JSON.stringify(layout)}`);
	return JSON.stringify(layout);
}

describe.each(shipped.map((s, i) => ({ ...s, seed: 20_261 + i })))("$file, seed $seed", ({ text, seed }) => {
	test(`${STRUCTURES_EACH} damaged structures are read whole or refused with reasons`, { timeout: 300_000 }, () => {
		const random = seeded(seed);
		const from = [text, ...Array.from({ length: THINNED }, () => thinned(random, text))];
		let whole = 0;
		for (let i = 0; i < STRUCTURES_EACH; i++) {
			const damaged = mutated(random, pick(random, from));
			if (
				judge(
					() => parseLayout(damaged),
					() => damaged,
				)
			)
				whole++;
		}
		expect(whole).toBeGreaterThan(STRUCTURES_EACH / 50);
		expect(whole).toBeLessThan(STRUCTURES_EACH / 2);
	});

	test(`${BYTES_EACH} damaged byte sequences likewise`, { timeout: 120_000 }, () => {
		const random = seeded(seed + 1000);
		const bytes = new TextEncoder().encode(text);
		let refused = 0;
		for (let i = 0; i < BYTES_EACH; i++) {
			const damaged = mutatedBytes(random, bytes);
			const read = (): ParseResult => {
				const decoded = decodeLayout(damaged);
				return decoded.ok ? parseLayout(decoded.text) : decoded;
			};
			if (!judge(read, () => Buffer.from(damaged).toString("latin1"))) refused++;
		}
		expect(refused).toBeGreaterThan(BYTES_EACH / 2);
	});
});

test("at least 40,000 structures and 5,000 byte sequences were tried", () => {
	expect(STRUCTURES_EACH * shipped.length).toBeGreaterThanOrEqual(40_000);
	expect(BYTES_EACH * shipped.length).toBeGreaterThanOrEqual(5_000);
});

afterAll(() => {
	expect(Object.getOwnPropertyNames(Object.prototype).sort().join()).toBe(untouched);
	expect(({} as Record<string, unknown>).polluted).toBeUndefined();
});
