import { redoLabel } from "../../src/history/history.ts";
import { redoChange, useDocument } from "../store/document.ts";
import type { Command } from "./command.ts";

const label = (): string | null => redoLabel(useDocument.getState().history);

export const redo: Command = {
	id: "redo",
	group: "Edit",
	name: () => label() ?? "Redo",
	keys: ["Mod+Y", "Mod+Shift+Z"],
	enabled: () => label() !== null,
	run: redoChange,
};
