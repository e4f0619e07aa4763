import { createReadStream } from "node:fs";
import { decodeLayout, type ParseResult, parseLayout } from "../layout/parse.ts";
import { problemLine } from "../layout/problem.ts";
import { MOST_BYTES } from "../layout/scan.ts";
import type { LayoutFile } from "../layout/schema.ts";
import { Refusal } from "./call.ts";

/** The layout in a file, or on standard input for "-"; refused with every problem found. Reads no further than the largest file allowed. */
export async function readLayout(path: string): Promise<LayoutFile> {
	const name = path === "-" ? "standard input" : path;
	const decoded = decodeLayout(await readBytes(path, name));
	const result: ParseResult = decoded.ok ? parseLayout(decoded.text) : { ok: false, problems: decoded.problems };
	if (result.ok) return result.layout;
	const n = result.problems.length;
	throw new Refusal(
		[`${name} is no layout: ${n} problem${n === 1 ? "" : "s"}`, ...result.problems.map((p) => `  ${problemLine(p)}`)].join("\n"),
	);
}

async function readBytes(path: string, name: string): Promise<Uint8Array> {
	const stream = path === "-" ? process.stdin : createReadStream(path, { end: MOST_BYTES });
	const chunks: Buffer[] = [];
	let size = 0;
	try {
		for await (const chunk of stream) {
			chunks.push(chunk as Buffer);
			size += (chunk as Buffer).length;
			if (size > MOST_BYTES) throw new Refusal(`${name} is no layout: it is longer than ${MOST_BYTES} bytes`);
		}
	} catch (error) {
		if (error instanceof Error && "code" in error) throw new Refusal(`${name} cannot be read: ${error.message}`);
		throw error;
	}
	return Buffer.concat(chunks);
}
