import { readFileSync } from "node:fs";
import type { Browser, BrowserContext, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { launch, type OpenApp, serveApp, watchConsole } from "../support/browser.ts";
import { demoText } from "../support/browser-demo.ts";
import { variety } from "../support/browser-pixels.ts";
import { atRest, openStage, readStage, shotOf, until } from "../support/browser-stage.ts";

let browser: Browser;
let server: Awaited<ReturnType<typeof serveApp>>;
let app: OpenApp;
let page: Page;
beforeAll(async () => {
	server = await serveApp();
	browser = await launch({ webgl: "none" });
	// The picker that can write back cannot be driven from outside; without it the app falls back to the plain file chooser.
	app = await openStage(browser, server.url, "", {}, (p) =>
		p.addInitScript(() => {
			Reflect.deleteProperty(window, "showOpenFilePicker");
			Reflect.deleteProperty(window, "showSaveFilePicker");
		}),
	);
	page = app.page;
});
afterAll(async () => {
	await browser?.close();
	await server?.close();
});

const shipped = (name: string): string => readFileSync(new URL(`../../assets/layout/${name}.layout.json`, import.meta.url), "utf8");
const title = () => page.getByRole("heading", { level: 1 }).textContent();
const refused = () => page.getByRole("alert", { name: /was not opened/ });

/** Drags a file over the window and lets it go there. */
async function dropFile(name: string, text: string): Promise<void> {
	await page.evaluate(
		([n, t]) => {
			const dataTransfer = new DataTransfer();
			dataTransfer.items.add(new File([t as string], n as string));
			for (const type of ["dragover", "drop"])
				document.body.dispatchEvent(new DragEvent(type, { dataTransfer, bubbles: true, cancelable: true }));
		},
		[name, text],
	);
}

async function chooseFile(name: string, text: string): Promise<void> {
	const chooser = page.waitForEvent("filechooser");
	await page.locator(".picture").focus();
	await page.keyboard.press("Control+o");
	await (await chooser).setFiles({ name, mimeType: "application/json", buffer: Buffer.from(text) });
}

const rows = async (): Promise<string[][]> => {
	await until("the file is refused", async () => (await refused().count()) === 1);
	return refused()
		.locator("tbody tr")
		.evaluateAll((trs) => trs.map((tr) => [...tr.children].map((td) => td.textContent ?? "")));
};
const dismiss = () => page.getByRole("button", { name: "Close the list of problems" }).click();

const broken = (): string => {
	const layout = JSON.parse(demoText);
	layout.habitat.decks[0].radius_m = "wide";
	layout.habitat.decks[1].raduis_m = 31;
	layout.elements[1].deck = "attic";
	layout.activities[0].object.mass_kg = -1;
	layout.activities[2].crew = "nobody";
	return JSON.stringify(layout);
};

test.each([
	["chosen", chooseFile],
	["dropped", dropFile],
] as const)("a broken file that is %s is refused with every fault and its path, and the layout stays", async (_, give) => {
	const before = [await title(), await shotOf(page)] as const;
	await give("broken.layout.json", broken());
	const found = await rows();
	const paths = found.map(([path]) => path);
	for (const path of [
		"habitat.decks[0].radius_m",
		"habitat.decks[1].raduis_m",
		"elements[1].deck",
		"activities[0].object.mass_kg",
		"activities[2].crew",
	])
		expect(paths).toContain(path);
	expect(found.find(([path]) => path === "habitat.decks[1].raduis_m")?.[2]).toContain("radius_m");
	expect(found.find(([path]) => path === "habitat.decks[0].radius_m")?.[1]).toBe('"wide"');
	expect(await refused().textContent()).toContain(`broken.layout.json was not opened: ${found.length} problems`);
	expect(await refused().textContent()).toContain("Larkspur cargo ring, segment C");
	await dismiss();
	await atRest(page);
	expect(await title()).toBe(before[0]);
	expect((await shotOf(page)).data.equals(before[1].data)).toBe(true);
});

test.each([
	["5 MB of text", "x".repeat(5_000_000), /at most 4\d{6} bytes/],
	["5 MB of a layout", () => demoText.replace('"title"', `"note": "${"y".repeat(5_000_000)}", "title"`), /at most 4\d{6} bytes/],
	["nesting 100 deep", `${"[".repeat(100)}${"]".repeat(100)}`, /32/],
	["half a file", demoText.slice(0, 900), /./],
	["a newer version", demoText.replace('"version": 1', '"version": 99'), /99|version/],
])("%s is refused in one line", async (_, text, expected) => {
	await dropFile("odd.layout.json", typeof text === "string" ? text : text());
	const found = await rows();
	expect(found.length).toBe(1);
	expect(found[0]?.join(" ")).toMatch(expected);
	await dismiss();
	expect(await title()).toContain("Larkspur");
});

test.each([
	["twin-arm", chooseFile],
	["great-ring", dropFile],
] as const)("the shipped layout %s opens and is drawn", async (name, give) => {
	const text = shipped(name);
	await give(`${name}.layout.json`, text);
	await until("it opens", async () => (await title()) === JSON.parse(text).title);
	await atRest(page);
	const { colours, deviation } = variety(await shotOf(page));
	expect(colours).toBeGreaterThan(60);
	expect(deviation).toBeGreaterThan(10);
	expect(await refused().count()).toBe(0);
});

test("saving writes what stands on the screen", async () => {
	await dropFile("demo.layout.json", demoText);
	await until("it opens", async () => (await title())?.startsWith("Larkspur") ?? false);
	await page.getByRole("spinbutton", { name: "Spin rate" }).fill("3");
	await page.keyboard.press("Enter");
	const download = page.waitForEvent("download");
	await page.keyboard.press("Control+s");
	const path = await (await download).path();
	const saved = JSON.parse(readFileSync(path, "utf8"));
	expect(saved.habitat.spin.rate_rpm).toBe(3);
	expect({ ...saved, habitat: { ...saved.habitat, spin: { rate_rpm: 3.6 } } }).toEqual(JSON.parse(demoText));
	await until("the dirty mark goes", async () => !(await page.title()).startsWith("•"));
});

test("a tab that is killed loses nothing", async () => {
	const context: BrowserContext = page.context();
	await page.getByRole("spinbutton", { name: "Spin rate" }).fill("4.25");
	await page.keyboard.press("Enter");
	await until("a copy is kept", () =>
		page.evaluate(
			() =>
				new Promise<boolean>((resolve) => {
					const request = indexedDB.open("offplumb");
					request.onsuccess = () => {
						const all = request.result.transaction("copies").objectStore("copies").getAll();
						all.onsuccess = () => {
							resolve((all.result as { text: string; saved: boolean }[]).some((c) => !c.saved && c.text.includes("4.25")));
							request.result.close();
						};
					};
					request.onerror = () => resolve(false);
				}),
		),
	);
	await page.close();
	page = await context.newPage();
	const said = watchConsole(page);
	await page.goto(`${server.url}?probe`);
	await atRest(page);
	expect(await page.getByRole("spinbutton", { name: "Spin rate" }).inputValue()).toBe("3.6");
	const notice = page.getByRole("status").filter({ hasText: "Unsaved work from an earlier visit" });
	await until("the kept work is offered", async () => notice.isVisible());
	await notice.getByRole("button", { name: /Recover kept work/ }).click();
	const dialog = page.getByRole("dialog", { name: "Recover kept work" });
	await until("the copies are listed", async () => (await dialog.getByRole("button", { name: "Open", exact: true }).count()) > 0);
	await dialog.getByRole("button", { name: "Open", exact: true }).first().click();
	await until("it is open again", async () => (await page.getByRole("spinbutton", { name: "Spin rate" }).inputValue()) === "4.25");
	await atRest(page);
	expect((await readStage(page)).painter).toBe("raster");
	expect(said).toEqual([]);
});

test("the console is clean", () => app.expectClean());
