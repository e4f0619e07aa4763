import { saveFile } from "../platform/files.ts";
import { isDirty, useDocument } from "../store/document.ts";
import type { Command } from "./command.ts";

export const save: Command = {
	id: "save",
	group: "File",
	name: () => "Save",
	keys: ["Mod+S"],
	enabled: () => {
		const s = useDocument.getState();
		return isDirty(s) || s.file === null;
	},
	run: () => void saveFile(false),
};
