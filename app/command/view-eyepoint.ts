import { setView } from "../store/navigate.ts";
import { always, type Command } from "./command.ts";

export const viewEyepoint: Command = {
	id: "view-eyepoint",
	group: "View",
	name: () => "Eyepoint view",
	keys: ["1"],
	enabled: always,
	run: () => setView("eyepoint"),
};
