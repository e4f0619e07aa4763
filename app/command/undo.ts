import { undoLabel } from "../../src/history/history.ts";
import { undoChange, useDocument } from "../store/document.ts";
import type { Command } from "./command.ts";

const label = (): string | null => undoLabel(useDocument.getState().history);

export const undo: Command = {
	id: "undo",
	group: "Edit",
	name: () => label() ?? "Undo",
	keys: ["Mod+Z"],
	enabled: () => label() !== null,
	run: undoChange,
};
