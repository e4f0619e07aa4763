import { pickFile } from "../platform/files.ts";
import { always, type Command } from "./command.ts";

export const open: Command = {
	id: "open",
	group: "File",
	name: () => "Open a layout…",
	keys: ["Mod+O"],
	enabled: always,
	run: () => void pickFile(),
};
