import { undoChange, useDocument } from "../store/document.ts";
import type { Command } from "./command.ts";

const label = (): string | null => useDocument.getState().history.undoLabel;

export const undo: Command = {
	id: "undo",
	group: "Edit",
	name: () => (label() === null ? "Undo" : `Undo ${label()}`),
	keys: ["Mod+Z"],
	enabled: () => label() !== null,
	run: undoChange,
};
