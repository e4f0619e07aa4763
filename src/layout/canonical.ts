import { sha256 as hash } from "@noble/hashes/sha2.js";
import { bytesToHex, utf8ToBytes } from "@noble/hashes/utils.js";
import * as z from "zod/mini";
import { explain } from "./explain.ts";
import { problemLine } from "./problem.ts";
import { type LayoutFile, layoutSchema } from "./schema.ts";

/** What is opened out over several lines, and the lists with one entry a line; all else stands on one line. */
const OPEN: ReadonlySet<string> = new Set(["", "habitat", "criteria"]);
const LISTS: ReadonlySet<string> = new Set(["habitat.decks", "elements", "crew", "activities", "criteria.own", "criteria.tailor"]);

/**
 * The one way to write a layout: keys in the schema's order, two spaces, one element, activity, deck or crew member a
 * line, numbers as the shortest text that reads back the same. Throws on a value that is no layout.
 */
export function writeLayout(layout: LayoutFile): string {
	const ordered = z.safeParse(layoutSchema, layout);
	if (ordered.success) return `${write(ordered.data, "", "")}\n`;
	const [problem] = explain(layoutSchema, layout, new Set());
	throw new TypeError(`not a layout: ${problem ? problemLine(problem) : ordered.error.message}`);
}

function write(value: unknown, path: string, indent: string): string {
	const deeper = `${indent}  `;
	if (Array.isArray(value)) {
		if (value.length === 0) return "[]";
		if (!LISTS.has(path)) return `[${value.map((v) => write(v, "-", indent)).join(", ")}]`;
		return `[\n${value.map((v) => deeper + write(v, "-", deeper)).join(",\n")}\n${indent}]`;
	}
	if (typeof value === "object" && value !== null) {
		const at = path === "" ? "" : `${path}.`;
		const members = Object.entries(value).map(([key, v]) => `${JSON.stringify(key)}: ${write(v, at + key, deeper)}`);
		if (members.length === 0) return "{}";
		return OPEN.has(path) ? `{\n${members.map((m) => deeper + m).join(",\n")}\n${indent}}` : `{ ${members.join(", ")} }`;
	}
	return JSON.stringify(value);
}

/** SHA-256 of the UTF-8 text, 64 hexadecimal digits (FIPS 180-4). */
export const sha256 = (text: string): string => bytesToHex(hash(utf8ToBytes(text)));
