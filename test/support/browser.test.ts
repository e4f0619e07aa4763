import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { PNG } from "pngjs";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { serve } from "../../.ci/serve.mjs";
import { launch, openApp } from "./browser.ts";
import { findChromium } from "./chromium.ts";

const script = `
const gl = document.createElement("canvas").getContext("webgl2");
document.querySelector("output").textContent = gl ? gl.getParameter(gl.VERSION) : "none";
if (location.hash === "#loud") console.warn("anything");
if (location.hash === "#clock") console.warn("THREE.Clock: This module has been deprecated. Please use THREE.Timer instead.");
if (location.hash === "#throw") setTimeout(() => { throw new Error("thrown"); });
`;
let folder: string;
let server: Awaited<ReturnType<typeof serve>>;

beforeAll(async () => {
	folder = mkdtempSync(join(tmpdir(), "offplumb-page-"));
	writeFileSync(
		join(folder, "index.html"),
		`<!doctype html><link rel="icon" href="data:,"><title>a</title><link rel="stylesheet" href="a.css"><p>Words</p><output></output><script type="module" src="a.js"></script>`,
	);
	writeFileSync(join(folder, "a.js"), script);
	writeFileSync(join(folder, "a.css"), "body { background: rgb(20, 120, 220) }");
	server = await serve(folder);
});
afterAll(async () => {
	await server.close();
	rmSync(folder, { recursive: true });
});

/** A PATH with every tool but the browsers. */
function pathWithoutBrowsers(): string {
	const empty = join(folder, "bin");
	mkdirSync(empty, { recursive: true });
	return empty;
}

describe.each([
	["the browser that is found first", false],
	["the browser of the lockfile", true],
])("%s", (_, hidden) => {
	const before = { PATH: process.env.PATH, OFFPLUMB_CHROMIUM: process.env.OFFPLUMB_CHROMIUM };
	beforeAll(() => {
		if (!hidden) return;
		process.env.PATH = pathWithoutBrowsers();
		delete process.env.OFFPLUMB_CHROMIUM;
	});
	afterAll(() => {
		Object.assign(process.env, before);
		if (before.OFFPLUMB_CHROMIUM === undefined) delete process.env.OFFPLUMB_CHROMIUM;
	});

	test("is found where it is said to be", async () => {
		const { origin } = await findChromium();
		if (hidden) expect(origin).toBe("@sparticuz/chromium");
		expect(readdirSync(folder)).toContain("index.html");
	});

	test.each([
		["software", /^WebGL 2/],
		["none", /^none$/],
	] as const)("draws with webgl %s", async (webgl, version) => {
		const browser = await launch({ webgl });
		const app = await openApp(browser, server.url);
		expect(await app.page.textContent("output")).toMatch(version);
		const shot = PNG.sync.read(await app.page.screenshot());
		expect([shot.width, shot.height, ...shot.data.subarray(4 * 1440 * 500, 4 * 1440 * 500 + 3)]).toEqual([1440, 900, 20, 120, 220]);
		app.expectClean();
		await browser.close();
	});
});

test("a page that says anything but the allowed warning is not clean", async () => {
	const browser = await launch();
	for (const [hash, clean] of [
		["#clock", true],
		["#loud", false],
		["#throw", false],
	] as const) {
		const app = await openApp(browser, server.url + hash);
		await app.page.waitForTimeout(100);
		if (clean) app.expectClean();
		else expect(() => app.expectClean()).toThrow("what the page said");
		await app.close();
	}
	await browser.close();
});
