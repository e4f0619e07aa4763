import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { LONGEST_FRAME } from "../../app/store/transient.ts";
import { launch, serveApp } from "../support/browser.ts";
import { demoDrop } from "../support/browser-demo.ts";
import { atRest, chooseView, openStage, press, readStage, until } from "../support/browser-stage.ts";

const { duration } = demoDrop();
let browser: Browser;
let server: Awaited<ReturnType<typeof serveApp>>;
beforeAll(async () => {
	server = await serveApp();
	browser = await launch({ webgl: "none" });
});
afterAll(async () => {
	await browser?.close();
	await server?.close();
});

const playButton = (page: Page) => page.getByRole("button", { name: "Play", exact: true });

test("plays from release to landing in the time it takes, and stops there", async () => {
	const app = await openStage(browser, server.url);
	await chooseView(app.page, "External");
	const samples = await app.page.evaluate(async () => {
		const taken: [number, number][] = [];
		document.querySelector<HTMLButtonElement>("button[aria-label=Play]")?.click();
		const begin = performance.now();
		for (;;) {
			const now = await new Promise<number>((resolve) => requestAnimationFrame(resolve));
			taken.push([now, window.stageProbe?.time() ?? Number.NaN]);
			if (document.querySelector("button[aria-label=Pause]") === null || performance.now() - begin > 20_000) return taken;
		}
	});
	const times = samples.map(([, time]) => time);
	expect(times[0]).toBeLessThan(duration / 2);
	expect(times.at(-1)).toBe(duration);
	expect(times.every((t, i) => i === 0 || t >= (times[i - 1] as number))).toBe(true);
	// The clock follows the frames' own times, none longer than the longest; before the first and after the last it may miss one.
	const steps = samples.map(([now], i) => (i === 0 ? 0 : Math.min((now - (samples[i - 1]?.[0] as number)) / 1000, LONGEST_FRAME)));
	const played = steps.reduce((sum, step) => sum + step, 0);
	expect(played).toBeGreaterThan(duration - 2 * LONGEST_FRAME);
	expect(played).toBeLessThan(duration + 3 * LONGEST_FRAME);
	await atRest(app.page);
	expect((await readStage(app.page)).time).toBe(duration);
	expect(await playButton(app.page).count()).toBe(1);
	app.expectClean();
	await app.close();
});

describe("where less motion is asked for", () => {
	test("Eyepoint does not play but is scrubbed; External plays until the view changes", async () => {
		const app = await openStage(browser, server.url, "", { reducedMotion: "reduce" });
		const { page } = app;
		const { time, frames } = await readStage(page);
		expect(await playButton(page).count()).toBe(0);
		await press(page, "Space");
		await page.waitForTimeout(300);
		expect(await page.getByRole("dialog").count()).toBe(0);
		expect(await readStage(page)).toMatchObject({ time, frames });
		await press(page, ",");
		expect((await readStage(page)).time).toBeLessThan(time);
		await chooseView(page, "External");
		await page.getByRole("combobox", { name: "Speed of playback" }).selectOption("0.125");
		await page.evaluate(() => window.stageProbe?.setTime(0));
		await playButton(page).click();
		await until("it plays", async () => (await readStage(page)).time > 0);
		await page.getByRole("radio", { name: "Eyepoint" }).check({ force: true });
		await atRest(page);
		const stopped = (await readStage(page)).time;
		await page.waitForTimeout(300);
		expect((await readStage(page)).time).toBe(stopped);
		expect(stopped).toBeLessThan(duration);
		app.expectClean();
		await app.close();
	});
});
