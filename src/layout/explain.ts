import * as z from "zod/mini";
import { nearest } from "./nearest.ts";
import { below, type Problem, valueText, WHOLE_FILE } from "./problem.ts";

/** The paths of the objects and lists that are right in themselves; what lies within them is not among them. */
export type Accepted = Set<string>;

/**
 * What is wrong with a value that a schema refuses: every fault in it, one after the other. Where the word that tells
 * kinds apart is itself wrong, the other keys are still held against every kind that knows them.
 */
export function* explain(schema: z.core.$ZodType, value: unknown, accepted: Accepted, path = ""): Generator<Problem> {
	if (schema instanceof z.ZodMiniExactOptional) yield* explain(schema.def.innerType, value, accepted, path);
	else if (schema instanceof z.ZodMiniArray && Array.isArray(value)) {
		for (const [i, item] of value.entries()) yield* explain(schema.def.element, item, accepted, below(path, i));
		if (value.length === 0) yield* explainLeaf(schema, value, path);
	} else if (!isHolder(value)) yield* explainLeaf(schema, value, path);
	else if (accepts(schema, value)) accepted.add(path);
	else yield* explainRefused(schema, value, accepted, path);
}

/** The same for an object or list that is known to be refused. */
export function* explainRefused(schema: z.core.$ZodType, value: object, accepted: Accepted, path = ""): Generator<Problem> {
	if (schema instanceof z.ZodMiniObject && isObject(value)) yield* explainObject([schema], value, accepted, path);
	else if (schema instanceof z.ZodMiniDiscriminatedUnion && isObject(value)) yield* explainKinds(schema, value, accepted, path);
	else {
		const list = schema instanceof z.ZodMiniUnion && Array.isArray(value) && schema.def.options.find((o) => o instanceof z.ZodMiniArray);
		yield* list ? explain(list, value, accepted, path) : explainLeaf(schema, value, path);
	}
}

/** Without narrowing the type: what is refused is still looked into. */
const accepts = (schema: z.core.$ZodType, value: unknown): boolean => z.validate(schema, value);
export const isHolder = (value: unknown): value is object => typeof value === "object" && value !== null;
const isObject = (value: object): value is Record<string, unknown> => !Array.isArray(value);

const refused = (value: unknown, expected: string, path: string): Problem => ({
	path: path === "" ? WHOLE_FILE : path,
	value: valueText(value),
	expected,
});

function* explainLeaf(schema: z.core.$ZodType, value: unknown, path: string): Generator<Problem> {
	if (schema instanceof z.ZodMiniObject || schema instanceof z.ZodMiniDiscriminatedUnion) {
		yield refused(value, "an object", path);
		return;
	}
	const result = z.safeParse(schema, value);
	if (!result.success) yield refused(value, result.error.issues[0]?.message ?? "another value", path);
}

/** Every way an object can go, as plain objects. */
const objectsOf = (schema: z.core.$ZodType): z.ZodMiniObject[] => {
	if (schema instanceof z.ZodMiniObject) return [schema];
	if (schema instanceof z.ZodMiniDiscriminatedUnion) return schema.def.options.flatMap(objectsOf);
	return [];
};

function* explainKinds(
	schema: z.ZodMiniDiscriminatedUnion,
	value: Record<string, unknown>,
	accepted: Accepted,
	path: string,
): Generator<Problem> {
	const key = (schema.def as z.core.$ZodDiscriminatedUnionDef).discriminator;
	const said = Object.hasOwn(value, key) ? value[key] : undefined;
	const taking = schema.def.options.filter((o) => objectsOf(o).some((kind) => z.validate(kind.shape[key] as z.core.$ZodType, said)));
	const [only] = taking;
	if (taking.length === 1 && only) yield* explainRefused(only, value, accepted, path);
	else yield* explainObject(objectsOf(schema), value, accepted, path);
}

/** The faults of an object that may be any of `kinds`: keys known to none, keys that every one requires, values that none takes. */
function* explainObject(
	kinds: readonly z.ZodMiniObject[],
	value: Record<string, unknown>,
	accepted: Accepted,
	path: string,
): Generator<Problem> {
	const known = new Set(kinds.flatMap((k) => Object.keys(k.shape)));
	for (const key of known) {
		const fields = new Set(kinds.flatMap((k) => (Object.hasOwn(k.shape, key) ? [k.shape[key] as z.core.$ZodType] : [])));
		const needed = kinds.every((k) => Object.hasOwn(k.shape, key) && !(k.shape[key] instanceof z.ZodMiniExactOptional));
		if (Object.hasOwn(value, key) || needed) yield* explainField([...fields], value[key], accepted, below(path, key));
	}
	for (const key of Object.keys(value)) {
		if (known.has(key)) continue;
		const like = nearest(key, known);
		yield {
			path: below(path, key),
			value: valueText(value[key]),
			expected: `no such key; known here: ${[...known].join(", ")}`,
			...(like === undefined ? {} : { nearest: like }),
		};
	}
}

/** The faults of a value that may be any of `fields`: none if one takes it; where each asks for words of its own, all the words. */
function* explainField(fields: readonly z.core.$ZodType[], value: unknown, accepted: Accepted, path: string): Generator<Problem> {
	const [first] = fields;
	if (!first) return;
	if (fields.length === 1) {
		yield* explain(first, value, accepted, path);
		return;
	}
	if (fields.some((f) => accepts(f, value))) return;
	const words = fields.flatMap((f) => (f instanceof z.ZodMiniEnum ? f.options : []));
	if (words.length > 0) yield refused(value, `one of ${words.join(", ")}`, path);
	else yield* explain(first, value, accepted, path);
}
