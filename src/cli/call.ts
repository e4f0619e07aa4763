/** What was typed after the command's name. */
export interface Call {
	readonly positionals: readonly string[];
	readonly options: {
		readonly json?: boolean | undefined;
		readonly series?: boolean | undefined;
		readonly csv?: string | undefined;
	};
}

/** An expected failure: its message is for the person who typed the call; exit status 2. */
export class Refusal extends Error {}

/** Refuses options that a command does not take. */
export function only(call: Call, command: string, allowed: readonly string[], mostPositionals: number): void {
	for (const [key, value] of Object.entries(call.options))
		if (value !== undefined && !allowed.includes(key))
			throw new Refusal(
				`${command} does not take --${key}${allowed.length ? `; expected ${allowed.map((a) => `--${a}`).join(", ")}` : ""}`,
			);
	if (call.positionals.length > mostPositionals)
		throw new Refusal(
			`${command} takes at most ${mostPositionals} argument${mostPositionals === 1 ? "" : "s"}, got ${call.positionals.length}`,
		);
}
