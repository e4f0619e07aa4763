import { useSession } from "../store/session.ts";
import { always, type Command } from "./command.ts";

export const units: Command = {
	id: "units",
	group: "View",
	name: () => (useSession.getState().units === "si" ? "Show US customary units" : "Show SI units"),
	keys: ["u"],
	enabled: always,
	run: () => useSession.setState((s) => ({ units: s.units === "si" ? "us" : "si" })),
};
