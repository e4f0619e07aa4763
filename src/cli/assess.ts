import { mkdir, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { type Assessed, type AssessedCase, assess } from "../assess.ts";
import { assessmentDocument, exitStatus } from "../assessment.ts";
import { seriesOf } from "../series.ts";
import { type Call, only, Refusal } from "./call.ts";
import { SHIPPED_ROWS } from "./criteria.ts";
import { csvOf } from "./csv.ts";
import { print } from "./print.ts";
import { readLayout } from "./read.ts";
import { assessmentTable } from "./table.ts";
import { TOOL_VERSION } from "./version.ts";

export async function assessCommand(call: Call): Promise<number> {
	only(call, "assess", ["json", "series", "csv"], 1);
	const [path] = call.positionals;
	if (path === undefined) throw new Refusal("assess takes a layout file, or - for standard input");
	const { json, series, csv } = call.options;
	if (series && !json && csv === undefined) throw new Refusal("--series is written as JSON: add --json, or use --csv DIR");
	const assessed = assess(await readLayout(path), SHIPPED_ROWS);
	if (csv !== undefined) await writeCsv(csv, assessed);
	await print(
		json
			? `${JSON.stringify(assessmentDocument(assessed, TOOL_VERSION, series ? seriesOf : undefined), null, series ? 0 : 2)}\n`
			: assessmentTable(assessed, process.stdout.isTTY === true),
	);
	return exitStatus(assessed);
}

/** One CSV per case: the series where there is one, else the summary. Every file is named before the first is written; names that differ in case only are one on many disks. */
async function writeCsv(directory: string, assessed: Assessed): Promise<void> {
	const files = new Map<string, AssessedCase>();
	const taken = new Set<string>();
	for (const c of assessed.cases) {
		const name = `${safe(c.id)}.${safe(c.crew)}.${safe(c.phase)}.csv`;
		if (taken.has(name.toLowerCase())) throw new Refusal(`two cases would be written to ${name}; rename activity "${c.id}"`);
		taken.add(name.toLowerCase());
		files.set(name, c);
	}
	try {
		await mkdir(directory, { recursive: true });
		for (const [name, c] of files) await writeFile(join(directory, name), csvOf(c, seriesOf(c)));
	} catch (error) {
		if (error instanceof Error && "code" in error) throw new Refusal(`${directory} cannot be written: ${error.message}`);
		throw error;
	}
}

const safe = (id: string): string => id.replace(/[^A-Za-z0-9_-]/g, (c) => `%${c.codePointAt(0)?.toString(16)}`);
