import { redoChange, useDocument } from "../store/document.ts";
import type { Command } from "./command.ts";

const label = (): string | null => useDocument.getState().history.redoLabel;

export const redo: Command = {
	id: "redo",
	group: "Edit",
	name: () => (label() === null ? "Redo" : `Redo ${label()}`),
	keys: ["Mod+Y", "Mod+Shift+Z"],
	enabled: () => label() !== null,
	run: redoChange,
};
