import type { Browser } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launch, type OpenApp, serveApp } from "../support/browser.ts";
import { variety } from "../support/browser-pixels.ts";
import { atRest, contextAlive, openStage, press, shotOf, until } from "../support/browser-stage.ts";

let browser: Browser;
let server: Awaited<ReturnType<typeof serveApp>>;
let app: OpenApp;
beforeAll(async () => {
	server = await serveApp();
	browser = await launch();
	app = await openStage(browser, server.url, "&picture=webgl", { viewport: { width: 1280, height: 720 } });
});
afterAll(async () => {
	await browser?.close();
	await server?.close();
});

/** Takes the graphics context away; returns what gives it back. */
const lose = () =>
	app.page.evaluateHandle(() => {
		const extension = document
			.querySelector<HTMLCanvasElement>(".picture canvas")
			?.getContext("webgl2")
			?.getExtension("WEBGL_lose_context");
		if (!extension) throw new Error("no way to lose the context");
		extension.loseContext();
		return extension;
	});

test.each(["once", "once more"])("a lost picture says so and comes back, %s", async () => {
	const { page } = app;
	const notice = page.getByText("The picture was lost by the graphics system.");
	const before = await shotOf(page);
	expect(await notice.count()).toBe(0);
	const extension = await lose();
	await until("the loss is told", async () => (await notice.count()) === 1);
	expect(await contextAlive(page)).toBe(false);
	// What the person does meanwhile is not lost.
	await page.evaluate(() => window.stageProbe?.setTime(0.4));
	await page.evaluate(() => window.stageProbe?.setTime(99));
	await extension.evaluate((e) => e.restoreContext());
	await until("the notice goes", async () => (await notice.count()) === 0);
	await atRest(page);
	expect(await contextAlive(page)).toBe(true);
	const after = await shotOf(page);
	expect(variety(after).colours).toBeGreaterThan(100);
	let far = 0;
	for (let k = 0; k < after.data.length; k++) if (Math.abs((after.data[k] as number) - (before.data[k] as number)) > 24) far += 1;
	expect(far / after.data.length).toBeLessThan(0.001);
	await press(page, "ArrowLeft", 3);
	expect(variety(await shotOf(page)).colours).toBeGreaterThan(100);
});

test("nothing but three's own notes of it is said", () => {
	expect([...new Set(app.said.map((line) => line.replace(/ \(.*$/, "")))].sort()).toEqual([
		"log: THREE.WebGLRenderer: Context Lost.",
		"log: THREE.WebGLRenderer: Context Restored.",
	]);
});
