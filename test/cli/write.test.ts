import { createHash } from "node:crypto";
import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { Ajv2020 } from "ajv/dist/2020.js";
import { beforeAll, describe, expect, test } from "vitest";
import { root } from "../../.ci/house.mjs";
import { bundle, offplumb } from "./support.ts";

const { version } = JSON.parse(readFileSync("package.json", "utf8"));
beforeAll(bundle);

describe.concurrent("what needs no layout", () => {
	test("--version", async () => {
		expect(await offplumb(["--version"])).toEqual({ status: 0, stdout: `${version}\n`, stderr: "" });
	});

	test.each([[["--help"]], [["-h"]], [["assess", "--help"]]])("%s names every command and status", async (args) => {
		const { status, stdout, stderr } = await offplumb(args);
		expect({ status, stderr }).toEqual({ status: 0, stderr: "" });
		for (const word of ["assess FILE", "--json", "--series", "--csv DIR", "schema", "new [NAME]", "Exit status: 0"])
			expect(stdout).toContain(word);
	});

	test("schema: JSON Schema 2020-12 that takes the shipped layouts and a new one, and refuses a damaged one", async () => {
		const { status, stdout, stderr } = await offplumb(["schema"]);
		expect({ status, stderr }).toEqual({ status: 0, stderr: "" });
		const accepts = new Ajv2020({ strict: true }).compile(JSON.parse(stdout));
		const folder = join(root, "assets/layout");
		const shipped = readdirSync(folder).filter((name) => name.endsWith(".layout.json"));
		expect(shipped.length).toBe(3);
		const layouts = shipped.map((name) => JSON.parse(readFileSync(join(folder, name), "utf8")));
		layouts.push(JSON.parse((await offplumb(["new"])).stdout));
		for (const layout of layouts) {
			expect(accepts(layout)).toBe(true);
			expect(accepts({ ...layout, crew: "nobody" })).toBe(false);
		}
	});

	test.each([
		[[], "New layout"],
		[['Name with "quotes" and ü'], 'Name with "quotes" and ü'],
		[[""], ""],
		[["線\\n\u{1F6F0}"], "線\\n\u{1F6F0}"],
	])("new %j: parses and assesses; its bytes are the canonical write", async (names, title) => {
		const made = await offplumb(["new", ...names]);
		expect({ status: made.status, stderr: made.stderr, title: JSON.parse(made.stdout).title }).toEqual({ status: 0, stderr: "", title });
		const { status, stdout, stderr } = await offplumb(["assess", "-", "--json"], { input: made.stdout });
		expect(stderr).toBe("");
		expect([0, 1, 3]).toContain(status);
		const { layout, activities } = JSON.parse(stdout);
		expect(layout).toEqual({ title, sha256: createHash("sha256").update(made.stdout, "utf8").digest("hex") });
		expect(activities.map((a: { summary: { struck: string } }) => a.summary.struck)).toEqual(["deck:main"]);
	});
});
