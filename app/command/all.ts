import type { Command } from "./command.ts";
import { commands } from "./commands.ts";
import { faster } from "./faster.ts";
import { glossary } from "./glossary.ts";
import { startNew } from "./new.ts";
import { nextFinding } from "./next-finding.ts";
import { open } from "./open.ts";
import { playPause } from "./play.ts";
import { previousFinding } from "./previous-finding.ts";
import { recover } from "./recover.ts";
import { redo } from "./redo.ts";
import { save } from "./save.ts";
import { saveCopy } from "./save-copy.ts";
import { slower } from "./slower.ts";
import { stepBack } from "./step-back.ts";
import { stepOn } from "./step-on.ts";
import { undo } from "./undo.ts";
import { units } from "./units.ts";
import { viewExternal } from "./view-external.ts";
import { viewEyepoint } from "./view-eyepoint.ts";

/** Every command, in the order of the menu. */
export const COMMANDS: readonly Command[] = [
	open,
	startNew,
	save,
	saveCopy,
	recover,
	undo,
	redo,
	viewEyepoint,
	viewExternal,
	units,
	playPause,
	stepBack,
	stepOn,
	slower,
	faster,
	nextFinding,
	previousFinding,
	glossary,
	commands,
];

export const commandNamed = (id: string): Command => {
	const found = COMMANDS.find((c) => c.id === id);
	if (!found) throw new RangeError(`no command has the id "${id}"`);
	return found;
};
