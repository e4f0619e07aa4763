import assert from "node:assert/strict";
import { type Browser, type BrowserContextOptions, type ConsoleMessage, chromium, type Page } from "playwright-core";
import { ensureBuilt } from "../../.ci/house.mjs";
import { serve } from "../../.ci/serve.mjs";
import { findChromium } from "./chromium.ts";

const common = [
	"--no-sandbox",
	"--disable-quic",
	"--no-first-run",
	"--disable-background-networking",
	"--disable-component-update",
	"--disable-sync",
];
const webglFlags = { software: ["--use-angle=swiftshader", "--enable-unsafe-swiftshader"], none: ["--disable-3d-apis"] };

/** The one message that react-three-fiber causes itself, once per canvas. */
const allowed = "THREE.Clock: This module has been deprecated. Please use THREE.Timer instead.";

export async function launch({ webgl = "software" }: { webgl?: "software" | "none" } = {}): Promise<Browser> {
	const { executable, env } = await findChromium();
	return chromium.launch({ executablePath: executable, env, args: [...common, ...webglFlags[webgl]] });
}

/** Builds the app where it is stale and serves it on a free loopback port. */
export const serveApp = async (): Promise<{ url: string; port: number; close: () => Promise<void> }> => serve(await ensureBuilt("app"));

/** Everything a page said that a clean one would not: console messages of any level, uncaught errors, failed requests. */
export function watchConsole(page: Page): string[] {
	const said: string[] = [];
	page.on("console", (message: ConsoleMessage) => {
		if (message.text() !== allowed) said.push(`${message.type()}: ${message.text()} (${message.location().url})`);
	});
	page.on("pageerror", (error) => said.push(`uncaught: ${error.stack ?? error.message}`));
	page.on("requestfailed", (request) => said.push(`request failed: ${request.url()} ${request.failure()?.errorText ?? ""}`));
	page.on("response", (response) => {
		if (response.status() >= 400) said.push(`status ${response.status()}: ${response.url()}`);
	});
	return said;
}

export interface OpenApp {
	readonly page: Page;
	/** What the page has said so far. */
	readonly said: readonly string[];
	/** Fails where the page has said anything but the allowed warning; call it last. */
	readonly expectClean: () => void;
	readonly close: () => Promise<void>;
}

/** Opens the app in a context of its own, 1440 x 900 unless told, and waits until its scripts and fonts are there. `prepare` comes before the first request. */
export async function openApp(
	browser: Browser,
	url: string,
	options: BrowserContextOptions = {},
	prepare?: (page: Page) => Promise<unknown>,
): Promise<OpenApp> {
	const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, ...options });
	const page = await context.newPage();
	const said = watchConsole(page);
	await prepare?.(page);
	await page.goto(url, { waitUntil: "load" });
	await page.evaluate(async () => {
		await document.fonts.ready;
	});
	return { page, said, expectClean: () => assert.deepEqual(said, [], "what the page said"), close: () => context.close() };
}
