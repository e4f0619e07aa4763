import { bareFrame, openBare, openSized, withPages } from "../support/browser-bench.ts";
import { atRest } from "../support/browser-stage.ts";
import { type Bench, type Measured, median } from "./bench.ts";

const edits = 16;

interface Times {
	/** From the key press until the new number stands in the page, ms. */
	readonly numbers: number;
	/** Until the new picture is drawn, ms. */
	readonly picture: number;
}

let measured: Promise<{ edits: Times[]; bare: number[] }> | undefined;

/** An arrow key in a number field, again and again; in turns with a frame of the bare page. */
const measure = () => {
	measured ??= withPages(async (browser, appUrl, bareUrl) => {
		const { page } = await openSized(browser, appUrl, "webgl");
		const bare = await openBare(browser, bareUrl, "eyepoint");
		const times: Times[] = [];
		const frames: number[] = [];
		for (let i = 0; i < edits + 2; i++) {
			await bareFrame(bare);
			frames.push(await bareFrame(bare));
			times.push(
				await page.evaluate(
					async (key) => {
						const probe = window.stageProbe;
						const field = [...document.querySelectorAll("input")].find((e) => e.labels?.[0]?.textContent?.startsWith("Spin rate"));
						const number = document.querySelector(".hero .number");
						const gl = document.querySelector<HTMLCanvasElement>(".picture canvas")?.getContext("webgl2");
						if (!probe || !field || !number || !gl) throw new Error("nothing to edit");
						field.focus();
						const before = {
							text: document.querySelector(".levels")?.textContent,
							picture: probe.picture(),
							frames: probe.conductor.frames,
						};
						const begin = performance.now();
						field.dispatchEvent(new KeyboardEvent("keydown", { key, bubbles: true, cancelable: true }));
						while (document.querySelector(".levels")?.textContent === before.text) await new Promise((resolve) => setTimeout(resolve));
						const numbers = performance.now() - begin;
						while (probe.conductor.frames === before.frames || probe.picture() === before.picture)
							await new Promise((resolve) => requestAnimationFrame(resolve));
						gl.readPixels(0, 0, 1, 1, gl.RGBA, gl.UNSIGNED_BYTE, new Uint8Array(4));
						return { numbers, picture: performance.now() - begin };
					},
					i % 2 === 0 ? "ArrowUp" : "ArrowDown",
				),
			);
			await atRest(page);
		}
		return { edits: times.slice(2), bare: frames.slice(2) };
	});
	return measured;
};

async function against(of: (t: Times) => number): Promise<Measured> {
	const { edits: all, bare } = await measure();
	const ratio = median(all.map((t, i) => of(t) / (bare[i] as number)));
	return { ratio, detail: `median of ${edits} edits: ${median(all.map(of)).toFixed(0)} ms, a bare frame ${median(bare).toFixed(0)} ms` };
}

const numbers: Bench = { name: "edit: to the numbers, in frames of a bare page", goal: "≤ 1 ×", run: () => against((t) => t.numbers) };
const picture: Bench = { name: "edit: to the picture, in frames of a bare page", goal: "≤ 2 ×", run: () => against((t) => t.picture) };
export default [numbers, picture];
