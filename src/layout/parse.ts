import * as z from "zod/mini";
import { checkLayout } from "./check/layout.ts";
import { type Accepted, explain, explainRefused, isHolder } from "./explain.ts";
import { migrate } from "./migrate.ts";
import { acceptedParts, partsOf } from "./parts.ts";
import { type Problem, WHOLE_FILE } from "./problem.ts";
import { MOST_BYTES, scanJson } from "./scan.ts";
import { type LayoutFile, layoutSchema } from "./schema.ts";

export type ParseResult =
	| { readonly ok: true; readonly layout: LayoutFile }
	| { readonly ok: false; readonly problems: readonly Problem[] };
export type DecodeResult = { readonly ok: true; readonly text: string } | { readonly ok: false; readonly problems: readonly Problem[] };

/** So many problems are told; a file with more is not one that was written by hand, and the list says that it goes on. */
export const MOST_PROBLEMS = 1000;

declare const TextDecoder: new (label: string, options: { fatal: boolean }) => { decode(bytes: Uint8Array): string };

/** The text of a file's bytes, without a byte order mark; refused where too long or not UTF-8. */
export function decodeLayout(bytes: Uint8Array): DecodeResult {
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
	return judge(JSON.parse(body), scan.problems);
}

/** The same for a value: what an edit or a reader of JSON holds. The value is not changed. */
export const validateLayout = (value: unknown): ParseResult => judge(value, []);

const FIRST_FAULT: z.core.ParseContextInternal<z.core.$ZodIssue> = { abortEarly: true };

function judge(value: unknown, found: Iterable<Problem>): ParseResult {
	const migrated = migrate(value);
	if (!migrated.ok) return migrated;
	const parsed = z.safeParse(layoutSchema, migrated.value, FIRST_FAULT);
	const accepted: Accepted = new Set();
	const problems = parsed.success
		? atMost(MOST_PROBLEMS, found, checkLayout(partsOf(parsed.data)))
		: atMost(
				MOST_PROBLEMS,
				found,
				told(migrated.value, accepted),
				lazily(() => checkLayout(acceptedParts(migrated.value, accepted))),
			);
	if (problems.length > 0) return { ok: false, problems };
	if (!parsed.success) throw new Error(`a layout was refused without a reason: ${parsed.error.message}`);
	return { ok: true, layout: parsed.data };
}

/** The faults of a file that the schema has refused. */
const told = (value: unknown, accepted: Accepted): Iterable<Problem> =>
	isHolder(value) ? explainRefused(layoutSchema, value, accepted) : explain(layoutSchema, value, accepted);

function* lazily<T>(make: () => Iterable<T>): Generator<T> {
	yield* make();
}

/** The problems in turn, and no work for those beyond the most that are told. */
function atMost(most: number, ...sources: readonly Iterable<Problem>[]): Problem[] {
	const problems: Problem[] = [];
	for (const source of sources) {
		for (const p of source) {
			if (problems.length >= most) {
				problems.push({ path: WHOLE_FILE, value: `more than ${most} problems`, expected: "these put right first" });
				return problems;
			}
			problems.push(p);
		}
	}
	return problems;
}
