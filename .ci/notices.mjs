// @ts-check
// Writes THIRD-PARTY.md from the lockfile, the installed packages and the sources of the assets. Run it after a dependency changed.
import { existsSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { prepare, root } from "./house.mjs";

/** Packages that ship no licence file: the copyright line of their repository. @type {Record<string, string>} */
const without = { "@react-three/fiber": "Copyright (c) 2020 react-spring" };

const isCopyright = (/** @type {string} */ line) =>
	/^\s*(copyright|©)\s/i.test(line) && !/copyright (notice|owner|license|statement)/i.test(line);

/** @param {string} folder */
function licenceText(folder) {
	const name = readdirSync(join(root, folder)).find((file) => /^(licen[sc]e|copying)(\.|$)/i.test(file));
	return name === undefined
		? null
		: readFileSync(join(root, folder, name), "utf8")
				.replaceAll("\r", "")
				.trim();
}

/** The licence without its title and copyright lines, to tell which packages share one. @param {string} text */
const body = (text) =>
	text
		.split("\n")
		.filter((line) => !isCopyright(line) && !/^(#*\s*)?(the )?(mit|isc|bsd[ \w-]*) licen[sc]e( \(\w+\))?:?$/i.test(line.trim()))
		.join("\n")
		.replace(/\n{3,}/g, "\n\n")
		.trim();
const key = (/** @type {string} */ text) => body(text).replace(/\W+/g, " ").toLowerCase();

/** Every package whose code the app or the command line may carry. Type declarations carry none. */
function packages() {
	const lock = JSON.parse(readFileSync(join(root, "package-lock.json"), "utf8")).packages;
	return Object.entries(lock)
		.filter(([path, entry]) => path !== "" && entry.dev !== true && entry.devOptional !== true && !/\/(@types\/|csstype$)/.test(path))
		.map(([path, entry]) => {
			const name = path.replace(/^.*node_modules\//, "");
			const text = licenceText(path);
			const found =
				text
					?.split("\n")
					.filter(isCopyright)
					.map((line) => line.trim()) ?? [];
			const copyright = text === null ? [without[name] ?? ""] : found;
			return { name, version: entry.version, licence: entry.license, text, copyright: copyright.join("; ") };
		})
		.sort((a, b) => (a.name < b.name ? -1 : 1));
}

/** Title and licence section of each SOURCE.md. */
function assets() {
	return readdirSync(join(root, "assets"))
		.filter((name) => existsSync(join(root, "assets", name, "SOURCE.md")))
		.map((name) => {
			const source = readFileSync(join(root, "assets", name, "SOURCE.md"), "utf8").replaceAll("\r", "");
			const title = /^# (.*)$/m.exec(source)?.[1] ?? name;
			return { name, title, licence: /^## Licen[sc]e[\s\S]*?(?=^## (?!Licen[sc]e)|(?![\s\S]))/m.exec(source)?.[0].trim() };
		});
}

/** The whole text of THIRD-PARTY.md. */
export function notices() {
	const listed = packages();
	/** @type {Map<string, { text: string, names: string[] }>} */
	const texts = new Map();
	for (const { name, licence, text } of listed) {
		const shared = text ?? listed.find((other) => other.licence === licence && other.text !== null)?.text;
		if (shared == null) throw new Error(`${name} ships no licence text and no other package shares its licence ${licence}`);
		const group = texts.get(key(shared)) ?? { text: body(shared), names: [] };
		group.names.push(name);
		texts.set(key(shared), group);
	}
	const held = assets();
	return [
		"# Third-party software and data",
		"Offplumb itself is under the MIT licence (LICENSE). The app and the command line carry code of the packages below; `node .ci/notices.mjs` writes this page from the lockfile, the installed packages and `assets/*/SOURCE.md`.",
		[
			"| package | version | licence | copyright |",
			"|---|---|---|---|",
			...listed.map((p) => `| ${p.name} | ${p.version} | ${p.licence} | ${p.copyright} |`),
		].join("\n"),
		"## Data, fonts and files under assets",
		held.map(({ name, title }) => `- ${title}: [assets/${name}/SOURCE.md](assets/${name}/SOURCE.md)`).join("\n"),
		...held.flatMap(({ title, licence }) => (licence === undefined ? [] : [licence.replace(/^##\s+(.*)$/gm, `### ${title}: $1`)])),
		"## Licence texts",
		...[...texts.values()].map(({ text, names }) => `### ${names.join(", ")}\n\n${text.replace(/^#+ /gm, "")}`),
	]
		.join("\n\n")
		.concat("\n");
}

if (process.argv[1] === import.meta.filename) {
	await prepare();
	writeFileSync(join(root, "THIRD-PARTY.md"), notices());
}
