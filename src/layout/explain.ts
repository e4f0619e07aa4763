import * as z from "zod";
import { nearest } from "./nearest.ts";
import { below, type Problem, valueText, WHOLE_FILE } from "./problem.ts";

/**
 * What is wrong with a value that a schema refuses: every fault in it. Where the word that tells kinds apart is itself
 * wrong, the other keys are still held against every kind that knows them.
 */
export function explain(schema: z.core.$ZodType, value: unknown, path = ""): Problem[] {
	if (schema instanceof z.ZodExactOptional) return explain(schema.unwrap(), value, path);
	if (schema instanceof z.ZodObject) return isObject(value) ? explainObject([schema], value, path) : [refused(value, "an object", path)];
	if (schema instanceof z.ZodDiscriminatedUnion) return explainKinds(schema, value, path);
	if (schema instanceof z.ZodArray && Array.isArray(value)) {
		const items = value.flatMap((item, i) => explain(schema.element, item, below(path, i)));
		return items.length > 0 ? items : explainLeaf(schema, value, path);
	}
	if (schema instanceof z.ZodUnion && Array.isArray(value)) {
		const list = schema.options.find((o) => o instanceof z.ZodArray);
		if (list) return explain(list, value, path);
	}
	return explainLeaf(schema, value, path);
}

const isObject = (value: unknown): value is Record<string, unknown> => typeof value === "object" && value !== null && !Array.isArray(value);

const refused = (value: unknown, expected: string, path: string): Problem => ({
	path: path === "" ? WHOLE_FILE : path,
	value: valueText(value),
	expected,
});

function explainLeaf(schema: z.core.$ZodType, value: unknown, path: string): Problem[] {
	const result = z.safeParse(schema, value);
	return result.success ? [] : [refused(value, result.error.issues[0]?.message ?? "another value", path)];
}

/** Every way an object can go, as plain objects. */
const objectsOf = (schema: z.core.$ZodType): z.ZodObject[] => {
	if (schema instanceof z.ZodObject) return [schema];
	if (schema instanceof z.ZodDiscriminatedUnion) return schema.options.flatMap(objectsOf);
	return [];
};

function explainKinds(schema: z.ZodDiscriminatedUnion, value: unknown, path: string): Problem[] {
	if (!isObject(value)) return [refused(value, "an object", path)];
	const key = schema.def.discriminator;
	const said = Object.hasOwn(value, key) ? value[key] : undefined;
	const taking = schema.options.filter((o) => objectsOf(o).some((object) => z.safeParse(object.shape[key] as z.ZodType, said).success));
	const [only] = taking;
	return taking.length === 1 && only ? explain(only, value, path) : explainObject(objectsOf(schema), value, path);
}

/** The faults of an object that may be any of `kinds`: keys known to none, keys that every one requires, values that none takes. */
function explainObject(kinds: readonly z.ZodObject[], value: Record<string, unknown>, path: string): Problem[] {
	const problems: Problem[] = [];
	const known = new Set(kinds.flatMap((k) => Object.keys(k.shape)));
	for (const key of known) {
		const fields = kinds.flatMap((k) => (Object.hasOwn(k.shape, key) ? [k.shape[key] as z.ZodType] : []));
		if (Object.hasOwn(value, key)) {
			const faults = fields.map((f) => explain(f, value[key], below(path, key)));
			if (faults.every((f) => f.length > 0)) problems.push(...merged(faults));
		} else if (fields.length === kinds.length && fields.every((f) => !(f instanceof z.ZodExactOptional))) {
			problems.push(...merged(fields.map((f) => explain(f, undefined, below(path, key)))));
		}
	}
	for (const key of Object.keys(value)) {
		if (known.has(key)) continue;
		const like = nearest(key, known);
		problems.push({
			path: below(path, key),
			value: valueText(value[key]),
			expected: `no such key; known here: ${[...known].join(", ")}`,
			...(like === undefined ? {} : { nearest: like }),
		});
	}
	return problems;
}

/** The faults found one way, or, where several ways want one word each, all the words. */
function merged(ways: readonly Problem[][]): Problem[] {
	const [first] = ways;
	if (!first) return [];
	const expected = new Set(ways.flatMap((w) => (w.length === 1 && w[0] ? [w[0].expected] : [])));
	const [only] = first;
	return first.length === 1 && only && expected.size > 1
		? [{ ...only, expected: `one of ${[...expected].join(", ").replaceAll("one of ", "")}` }]
		: first;
}
