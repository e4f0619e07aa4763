import { saveFile } from "../platform/files.ts";
import { always, type Command } from "./command.ts";

export const saveCopy: Command = {
	id: "save-copy",
	group: "File",
	name: () => "Save to another file…",
	keys: ["Mod+Shift+S"],
	enabled: always,
	run: () => void saveFile(true),
};
