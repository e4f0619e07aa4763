import { stepTime } from "../store/navigate.ts";
import { transient } from "../store/transient.ts";
import type { Command } from "./command.ts";

export const stepOn: Command = {
	id: "step-on",
	group: "Time",
	name: () => "One step on",
	keys: ["."],
	enabled: () => transient.duration > 0,
	run: () => stepTime(1),
};
