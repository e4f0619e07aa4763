import { useSession } from "../store/session.ts";
import { COMMANDS } from "./all.ts";
import type { Command } from "./command.ts";

/** "Mod+Shift+S", "Shift+F", "Space", "?": Shift is named for letters and named keys only, as it is part of a sign. */
export function strokeOf(e: Pick<KeyboardEvent, "key" | "ctrlKey" | "metaKey" | "altKey" | "shiftKey">): string {
	const name = e.key === " " ? "Space" : e.key;
	const letter = /^\p{L}$/u.test(name);
	const mod = e.ctrlKey || e.metaKey;
	const shift = e.shiftKey && (letter || name.length > 1);
	const key = letter ? (mod || shift ? name.toUpperCase() : name.toLowerCase()) : name;
	return `${mod ? "Mod+" : ""}${e.altKey ? "Alt+" : ""}${shift ? "Shift+" : ""}${key}`;
}

/** Keys of a command as they stand now: its own, or the one the person put in place of its single-letter key. */
export function keysOf(c: Command, keymap: Readonly<Record<string, string>> = useSession.getState().keymap): readonly string[] {
	const own = keymap[c.id];
	return own === undefined ? c.keys : [...c.keys.filter((k) => !isSingle(k)), ...(own === "" ? [] : [own])];
}

/** Heard only while the stage has the focus (WCAG 2.1.4). */
export const isSingle = (stroke: string): boolean => !/^(Mod|Alt)\+/.test(stroke);

const onStage = (target: EventTarget | null): boolean => target instanceof Element && target.closest("[data-stage]") !== null;
const inField = (target: EventTarget | null): boolean =>
	target instanceof HTMLElement && (target.matches("input, textarea, select") || target.isContentEditable);

/** The field's own undo comes first while one is being typed in. */
const OF_FIELDS = new Set(["Mod+Z", "Mod+Y", "Mod+Shift+Z"]);

/** Runs the command that the key names, if it may be heard where the focus is. */
export function hearKey(e: KeyboardEvent): void {
	if (e.defaultPrevented || e.isComposing || useSession.getState().dialog !== null) return;
	const stroke = strokeOf(e);
	if (isSingle(stroke) ? !onStage(e.target) || inField(e.target) : inField(e.target) && OF_FIELDS.has(stroke)) return;
	const command = COMMANDS.find((c) => keysOf(c).includes(stroke));
	if (!command) return;
	e.preventDefault();
	if (command.enabled()) command.run();
}

const MAC = /Mac|iP(hone|ad|od)/.test(globalThis.navigator?.platform ?? "");

/** A stroke as printed: "Ctrl+S", or "⌘S" where that is the habit. */
export const printStroke = (stroke: string): string =>
	(MAC ? stroke.replace("Mod+", "⌘").replace("Alt+", "⌥").replace("Shift+", "⇧") : stroke.replace("Mod+", "Ctrl+")).replace(
		/(^|\+)([a-z])$/,
		(_, plus: string, letter: string) => plus + letter.toUpperCase(),
	);
