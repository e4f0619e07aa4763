import { openDialog } from "../store/session.ts";
import { always, type Command } from "./command.ts";

export const commands: Command = {
	id: "commands",
	group: "Help",
	name: () => "Commands and keys",
	keys: ["?", "Mod+K"],
	enabled: always,
	run: () => openDialog("commands"),
};
