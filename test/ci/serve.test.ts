import { mkdirSync, mkdtempSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { request } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { serve } from "../../.ci/serve.mjs";

interface Answer {
	readonly status: number;
	readonly headers: Readonly<Record<string, string | string[] | undefined>>;
	readonly body: string;
}

let top: string;
let server: Awaited<ReturnType<typeof serve>>;

/** fetch would tidy the path before it sends it. */
const ask = (path: string, { method = "GET", headers = {} }: { method?: string; headers?: Record<string, string> } = {}): Promise<Answer> =>
	new Promise((resolve, reject) => {
		request({ host: "127.0.0.1", port: server.port, path, method, headers }, (response) => {
			let body = "";
			response.setEncoding("utf8").on("data", (part) => {
				body += part;
			});
			response.on("end", () => resolve({ status: response.statusCode ?? 0, headers: response.headers, body }));
		})
			.on("error", reject)
			.end();
	});

beforeAll(async () => {
	top = mkdtempSync(join(tmpdir(), "offplumb-serve-"));
	const folder = join(top, "app");
	mkdirSync(join(folder, "assets"), { recursive: true });
	mkdirSync(join(top, "app-next"));
	writeFileSync(join(top, "secret.txt"), "secret");
	writeFileSync(join(top, "app-next/secret.txt"), "secret");
	writeFileSync(join(folder, ".stamp"), "secret");
	writeFileSync(join(folder, "index.html"), "<!doctype html>");
	writeFileSync(join(folder, "a b.json"), "{}");
	for (const name of ["index-D3f_x-9a.js", "index-D3f_x-9a.css", "stars-D3f_x-9a.bin", "plex-D3f_x-9a.woff2"])
		writeFileSync(join(folder, "assets", name), "x");
	symlinkSync(join(top, "secret.txt"), join(folder, "link.txt"));
	server = await serve(folder);
});
afterAll(async () => {
	await server.close();
	rmSync(top, { recursive: true });
});

describe("what it serves", () => {
	test.each([
		["/", "text/html; charset=utf-8", "no-cache"],
		["/index.html?a=1#b", "text/html; charset=utf-8", "no-cache"],
		["/a%20b.json", "application/json; charset=utf-8", "no-cache"],
		["/assets/index-D3f_x-9a.js", "text/javascript; charset=utf-8", "public, max-age=31536000, immutable"],
		["/assets/index-D3f_x-9a.css", "text/css; charset=utf-8", "public, max-age=31536000, immutable"],
		["/assets/stars-D3f_x-9a.bin", "application/octet-stream", "public, max-age=31536000, immutable"],
		["/assets/plex-D3f_x-9a.woff2", "font/woff2", "public, max-age=31536000, immutable"],
	])("%s as %s, %s", async (path, type, caching) => {
		const { status, headers } = await ask(path);
		expect([status, headers["content-type"], headers["cache-control"]]).toEqual([200, type, caching]);
		expect(headers["x-content-type-options"]).toBe("nosniff");
	});

	test("lets a page load from itself alone", async () => {
		const policy = (await ask("/")).headers["content-security-policy"];
		expect(policy).toContain("default-src 'none'");
		expect(policy).not.toMatch(/https?:|\*|unsafe/);
	});

	test("HEAD has the headers and no body; an unchanged file is not sent again", async () => {
		const head = await ask("/", { method: "HEAD" });
		expect([head.status, head.headers["content-length"], head.body]).toEqual([200, "15", ""]);
		const again = await ask("/", { headers: { "If-None-Match": String(head.headers.etag) } });
		expect([again.status, again.body]).toEqual([304, ""]);
	});
});

describe("what it refuses", () => {
	test.each([
		"/missing.js",
		"/assets",
		"/assets/",
		"/../secret.txt",
		"/%2e%2e/secret.txt",
		"/..%2fsecret.txt",
		"/assets/../../secret.txt",
		"/..%5csecret.txt",
		"/../app-next/secret.txt",
		"/link.txt",
		"/.stamp",
		"/index.html%00.js",
		"/%E0%A4%A",
		"//etc/passwd",
	])("%s is not found", async (path) => {
		const { status, body } = await ask(path);
		expect([status, body]).toEqual([404, "Not found.\n"]);
	});

	test("other methods and other names than loopback", async () => {
		expect((await ask("/", { method: "POST" })).status).toBe(405);
		expect((await ask("/", { headers: { Host: "elsewhere.example" } })).status).toBe(421);
		expect((await ask("/", { headers: { Host: `localhost:${server.port}` } })).status).toBe(200);
	});

	test("a port that is taken", async () => {
		await expect(serve(top, server.port)).rejects.toMatchObject({ code: "EADDRINUSE" });
	});
});
