import { setView } from "../store/navigate.ts";
import { always, type Command } from "./command.ts";

export const viewExternal: Command = {
	id: "view-external",
	group: "View",
	name: () => "External view",
	keys: ["2"],
	enabled: always,
	run: () => setView("external"),
};
