/** One thing the person can do; menu, shortcut and the list of commands all read it. */
export interface Command {
	readonly id: string;
	readonly group: "File" | "Edit" | "View" | "Time" | "Findings" | "Help";
	/** As listed; may name what it would act on. */
	name(): string;
	/** "Mod+S" (Ctrl, or Cmd on a Mac), "Shift+F", "Space", or one character, which is heard on the stage only. */
	readonly keys: readonly string[];
	/** Whether it would do something now; listed as unavailable otherwise. */
	enabled(): boolean;
	run(): void;
}

export const always = (): boolean => true;
