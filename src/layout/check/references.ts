import { nearest } from "../nearest.ts";
import type { Part, Parts } from "../parts.ts";
import { below } from "../problem.ts";
import { type Problems, problem } from "./bounds.ts";

const MOST_TOLD = 8;
/** A file of many thousand entries must not be compared with itself. */
const MOST_COMPARED = 200;

/** Ids that stand twice among those given: the later ones. */
export function* duplicates(ids: Iterable<Part<string>>, what: string): Problems {
	const first = new Map<string, string>();
	for (const { path, value } of ids) {
		const earlier = first.get(value);
		if (earlier === undefined) first.set(value, path);
		else yield problem(path, value, `${what} only once; it stands at ${earlier} too`);
	}
}

/** What ids can be held against: a list that is none is not held against them. */
export type Known = Pick<Parts<unknown>, "present" | "known">;

/** References that no entry of a list has the id for. */
export function* dangling(refs: Iterable<Part<string>>, { present, known }: Known, what: string): Problems {
	if (!present) return;
	for (const { path, value } of refs) {
		if (known.has(value)) continue;
		const told = [...take(known, MOST_TOLD)].join(", ") + (known.size > MOST_TOLD ? ", …" : "");
		const expected = `the id of a ${what}: ${known.size === 0 ? "there is none" : told}`;
		yield problem(path, value, expected, nearest(value, take(known, MOST_COMPARED)));
	}
}

function* take<T>(items: Iterable<T>, most: number): Generator<T> {
	let left = most;
	for (const item of items) {
		if (left-- <= 0) return;
		yield item;
	}
}

/** One id or several, each with its path. */
export function* each(path: string, ids: string | readonly string[]): Generator<Part<string>> {
	if (typeof ids === "string") yield { path, value: ids };
	else for (const [i, value] of ids.entries()) yield { path: below(path, i), value };
}
