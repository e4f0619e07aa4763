import { stepTime } from "../store/navigate.ts";
import { transient } from "../store/transient.ts";
import type { Command } from "./command.ts";

export const stepBack: Command = {
	id: "step-back",
	group: "Time",
	name: () => "One step back",
	keys: [","],
	enabled: () => transient.duration > 0,
	run: () => stepTime(-1),
};
