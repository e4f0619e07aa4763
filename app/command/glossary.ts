import { openDialog } from "../store/session.ts";
import { always, type Command } from "./command.ts";

export const glossary: Command = {
	id: "glossary",
	group: "Help",
	name: () => "Glossary",
	keys: ["g"],
	enabled: always,
	run: () => openDialog("glossary"),
};
