import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { launch, type OpenApp, serveApp } from "../support/browser.ts";
import { atRest, openStage, readStage, resize } from "../support/browser-stage.ts";

let browser: Browser;
let server: Awaited<ReturnType<typeof serveApp>>;
let app: OpenApp;
beforeAll(async () => {
	server = await serveApp();
	browser = await launch({ webgl: "none" });
	app = await openStage(browser, server.url, "", { viewport: { width: 390, height: 844 }, hasTouch: true, isMobile: true });
});
afterAll(async () => {
	await browser?.close();
	await server?.close();
});

/** Everything that can be pressed or typed in and is smaller than 24 px one way; what a label is pressed for counts with it. */
const tooSmall = () =>
	app.page.evaluate(() =>
		[...document.querySelectorAll<HTMLElement>("button, a[href], input, select, summary, [tabindex='0']")]
			.filter((e) => e.checkVisibility({ visibilityProperty: true }))
			.flatMap((e) => {
				const boxes = [e, ...((e as HTMLInputElement).labels ?? [])].map((one) => one.getBoundingClientRect());
				const width = Math.max(...boxes.map((b) => b.right)) - Math.min(...boxes.map((b) => b.left));
				const height = Math.max(...boxes.map((b) => b.bottom)) - Math.min(...boxes.map((b) => b.top));
				return width >= 23.5 && height >= 23.5
					? []
					: [`${e.tagName} "${e.getAttribute("aria-label") ?? e.textContent}": ${width} × ${height}`];
			}),
	);

describe.each([390, 320])("%i px wide", (width) => {
	beforeAll(() => resize(app.page, width, 844));

	test("nothing reaches beyond the right edge", async () => {
		const { over, wide } = await app.page.evaluate(() => {
			const room = visualViewport?.width ?? 0;
			return {
				wide: Math.max(document.documentElement.scrollWidth, document.body.scrollWidth) - room,
				over: [...document.querySelectorAll<HTMLElement>("body *")]
					.filter((e) => e.getBoundingClientRect().right > room + 1 && !e.closest(".picture, .unseen"))
					.map((e) => `${e.tagName} ${e.className} ${e.textContent?.slice(0, 30)}`),
			};
		});
		expect(over).toEqual([]);
		expect(wide).toBeLessThanOrEqual(0);
	});

	test("the stage takes at least half of the height", async () => {
		const { height, width: across } = await readStage(app.page);
		expect(height).toBeGreaterThanOrEqual(422);
		expect(across).toBe(width);
	});

	test("whatever is pressed is 24 px or more both ways", async () => {
		expect(await tooSmall()).toEqual([]);
	});
});

test("one finger turns the picture, two come nearer", async () => {
	await app.page.evaluate(() => scrollTo(0, 0));
	const touch = await app.page.context().newCDPSession(app.page);
	const { left, top, width, height, camera } = await readStage(app.page);
	const [x, y] = [left + width / 2, top + height / 3];
	const send = (type: "touchStart" | "touchMove" | "touchEnd", ...points: [number, number][]) =>
		touch.send("Input.dispatchTouchEvent", { type, touchPoints: points.map(([px, py], id) => ({ x: px, y: py, id })) });
	await send("touchStart", [x, y]);
	await send("touchMove", [x + 60, y + 30]);
	await send("touchEnd");
	await atRest(app.page);
	const turned = await readStage(app.page);
	expect(turned.camera.forward).not.toEqual(camera.forward);
	await send("touchStart", [x - 20, y], [x + 20, y]);
	await send("touchMove", [x - 60, y], [x + 60, y]);
	await send("touchEnd");
	await atRest(app.page);
	expect((await readStage(app.page)).camera.fovY).toBeLessThan(turned.camera.fovY);
	expect(await app.page.evaluate(() => scrollY)).toBe(0);
});

test("the console is clean", () => app.expectClean());
