import * as z from "zod/mini";
import { type Quantity, rangeWords } from "./quantities.ts";

// Compiling validators at run time needs `new Function`, which a strict content security policy reports, and costs more than it saves on one file.
z.config({ jitless: true });

/** What a field is, for the JSON Schema. */
export function described<T extends z.core.$ZodType>(description: string, schema: T): T {
	z.globalRegistry.add(schema, { description });
	return schema;
}

/** A number of the file; `description` says what it is. Its messages are what was expected, and nothing else. */
export function number(q: Quantity, description: string) {
	const error = rangeWords(q);
	const least = q.above ? z.gt(q.min, { error }) : z.gte(q.min, { error });
	// Minus zero is read as zero, which is how it would be written.
	const plain = z.overwrite<number>((value) => value + 0);
	return described(
		q.unit === "" ? description : `${description}, ${q.unit}`,
		z.number({ error }).check(least, z.lte(q.max, { error }), plain),
	);
}

export const text = (description: string) => described(description, z.string({ error: "a text" }));

export const ID_LENGTH = 100;
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what an id may not hold
const ID = /^[^\u0000-\u001f\u007f-\u009f]*$/;

/** A name that others refer by: 1 to 100 characters, none of them a control character. */
export function id(description: string) {
	const error = `an id: 1 to ${ID_LENGTH} characters without control characters`;
	const checks = [z.minLength(1, { error }), z.maxLength(ID_LENGTH, { error }), z.regex(ID, { error })] as const;
	return described(description, z.string({ error }).check(...checks));
}

export const word = <const T extends readonly [string, ...string[]]>(words: T, description: string) =>
	described(description, z.enum(words, { error: words.length === 1 ? words[0] : `one of ${words.join(", ")}` }));

export const flag = (description: string) => described(description, z.boolean({ error: "true or false" }));

export const list = <T extends z.core.$ZodType>(item: T, description: string) => described(description, z.array(item, { error: "a list" }));

/** A list of at least one; `least` says so. */
export const filled = <T extends z.core.$ZodType>(item: T, least: string, description: string) =>
	described(description, z.array(item, { error: "a list" }).check(z.minLength(1, { error: least })));

/** One word, or a list of at least one. */
export const oneOrSeveral = <T extends z.core.$ZodType>(item: T, description: string) =>
	described(
		description,
		z.union([item, z.array(item).check(z.minLength(1, { error: "at least one of them" }))], { error: "a text or a list of texts" }),
	);

export const object = <T extends z.core.$ZodShape>(shape: T, description: string) => described(description, z.strictObject(shape));

/** May be absent, and has then the meaning its description tells. */
export const optional = <T extends z.core.$ZodType>(schema: T) => z.exactOptional(schema);
