import { Ajv2020 } from "ajv/dist/2020.js";
import { describe, expect, test } from "vitest";
import * as z from "zod/mini";
import { layoutJsonSchema, SCHEMA_ID } from "../../src/layout/json-schema.ts";
import { newLayout } from "../../src/layout/new.ts";
import { layoutSchema } from "../../src/layout/schema.ts";
import { mutated, seeded } from "./mutate.ts";
import { larkspurText, shipped } from "./support.ts";

const schema = layoutJsonSchema();
const accepts = new Ajv2020({ allErrors: true, strict: true }).compile(schema);

test("says what it is", () => {
	expect(schema).toMatchObject({
		$schema: "https://json-schema.org/draft/2020-12/schema",
		$id: SCHEMA_ID,
		title: "Layout file, version 1",
	});
});

describe("takes", () => {
	test.each(shipped)("$file", ({ text }) => {
		expect(accepts(JSON.parse(text))).toBe(true);
	});
	test("a new layout", () => expect(accepts(newLayout("x"))).toBe(true));
});

describe("refuses", () => {
	test.each([
		["an unknown key", '"rate_rpm": 3.6', '"rate_rpm": 3.6, "rate": 1'],
		["a rate out of range", '"rate_rpm": 3.6', '"rate_rpm": 61'],
		["an unknown kind", '"kind": "hatch"', '"kind": "door"'],
		["the size of another shape", '"diameter_m": 0.6', '"along_m": 0.6'],
		["the height of a floor window", '"axial_m": -1, "shape"', '"height_m": 1, "shape"'],
		["a climb at no speed", '"speed_mps": 0.35', '"speed_mps": 0'],
		["an empty list of crew", '"crew": ["tall", "short"]', '"crew": []'],
		["another version", '"version": 1', '"version": 2'],
	])("%s", (_, from, to) => {
		const text = larkspurText.replace(from, to);
		expect(text).not.toBe(larkspurText);
		expect(accepts(JSON.parse(text))).toBe(false);
	});
});

test("takes and refuses the same damaged files as the parser's schema, seed 314", () => {
	const random = seeded(314);
	let taken = 0;
	for (let i = 0; i < 1500; i++) {
		const text = mutated(random, shipped[i % shipped.length]?.text ?? "");
		const value = JSON.parse(text);
		const parsed = z.safeParse(layoutSchema, value);
		if (parsed.success) taken++;
		if (accepts(value) !== parsed.success)
			throw new Error(`parser ${parsed.success}: ${JSON.stringify(accepts.errors?.slice(0, 3) ?? parsed.error?.issues)}\n${text}`);
	}
	expect(taken).toBeGreaterThan(50);
});

test("every field says what it is, and every number of a unit in which", () => {
	const bare: string[] = [];
	const visit = (node: unknown, path: string): void => {
		if (typeof node !== "object" || node === null) return;
		const { properties } = node as { properties?: Record<string, { type?: string; description?: string }> };
		for (const [key, field] of Object.entries(properties ?? {})) {
			const unit = {
				_m: ", m",
				_deg: ", deg",
				_rpm: ", rpm",
				_kg: ", kg",
				_s: ", s",
				_mps: ", m/s",
				_mps2: ", m/s²",
				_kPa: ", kPa",
				_C: ", °C",
				_degps: ", deg/s",
			}[/_(?:mps2|mps|degps|[a-zA-Z]+)$/.exec(key)?.[0] ?? ""];
			if (!field.description || (field.type === "number" && unit && !field.description.endsWith(unit))) bare.push(`${path}.${key}`);
		}
		for (const [key, child] of Object.entries(node)) visit(child, `${path}.${key}`);
	};
	visit(schema, "");
	expect(bare).toEqual([]);
});
