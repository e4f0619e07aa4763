import * as z from "zod";
import { type Quantity, rangeWords } from "./quantities.ts";

// Compiling validators at run time needs `new Function`, which a strict content security policy reports, and costs more than it saves on one file.
z.config({ jitless: true });

/** A number of the file; `description` says what it is. Its messages are what was expected, and nothing else. */
export function number(q: Quantity, description: string) {
	const error = rangeWords(q);
	const base = z.number({ error });
	const bounded = q.above ? base.gt(q.min, { error }) : base.min(q.min, { error });
	// Minus zero is read as zero, which is how it would be written.
	const plain = bounded.max(q.max, { error }).overwrite((value) => value + 0);
	return plain.meta({ description: q.unit === "" ? description : `${description}, ${q.unit}` });
}

export function text(description: string) {
	return z.string({ error: "a text" }).meta({ description });
}

export const ID_LENGTH = 100;

/** A name that others refer by: 1 to 100 characters, none of them a control character. */
export function id(description: string) {
	const error = `an id: 1 to ${ID_LENGTH} characters without control characters`;
	return z
		.string({ error })
		.min(1, { error })
		.max(ID_LENGTH, { error })
		.regex(/^[^\p{Cc}\p{Cs}]*$/u, { error })
		.meta({ description });
}

export function word<const T extends readonly [string, ...string[]]>(words: T, description: string) {
	return z.enum(words, { error: words.length === 1 ? `"${words[0]}"` : `one of ${words.join(", ")}` }).meta({ description });
}

export function flag(description: string) {
	return z.boolean({ error: "true or false" }).meta({ description });
}

export function list<T extends z.ZodType>(item: T, description: string) {
	return z.array(item, { error: "a list" }).meta({ description });
}

/** One id, or a list of at least one. */
export function oneOrSeveral<T extends z.ZodType>(item: T, description: string) {
	return z
		.union([item, z.array(item, { error: "a list" }).min(1, { error: "at least one id" })], { error: "an id or a list of ids" })
		.meta({ description });
}
