import { existsSync, readdirSync, readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { notices } from "../../.ci/notices.mjs";

const page = readFileSync("THIRD-PARTY.md", "utf8");
const { dependencies } = JSON.parse(readFileSync("package.json", "utf8"));

test("THIRD-PARTY.md is what node .ci/notices.mjs writes", () => {
	expect(page).toBe(notices());
});

test.each(Object.entries<string>(dependencies))("lists %s %s with a licence", (name, version) => {
	expect(page).toMatch(
		new RegExp(`^\\| ${name} \\| ${version.replaceAll(".", "\\.")} \\| (MIT|ISC|BSD-\\d-Clause|Apache-2\\.0|OFL-1\\.1|MPL-2\\.0) \\|`, "m"),
	);
});

test("lists every folder of assets", () => {
	const folders = existsSync("assets") ? readdirSync("assets").filter((name) => readdirSync(`assets/${name}`).length > 0) : [];
	expect(folders.filter((name) => !page.includes(`(assets/${name}/SOURCE.md)`))).toEqual([]);
});
