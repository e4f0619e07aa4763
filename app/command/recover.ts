import { openDialog } from "../store/session.ts";
import { always, type Command } from "./command.ts";

export const recover: Command = {
	id: "recover",
	group: "File",
	name: () => "Recover kept work…",
	keys: ["r"],
	enabled: always,
	run: () => openDialog("recover"),
};
