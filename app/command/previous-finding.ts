import { useDocument } from "../store/document.ts";
import { stepFinding } from "../store/navigate.ts";
import type { Command } from "./command.ts";

export const previousFinding: Command = {
	id: "previous-finding",
	group: "Findings",
	name: () => "Previous finding",
	keys: ["Shift+F"],
	enabled: () => useDocument.getState().assessed.findings.length > 0,
	run: () => stepFinding(-1),
};
