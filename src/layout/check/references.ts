import { nearest } from "../nearest.ts";
import type { Part, Parts } from "../parts.ts";
import { below, type Problem } from "../problem.ts";
import { problem } from "./bounds.ts";

const MOST_TOLD = 8;
/** A file of many thousand entries must not be compared with itself. */
const MOST_COMPARED = 200;

/** Ids that stand twice among those given: the later ones. */
export function duplicates(ids: readonly Part<string>[], what: string): Problem[] {
	const first = new Map<string, string>();
	return ids.flatMap(({ path, value }) => {
		const earlier = first.get(value);
		if (earlier === undefined) first.set(value, path);
		return earlier === undefined ? [] : [problem(path, value, `${what} only once; it stands at ${earlier} too`)];
	});
}

/** Nothing, or the one problem that no entry has the id referred to. */
export function dangling(path: string, id: string, known: ReadonlySet<string>, what: string): Problem[] {
	if (known.has(id)) return [];
	const told = [...take(known, MOST_TOLD)].join(", ") + (known.size > MOST_TOLD ? ", …" : "");
	return [problem(path, id, `the id of a ${what}: ${known.size === 0 ? "there is none" : told}`, nearest(id, take(known, MOST_COMPARED)))];
}

function* take<T>(items: Iterable<T>, most: number): Generator<T> {
	let left = most;
	for (const item of items) {
		if (left-- <= 0) return;
		yield item;
	}
}

/** One id or several, each with its path. */
export const each = (path: string, ids: string | readonly string[]): Part<string>[] =>
	typeof ids === "string" ? [{ path, value: ids }] : ids.map((value, i) => ({ path: below(path, i), value }));

/** References by one key to entries of a list; a list that cannot be read is not held against them. */
export function refer(refs: readonly Part<string>[], list: Pick<Parts<unknown>, "present" | "known">, what: string): Problem[] {
	return list.present ? refs.flatMap((r) => dangling(r.path, r.value, list.known, what)) : [];
}
