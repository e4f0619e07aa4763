import { checkLayout } from "./check/layout.ts";
import { explain } from "./explain.ts";
import { migrate } from "./migrate.ts";
import { partsOf, readParts } from "./parts.ts";
import { type Problem, WHOLE_FILE } from "./problem.ts";
import { MOST_BYTES, scanJson } from "./scan.ts";
import { type LayoutFile, layoutSchema } from "./schema.ts";

export type ParseResult =
	| { readonly ok: true; readonly layout: LayoutFile }
	| { readonly ok: false; readonly problems: readonly Problem[] };

declare const TextDecoder: new (label: string, options: { fatal: boolean }) => { decode(bytes: Uint8Array): string };

/** The text of a file's bytes, without a byte order mark; refused where too long or not UTF-8. */
export function decodeLayout(bytes: Uint8Array): { ok: true; text: string } | { ok: false; problems: Problem[] } {
	if (bytes.length > MOST_BYTES) {
		return { ok: false, problems: [{ path: WHOLE_FILE, value: `${bytes.length} bytes`, expected: `at most ${MOST_BYTES} bytes` }] };
	}
	try {
		return { ok: true, text: new TextDecoder("utf-8", { fatal: true }).decode(bytes) };
	} catch {
		return { ok: false, problems: [{ path: WHOLE_FILE, value: "bytes that are not UTF-8", expected: "a text in UTF-8" }] };
	}
}

/** A layout from the text of its file: whole, or every problem that keeps it from being read. */
export function parseLayout(text: string): ParseResult {
	const body = text.startsWith("\uFEFF") ? text.slice(1) : text;
	const scan = scanJson(body);
	if (!scan.readable) return { ok: false, problems: scan.problems };
	const result = validateLayout(JSON.parse(body));
	if (scan.problems.length === 0) return result;
	return { ok: false, problems: result.ok ? scan.problems : [...scan.problems, ...result.problems] };
}

/** The same for a value: what an edit or a reader of JSON holds. The value is not changed. */
export function validateLayout(value: unknown): ParseResult {
	const migrated = migrate(value);
	if (!migrated.ok) return migrated;
	const parsed = layoutSchema.safeParse(migrated.value);
	const problems = parsed.success ? [] : explain(layoutSchema, migrated.value);
	if (!parsed.success && problems.length === 0) throw new Error(`refused without a reason: ${parsed.error.message}`);
	problems.push(...checkLayout(parsed.success ? partsOf(parsed.data) : readParts(migrated.value)));
	return parsed.success && problems.length === 0 ? { ok: true, layout: parsed.data } : { ok: false, problems };
}
