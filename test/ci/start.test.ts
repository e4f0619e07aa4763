import { spawn, spawnSync } from "node:child_process";
import { createServer } from "node:net";
import { expect, test } from "vitest";
import { ensureBuilt } from "../../.ci/house.mjs";

const start = (port: string) =>
	spawnSync(process.execPath, [".ci/start.mjs"], { env: { ...process.env, PORT: port }, encoding: "utf8", timeout: 20_000 });

test("PORT given and taken is refused at once", async () => {
	const taken = createServer();
	await new Promise<void>((resolve) => taken.listen(0, "127.0.0.1", resolve));
	const address = taken.address();
	if (address === null || typeof address === "string") throw new Error(`no port in ${address}`);
	const { status, stdout, stderr } = start(String(address.port));
	taken.close();
	expect([status, stdout]).toEqual([1, ""]);
	expect(stderr).toContain(`port ${address.port} is taken`);
});

test.each(["0", "65536", "-1", "80a", "1e3", " 80"])("PORT %j is refused", (port) => {
	const { status, stdout, stderr } = start(port);
	expect([status, stdout]).toEqual([1, ""]);
	expect(stderr).toContain(`PORT is "${port}"; expected a number from 1 to 65535`);
});

test("without PORT it picks a free one and prints where it is, alone on standard output", async () => {
	await ensureBuilt("app");
	const { PORT: _, ...env } = process.env;
	const child = spawn(process.execPath, [".ci/start.mjs"], { env });
	const line = await new Promise<string>((resolve, reject) => {
		child.stdout.setEncoding("utf8").on("data", resolve);
		child.on("exit", (status) => reject(new Error(`ended with status ${status}`)));
	});
	const url = /^Offplumb is at (http:\/\/127\.0\.0\.1:\d+\/)\n$/.exec(line)?.[1];
	const page = await fetch(url ?? `not a line with an address: ${line}`);
	child.removeAllListeners("exit").kill();
	expect([page.status, await page.text()]).toEqual([200, expect.stringContaining("<title>")]);
});
