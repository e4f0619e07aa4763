import { validateLayout } from "../layout/parse.ts";
import { below, type Problem, valueText } from "../layout/problem.ts";
import type { LayoutFile } from "../layout/schema.ts";
import { share } from "./share.ts";

/** Keys and list indices from the root of the file. */
export type Path = readonly (string | number)[];

/** Writes a value at a key, or at an index of a list; the index after the last one appends. */
export interface SetValue {
	readonly kind: "set";
	readonly path: Path;
	readonly value: unknown;
}
/** Takes a key or an entry of a list away. */
export interface RemoveValue {
	readonly kind: "remove";
	readonly path: Path;
}
export type PathChange = SetValue | RemoveValue;

/** One change as the user names it ("Set spin rate"): at one place, at several at once, or of the whole. */
export type Change = { readonly label: string } & (
	| PathChange
	| { readonly kind: "several"; readonly changes: readonly PathChange[] }
	| { readonly kind: "replace"; readonly layout: unknown }
);

export type EditResult =
	| { readonly ok: true; readonly document: LayoutFile }
	| { readonly ok: false; readonly problems: readonly Problem[] };

/**
 * The one door for edits: the changed document whole, checked as a file is, or the problems. The document given is never
 * changed, and what the change does not touch keeps its identity.
 */
export function edit(document: LayoutFile, change: Change): EditResult {
	const changed = applied(document, change);
	if (!changed.ok) return changed;
	const result = validateLayout(changed.value);
	return result.ok ? { ok: true, document: share(document, result.layout) } : result;
}

type Applied = { readonly ok: true; readonly value: unknown } | { readonly ok: false; readonly problems: readonly Problem[] };

function applied(document: unknown, change: Change): Applied {
	switch (change.kind) {
		case "replace":
			return { ok: true, value: change.layout };
		case "several": {
			let value: unknown = document;
			for (const one of change.changes) {
				const next = at(value, one, 0, "");
				if (!next.ok) return next;
				value = next.value;
			}
			return { ok: true, value };
		}
		default:
			return at(document, change, 0, "");
	}
}

const nowhere = (path: string, found: unknown, expected: string): Applied => ({
	ok: false,
	problems: [{ path, value: valueText(found), expected }],
});

/** A copy of `holder` with the change made below it; everything off the path is shared. */
function at(holder: unknown, change: PathChange, depth: number, path: string): Applied {
	const key = change.path[depth];
	if (key === undefined) return nowhere("file", holder, "a path of at least one key");
	const here = below(path, key);
	const last = depth === change.path.length - 1;
	if (typeof holder !== "object" || holder === null) return nowhere(here, holder, "a place in the layout");
	if (Array.isArray(holder)) {
		const appends = last && change.kind === "set" && key === holder.length;
		if (typeof key !== "number" || !(Object.hasOwn(holder, key) || appends))
			return nowhere(here, undefined, `an entry of a list of ${holder.length}`);
		if (last && change.kind === "remove") return { ok: true, value: holder.toSpliced(key, 1) };
		const item = last && change.kind === "set" ? ({ ok: true, value: change.value } as const) : at(holder[key], change, depth + 1, here);
		return item.ok ? { ok: true, value: appends ? [...holder, item.value] : holder.with(key, item.value) } : item;
	}
	const entries = Object.entries(holder);
	const index = entries.findIndex(([k]) => k === String(key));
	if (index < 0 && !(last && change.kind === "set")) return nowhere(here, undefined, "a key that is there");
	if (last && change.kind === "remove") return { ok: true, value: Object.fromEntries(entries.toSpliced(index, 1)) };
	const item =
		last && change.kind === "set" ? ({ ok: true, value: change.value } as const) : at(entries[index]?.[1], change, depth + 1, here);
	if (!item.ok) return item;
	const entry: [string, unknown] = [String(key), item.value];
	return { ok: true, value: Object.fromEntries(index < 0 ? [...entries, entry] : entries.with(index, entry)) };
}
