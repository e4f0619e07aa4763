import { existsSync, readdirSync, readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { corePackages, coreRule, faultsOf, layerOf, readSource, sourcesBelow } from "./support/layers.ts";

const manifest = JSON.parse(readFileSync("package.json", "utf8"));
const runtime = Object.keys(manifest.dependencies);
const core = sourcesBelow("src");
const app = sourcesBelow("app");

describe("who may import whom", () => {
	test("src keeps to its layers", () => {
		expect(core.length, "files seen in src").toBeGreaterThanOrEqual(100);
		expect(
			core.reduce((sum, file) => sum + file.imports.length, 0),
			"imports seen in src",
		).toBeGreaterThan(core.length / 2);
		expect(faultsOf(core, runtime)).toEqual([]);
	});

	test("app keeps to its layers", () => {
		expect(app.length, "files seen in app").toBeGreaterThanOrEqual(60);
		expect(faultsOf(app, runtime)).toEqual([]);
	});

	test("every folder of src is a layer", () => {
		const layers = readdirSync("src").map((name) => layerOf(`src/${name}`));
		expect(layers.filter((layer) => !(layer in coreRule))).toEqual([]);
	});

	test.each([
		[
			"src/quantity/a.ts",
			`import { x } from "../vector/vec3.ts";`,
			"src/quantity/a.ts (quantity) may not import ../vector/vec3.ts (vector): allowed nothing",
		],
		["src/flight/a.ts", `import type { x } from "../sky/a.ts";`, "(sky): allowed quantity, vector, frame, layout"],
		["src/raster/a.ts", `export * from "../layout/habitat.ts";`, "(layout): allowed shape"],
		["src/shape/a.ts", `const x = await import("../criteria/row.ts");`, "(criteria): allowed"],
		["src/sky/a.ts", `import stars from "../../assets/star/stars.json";`, "(assets): allowed"],
		["src/sky/a.ts", `import { readFileSync } from "node:fs";`, "only src/cli may"],
		["src/cli/a.ts", `import { x } from "../../app/store/a.ts";`, "(app/store): allowed"],
		["src/shape/a.ts", `import { Vector3 } from "three";`, "allowed packages earcut"],
		["src/nowhere/a.ts", `import { x } from "./b.ts";`, "nowhere is no layer of src"],
		["src/flight/a.ts", "export const seed = Math.random();", "may not use Math.random"],
		["src/flight/a.ts", "export const now = new Date();", "may not use Date"],
		["app/panel/a.tsx", `import { Vector3 } from "three";`, "the panels are DOM only"],
		["app/scene/a.tsx", `import { save } from "../platform/save.ts";`, "but not app/panel, app/command, app/platform"],
		["app/panel/a.tsx", `import { main } from "../../src/cli/main.ts";`, "(cli): allowed"],
		["app/panel/a.tsx", `import { x } from "left-pad";`, "allowed packages"],
		["app/panel/a.tsx", `const a = await fetch("/x");`, "only app/platform reaches outside the page"],
		["app/store/a.ts", `window.localStorage.setItem("a", "b");`, "may not use localStorage"],
		["app/scene/a.ts", `new Worker(new URL("../platform/w.ts", import.meta.url));`, "(app/platform): allowed"],
	])("%s: %s is refused", (path, text, message) => {
		expect(faultsOf([readSource(path, text)], ["three"]).join("\n")).toContain(message);
	});

	test.each([
		["src/frame/a.ts", `import { x } from "../vector/vec3.ts"; // fetch from "../cli/main.ts"`],
		["src/cli/a.ts", `import { readFileSync } from "node:fs"; import demo from "../../assets/layout/larkspur.layout.json"; new Date();`],
		["src/layout/a.ts", `import { sha256 } from "@noble/hashes/sha2.js"; export interface A { Date: number; performance(): void }`],
		["app/scene/a.tsx", `import { Vector3 } from "three"; import { x } from "../store/a.ts"; const a = { fetch: 1 };`],
		["app/platform/a.ts", `localStorage.getItem("a"); await fetch("x"); new Worker(new URL("./w.ts", import.meta.url));`],
	])("%s: %s is allowed", (path, text) => {
		expect(faultsOf([readSource(path, text)], ["three"])).toEqual([]);
	});
});

describe("the house", () => {
	test("holds only what has a place at the top", () => {
		const kept = ["app", "src", "assets", "test", "README.md", "DEVELOPERS.md", "LICENSE", "THIRD-PARTY.md"];
		const tools = [".ci", ".gitignore", "biome.json", "package.json", "package-lock.json", "vite.config.ts"];
		const types = ["tsconfig.json", "tsconfig.app.json", "tsconfig.node.json"];
		const made = [".git", ".cache", "dist", "node_modules"];
		expect(readdirSync(".").filter((name) => ![...kept, ...tools, ...types, ...made].includes(name))).toEqual([]);
	});

	test("says of every asset where it comes from", () => {
		const folders = existsSync("assets") ? readdirSync("assets").filter((name) => readdirSync(`assets/${name}`).length > 0) : [];
		expect(folders.filter((name) => !existsSync(`assets/${name}/SOURCE.md`))).toEqual([]);
	});

	test("ships what the core imports", () => {
		expect(
			Object.values(corePackages)
				.flat()
				.filter((name) => !runtime.includes(name)),
		).toEqual([]);
	});

	test("pins every dependency to one version", () => {
		const versions = Object.entries<string>({ ...manifest.dependencies, ...manifest.devDependencies });
		expect(versions.filter(([, version]) => !/^\d+\.\d+\.\d+$/.test(version))).toEqual([]);
	});
});
