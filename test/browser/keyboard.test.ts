import type { Browser, Page } from "playwright-core";
import { afterAll, beforeAll, beforeEach, describe, expect, test } from "vitest";
import { launch, type OpenApp, serveApp } from "../support/browser.ts";
import { demoDrop } from "../support/browser-demo.ts";
import { atRest, chooseView, dot, openStage, plain, press, readStage, until } from "../support/browser-stage.ts";

const { duration } = demoDrop();
let browser: Browser;
let server: Awaited<ReturnType<typeof serveApp>>;
let app: OpenApp;
let page: Page;
beforeAll(async () => {
	server = await serveApp();
	browser = await launch({ webgl: "none" });
	app = await openStage(browser, server.url);
	page = app.page;
});
afterAll(async () => {
	await browser?.close();
	await server?.close();
});

/** Marks everything that Tab should reach, in order; of a group of radio buttons only the chosen one. */
const markStops = () =>
	page.evaluate(() => {
		const all = document.querySelectorAll<HTMLElement>("a[href], button, input, select, textarea, summary, [tabindex]");
		const stops = [...all].filter(
			(e) =>
				e.tabIndex >= 0 &&
				!(e as HTMLButtonElement).disabled &&
				e.checkVisibility({ visibilityProperty: true }) &&
				!(e instanceof HTMLInputElement && e.type === "radio" && !e.checked),
		);
		stops.forEach((e, i) => {
			e.dataset.stop = String(i);
		});
		return stops.map(
			(e) =>
				`${e.tagName.toLowerCase()} ${e.getAttribute("aria-label") ?? (e.textContent || (e as HTMLInputElement).labels?.[0]?.textContent)}`,
		);
	});

/** The stop that has the focus, whether the focus is seen there, and whether anything covers its middle. */
const focused = () =>
	page.evaluate(() => {
		const e = document.activeElement as HTMLElement;
		if (!e || e === document.body) return null;
		const ring = (one: Element | null): boolean => {
			if (!one) return false;
			const { outlineStyle, outlineWidth } = getComputedStyle(one);
			return outlineStyle !== "none" && Number.parseFloat(outlineWidth) >= 1;
		};
		const box = e.getBoundingClientRect();
		const top = document.elementFromPoint(box.left + box.width / 2, box.top + box.height / 2);
		const labels = [...((e as HTMLInputElement).labels ?? [])];
		return {
			stop: e.dataset.stop === undefined ? null : Number(e.dataset.stop),
			name: `${e.tagName.toLowerCase()} ${e.getAttribute("aria-label") ?? e.textContent}`,
			seen: ring(e) || ring(e.nextElementSibling),
			covered: top === null || !(e.contains(top) || top.contains(e) || labels.some((l) => l.contains(top))),
		};
	});

const blur = () =>
	page.evaluate(() => {
		(document.activeElement as HTMLElement | null)?.blur();
		document.getSelection()?.removeAllRanges();
	});

test("Tab reaches everything in turn, is seen everywhere and caught nowhere", async () => {
	for (const summary of await page.locator("summary").all())
		if (!(await summary.locator("..").evaluate((e: HTMLDetailsElement) => e.open))) await summary.click();
	const expected = await markStops();
	await page.evaluate(() => document.querySelector<HTMLElement>("[data-stop='0']")?.focus());
	await page.keyboard.press("Shift+Tab");
	const reached = new Set<number>();
	const faults: string[] = [];
	for (let i = 0; i < expected.length + 20; i++) {
		await page.keyboard.press("Tab");
		const at = await focused();
		if (at === null) {
			if (reached.size > 0) break;
			continue;
		}
		if (at.stop === 0 && reached.has(0)) break;
		if (at.stop !== null) reached.add(at.stop);
		if (!at.seen) faults.push(`the focus is not seen on ${at.name}`);
		if (at.covered) faults.push(`something covers ${at.name}`);
	}
	expect(expected.length).toBeGreaterThan(30);
	expect(expected.filter((_, i) => !reached.has(i))).toEqual([]);
	expect(faults).toEqual([]);
	await page.evaluate(() => document.querySelector<HTMLElement>("[data-stop='9']")?.focus());
	for (const stop of [8, 7]) {
		await page.keyboard.press("Shift+Tab");
		expect((await focused())?.stop).toBe(stop);
	}
});

describe("on the stage", () => {
	beforeEach(async () => {
		await page.locator(".picture").focus();
		await atRest(page);
	});
	const playing = async (): Promise<boolean> => (await page.getByRole("button", { name: "Pause", exact: true }).count()) === 1;
	const onStage = () => page.evaluate(() => document.activeElement?.classList.contains("picture"));

	test("Space asks first in Eyepoint; Esc declines, accepting plays, Space pauses", async () => {
		await page.keyboard.press("Space");
		await until("the caution comes", async () => (await page.getByRole("dialog").count()) === 1);
		expect(await page.getByRole("dialog").textContent()).toMatch(/dizziness or nausea.*photosensitive epilepsy/s);
		await page.keyboard.press("Escape");
		await until("the caution goes", async () => (await page.locator("dialog").count()) === 0);
		expect(await onStage()).toBe(true);
		expect(await playing()).toBe(false);
		for (let i = 0; i < 3; i++) await page.keyboard.press("[");
		await page.keyboard.press("Space");
		await until("the caution comes again", async () => (await page.getByRole("dialog").count()) === 1);
		await until("its first button has the focus", async () => (await focused())?.name === "button Play in Eyepoint");
		await page.keyboard.press("Enter");
		await until("it plays", async () => (await page.locator("dialog").count()) === 0 && (await playing()));
		expect(await onStage()).toBe(true);
		await page.keyboard.press("Space");
		expect(await playing()).toBe(false);
		const { time } = await readStage(page);
		expect(time).toBeLessThan(duration);
		await page.keyboard.press("Space");
		expect(await page.getByRole("dialog").count()).toBe(0);
		await until("it plays on", playing);
		await page.keyboard.press("Space");
		for (let i = 0; i < 3; i++) await page.keyboard.press("]");
	});

	test.each(["Eyepoint", "External"] as const)("arrows look around in %s and Home comes back", async (view) => {
		await chooseView(page, view);
		await press(page, "Home");
		const first = await readStage(page);
		await press(page, "ArrowLeft", 3);
		const left = await readStage(page);
		await press(page, "ArrowRight", 3);
		await press(page, "ArrowUp", 3);
		const up = await readStage(page);
		await press(page, "Home");
		const home = await readStage(page);
		const angle = (a: typeof first): number => (Math.acos(Math.min(1, dot(a.camera.forward, first.camera.forward))) * 180) / Math.PI;
		expect(angle(left)).toBeGreaterThan(10);
		expect(angle(up)).toBeCloseTo(15, 0);
		expect(angle(home)).toBeLessThan(0.01);
		expect(home.camera.position).toEqual(first.camera.position);
	});

	test("turning in Eyepoint keeps the horizon level, however far down the eyes look", async () => {
		await chooseView(page, "Eyepoint");
		await press(page, "Home");
		const level = ({ camera }: Awaited<ReturnType<typeof readStage>>): number => (Math.asin(camera.right[1]) * 180) / Math.PI;
		const first = await readStage(page);
		expect(first.camera.forward[1]).toBeLessThan(-0.5);
		await press(page, "ArrowRight", 18);
		const aside = await readStage(page);
		expect(aside.camera.forward[1]).toBeCloseTo(first.camera.forward[1], 6);
		expect(level(aside)).toBeCloseTo(level(first), 6);
		await press(page, "ArrowUp", 40);
		expect((await readStage(page)).camera.up[1]).toBeGreaterThanOrEqual(0);
		await press(page, "Home");
	});

	test("comma and full stop step, from the end back and on again", async () => {
		await page.evaluate(() => window.stageProbe?.setTime(99));
		await press(page, ",", 3);
		const back = (await readStage(page)).time;
		expect(back).toBeLessThan(duration - 0.02);
		await press(page, ".", 2);
		const on = (await readStage(page)).time;
		expect((on - back) / (duration - back)).toBeCloseTo(2 / 3, 2);
	});

	test("single letters are heard: views, the next finding", async () => {
		await press(page, "2");
		expect(await page.getByRole("radio", { name: "External" }).isChecked()).toBe(true);
		await press(page, "1");
		expect(await page.getByRole("radio", { name: "Eyepoint" }).isChecked()).toBe(true);
		const chosen = () => page.locator(".finding button[aria-pressed=true]").textContent();
		await press(page, "f");
		const one = await chosen();
		await press(page, "f");
		expect(await chosen()).not.toBe(one);
		await press(page, "Shift+F");
		expect(await chosen()).toBe(one);
	});

	test.each([
		["?", "Commands and keys"],
		["g", "Glossary"],
		["r", "Recover kept work"],
	])("%s opens a dialog that Esc closes, and the stage has the focus again", async (key, title) => {
		await page.keyboard.press(key);
		const dialog = page.getByRole("dialog", { name: title });
		await until(`${title} opens`, async () => (await dialog.count()) === 1);
		for (let i = 0; i < 60; i++) await page.keyboard.press("Tab");
		const inside = await page.evaluate(
			() => document.activeElement === document.body || document.activeElement?.closest("dialog") !== null,
		);
		expect(inside).toBe(true);
		await page.keyboard.press("Escape");
		await until(`${title} closes`, async () => (await page.locator("dialog").count()) === 0);
		expect(await onStage()).toBe(true);
	});
});

describe("number fields", () => {
	const field = () => page.getByRole("spinbutton", { name: "Spin rate" });
	const landing = () => page.locator(".hero .number b").textContent();
	const type = async (text: string): Promise<void> => {
		await field().focus();
		await page.keyboard.type(text);
		await page.keyboard.press("Enter");
	};

	test("take a unit, undo and redo by key with the edit named", async () => {
		const before = await landing();
		await type("0.5 rad/s");
		expect(Number(await field().inputValue())).toBeCloseTo((0.5 * 60) / (2 * Math.PI), 4);
		expect(await landing()).not.toBe(before);
		expect(await page.title()).toMatch(/^• /);
		expect(await page.getByRole("button", { name: "Undo set spin rate" }).count()).toBe(1);
		await page.locator(".picture").focus();
		await page.keyboard.press("Control+z");
		expect([await field().inputValue(), await landing()]).toEqual(["3.6", before]);
		await page.keyboard.press("Control+Shift+z");
		expect(Number(await field().inputValue())).toBeCloseTo(4.7746, 3);
		await page.keyboard.press("Control+z");
		await page.keyboard.press("Control+y");
		await page.keyboard.press("Control+z");
		expect(await field().inputValue()).toBe("3.6");
	});

	test("step by arrows and pages, and Esc puts back what was typed", async () => {
		await field().focus();
		await page.keyboard.press("ArrowUp");
		expect(await field().inputValue()).toBe("3.7");
		await page.keyboard.press("PageDown");
		expect(await field().inputValue()).toBe("2.7");
		await page.keyboard.type("9");
		await page.keyboard.press("Escape");
		expect(await field().inputValue()).toBe("2.7");
		await page.locator(".picture").focus();
		for (let i = 0; i < 2 && (await field().inputValue()) !== "3.6"; i++) await page.keyboard.press("Control+z");
		expect(await field().inputValue()).toBe("3.6");
	});

	test.each([
		["61", /Spin rate: 61 rpm is outside 0 rpm to 60 rpm/],
		["3 kg", /Spin rate: “kg” is no unit of rotation/],
	])("refuse %s with field, value and what is allowed", async (text, words) => {
		await type(text);
		expect(plain(await page.getByRole("alert").textContent())).toMatch(words);
		expect(await field().getAttribute("aria-invalid")).toBe("true");
		expect(plain(await page.getByRole("banner").textContent())).toContain("3.60 rpm");
		await page.keyboard.press("Escape");
		expect(await page.getByRole("alert").count()).toBe(0);
	});
});

describe("with the keyboard alone", () => {
	test("the view switch is turned by arrows", async () => {
		await page.getByRole("radio", { name: "Eyepoint" }).focus();
		await page.keyboard.press("ArrowRight");
		expect(await page.getByRole("radio", { name: "External" }).isChecked()).toBe(true);
		expect(await page.getByRole("application").getAttribute("aria-label")).toMatch(/^External view of /);
		await page.keyboard.press("ArrowLeft");
		expect(await page.getByRole("radio", { name: "Eyepoint" }).isChecked()).toBe(true);
	});

	test("a finding is chosen and goes to its activity", async () => {
		const finding = page.getByRole("button", { name: /lands on no walkway.*Toss pouch/s });
		await finding.focus();
		await page.keyboard.press("Enter");
		expect(await finding.getAttribute("aria-pressed")).toBe("true");
		expect(await page.locator("#result-heading").textContent()).toMatch(/^Toss pouch/);
		await page
			.getByRole("button", { name: /^Drop driver/ })
			.first()
			.focus();
		await page.keyboard.press("Space");
		expect(await page.locator("#result-heading").textContent()).toMatch(/^Drop driver/);
	});

	test("the time rule is a slider that says where it stands", async () => {
		const slider = page.getByRole("slider", { name: "Time" });
		await slider.focus();
		await page.keyboard.press("Home");
		expect(await slider.getAttribute("aria-valuetext")).toBe(`0.00 s of ${duration.toFixed(2)} s`);
		await page.keyboard.press("Shift+ArrowRight");
		const ten = (await readStage(page)).time;
		await page.keyboard.press("ArrowRight");
		expect((await readStage(page)).time).toBeCloseTo(1.1 * ten, 6);
		await page.keyboard.press("End");
		expect((await readStage(page)).time).toBe(duration);
	});

	test("a number opens to its derivation", async () => {
		const number = page.getByRole("button", { name: /^Speed at the impact/ });
		await number.focus();
		await page.keyboard.press("Enter");
		expect(await number.getAttribute("aria-expanded")).toBe("true");
		expect(await page.locator(".derivation").textContent()).toMatch(/Source/);
		await page.keyboard.press("Enter");
		expect(await page.locator(".derivation").count()).toBe(0);
	});

	test("the menu opens on its first command, Esc gives the focus back", async () => {
		const button = page.getByRole("button", { name: "Menu" });
		await button.focus();
		await page.keyboard.press("Enter");
		await until("a command has the focus", async () => page.evaluate(() => document.activeElement?.getAttribute("role") === "menuitem"));
		await page.keyboard.press("End");
		await page.keyboard.press("ArrowUp");
		expect((await focused())?.name).toMatch(/Glossary/);
		await page.keyboard.press("Enter");
		await until("the glossary opens", async () => (await page.getByRole("dialog", { name: "Glossary" }).count()) === 1);
		await page.keyboard.press("Escape");
		await until("the focus is back", async () => page.evaluate(() => document.activeElement?.textContent?.trim() === "Menu"));
	});
});

test("the console is clean", async () => {
	await blur();
	app.expectClean();
});
