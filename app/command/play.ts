import { mayPlay, pause, play } from "../store/navigate.ts";
import { useSession } from "../store/session.ts";
import type { Command } from "./command.ts";

export const playPause: Command = {
	id: "play",
	group: "Time",
	name: () => (useSession.getState().playing ? "Pause" : "Play"),
	keys: ["Space"],
	enabled: mayPlay,
	run: () => (useSession.getState().playing ? pause() : play()),
};
