import { useDocument } from "../store/document.ts";
import { stepFinding } from "../store/navigate.ts";
import type { Command } from "./command.ts";

export const nextFinding: Command = {
	id: "next-finding",
	group: "Findings",
	name: () => "Next finding",
	keys: ["f"],
	enabled: () => useDocument.getState().assessed.findings.length > 0,
	run: () => stepFinding(1),
};
