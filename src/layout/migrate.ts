import { type Problem, valueText } from "./problem.ts";
import { VERSION } from "./schema.ts";

/** Turns a file of version `from` into one of the next version. */
export interface Migration {
	readonly from: number;
	/** Given an object of that version, parsed JSON that it may not change; what is broken in it is passed on for the parser to refuse. */
	readonly up: (file: Readonly<Record<string, unknown>>) => Record<string, unknown>;
}

/** One for every version before the present one, oldest first. */
export const MIGRATIONS: readonly Migration[] = [];

export type Migrated = { readonly ok: true; readonly value: unknown } | { readonly ok: false; readonly problems: readonly Problem[] };

/**
 * Brings a file of an older version to the present one. A newer version is refused, with nothing else said of a file that
 * this reader cannot know; what has no version that can be read passes unchanged, for the parser to refuse.
 */
export function migrate(value: unknown, migrations: readonly Migration[] = MIGRATIONS, present: number = VERSION): Migrated {
	if (typeof value !== "object" || value === null || !Object.hasOwn(value, "version")) return { ok: true, value };
	let file = value as Record<string, unknown>;
	const { version } = file;
	if (typeof version !== "number" || !Number.isInteger(version) || version < 1) return { ok: true, value };
	if (version > present) {
		const expected = `${present} or older: version ${version} is newer than this program reads`;
		return { ok: false, problems: [{ path: "version", value: valueText(version), expected }] };
	}
	for (let v = version; v < present; v++) {
		const step = migrations.find((m) => m.from === v);
		if (!step) throw new Error(`no migration from version ${v}`);
		file = { ...step.up(file), version: v + 1 };
	}
	return { ok: true, value: file };
}
