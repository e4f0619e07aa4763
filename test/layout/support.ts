import { readdirSync, readFileSync } from "node:fs";
import { type ParseResult, parseLayout } from "../../src/layout/parse.ts";
import type { Problem } from "../../src/layout/problem.ts";
import type { LayoutFile } from "../../src/layout/schema.ts";

export const shipped = readdirSync("assets/layout")
	.filter((f) => f.endsWith(".layout.json"))
	.map((file) => ({ file, text: readFileSync(`assets/layout/${file}`, "utf8") }));

export const larkspurText = readFileSync("assets/layout/larkspur.layout.json", "utf8");

export function whole(result: ParseResult): LayoutFile {
	if (!result.ok) throw new Error(JSON.stringify(result.problems, null, 1));
	return result.layout;
}

export function problemsOf(result: ParseResult): readonly Problem[] {
	if (result.ok) throw new Error("the layout was read");
	return result.problems;
}

// biome-ignore lint/suspicious/noExplicitAny: damaged on purpose, in ways that the types forbid
export type Damaged = any;

/** The problems of the demo after `damage`; read from text, as a file is. */
export function damaged(damage: (layout: Damaged) => void, text = larkspurText): readonly Problem[] {
	const layout = JSON.parse(text);
	damage(layout);
	return problemsOf(parseLayout(JSON.stringify(layout)));
}

/** The demo after a change that leaves it a layout. */
export function changed(change: (layout: Damaged) => void, text = larkspurText): LayoutFile {
	const layout = JSON.parse(text);
	change(layout);
	return whole(parseLayout(JSON.stringify(layout)));
}

export const pathsOf = (problems: readonly Problem[]): string[] => problems.map((p) => p.path);
