// Takes the README's picture of the built app: `npm run build`, then `node assets/picture/build.mjs`.
import { fileURLToPath } from "node:url";
import { chromium } from "playwright-core";
import { serve } from "../../.ci/serve.mjs";

const here = (path) => fileURLToPath(new URL(path, import.meta.url));
const { url, close } = await serve(here("../../dist/app"));
const browser = await chromium.launch({
	executablePath: process.env.OFFPLUMB_CHROMIUM ?? "/usr/bin/chromium",
	args: [
		"--no-sandbox",
		"--disable-quic",
		"--no-first-run",
		"--disable-background-networking",
		"--disable-component-update",
		"--disable-sync",
	],
});
const page = await browser.newPage({ viewport: { width: 1440, height: 900 } });
for (const [name, view] of [
	["eyepoint", "eyepoint"],
	["external", "external"],
]) {
	await page.goto(`${url}?picture=raster`);
	await page.waitForSelector(".label.answer");
	await page.check(`input[value=${view}]`, { force: true });
	await page.waitForTimeout(1500);
	await page.screenshot({ path: here(`${name}.png`) });
}
await browser.close();
await close();
