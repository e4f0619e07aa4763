import type { Problem } from "../layout/problem.ts";
import type { LayoutFile } from "../layout/schema.ts";
import { type Change, edit } from "./edit.ts";
import { share } from "./share.ts";

/** What one undo takes back: its name, and the document on its other side. */
export interface Step {
	readonly label: string;
	readonly document: LayoutFile;
}

/** Edits between two marks that make one step: a drag, a held key. Told apart by key, never by time. */
export interface Gesture {
	readonly key: string;
	readonly label: string;
	/** The document at the mark. */
	readonly before: LayoutFile;
	readonly future: readonly Step[];
}

/**
 * The present document with the ways back and forward; a value, never changed. Documents share all that no step touched,
 * so a step costs the path it changed.
 */
export interface History {
	readonly document: LayoutFile;
	/** Oldest first; each with the document before it. */
	readonly past: readonly Step[];
	/** Nearest last; each with the document after it. */
	readonly future: readonly Step[];
	readonly gesture: Gesture | null;
}

export const startHistory = (document: LayoutFile): History => ({ document, past: [], future: [], gesture: null });

export type HistoryResult =
	| { readonly ok: true; readonly history: History }
	| { readonly ok: false; readonly history: History; readonly problems: readonly Problem[] };

/** Edits through the one door. Within a gesture it becomes part of its step; a change that changes nothing is no step. */
export function change(history: History, what: Change): HistoryResult {
	const result = edit(history.document, what);
	if (!result.ok) return { ok: false, history, problems: result.problems };
	const { document } = result;
	if (document === history.document) return { ok: true, history };
	const past = history.gesture ? history.past : [...history.past, { label: what.label, document: history.document }];
	return { ok: true, history: { ...history, document, past, future: [] } };
}

/** Sets the first mark. A gesture of the same key that is open goes on; one of another key is committed. */
export function begin(history: History, key: string, label: string): History {
	if (history.gesture?.key === key) return history;
	const ready = commit(history);
	return { ...ready, gesture: { key, label, before: ready.document, future: ready.future } };
}

/** Sets the second mark: one step, or none if nothing changed between the marks. */
export function commit(history: History): History {
	const { gesture } = history;
	if (!gesture) return history;
	if (share(gesture.before, history.document) === gesture.before) return cancel(history);
	return { ...history, past: [...history.past, { label: gesture.label, document: gesture.before }], gesture: null };
}

/** Takes the open gesture back as if it had not been. */
export function cancel(history: History): History {
	const { gesture } = history;
	return gesture ? { ...history, document: gesture.before, future: gesture.future, gesture: null } : history;
}

/** One step back; an open gesture is committed first, and is then that step. */
export function undo(history: History): History {
	const ready = commit(history);
	const step = ready.past.at(-1);
	if (!step) return ready;
	return {
		...ready,
		document: step.document,
		past: ready.past.slice(0, -1),
		future: [...ready.future, { ...step, document: ready.document }],
	};
}

export function redo(history: History): History {
	const ready = commit(history);
	const step = ready.future.at(-1);
	if (!step) return ready;
	return {
		...ready,
		document: step.document,
		future: ready.future.slice(0, -1),
		past: [...ready.past, { ...step, document: ready.document }],
	};
}

const named = (verb: string, label: string | undefined): string | null =>
	label === undefined ? null : `${verb} ${label.slice(0, 1).toLowerCase()}${label.slice(1)}`;

/** "Undo set spin rate"; null where nothing is to be undone. */
export const undoLabel = (history: History): string | null => named("Undo", commit(history).past.at(-1)?.label);
export const redoLabel = (history: History): string | null => named("Redo", commit(history).future.at(-1)?.label);
