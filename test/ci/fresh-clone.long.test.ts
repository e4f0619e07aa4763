import { execFileSync, spawn } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, expect, test } from "vitest";
import { root } from "../../.ci/house.mjs";

const demo = "assets/layout/larkspur.layout.json";
let clone: string;
beforeAll(() => {
	clone = mkdtempSync(join(tmpdir(), "offplumb-clone-"));
	execFileSync("git", ["clone", "--quiet", root, clone]);
});
afterAll(() => rmSync(clone, { recursive: true, force: true }));

/** What a person's shell would have: nothing that this test's own npm and runner left in the environment. */
const clean = Object.fromEntries(Object.entries(process.env).filter(([name]) => !/^(npm_|VITEST|INIT_CWD|NODE_|PORT$)/.test(name)));

function npm(args: string[], input = ""): Promise<{ status: number | null; stdout: string }> {
	const child = spawn("npm", args, { cwd: clone, env: clean, stdio: ["pipe", "pipe", "inherit"] });
	let stdout = "";
	child.stdout.setEncoding("utf8").on("data", (part) => {
		stdout += part;
	});
	child.stdin.end(input);
	return new Promise((resolve) => child.on("close", (status) => resolve({ status, stdout })));
}

test("the command line, twice at once, with nothing installed: the same JSON and nothing else on standard output", async () => {
	const call = ["run", "-s", "offplumb", "--", "assess", demo, "--json"];
	const [first, second] = await Promise.all([npm(call), npm(call)]);
	expect(JSON.parse(first.stdout).format).toBe("offplumb-assessment");
	expect(second).toEqual(first);
	expect([0, 1, 3]).toContain(first.status);
});

test("standard input and the exit status go through", async () => {
	const call = ["run", "-s", "offplumb", "--", "assess", "-", "--json"];
	expect(await npm(call, "{")).toEqual({ status: 2, stdout: "" });
	const layout = execFileSync("git", ["show", `HEAD:${demo}`], { cwd: clone, encoding: "utf8" });
	expect(JSON.parse((await npm(call, layout)).stdout).layout.title).toBe(JSON.parse(layout).title);
});

test("npm start serves the app", async () => {
	const child = spawn("npm", ["-s", "start"], { cwd: clone, env: clean, stdio: ["ignore", "pipe", "inherit"], detached: true });
	const line = await new Promise<string>((resolve, reject) => {
		child.stdout.setEncoding("utf8").on("data", resolve);
		child.on("exit", (status) => reject(new Error(`npm start ended with status ${status}`)));
	});
	child.removeAllListeners("exit");
	const page = await fetch(/http:\S+/.exec(line)?.[0] ?? "");
	const text = await page.text();
	if (child.pid !== undefined) process.kill(-child.pid);
	expect([page.status, text]).toEqual([200, expect.stringContaining("<title>")]);
});
