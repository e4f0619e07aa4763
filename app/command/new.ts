import { openNew } from "../platform/files.ts";
import { always, type Command } from "./command.ts";

export const startNew: Command = {
	id: "new",
	group: "File",
	name: () => "New layout",
	keys: ["n"],
	enabled: always,
	run: openNew,
};
