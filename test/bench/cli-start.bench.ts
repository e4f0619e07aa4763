import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { ensureBuilt } from "../../.ci/house.mjs";
import { type Measured, median } from "./bench.ts";

export const name = "command line: assess of the demo against node on an empty file";
export const goal = "≤ 2.5 ×";

const pairs = 21;

function seconds(args: string[], statuses: number[]): number {
	const begin = performance.now();
	const ended = spawnSync(process.execPath, args, { encoding: "utf8" });
	const end = performance.now();
	if (ended.status === null || !statuses.includes(ended.status))
		throw new Error(`node ${args.join(" ")} ended with ${ended.status}: ${ended.stderr}`);
	return (end - begin) / 1000;
}

/** Alternates the two, so that what else the machine does falls on both. */
export async function run(): Promise<Measured> {
	const bundle = await ensureBuilt("cli");
	const folder = mkdtempSync(join(tmpdir(), "offplumb-bench-"));
	const empty = join(folder, "empty.mjs");
	writeFileSync(empty, "");
	const ours: number[] = [];
	const bare: number[] = [];
	for (let i = 0; i < pairs; i++) {
		bare.push(seconds([empty], [0]));
		ours.push(seconds([bundle, "assess", "assets/layout/larkspur.layout.json"], [0, 1, 3]));
	}
	rmSync(folder, { recursive: true });
	const ratio = median(ours.map((time, i) => time / (bare[i] ?? Number.NaN)));
	return {
		ratio,
		detail: `median of ${pairs} pairs: ${(median(ours) * 1000).toFixed(0)} ms against ${(median(bare) * 1000).toFixed(0)} ms`,
	};
}
