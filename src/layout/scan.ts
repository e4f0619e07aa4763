import { below, type Problem, shorten, WHOLE_FILE } from "./problem.ts";

/** UTF-8 bytes of a layout file at most: 4 MB. */
export const MOST_BYTES = 4_000_000;
/** Objects and lists within one another at most. */
export const MOST_DEPTH = 32;

const BEYOND_ASCII = /[^\0-\x7f]/;

function tooLong(text: string): boolean {
	if (text.length > MOST_BYTES) return true;
	if (text.length * 3 <= MOST_BYTES || !BEYOND_ASCII.test(text)) return false;
	let bytes = text.length;
	for (let i = 0; i < text.length; i++) {
		const c = text.charCodeAt(i);
		if (c > 0x7f) bytes += c > 0x7ff && (c < 0xd800 || c > 0xdfff) ? 2 : 1;
	}
	return bytes > MOST_BYTES;
}

const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
const ESCAPE = /\\(?:["\\/bfnrt]|u[0-9a-fA-F]{4})/y;
const QUOTE = 0x22;
const BACKSLASH = 0x5c;
const SPACE_CODE = 0x20;
const WORDS = ["true", "false", "null"];

class Fault {
	constructor(
		readonly at: number,
		readonly expected: string,
	) {}
}

export interface Scan {
	/** Whether the text is JSON that may be parsed. */
	readonly readable: boolean;
	/** Of an unreadable text the one fault met first; else every key written twice in one object. */
	readonly problems: readonly Problem[];
}

/**
 * Reads the text as JSON (RFC 8259) without building anything. Keys written twice are found here because a parser
 * keeps one of them and drops the other.
 */
export function scanJson(text: string): Scan {
	if (tooLong(text)) {
		return {
			readable: false,
			problems: [{ path: WHOLE_FILE, value: `${text.length} characters`, expected: `at most ${MOST_BYTES} bytes` }],
		};
	}
	const problems: Problem[] = [];
	let at = 0;
	const trail: (string | number)[] = [];

	const space = (): void => {
		for (let c = text.charCodeAt(at); c === 0x20 || c === 0x0a || c === 0x0d || c === 0x09; c = text.charCodeAt(at)) at++;
	};
	const skip = (pattern: RegExp): boolean => {
		pattern.lastIndex = at;
		if (!pattern.test(text)) return false;
		at = pattern.lastIndex;
		return true;
	};
	const string = (what: string): string => {
		const start = at;
		if (text[at] !== '"') throw new Fault(at, what);
		at++;
		for (let c = text.charCodeAt(at); c !== QUOTE; c = text.charCodeAt(at)) {
			if (c === BACKSLASH) {
				if (!skip(ESCAPE)) throw new Fault(at, "an escape that JSON knows");
			} else if (c >= SPACE_CODE) at++;
			else throw new Fault(at, at < text.length ? "an escape in place of a control character" : "a closing quotation mark");
		}
		at++;
		return text.slice(start, at);
	};
	const close = (end: string): boolean => {
		space();
		const c = text[at];
		if (c !== "," && c !== end) throw new Fault(at, `a comma or ${end}`);
		at++;
		return c === end;
	};
	const value = (depth: number): void => {
		space();
		const c = text[at];
		if (c === "{" || c === "[") {
			if (depth >= MOST_DEPTH) throw new Fault(at, `nesting at most ${MOST_DEPTH} deep`);
			at++;
			space();
			if (text[at] === (c === "{" ? "}" : "]")) at++;
			else if (c === "{") members(depth + 1);
			else items(depth + 1);
		} else if (c === '"') string("a text");
		else if (!skip(NUMBER)) {
			const word = WORDS.find((w) => text.startsWith(w, at));
			if (word === undefined) throw new Fault(at, "a JSON value");
			at += word.length;
		}
	};
	const members = (depth: number): void => {
		const seen = new Set<string>();
		do {
			space();
			const raw = string("a key in quotation marks");
			const key = raw.includes("\\") ? (JSON.parse(raw) as string) : raw.slice(1, -1);
			trail.push(key);
			if (seen.has(key)) problems.push({ path: trail.reduce(below, ""), value: "written twice", expected: "each key once in an object" });
			seen.add(key);
			space();
			if (text[at] !== ":") throw new Fault(at, "a colon");
			at++;
			value(depth);
			trail.pop();
		} while (!close("}"));
	};
	const items = (depth: number): void => {
		let i = 0;
		do {
			trail.push(i++);
			value(depth);
			trail.pop();
		} while (!close("]"));
	};

	try {
		value(0);
		space();
		if (at < text.length) throw new Fault(at, "the end of the file");
	} catch (fault) {
		if (!(fault instanceof Fault)) throw fault;
		return { readable: false, problems: [{ path: placeWords(text, fault.at), value: excerpt(text, fault.at), expected: fault.expected }] };
	}
	return { readable: true, problems };
}

function placeWords(text: string, at: number): string {
	let line = 1;
	let start = 0;
	for (let i = text.indexOf("\n"); i !== -1 && i < at; i = text.indexOf("\n", i + 1)) {
		line++;
		start = i + 1;
	}
	return `line ${line}, column ${at - start + 1}`;
}

function excerpt(text: string, at: number): string {
	if (at >= text.length) return "the end of the file";
	const rest = text.slice(at, at + 24);
	return JSON.stringify(shorten(/^\s/.test(rest) ? rest.slice(0, 1) : (rest.split(/\s/, 1)[0] as string)));
}
