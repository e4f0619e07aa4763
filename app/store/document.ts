import { create } from "zustand";
import { begin, change as changeHistory, commit, type History, redo, startHistory, undo } from "../../src/history/history.ts";
import { share } from "../../src/history/share.ts";
import { type Assessed, assessLayout, type Change, type LayoutFile, type Problem } from "./core.ts";

/** The file a layout came from or was saved to; the handle where the browser can write back. */
export interface FileRef {
	readonly name: string;
	readonly handle: FileSystemFileHandle | null;
}

/** The layout, its history and what was computed of it. `layout` and `assessed` always belong together. */
export interface DocumentState {
	/** Changes whenever another document is opened; the name of its autosaved copy. */
	readonly id: string;
	readonly history: History;
	readonly layout: LayoutFile;
	readonly assessed: Assessed;
	readonly file: FileRef | null;
	/** The layout as last opened or saved. */
	readonly saved: LayoutFile;
	/** Whether the layout differs from the saved one. */
	readonly dirty: boolean;
	/** A file that was refused, while the document stays. */
	readonly refused: { readonly name: string; readonly problems: readonly Problem[] } | null;
}

const opened = (layout: LayoutFile, file: FileRef | null, id: string): DocumentState => ({
	id,
	history: startHistory(layout),
	layout,
	assessed: assessLayout(layout),
	file,
	saved: layout,
	dirty: false,
	refused: null,
});

/** Filled by `openDocument` before anything is drawn. */
export const useDocument = create<DocumentState>()(() => undefined as unknown as DocumentState);

export const openDocument = (layout: LayoutFile, file: FileRef | null, id: string): void =>
	useDocument.setState(opened(layout, file, id), true);

export const refuseFile = (name: string, problems: readonly Problem[]): void => useDocument.setState({ refused: { name, problems } });
export const dismissRefused = (): void => useDocument.setState({ refused: null });

function adopt(history: History): void {
	const { history: before, layout, saved } = useDocument.getState();
	const next = history.document;
	if (history === before) return;
	useDocument.setState(
		next === layout ? { history } : { history, layout: next, assessed: assessLayout(next), dirty: share(saved, next) !== saved },
	);
}

/**
 * The one way the app changes a layout; returns what forbids it, or an empty list where it was done. Changes of one
 * gesture in a row (a held key) make one step.
 */
export function change(what: Change, gesture?: string): readonly Problem[] {
	const { history } = useDocument.getState();
	const result = changeHistory(gesture === undefined ? commit(history) : begin(history, gesture, what.label), what);
	if (!result.ok) return result.problems;
	adopt(result.history);
	return [];
}

/** Ends a gesture: what follows is another step. */
export const endGesture = (): void => adopt(commit(useDocument.getState().history));
export const undoChange = (): void => adopt(undo(useDocument.getState().history));
export const redoChange = (): void => adopt(redo(useDocument.getState().history));

/** A layout was written to a file; the document may have moved on meanwhile. */
export const markSaved = (layout: LayoutFile, file: FileRef | null): void =>
	useDocument.setState((s) => ({ saved: layout, file, dirty: share(layout, s.layout) !== layout }));

export const isDirty = (s: DocumentState): boolean => s.dirty;
