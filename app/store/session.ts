import { create } from "zustand";
import type { UnitSystem } from "../../src/quantity/print-quantity.ts";

/** Names one assessed case. */
export interface CaseKey {
	readonly activity: string;
	readonly crew: string | null;
	readonly phase: string;
}

export type View = "eyepoint" | "external";
export type DialogName = "caution" | "glossary" | "commands" | "recover";

export const SPEEDS = [1 / 8, 1 / 4, 1 / 2, 1, 2, 4, 8, 16] as const;

export interface Notice {
	readonly text: string;
	/** Id of a command offered with it. */
	readonly command?: string;
}

/** What is looked at and how. Nothing here is in the history or the file. */
export interface SessionState {
	/** The case on the stage; null where no built activity has one. */
	readonly selected: CaseKey | null;
	/** Why this case was opened, as a sentence; null once the person chose for themselves. */
	readonly why: string | null;
	/** Key of the chosen finding. */
	readonly finding: string | null;
	/** Summary key whose derivation is open. */
	readonly derivation: string | null;
	readonly view: View;
	readonly playing: boolean;
	readonly speed: number;
	readonly units: UnitSystem;
	readonly dialog: DialogName | null;
	readonly notice: Notice | null;
	/** The caution before the first Eyepoint run was read and accepted. */
	readonly cautionAccepted: boolean;
	readonly reducedMotion: boolean;
	/** Changed single-letter keys, by command id. */
	readonly keymap: Readonly<Record<string, string>>;
}

export const SESSION_START: SessionState = {
	selected: null,
	why: null,
	finding: null,
	derivation: null,
	view: "eyepoint",
	playing: false,
	speed: 1,
	units: "si",
	dialog: null,
	notice: null,
	cautionAccepted: false,
	reducedMotion: false,
	keymap: {},
};

export const useSession = create<SessionState>()(() => SESSION_START);

export const openDialog = (dialog: DialogName | null): void => useSession.setState({ dialog });
export const say = (text: string, command?: string): void =>
	useSession.setState({ notice: command === undefined ? { text } : { text, command } });
