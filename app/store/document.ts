import { create } from "zustand";
import {
	type Assessed,
	assessLayout,
	type Change,
	edit,
	type History,
	type LayoutFile,
	type Problem,
	redo,
	startHistory,
	undo,
} from "./core.ts";

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
	/** The layout as last opened or saved: the document is dirty while it is another. */
	readonly saved: LayoutFile;
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
	refused: null,
});

/** Filled by `openDocument` before anything is drawn. */
export const useDocument = create<DocumentState>()(() => undefined as unknown as DocumentState);

export const openDocument = (layout: LayoutFile, file: FileRef | null, id: string): void =>
	useDocument.setState(opened(layout, file, id), true);

export const refuseFile = (name: string, problems: readonly Problem[]): void => useDocument.setState({ refused: { name, problems } });
export const dismissRefused = (): void => useDocument.setState({ refused: null });

const adopt = (history: History): void => useDocument.setState({ history, layout: history.layout, assessed: assessLayout(history.layout) });

/** The one way the app changes a layout. Returns what forbids it, or an empty list where it was done. */
export function change(c: Change): readonly Problem[] {
	const result = edit(useDocument.getState().history, c);
	if (!result.ok) return result.problems;
	adopt(result.history);
	return [];
}

export const undoChange = (): void => adopt(undo(useDocument.getState().history));
export const redoChange = (): void => adopt(redo(useDocument.getState().history));
export const markSaved = (layout: LayoutFile, file: FileRef | null): void => useDocument.setState({ saved: layout, file });

export const isDirty = (s: DocumentState): boolean => s.layout !== s.saved;
