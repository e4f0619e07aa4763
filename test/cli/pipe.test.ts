import { spawn } from "node:child_process";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { root } from "../../.ci/house.mjs";
import { bundle, demo, ended, offplumb } from "./support.ts";

beforeAll(bundle);

describe.concurrent("a reader that goes away", () => {
	test.each([["assess", demo], ["assess", demo, "--json", "--series"], ["schema"], ["new"], ["--help"]])("%s %s %s", async (...args) => {
		const child = spawn(process.execPath, [await bundle(), ...args], { stdio: ["ignore", "pipe", "pipe"] });
		child.stdout.destroy();
		let stderr = "";
		child.stderr.setEncoding("utf8").on("data", (part) => {
			stderr += part;
		});
		const status = await new Promise((resolve) => child.on("close", resolve));
		expect({ status, stderr }).toEqual({ status: args[0] === "assess" ? (await offplumb(args)).status : 0, stderr: "" });
	});
});

test("npm run -s offplumb from a folder below: the same JSON and status, nothing else on standard output", async () => {
	const npm = process.platform === "win32" ? "npm.cmd" : "npm";
	const args = ["run", "-s", "offplumb", "--", "assess", "../../assets/layout/larkspur.layout.json", "--json"];
	const through = await ended(npm, args, "", join(root, "test/cli"));
	const direct = await offplumb(["assess", demo, "--json"]);
	expect(JSON.parse(through.stdout).format).toBe("offplumb-assessment");
	expect({ status: through.status, stdout: through.stdout }).toEqual({ status: direct.status, stdout: direct.stdout });
});
