import type { Browser } from "playwright-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { launch, type OpenApp, serveApp } from "../support/browser.ts";
import { demoDrop } from "../support/browser-demo.ts";
import { atRest, chooseView, openStage, readStage, resize } from "../support/browser-stage.ts";

interface Placed {
	readonly text: string;
	readonly answer: boolean;
	readonly left: number;
	readonly top: number;
	readonly right: number;
	readonly bottom: number;
}

let browser: Browser;
let server: Awaited<ReturnType<typeof serveApp>>;
let app: OpenApp;
beforeAll(async () => {
	server = await serveApp();
	browser = await launch();
	app = await openStage(browser, server.url);
});
afterAll(async () => {
	await browser?.close();
	await server?.close();
});

/** The visible labels at an instant, CSS px within the stage, and the stage's own size. */
const labelsAt = (time: number): Promise<{ width: number; height: number; labels: Placed[] }> =>
	app.page.evaluate(async (t) => {
		const frame = () => new Promise((resolve) => requestAnimationFrame(resolve));
		window.stageProbe?.setTime(t);
		await frame();
		await frame();
		const host = document.querySelector(".picture") as HTMLElement;
		const box = host.getBoundingClientRect();
		const labels = [...host.querySelectorAll<HTMLElement>(".label")]
			.filter((e) => getComputedStyle(e).visibility === "visible" && e.textContent !== "")
			.map((e) => {
				const r = e.getBoundingClientRect();
				return {
					text: e.textContent ?? "",
					answer: e.classList.contains("answer"),
					left: r.left - box.left,
					top: r.top - box.top,
					right: r.right - box.left,
					bottom: r.bottom - box.top,
				};
			});
		const control = host.querySelector(".field-of-view")?.getBoundingClientRect();
		if (control) {
			const { left, top, right, bottom } = control;
			labels.push({
				text: "the field of view",
				answer: false,
				left: left - box.left,
				top: top - box.top,
				right: right - box.left,
				bottom: bottom - box.top,
			});
		}
		return { width: box.width, height: box.height, labels };
	}, time);

/** Less than this is rounding, px. */
const SLACK = 1;
const instants = 12;

function faults(when: string, { width, height, labels }: Awaited<ReturnType<typeof labelsAt>>): string[] {
	const found: string[] = [];
	labels.forEach((a, i) => {
		if (a.left < -SLACK || a.top < -SLACK || a.right > width + SLACK || a.bottom > height + SLACK)
			found.push(`${when}: "${a.text}" leaves the stage (${[a.left, a.top, a.right, a.bottom].map(Math.round)} of ${width} × ${height})`);
		for (const b of labels.slice(i + 1)) {
			const across = Math.min(a.right, b.right) - Math.max(a.left, b.left);
			const down = Math.min(a.bottom, b.bottom) - Math.max(a.top, b.top);
			if (across > SLACK && down > SLACK)
				found.push(`${when}: "${a.text}" and "${b.text}" overlap by ${Math.round(across)} × ${Math.round(down)}`);
		}
	});
	return found;
}

describe.each([
	[1440, 900],
	[1280, 720],
	[390, 844],
])("%i × %i", (width, height) => {
	beforeAll(() => resize(app.page, width, height));

	test.each([
		["drop-driver", "Eyepoint"],
		["drop-driver", "External"],
		["toss-pouch", "Eyepoint"],
		["toss-pouch", "External"],
	] as const)("labels of %s in %s keep apart and within the stage", async (id, view) => {
		const { duration } = demoDrop(id);
		await app.page
			.getByRole("button", { name: id === "drop-driver" ? /^Drop driver/ : /^Toss pouch/ })
			.first()
			.click();
		await chooseView(app.page, view);
		const found: string[] = [];
		for (let i = 0; i < instants; i++) {
			const at = (duration * i) / (instants - 1);
			const placed = await labelsAt(at);
			expect(placed.labels.length).toBeGreaterThan(3);
			found.push(...faults(`${at.toFixed(2)} s`, placed));
			if (i === instants - 1 && !placed.labels.some((l) => l.answer)) found.push("the answer is not shown at the landing");
		}
		await atRest(app.page);
		expect(found).toEqual([]);
	});
});

test("where a processor would draw WebGL, the raster paints unless told otherwise", async () => {
	expect((await readStage(app.page)).painter).toBe("raster");
});

test("the console is clean", () => app.expectClean());
