import { spawn } from "node:child_process";
import { existsSync, mkdtempSync, readFileSync, rmSync, utimesSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, expect, test } from "vitest";
import { cache, ensureInstalled, locked, root } from "../../.ci/house.mjs";

const folder = mkdtempSync(join(tmpdir(), "offplumb-house-"));
const name = `test-${process.pid}`;
const lock = join(cache, `${name}.lock`);
afterAll(() => rmSync(folder, { recursive: true }));

/** A process that appends "in" and "out" to the log while it holds the lock. */
const worker = (log: string): Promise<number | null> => {
	const script = `
		import { appendFileSync } from "node:fs";
		import { locked } from ${JSON.stringify(join(root, ".ci/house.mjs"))};
		await locked(${JSON.stringify(name)}, async () => {
			appendFileSync(${JSON.stringify(log)}, "in ");
			await new Promise((resolve) => setTimeout(resolve, 60));
			appendFileSync(${JSON.stringify(log)}, "out ");
		});`;
	const child = spawn(process.execPath, ["--input-type=module", "-e", script], { stdio: ["ignore", "ignore", "inherit"] });
	return new Promise((resolve) => child.on("exit", resolve));
};

test("one holder at a time, of six processes that start at once on an abandoned lock", async () => {
	const log = join(folder, "log");
	writeFileSync(lock, "999999999");
	expect(await Promise.all(Array.from({ length: 6 }, () => worker(log)))).toEqual([0, 0, 0, 0, 0, 0]);
	expect(readFileSync(log, "utf8")).toBe("in out ".repeat(6));
	expect(existsSync(lock)).toBe(false);
});

test("a lock without a heartbeat is broken even where its process id lives on", async () => {
	writeFileSync(lock, String(process.ppid));
	utimesSync(lock, new Date(0), new Date(0));
	expect(await locked(name, async () => "held")).toBe("held");
});

test("the lock is given back when the work fails", async () => {
	await expect(locked(name, () => Promise.reject(new Error("no")))).rejects.toThrow("no");
	expect(existsSync(lock)).toBe(false);
});

test("installed packages are left alone", async () => {
	const before = readFileSync("node_modules/.package-lock.json", "utf8");
	await ensureInstalled();
	expect(readFileSync("node_modules/.package-lock.json", "utf8")).toBe(before);
});
