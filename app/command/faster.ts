import { SPEEDS, useSession } from "../store/session.ts";
import type { Command } from "./command.ts";

export const faster: Command = {
	id: "faster",
	group: "Time",
	name: () => "Play faster",
	keys: ["]"],
	enabled: () => useSession.getState().speed < SPEEDS[SPEEDS.length - 1]!,
	run: () => useSession.setState((s) => ({ speed: SPEEDS.find((speed) => speed > s.speed) ?? s.speed })),
};
