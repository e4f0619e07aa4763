/** Why a layout file is refused: where, what stands there, what was expected there. */
export interface Problem {
	/** "habitat.decks[1].radius_m"; of a text that is no JSON "line 3, column 14"; of the whole "file". */
	readonly path: string;
	/** What stands there, as short text; "missing" where nothing does. */
	readonly value: string;
	readonly expected: string;
	/** The known key or id most like an unknown one. */
	readonly nearest?: string;
}

export const WHOLE_FILE = "file";

const PLAIN_KEY = /^[A-Za-z_][\w-]*$/;

/** The path of a key or list index below `path`. */
export function below(path: string, key: string | number): string {
	if (typeof key === "number") return `${path}[${key}]`;
	if (!PLAIN_KEY.test(key)) return `${path}[${JSON.stringify(shorten(key))}]`;
	return path === "" ? key : `${path}.${key}`;
}

const LONGEST = 60;

export const shorten = (text: string): string => (text.length <= LONGEST ? text : `${text.slice(0, LONGEST - 1)}…`);

/** A value as short text: what it is where it is not a plain one. */
export function valueText(value: unknown): string {
	if (value === undefined) return "missing";
	if (value === null) return "null";
	if (typeof value === "string") return JSON.stringify(shorten(value));
	if (Array.isArray(value)) return value.length === 0 ? "an empty list" : `a list of ${value.length}`;
	if (typeof value === "object") return "an object";
	return String(value);
}

/** One line for a terminal or a list. */
export const problemLine = (p: Problem): string =>
	`${p.path}: ${p.value}, expected ${p.expected}${p.nearest === undefined ? "" : `; nearest: ${p.nearest}`}`;
