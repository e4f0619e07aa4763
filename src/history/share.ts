/**
 * `next` with every part that equals the same part of `before` replaced by that very part, so that what an edit did not
 * touch keeps its identity. Plain JSON values; neither is changed.
 */
export function share<T>(before: T, next: T): T;
export function share(before: unknown, next: unknown): unknown {
	if (Object.is(before, next) || typeof before !== "object" || typeof next !== "object" || before === null || next === null) return next;
	if (Array.isArray(before) && Array.isArray(next)) {
		const items = next.map((item, i) => (i < before.length ? share(before[i], item) : item));
		return items.length === before.length && items.every((item, i) => Object.is(item, before[i])) ? before : items;
	}
	if (Array.isArray(before) || Array.isArray(next)) return next;
	const old = before as Record<string, unknown>;
	const entries = Object.entries(next).map(([key, value]) => [key, Object.hasOwn(old, key) ? share(old[key], value) : value] as const);
	const keys = Object.keys(old);
	const same = keys.length === entries.length && entries.every(([key, value], i) => key === keys[i] && Object.is(value, old[key]));
	return same ? before : Object.fromEntries(entries);
}
