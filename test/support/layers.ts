import { existsSync, readdirSync, readFileSync } from "node:fs";
import { dirname, posix } from "node:path";
import ts from "typescript";

/** Everything a file names as a module, and every identifier it uses, with comments and strings left out. */
export interface SourceFile {
	/** From the checkout's top, with forward slashes. */
	readonly path: string;
	readonly imports: readonly string[];
	/** `name` for a bare identifier, `owner.name` for a property of one. */
	readonly names: readonly string[];
}

const core = ["quantity", "vector", "frame", "layout", "flight", "vestibular", "sky", "body", "activity", "criteria"];
const below = (layer: string): string[] => core.slice(0, core.indexOf(layer));
const drawn = ["quantity", "vector", "frame", "layout", "body", "sky", "activity"];

/** Layer of the core -> layers it may import. `assess` is the file src/assess.ts, and so on. */
export const coreRule: Readonly<Record<string, readonly string[]>> = {
	quantity: [],
	vector: below("vector"),
	frame: below("frame"),
	layout: below("layout"),
	flight: below("flight"),
	vestibular: below("flight"),
	sky: below("flight"),
	body: below("flight"),
	activity: below("activity"),
	criteria: [...below("flight"), "activity"],
	assess: core,
	series: [...core, "assess"],
	assessment: [...core, "assess", "series"],
	placement: [...core, "assess", "assessment"],
	shape: drawn,
	drawing: drawn,
	raster: ["shape"],
	history: ["layout"],
	sheet: ["assess", "series", "assessment", "drawing", "raster"],
	cli: [...core, "assess", "series", "assessment", "placement", "shape", "drawing", "raster", "history", "sheet"],
};

/** Packages that a layer of the core may import; no other layer imports any. */
export const corePackages: Readonly<Record<string, readonly string[]>> = {
	layout: ["zod", "@noble/hashes", "fastest-levenshtein"],
	shape: ["earcut"],
	drawing: ["d3-scale", "d3-shape"],
};

const appLayers = ["store", "command", "scene", "control", "label", "panel", "platform", "style"];
const notFor: Readonly<Record<string, readonly string[]>> = { scene: ["panel", "command", "platform"] };
const webgl = ["three", "@react-three/fiber"];

/** What reaches outside the page; `app/platform` alone may. */
const reach = ["fetch", "XMLHttpRequest", "WebSocket", "EventSource", "localStorage", "sessionStorage", "indexedDB", "caches", "Worker"];
const reachFiles = [
	"FileReader",
	"showOpenFilePicker",
	"showSaveFilePicker",
	"URL.createObjectURL",
	"navigator.storage",
	"document.cookie",
];

/** What makes the core give another answer on the same input. */
const impure = ["Math.random", "Date", "performance", "setTimeout", "setInterval", "crypto"];

/** `src/layout/x.ts` -> "layout", `src/assess.ts` -> "assess", `app/panel/x.tsx` -> "app/panel", `app/main.tsx` -> "app". */
export function layerOf(path: string): string {
	const [top, second, ...rest] = path.split("/");
	if (top === "src") return second === undefined ? "src" : second.replace(/\.tsx?$/, "");
	if (top === "app") return rest.length > 0 ? `app/${second}` : "app";
	return top ?? "";
}

/** "@scope/name/deep" -> "@scope/name". */
export const packageOf = (specifier: string): string =>
	specifier
		.split("/")
		.slice(0, specifier.startsWith("@") ? 2 : 1)
		.join("/");

export function readSource(path: string, text: string = readFileSync(path, "utf8")): SourceFile {
	const file = ts.createSourceFile(path, text, ts.ScriptTarget.ES2023, false, path.endsWith("x") ? ts.ScriptKind.TSX : ts.ScriptKind.TS);
	const imports = ts.preProcessFile(text, true, true).importedFiles.map((found) => found.fileName);
	const names: string[] = [];
	const visit = (node: ts.Node): void => {
		if (ts.isNewExpression(node) && node.expression.getText(file) === "URL" && node.arguments?.[1]?.getText(file) === "import.meta.url") {
			const target = node.arguments[0];
			if (target !== undefined && ts.isStringLiteralLike(target)) imports.push(target.text);
		}
		if (ts.isCallExpression(node) && node.expression.getText(file) === "import.meta.glob") {
			for (const target of node.arguments) if (ts.isStringLiteralLike(target)) imports.push(target.text);
		}
		if (ts.isPropertyAccessExpression(node)) {
			const owner = ts.isIdentifier(node.expression) ? node.expression.text : "";
			if (owner === "window" || owner === "globalThis" || owner === "self") names.push(node.name.text);
			names.push(`${owner}.${node.name.text}`);
			visit(node.expression);
			return;
		}
		const declares = ts.isTypeElement(node) || ts.isClassElement(node) || ts.isPropertyAssignment(node);
		if (ts.isIdentifier(node)) names.push(node.text);
		ts.forEachChild(node, (child) => {
			if (!(declares && child === node.name)) visit(child);
		});
	};
	visit(file);
	return { path, imports, names };
}

/** All .ts and .tsx below a folder, without declaration files. */
export function sourcesBelow(folder: string): SourceFile[] {
	if (!existsSync(folder)) return [];
	return readdirSync(folder, { recursive: true, encoding: "utf8" })
		.map((name) => `${folder}/${name.replaceAll("\\", "/")}`)
		.filter((path) => /(?<!\.d)\.tsx?$/.test(path))
		.sort()
		.map((path) => readSource(path));
}

function faultsOfCore(file: SourceFile, layer: string, target: string, specifier: string): string | null {
	const allowed = coreRule[layer];
	if (allowed === undefined) return `${file.path}: ${layer} is no layer of src; known: ${Object.keys(coreRule).join(", ")}`;
	if (specifier.startsWith("node:"))
		return layer === "cli" ? null : `${file.path} (${layer}) may not import ${specifier}: only src/cli may`;
	if (!specifier.startsWith(".")) {
		const packages = corePackages[layer] ?? [];
		return packages.includes(packageOf(specifier))
			? null
			: `${file.path} (${layer}) may not import ${specifier}: allowed packages ${packages.join(", ") || "none"}`;
	}
	if (layer === "cli" && (target === "assets" || target === "package.json")) return null;
	return target === layer || allowed.includes(target)
		? null
		: `${file.path} (${layer}) may not import ${specifier} (${target}): allowed ${allowed.join(", ") || "nothing"}`;
}

function faultsOfApp(file: SourceFile, layer: string, target: string, specifier: string, packages: readonly string[]): string | null {
	const part = layer.replace(/^app\/?/, "");
	if (part !== "" && !appLayers.includes(part)) return `${file.path}: ${layer} is no layer of app; known: ${appLayers.join(", ")}`;
	if (!specifier.startsWith(".")) {
		const name = packageOf(specifier);
		if (part === "panel" && webgl.includes(name)) return `${file.path} (app/panel) may not import ${specifier}: the panels are DOM only`;
		return packages.includes(name) ? null : `${file.path} (${layer}) may not import ${specifier}: allowed packages ${packages.join(", ")}`;
	}
	const known = target === "assets" || target === "app" || target.startsWith("app/") || target in coreRule || target === "THIRD-PARTY.md";
	const banned = [...(notFor[part] ?? []).map((name) => `app/${name}`), "cli"];
	return known && !banned.includes(target)
		? null
		: `${file.path} (${layer}) may not import ${specifier} (${target}): allowed app, src without cli, assets${banned.length > 1 ? `, but not ${banned.join(", ")}` : ""}`;
}

/**
 * Every breach of the layer rule in the files, as sentences.
 * @param packages what the app may import from the registry: the runtime dependencies
 */
export function faultsOf(files: readonly SourceFile[], packages: readonly string[]): string[] {
	const faults: string[] = [];
	for (const file of files) {
		const layer = layerOf(file.path);
		for (const specifier of file.imports) {
			const bare = specifier.replace(/[?#].*$/, "");
			const target = layerOf(posix.normalize(posix.join(dirname(file.path), bare)));
			const fault = file.path.startsWith("src/")
				? faultsOfCore(file, layer, target, bare)
				: faultsOfApp(file, layer, target, bare, packages);
			if (fault !== null) faults.push(fault);
		}
		const banned = file.path.startsWith("src/")
			? layer === "cli"
				? []
				: impure
			: layer === "app/platform"
				? []
				: [...reach, ...reachFiles];
		for (const name of new Set(file.names))
			if (banned.includes(name) || banned.includes(name.replace(/\..*$/, "")))
				faults.push(
					`${file.path} (${layer}) may not use ${name}: ${layer.startsWith("app") ? "only app/platform reaches outside the page" : "the core takes time and chance as arguments"}`,
				);
	}
	return faults;
}
