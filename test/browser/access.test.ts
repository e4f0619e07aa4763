import axe, { type AxeResults } from "axe-core";
import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { launch, type OpenApp, serveApp } from "../support/browser.ts";
import { assessDemo } from "../support/browser-demo.ts";
import { chooseView, openStage, plain, resize, until } from "../support/browser-stage.ts";

let browser: Browser;
let server: Awaited<ReturnType<typeof serveApp>>;
let app: OpenApp;
let page: Page;
beforeAll(async () => {
	server = await serveApp();
	browser = await launch({ webgl: "none" });
	app = await openStage(browser, server.url);
	page = app.page;
	await page.evaluate(axe.source);
});
afterAll(async () => {
	await browser?.close();
	await server?.close();
});

/** What axe finds against WCAG 2.2 A and AA, a line for each element. */
async function violations(): Promise<string[]> {
	const found: AxeResults = await page.evaluate(() =>
		(window as unknown as { axe: typeof axe }).axe.run(document, {
			runOnly: ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa"],
			resultTypes: ["violations"],
		}),
	);
	return found.violations.flatMap((v) => v.nodes.map((n) => `${v.id}: ${n.target.join(" ")}: ${n.failureSummary?.replaceAll("\n", " ")}`));
}

const open = async (key: string): Promise<void> => {
	await page.locator(".picture").focus();
	await page.keyboard.press(key);
	await until("a dialog opens", async () => (await page.getByRole("dialog").count()) === 1);
};
const close = async (): Promise<void> => {
	await page.keyboard.press("Escape");
	await until("the dialog is gone", async () => (await page.locator("dialog").count()) === 0);
};

describe.each([
	[1440, 900],
	[1280, 720],
	[390, 844],
])("%i × %i", (width, height) => {
	beforeAll(() => resize(page, width, height));

	test("the page as opened, and with everything unfolded", async () => {
		expect(await violations()).toEqual([]);
		await page.evaluate(() => {
			for (const e of document.querySelectorAll("details")) e.open = true;
			for (const e of document.querySelectorAll<HTMLButtonElement>(".numbers button[aria-expanded=false]")) e.click();
		});
		expect(await violations()).toEqual([]);
	});

	test.each([
		["the caution", "Space"],
		["the commands", "?"],
		["the glossary", "g"],
		["kept work", "r"],
	])("%s", async (_, key) => {
		await open(key);
		expect(await violations()).toEqual([]);
		await close();
	});
});

test("External, the menu, a refused number and a refused file", async () => {
	await resize(page, 1440, 900);
	await chooseView(page, "External");
	await page.getByRole("spinbutton", { name: "Spin rate" }).fill("99");
	await page.keyboard.press("Enter");
	await page.getByRole("button", { name: "Menu" }).click();
	expect(await violations()).toEqual([]);
	await page.keyboard.press("Escape");
	await page.evaluate(() => {
		const data = new DataTransfer();
		data.items.add(new File(["{}"], "empty.layout.json"));
		dispatchEvent(new DragEvent("drop", { dataTransfer: data, bubbles: true, cancelable: true }));
	});
	await until("the file is refused", async () => (await page.getByRole("alert", { name: /was not opened/ }).count()) === 1);
	expect(await violations()).toEqual([]);
	await page.getByRole("button", { name: "Close the list of problems" }).click();
	await chooseView(page, "Eyepoint");
});

test("the stage has a name and a way to be worked, the canvas is left out of the tree", async () => {
	expect(await page.getByRole("application").count()).toBe(1);
	const name = /^Eyepoint view of drop-driver: arrow keys look, Home resets, Space plays$/;
	expect(await page.getByRole("application", { name }).count()).toBe(1);
	const canvases = await page.evaluate(() =>
		[...document.querySelectorAll("canvas")].map(
			(c) => c.getAttribute("aria-hidden") === "true" || (c.getAttribute("aria-label") ?? "") !== "",
		),
	);
	expect(canvases).toEqual([true]);
});

test("the picture's facts stand in words: who, where, how heavy, what happens, what was found", async () => {
	const { cases, findings } = assessDemo();
	const { summary } = cases.find((c) => c.id === "drop-driver") as (typeof cases)[number];
	const words = plain(await page.getByRole("region", { name: "In words" }).textContent());
	expect(words).toMatch(/Crew member tall, 1\.95 m tall, stands on the Cargo deck, facing with spin/);
	expect(words).toMatch(/Apparent gravity at the feet is 0\.493 g/);
	const landing = summary.landing_prograde_m as number;
	expect(landing).toBeLessThan(0);
	expect(words).toContain(`${Math.abs(landing).toFixed(2)} m against spin of your hand`);
	expect(words).toContain(`at ${(summary.landing_speed_mps as number).toPrecision(3)} m/s`);
	const own = findings.filter((f) => f.subject === "drop-driver");
	expect(own.some((f) => f.result === "outside")).toBe(true);
	for (const f of own) expect(words).toContain(f.title);
	expect(words).toMatch(/Outside \(should\): A dropped object lands on no walkway/);
	expect(await page.getByRole("heading", { name: "In words" }).isVisible()).toBe(true);
});

test("the console is clean", () => app.expectClean());
