import { SPEEDS, useSession } from "../store/session.ts";
import type { Command } from "./command.ts";

export const slower: Command = {
	id: "slower",
	group: "Time",
	name: () => "Play slower",
	keys: ["["],
	enabled: () => useSession.getState().speed > SPEEDS[0],
	run: () => useSession.setState((s) => ({ speed: SPEEDS.findLast((speed) => speed < s.speed) ?? s.speed })),
};
