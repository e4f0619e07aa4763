import { type ParseResult, validateLayout } from "../../src/layout/parse.ts";
import type { LayoutFile } from "../../src/layout/schema.ts";

export interface Change {
	readonly label: string;
	readonly key?: string;
	readonly apply: (layout: LayoutFile) => LayoutFile;
}
interface Step {
	readonly layout: LayoutFile;
	readonly label: string;
	readonly key: string | undefined;
}
export interface History {
	readonly layout: LayoutFile;
	readonly past: readonly Step[];
	readonly future: readonly Step[];
	readonly undoLabel: string | null;
	readonly redoLabel: string | null;
}
const make = (layout: LayoutFile, past: readonly Step[], future: readonly Step[]): History => ({
	layout,
	past,
	future,
	undoLabel: past.at(-1)?.label ?? null,
	redoLabel: future.at(-1)?.label ?? null,
});
export const startHistory = (layout: LayoutFile): History => make(layout, [], []);
export function edit(h: History, c: Change): { ok: true; history: History } | Extract<ParseResult, { ok: false }> {
	const r = validateLayout(c.apply(h.layout));
	if (!r.ok) return r;
	const last = h.past.at(-1);
	const past = c.key !== undefined && last?.key === c.key ? h.past : [...h.past, { layout: h.layout, label: c.label, key: c.key }];
	return { ok: true, history: make(r.layout, past, []) };
}
export const undo = (h: History): History => {
	const s = h.past.at(-1);
	return s ? make(s.layout, h.past.slice(0, -1), [...h.future, { ...s, layout: h.layout }]) : h;
};
export const redo = (h: History): History => {
	const s = h.future.at(-1);
	return s ? make(s.layout, [...h.past, { ...s, layout: h.layout }], h.future.slice(0, -1)) : h;
};
