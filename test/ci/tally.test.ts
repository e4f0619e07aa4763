import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, expect, test } from "vitest";

const folder = mkdtempSync(join(tmpdir(), "offplumb-tally-"));
afterAll(() => rmSync(folder, { recursive: true }));

const file = (status: string, ...tests: string[]) => ({
	name: "a.test.ts",
	status,
	message: "why",
	assertionResults: tests.map((status) => ({ status })),
});
const good = file("passed", "passed", "passed", "skipped");

function tally(results: unknown, testStatus: number, checkStatus: number): [string | undefined, number | null] {
	const path = join(folder, "results.json");
	writeFileSync(path, typeof results === "string" ? results : JSON.stringify({ testResults: results }));
	const { stdout, status } = spawnSync(process.execPath, [".ci/tally.mjs", path, String(testStatus), String(checkStatus)], {
		encoding: "utf8",
	});
	return [stdout.trimEnd().split("\n").at(-1), status];
}

test.each([
	["all well", [good], 0, 0, "3 passed, 0 failed", 0],
	["a test failed", [good, file("failed", "passed", "failed")], 1, 0, "4 passed, 1 failed", 1],
	["a file could not be read", [good, file("failed")], 1, 0, "3 passed, 1 failed", 1],
	["a file failed outside its tests", [good, file("failed", "passed")], 1, 0, "4 passed, 1 failed", 1],
	["the checks failed", [good], 0, 1, "2 passed, 1 failed", 1],
	["the runner failed though no test did", [good], 1, 0, "3 passed, 1 failed", 1],
	["no test ran", [], 0, 0, "1 passed, 1 failed", 1],
	["the runner was cut off", "", 124, 0, "1 passed, 1 failed", 1],
])("%s", (_, results, testStatus, checkStatus, line, status) => {
	expect(tally(results, testStatus, checkStatus)).toEqual([line, status]);
});
