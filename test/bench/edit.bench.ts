import type { Page } from "playwright-core";
import { bareFrame, openBare, openSized, withPages } from "../support/browser-bench.ts";
import { atRest } from "../support/browser-stage.ts";
import { type Bench, type Measured, undisturbed } from "./bench.ts";

const edits = 16;
const warm = 2;

/** From a key press in a number field until the new numbers stand in the page, and until the new picture is drawn, ms. */
const edit = (page: Page, key: "ArrowUp" | "ArrowDown"): Promise<{ numbers: number; picture: number }> =>
	page.evaluate(async (pressed) => {
		const probe = window.stageProbe;
		const field = [...document.querySelectorAll("input")].find((e) => e.labels?.[0]?.textContent?.startsWith("Spin rate"));
		const numbersNow = (): string => `${document.querySelector(".levels")?.textContent} ${document.querySelector(".hero")?.textContent}`;
		const gl = document.querySelector<HTMLCanvasElement>('.picture[data-picture="webgl"] canvas')?.getContext("webgl2");
		const drawn = (): void => gl?.readPixels(0, 0, 1, 1, gl.RGBA, gl.UNSIGNED_BYTE, new Uint8Array(4));
		if (!probe || !field) throw new Error("nothing to edit");
		field.focus();
		drawn();
		const before = { numbers: numbersNow(), picture: probe.picture(), frames: probe.conductor.frames };
		const begin = performance.now();
		const numbers = new Promise<number>((resolve) => {
			const seen = new MutationObserver(() => {
				if (numbersNow() === before.numbers) return;
				seen.disconnect();
				resolve(performance.now() - begin);
			});
			seen.observe(document.body, { subtree: true, childList: true, characterData: true });
		});
		field.dispatchEvent(new KeyboardEvent("keydown", { key: pressed, bubbles: true, cancelable: true }));
		while (probe.conductor.frames === before.frames || probe.picture() === before.picture)
			await new Promise((resolve) => requestAnimationFrame(resolve));
		drawn();
		return { picture: performance.now() - begin, numbers: await numbers };
	}, key);

type Measurement = Record<"webgl" | "raster", { numbers: number[]; picture: number[] }> & { bare: number[] };
let measured: Promise<Measurement> | undefined;

/** In turns: a frame of the bare page, an edit by each painter. */
const measure = (): Promise<Measurement> => {
	measured ??= withPages(async (browser, appUrl, bareUrl) => {
		const bare = await openBare(browser, bareUrl, "eyepoint");
		const all: Measurement = { bare: [], webgl: { numbers: [], picture: [] }, raster: { numbers: [], picture: [] } };
		const pages = { webgl: (await openSized(browser, appUrl, "webgl")).page, raster: (await openSized(browser, appUrl, "raster")).page };
		for (let i = 0; i < edits + warm; i++) {
			// The first waits for what other pages still have drawn.
			await bareFrame(bare);
			const frame = await bareFrame(bare);
			if (i >= warm) all.bare.push(frame);
			for (const painter of ["webgl", "raster"] as const) {
				const times = await edit(pages[painter], i % 2 === 0 ? "ArrowUp" : "ArrowDown");
				await atRest(pages[painter]);
				if (i < warm) continue;
				all[painter].numbers.push(times.numbers);
				all[painter].picture.push(times.picture);
			}
		}
		return all;
	});
	return measured;
};

const against = (painter: "webgl" | "raster", what: "numbers" | "picture") => async (): Promise<Measured> => {
	const { bare, [painter]: ours } = await measure();
	const [own, frame] = [undisturbed(ours[what]), undisturbed(bare)];
	return { ratio: own / frame, detail: `lower quartile of ${edits} edits: ${own.toFixed(0)} ms, a bare frame ${frame.toFixed(0)} ms` };
};

const benches: Bench[] = [
	{ name: "edit: to the numbers, in frames of a bare page", goal: "≤ 1 ×", run: against("webgl", "numbers") },
	{ name: "edit: to the picture by the raster, in frames of a bare page", goal: "≤ 2 ×", run: against("raster", "picture") },
	{ name: "edit: to the picture by WebGL, in frames of a bare page", goal: "≤ 2 ×", run: against("webgl", "picture") },
];
export default benches;
